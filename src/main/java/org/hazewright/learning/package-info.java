/**
 * What measurements teach: a lot's figures from a dilution series, its factors from measured batches, and what the data say of
 * both.
 *
 * <p>Values and linear algebra only: no files, no wishes, no balance. Knows mixtures, the shelf and the optics. Start with {@link
 * org.hazewright.learning.DilutionSeries} for a bottle read in a cell, with {@link org.hazewright.learning.LotUpdate} for
 * bottles that went into a measured batch.
 */
package org.hazewright.learning;
