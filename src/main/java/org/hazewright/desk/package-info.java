/**
 * The window: ask, see, weigh, record.
 *
 * <p>{@link org.hazewright.desk.model} says what is shown and what an edit does, and knows no scene; each place of the window has a
 * package of views that bind to it. No physics lives here. Start with {@link org.hazewright.desk.Window}.
 */
package org.hazewright.desk;
