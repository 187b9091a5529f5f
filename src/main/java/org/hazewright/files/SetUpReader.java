package org.hazewright.files;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Stream;
import org.hazewright.optics.Refusal;
import org.hazewright.reading.SetUp;
import org.hazewright.reading.SetUp.Kind;
import org.hazewright.shelf.Nearest;
import org.hazewright.transport.Convention;
import org.hazewright.transport.Response;
import org.hazewright.transport.TimeAxis;

/**
 * A set-up file, {@code NAME.setup.toml}, to a {@link SetUp}; and the set-ups that come with the program, by name.
 *
 * <p>Left out: outside index 1, model auto, 1 000 000 packets from seed 1, and the convention's defaults. A response table (time_ps,
 * counts) is found from the folder of the set-up's file.
 */
public final class SetUpReader {
    private static final String ENDING = ".setup.toml";
    /** Largest whole number that a TOML number read as a double still tells from its neighbours. */
    private static final double MOST_SEED = 9e15;

    private final Path folder;
    private final TomlPage page;
    private final Kind kind;

    private SetUpReader(Path folder, TomlPage page) {
        this.folder = folder;
        this.page = page;
        page.requireFormat(FileKind.SET_UP);
        page.refuseUnknown(
                "format",
                "title",
                "kind",
                "wavelengths_nm",
                "outside_index",
                "distances_mm",
                "modulation_mhz",
                "time_ps",
                "response",
                "counts",
                "thickness_mm",
                "model",
                "packets",
                "seed",
                "convention");
        this.kind = page.word("kind", Kind.class);
    }

    public static SetUp read(Path file) {
        return read(file, file.toString());
    }

    private static SetUp read(Path file, String shown) {
        TomlPage page = TomlPage.of(TextFile.read(file, shown));
        return new SetUpReader(file.toAbsolutePath().getParent(), page).setUp(nameOf(file));
    }

    /** A file when there is one of that name, else a set-up of the program. */
    public static SetUp named(String fileOrName) {
        if (shipped().contains(fileOrName)) return readShipped(fileOrName);
        Path file;
        try {
            file = Path.of(fileOrName);
        } catch (InvalidPathException e) {
            throw noSuch(fileOrName);
        }
        boolean aFile = fileOrName.endsWith(".toml") || Files.exists(file);
        if (!aFile) throw noSuch(fileOrName);
        return read(file);
    }

    private static Refusal noSuch(String name) {
        List<String> all = shipped();
        return new Refusal(
                "There is no set-up \"" + name + "\"; name a file NAME.setup.toml or one that comes with the program: "
                        + String.join(", ", all) + "."
                        + Nearest.to(name, all)
                                .map(n -> " Perhaps \"" + n + "\" is meant.")
                                .orElse(""));
    }

    /** Names of the set-ups that come with the program, in order of the alphabet. */
    public static List<String> shipped() {
        return inShipped(setUps -> {
            try (Stream<Path> files = Files.list(setUps)) {
                return files.map(f -> f.getFileName().toString())
                        .filter(n -> n.endsWith(ENDING))
                        .map(n -> n.substring(0, n.length() - ENDING.length()))
                        .sorted()
                        .toList();
            } catch (IOException e) {
                throw Place.whole("set-ups of the program").refusal("They cannot be listed (" + e.getMessage() + ").");
            }
        });
    }

    public static SetUp readShipped(String name) {
        return inShipped(setUps -> read(setUps.resolve(name + ENDING), name + ENDING));
    }

    /** The text of a shipped set-up, to begin one's own with. */
    public static String shippedText(String name) {
        if (!shipped().contains(name)) throw noSuch(name);
        return inShipped(setUps ->
                TextFile.read(setUps.resolve(name + ENDING), name + ENDING).text());
    }

    private static <T> T inShipped(java.util.function.Function<Path, T> reader) {
        return ShelfReader.inShipped(shelf -> reader.apply(shelf.resolveSibling("setups")));
    }

    /** {@code probe.setup.toml} is called probe, and so is {@code probe.toml}. */
    public static String nameOf(Path file) {
        String name = file.getFileName().toString();
        for (String ending : new String[] {ENDING, ".toml"})
            if (name.endsWith(ending) && name.length() > ending.length())
                return name.substring(0, name.length() - ending.length());
        return name;
    }

    private SetUp setUp(String name) {
        refuseWhatTheKindCannotUse();
        SetUp.Draft draft = SetUp.of(page.text("title", name), kind)
                .wavelengthsNm(list("wavelengths_nm", 100, 20_000))
                .outsideIndex(page.within("outside_index", 1, 4, 1))
                .packets((long) whole("packets", 1000, 1e10, 1_000_000))
                .seed((long) whole("seed", 0, MOST_SEED, 1))
                .convention(convention());
        if (hasDistances()) draft.distancesMm(list("distances_mm", 1e-3, 1e4));
        if (kind == Kind.FREQUENCY) draft.modulationMhz(page.within("modulation_mhz", 1e-3, 1e5));
        if (kind == Kind.TIME) draft.time(time());
        if (page.has("response")) draft.response(response());
        if (page.has("counts")) draft.counts(page.positive("counts"));
        boolean needsThickness = kind == Kind.SLAB || kind == Kind.COLLIMATED;
        if (needsThickness || page.has("thickness_mm")) draft.thicknessMm(page.within("thickness_mm", 1e-3, 1e4));
        if (page.has("model")) draft.model(page.word("model", SetUp.ModelChoice.class));
        String blamed = page.has("model") ? "model" : hasDistances() ? "distances_mm" : "wavelengths_nm";
        return page.holding(blamed, draft::done);
    }

