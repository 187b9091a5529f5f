package org.hazewright.mixture;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Making;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;

/** Ingredients for tests, made here so that no file is needed. Figures are invented unless their source is named. */
public final class DemoIngredients {
    private static final Source INVENTED = new Source(Source.Basis.INVENTED, "");
    private static final Material WATER_INDEX =
            new Material("water", "water", new ConstantIndex("water", 1.33, 0, 300, 1300), INVENTED);
    private static final Material OIL =
            new Material("oil", "oil", new ConstantIndex("oil", 1.47, 0, 300, 1300), INVENTED);

    private DemoIngredients() {}

    /** Extinction of one undiluted ink, base e, 1/cm: Sudakou et al., Biomed. Opt. Express 14, 3506, 2023, open data. */
    public static Spectrum publishedInk() {
        return new Spectrum(
                "ink extinction",
                new double[] {680, 692.5, 705, 717.5, 730, 742.5, 755, 767.5, 780, 792.5, 805, 817.5, 830, 842.5},
                new double[] {
                    7300.7, 7104.9, 6960.7, 6797.2, 6538.3, 6200.0, 6264.5, 6176.5, 6182.6, 6090.6, 6126.2, 5911.4,
                    5624.1, 5388.6
                });
    }

    public static Ingredient water(double uAbsorption) {
        Spectrum mua = new Spectrum("water absorption", new double[] {600, 680, 740, 780, 830, 900}, new double[] {
            0.0022, 0.0047, 0.0260, 0.0236, 0.0299, 0.0679
        });
        return of(
                "water",
                Part.BASE,
                0.998,
                new Uncertainty(uAbsorption, 0),
                Optional.of(Absorption.neat(mua, 0.998, 0, 0)),
                Optional.empty(),
                Optional.of(WATER_INDEX));
    }

    /** With the published extinction and its albedo of 0.15 (same source). */
    public static Ingredient ink(double uAbsorption) {
        return of(
                "ink-demo",
                Part.ABSORBER,
                1.0,
                new Uncertainty(uAbsorption, 0.10),
                Optional.of(Absorption.neat(publishedInk(), 1.0, 0.15, 0.7)),
                Optional.empty(),
                Optional.empty());
    }

    public static Ingredient emulsion(double uScattering) {
        return of(
                "emulsion-demo",
                Part.SCATTERER,
                0.986,
                new Uncertainty(0.05, uScattering),
                Optional.empty(),
                Optional.of(new Scattering.PowerLaw(200, 780, 1.2, 0.7, 400, 1100, 1)),
                Optional.empty());
    }

    /** Spheres by Mie theory, so that crowding and host index take part. */
    public static Ingredient beads() {
        return of(
                "beads-demo",
                Part.SCATTERER,
                1.02,
                new Uncertainty(0, 0.04),
                Optional.empty(),
                Optional.of(new Scattering.MieParticles(
                        OIL, 0.10, new SizeDistribution.Single(400), new Crowding.PercusYevick(), 1)),
                Optional.of(WATER_INDEX));
    }

    /** Absorbs with a slope of its own: µa falls linearly from 600 to 900 nm. */
    public static Ingredient dye(String id, double at600, double at900, double uAbsorption) {
        Spectrum mua = new Spectrum(id + " absorption", new double[] {600, 900}, new double[] {at600, at900});
        return of(
                id,
                Part.ABSORBER,
                1.0,
                new Uncertainty(uAbsorption, 0),
                Optional.of(Absorption.neat(mua, 1.0, 0, 0)),
                Optional.empty(),
                Optional.empty());
    }

    public static Ingredient of(
            String id,
            Part part,
            double densityGPerMl,
            Uncertainty u,
            Optional<Absorption> absorption,
            Optional<Scattering> scattering,
            Optional<Material> index) {
        return new Ingredient(
                id,
                id,
                part,
                Set.of(Family.LIQUID),
                Form.LIQUID,
                densityGPerMl,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                false,
                0,
                List.of(),
                List.of(),
                List.of(),
                INVENTED,
                u,
                absorption,
                scattering,
                index,
                List.of(),
                Making.PLAIN,
                Optional.empty());
    }

    /** Items weighed one by one, no stock. */
    public static Recipe recipe(double uG, Item... items) {
        return new Recipe(
                "demo", items[items.length - 1].ingredient(), 22, uG, Optional.empty(), List.of(), List.of(items));
    }
}
