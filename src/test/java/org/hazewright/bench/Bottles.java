package org.hazewright.bench;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.function.ToDoubleFunction;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.design.Frozen;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.Spectrum;
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
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;

/** A small shelf for the tests of the bench: invented bottles of plausible size, flat spectra, densities with few digits. */
final class Bottles {
    static final Ingredient WATER = new Builder("water", "Water, purified", Part.BASE, Family.LIQUID)
            .density(0.9978)
            .absorbs(0.0263)
            .build();
    static final Ingredient INK = new Builder("ink", "Carbon ink", Part.ABSORBER, Family.LIQUID, Family.GEL)
            .density(1.0)
            .absorbs(5255.2)
            .conflict("salt", "salt makes the pigment flock", false)
            .making(new Facts().sonicate(10).stir(5).last().build())
            .build();
    static final Ingredient EMULSION = new Builder(
                    "emulsion-20", "Lipid emulsion, 20 % soybean oil", Part.SCATTERER, Family.LIQUID, Family.GEL)
            .density(0.986)
            .scatters(203.4)
            .making(new Facts().addBelow(40).stir(5).build())
            .handling("Turn the bottle ten times before drawing.")
            .build();
    static final Ingredient AZIDE = new Builder(
                    "sodium-azide", "Sodium azide", Part.MODIFIER, Family.LIQUID, Family.GEL)
            .form(Form.POWDER)
            .density(1.85)
            .conflict("blood", "azide binds to the haem", true)
            .conflict("ink", "an invented quarrel", false)
            .making(new Facts().stir(5).build())
            .build();
    static final Ingredient BLOOD = new Builder("red-cells-demo", "Whole blood, invented", Part.ABSORBER, Family.LIQUID)
            .density(1.06)
            .absorbs(10)
            .build();
    static final Ingredient GELATIN_POWDER = new Builder(
                    "gelatin-powder", "Gelatin powder", Part.MODIFIER, Family.LIQUID, Family.GEL)
            .form(Form.POWDER)
            .density(1.35)
            .build();
    static final Ingredient GELATIN = new Builder("gelatin-10", "Gelatin gel, 10 %", Part.BASE, Family.GEL)
            .blend("water", 0.9, "gelatin-powder", 0.1)
            .making(new Facts()
                    .hydrate(45, 20)
                    .melt(50)
                    .addBelow(40)
                    .addAbove(32)
                    .pour(33)
                    .set(4, 12)
                    .build())
            .build();
    static final Ingredient AGAR = new Builder("agar-1", "Agar gel, 1 %", Part.BASE, Family.GEL)
            .blend("water", 0.99, "gelatin-powder", 0.01)
            .making(new Facts().melt(92).addBelow(50).addAbove(42).pour(45).build())
            .build();
    static final Ingredient TITANIA = new Builder(
                    "tio2",
                    "Titanium dioxide powder",
                    Part.SCATTERER,
                    Family.LIQUID,
                    Family.GEL,
                    Family.SILICONE,
                    Family.RESIN)
            .form(Form.POWDER)
            .density(4.2)
            .scatters(9000)
            .settles()
            .cautions("Fine powder: do not breathe the dust; read the safety data sheet.")
            .making(new Facts().sonicate(30).stir(10).build())
            .build();
    static final Ingredient CARBON = new Builder("carbon-paste", "Carbon paste", Part.ABSORBER, Family.SILICONE)
            .form(Form.PASTE)
            .density(0.97)
            .absorbs(500)
            .making(new Facts().stir(15).build())
            .build();
    static final Ingredient PART_A = new Builder("silicone-a", "Silicone, part A", Part.MODIFIER, Family.SILICONE)
            .density(1.03)
            .build();
    static final Ingredient PART_B = new Builder("silicone-b", "Silicone, part B", Part.MODIFIER, Family.SILICONE)
            .density(1.03)
            .build();
    static final Ingredient SILICONE = new Builder("silicone", "Silicone, two parts", Part.BASE, Family.SILICONE)
            .blend("silicone-b", 1.0 / 11, "silicone-a", 10.0 / 11)
            .making(new Facts().degas().potLife(90).cure(65, 4).stir(10).build())
            .build();
    static final Ingredient RESIN_A = new Builder("resin-a", "Epoxy resin", Part.MODIFIER, Family.RESIN)
            .density(1.16)
            .build();
    static final Ingredient RESIN_B = new Builder("resin-b", "Amine hardener", Part.MODIFIER, Family.RESIN)
            .density(0.96)
            .build();
    static final Ingredient RESIN = new Builder("resin", "Casting epoxy", Part.BASE, Family.RESIN)
            .blend("resin-a", 100.0 / 130, "resin-b", 30.0 / 130)
            .making(new Facts().potLife(45).cure(25, 24).build())
            .build();
    static final Ingredient DRY = new Builder("dry-base", "Dry casting powder", Part.BASE, Family.RESIN)
            .form(Form.POWDER)
            .density(1.2)
            .build();

