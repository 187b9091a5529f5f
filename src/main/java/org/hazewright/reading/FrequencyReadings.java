package org.hazewright.reading;

import java.util.List;
import java.util.Locale;
import org.hazewright.optics.Refusal;
import org.hazewright.transport.FrequencySignal;
import org.hazewright.transport.Medium;
import org.hazewright.transport.PacketTally;
import org.hazewright.transport.Side;
import org.hazewright.transport.TimeAxis;

/** Modulation and phase at distances, and the µa and µs' that their analysis reports. */
final class FrequencyReadings {
    /** Amplitude per mm², modulation relative to 0 MHz, lag in degrees; errors by counting packets, 0 for diffusion. */
    private record Wave(double amplitude, double modulation, double phaseDeg, double uModulation, double uPhaseDeg) {}

    private FrequencyReadings() {}

    static List<Reading> of(SetUp setUp, Foresight foresight, double nm, Medium medium, Spread spread) {
        DistanceModels models = new DistanceModels(setUp, medium, foresight, true);
        Answers answers = new Answers(setUp, nm);
        int n = setUp.distancesMm().size();
        Wave[] waves = new Wave[n];
        for (int i = 0; i < n; i++) {
            waves[i] = wave(models, i);
            double mm = models.distanceMm(i);
            // the slopes with respect to the medium are diffusion's also where packets answer
            Double uPhase = models.diffusion == null
                    ? null
                    : FirstOrder.u(medium, spread, m -> diffused(models, m, mm).phaseDeg);
            Double uModulation = models.diffusion == null
                    ? null
                    : FirstOrder.u(medium, spread, m -> diffused(models, m, mm).modulation);
            answers.add(
                    mm,
                    Quantity.MODULATION,
                    waves[i].modulation,
                    FirstOrder.together(uModulation, waves[i].uModulation),
                    models.model(i),
                    models.inside(i),
                    models.note(i));
            answers.add(
                    mm,
                    Quantity.PHASE_DEG,
                    waves[i].phaseDeg,
                    FirstOrder.together(uPhase, waves[i].uPhaseDeg),
                    models.model(i),
                    models.inside(i),
                    models.note(i));
        }
        apparent(models, answers, waves, spread);
        return answers.all();
    }

    private static Wave wave(DistanceModels models, int i) {
        if (models.silent(i)) return new Wave(Double.NaN, Double.NaN, Double.NaN, 0, 0);
        return models.byPackets(i)
                ? counted(models, models.ring(i))
                : diffused(models, models.medium, models.distanceMm(i));
    }

    private static Wave diffused(DistanceModels models, Medium medium, double mm) {
        FrequencySignal f = new FrequencySignal(models.diffusionOf(medium), models.setUp.modulationMhz());
        double a = f.amplitudePerMm2(mm, Side.REFLECTANCE);
        return new Wave(a, f.modulation(mm, Side.REFLECTANCE), f.phaseDeg(mm, Side.REFLECTANCE), 0, 0);
    }

    /** Transform of the packets' times of flight; turns of the phase are counted off the mean time. */
    private static Wave counted(DistanceModels models, PacketTally.InRing ring) {
        TimeAxis times = models.timesFor();
        double omega = 2 * Math.PI * 1e-6 * models.setUp.modulationMhz();
        double re = 0;
        double im = 0;
        double[] h = ring.histogram();
        for (int k = 0; k < h.length; k++) {
            re += h[k] * Math.cos(omega * times.at(k));
            im += h[k] * Math.sin(omega * times.at(k));
        }
        // all light of the ring, also what comes after the histogram's end
        double sum = ring.perMm2() / times.stepPs();
        double lag = Math.atan2(im, re);
        double expected = omega * ring.meanTimePs();
        lag += 2 * Math.PI * Math.rint((Math.min(expected, 2 * Math.PI * 1e3) - lag) / (2 * Math.PI));
        double a = Math.hypot(re, im);
        double m = a / sum;
        double uLag = 0;
        double uM = 0;
        for (int k = 0; k < h.length; k++) {
            double turn = omega * times.at(k) - lag;
            double u2 = ring.uHistogram()[k] * ring.uHistogram()[k];
            uLag += u2 * Math.sin(turn) * Math.sin(turn);
            uM += u2 * (Math.cos(turn) - m) * (Math.cos(turn) - m);
        }
        return new Wave(
                a * times.stepPs() / models.entered(),
                m,
                Math.toDegrees(lag),
                Math.sqrt(uM) / sum,
                Math.toDegrees(Math.sqrt(uLag) / a));
    }

    private static void apparent(DistanceModels models, Answers answers, Wave[] waves, Spread spread) {
        Medium medium = models.medium;
        boolean inside = true;
        boolean counted = false;
        for (int i = 0; i < waves.length; i++) {
            inside &= models.inside(i);
            counted |= models.byPackets(i);
        }
        Double mm = waves.length == 1 ? (Double) models.distanceMm(0) : null;
        try {
            Apparent seen = analysed(models, waves);
            double[] u = counted ? null : FirstOrder.curve(medium, spread, m -> analysed(models, m));
            answers.add(
                    mm,
                    Quantity.APPARENT_MUA_PER_CM,
                    seen.muaPerCm(),
                    u == null ? null : (Double) u[0],
                    seen.method(),
                    inside,
                    trueValue("µa", medium.muaPerCm()));
            answers.add(
                    mm,
                    Quantity.APPARENT_MUSP_PER_CM,
                    seen.muspPerCm(),
                    u == null ? null : (Double) u[1],
                    seen.method(),
                    inside,
                    trueValue("µs'", medium.muspPerCm()));
        } catch (Refusal e) {
            answers.add(mm, Quantity.APPARENT_MUA_PER_CM, null, null, "none", false, e.getMessage());
        }
    }

    /** What the same analysis reports on a medium that is a little different. */
    private static double[] analysed(DistanceModels models, Medium medium) {
        int n = models.setUp.distancesMm().size();
        Wave[] waves = new Wave[n];
        for (int i = 0; i < n; i++) waves[i] = diffused(models, medium, models.distanceMm(i));
        Apparent seen = analysed(models, waves);
        return new double[] {seen.muaPerCm(), seen.muspPerCm()};
    }

    /** One distance: a fit of modulation and phase; more: their slopes. */
    private static Apparent analysed(DistanceModels models, Wave[] waves) {
        SetUp setUp = models.setUp;
        Medium medium = models.medium;
        Apparent.Known known = new Apparent.Known(
                medium.n(), medium.g(), setUp.outsideIndex(), setUp.thicknessMm(), setUp.convention());
        double mhz = setUp.modulationMhz();
        if (waves.length == 1)
            return Apparent.frequency(models.distanceMm(0), waves[0].modulation, waves[0].phaseDeg, mhz, known);
        double[] mm = new double[waves.length];
        double[] a = new double[waves.length];
        double[] p = new double[waves.length];
        for (int i = 0; i < waves.length; i++) {
            mm[i] = models.distanceMm(i);
            a[i] = waves[i].amplitude;
            p[i] = waves[i].phaseDeg;
        }
        return Apparent.slopes(mm, a, p, mhz, known);
    }

    static String trueValue(String what, double perCm) {
        return String.format(Locale.ROOT, "The true %s is %.4g /cm.", what, perCm);
    }
}
