package org.hazewright.cli;

import java.io.PrintWriter;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answering;
import org.hazewright.bench.BetterKnown;
import org.hazewright.bench.Leftover;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Warning;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Mould;
import org.hazewright.brief.Tissue;
import org.hazewright.mixture.Cause;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.reading.HaemoglobinEquivalent;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;

/** An answer as a page of text that could be carried to a balance. */
final class DesignText {
    /** A slip that moves no target by this share of its half-width is not listed. */
    private static final double SLIGHT = 0.05;

    private final Answer answer;
    private final Shared.Units units;
    private final PrintWriter out;
    private final Balance balance;
    private final Optional<HaemoglobinEquivalent> blood;

    /** {@code blood} is what the recipe comes to as blood, for a tissue-like brief. */
    DesignText(Answer answer, Optional<HaemoglobinEquivalent> blood, Shared.Units units, PrintWriter out) {
        this.answer = answer;
        this.blood = blood;
        this.units = units;
        this.out = out;
        this.balance = answer.brief().balance();
    }

    void print(List<Warning> warnings) {
        Brief brief = answer.brief();
        out.println(brief.title());
        out.println(answer.recipe().base().name() + ", " + Figures.plain(brief.batchMl()) + " mL"
                + (brief.overage() > 0
                        ? " + " + Figures.plain(100 * brief.overage()) + " % = "
                                + Figures.significant(brief.volumeMl(), 5) + " mL"
                        : "")
                + (brief.moulds().isEmpty() ? "" : " for " + Mould.words(brief.moulds()))
                + ", at " + Figures.plain(brief.temperatureC()) + " °C");
        out.println();
        out.println(verdict(answer));
        stocks();
        weighing();
        targets();
        blood.ifPresent(this::blood);
        causes();
        slips();
        section("What holds it back", answer.limits());
        alternatives();
        section("Mind", mind(warnings));
        out.println();
        out.printf(
                Locale.ROOT,
                "Search: %,d sets of ingredients considered, %,d solved, %,d %s; the best is %s.%n",
                answer.search().admissible(),
                answer.search().solved(),
                answer.search().cut(),
                answer.search().proven() ? "cut by a bound" : "cut by a bound or not reached",
                answer.search().proven() ? "proven" : "not proven, the search was stopped");
    }

    /** The one sentence that matters. */
    static String verdict(Answer answer) {
        String chance = times(answer.chance());
        if (answer.meets()) return "Lands inside every tolerance " + chance + " in 100.";
        if (!answer.search().proven())
            return "Misses: no recipe that meets every tolerance was found before the search was stopped; this is the closest so"
                    + " far. Its worst miss is " + Figures.significant(answer.worstMiss(), 3) + " half-widths.";
        return "Misses: no recipe from this shelf meets every tolerance; this is the closest. Its worst miss is "
                + Figures.significant(answer.worstMiss(), 3) + " half-widths, and "
                + Figures.significant(answer.bestPossibleWorstMiss(), 3) + " is the best possible.";
    }

    /** A share as a count in 100: never 100 for what is not certain, nor 0 for what is possible. */
    static String times(double share) {
        long count = Math.round(100 * share);
        if (count == 100 && share < 1) return "more than 99 times";
        if (count == 0 && share > 0) return "less than 1 time";
        return count + (count == 1 ? " time" : " times");
    }

    private void stocks() {
        Recipe recipe = answer.recipe();
        if (recipe.stocks().isEmpty()) return;
        out.println();
        out.println("Make first");
        TextTable table = new TextTable("  ", "lrlll");
        List<Leftover> left = Leftover.of(recipe);
        for (Stock s : recipe.stocks()) {
            String rest = left.stream()
                    .filter(l -> l.stock().equals(s.id()))
                    .map(l -> grams(l.leftG()) + " left over")
                    .findFirst()
                    .orElse("");
            table.row(
                    s.id(),
                    grams(s.ingredientG()),
                    s.from().orElse(s.ingredient().id()),
                    "+ " + grams(s.diluentG()) + " " + s.diluent().id(),
                    rest);
        }
        table.print(out);
    }