    static final Shelf SHELF = new Shelf(
            "of the tests",
            List.of(
                    WATER,
                    INK,
                    EMULSION,
                    AZIDE,
                    BLOOD,
                    GELATIN_POWDER,
                    GELATIN,
                    AGAR,
                    TITANIA,
                    CARBON,
                    PART_A,
                    PART_B,
                    SILICONE,
                    RESIN_A,
                    RESIN_B,
                    RESIN,
                    DRY),
            List.of());

    private Bottles() {}

    static Contents contents(Ingredient base, double volumeMl, Object... idsAndGPerMl) {
        Map<Ingredient, Double> wanted = new LinkedHashMap<>();
        for (int k = 0; k < idsAndGPerMl.length; k += 2)
            wanted.put((Ingredient) idsAndGPerMl[k], (Double) idsAndGPerMl[k + 1]);
        return new Contents("Test block", SHELF, base, wanted, volumeMl, 22, Optional.empty());
    }

    /** µa and µs' at 780 nm, as wanted by the exact concentrations, within five per cent. */
    static List<Point> points(Contents contents, double relative) {
        var at = exact(contents).at(780);
        List<Point> points = new ArrayList<>();
        if (at.muaPerCm() > 0)
            points.add(new Point(Point.Quantity.MUA, 780, at.muaPerCm(), relative * at.muaPerCm(), 1));
        if (at.muspPerCm() > 0)
            points.add(new Point(Point.Quantity.MUSP, 780, at.muspPerCm(), relative * at.muspPerCm(), 1));
        return points;
    }

    /** The mixture that the contents mean, no balance in between. */
    static Mixture exact(Contents contents) {
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        double leftMl = contents.volumeMl();
        for (Ingredient i : contents.concentrationGPerMl().keySet()) {
            masses.put(i, contents.massG(i));
            leftMl -= contents.massG(i) / i.densityGPerMl();
        }
        double baseG = leftMl * SHELF.densityGPerMl(contents.base());
        SHELF.partsOf(contents.base()).forEach((i, share) -> masses.merge(i, share * baseG, Double::sum));
        return new Mixture(masses, contents.temperatureC());
    }

    static ToDoubleFunction<Recipe> judge(Contents contents, Balance balance, double relative) {
        Frozen frozen = new Frozen(points(contents, relative), exact(contents), contents.base(), balance);
        return r -> frozen.score(r).total();
    }

    static StockPlan plan(Contents contents, Balance balance) {
        return StockPlan.of(contents, balance, judge(contents, balance, 0.05));
    }

    /** The same ingredient as a numbered lot that expires on a day. */
    static Ingredient lotOf(Ingredient i, String number, LocalDate expires) {
        return lotOf(i, new Lot(i.id(), number, Optional.empty(), Optional.empty(), Optional.of(expires)));
    }

    static Ingredient lotOf(Ingredient i, Lot lot) {
        return new Ingredient(
                i.id() + "-lot",
                i.name(),
                i.part(),
                i.families(),
                i.form(),
                i.densityGPerMl(),
                i.maxGPerMl(),
                i.pricePerG(),
                i.settles(),
                i.leastShare(),
                i.handling(),
                i.conflicts(),
                i.cautions(),
                i.source(),
                i.uncertainty(),
                i.absorption(),
                i.scattering(),
                i.index(),
                i.blend(),
                i.making(),
                Optional.of(lot));
    }

