/** How the window looks: its colours, light and dark, and the size of its letters. Start with {@link org.hazewright.desk.look.Palette}. */
package org.hazewright.desk.look;
