/**
 * One way of drawing for screen, picture files and paper.
 *
 * <p>Drawings know only {@link org.hazewright.desk.pen.Pen}; what they end up on does not matter to them.
 */
package org.hazewright.desk.pen;