    private void weighing() {
        out.println();
        out.println("Weigh, in this order");
        TextTable table = new TextTable("  ", "rlrl");
        int n = 0;
        for (Item item : answer.recipe().items()) {
            Ingredient i = item.ingredient();
            List<String> notes = new ArrayList<>();
            if (item.stock().isEmpty() && i.form() == Form.LIQUID)
                notes.add(Figures.significant(item.massG() / i.densityGPerMl(), 4) + " mL");
            if (balance.loads(item.massG()) > 1) notes.add("in " + balance.loads(item.massG()) + " loads");
            i.lot().ifPresent(l -> notes.add("lot " + l.number()));
            if (item.stock().isPresent()) notes.add(i.name());
            table.row(Integer.toString(++n), item.label(), grams(item.massG()), String.join(", ", notes));
        }
        table.row(
                "",
                "together",
                grams(answer.mixture().massG()),
                Figures.significant(answer.mixture().volumeMl(), 5) + " mL");
        table.print(out);
    }

    private void targets() {
        out.println();
        out.println("Targets, " + units.sign());
        TextTable table = new TextTable("  ", "rlrrrrll");
        table.row("nm", "", "wanted", "± tol.", "predicted", "± u", "miss", "");
        for (Answer.Predicted p : answer.predicted()) {
            double u = units.of(p.uPerCm());
            int decimals = Math.max(
                    Figures.decimalsFor(u),
                    Figures.decimalsFor(units.of(p.point().tolerancePerCm())));
            table.row(
                    Figures.plain(p.point().wavelengthNm()),
                    p.point().quantity().sign(),
                    Figures.fixed(units.of(p.point().wantedPerCm()), decimals),
                    Figures.fixed(units.of(p.point().tolerancePerCm()), decimals),
                    Figures.fixed(units.of(p.perCm()), decimals),
                    Figures.fixed(u, decimals),
                    LandingGauge.of(p.miss()),
                    (p.miss() < 0 ? "−" : "+")
                            + Figures.fixed(Math.abs(p.miss()), 2)
                            + (p.inside() ? "" : "  OUTSIDE"));
        }
        table.print(out);
        out.println("  miss: in half-widths of the tolerance; u: standard uncertainty (k = 1)");
    }

    private void blood(HaemoglobinEquivalent h) {
        Tissue wanted = answer.brief().tissue().orElseThrow();
        int decimals = Figures.decimalsFor(h.uUmolPerL());
        int shares = Figures.decimalsFor(100 * h.uSaturation());
        wrapped("As blood: its absorption, less the tissue's water and fat, is that of "
                        + Figures.fixed(h.umolPerL(), decimals) + " ± " + Figures.fixed(h.uUmolPerL(), decimals)
                        + " µmol/L of haemoglobin at a saturation of "
                        + Figures.fixed(100 * h.saturation(), shares) + " ± "
                        + Figures.fixed(100 * h.uSaturation(), shares) + " %; the brief says "
                        + Figures.plain(wanted.haemoglobinUmolPerL()) + " µmol/L at "
                        + Figures.significant(100 * wanted.saturation(), 3) + " %.")
                .forEach(line -> out.println("  " + line));
    }

    /** Shares of the summed variance in units of tolerance, largest first. */
    private void causes() {
        record Share(String name, double share) {}
        double[] nm = answer.brief().wavelengthsNm();
        List<Share> shares = new ArrayList<>();
        double total = 0;
        for (Cause c : answer.budget().causes()) {
            double sum = 0;
            for (Answer.Predicted p : answer.predicted()) {
                int j = java.util.Arrays.binarySearch(nm, p.point().wavelengthNm());
                double effect = (p.point().quantity() == org.hazewright.brief.Point.Quantity.MUA
                                ? c.muaPerCm()[j]
                                : c.muspPerCm()[j])
                        / p.point().tolerancePerCm();
                sum += p.point().weight() * effect * effect;
            }
            shares.add(new Share(c.name(), sum));
            total += sum;
        }
        if (!(total > 0)) return;
        shares.sort(Comparator.comparingDouble(Share::share).reversed());
        out.println();
        out.println("What could move it");
        TextTable table = new TextTable("  ", "lrl");
        for (Share s : shares) {
            double percent = 100 * s.share() / total;
            if (percent < 1) break;
            table.row(s.name(), Math.round(percent) + " %", "▇".repeat((int) Math.round(percent / 5)));
        }
        table.print(out);
    }

