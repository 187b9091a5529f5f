package org.hazewright.files;

import java.io.IOException;
import java.net.URISyntaxException;
import java.net.URL;
import java.nio.file.FileSystem;
import java.nio.file.FileSystems;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Collection;
import java.util.Comparator;
import java.util.Deque;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.function.Function;
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

    private final ShelfFolder folder;
    private final Materials materials = new Materials();
    private final List<FileRefusal> refusals = new ArrayList<>();
    private final Map<String, TomlPage> pages = new TreeMap<>();
    private final Map<String, FileRefusal> broken = new TreeMap<>();
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

    /**
     * The part of a shelf that holds some ids, their lots' parents, blends' parts and materials; of the rest only the names of the
     * files. {@code folder} null is the shelf of the program. An id that is not there is left to {@link Shelf#require}.
     */
    public static Shelf readOnly(Path folder, Collection<String> ids) {
        if (folder == null) return inShipped(root -> new ShelfReader(new ShelfFolder(root, SHIPPED)).readPart(ids));
        return new ShelfReader(new ShelfFolder(folder, folder.toString())).readPart(ids);
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
        List<ShelfFolder.TextFileName> files = ingredientFiles();
        return read(folder.tomlFiles("materials"), files, true);
    }

    private List<ShelfFolder.TextFileName> ingredientFiles() {
        List<ShelfFolder.TextFileName> files = folder.tomlFiles("");
        if (files.isEmpty())
            throw Place.whole(folder.shown())
                    .refusal("The folder holds no ingredient files (<id>.toml); name the folder of a shelf.");
        return files;
    }

    private Shelf readPart(Collection<String> ids) {
        Map<String, ShelfFolder.TextFileName> there = new TreeMap<>();
        ingredientFiles().forEach(f -> there.put(f.id(), f));
        Set<String> wanted = new TreeSet<>();
        Set<String> madeOf = new TreeSet<>();
        Deque<String> ask = new ArrayDeque<>(ids);
        while (!ask.isEmpty()) {
            String id = ask.pop();
            if (!there.containsKey(id) || !wanted.add(id)) continue;
            TomlPage page = TomlPage.of(
                    TextFile.read(there.get(id).file(), there.get(id).shown()));
            madeOf.add(id);
            page.maybeText("lot_of").ifPresent(ask::add);
            page.maybeText("index").ifPresent(madeOf::add);
            page.table("scattering").flatMap(s -> s.maybeText("particle")).ifPresent(madeOf::add);
            for (TomlPage part : page.tables("blend"))
                part.maybeText("ingredient").ifPresent(ask::add);
        }
        List<ShelfFolder.TextFileName> materialFiles = folder.tomlFiles("materials").stream()
                .filter(f -> madeOf.contains(f.id()))
                .toList();
        Shelf part = read(materialFiles, wanted.stream().map(there::get).toList(), false)
                .orFirstRefusal();
        return new Shelf(part.place(), part.ingredients(), part.materials(), there.keySet());
    }

    private Lenient read(
            List<ShelfFolder.TextFileName> materialFiles, List<ShelfFolder.TextFileName> files, boolean tablesAhead) {
        List<ShelfFolder.TextFileName> all = new ArrayList<>(materialFiles);
        all.addAll(files);
        List<Attempt<TomlPage>> read = folder.pages(all, tablesAhead);
        for (int i = 0; i < materialFiles.size(); i++) {
            String id = materialFiles.get(i).id();
            Attempt<TomlPage> page = read.get(i);
            attempt(() -> materials.add(MaterialReader.read(page.get(), id, folder)))
                    .ifPresent(refusal -> materials.addBroken(id, refusal));
        }
        for (int i = 0; i < files.size(); i++) {
            String id = files.get(i).id();
            Attempt<TomlPage> page = read.get(materialFiles.size() + i);
            attempt(() -> pages.put(id, page.get())).ifPresent(refusal -> broken.put(id, refusal));
        }
        pages.forEach((id, page) -> {
            if (!page.has("lot_of")) attempt(id, page);
        });
        pages.forEach((id, page) -> {
            if (page.has("lot_of"))
                attempt(() -> attempt(id, overParent(id, page))).ifPresent(refusal -> broken.put(id, refusal));
        });
        keepSoundBlends();
        refusals.sort(Comparator.comparing(ShelfReader::isConsequence)
                .thenComparing(FileRefusal::path)
                .thenComparing(FileRefusal::line));
        return new Lenient(new Shelf(folder.shown(), ingredients.values(), materials.all()), refusals);
    }

    private void attempt(String id, TomlPage page) {
        attempt(() -> ingredients.put(id, new IngredientReader(page, id, folder, materials).read()))
                .ifPresent(refusal -> broken.put(id, refusal));
    }

    /** Keeps the refusal of a reading, if there was one; the same words are kept once, as when two files point to a broken table. */
    private Optional<FileRefusal> attempt(Runnable reading) {
        try {
            reading.run();
            return Optional.empty();
        } catch (FileRefusal refused) {
            if (refusals.stream().noneMatch(r -> r.getMessage().equals(refused.getMessage()))) refusals.add(refused);
            return Optional.of(refused);
        }
    }

    /** A refusal for no fault of the file itself: one that it builds on is refused. */
    private static boolean isConsequence(FileRefusal refusal) {
        return refusal.getCause() instanceof FileRefusal;
    }

    private TomlPage overParent(String id, TomlPage lot) {
        String of = lot.text("lot_of");
        if (of.equals(id))
            throw lot.refusal("lot_of", "The lot names itself in lot_of; name the ingredient that it is a lot of.");
        if (pages.containsKey(of) && pages.get(of).has("lot_of"))
            throw lot.refusal("lot_of", "\"" + of + "\" is itself a lot; name the ingredient that both are lots of.");
        if (pages.containsKey(of) && pages.get(of).has("blend"))
            throw lot.refusal("lot_of", "\"" + of + "\" is a blend, which has no lots; its parts have.");
        require(of, lot.at("lot_of"), "this lot");
        return LotPage.of(lot, pages.get(of));
    }

    private void keepSoundBlends() {
        for (Ingredient blend : List.copyOf(ingredients.values())) {
            if (!blend.isBlend()) continue;
            List<TomlPage> parts = pages.get(blend.id()).tables("blend");
            attempt(() -> {
                        for (int i = 0; i < parts.size(); i++)
                            requireSound(
                                    blend.blend().get(i).ingredient(),
                                    parts.get(i).at("ingredient"));
                    })
                    .ifPresent(refusal -> ingredients.remove(blend.id()));
        }
    }

    private void requireSound(String part, Place from) {
        if (pages.containsKey(part) && pages.get(part).has("blend"))
            throw from.refusal("\"" + part + "\" is itself a blend; name its parts with their mass fractions.");
        require(part, from, "this blend");
    }

    /** Refuses an ingredient that the shelf does not have, or whose file is refused, at the place that names it. */
    private void require(String id, Place from, String who) {
        if (broken.containsKey(id))
            throw new FileRefusal(
                    from.path(),
                    from.line(),
                    from.column(),
                    "The file of the ingredient \"" + id + "\" is refused, so " + who
                            + " cannot be used. Mend that file first.",
                    broken.get(id));
        if (!ingredients.containsKey(id))
            throw from.refusal("There is no ingredient \"" + id + "\" on this shelf for " + who + "."
                    + Nearest.to(id, pages.keySet())
                            .map(n -> " Perhaps \"" + n + "\" is meant.")
                            .orElse(""));
    }
}
