package org.hazewright.sheet;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Outlook;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Target;
import org.hazewright.design.Score;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.CauchyIndex;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.IapwsWater;
import org.hazewright.optics.SizeDistribution;
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
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;

/** Answers put together by hand from published figures, for the sheet's tests: a gelatin block, a bath, a silicone slab. */
final class Answers {
    private static final OptionalDouble NO = OptionalDouble.empty();

    static final Material WATER_INDEX = new Material(
            "water",
            "Water",
            new IapwsWater(),
            new Source(
                    Source.Basis.PUBLISHED,
                    "IAPWS R9-97, Release on the Refractive Index of Ordinary Water Substance (1997)"));

    /** Michels et al. 2008: 1.451 + 1.154e4/λ² − 1.132e9/λ⁴. */
    static final Material OIL_INDEX = new Material(
            "soybean-oil",
            "Soybean oil, the droplets of lipid emulsions",
            new CauchyIndex("soybean oil", 1.451, 1.154e4, -1.132e9, 400, 1100),
            new Source(Source.Basis.PUBLISHED, "R. Michels, F. Foschum, A. Kienle, Opt. Express 16, 5907 (2008)"));

    /** Pope & Fry 1997 to 700 nm, Kou et al. 1993 beyond: 1/cm at 22 °C, thinned out. */
    static final Spectrum WATER_MUA = new Spectrum(
            "water absorption",
            new double[] {
                400, 420, 440, 460, 480, 500, 520, 540, 560, 580, 600, 620, 640, 660, 680, 700, 720, 740, 760, 780, 800,
                820, 840, 860, 880, 900, 920, 930, 940, 950, 960, 970, 980, 990, 1000, 1020, 1040, 1060, 1080, 1100
            },
            new double[] {
                6.63e-5, 4.54e-5, 6.35e-5, 9.79e-5, 0.000127, 0.000204, 0.000409, 0.000474, 0.000619, 0.000896,
                0.002224, 0.002755, 0.003108, 0.0041, 0.00465, 0.00624, 0.0126128, 0.02768, 0.028605, 0.026905,
                0.022462, 0.023294, 0.039494, 0.0444935, 0.052979, 0.064088, 0.0860505, 0.123767, 0.181811, 0.297625,
                0.438514, 0.479982, 0.482138, 0.453151, 0.40715, 0.295679, 0.198165, 0.147597, 0.144281, 0.190777
            });

    /** Extinction of a carbon ink as invented for the demo, 1/cm of the neat ink. */
    static final Spectrum INK =
            new Spectrum("ink extinction", new double[] {400, 500, 600, 700, 800, 900, 980}, new double[] {
                12630, 9992.1, 8251.2, 7018.1, 6100, 5390.4, 4929.3
            });

    static final Ingredient WATER = new Ingredient(
            "water",
            "Water, purified",
            Part.BASE,
            Set.of(Family.LIQUID),
            Form.LIQUID,
            0.998,
            NO,
            NO,
            false,
            0.5,
            List.of("Boil or degas and let it cool before use."),
            List.of(),
            List.of(),
            new Source(
                    Source.Basis.PUBLISHED,
                    "Absorption: R. M. Pope, E. S. Fry, Appl. Opt. 36, 8710 (1997); L. Kou, D. Labrie, P. Chylek, Appl. Opt. 32,"
                            + " 3531 (1993). Index: IAPWS R9-97 (1997)."),
            new Uncertainty(0.03, 0),
            Optional.of(Absorption.neat(WATER_MUA, 0.998, 0, 0)),
            Optional.empty(),
            Optional.of(WATER_INDEX),
            List.of(),
            Making.PLAIN,
            Optional.empty());

    static final Ingredient GELATIN_POWDER = new Ingredient(
            "gelatin-powder",
            "Gelatin powder, 250–300 bloom",
            Part.MODIFIER,
            Set.of(Family.LIQUID, Family.GEL),
            Form.POWDER,
            1.35,
            NO,
            NO,
            false,
            0,
            List.of("Sprinkle on cold water and let it bloom; never on hot water."),
            List.of(),
            List.of("Moulds within days: keep cold, use within a week or add a preservative."),
            new Source(
                    Source.Basis.MEMORY,
                    "Density from memory; no published absorption of gelatin in water was found, so it is taken as clear and only"
                            + " displaces water. Real gelatin is yellowish below 500 nm: measure a blank block."),
            new Uncertainty(0, 0),
            Optional.empty(),
            Optional.empty(),
            Optional.empty(),
            List.of(),
            making(45, 20, 50, NO, NO, 33, 4, 12),
            Optional.empty());

