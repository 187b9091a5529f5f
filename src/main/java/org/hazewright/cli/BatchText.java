package org.hazewright.cli;

import java.io.PrintWriter;
import java.util.List;
import java.util.Optional;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Learned;
import org.hazewright.batch.LotWatch;
import org.hazewright.batch.Measurement;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Outlook;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.learning.Factors;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Quantity;
import org.hazewright.learning.Verdict;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Sweep;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Shelf;

/** A batch as a page of text: what was weighed, where it lands, what was measured and what that says. */
final class BatchText {
    private final Batch batch;
    private final Shared.Units units;
    private final PrintWriter out;

    BatchText(Batch batch, Shared.Units units, PrintWriter out) {
        this.batch = batch;
        this.units = units;
        this.out = out;
    }

    void print() {
        Recipe made = batch.asMade();
        out.println("Batch " + batch.id() + ": " + batch.plan().title());
        out.println(batch.plan().base().name() + ", "
                + Figures.significant(Mixture.of(made).volumeMl(), 5) + " mL as made, " + batch.on()
                + (batch.who().isBlank() ? "" : ", " + batch.who()));
        out.println();
        weighings();
        batch.heating()
                .ifPresent(h -> out.println("  Heating took " + Grams.plain(h.lostG()) + " g, "
                        + Grams.plain(h.waterBackG()) + " g was given back: " + missing(h.missingG())));
        landing(made);
        for (Measurement m : batch.measured()) measured(m);
        for (String note : batch.notes()) out.println("Note: " + note);
    }

    /** Lots that went in and should not be relied on. */
    void lots(Shelf shelf) {
        for (String s : LotWatch.of(batch, shelf)) out.println("Mind: " + s);
    }

    private static String missing(double g) {
        if (Math.abs(g) < 5e-4) return "nothing is missing.";
        return g > 0 ? Grams.plain(g) + " g is missing." : Grams.plain(-g) + " g too much.";
    }

    void weighings() {
        Balance balance = batch.balance();
        out.println(
                "Weighed " + batch.weighedCount() + " of " + batch.weighedG().size());
        TextTable table = new TextTable("  ", "rlrrrl");
        table.row("no", "what", "planned g", "weighed g", "off", "into");
        List<Weighing> all = batch.weighings();
        for (int n = 0; n < all.size(); n++) {
            Weighing w = all.get(n);
            boolean in = batch.weighed(n);
            double g = batch.weighedG().get(n).orElse(Double.NaN);
            int correction =
                    w.role() == Weighing.Role.ITEM ? batch.corrections().get(w.place()) : 0;
            table.row(
                    Integer.toString(n + 1),
                    w.label(),
                    shown(w.massG(), balance),
                    in ? shown(g, balance) : "",
                    in && w.massG() > 0 ? signedPercent(g / w.massG() - 1) : "",
                    w.into()
                            .map(s -> "stock " + s)
                            .orElse(correction == 0 ? "vessel" : "vessel, correction " + correction));
        }
        table.print(out);
    }

    private static String shown(double g, Balance balance) {
        return Figures.fixed(g, Math.max(balance.decimals(), 3));
    }

    private static String signedPercent(double share) {
        String s = Figures.fixed(100 * Math.abs(share), 2);
        return (Double.parseDouble(s) == 0 ? "" : share > 0 ? "+" : "−") + s + " %";
    }

    /** Wanted against as made, by all that is known. */
    void landing(Recipe made) {
        Optional<Brief> brief = batch.brief();
        if (brief.isEmpty()) {
            out.println();
            out.println("The batch does not say what is wanted; open it with its brief to judge it.");
            return;
        }
        out.println();
        boolean measured = !batch.measured().isEmpty();
        Learned.Landing landing = Learned.of(batch)
                .landing(
                        made,
                        brief.get().points(),
                        Sweep.of(Mixture.of(made), brief.get().wavelengthsNm()),
                        batch.balance().capacityG());
        double chance = measured
                ? landing.chance()
                : Outlook.of(brief.get(), made, 20_000).chance();
        out.println((batch.complete() ? "As made" : "With the rest as planned") + ", "
                + (measured ? "by its grams and by what was measured, " : "by its grams, ")
                + "it lands inside every tolerance "
                + DesignText.times(chance) + " in 100.");
        table(landing.predicted());
    }

    void table(List<Answer.Predicted> predicted) {
        TextTable table = new TextTable("  ", "rlrrrl");
        String unit = " " + units.sign();
        table.row("nm", "", "wanted" + unit, "±", "as made" + unit, "");
        for (Answer.Predicted p : predicted) {
            Point point = p.point();
            double tolerance = units.of(point.tolerancePerCm());
            table.row(
                    Figures.plain(point.wavelengthNm()),
                    point.quantity().sign(),
                    Figures.significant(units.of(point.wantedPerCm()), 4),
                    Figures.significant(tolerance, 2),
                    Figures.withUncertainty(units.of(p.perCm()), units.of(p.uPerCm())),
                    p.inside()
                            ? "inside"
                            : "OUTSIDE, " + Figures.significant(Math.abs(p.miss()), 2) + " half-widths "
                                    + (p.miss() > 0 ? "too high" : "too low"));
        }
        table.print(out);
    }

    private void measured(Measurement m) {
        out.println();
        out.println("Measured on " + m.on() + " by " + m.method().name()
                + (m.instrument().isBlank() ? "" : ", " + m.instrument())
                + (m.correction() > 0 ? ", after correction " + m.correction() : ""));
        Verdict verdict = verdict(m);
        TextTable table = new TextTable("  ", "rlrrrr");
        String unit = " " + units.sign();
        table.row("nm", "", "predicted" + unit, "measured" + unit, "measured / predicted", "off by u");
        verdict.rows().forEach(r -> {
            MeasuredValue v = r.value();
            table.row(
                    Figures.plain(v.wavelengthNm()),
                    v.quantity() == Quantity.ABSORPTION ? "µa" : "µs'",
                    Figures.withUncertainty(units.of(r.predictedPerCm()), units.of(r.uPredictedPerCm())),
                    Figures.withUncertainty(units.of(v.perCm()), units.of(v.uPerCm())),
                    Figures.fixed(v.perCm() / r.predictedPerCm(), 3),
                    Figures.fixed(r.inStandardUncertainties(), 1));
        });
        table.print(out);
        out.println("  " + verdict.sentence());
    }

    Verdict verdict(Measurement m) {
        return Verdict.of(Factors.none(), batch.measuredBatch(m));
    }
}
