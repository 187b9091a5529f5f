/**
 * What the window shows and what can be done there, without any scene: values, observable where a view must follow them.
 *
 * <p>Nothing here may use {@code javafx.scene}; tests run it without a toolkit. Start with {@link
 * org.hazewright.desk.model.Desk}.
 */
package org.hazewright.desk.model;
