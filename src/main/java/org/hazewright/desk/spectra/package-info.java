/**
 * The place Spectra: prediction and targets over wavelength, and dragging a target.
 *
 * <p>{@link org.hazewright.desk.spectra.SpectraPlot} knows where everything is and draws it with a pen; {@link
 * org.hazewright.desk.spectra.SpectraPlace} puts it on the screen.
 */
package org.hazewright.desk.spectra;
