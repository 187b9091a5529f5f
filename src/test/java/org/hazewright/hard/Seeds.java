package org.hazewright.hard;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.hazewright.cli.OneLine;
import org.hazewright.files.BatchReader;
import org.hazewright.files.ShelfReader;
import org.hazewright.sheet.FilledIn;
import org.hazewright.sheet.Logbook;
import org.hazewright.shelf.Shelf;

/**
 * Good input for every {@link Door}, made of the files that ship and of what the program writes itself.
 *
 * <p>Run from the project's folder; everything is laid in one folder, so that doors can be opened from there.
 */
final class Seeds {
    /** Longer seeds are left out: a fuzzer that copies much tries little. */
    private static final int LONGEST = 40_000;

    private static Shelf shelf;

    private Seeds() {}

    /** The shelf that recipes and batches are read with. */
    static synchronized Shelf shelf() {
        if (shelf == null) shelf = ShelfReader.readShipped();
        return shelf;
    }

    static void lay(Path things) throws IOException {
        Files.createDirectories(things);
        shelves(things);
        for (Path setUp : files(Path.of("src/main/resources/setups")))
            seed(things, Door.SETUP, setUp.getFileName().toString(), Files.readString(setUp));
        for (Path brief : files(Path.of("recipes-demo"))) {
            if (!brief.toString().endsWith(".brief.toml")) continue;
            String text = Files.readString(brief);
            Door door = text.contains("[series]") || text.contains("[[phantom]]") ? Door.SERIES : Door.BRIEF;
            seed(things, door, brief.getFileName().toString(), text);
        }
        Path bath = Files.copy(Path.of("recipes-demo/wrist-bath.brief.toml"), fresh(things.resolve("bath.brief.toml")));
        OneLine designed = OneLine.run("design", bath.toString(), "--out", things.toString());
        if (designed.status() != 0) throw new IllegalStateException(designed.err());
        String recipe = Files.readString(things.resolve("bath.recipe.toml"));
        seed(things, Door.RECIPE, "bath", recipe);
        String batch = recipe.replaceFirst(
                                "(?m)^format = 1$", "format = 1\nwhen = 2026-03-02\nwho = \"N. N.\"\nbatch_ml = 1000")
                        .replaceAll("(?m)^(mass_g = (.*))$", "$1\nweighed_g = $2")
                + "\n[[target]]\nwavelength_nm = 690\nmua_per_cm = 0.1\n\n[[measured]]\nwhen = 2026-03-03\nmethod = \"slab\"\n"
                + "[[measured.value]]\nwavelength_nm = 690\nmua_per_cm = 0.1\nu_mua_per_cm = 0.002\n";
        seed(things, Door.BATCH, "bath", batch);
        Files.writeString(things.resolve("bath.batch.toml"), batch);
        Files.write(
                fresh(things.resolve("seed.xlsx")),
                Parts.pages(things.resolve("bath.xlsx"), List.of("sheet_format", "weighed_g")));
        FilledIn.read(things.resolve("seed.xlsx")); // good input: refused by nobody
        Files.write(
                fresh(things.resolve("page.xlsx")),
                Parts.page(List.of(
                        List.of("wavelength (nm)", "µa /cm", "u(µa)"),
                        List.of(690, 0.1, 0.002),
                        List.of(830, "1,05e-1", 0.002))));
        Path logbook = fresh(things.resolve("logbook.xlsx"));
        Logbook.record(
                logbook,
                BatchReader.read(things.resolve("bath.batch.toml"), shelf()),
                things.resolve("bath.batch.toml"));
        parts(things, Door.SHEET, things.resolve("seed.xlsx"));
        parts(things, Door.PAGE, things.resolve("page.xlsx"));
        parts(things, Door.LOGBOOK, logbook);
        seed(things, Door.TABLE, "sizes", "diameter_nm,weight\n100,1\n200,3.5\n400,1e-1\n");
        seed(things, Door.TABLE, "spheres", "size_parameter,index,absorption_index\n1,1.5,0\n10,1.33,0.01\n");
        seed(
                things,
                Door.COEFFICIENTS,
                "commas",
                "# measured\nwavelength (nm),µa /cm,u(µa),µs' (1/cm),± µs'\n690,0.1,0.002,10.0,0.2\n830,1.05e-1,0.002,8.1,0.2\n");
        seed(things, Door.COEFFICIENTS, "semicolons", "nm;mua_per_mm;musp_per_mm\n690,5;0,01;1,0\n830;0,0105;0,81\n");
        seed(
                things,
                Door.DILUTION,
                "ink",
                "concentration_g_per_ml,path_mm,wavelength_nm,transmission,u\n0,10,700,1,0.001\n0.0001,10,700,0.5,0.001\n"
                        + "0.0002,10,700,0.25,0.001\n0.0003,10,700,0.125,0.001\n0.0001,10,800,0.6,0.001\n0.0002,10,800,0.36,0.001\n"
                        + "0.0003,10,800,0.22,0.001\n0.0004,10,800,0.13,0.001\n");
        seed(
                things,
                Door.DILUTION,
                "absorbance",
                "mass_fraction,path_mm,wavelength_nm,absorbance\n0,10,700,0\n1e-4,10,700,0.3\n"
                        + "2e-4,5,700,0.3\n3e-4,10,700,0.9\n");
        seed(things, Door.TISSUE, "oxy", Files.readString(Path.of("ingredients/spectra/haemoglobin-oxy-molar.csv")));
        seed(
                things,
                Door.WINDOW,
                "settings",
                "recent.0=/tmp/a.brief.toml\nwidth=1280\nfavourites=ink-demo water\nin-hand.ink-demo=12.5\ndark=yes\n");
        seed(things, Door.WINDOW, "steps", "step.0=done\nstep.1=open 12.5 3.25\nstep.2=done 0.5\n");
        commands(things);
    }

