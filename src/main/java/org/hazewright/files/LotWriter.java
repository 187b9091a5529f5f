package org.hazewright.files;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;

/**
 * A lot as the files of a shelf: {@code <id>.toml} with what differs from its ingredient, and a table of its extinction in {@code spectra/}.
 *
 * <p>The table is in cm²/g and to six digits, which is far finer than any lot is known.
 */
public final class LotWriter {
    private LotWriter() {}

    /** Writes into a shelf's folder and gives the files written. A lot that is there already is left alone and refused. */
    public static List<Path> write(Path shelfFolder, Ingredient lot, List<String> notes) {
        Lot which = lot.lot().orElseThrow(() -> new Refusal(lot.id() + " is no lot."));
        Path file = shelfFolder.resolve(lot.id() + ".toml");
        if (Files.exists(file))
            throw new Refusal(file + " is there already; give the lot another --number, or move the old file away.");
        if (!lot.id().matches("[A-Za-z0-9][A-Za-z0-9._-]{0,79}"))
            throw new Refusal("The lot would be called \"" + lot.id()
                    + "\"; its number takes letters, digits, dots, hyphens and underscores.");
        List<Path> written = new ArrayList<>();
        StringBuilder out = new StringBuilder();
        for (String note : notes) out.append(TomlText.comment(note)).append('\n');
        out.append("format = 1\n");
        out.append("id = ").append(TomlText.text(lot.id())).append('\n');
        out.append("lot_of = ").append(TomlText.text(which.of())).append("\n\n[lot]\n");
        out.append("number = ").append(TomlText.text(which.number())).append('\n');
        which.received().ifPresent(d -> out.append("received = ").append(d).append('\n'));
        which.opened().ifPresent(d -> out.append("opened = ").append(d).append('\n'));
        which.expires().ifPresent(d -> out.append("expires = ").append(d).append('\n'));
        which.drift()
                .ifPresent(d -> out.append("drift = ").append(TomlText.text(d)).append('\n'));
        out.append("\n[source]\nbasis = ")
                .append(TomlText.text(lot.source().basis().word()))
                .append("\ncitation = ")
                .append(TomlText.text(lot.source().citation()))
                .append("\n\n[uncertainty]\n");
        number(out, "absorption", lot.uncertainty().absorption());
        number(out, "scattering", lot.uncertainty().scattering());
        if (lot.uncertainty().correlation() != 0)
            number(out, "correlation", lot.uncertainty().correlation());
        // A scatterer's small own absorption stays its ingredient's where nothing was learned of it.
        if (lot.absorption().isPresent()) {
            Absorption a = lot.absorption().get();
            String name = "spectra/" + lot.id() + "-extinction.csv";
            Path table = shelfFolder.resolve(name);
            SafeFile.write(table, table(lot, a), SafeFile.Overwrite.KEEP_PREVIOUS);
            written.add(table);
            out.append("\n[absorption]\ntable = ").append(TomlText.text(name)).append('\n');
            number(out, "albedo", a.albedo());
            number(out, "g", a.g());
        }
        if (lot.scattering().orElse(null) instanceof Scattering.MieParticles mie && mie.absorptionMagnitude() != 1) {
            if (lot.absorption().isEmpty()) out.append("\n[absorption]\n");
            number(out, "magnitude", mie.absorptionMagnitude());
        }
        lot.scattering().ifPresent(s -> {
            out.append("\n[scattering]\n");
            number(out, "magnitude", magnitude(s));
        });
        SafeFile.write(file, out.toString(), SafeFile.Overwrite.NEVER);
        written.add(0, file);
        return written;
    }

    /** {@code <ingredient>-lot-<number>}. */
    public static String id(String ingredient, String number) {
        return ingredient + "-lot-" + number;
    }

    /** Whether a lot's file could hold what was learned of an ingredient: bases are not written as lots. */
    public static boolean canBeLot(Ingredient i) {
        return i.part() != Part.BASE && !i.isBlend();
    }

    private static double magnitude(Scattering s) {
        return s.magnitude();
    }

    private static String table(Ingredient lot, Absorption a) {
        StringBuilder out = new StringBuilder();
        out.append(TomlText.comment("material: " + lot.name() + ", lot "
                        + lot.lot().orElseThrow().number()))
                .append('\n');
        out.append(
                "# quantity: extinction by mass in the phantom's volume, base e; the lot's file says which share is scattering\n");
        out.append(TomlText.comment("source: " + lot.source().citation())).append('\n');
        out.append("wavelength_nm,mua_cm2_per_g\n");
        double[] nm = a.table().wavelengthsNm();
        double[] values = a.table().values();
        for (int k = 0; k < nm.length; k++)
            out.append(TomlText.number(nm[k]))
                    .append(',')
                    .append(TomlText.number(rounded(values[k] * a.perTableUnit())))
                    .append('\n');
        return out.toString();
    }

    private static void number(StringBuilder out, String key, double v) {
        out.append(key).append(" = ").append(TomlText.number(rounded(v))).append('\n');
    }

    private static double rounded(double v) {
        return new java.math.BigDecimal(v).round(new java.math.MathContext(6)).doubleValue();
    }
}