    private boolean hasDistances() {
        return switch (kind) {
            case REFLECTANCE, SLOPE, FREQUENCY, TIME -> true;
            case SLAB, COLLIMATED, OXIMETER -> false;
        };
    }

    private void refuseWhatTheKindCannotUse() {
        if (!hasDistances()) refuseUseless("distances_mm");
        if (kind != Kind.FREQUENCY) refuseUseless("modulation_mhz");
        if (kind != Kind.TIME) refuseUseless("time_ps", "response", "counts");
        if (kind == Kind.OXIMETER) refuseUseless("thickness_mm");
    }

    private void refuseUseless(String... keys) {
        for (String key : keys)
            if (page.has(key))
                throw page.refusal(
                        key,
                        "A set-up of kind " + kind.word() + " has no use for " + key
                                + "; take the line out, or change kind.");
    }

    /** Numbers of a list, each once and within its limits; a fault is told at its own entry. */
    private List<Double> list(String key, double low, double high) {
        double[] numbers = page.numbers(key);
        int least = kind == Kind.SLOPE && key.equals("distances_mm") || kind == Kind.OXIMETER ? 2 : 1;
        if (numbers.length < least || numbers.length > 1000)
            throw page.refusal(
                    key,
                    key + " has " + numbers.length + (numbers.length == 1 ? " entry" : " entries")
                            + "; a set-up of kind " + kind.word() + " needs " + least + " to 1000.");
        Set<Double> seen = new HashSet<>();
        List<Double> list = new ArrayList<>();
        for (int i = 0; i < numbers.length; i++) {
            Place at = page.at(key, i);
            String entry = "Entry " + (i + 1) + " of " + key + " is " + TomlPage.plain(numbers[i]);
            if (numbers[i] < low || numbers[i] > high)
                throw at.refusal(
                        entry + "; it must lie between " + TomlPage.plain(low) + " and " + TomlPage.plain(high) + ".");
            if (!seen.add(numbers[i])) throw at.refusal(entry + ", which stands there before; each entry stands once.");
            list.add(numbers[i]);
        }
        return list;
    }

    private double whole(String key, double low, double high, double otherwise) {
        if (!page.has(key)) return otherwise;
        double v = page.within(key, low, high);
        if (v != Math.rint(v))
            throw page.refusal(key, key + " is " + TomlPage.plain(v) + "; it must be a whole number.");
        return v;
    }

    private TimeAxis time() {
        if (!page.has("time_ps"))
            throw page.at()
                    .refusal("The key time_ps is missing; a set-up of kind time needs one:"
                            + " time_ps = {from = 0, to = 5000, step = 5}.");
        TomlPage t = page.table("time_ps").orElseThrow();
        t.refuseUnknown("from", "to", "step");
        double from = t.number("from");
        double to = t.number("to");
        if (to <= from)
            throw t.refusal(
                    "to",
                    "time_ps goes from " + TomlPage.plain(from) + " to " + TomlPage.plain(to)
                            + "; it must go forward.");
        double step = t.positive("step");
        return t.holding("step", () -> new TimeAxis(from, to, step));
    }

    private Response response() {
        String path = page.text("response");
        Path file;
        try {
            file = folder.resolve(path);
        } catch (InvalidPathException e) {
            throw page.refusal("response", "\"" + path + "\" is not a path that this system knows.");
        }
        if (!Files.exists(file))
            throw page.refusal(
                    "response",
                    "There is no table \"" + path
                            + "\" beside the set-up; response is a path from the set-up's folder.");
        CsvTable table = CsvTable.read(file, List.of("time_ps", "counts"));
        table.refuseNegative("counts");
        double[] times = table.column("time_ps");
        for (int i = 1; i < times.length; i++)
            if (times[i] <= times[i - 1])
                throw table.at(i)
                        .refusal("time_ps goes from " + TomlPage.plain(times[i - 1]) + " to " + TomlPage.plain(times[i])
                                + "; it must ascend from row to row.");
        return table.atHeader().of(() -> new Response(times, table.column("counts")));
    }

    private Convention convention() {
        if (!page.has("convention")) return Convention.DEFAULT;
        TomlPage t = page.table("convention").orElseThrow();
        t.refuseUnknown("form", "diffusion", "source_strength", "per");
        Convention usual = Convention.DEFAULT;
        return new Convention(
                t.has("form") ? t.word("form", Convention.Form.class) : usual.form(),
                t.has("diffusion") ? t.word("diffusion", Convention.DiffusionConstant.class) : usual.diffusion(),
                t.has("source_strength")
                        ? t.word("source_strength", Convention.SourceStrength.class)
                        : usual.sourceStrength(),
                t.has("per") ? t.word("per", Convention.Per.class) : usual.per());
    }
}
