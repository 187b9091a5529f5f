package org.hazewright.reading;

import java.util.ArrayList;
import java.util.List;
import java.util.function.DoubleFunction;
import org.hazewright.optics.Refusal;
import org.hazewright.transport.Medium;

/**
 * Everything that a set-up will show on a phantom.
 *
 * <p>The medium is asked for once per wavelength; progress counts all wavelengths together. Distances of reflectance, slope, frequency and time set-ups are on the
 * surface the beam enters. Every reading says its model and whether that holds there. With model {@code auto}: transport for
 * totals, and for distances diffusion inside {@link DiffusionRange}, photon packets outside.
 */
public final class Readings {
    private Readings() {}

    public static List<Reading> of(SetUp setUp, DoubleFunction<Medium> medium) {
        return of(setUp, Foresight.of(medium));
    }

    public static List<Reading> of(SetUp setUp, Foresight foresight) {
        List<Reading> all = new ArrayList<>();
        if (setUp.kind() == SetUp.Kind.OXIMETER) return OximeterReadings.of(setUp, foresight);
        int count = setUp.wavelengthsNm().size();
        for (int i = 0; i < count; i++) {
            double nm = setUp.wavelengthsNm().get(i);
            int done = i;
            Foresight here =
                    foresight.watched(share -> foresight.progress().accept((done + share) / count), foresight.stop());
            Medium medium = foresight.medium().apply(nm);
            if (medium == null) throw new Refusal("The phantom has no coefficients at " + nm + " nm.");
            Spread spread = foresight.spread().apply(nm);
            all.addAll(
                    switch (setUp.kind()) {
                        case REFLECTANCE, SLOPE -> SteadyReadings.of(setUp, here, nm, medium, spread);
                        case FREQUENCY -> FrequencyReadings.of(setUp, here, nm, medium, spread);
                        case TIME -> TimeReadings.of(setUp, here, nm, medium, spread);
                        case SLAB -> SlabReadings.of(setUp, here, nm, medium, spread);
                        case COLLIMATED -> CollimatedReadings.of(setUp, nm, medium, spread);
                        case OXIMETER -> throw new IllegalStateException("answered above");
                    });
        }
        return all;
    }
}
