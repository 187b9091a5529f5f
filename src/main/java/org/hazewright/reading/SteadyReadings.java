package org.hazewright.reading;

import java.util.List;
import java.util.Locale;
import org.hazewright.optics.Refusal;
import org.hazewright.transport.Medium;
import org.hazewright.transport.PacketTally;
import org.hazewright.transport.SteadySignal;

/** Steady diffuse reflectance at distances; attenuation against the first distance; and what the slope method makes of it. */
final class SteadyReadings {
    /** A signal and what it owes to µa and µs': its relative slopes in cm, and its relative error by counting packets. */
    private record Signal(double perMm2, double perMua, double perMusp, double counting) {}

    private SteadyReadings() {}

    static List<Reading> of(SetUp setUp, Foresight foresight, double nm, Medium medium, Spread spread) {
        DistanceModels models = new DistanceModels(setUp, medium, foresight, false);
        Answers answers = new Answers(setUp, nm);
        int n = setUp.distancesMm().size();
        Signal[] signals = new Signal[n];
        for (int i = 0; i < n; i++) {
            signals[i] = signal(models, i);
            Double u = spread == null ? null : signals[i].perMm2 * relative(signals[i], spread);
            answers.add(
                    models.distanceMm(i),
                    Quantity.REFLECTANCE_PER_MM2,
                    signals[i].perMm2,
                    FirstOrder.together(u, signals[i].perMm2 * signals[i].counting),
                    models.model(i),
                    models.inside(i),
                    models.note(i));
        }
        for (int i = 1; i < n; i++) attenuation(models, answers, signals, i, spread);
        if (setUp.kind() == SetUp.Kind.SLOPE) slope(models, answers, signals, spread);
        return answers.all();
    }

    private static Signal signal(DistanceModels models, int i) {
        if (models.silent(i)) return new Signal(Double.NaN, Double.NaN, Double.NaN, Double.NaN);
        Medium medium = models.medium;
        if (models.byPackets(i)) {
            PacketTally.InRing ring = models.ring(i);
            return new Signal(
                    ring.perMm2() / models.entered(),
                    -ring.meanPathMm() / 10,
                    medium.muspPerCm() == 0 ? 0 : ring.score() / medium.muspPerCm(),
                    ring.uPerMm2() / ring.perMm2());
        }
        double mm = models.distanceMm(i);
        double here = new SteadySignal(models.diffusion).reflectancePerMm2(mm);
        double a = FirstOrder.slope(medium, true, m -> ln(models, m, mm));
        double s = FirstOrder.slope(medium, false, m -> ln(models, m, mm));
        return new Signal(here, a, s, 0);
    }

    private static double ln(DistanceModels models, Medium medium, double mm) {
        return Math.log(new SteadySignal(models.diffusionOf(medium)).reflectancePerMm2(mm));
    }

    private static double relative(Signal s, Spread spread) {
        return Math.hypot(s.perMua * spread.uMuaPerCm(), s.perMusp * spread.uMuspPerCm());
    }

    private static void attenuation(DistanceModels models, Answers answers, Signal[] signals, int i, Spread spread) {
        Signal a = signals[0];
        Signal b = signals[i];
        double decibel = 10 / Math.log(10);
        Double u = spread == null
                ? null
                : decibel * relative(new Signal(1, b.perMua - a.perMua, b.perMusp - a.perMusp, 0), spread);
        String against = String.format(Locale.ROOT, "Against the signal at %.4g mm.", models.distanceMm(0));
        answers.add(
                models.distanceMm(i),
                Quantity.ATTENUATION_DB,
                decibel * Math.log(a.perMm2 / b.perMm2),
                FirstOrder.together(u, decibel * Math.hypot(a.counting, b.counting)),
                both(models, i),
                models.inside(0) && models.inside(i),
                models.note(i) == null ? against : against + " " + models.note(i));
    }

    private static String both(DistanceModels models, int i) {
        String a = models.model(0);
        String b = models.model(i);
        return a.equals(b) ? a : b + " against " + a;
    }

    /** The slope's analysis on the foreseen signals; its uncertainty by shifting the signals as µa and µs' would. */
    private static void slope(DistanceModels models, Answers answers, Signal[] signals, Spread spread) {
        int n = signals.length;
        boolean inside = true;
        for (int i = 0; i < n; i++) inside &= models.inside(i);
        Medium medium = models.medium;
        String model = "slope over " + n + " distances, from " + both(models, n - 1);
        String note = String.format(
                Locale.ROOT,
                "The true µa is %.4g /cm. The slope gives µeff alone: µs' is taken as known, %.4g /cm.",
                medium.muaPerCm(),
                medium.muspPerCm());
        try {
            double here = apparent(models, signals, 0, 0);
            Double u = null;
            if (spread != null) {
                double a = (apparent(models, signals, spread.uMuaPerCm(), 0) - here);
                double s = (apparent(models, signals, 0, spread.uMuspPerCm()) - here);
                u = Math.hypot(a, s);
            }
            answers.add(null, Quantity.APPARENT_MUA_PER_CM, here, u, model, inside, note);
        } catch (Refusal e) {
            answers.add(null, Quantity.APPARENT_MUA_PER_CM, null, null, model, false, e.getMessage());
        }
    }

    private static double apparent(DistanceModels models, Signal[] signals, double byMua, double byMusp) {
        double[] mm = new double[signals.length];
        double[] y = new double[signals.length];
        for (int i = 0; i < y.length; i++) {
            mm[i] = models.distanceMm(i);
            Signal s = signals[i];
            y[i] = s.perMm2 * Math.exp(s.perMua * byMua + s.perMusp * byMusp);
        }
        return Apparent.slope(mm, y, models.medium.muspPerCm(), models.setUp.convention())
                .muaPerCm();
    }
}
