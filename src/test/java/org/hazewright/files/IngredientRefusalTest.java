package org.hazewright.files;

import java.nio.file.Path;
import java.util.stream.Stream;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Each mistake in an ingredient file is shown where it is made, with what is allowed. */
class IngredientRefusalTest {
    @TempDir
    Path folder;

    static Stream<Mistake> mistakes() {
        return Stream.of(
                of(SmallShelf.INK, "id = \"ink\"", "▶id = \"inc\"", "the file is called ink.toml"),
                of(SmallShelf.INK, "id = \"ink\"", "▶id = \"my ink\"", "cannot be used", "hyphens"),
                of(SmallShelf.INK, "id = \"ink\"\n", "", "The key id is missing"),
                of(SmallShelf.INK, "format = 1", "▶format = 7", "format is 7"),
                of(SmallShelf.INK, "part = \"absorber\"", "▶part = \"absorbr\"", "Perhaps \"absorber\" is meant"),
                of(SmallShelf.INK, "[\"liquid\", \"gel\"]", "[\"liquid\", ▶\"jel\"]", "Perhaps \"gel\" is meant"),
                of(SmallShelf.INK, "families = [\"liquid\", \"gel\"]", "▶families = []", "at least one entry"),
                of(
                        SmallShelf.INK,
                        "families = [\"liquid\", \"gel\"]",
                        "▶family = \"gel\"",
                        "say what it mixes into: families"),
                of(SmallShelf.WATER, "family = \"liquid\"", "▶families = [\"liquid\"]", "family = \"liquid\""),
                of(SmallShelf.INK, "form = \"liquid\"", "▶form = \"fluid\"", "liquid, powder, paste"),
                of(SmallShelf.INK, "density_g_per_ml", "▶density_g_ml", "Perhaps density_g_per_ml is meant"),
                of(
                        SmallShelf.INK,
                        "density_g_per_ml = 1.02",
                        "▶density_g_per_ml = 1020",
                        "Is it in g/mL, and not kg/m³?"),
                of(SmallShelf.INK, "density_g_per_ml = 1.02", "▶density_g_per_ml = -1", "must be above 0"),
                of(SmallShelf.INK, "max_g_per_ml = 0.02", "▶max_g_per_ml = 0", "must be above 0"),
                of(SmallShelf.INK, "price_per_g = 0", "▶price_per_g = -1", "0 or above"),
                of(SmallShelf.INK, "settles = true", "▶settles = \"yes\"", "true or false"),
                of(SmallShelf.INK, "settles = true", "▶least_share = 0.5", "least_share is for a base"),
                of(SmallShelf.WATER, "least_share = 0.5", "▶least_share = 50", "between 0 and 1"),
                of(SmallShelf.INK, "why = \"flocks\"", "▶wy = \"flocks\"", "Perhaps why is meant"),
                of(
                        SmallShelf.INK,
                        "{with = \"salt\", why = \"flocks\"}",
                        "▶{with = \"salt\"}",
                        "The key why in [conflicts] is missing"),
                of(SmallShelf.INK, "[making]", "▶[makin]", "Perhaps making is meant"),
                of(SmallShelf.INK, "stir_min = 5", "▶stir_minutes = 5", "Perhaps stir_min is meant"),
                of(SmallShelf.INK, "stir_min = 5", "▶melt_c = 900", "between -80 and 300"),
                of(
                        SmallShelf.INK,
                        "basis = \"invented\"",
                        "▶basis = \"guess\"",
                        "published, measured, memory, invented"),
                of(
                        SmallShelf.EMULSION,
                        "[source]\nbasis = \"published\"\ncitation = \"An author, J. Test. 1, 1 (2000).\"",
                        "▶[source]\nbasis = \"published\"",
                        "has no citation"),
                of(SmallShelf.GELATIN, "format = 1\n", "▶format = 1\n", "[source] is missing")
                        .without("[source]\nbasis = \"memory\"\n"),
                of(SmallShelf.INK, "absorption = 0.02", "▶absorption = 2", "between 0 and 1"),
                of(SmallShelf.INK, "correlation = 0.5", "▶correlation = 5", "between -1 and 1"),
                of(
                        SmallShelf.INK,
                        "[uncertainty]\nabsorption = 0.02\nscattering = 0.2",
                        "▶[uncertainty]\nabsorption = 0.02",
                        "The key scattering in [uncertainty] is missing"),
                of(
                        SmallShelf.EMULSION,
                        "[uncertainty]\nscattering = 0.03",
                        "▶[uncertainty]",
                        "The key scattering in [uncertainty]"),
                of(SmallShelf.INK, "albedo = 0.15", "▶albedo = 15", "between 0 and 1"),
                of(SmallShelf.INK, "g = 0.6", "▶g = 1.6", "between -1 and 1"),
                of(
                        SmallShelf.INK,
                        "g = 0.6",
                        "▶mol_per_l = 0.6",
                        "is for a table with the column epsilon10_l_per_mol_cm"),
                of(
                        SmallShelf.INK,
                        "[absorption]\ntable = \"spectra/ink.csv\"",
                        "▶[absorption]",
                        "The key table in [absorption] is missing"),
                of(SmallShelf.EMULSION, "model = \"mie\"", "▶model = \"mee\"", "Perhaps \"mie\" is meant"),
                of(
                        SmallShelf.EMULSION,
                        "particle = \"oil\"",
                        "▶particle = \"soil\"",
                        "There is no material \"soil\"",
                        "Perhaps \"oil\""),
                of(SmallShelf.EMULSION, "index = \"water\"", "▶index = \"qqqqqqq\"", "There are: oil, water"),
                of(
                        SmallShelf.EMULSION,
                        "particle_volume_fraction = 0.22",
                        "▶particle_volume_fraction = 22",
                        "at most 1"),
                of(
                        SmallShelf.EMULSION,
                        "crowding = \"percus-yevick\"",
                        "▶crowding = \"percus\"",
                        "Perhaps \"percus-yevick\""),
                of(
                                SmallShelf.EMULSION,
                                "[scattering]\n",
                                "▶[scattering]\n",
                                "The key crowding in [scattering] is missing")
                        .without("crowding = \"percus-yevick\"\n"),
                of(
                        SmallShelf.EMULSION,
                        "crowding = \"percus-yevick\"",
                        "crowding = \"none\"\n▶crowding_coefficients = [-1]",
                        "is for crowding = \"polynomial\""),
                of(
                        SmallShelf.EMULSION,
                        "crowding = \"percus-yevick\"",
                        "crowding = \"polynomial\"\n▶crowding_coefficients = [-30]\ncrowding_max_volume_fraction = 0.1",
                        "must stay above 0"),
                of(
                        SmallShelf.EMULSION,
                        "crowding = \"percus-yevick\"",
                        "crowding = \"none\"\n▶magnitude = 0",
                        "must be above 0"),
                of(SmallShelf.EMULSION, "kind = \"lognormal\"", "▶kind = \"normal\"", "single, lognormal, histogram"),
                of(
                        SmallShelf.EMULSION,
                        "geometric_standard_deviation = 1.6",
                        "▶geometric_standard_deviation = 1",
                        "above 1 and at most 4"),
                of(
                        SmallShelf.EMULSION,
                        "number_median_diameter_nm = 200",
                        "▶diameter_nm = 200",
                        "Perhaps number_median_diameter_nm"),
                of(
                        SmallShelf.EMULSION,
                        "kind = \"lognormal\"\nnumber_median_diameter_nm = 200\ngeometric_standard_deviation = 1.6",
                        "kind = \"histogram\"\n▶edges_nm = [100, 200]\nweights = [1, 2]",
                        "one edge more than weights"),
                of(
                        SmallShelf.EMULSION,
                        "kind = \"lognormal\"\nnumber_median_diameter_nm = 200\ngeometric_standard_deviation = 1.6",
                        "kind = \"histogram\"\ntable = \"x.csv\"\n▶weights = [1, 2]",
                        "a table or weights, not both"),
                of(
                        SmallShelf.GEL,
                        "part = \"base\"\nfamily = \"gel\"",
                        "part = \"base\"\nfamily = \"gel\"\n▶density_g_per_ml = 1.0",
                        "follows from its parts"),
                of(SmallShelf.GEL, "[source]", "▶[absorption]\n[source]", "absorption cannot be given for a blend"),
                of(SmallShelf.GEL, "[source]", "▶[scattering]\n[source]", "scattering cannot be given for a blend"),
                of(SmallShelf.GEL, "blend = ", "▶index = \"water\"\nblend = ", "index cannot be given for a blend"),
                of(
                        SmallShelf.GEL,
                        "blend = [{ingredient = \"water\", mass_fraction = 0.9}",
                        "▶blend = [{ingredient = \"water\", mass_fraction = 0.8}",
                        "sum to 0.9; they must sum to 1"),
                of(SmallShelf.GEL, "mass_fraction = 0.1}", "▶mass_fraction = 1.1}", "at most 1"),
                of(SmallShelf.GEL, "{ingredient = \"gelatin-powder\"", "{▶ingredient = \"water\"", "names water twice"),
                of(
                        SmallShelf.GEL,
                        "{ingredient = \"gelatin-powder\"",
                        "{▶ingredient = \"gelatin-pwoder\"",
                        "Perhaps \"gelatin-powder\""),
                of(
                        SmallShelf.GEL,
                        "{ingredient = \"gelatin-powder\"",
                        "{▶ingredient = \"gelatin-10\"",
                        "is itself a blend"),
                of(
                        SmallShelf.GEL,
                        "blend = [{ingredient = \"water\", mass_fraction = 0.9}, {ingredient = \"gelatin-powder\", mass_fraction = 0.1}]",
                        "▶blend = []",
                        "has no parts"),
                of(
                        SmallShelf.INK,
                        "settles = true",
                        "▶blend = [{ingredient = \"water\", mass_fraction = 1}]",
                        "Only a base can be a blend"),
                of(SmallShelf.LOT, "lot_of = \"emulsion\"", "▶lot_of = \"emulsoin\"", "Perhaps \"emulsion\" is meant"),
                of(SmallShelf.LOT, "lot_of = \"emulsion\"", "▶lot_of = \"emulsion-L07\"", "names itself"),
                of(
                        SmallShelf.LOT,
                        "lot_of = \"emulsion\"",
                        "▶lot_of = \"gelatin-10\"",
                        "is a blend, which has no lots"),
                of(SmallShelf.LOT, "received = 2026-02-01", "▶received = \"2026-02-01\"", "a date without quotes"),
                of(SmallShelf.LOT, "[lot]\nnumber = \"L07\"", "▶[lot]", "The key number in [lot] is missing"),
                of(SmallShelf.LOT, "magnitude = 1.04", "▶magnitud = 1.04", "Perhaps magnitude is meant"),
                of(SmallShelf.INK, "[making]", "▶[lot]\nnumber = \"1\"\n[making]", "belongs to a file with lot_of"));
    }

    @ParameterizedTest
    @MethodSource
    void mistakes(Mistake mistake) {
        SmallShelf.in(folder);
        Path file = folder.resolve(mistake.file);
        Marked marked = Marked.of(mistake.text);
        if (marked.line() == 0) marked = new Marked(marked.text(), 1, 1);
        marked.refusedAs(file, () -> ShelfReader.read(folder), mistake.words);
    }

    /** A file of the small shelf, changed in one place. */
    record Mistake(String file, String text, String[] words) {
        Mistake without(String piece) {
            if (!text.contains(piece)) throw new IllegalArgumentException(piece);
            return new Mistake(file, text.replace(piece, ""), words);
        }

        @Override
        public String toString() {
            return file + ": " + String.join(" … ", words);
        }
    }

    private static Mistake of(String whole, String piece, String instead, String... words) {
        if (!whole.contains(piece)) throw new IllegalArgumentException("The file has no " + piece);
        String id = whole.replaceAll("(?s).*?\nid = \"([^\"]+)\".*", "$1");
        int at = whole.indexOf(piece);
        return new Mistake(
                id + ".toml", whole.substring(0, at) + instead + whole.substring(at + piece.length()), words);
    }
}
