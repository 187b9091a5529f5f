package org.hazewright.files;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.stream.Collectors;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;

/** A new ingredient as the files of a shelf: {@code <id>.toml}, and in {@code spectra/} its table of absorption. */
public final class IngredientWriter {
    private IngredientWriter() {}

    /** What the figures of a table are given per; the name of its column. */
    public enum Basis {
        NEAT("mua_per_cm"),
        MASS("mua_cm2_per_g");

        private final String column;

        Basis(String column) {
            this.column = column;
        }
    }

    /** Extinction over wavelength in nm, ascending; {@code albedo} is the share of it that is scattering, with mean cosine g. */
    public record Table(Basis basis, double[] wavelengthNm, double[] value, double albedo, double g) {
        public Table {
            wavelengthNm = wavelengthNm.clone();
            value = value.clone();
            if (wavelengthNm.length < 2 || wavelengthNm.length != value.length)
                throw new Refusal("A table needs a value at two wavelengths or more.");
        }
    }

    /** µs' = musp (λ/at)^−exponent, cm²/g. */
    public record PowerLaw(double muspCm2PerG, double atNm, double exponent, double g) {}

    /** An ingredient whose figures a person has: no particles, no blend. */
    public record Plain(
            String id,
            String name,
            Part part,
            Set<Family> families,
            Form form,
            double densityGPerMl,
            OptionalDouble pricePerG,
            Source source,
            Uncertainty uncertainty,
            Optional<Table> absorption,
            Optional<PowerLaw> scattering) {
        public Plain {
            families = Set.copyOf(families);
            if (!id.matches("[a-z0-9][a-z0-9-]{0,79}"))
                throw new Refusal("The id “" + id + "” is also the file's name: small letters, digits and hyphens.");
            if (families.isEmpty()) throw new Refusal("Tick at least one kind of base that it mixes into.");
            if (absorption.isEmpty() && scattering.isEmpty())
                throw new Refusal(
                        "Give a table of its absorption, or its scattering; without either it does nothing to light.");
        }
    }

    /**
     * Writes into a shelf's folder and gives the files written, the ingredient's own first. What is there already is left alone and
     * refused; files that the shelf's reader then refuses are taken away again, and its words are passed on.
     */
    public static List<Path> write(Path shelfFolder, Plain i) {
        Path file = shelfFolder.resolve(i.id() + ".toml");
        Path table = shelfFolder.resolve("spectra").resolve(i.id() + "-absorption.csv");
        if (Files.exists(file) || i.absorption().isPresent() && Files.exists(table))
            throw new Refusal("The shelf holds “" + i.id() + "” already; give the new one another id.");
        List<Path> written = new ArrayList<>();
        if (i.absorption().isPresent()) {
            SafeFile.write(table, csv(i, i.absorption().get()), SafeFile.Overwrite.NEVER);
            written.add(table);
        }
        SafeFile.write(file, toml(i), SafeFile.Overwrite.NEVER);
        written.add(0, file);
        Optional<FileRefusal> refused = ShelfReader.readLenient(shelfFolder).refusals().stream()
                .filter(r -> r.path().endsWith(i.id() + ".toml")
                        || r.path().endsWith(table.getFileName().toString()))
                .findFirst();
        if (refused.isPresent()) {
            for (Path p : written)
                try {
                    Files.deleteIfExists(p);
                } catch (java.io.IOException left) {
                    continue; // the refusal that follows names what is wrong
                }
            throw refused.get();
        }
        return written;
    }

    private static String toml(Plain i) {
        StringBuilder out = new StringBuilder("format = 1\n");
        out.append("id = ").append(TomlText.text(i.id())).append('\n');
        out.append("name = ").append(TomlText.text(i.name())).append('\n');
        out.append("part = ").append(TomlText.text(i.part().word())).append('\n');
        out.append("families = ")
                .append(i.families().stream()
                        .sorted()
                        .map(f -> TomlText.text(f.word()))
                        .collect(Collectors.joining(", ", "[", "]")))
                .append('\n');
        out.append("form = ").append(TomlText.text(i.form().word())).append('\n');
        number(out, "density_g_per_ml", i.densityGPerMl());
        i.pricePerG().ifPresent(v -> number(out, "price_per_g", v));
        out.append("\n[source]\nbasis = ")
                .append(TomlText.text(i.source().basis().word()))
                .append('\n');
        if (!i.source().citation().isEmpty())
            out.append("citation = ")
                    .append(TomlText.text(i.source().citation()))
                    .append('\n');
        out.append("\n[uncertainty]\n");
        number(out, "absorption", i.uncertainty().absorption());
        number(out, "scattering", i.uncertainty().scattering());
        i.absorption().ifPresent(t -> {
            out.append("\n[absorption]\ntable = ")
                    .append(TomlText.text("spectra/" + i.id() + "-absorption.csv"))
                    .append('\n');
            if (t.albedo() > 0) {
                number(out, "albedo", t.albedo());
                number(out, "g", t.g());
            }
        });
        i.scattering().ifPresent(s -> {
            out.append("\n[scattering]\nmodel = \"power\"\n");
            number(out, "musp_cm2_per_g", s.muspCm2PerG());
            number(out, "at_nm", s.atNm());
            number(out, "exponent", s.exponent());
            number(out, "g", s.g());
        });
        return out.toString();
    }

