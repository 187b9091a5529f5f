package org.hazewright.files;

import java.util.ArrayList;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.hazewright.optics.Index;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.BlendPart;
import org.hazewright.shelf.Conflict;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Making;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Uncertainty;

/** One ingredient file, a lot already laid over the ingredient it is of. */
final class IngredientReader {
    private static final List<String> KEYS = List.of(
            "format",
            "id",
            "name",
            "part",
            "families",
            "family",
            "form",
            "density_g_per_ml",
            "max_g_per_ml",
            "price_per_g",
            "settles",
            "least_share",
            "handling",
            "conflicts",
            "cautions",
            "index",
            "blend",
            "source",
            "uncertainty",
            "absorption",
            "scattering",
            "making",
            "lot_of",
            "lot");

    private final TomlPage page;
    private final String fileId;
    private final ShelfFolder folder;
    private final Materials materials;

    IngredientReader(TomlPage page, String fileId, ShelfFolder folder, Materials materials) {
        this.page = page;
        this.fileId = fileId;
        this.folder = folder;
        this.materials = materials;
    }

    Ingredient read() {
        page.requireFormat();
        String id = Ids.requireFileName(page, fileId);
        page.refuseUnknown(KEYS);
        String name = page.text("name");
        Part part = page.word("part", Part.class);
        Set<Family> families = families(part);
        List<BlendPart> blend = blend(part);
        boolean isBlend = !blend.isEmpty();
        Form form = isBlend && !page.has("form") ? Form.LIQUID : page.word("form", Form.class);
        double density = isBlend ? Double.NaN : page.positive("density_g_per_ml");
        if (density > 25)
            throw page.refusal(
                    "density_g_per_ml",
                    "density_g_per_ml is " + TomlPage.plain(density)
                            + "; no substance is denser than 25 g/mL. Is it in g/mL, and not kg/m³?");
        OptionalDouble most = page.maybePositive("max_g_per_ml");
        OptionalDouble price = page.maybeNotNegative("price_per_g");
        if (page.has("least_share") && part != Part.BASE)
            throw page.refusal(
                    "least_share",
                    "least_share is for a base, and here part = \"" + part.word() + "\". Take the line out.");
        double leastShare = page.within("least_share", 0, 1, 0);
        Optional<Absorption> absorption =
                page.table("absorption").flatMap(table -> AbsorptionReader.read(table, density, folder));
        Optional<Scattering> modelled = page.table("scattering")
                .map(table -> ScatteringReader.read(table, density, folder, materials::require));
        Optional<Scattering> scattering = page.table("absorption")
                .map(table -> AbsorptionReader.magnified(table, modelled))
                .orElse(modelled);
        Uncertainty uncertainty = uncertainty(isBlend, absorption, scattering);
        Optional<Material> index = index(id, part, families, isBlend);
        return page.at()
                .of(() -> new Ingredient(
                        id,
                        name,
                        part,
                        families,
                        form,
                        density,
                        most,
                        price,
                        page.flag("settles", false),
                        leastShare,
                        page.texts("handling"),
                        conflicts(),
                        page.texts("cautions"),
                        SourceReader.read(page.requireTable("source")),
                        uncertainty,
                        absorption,
                        scattering,
                        index,
                        blend,
                        making(),
                        lot()));
    }

    private Set<Family> families(Part part) {
        if (part == Part.BASE) {
            if (page.has("families"))
                throw page.refusal(
                        "families",
                        "families is for what mixes into a base; a base says what it is: family = \"liquid\".");
            return EnumSet.of(page.word("family", Family.class));
        }
        if (page.has("family"))
            throw page.refusal(
                    "family",
                    "family is for a base, and here part = \"" + part.word()
                            + "\"; say what it mixes into: families = [\"liquid\", \"gel\"].");
        return EnumSet.copyOf(page.words("families", Family.class));
    }

    private List<BlendPart> blend(Part part) {
        if (!page.has("blend")) return List.of();
        if (part != Part.BASE)
            throw page.refusal(
                    "blend",
                    "Only a base can be a blend, and here part = \"" + part.word() + "\". Take the blend out.");
        for (String own : new String[] {"density_g_per_ml", "absorption", "scattering", "index"})
            if (page.has(own))
                throw page.refusal(
                        own,
                        own + " cannot be given for a blend: it follows from its parts, "
                                + "which are weighed one by one. Take it out, or take the blend out.");
        List<TomlPage> tables = page.tables("blend");
        if (tables.isEmpty())
            throw page.refusal("blend", "The blend has no parts; name at least two with their mass_fraction.");
        List<BlendPart> parts = new ArrayList<>();
        for (TomlPage table : tables) {
            table.refuseUnknown("ingredient", "mass_fraction");
            String ingredient = table.text("ingredient");
            double fraction = table.positive("mass_fraction");
            if (parts.stream().anyMatch(p -> p.ingredient().equals(ingredient)))
                throw table.refusal(
                        "ingredient", "The blend names " + ingredient + " twice; add its mass fractions up.");
            parts.add(table.holding("mass_fraction", () -> new BlendPart(ingredient, fraction)));
        }
        double sum = parts.stream().mapToDouble(BlendPart::massFraction).sum();
        if (Math.abs(sum - 1) > 1e-6)
            throw page.refusal(
                    "blend", "The mass fractions of the blend sum to " + (float) sum + "; they must sum to 1.");
        return parts;
    }

