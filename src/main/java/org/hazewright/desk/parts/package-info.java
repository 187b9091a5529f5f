/** Small parts that several places of the window are made of. Start with {@link org.hazewright.desk.parts.Gauge}. */
package org.hazewright.desk.parts;