    private static String csv(Plain i, Table t) {
        StringBuilder out = new StringBuilder();
        out.append(TomlText.comment("material: " + i.name())).append('\n');
        out.append("# quantity: ")
                .append(t.albedo() > 0 ? "extinction" : "absorption")
                .append(" coefficient, base e, ")
                .append(
                        t.basis() == Basis.NEAT
                                ? "of the ingredient as bought, 1/cm"
                                : "by mass in the phantom's volume, cm2/g")
                .append('\n');
        out.append(TomlText.comment("source: " + i.source().basis().word() + " "
                        + i.source().citation()))
                .append('\n');
        out.append("wavelength_nm,").append(t.basis().column).append('\n');
        for (int k = 0; k < t.wavelengthNm().length; k++)
            out.append(TomlText.number(t.wavelengthNm()[k]))
                    .append(',')
                    .append(TomlText.number(t.value()[k]))
                    .append('\n');
        return out.toString();
    }

    private static void number(StringBuilder out, String key, double v) {
        out.append(key).append(" = ").append(TomlText.number(v)).append('\n');
    }

    /**
     * The first two columns of a file of numbers, wavelength in nm and value, in ascending order: commas, semicolons or tabs between them,
     * comment lines and headings left aside.
     */
    public static double[][] twoColumns(Path file) {
        TextFile text = TextFile.read(file);
        List<double[]> rows = new ArrayList<>();
        int n = 0;
        for (String line : text.text().split("\\R")) {
            n++;
            if (line.isBlank() || line.startsWith("#")) continue;
            String mark = line.contains("\t") ? "\t" : line.contains(";") ? ";" : ",";
            String[] cells = line.split(mark, -1);
            try {
                boolean decimalCommas = !mark.equals(",");
                double nm = number(cells[0], decimalCommas);
                double v = number(cells[1], decimalCommas);
                if (!rows.isEmpty() && !(nm > rows.get(rows.size() - 1)[0]))
                    throw new FileRefusal(
                            file.toString(), n, 1, "The wavelengths must ascend; " + cells[0].strip() + " does not.");
                rows.add(new double[] {nm, v});
            } catch (NumberFormatException | ArrayIndexOutOfBoundsException e) {
                if (rows.isEmpty()) continue; // a heading
                throw new FileRefusal(
                        file.toString(),
                        n,
                        1,
                        "Here should stand a wavelength in nm and a value: “" + line.strip() + "”.");
            }
        }
        if (rows.size() < 2)
            throw Place.whole(file.toString()).refusal("The file holds no table of wavelengths in nm and values.");
        double[][] columns = new double[2][rows.size()];
        for (int k = 0; k < rows.size(); k++) {
            columns[0][k] = rows.get(k)[0];
            columns[1][k] = rows.get(k)[1];
        }
        return columns;
    }

    private static double number(String cell, boolean decimalCommas) {
        String s = cell.strip();
        return Double.parseDouble(decimalCommas ? s.replace(',', '.') : s);
    }

    /** Copies the shelf of the program into a folder that is empty or not there yet, to be made a person's own. */
    public static void copyShippedTo(Path folder) {
        ShelfReader.inShipped(root -> {
            try (var all = Files.walk(root)) {
                for (Path p : all.filter(Files::isRegularFile).toList()) {
                    Path to = folder.resolve(root.relativize(p).toString());
                    SafeFile.write(to, Files.readAllBytes(p), SafeFile.Overwrite.NEVER);
                }
                return null;
            } catch (java.io.IOException e) {
                throw new Refusal(
                        "The shelf of the program could not be copied to " + folder + " (" + e.getMessage() + ").");
            }
        });
    }
}
