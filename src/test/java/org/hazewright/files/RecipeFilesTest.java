package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.stream.Stream;
import org.hazewright.files.SafeFile.Overwrite;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

class RecipeFilesTest {
    @TempDir
    Path folder;

    private Shelf shelf;

    private static final String RECIPE = """
            format = 1
            title = "Forearm block"
            base = "water"
            temperature_c = 25

            [[stock]]
            id = "ink-1-100"
            ingredient = "ink"
            lot = "I3"
            ingredient_g = 1.0
            diluent = "water"
            diluent_g = 99.0

            [[stock]]
            id = "ink-1-1000"
            stock = "ink-1-100"
            ingredient_g = 1
            diluent = "water"
            diluent_g = 9

            [[item]]
            ingredient = "emulsion"
            mass_g = 12.34

            [[item]]
            stock = "ink-1-1000"
            mass_g = 2.5

            [[item]]
            ingredient = "water"
            mass_g = 235
            """;

    @BeforeEach
    void smallShelf() {
        shelf = ShelfReader.read(SmallShelf.in(folder));
    }

    @Test
    void everyKeyArrives() {
        Recipe recipe = read("block.recipe.toml", RECIPE);
        assertEquals("Forearm block", recipe.title());
        assertEquals("water", recipe.base().id());
        assertEquals(25, recipe.temperatureC());
        assertEquals(0.001, recipe.weighingUncertaintyG());
        assertEquals(Optional.empty(), recipe.briefSha256());
        Ingredient ink = shelf.require("ink");
        Ingredient water = shelf.require("water");
        assertEquals(
                List.of(
                        new Stock("ink-1-100", ink, Optional.of("I3"), 1, water, 99, Optional.empty()),
                        new Stock("ink-1-1000", ink, Optional.of("I3"), 1, water, 9, Optional.of("ink-1-100"))),
                recipe.stocks());
        assertEquals(
                List.of(
                        Item.neat(shelf.require("emulsion"), 12.34),
                        new Item(ink, Optional.of("ink-1-1000"), Optional.of("I3"), 2.5),
                        Item.neat(water, 235)),
                recipe.items());
        assertEquals(2.5 / 1000, recipe.massesG().get(ink), 1e-15);
    }

    @Test
    void aLotThatTheShelfHasBringsItsOwnFigures() {
        Recipe recipe = read("block.recipe.toml", RECIPE.replace("\"emulsion\"", "\"emulsion\"\nlot = \"L07\""));
        assertEquals("emulsion-L07", recipe.items().get(0).ingredient().id());
        assertEquals(Optional.of("L07"), recipe.items().get(0).lot());
        Recipe unknown = read("block.recipe.toml", RECIPE.replace("\"emulsion\"", "\"emulsion\"\nlot = \"L99\""));
        assertEquals("emulsion", unknown.items().get(0).ingredient().id());
        assertEquals(Optional.of("L99"), unknown.items().get(0).lot());
    }

    @Test
    void aBatchIsReadAsItWasWeighed() {
        String batch = RECIPE.replace("mass_g = 12.34", "mass_g = 12.34\nweighed_g = 12.41\nnote = \"a drop more\"")
                .replace("diluent_g = 99.0", "diluent_g = 99.0\ndiluent_weighed_g = 98.7")
                .replace("temperature_c = 25", "temperature_c = 25\nwho = \"the bench\"\nwhen = 2026-03-01");
        Recipe made = read("block.batch.toml", batch);
        assertEquals(12.41, made.items().get(0).massG());
        assertEquals(235, made.items().get(2).massG());
        assertEquals(98.7, made.stocks().get(0).diluentG());
        Path file = folder.resolve("block.recipe.toml");
        Marked.of(RECIPE.replace("mass_g = 12.34", "mass_g = 12.34\n▶weighed_g = 12.41"))
                .refusedAs(file, () -> RecipeReader.read(file, shelf), "The key weighed_g in [item] is not known");
    }

    @Test
    void whatIsWrittenIsReadBackEqual() {
        Random random = new Random(7);
        for (int i = 0; i < 300; i++) {
            Recipe recipe = random(random);
            Path file = folder.resolve("r" + i % 3 + ".recipe.toml");
            RecipeWriter.write(file, recipe, List.of("Note " + i, "two\nlines"), Overwrite.REPLACE);
            assertEquals(recipe, RecipeReader.read(file, shelf));
        }
    }

    @Test
    void numbersAreWrittenAsPeopleWriteThem() {
        assertEquals("12.34", TomlText.number(12.34));
        assertEquals("99.0", TomlText.number(99));
        assertEquals("0.00001", TomlText.number(1e-5));
        assertEquals("1.0e-9", TomlText.number(1e-9));
        assertEquals("123456.789", TomlText.number(123456.789));
        assertEquals("0.0", TomlText.number(0));
        assertEquals("\"a \\\"b\\\" \\\\ µ \\u0001\"", TomlText.text("a \"b\" \\ µ \u0001"));
    }

