/** The place Brief: what is wanted, edited where it stands. Start with {@link org.hazewright.desk.brief.BriefPlace}. */
package org.hazewright.desk.brief;
