/**
 * Pictures on paper and in files: spectra, readings and dilution series as PNG or SVG.
 *
 * <p>Draws what the domain has computed, with the same colours and marks as the workbooks; knows no file and no workbook.
 */
package org.hazewright.picture;