    static final Ingredient GELATIN = new Ingredient(
            "gelatin-10",
            "Gelatin gel, 10 %",
            Part.BASE,
            Set.of(Family.GEL),
            Form.LIQUID,
            1,
            NO,
            NO,
            false,
            0.5,
            List.of("Weigh the vessel before and after heating and give back the water lost."),
            List.of(),
            List.of(
                    "Hot liquid: 45–60 °C while melting.",
                    "Moulds within days: keep cold, use within a week or add a preservative."),
            new Source(Source.Basis.MEMORY, "Proportions common practice; the parts carry their own sources."),
            new Uncertainty(0.03, 0),
            Optional.empty(),
            Optional.empty(),
            Optional.empty(),
            List.of(new BlendPart("water", 0.9), new BlendPart("gelatin-powder", 0.1)),
            making(45, 20, 50, OptionalDouble.of(40), OptionalDouble.of(32), 33, 4, 12),
            Optional.empty());

    static final Ingredient EMULSION = emulsion(new Crowding.PercusYevick());

    static Ingredient emulsion(Crowding crowding) {
        return new Ingredient(
                "lipid-emulsion-20",
                "Lipid emulsion, 20 % soybean oil",
                Part.SCATTERER,
                Set.of(Family.LIQUID, Family.GEL),
                Form.LIQUID,
                0.986,
                OptionalDouble.of(0.25),
                NO,
                false,
                0,
                List.of("Turn the bottle ten times before drawing; do not shake it into foam."),
                List.of(),
                List.of("For phantoms only: an opened or dosed bottle must never be given to a patient."),
                new Source(
                        Source.Basis.PUBLISHED,
                        "Scattering: log-normal sizes fitted by Mie to P. Di Ninni, F. Martelli, G. Zaccanti, Phys. Med. Biol. 56, N21"
                                + " (2011), and to the laws of R. Michels, F. Foschum, A. Kienle, Opt. Express 16, 5907 (2008)."
                                + " Absorption: water and oil by volume. Composition: Michels et al. 2008; densities of the parts from"
                                + " memory."),
                new Uncertainty(0.05, 0.03),
                Optional.of(Absorption.neat(WATER_MUA, 0.986, 0, 0)),
                Optional.of(new Scattering.MieParticles(
                        OIL_INDEX, 0.2293, new SizeDistribution.LogNormal(195, 1.465), crowding, 1)),
                Optional.of(WATER_INDEX),
                List.of(),
                making(0, 0, 0, OptionalDouble.of(40), NO, 0, 0, 0),
                Optional.of(new Lot("lipid-emulsion-20", "L07", Optional.empty(), Optional.empty(), Optional.empty())));
    }

    static final Ingredient CARBON_INK = new Ingredient(
            "ink-demo",
            "Carbon ink, invented demo lot",
            Part.ABSORBER,
            Set.of(Family.LIQUID, Family.GEL),
            Form.LIQUID,
            1.02,
            OptionalDouble.of(0.02),
            NO,
            false,
            0,
            List.of(
                    "Shake for a minute and stand the bottle in an ultrasonic bath for ten before drawing: the pigment sinks."),
            List.of(new Conflict("sodium-chloride", "salt makes the pigment flock", false)),
            List.of("Stains skin, cloth and moulds; wear gloves and read the safety data sheet."),
            new Source(
                    Source.Basis.INVENTED,
                    "Invented demo lot; no real bottle. Inks differ by a factor of two and more: measure yours by a dilution"
                            + " series."),
            new Uncertainty(0.02, 0.2),
            Optional.of(Absorption.neat(INK, 1.02, 0.15, 0.6)),
            Optional.empty(),
            Optional.of(WATER_INDEX),
            List.of(),
            new Making(
                    NO,
                    NO,
                    NO,
                    NO,
                    NO,
                    NO,
                    NO,
                    NO,
                    NO,
                    NO,
                    NO,
                    OptionalDouble.of(5),
                    OptionalDouble.of(10),
                    false,
                    true,
                    Optional.empty(),
                    "common practice"),
            Optional.empty());

    private static Making making(
            double hydrateMin,
            double hydrateC,
            double meltC,
            OptionalDouble below,
            OptionalDouble above,
            double pourC,
            double setC,
            double setH) {
        return new Making(
                some(hydrateMin),
                some(hydrateC),
                some(meltC),
                below,
                above,
                some(pourC),
                some(setC),
                some(setH),
                NO,
                NO,
                NO,
                NO,
                NO,
                false,
                false,
                Optional.empty(),
                "common practice");
    }