    /** For each weighing the move of the target that it moves most; then the figure that is worth knowing better. */
    private void slips() {
        out.println();
        out.println("What a slip does, in half-widths of the target it moves most");
        TextTable table = new TextTable("  ", "lrrl");
        table.row("", "1 % more", "1 mg more", "");
        boolean rest = false;
        for (Sensitivity s :
                Sensitivity.of(answer.recipe(), balance, answer.brief().points())) {
            Weighing w = s.weighing();
            Sensitivity.Effect worst = s.effects().stream()
                    .max(Comparator.comparingDouble(e -> Math.abs(e.perPercentMiss())))
                    .orElseThrow();
            if (Math.abs(worst.perPercentMiss()) < SLIGHT && Math.abs(worst.perMgMiss()) < SLIGHT) {
                rest = true;
                continue;
            }
            table.row(
                    w.label() + w.into().map(stock -> " in " + stock).orElse(""),
                    signed(worst.perPercentMiss()),
                    signed(worst.perMgMiss()),
                    worst.point().quantity().sign() + " "
                            + Figures.plain(worst.point().wavelengthNm()));
        }
        if (rest) table.row("all else", "<" + Figures.fixed(SLIGHT, 2), "<" + Figures.fixed(SLIGHT, 2), "");
        table.print(out);
        BetterKnown.of(answer.brief(), answer.recipe(), Answering.DRAWS)
                .ifPresent(b -> wrapped("Worth knowing better: with half the uncertainty of " + b.what() + " it lands "
                                + times(b.then()) + " in 100 instead of " + times(b.chance()) + ".")
                        .forEach(line -> out.println("  " + line)));
    }

    /** Two decimals and a sign; what rounds to nothing as a dash. */
    private static String signed(double miss) {
        String digits = Figures.fixed(Math.abs(miss), 2);
        return digits.equals("0.00") ? "–" : (miss < 0 ? "−" : "+") + digits;
    }

    private void alternatives() {
        if (answer.alternatives().isEmpty()) return;
        out.println();
        out.println("Other ways");
        TextTable table = new TextTable("  ", "lrrl");
        for (Answer.Alternative a : answer.alternatives()) {
            Set<String> what = new LinkedHashSet<>();
            a.recipe().items().forEach(i -> what.add(i.label()));
            String lands = a.worstMiss() > 1
                    ? "worst miss " + Figures.significant(a.worstMiss(), 3)
                    : times(a.chance()) + " in 100";
            table.row(a.why(), lands, a.weighings() + " weighings", String.join(", ", what));
        }
        table.print(out);
    }

    private void section(String title, List<String> sentences) {
        if (sentences.isEmpty()) return;
        out.println();
        out.println(title);
        for (String s : sentences) for (String line : wrapped(s)) out.println("  " + line);
    }

    private List<String> mind(List<Warning> warnings) {
        List<String> sentences = new ArrayList<>(answer.notes());
        warnings.forEach(w -> sentences.add(w.text()));
        return sentences;
    }

    static List<String> wrapped(String sentence) {
        List<String> lines = new ArrayList<>();
        StringBuilder line = new StringBuilder("- ");
        for (String word : sentence.split(" ")) {
            if (line.length() + word.length() > 96) {
                lines.add(line.toString().stripTrailing());
                line = new StringBuilder("  ");
            }
            line.append(word).append(' ');
        }
        lines.add(line.toString().stripTrailing());
        return lines;
    }

    private String grams(double g) {
        return Figures.fixed(g, balance.decimals()) + " g";
    }
}
