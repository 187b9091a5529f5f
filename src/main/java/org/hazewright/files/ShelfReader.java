package org.hazewright.files;

import java.io.IOException;
import java.net.URISyntaxException;
import java.net.URL;
import java.nio.file.FileSystem;
import java.nio.file.FileSystems;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.function.Function;
import org.hazewright.shelf.BlendPart;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Nearest;
import org.hazewright.shelf.Shelf;

/**
 * A folder of ingredient files to a shelf: {@code <id>.toml} for each ingredient and lot, {@code materials/}, and the tables they
 * point to. Files that are not TOML are left alone.
 *
 * <p>{@link #read} stops at the first file that is refused; {@link #readLenient} goes on and gives what is good, with all
 * refusals in the order of the files.
 */
public final class ShelfReader {
    /** How messages name the shelf that comes with the program. */
    public static final String SHIPPED = "shelf of the program";

    private static final Set<String> MERGED_IN_LOTS = Set.of("uncertainty", "making", "absorption", "scattering");

    private final ShelfFolder folder;
    private final Materials materials = new Materials();
    private final List<FileRefusal> refusals = new ArrayList<>();
    private final Map<String, TomlPage> pages = new TreeMap<>();
    private final Map<String, Ingredient> ingredients = new TreeMap<>();

    private ShelfReader(ShelfFolder folder) {
        this.folder = folder;
    }

    /** A shelf of the good files, and what was wrong with the others. */
    public record Lenient(Shelf shelf, List<FileRefusal> refusals) {
        public Lenient {
            refusals = List.copyOf(refusals);
        }

        Shelf orFirstRefusal() {
            if (!refusals.isEmpty()) throw refusals.get(0);
            return shelf;
        }
    }

    public static Shelf read(Path folder) {
        return readLenient(folder).orFirstRefusal();
    }

    /** {@code folder} null is the shelf of the program. */
    public static Lenient readLenient(Path folder) {
        if (folder == null) return inShipped(root -> new ShelfReader(new ShelfFolder(root, SHIPPED)).readAll());
        return new ShelfReader(new ShelfFolder(folder, folder.toString())).readAll();
    }

    /** The shelf that comes with the program. */
    public static Shelf readShipped() {
        return inShipped(root -> new ShelfReader(new ShelfFolder(root, SHIPPED)).readAll())
                .orFirstRefusal();
    }

    /** Opens the shipped shelf, in the program's jar or beside its classes, for as long as {@code reader} runs. */
    static <T> T inShipped(Function<Path, T> reader) {
        try {
            URL location =
                    ShelfReader.class.getProtectionDomain().getCodeSource().getLocation();
            Path program = Path.of(location.toURI());
            if (Files.isDirectory(program)) return reader.apply(program.resolve("shelf"));
            try (FileSystem jar = FileSystems.newFileSystem(program)) {
                return reader.apply(jar.getPath("/shelf"));
            }
        } catch (IOException | URISyntaxException e) {
            throw Place.whole(SHIPPED)
                    .refusal("The shelf inside the program could not be opened (" + e.getMessage()
                            + "); name a folder of ingredients instead.");
        }
    }

    private Lenient readAll() {
        List<ShelfFolder.TextFileName> materialFiles = folder.tomlFiles("materials");
        List<ShelfFolder.TextFileName> files = folder.tomlFiles("");
        if (files.isEmpty())
            throw Place.whole(folder.shown())
                    .refusal("The folder holds no ingredient files (<id>.toml); name the folder of a shelf.");
        List<ShelfFolder.TextFileName> all = new ArrayList<>(materialFiles);
        all.addAll(files);
        List<Attempt<TomlPage>> read = folder.pages(all);
        for (int i = 0; i < materialFiles.size(); i++) {
            String id = materialFiles.get(i).id();
            Attempt<TomlPage> page = read.get(i);
            if (!attempt(() -> materials.add(MaterialReader.read(page.get(), id, folder)))) materials.addBroken(id);
        }
        Set<String> known = new TreeSet<>();
        for (int i = 0; i < files.size(); i++) {
            String id = files.get(i).id();
            Attempt<TomlPage> page = read.get(materialFiles.size() + i);
            known.add(id);
            attempt(() -> pages.put(id, page.get()));
        }
        pages.forEach((id, page) -> attempt(() -> {
            TomlPage whole = page.has("lot_of") ? overParent(id, page, known) : page;
            ingredients.put(id, new IngredientReader(whole, id, folder, materials).read());
        }));
        keepSoundBlends(known);
        refusals.sort(Comparator.comparing(FileRefusal::path).thenComparing(FileRefusal::line));
        return new Lenient(new Shelf(folder.shown(), ingredients.values(), materials.all()), refusals);
    }