    private static OptionalDouble some(double value) {
        return value > 0 ? OptionalDouble.of(value) : NO;
    }

    /** A gelatin block of 262.5 mL at four wavelengths, ink from a stock of 1 in 100. */
    static Answer gelatin() {
        Stock stock = new Stock("ink-demo-1-100", CARBON_INK, Optional.empty(), 0.5, WATER, 49.5, Optional.empty());
        List<Item> items = List.of(
                Item.neat(WATER, 229.87),
                Item.neat(GELATIN_POWDER, 25.63),
                new Item(EMULSION, Optional.empty(), Optional.of("L07"), 10.214),
                Item.ofStock(stock, 0.431));
        Recipe recipe = new Recipe(
                "Forearm oximeter block", GELATIN, 22, 0.001, Optional.of("9f".repeat(32)), List.of(stock), items);
        List<Target> targets = List.of(
                target(690, 0.104, 9.1, 0.06),
                target(760, 0.117, 8.1, 0.06),
                target(830, 0.107, 7.1, 0.06),
                target(905, 0.143, 6.2, 0.08));
        return answer(
                "forearm",
                "Forearm oximeter block",
                "gelatin-10",
                250,
                0.05,
                targets,
                recipe,
                Balance.USUAL,
                List.of(
                        "At 830 nm the ink's slope is too flat: µa lands 0.8 of its tolerance high. A second absorber (dye-blue-demo) would"
                                + " bring it to 0.2.",
                        "Half of what could move it is the absorption of ink-demo (2 %): a dilution series of your own bottle would narrow"
                                + " it."));
    }

    /** A bath at two wavelengths with an odd one, ink by two stocks in series, and only some targets in both quantities. */
    static Answer bath() {
        Stock one = new Stock("ink-demo-1-100", CARBON_INK, Optional.of("K3"), 1, WATER, 99, Optional.empty());
        Stock two = new Stock(
                "ink-demo-1-1000", CARBON_INK, Optional.of("K3"), 5, WATER, 45, Optional.of("ink-demo-1-100"));
        List<Item> items = List.of(
                Item.neat(WATER, 900.2),
                new Item(emulsion(new Crowding.None()), Optional.empty(), Optional.of("L07"), 40.35),
                Item.ofStock(two, 9.51));
        Recipe recipe = new Recipe("Two-colour bath", WATER, 37, 0.002, Optional.empty(), List.of(one, two), items);
        List<Target> targets = List.of(
                new Target(692.5, OptionalDouble.of(0.0655), OptionalDouble.empty(), 0.002, 0, 1),
                target(830, 0.0795, 7.7, 0.05),
                new Target(900, OptionalDouble.empty(), OptionalDouble.of(7.0), 0, 0.35, 1));
        return answer(
                "bath",
                "Two-colour bath",
                "water",
                950,
                0,
                targets,
                recipe,
                new Balance(0.01, 0.01, 0.1, 4000),
                List.of());
    }