    /** An ingredient in few words. */
    static final class Builder {
        private final String id;
        private final String name;
        private final Part part;
        private final Set<Family> families;
        private Form form = Form.LIQUID;
        private double density = 1;
        private boolean settles;
        private final List<Conflict> conflicts = new ArrayList<>();
        private List<String> cautions = List.of();
        private List<String> handling = List.of();
        private Optional<Absorption> absorption = Optional.empty();
        private Optional<Scattering> scattering = Optional.empty();
        private final List<BlendPart> blend = new ArrayList<>();
        private Making making = Making.PLAIN;

        Builder(String id, String name, Part part, Family... families) {
            this.id = id;
            this.name = name;
            this.part = part;
            this.families = Set.of(families);
        }

        Builder form(Form form) {
            this.form = form;
            return this;
        }

        Builder density(double gPerMl) {
            density = gPerMl;
            return this;
        }

        Builder settles() {
            settles = true;
            return this;
        }

        Builder absorbs(double perCm) {
            absorption = Optional.of(Absorption.neat(flat(perCm), density, 0, 0));
            return this;
        }

        Builder scatters(double muspCm2PerG) {
            scattering = Optional.of(new Scattering.PowerLaw(muspCm2PerG, 780, 1, 0.7, 400, 1100, 1));
            return this;
        }

        Builder conflict(String with, String why, boolean refuse) {
            conflicts.add(new Conflict(with, why, refuse));
            return this;
        }

        Builder cautions(String... words) {
            cautions = List.of(words);
            return this;
        }

        Builder handling(String... words) {
            handling = List.of(words);
            return this;
        }

        Builder blend(String one, double share, String other, double otherShare) {
            blend.add(new BlendPart(one, share));
            blend.add(new BlendPart(other, otherShare));
            return this;
        }

        Builder making(Making making) {
            this.making = making;
            return this;
        }

        private Spectrum flat(double value) {
            return new Spectrum(id, new double[] {400, 1100}, new double[] {value, value});
        }

        Ingredient build() {
            Material index = new Material(
                    "test",
                    "test",
                    new ConstantIndex("test", 1.33, 0, 300, 1200),
                    new Source(Source.Basis.INVENTED, ""));
            return new Ingredient(
                    id,
                    name,
                    part,
                    families,
                    form,
                    density,
                    OptionalDouble.empty(),
                    OptionalDouble.empty(),
                    settles,
                    0,
                    handling,
                    conflicts,
                    cautions,
                    new Source(Source.Basis.INVENTED, ""),
                    new Uncertainty(0.02, 0.03),
                    absorption,
                    scattering,
                    Optional.of(index),
                    blend,
                    making,
                    Optional.empty());
        }
    }

    /** Facts of making in few words. */
    static final class Facts {
        private final OptionalDouble[] f = new OptionalDouble[13];
        private boolean degas;
        private boolean last;

        Facts() {
            java.util.Arrays.fill(f, OptionalDouble.empty());
        }

        private Facts with(int place, double value) {
            f[place] = OptionalDouble.of(value);
            return this;
        }

        Facts hydrate(double min, double c) {
            return with(0, min).with(1, c);
        }

        Facts melt(double c) {
            return with(2, c);
        }

        Facts addBelow(double c) {
            return with(3, c);
        }

        Facts addAbove(double c) {
            return with(4, c);
        }

        Facts pour(double c) {
            return with(5, c);
        }

        Facts set(double c, double h) {
            return with(6, c).with(7, h);
        }

        Facts cure(double c, double h) {
            return with(8, c).with(9, h);
        }

        Facts potLife(double min) {
            return with(10, min);
        }

        Facts stir(double min) {
            return with(11, min);
        }

        Facts sonicate(double min) {
            return with(12, min);
        }

        Facts degas() {
            degas = true;
            return this;
        }

        Facts last() {
            last = true;
            return this;
        }

        Making build() {
            return new Making(
                    f[0],
                    f[1],
                    f[2],
                    f[3],
                    f[4],
                    f[5],
                    f[6],
                    f[7],
                    f[8],
                    f[9],
                    f[10],
                    f[11],
                    f[12],
                    degas,
                    last,
                    Optional.empty(),
                    "common practice");
        }
    }
}
