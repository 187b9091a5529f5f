package org.hazewright.reading;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import org.hazewright.transport.AddingDoubling;
import org.hazewright.transport.Collimated;
import org.hazewright.transport.Convention;
import org.hazewright.transport.Diffusion;
import org.hazewright.transport.DiffusionRange;
import org.hazewright.transport.Medium;
import org.hazewright.transport.PacketTally;
import org.hazewright.transport.PhotonPackets;
import org.hazewright.transport.SlabLight;

/** Total reflectance and transmittance of a slab, as integrating spheres see them. */
final class SlabReadings {
    private SlabReadings() {}

    static List<Reading> of(SetUp setUp, Foresight foresight, double nm, Medium medium, Spread spread) {
        return switch (setUp.model()) {
            case AUTO, TRANSPORT -> light(setUp, nm, medium, spread, "transport", null, m -> transport(setUp, m));
            case DIFFUSION -> {
                String outside = DiffusionRange.outside(medium, setUp.thicknessMm());
                String model = "diffusion: " + setUp.convention().inWords();
                yield light(setUp, nm, medium, spread, model, outside, m -> diffusion(setUp, m));
            }
            case PACKETS -> packets(setUp, foresight, nm, medium, spread);
        };
    }

    private static SlabLight transport(SetUp setUp, Medium medium) {
        return AddingDoubling.slab(medium, setUp.outsideIndex(), setUp.thicknessMm());
    }

    /** Diffusion counts all light as scattered; what is unscattered is put beside it by Bouguer–Beer–Lambert. */
    private static SlabLight diffusion(SetUp setUp, Medium medium) {
        Convention c = setUp.convention();
        Convention incident = new Convention(c.form(), c.diffusion(), c.sourceStrength(), Convention.Per.INCIDENT);
        Diffusion d = new Diffusion(medium, setUp.outsideIndex(), setUp.thicknessMm(), incident);
        Collimated beam = new Collimated(medium, setUp.outsideIndex(), setUp.thicknessMm());
        return new SlabLight(
                beam.specularReflectance(),
                beam.returned(),
                Math.min(1, d.totalReflectance()),
                beam.transmittance(),
                Math.min(1, d.totalTransmittance()));
    }

    private static List<Reading> light(
            SetUp setUp,
            double nm,
            Medium medium,
            Spread spread,
            String model,
            String outside,
            Function<Medium, SlabLight> solve) {
        Answers answers = new Answers(setUp, nm);
        SlabLight light = solve.apply(medium);
        // all shares come from one solution, so that each neighbour of the medium is solved once
        double[] u = FirstOrder.curve(medium, spread, m -> valuesOf(solve.apply(m)));
        int[] next = {0};
        Shares shares = (quantity, share) -> {
            Double here = u == null || !Double.isFinite(u[next[0]]) ? null : (Double) u[next[0]];
            next[0]++;
            answers.add(
                    null,
                    quantity,
                    share.applyAsDouble(light),
                    here,
                    model,
                    outside == null,
                    noteFor(quantity, light, outside));
        };
        every(shares);
        return answers.all();
    }

    private static List<Reading> packets(SetUp setUp, Foresight foresight, double nm, Medium medium, Spread spread) {
        Answers answers = new Answers(setUp, nm);
        PacketTally tally =
                new PhotonPackets(medium, setUp.outsideIndex(), setUp.thicknessMm()).run(foresight.run(setUp));
        Shares shares = (quantity, share) -> {
            if (tally.packets() == 0) {
                answers.add(null, quantity, null, null, "packets", false, "The run of packets was stopped.");
                return;
            }
            double error = countingError(quantity, tally);
            // packets would need many more to show a slope; transport shows it
            Double u = FirstOrder.u(medium, spread, m -> share.applyAsDouble(transport(setUp, m)));
            answers.add(
                    null,
                    quantity,
                    share.applyAsDouble(tally.light()),
                    FirstOrder.together(u, error),
                    "packets",
                    true,
                    String.format(
                            Locale.ROOT,
                            "%d packets, standard error %.2g, which is part of the uncertainty.",
                            tally.packets(),
                            error));
        };
        every(shares);
        return answers.all();
    }

    /** Between blocks for what is scattered; unscattered light is let through whole or not at all, a binomial. */
    private static double countingError(Quantity quantity, PacketTally tally) {
        double through = tally.light().unscatteredTransmittance();
        return switch (quantity) {
            case SPECULAR_REFLECTANCE -> 0;
            case DIFFUSE_REFLECTANCE, TOTAL_REFLECTANCE -> tally.uTotalReflectance();
            case UNSCATTERED_TRANSMITTANCE -> Math.sqrt(through * (1 - through) / tally.packets());
            default -> tally.uTotalTransmittance();
        };
    }

    private interface Shares {
        void add(Quantity quantity, ToDoubleFunction<SlabLight> share);
    }

    private static void every(Shares shares) {
        shares.add(Quantity.SPECULAR_REFLECTANCE, SlabLight::specularReflectance);
        shares.add(Quantity.DIFFUSE_REFLECTANCE, SlabLight::diffuseReflectance);
        shares.add(Quantity.TOTAL_REFLECTANCE, SlabLight::totalReflectance);
        shares.add(Quantity.DIFFUSE_TRANSMITTANCE, SlabLight::diffuseTransmittance);
        shares.add(Quantity.UNSCATTERED_TRANSMITTANCE, SlabLight::unscatteredTransmittance);
        shares.add(Quantity.TOTAL_TRANSMITTANCE, SlabLight::totalTransmittance);
    }

    /** The shares in the order of {@link #every}. */
    private static double[] valuesOf(SlabLight light) {
        List<Double> values = new ArrayList<>();
        every((quantity, share) -> values.add(share.applyAsDouble(light)));
        return values.stream().mapToDouble(v -> v).toArray();
    }

    private static String noteFor(Quantity quantity, SlabLight light, String outside) {
        if (quantity != Quantity.TOTAL_REFLECTANCE || light.unscatteredReflectance() < 5e-6) return outside;
        String returned = String.format(
                Locale.ROOT,
                "Includes %.3g of unscattered light returned by the far face.",
                light.unscatteredReflectance());
        return outside == null ? returned : outside + " " + returned;
    }
}
