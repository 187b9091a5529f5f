package org.hazewright.reading;

import java.util.List;
import java.util.Locale;
import java.util.function.DoubleUnaryOperator;
import org.hazewright.optics.Refusal;
import org.hazewright.transport.Medium;
import org.hazewright.transport.Response;
import org.hazewright.transport.Side;
import org.hazewright.transport.TimeAxis;
import org.hazewright.transport.TimeCurve;
import org.hazewright.transport.TimeMoments;
import org.hazewright.transport.TimeSignal;

/** The curve of a short pulse at distances, its mean time and variance, and the µa and µs' that a fit reports. */
final class TimeReadings {
    private TimeReadings() {}

    static List<Reading> of(SetUp setUp, Foresight foresight, double nm, Medium medium, Spread spread) {
        DistanceModels models = new DistanceModels(setUp, medium, foresight, true);
        Answers answers = new Answers(setUp, nm);
        for (int i = 0; i < setUp.distancesMm().size(); i++) {
            curve(models, answers, i, spread);
            moments(models, answers, i, spread);
        }
        return answers.all();
    }

    private static void curve(DistanceModels models, Answers answers, int i, Spread spread) {
        double mm = models.distanceMm(i);
        if (models.silent(i)) {
            answers.add(mm, Quantity.MEAN_TIME_PS, null, null, models.model(i), false, models.note(i));
            return;
        }
        SetUp setUp = models.setUp;
        Medium medium = models.medium;
        TimeCurve seen = models.byPackets(i) ? seen(setUp, counted(models, i)) : diffused(models, medium, mm);
        double[] u = models.byPackets(i)
                ? null
                : FirstOrder.curve(medium, spread, m -> diffused(models, m, mm).value());
        String unit = setUp.counts() == null ? "1/(mm2 ps)" : "counts";
        Reading.Curve curve = new Reading.Curve("ps", setUp.time().timesPs(), unit, seen.value(), u);
        answers.curve(mm, Quantity.TIME_CURVE, curve, models.model(i), models.inside(i), models.note(i));
        Apparent.Known known = new Apparent.Known(
                medium.n(), medium.g(), setUp.outsideIndex(), setUp.thicknessMm(), setUp.convention());
        try {
            Apparent fit = Apparent.curve(mm, seen, setUp.response(), known);
            String mua = FrequencyReadings.trueValue("µa", medium.muaPerCm());
            String musp = FrequencyReadings.trueValue("µs'", medium.muspPerCm());
            double[] uFit =
                    models.byPackets(i) ? null : FirstOrder.curve(medium, spread, m -> fitted(models, known, m, mm));
            answers.add(
                    mm,
                    Quantity.APPARENT_MUA_PER_CM,
                    fit.muaPerCm(),
                    uFit == null ? null : (Double) uFit[0],
                    fit.method(),
                    models.inside(i),
                    mua);
            answers.add(
                    mm,
                    Quantity.APPARENT_MUSP_PER_CM,
                    fit.muspPerCm(),
                    uFit == null ? null : (Double) uFit[1],
                    fit.method(),
                    models.inside(i),
                    musp);
        } catch (Refusal e) {
            answers.add(mm, Quantity.APPARENT_MUA_PER_CM, null, null, "none", false, e.getMessage());
        }
    }

    /** What the fit reports when the medium is a little different and the analysis is the same. */
    private static double[] fitted(DistanceModels models, Apparent.Known known, Medium medium, double mm) {
        Apparent fit = Apparent.curve(mm, diffused(models, medium, mm), models.setUp.response(), known);
        return new double[] {fit.muaPerCm(), fit.muspPerCm()};
    }

    private static TimeCurve seen(SetUp setUp, DoubleUnaryOperator ideal) {
        TimeCurve curve = TimeCurve.seen(ideal, setUp.time(), setUp.response());
        return setUp.counts() == null ? curve : curve.ofCounts(setUp.counts());
    }

    private static TimeCurve diffused(DistanceModels models, Medium medium, double mm) {
        TimeSignal signal = new TimeSignal(models.diffusionOf(medium));
        return seen(models.setUp, t -> signal.perMm2PerPs(mm, t, Side.REFLECTANCE));
    }

    private static DoubleUnaryOperator counted(DistanceModels models, int i) {
        TimeAxis axis = models.timesFor();
        double[] h = models.ring(i).histogram();
        double entered = models.entered();
        return t -> {
            long k = Math.round((t - axis.fromPs()) / axis.stepPs());
            return k < 0 || k >= h.length ? 0 : h[(int) k] / entered;
        };
    }

    private static void moments(DistanceModels models, Answers answers, int i, Spread spread) {
        if (models.silent(i)) return;
        double mm = models.distanceMm(i);
        Medium medium = models.medium;
        Response response = models.setUp.response();
        double mean;
        double uMean = 0;
        if (models.byPackets(i)) {
            mean = models.ring(i).meanTimePs();
            uMean = models.ring(i).uMeanTimePs();
        } else mean = new TimeMoments(models.diffusion, Side.REFLECTANCE).meanPs(mm);
        Double u = models.diffusion == null
                ? null
                : FirstOrder.u(medium, spread, m -> of(models, m).meanPs(mm));
        String own = response == null
                ? null
                : String.format(
                        Locale.ROOT,
                        "Includes the response's own mean of %.1f ps and variance of %.0f ps².",
                        response.meanPs(),
                        response.variancePs2());
        String note = join(models.note(i), own);
        answers.add(
                mm,
                Quantity.MEAN_TIME_PS,
                mean + (response == null ? 0 : response.meanPs()),
                FirstOrder.together(u, uMean),
                models.model(i),
                models.inside(i),
                note);
        if (models.setUp.thicknessMm() == null && medium.muaPerCm() == 0) {
            answers.add(
                    mm,
                    Quantity.TIME_VARIANCE_PS2,
                    null,
                    null,
                    models.model(i),
                    models.inside(i),
                    "Without absorption the variance in a semi-infinite medium is not finite.");
            return;
        }
        double variance = models.byPackets(i)
                ? models.ring(i).timeVariancePs2()
                : new TimeMoments(models.diffusion, Side.REFLECTANCE).variancePs2(mm);
        Double uVariance = models.diffusion == null || medium.muaPerCm() == 0
                ? null
                : FirstOrder.u(medium, spread, m -> of(models, m).variancePs2(mm));
        answers.add(
                mm,
                Quantity.TIME_VARIANCE_PS2,
                variance + (response == null ? 0 : response.variancePs2()),
                uVariance,
                models.model(i),
                models.inside(i),
                note);
    }

    private static TimeMoments of(DistanceModels models, Medium medium) {
        return new TimeMoments(models.diffusionOf(medium), Side.REFLECTANCE);
    }

    private static String join(String a, String b) {
        if (a == null) return b;
        return b == null ? a : a + " " + b;
    }
}
