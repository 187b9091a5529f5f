package org.hazewright.sheet;

import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.Map;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Grams;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Source;

/** Where every figure comes from: each ingredient in the vessel, and the materials that its optics stand on. */
final class SourcesPage {
    private static final int LAST = 6;

    private SourcesPage() {}

    static void write(Page page, Answer answer) {
        write(page, answer.recipe().base(), answer.mixture().massesG().keySet());
    }

    static void write(Page page, Ingredient base, Collection<Ingredient> ingredients) {
        page.columns(180, 220, 90, 80, 88, 88, 460);
        page.text(0, 0, "Sources", Face.TITLE);
        page.height(0, 24);
        page.text(
                1,
                0,
                "u is the relative standard uncertainty of the whole spectrum of this ingredient, as its file states it.",
                Face.QUIET);
        String[] heads = {
            "ingredient", "name", "lot", "basis", "u absorption", "u scattering", "source, and how it scatters"
        };
        for (int c = 0; c < heads.length; c++)
            page.text(
                    3, c, heads[c], c == 4 || c == 5 ? Face.HEAD.right() : c == LAST ? Face.HEAD.indent() : Face.HEAD);
        int row = 4;
        Map<String, Material> materials = new LinkedHashMap<>();
        Face line = Face.WRAPPED.rule();
        Map<String, Ingredient> all = new LinkedHashMap<>();
        if (base.isBlend()) all.put(base.id(), base);
        ingredients.forEach(i -> all.put(i.id(), i));
        for (Ingredient i : all.values()) {
            page.text(row, 0, i.id(), line);
            page.text(row, 1, i.name(), line);
            page.text(row, 2, i.lot().map(l -> l.number()).orElse(""), line);
            page.text(row, 3, i.source().basis().word(), line);
            if (i.isBlend()) {
                page.text(row, 4, "", line);
                page.text(row, 5, "", line);
            } else {
                share(page, row, 4, i.uncertainty().absorption(), i.absorption().isPresent());
                share(page, row, 5, i.uncertainty().scattering(), i.scattering().isPresent());
            }
            String words = i.source().citation() + model(i);
            page.text(row, LAST, words, line.indent());
            page.roomFor(row, i.id(), line, 0, 0);
            page.roomFor(row, i.name(), line, 1, 1);
            page.roomFor(row, words, line, LAST, LAST);
            i.index().ifPresent(m -> materials.put(m.id(), m));
            if (i.scattering().orElse(null) instanceof Scattering.MieParticles mie)
                materials.put(mie.particle().id(), mie.particle());
            row++;
        }
        row++;
        page.text(row++, 0, "Refractive indices", Face.SECTION);
        for (Material m : materials.values()) {
            page.text(row, 0, m.id(), line);
            page.text(row, 1, m.name(), line);
            page.text(row, 2, "", line);
            page.text(row, 3, m.source().basis().word(), line);
            page.text(row, 4, "", line);
            page.text(row, 5, "", line);
            Source source = m.source();
            page.text(row, LAST, source.citation(), line.indent());
            page.height(row, 14);
            page.roomFor(row, m.name(), line, 1, 1);
            page.roomFor(row, source.citation(), line, LAST, LAST);
            row++;
        }
        page.sheet.createFreezePane(0, 4);
        PrintSetup.pages(page.sheet, true, 3);
    }

    /** A dash where there is nothing to be uncertain of. */
    private static void share(Page page, int row, int column, double u, boolean figures) {
        Face face = Face.WRAPPED.rule().format("0.0 %").right();
        if (u == 0 && !figures) page.text(row, column, "—", face);
        else page.number(row, column, u, face);
    }

    /** How the ingredient scatters, and by which model its particles crowd. */
    private static String model(Ingredient i) {
        Scattering s = i.scattering().orElse(null);
        if (s == null) return "";
        String how;
        if (s instanceof Scattering.MieParticles mie)
            how = "Mie, spheres of " + mie.particle().name() + ", " + sizes(mie.sizes()) + ", "
                    + Grams.plain(100 * mie.volumeFraction()) + " % of its volume; " + crowding(mie.crowding());
        else if (s instanceof Scattering.PowerLaw law)
            how = "power law, µs' falls as wavelength to the power " + Grams.plain(law.exponent())
                    + "; no crowding correction";
        else how = "table; no crowding correction";
        String scale = s.magnitude() == 1 ? "" : "; measured magnitude " + Grams.plain(s.magnitude()) + " times that";
        if (s instanceof Scattering.MieParticles mie && mie.absorptionMagnitude() != 1)
            scale += "; measured absorption " + Grams.plain(mie.absorptionMagnitude()) + " times that of Mie";
        return " Scattering: " + how + scale + ".";
    }

    private static String sizes(SizeDistribution sizes) {
        if (sizes instanceof SizeDistribution.Single one) return Grams.plain(one.diameterNm()) + " nm across";
        if (sizes instanceof SizeDistribution.LogNormal l)
            return "log-normal, median " + Grams.plain(l.numberMedianDiameterNm())
                    + " nm, geometric standard deviation " + Grams.plain(l.geometricStandardDeviation());
        return "sizes by histogram";
    }

    private static String crowding(Crowding crowding) {
        if (crowding instanceof Crowding.PercusYevick) return "crowding by hard spheres (Percus–Yevick)";
        if (crowding instanceof Crowding.Polynomial) return "crowding by a measured polynomial";
        return "no crowding correction";
    }
}