    private Uncertainty uncertainty(boolean isBlend, Optional<Absorption> absorption, Optional<Scattering> scattering) {
        boolean absorbs = absorption.isPresent()
                || scattering.map(IngredientReader::particlesAbsorb).orElse(false);
        boolean scatters =
                scattering.isPresent() || absorption.map(a -> a.albedo() > 0).orElse(false);
        if (!page.has("uncertainty")) {
            if (isBlend || !absorbs && !scatters) return new Uncertainty(0, 0);
            throw page.at()
                    .refusal("The table [uncertainty] is missing; add it with the relative standard uncertainty of "
                            + (absorbs ? scatters ? "absorption and scattering" : "absorption" : "scattering")
                            + ": 0.05 is 5 %.");
        }
        TomlPage table = page.table("uncertainty").get();
        table.refuseUnknown("absorption", "scattering", "correlation");
        double absorptionShare = absorbs ? table.within("absorption", 0, 1) : table.within("absorption", 0, 1, 0);
        double scatteringShare = scatters ? table.within("scattering", 0, 1) : table.within("scattering", 0, 1, 0);
        return new Uncertainty(absorptionShare, scatteringShare, table.within("correlation", -1, 1, 0));
    }

    private static boolean particlesAbsorb(Scattering scattering) {
        if (!(scattering instanceof Scattering.MieParticles mie)) return false;
        for (int i = 0; i <= 8; i++) {
            double nm = Math.min(mie.toNm(), mie.fromNm() + (mie.toNm() - mie.fromNm()) * i / 8);
            Index at = mie.particle().index().at(nm, 20);
            if (at.k() > 0) return true;
        }
        return false;
    }

    private Optional<Material> index(String id, Part part, Set<Family> families, boolean isBlend) {
        if (isBlend) return Optional.empty();
        if (page.has("index")) return Optional.of(materials.require(page.text("index"), page.at("index")));
        Optional<Material> same = materials.find(id);
        if (same.isPresent() || part != Part.BASE) return same;
        return Optional.of(materials.assumed(families.iterator().next()));
    }

    private List<Conflict> conflicts() {
        List<Conflict> conflicts = new ArrayList<>();
        for (TomlPage table : page.tables("conflicts")) {
            table.refuseUnknown("with", "why", "refuse");
            conflicts.add(new Conflict(table.text("with"), table.text("why"), table.flag("refuse", false)));
        }
        return conflicts;
    }

    private Making making() {
        if (!page.has("making")) return Making.PLAIN;
        TomlPage t = page.requireTable("making");
        t.refuseUnknown(
                "hydrate_min",
                "hydrate_c",
                "melt_c",
                "add_below_c",
                "add_above_c",
                "pour_c",
                "set_c",
                "set_h",
                "cure_c",
                "cure_h",
                "pot_life_min",
                "stir_min",
                "sonicate_min",
                "degas",
                "add_last",
                "disperse_in",
                "source");
        return new Making(
                t.maybeNotNegative("hydrate_min"),
                celsius(t, "hydrate_c"),
                celsius(t, "melt_c"),
                celsius(t, "add_below_c"),
                celsius(t, "add_above_c"),
                celsius(t, "pour_c"),
                celsius(t, "set_c"),
                t.maybeNotNegative("set_h"),
                celsius(t, "cure_c"),
                t.maybeNotNegative("cure_h"),
                t.maybePositive("pot_life_min"),
                t.maybeNotNegative("stir_min"),
                t.maybeNotNegative("sonicate_min"),
                t.flag("degas", false),
                t.flag("add_last", false),
                t.maybeText("disperse_in"),
                t.text("source", ""));
    }

    private static OptionalDouble celsius(TomlPage table, String key) {
        return table.has(key) ? OptionalDouble.of(table.within(key, -80, 300)) : OptionalDouble.empty();
    }

    private Optional<Lot> lot() {
        if (!page.has("lot_of")) {
            if (page.has("lot"))
                throw page.refusal(
                        "lot",
                        "[lot] belongs to a file with lot_of = \"<id of the ingredient>\"; add that, or take [lot] out.");
            return Optional.empty();
        }
        TomlPage t = page.requireTable("lot");
        t.refuseUnknown("number", "received", "opened", "expires", "drift");
        return Optional.of(new Lot(
                page.text("lot_of"),
                t.text("number"),
                t.date("received"),
                t.date("opened"),
                t.date("expires"),
                t.has("drift") ? Optional.of(t.text("drift")) : Optional.empty()));
    }
}