    static Stream<Mistake> mistakes() {
        return Stream.of(
                of("base = \"water\"", "▶base = \"watre\"", "Perhaps \"water\" is meant"),
                of("base = \"water\"", "▶base = \"ink\"", "is no base", "part = \"absorber\"", "gelatin-10, water"),
                of("temperature_c = 25", "▶temperatur_c = 25", "Perhaps temperature_c"),
                of("temperature_c = 25", "▶brief_sha256 = \"abc\"", "64 hexadecimal digits"),
                of("temperature_c = 25", "▶balance_standard_uncertainty_g = -1", "0 or above"),
                of("id = \"ink-1-1000\"", "▶id = \"ink-1-100\"", "Two stocks are called"),
                of("stock = \"ink-1-100\"", "▶stock = \"ink-1-10\"", "No [[stock]] before this line", "ink-1-100"),
                of(
                        "stock = \"ink-1-100\"",
                        "ingredient = \"ink\"\n▶stock = \"ink-1-100\"",
                        "an ingredient and a stock"),
                of("ingredient = \"ink\"", "▶stock = \"ink-1-1000\"", "No [[stock]] before this line", "add it above"),
                of("ingredient_g = 1.0", "▶ingredient_g = 0", "a stock holds something"),
                of("diluent_g = 99.0", "▶diluent_g = 0", "a stock is diluted"),
                of("diluent_g = 99.0", "▶diluent_ml = 99.0", "The key diluent_ml in [stock] is not known"),
                of("[[item]]\ningredient = \"emulsion\"", "▶[[item]]", "neither an ingredient nor a stock"),
                of(
                        "ingredient = \"emulsion\"",
                        "▶ingredient = \"gelatin-10\"",
                        "is a blend",
                        "0.9 g water, 0.1 g gelatin-powder"),
                of("ingredient = \"emulsion\"", "▶ingredient = \"emulsoin\"", "Perhaps \"emulsion\""),
                of("ingredient = \"emulsion\"", "ingredient = \"emulsion-L07\"\n▶lot = \"L08\"", "is the lot \"L07\""),
                of("mass_g = 12.34", "▶mass_g = -12.34", "0 or above"),
                of("mass_g = 12.34", "▶mass_g = \"12.34 g\"", "must be a number without quotes"),
                of("mass_g = 12.34", "mass_g = 12▶,34", "decimal point"),
                of("title = \"Forearm block\"", "▶title = \"\"", "title is empty"),
                of(
                        "[[item]]\ningredient = \"emulsion\"",
                        "▶[[ite]]\ningredient = \"emulsion\"",
                        "Perhaps item is meant"));
    }

    @ParameterizedTest
    @MethodSource
    void mistakes(Mistake mistake) {
        Path file = folder.resolve("block.recipe.toml");
        Marked.of(mistake.text).refusedAs(file, () -> RecipeReader.read(file, shelf), mistake.words);
    }

    @Test
    void aRecipeOfNothingIsRefused() {
        Path file = folder.resolve("block.recipe.toml");
        Marked.of("▶format = 1\nbase = \"water\"\n")
                .refusedAs(file, () -> RecipeReader.read(file, shelf), "nothing to weigh");
        Marked.of("▶format = 1\nbase = \"water\"\n[[item]]\ningredient = \"water\"\nmass_g = 0\n")
                .refusedAs(file, () -> RecipeReader.read(file, shelf), "weigh 0 g");
    }

    private record Mistake(String text, String[] words) {
        @Override
        public String toString() {
            return String.join(" … ", words);
        }
    }

    private static Mistake of(String piece, String instead, String... words) {
        int at = RECIPE.indexOf(piece);
        if (at < 0) throw new IllegalArgumentException("The recipe has no " + piece);
        return new Mistake(RECIPE.substring(0, at) + instead + RECIPE.substring(at + piece.length()), words);
    }

    private Recipe read(String name, String text) {
        return RecipeReader.read(Marked.write(folder.resolve(name), text), shelf);
    }

    private Recipe random(Random random) {
        List<Ingredient> weighable =
                shelf.ingredients().stream().filter(i -> !i.isBlend()).toList();
        List<Stock> stocks = new ArrayList<>();
        int count = random.nextInt(4);
        for (int i = 0; i < count; i++) {
            Optional<Stock> from =
                    i > 0 && random.nextBoolean() ? Optional.of(stocks.get(random.nextInt(i))) : Optional.empty();
            Ingredient ingredient = from.map(Stock::ingredient).orElse(weighable.get(random.nextInt(weighable.size())));
            Optional<String> lot = from.isPresent() ? from.get().lot() : ownLot(ingredient, random);
            stocks.add(new Stock(
                    "stock \"" + i + "\" µ",
                    ingredient,
                    lot,
                    grams(random),
                    weighable.get(random.nextInt(weighable.size())),
                    grams(random),
                    from.map(Stock::id)));
        }
        List<Item> items = new ArrayList<>();
        for (int i = 0; i <= random.nextInt(6); i++) {
            if (!stocks.isEmpty() && random.nextInt(3) == 0)
                items.add(Item.ofStock(stocks.get(random.nextInt(stocks.size())), grams(random)));
            else {
                Ingredient ingredient = weighable.get(random.nextInt(weighable.size()));
                items.add(new Item(ingredient, Optional.empty(), ownLot(ingredient, random), grams(random)));
            }
        }
        return new Recipe(
                "Block \\ \"" + random.nextInt() + "\" # µs'",
                shelf.require(random.nextBoolean() ? "water" : "gelatin-10"),
                random.nextInt(101),
                random.nextDouble() / 100,
                random.nextBoolean() ? Optional.of("0123456789abcdef".repeat(4)) : Optional.empty(),
                stocks,
                items);
    }

    /** A lot that says nothing but what the ingredient already is: its own number, or one that the shelf does not know. */
    private static Optional<String> ownLot(Ingredient ingredient, Random random) {
        if (random.nextBoolean()) return Optional.empty();
        return Optional.of(ingredient.lot().map(l -> l.number()).orElse("N" + random.nextInt(50)));
    }

    private static double grams(Random random) {
        return Math.exp(random.nextGaussian() * 8) + Double.MIN_NORMAL;
    }
}
