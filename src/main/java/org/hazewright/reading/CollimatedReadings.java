package org.hazewright.reading;

import java.util.List;
import java.util.Locale;
import org.hazewright.transport.Collimated;
import org.hazewright.transport.Medium;

/** Readings of a collimated beam through a slab or cuvette. */
final class CollimatedReadings {
    private static final String MODEL = "Bouguer–Beer–Lambert";
    /** µs d above which scattered light reaches any real detector (common practice). */
    private static final double MANY = 1;

    private CollimatedReadings() {}

    static List<Reading> of(SetUp setUp, double nm, Medium medium, Spread spread) {
        Answers answers = new Answers(setUp, nm);
        Collimated beam = beam(setUp, medium);
        double scatterings = medium.musPerMm() * setUp.thicknessMm();
        boolean inside = scatterings <= MANY;
        String note = inside
                ? null
                : String.format(
                        Locale.ROOT,
                        "µs d is %.3g: light is scattered about that many times on its way, and some of it reaches any real"
                                + " detector, which then reads more than this.",
                        scatterings);
        answers.add(
                null,
                Quantity.SPECULAR_REFLECTANCE,
                beam.specularReflectance(),
                spread == null ? null : 0.0,
                MODEL,
                true,
                null);
        answers.add(
                null,
                Quantity.UNSCATTERED_TRANSMITTANCE,
                beam.transmittance(),
                FirstOrder.u(medium, spread, m -> beam(setUp, m).transmittance()),
                MODEL,
                inside,
                note);
        answers.add(
                null,
                Quantity.ATTENUATION_DB,
                beam.attenuationDb(),
                FirstOrder.u(medium, spread, m -> beam(setUp, m).attenuationDb()),
                MODEL,
                inside,
                note);
        return answers.all();
    }

    private static Collimated beam(SetUp setUp, Medium medium) {
        return new Collimated(medium, setUp.outsideIndex(), setUp.thicknessMm());
    }
}
