package org.hazewright.files;

import java.nio.file.Path;
import java.util.function.Supplier;
import org.hazewright.brief.Tissue;
import org.hazewright.optics.Spectrum;

/**
 * The published spectra that tissue-like targets are made of, from a shelf's {@code spectra/} folder.
 *
 * <p>{@code haemoglobin-oxy-molar.csv} and {@code haemoglobin-deoxy-molar.csv}: wavelength_nm, epsilon10_l_per_mol_cm (decadic,
 * per tetramer). {@code water-absorption.csv} and {@code soybean-oil-absorption.csv}, which stands for fat: wavelength_nm,
 * mua_per_cm. A table that a shelf does not have is taken from the shelf of the program.
 */
public final class TissueSpectra {
    private TissueSpectra() {}

    /** For a shelf's folder. */
    public static Tissue.Spectra read(Path folder) {
        ShelfFolder own = new ShelfFolder(folder, folder.toString());
        return of(own);
    }

    /** From the shelf of the program. */
    public static Tissue.Spectra shipped() {
        return ShelfReader.inShipped(root -> of(new ShelfFolder(root, ShelfReader.SHIPPED)));
    }

    private static Tissue.Spectra of(ShelfFolder folder) {
        return new Tissue.Spectra(
                spectrum(folder, "spectra/haemoglobin-oxy-molar.csv", "epsilon10_l_per_mol_cm"),
                spectrum(folder, "spectra/haemoglobin-deoxy-molar.csv", "epsilon10_l_per_mol_cm"),
                spectrum(folder, "spectra/water-absorption.csv", "mua_per_cm"),
                spectrum(folder, "spectra/soybean-oil-absorption.csv", "mua_per_cm"));
    }

    /** {@link #read} of a folder, or with null {@link #shipped}, when first asked for. */
    public static Supplier<Tissue.Spectra> of(Path folder) {
        return () -> folder == null ? shipped() : read(folder);
    }

    private static Spectrum spectrum(ShelfFolder folder, String path, String column) {
        Place from = Place.whole(folder.shown());
        CsvTable table = folder.holds(path) || folder.shown().equals(ShelfReader.SHIPPED)
                ? folder.table(path, from)
                : ShelfReader.inShipped(root -> new ShelfFolder(root, ShelfReader.SHIPPED).table(path, from));
        table.refuseUnknown("wavelength_nm", column);
        table.refuseNegative(column);
        return table.spectrum(column, path);
    }
}
