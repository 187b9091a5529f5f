package org.hazewright.desk.model;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.function.BooleanSupplier;
import java.util.stream.DoubleStream;
import org.hazewright.bench.Outlook;
import org.hazewright.brief.Tissue;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.optics.Refusal;
import org.hazewright.reading.Foresight;
import org.hazewright.reading.Oximeter;
import org.hazewright.reading.Quantity;
import org.hazewright.reading.Reading;
import org.hazewright.reading.Readings;
import org.hazewright.reading.SetUp;
import org.hazewright.reading.Spread;
import org.hazewright.transport.Medium;
import org.hazewright.transport.TimeAxis;

/**
 * What instruments would show on the recipe, for pictures: diffuse reflectance over distance, a short pulse's curve, a slab's totals, and the
 * blood that an oximeter would believe in.
 *
 * <p>While a recipe moves there is no time for photon packets, so distances and pulses are foreseen by diffusion; each says whether diffusion
 * holds there.
 */
public record Foreseen(
        Asked asked,
        Optional<Distances> distances,
        Optional<Pulse> pulse,
        Optional<Slab> slab,
        Optional<Blood> blood,
        List<String> notes) {

    /** What is asked for: a wavelength in nm, source and detector so many mm apart, a slab of so many mm. */
    public record Asked(double nm, double distanceMm, double thicknessMm) {
        public Asked {
            if (!(nm >= 200 && nm <= 3000)) throw new Refusal("Type a wavelength from 200 to 3000 nm.");
            if (!(distanceMm >= 0.5 && distanceMm <= 200)) throw new Refusal("Type a distance from 0.5 to 200 mm.");
            if (!(thicknessMm >= 0.1 && thicknessMm <= 1000))
                throw new Refusal("Type a thickness from 0.1 to 1000 mm.");
        }
    }

    /** Reflectance per mm² over distance in mm; attenuation at the distance asked for, dB, and its standard uncertainty. */
    public record Distances(
            double[] mm, double[] perMm2, double attenuationDb, double uDb, boolean holds, String note) {}

    /** The curve of a short pulse over ps, and its mean time with its standard uncertainty, ps. */
    public record Pulse(double[] ps, double[] height, double meanPs, double uPs, boolean holds, String note) {}

    /** Shares of the light that meets a slab: reflected, let through, absorbed; and standard uncertainties of the first two. */
    public record Slab(double reflected, double through, double absorbed, double uReflected, double uThrough) {}

    /** Saturation and total haemoglobin in µmol/L as read, with standard uncertainties; what the brief wanted, NaN for none. */
    public record Blood(double saturation, double uSaturation, double umolPerL, double uUmolPerL, double wanted) {}

    /** Computes all that can be; what cannot says so in {@link #notes}. */
    public static Foreseen of(Outlook o, Asked asked, Tissue.Spectra spectra, BooleanSupplier stop) {
        return new Seer(o, asked, spectra, stop).all();
    }

    private static final class Seer {
        private final Outlook outlook;
        private final Asked asked;
        private final Tissue.Spectra spectra;
        private final Foresight foresight;
        private final List<String> notes = new ArrayList<>();

        Seer(Outlook outlook, Asked asked, Tissue.Spectra spectra, BooleanSupplier stop) {
            this.outlook = outlook;
            this.asked = asked;
            this.spectra = spectra;
            Mixture mixture = Mixture.of(outlook.recipe());
            double capacity = outlook.brief().balance().capacityG();
            foresight = Foresight.of(nm -> medium(mixture.at(nm)))
                    .uncertain(nm -> {
                        Budget b = Budget.of(outlook.recipe(), new double[] {nm}, capacity);
                        return new Spread(b.uMuaPerCm()[0], b.uMuspPerCm()[0]);
                    })
                    .onThreads(1)
                    .watched(share -> {}, stop);
        }

        private static Medium medium(Coefficients c) {
            return new Medium(c.muaPerCm(), c.muspPerCm(), Math.max(-0.99, Math.min(0.99, c.g())), c.boundaryIndex());
        }

        private interface Look<T> {
            T look();
        }

        private <T> Optional<T> attempt(Look<T> look) {
            try {
                return Optional.ofNullable(look.look());
            } catch (Refusal refusal) {
                if (!notes.contains(refusal.getMessage())) notes.add(refusal.getMessage());
                return Optional.empty();
            }
        }

        Foreseen all() {
            return new Foreseen(
                    asked,
                    attempt(this::distances),
                    attempt(this::pulse),
                    attempt(this::slab),
                    attempt(this::blood),
                    notes);
        }

        private static Reading one(List<Reading> all, Quantity q) {
            return all.stream().filter(r -> r.quantity() == q).findFirst().orElse(null);
        }

        private static String said(Reading r) {
            return r.note() == null ? "" : r.note();
        }

        private Distances distances() {
            double most = Math.max(40, 1.3 * asked.distanceMm());
            double[] mm = DoubleStream.concat(
                            DoubleStream.iterate(2, x -> x <= most, x -> x + most / 40),
                            DoubleStream.of(asked.distanceMm()))
                    .sorted()
                    .distinct()
                    .toArray();
            SetUp setUp = SetUp.of("probe", SetUp.Kind.REFLECTANCE)
                    .wavelengthsNm(List.of(asked.nm()))
                    .distancesMm(Arrays.stream(mm).boxed().toList())
                    .model(SetUp.ModelChoice.DIFFUSION)
                    .done();
            List<Reading> all = Readings.of(setUp, foresight);
            double[] r = new double[mm.length];
            Reading db = null;
            boolean holds = true;
            for (Reading reading : all) {
                if (reading.value() == null || reading.distanceMm() == null) continue;
                if (reading.quantity() == Quantity.REFLECTANCE_PER_MM2)
                    r[Arrays.binarySearch(mm, reading.distanceMm())] = reading.value();
                if (reading.distanceMm() == asked.distanceMm()) {
                    holds &= reading.insideRange();
                    if (reading.quantity() == Quantity.ATTENUATION_DB) db = reading;
                }
            }
            return db == null ? null : new Distances(mm, r, db.value(), db.u() == null ? 0 : db.u(), holds, said(db));
        }

        private Pulse pulse() {
            SetUp setUp = SetUp.of("pulse", SetUp.Kind.TIME)
                    .wavelengthsNm(List.of(asked.nm()))
                    .distancesMm(List.of(asked.distanceMm()))
                    .time(new TimeAxis(0, 6000, 20))
                    .model(SetUp.ModelChoice.DIFFUSION)
                    .done();
            List<Reading> all = Readings.of(setUp, foresight);
            Reading curve = one(all, Quantity.TIME_CURVE);
            Reading mean = one(all, Quantity.MEAN_TIME_PS);
            if (curve == null || curve.curve() == null || mean == null || mean.value() == null) return null;
            return new Pulse(
                    curve.curve().x(),
                    curve.curve().y(),
                    mean.value(),
                    mean.u() == null ? 0 : mean.u(),
                    mean.insideRange(),
                    said(mean));
        }

        private Slab slab() {
            SetUp setUp = SetUp.of("slab", SetUp.Kind.SLAB)
                    .wavelengthsNm(List.of(asked.nm()))
                    .thicknessMm(asked.thicknessMm())
                    .done();
            List<Reading> all = Readings.of(setUp, foresight);
            Reading r = one(all, Quantity.TOTAL_REFLECTANCE);
            Reading t = one(all, Quantity.TOTAL_TRANSMITTANCE);
            if (r == null || t == null || r.value() == null || t.value() == null) return null;
            return new Slab(
                    r.value(),
                    t.value(),
                    Math.max(0, 1 - r.value() - t.value()),
                    r.u() == null ? 0 : r.u(),
                    t.u() == null ? 0 : t.u());
        }

        private Blood blood() {
            double[] nm = outlook.brief().wavelengthsNm();
            if (nm.length < 2) {
                notes.add("Saturation needs targets at two wavelengths or more.");
                return null;
            }
            Oximeter oximeter = new Oximeter(
                    ShelfReader.SHIPPED, spectra.oxyEpsilon(), spectra.deoxyEpsilon(), spectra.waterMua()::at);
            SetUp setUp = SetUp.of("oximeter", SetUp.Kind.OXIMETER)
                    .wavelengthsNm(Arrays.stream(nm).boxed().toList())
                    .done();
            List<Reading> all = Readings.of(setUp, foresight.with(oximeter));
            Reading s = one(all, Quantity.SATURATION);
            Reading h = one(all, Quantity.HAEMOGLOBIN_UMOL_PER_L);
            if (s == null || h == null || s.value() == null || h.value() == null) return null;
            double wanted = outlook.brief().tissue().map(Tissue::saturation).orElse(Double.NaN);
            return new Blood(s.value(), s.u() == null ? 0 : s.u(), h.value(), h.u() == null ? 0 : h.u(), wanted);
        }
    }
}
