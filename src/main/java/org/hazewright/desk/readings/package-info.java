/** The place Readings: what instruments would show on the recipe, in pictures. Start with {@link org.hazewright.desk.readings.ReadingsPlace}. */
package org.hazewright.desk.readings;