    /** A silicone slab that cannot be met, with names that try to run as formulas. */
    static Answer silicone(String title, String name, String citation) {
        Material silicone = new Material(
                "pdms",
                "PDMS silicone",
                new ConstantIndex("PDMS", 1.41, 0, 400, 1000),
                new Source(Source.Basis.MEMORY, ""));
        Ingredient a = plain(
                "pdms-part-a",
                "PDMS silicone, part A (vinyl polymer)",
                Part.MODIFIER,
                Form.LIQUID,
                1.03,
                silicone,
                citation);
        Ingredient b = plain("pdms-part-b", name, Part.MODIFIER, Form.LIQUID, 1.03, silicone, citation);
        Ingredient base = new Ingredient(
                "pdms",
                "PDMS silicone, two parts 10 : 1, platinum cured",
                Part.BASE,
                Set.of(Family.SILICONE),
                Form.LIQUID,
                1,
                NO,
                NO,
                false,
                0.5,
                List.of("Disperse powders in part A, degas, add part B."),
                List.of(),
                List.of("Read the safety data sheets of both parts; gloves and eye protection."),
                new Source(Source.Basis.MEMORY, citation),
                new Uncertainty(0, 0),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                List.of(new BlendPart("pdms-part-a", 10.0 / 11), new BlendPart("pdms-part-b", 1.0 / 11)),
                new Making(
                        NO,
                        NO,
                        NO,
                        NO,
                        NO,
                        NO,
                        NO,
                        NO,
                        OptionalDouble.of(65),
                        OptionalDouble.of(4),
                        OptionalDouble.of(90),
                        OptionalDouble.of(10),
                        NO,
                        true,
                        false,
                        Optional.empty(),
                        "common practice"),
                Optional.empty());
        Ingredient tio2 = new Ingredient(
                "tio2-rutile",
                "Titanium dioxide powder, rutile pigment",
                Part.SCATTERER,
                Set.of(Family.SILICONE),
                Form.POWDER,
                4.2,
                NO,
                NO,
                true,
                0,
                List.of(),
                List.of(),
                List.of(
                        "Fine powder, suspected of causing cancer when the dust is breathed: weigh under extraction or with a fitted"
                                + " mask, and read the safety data sheet."),
                new Source(
                        Source.Basis.PUBLISHED,
                        "1 g/L gives µs' 8-10 /cm near 800 nm in resin (a recipe that a laser centre hands out)."),
                new Uncertainty(0, 0.12),
                Optional.empty(),
                Optional.of(new Scattering.PowerLaw(9000, 800, 0.8, 0.6, 450, 1000, 1)),
                Optional.empty(),
                List.of(),
                Making.PLAIN,
                Optional.empty());
        Ingredient carbon = new Ingredient(
                "carbon-pigment",
                "Carbon black paste, 1 %",
                Part.ABSORBER,
                Set.of(Family.SILICONE),
                Form.PASTE,
                0.97,
                NO,
                NO,
                false,
                0,
                List.of(),
                List.of(),
                List.of("Stains."),
                new Source(Source.Basis.INVENTED, ""),
                new Uncertainty(0.25, 0.5),
                Optional.of(Absorption.massSpecific(
                        new Spectrum("carbon", new double[] {400, 1000}, new double[] {900, 400}), 0, 0)),
                Optional.empty(),
                Optional.empty(),
                List.of(),
                Making.PLAIN,
                Optional.empty());
        Recipe recipe = new Recipe(
                title,
                base,
                22,
                0.001,
                Optional.empty(),
                List.of(),
                List.of(Item.neat(a, 88.321), Item.neat(tio2, 0.112), Item.neat(carbon, 0.021), Item.neat(b, 8.832)));
        List<Target> targets = List.of(target(690, 0.15, 11.5, 0.05), target(830, 0.10, 10.2, 0.05));
        return answer("slab", title, "pdms", 90, 0.05, targets, recipe, Balance.USUAL, List.of(citation));
    }

    private static Ingredient plain(
            String id, String name, Part part, Form form, double density, Material index, String citation) {
        return new Ingredient(
                id,
                name,
                part,
                Set.of(Family.SILICONE),
                form,
                density,
                NO,
                NO,
                false,
                0,
                List.of(),
                List.of(),
                List.of(),
                new Source(Source.Basis.MEMORY, citation),
                new Uncertainty(0, 0),
                Optional.empty(),
                Optional.empty(),
                Optional.of(index),
                List.of(),
                Making.PLAIN,
                Optional.empty());
    }

    private static Target target(double nm, double mua, double musp, double relative) {
        return new Target(nm, OptionalDouble.of(mua), OptionalDouble.of(musp), mua * relative, musp * relative, 1);
    }

    static Answer answer(
            String name,
            String title,
            String base,
            double ml,
            double overage,
            List<Target> targets,
            Recipe recipe,
            Balance balance,
            List<String> limits) {
        Brief brief = new Brief(
                name,
                title,
                List.of(base),
                ml,
                overage,
                recipe.temperatureC(),
                targets,
                List.of(),
                new SearchLimits(List.of(), List.of(), 2, 1, 0, 0),
                balance,
                Optional.empty(),
                recipe.briefSha256());
        Mixture mixture = Mixture.of(recipe);
        Outlook outlook = Outlook.of(brief, recipe, 20_000);
        double bias = outlook.predicted().stream()
                .mapToDouble(p -> p.miss() * p.miss())
                .sum();
        Map<Ingredient, Double> exact = new LinkedHashMap<>();
        mixture.massesG().keySet().forEach(i -> exact.put(i, mixture.concentrationGPerMl(i)));
        Score score = new Score(bias, 0.4, 0.02);
        return new Answer(
                brief,
                recipe,
                mixture,
                outlook.predicted(),
                score,
                new Answer.Exact(score, exact),
                outlook.worstMiss(),
                outlook.worstMiss() * 0.98,
                outlook.chance(),
                outlook.budget(),
                limits,
                List.of(),
                Map.of(),
                new Answer.SearchCount(1, 1, 0, true),
                List.of());
    }

    private Answers() {}
}
