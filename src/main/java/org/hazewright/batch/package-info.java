/**
 * One making: what was really weighed and measured, what is still to come after a slip, what to add when it missed.
 *
 * <p>Stands on {@code bench}, which planned it, and on {@code learning}, which says what its measurements taught; knows no files and no
 * screens. Start with {@link org.hazewright.batch.Batch}.
 */
package org.hazewright.batch;