    private boolean attempt(Runnable reading) {
        try {
            reading.run();
            return true;
        } catch (FileRefusal refused) {
            refusals.add(refused);
            return false;
        }
    }

    /** A lot's page over that of its ingredient; a lot's own model, table or source takes the place of the whole table. */
    private TomlPage overParent(String id, TomlPage lot, Set<String> known) {
        String of = lot.text("lot_of");
        if (of.equals(id))
            throw lot.refusal("lot_of", "The lot names itself in lot_of; name the ingredient that it is a lot of.");
        if (!known.contains(of))
            throw lot.refusal(
                    "lot_of",
                    "There is no ingredient \"" + of + "\" on this shelf for this lot to be of."
                            + Nearest.to(of, known)
                                    .map(n -> " Perhaps \"" + n + "\" is meant.")
                                    .orElse(""));
        TomlPage parent = pages.get(of);
        if (parent == null)
            throw lot.refusal(
                    "lot_of",
                    "The file of the ingredient \"" + of + "\" is refused, so its lot cannot be read. Mend it first.");
        if (parent.has("lot_of"))
            throw lot.refusal("lot_of", "\"" + of + "\" is itself a lot; name the ingredient that both are lots of.");
        if (parent.has("blend"))
            throw lot.refusal("lot_of", "\"" + of + "\" is a blend, which has no lots; its parts have.");
        Map<String, String> replacing = new LinkedHashMap<>(Map.of("scattering", "model", "absorption", "table"));
        Set<String> merged = new TreeSet<>(MERGED_IN_LOTS);
        replacing.forEach((table, key) -> {
            if (lot.table(table).map(t -> t.has(key)).orElse(false)) merged.remove(table);
        });
        TomlPage below = parent.without("lot", "id", "format");
        TomlPage whole = lot.over(below, merged);
        return lot.has("name")
                ? whole
                : whole.withText("name", parent.text("name") + ", lot " + lotNumber(lot), lot.at());
    }

    private static String lotNumber(TomlPage lot) {
        return lot.requireTable("lot").text("number");
    }

    private void keepSoundBlends(Set<String> known) {
        for (Ingredient blend : List.copyOf(ingredients.values())) {
            if (!blend.isBlend()) continue;
            List<TomlPage> parts = pages.get(blend.id()).tables("blend");
            boolean sound = attempt(() -> {
                for (int i = 0; i < parts.size(); i++)
                    requireSound(blend.blend().get(i), parts.get(i), known);
            });
            if (!sound) ingredients.remove(blend.id());
        }
    }

    private void requireSound(BlendPart part, TomlPage table, Set<String> known) {
        String id = part.ingredient();
        Ingredient found = ingredients.get(id);
        if (found == null && known.contains(id))
            throw table.refusal(
                    "ingredient",
                    "The file of the ingredient \"" + id + "\" is refused, so this blend cannot be used. Mend"
                            + " it first.");
        if (found == null)
            throw table.refusal(
                    "ingredient",
                    "There is no ingredient \"" + id + "\" on this shelf for this blend."
                            + Nearest.to(id, known)
                                    .map(n -> " Perhaps \"" + n + "\" is meant.")
                                    .orElse(""));
        if (found.isBlend())
            throw table.refusal(
                    "ingredient", "\"" + id + "\" is itself a blend; name its parts with their mass fractions.");
    }
}