    private static void shelves(Path things) throws IOException {
        Path from = Path.of("ingredients");
        Path small = Files.createDirectories(things.resolve("shelf"));
        Path ofMaterials = things.resolve("shelf-of-materials");
        Path ofTables = things.resolve("shelf-of-tables");
        for (Path shelf : List.of(small, ofMaterials, ofTables))
            for (String folder : List.of("materials", "spectra")) Files.createDirectories(shelf.resolve(folder));
        for (String file : List.of(
                "water.toml",
                "spectra/water-absorption.csv",
                "materials/water.toml",
                "gelatin-powder.toml",
                "materials/gelatin.toml",
                "materials/soybean-oil.toml",
                "spectra/soybean-oil-index.csv",
                "ink-demo.toml",
                "spectra/ink-demo-extinction.csv",
                "spectra/soybean-emulsion-20-absorption.csv"))
            Files.copy(from.resolve(file), fresh(small.resolve(file)));
        for (Path file : files(from)) {
            String name = file.getFileName().toString();
            if (!name.endsWith(".toml")) continue;
            seed(things, Door.INGREDIENT, name, renamed(Files.readString(file)));
        }
        for (Path file : files(from.resolve("materials")))
            seed(things, Door.MATERIAL, file.getFileName().toString(), renamed(Files.readString(file)));
        for (Path file : files(from.resolve("spectra"))) {
            String text = Files.readString(file);
            if (text.contains("mua_per_cm"))
                seed(things, Door.SPECTRUM, file.getFileName().toString(), text);
        }
        // Powders whose only material, and whose only table, is the one that is tried.
        String powder =
                "format = 1\nid = \"powder\"\nname = \"Powder\"\npart = \"scatterer\"\nfamilies = [\"liquid\"]\n"
                        + "form = \"powder\"\ndensity_g_per_ml = 2\n[source]\nbasis = \"invented\"\n[uncertainty]\nabsorption = 0.1\n"
                        + "scattering = 0.1\n";
        Files.writeString(
                ofMaterials.resolve("powder.toml"),
                powder + "[scattering]\nmodel = \"mie\"\nparticle = \"fuzzed\"\nparticle_volume_fraction = 1\n"
                        + "crowding = \"none\"\n[scattering.size]\nkind = \"single\"\ndiameter_nm = 300\n");
        Files.copy(
                from.resolve("spectra/soybean-oil-index.csv"),
                fresh(ofMaterials.resolve("spectra/soybean-oil-index.csv")));
        Files.writeString(ofTables.resolve("powder.toml"), powder + "[absorption]\ntable = \"spectra/fuzzed.csv\"\n");
    }

