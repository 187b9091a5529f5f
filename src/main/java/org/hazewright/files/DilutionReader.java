package org.hazewright.files;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import org.hazewright.learning.DilutionReading;
import org.hazewright.learning.DilutionSeries;
import org.hazewright.shelf.Ingredient;

/**
 * A dilution series as a table, one row a reading: {@code concentration_g_per_ml} or {@code mass_fraction}, {@code path_mm}, {@code
 * wavelength_nm}, {@code transmission} or {@code absorbance}, and {@code u}, the reading's standard uncertainty, for all rows or for none.
 */
public final class DilutionReader {
    private DilutionReader() {}

    /** What the table does not say of what was diluted and how. */
    public record About(
            Ingredient ingredient, double diluentDensityGPerMl, double albedo, double uAlbedo, double uCommon) {}

    public static DilutionSeries read(Path csv, About about) {
        return read(CsvTable.read(csv), about);
    }

    public static DilutionSeries read(CsvTable table, About about) {
        table.refuseUnknown(
                "concentration_g_per_ml",
                "mass_fraction",
                "path_mm",
                "wavelength_nm",
                "transmission",
                "absorbance",
                "u");
        String amount = table.oneOf("concentration_g_per_ml", "mass_fraction");
        String signal = table.oneOf("transmission", "absorbance");
        double[] c = table.column(amount);
        double[] path = table.column("path_mm");
        double[] nm = table.column("wavelength_nm");
        double[] value = table.column(signal);
        double[] u = table.has("u") ? table.column("u") : null;
        double density = about.ingredient().densityGPerMl();
        List<DilutionReading> readings = new ArrayList<>();
        for (int k = 0; k < c.length; k++) {
            int row = k;
            readings.add(table.at(k)
                    .of(() -> new DilutionReading(
                            amount.equals("mass_fraction")
                                    ? DilutionReading.gPerMl(c[row], density, about.diluentDensityGPerMl())
                                    : c[row],
                            path[row],
                            nm[row],
                            signal.equals("absorbance")
                                    ? DilutionReading.Signal.ABSORBANCE
                                    : DilutionReading.Signal.TRANSMISSION,
                            value[row],
                            u == null ? OptionalDouble.empty() : OptionalDouble.of(u[row]))));
        }
        return table.atHeader()
                .of(() -> new DilutionSeries(
                        about.ingredient().id(), density, about.albedo(), about.uAlbedo(), about.uCommon(), readings));
    }
}