    private static String renamed(String toml) {
        return toml.replaceFirst("(?m)^id = \".*\"", "id = \"fuzzed\"");
    }

    private static void parts(Path things, Door door, Path workbook) throws IOException {
        for (Map.Entry<String, byte[]> part : Parts.of(workbook).entrySet()) {
            String text = part.getKey() + "\n" + new String(part.getValue(), StandardCharsets.UTF_8);
            if (part.getKey()
                    .matches(
                            "xl/(workbook|sharedStrings|styles|worksheets/sheet\\d+|tables/.*|_rels/.*)\\.(xml|rels)|\\[.*"))
                seed(things, door, part.getKey().replace('/', '-'), text);
        }
    }

    private static void commands(Path things) throws IOException {
        int n = 0;
        for (String line : List.of(
                "design bath.brief.toml --out out",
                "design bath.brief.toml --out out --alternatives 2 --json --units mm",
                "predict bath.recipe.toml --at 690,830 --json",
                "predict bath.batch.toml --from 600 --to 900 --step 50 --quiet",
                "readings bath.recipe.toml --at 690",
                "readings --medium mua_per_cm=0.1,musp_per_cm=10,g=0.8,n=1.4 --setup slab-10-mm --json",
                "batch show bath.batch.toml",
                "correct bath.batch.toml",
                "ingredients list",
                "ingredients show water",
                "ingredients check shelf",
                "particles polystyrene --in water --diameter-nm 500 --at 633,700 --volume-fraction 0.05 --crowding percus-yevick",
                "particles polystyrene --in water --lognormal-nm 300,1.5 --at 633 --ingredients shelf",
                "particles --size-parameter 10 --index 1.5,0.01 --json"))
            seed(things, Door.COMMAND, "line-" + n++, line.replace(' ', '\n'));
        for (String command : OneLine.commands()) seed(things, Door.COMMAND, "help-" + command, command + "\n--help");
    }

    private static void seed(Path things, Door door, String name, String text) throws IOException {
        if (text.length() > LONGEST) return;
        Path folder = Files.createDirectories(things.resolve("seeds").resolve(door.word()));
        Files.writeString(folder.resolve(name), text);
    }

    private static Path fresh(Path file) throws IOException {
        Files.createDirectories(file.toAbsolutePath().getParent());
        Files.deleteIfExists(file);
        return file;
    }

    /** The ordinary files of a folder, by name. */
    static List<Path> files(Path folder) {
        if (!Files.isDirectory(folder)) return List.of();
        try (Stream<Path> all = Files.list(folder)) {
            return all.filter(Files::isRegularFile).sorted().toList();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Words of the seeds of a door, as the dictionary of a fuzzer. */
    static String dictionary(Path things, Door door) throws IOException {
        java.util.Set<String> words = new java.util.TreeSet<>(List.of(
                "1e400",
                "-1",
                "1e-320",
                "nan",
                "inf",
                "99999999999999999999",
                "[[",
                "]]",
                "\\\"\\\"\\\"",
                "true",
                "2026-03-02",
                "../",
                "/dev/zero",
                "\\xEF\\xBB\\xBF"));
        Pattern word = Pattern.compile("[A-Za-z][A-Za-z0-9_-]{3,30}");
        for (Path seed : door.seeds(things)) {
            Matcher m = word.matcher(Files.readString(seed));
            while (m.find() && words.size() < 600) words.add(m.group());
        }
        StringBuilder out = new StringBuilder();
        words.forEach(w -> out.append('"').append(w).append("\"\n"));
        return out.toString();
    }
}
