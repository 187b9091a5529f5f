package org.hazewright.cli;

import java.io.PrintWriter;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Leftover;
import org.hazewright.bench.SeriesPlan;
import org.hazewright.bench.SeriesPlan.Phantom;
import org.hazewright.bench.Warning;
import org.hazewright.bench.Warnings;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Mould;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;

/** A set of phantoms as text: stocks, one weighing table, where each phantom lands, what to buy. */
final class SeriesText {
    /** Targets that still fit side by side. */
    private static final int MOST_COLUMNS = 4;

    private final SeriesPlan plan;
    private final Shared.Units units;
    private final PrintWriter out;
    private final Balance balance;

    SeriesText(SeriesPlan plan, Shared.Units units, PrintWriter out) {
        this.plan = plan;
        this.units = units;
        this.out = out;
        this.balance = plan.balance();
    }

    void print(LocalDate day) {
        Brief first = plan.phantoms().get(0).brief();
        out.println(plan.series().title());
        out.println(plan.base().name() + ", " + plan.phantoms().size() + " phantoms of "
                + Figures.significant(first.volumeMl(), 5) + " mL each"
                + (first.overage() > 0 ? " (" + Figures.plain(100 * first.overage()) + " % to spare)" : "")
                + (first.moulds().isEmpty() ? "" : " for " + Mould.words(first.moulds())) + ", at "
                + Figures.plain(first.temperatureC()) + " °C");
        out.println();
        out.println(verdict(plan));
        stocks(out, plan.stocks(), plan.leftovers(), balance);
        table();
        targets();
        buy(out, plan.buyG(), balance);
        List<String> mind = new ArrayList<>(plan.notes());
        Warnings.of(fullest(plan), day).stream().map(Warning::text).forEach(mind::add);
        section(out, "Mind", mind);
        if (!plan.proven()) {
            out.println();
            out.println("The search was stopped: this is the best so far, not proven.");
        }
    }

    /** The recipe that takes from most bottles: what holds for it holds for all. */
    static Recipe fullest(SeriesPlan plan) {
        return plan.phantoms().stream()
                .map(Phantom::recipe)
                .max(Comparator.comparingInt(r -> r.items().size()))
                .orElseThrow();
    }

    /** The one sentence that matters. */
    static String verdict(SeriesPlan plan) {
        long all = plan.phantoms().size();
        long planned = plan.phantoms().stream().filter(Phantom::meets).count();
        String made = "On average " + Figures.fixed(plan.expectedToLand(), 1) + " of " + all
                + " phantoms land inside every tolerance";
        return planned == all ? made + "." : made + "; " + (all - planned) + " miss by plan.";
    }

    static void stocks(PrintWriter out, List<Stock> stocks, List<Leftover> left, Balance balance) {
        if (stocks.isEmpty()) return;
        out.println();
        out.println("Make first, once for all");
        TextTable table = new TextTable("  ", "lrlrlr");
        for (int k = 0; k < stocks.size(); k++) {
            Stock s = stocks.get(k);
            table.row(
                    s.id(),
                    grams(s.ingredientG(), balance),
                    s.from().orElse(s.ingredient().id()),
                    "+ " + grams(s.diluentG(), balance),
                    s.diluent().id(),
                    grams(left.get(k).leftG(), balance) + " left over");
        }
        table.print(out);
    }

    private void table() {
        out.println();
        out.println("Weigh, in this order from left to right, in g");
        List<String> columns = plan.columns();
        TextTable table = new TextTable("  ", "l" + "r".repeat(columns.size() + 1));
        List<String> head = new ArrayList<>(List.of("phantom"));
        head.addAll(columns);
        head.add("together");
        table.row(head.toArray(String[]::new));
        for (Phantom p : plan.phantoms())
            row(table, p.name(), columns.stream().map(p::massG).toList());
        row(table, "all", columns.stream().map(plan::sumG).toList());
        table.print(out);
    }

    private void row(TextTable table, String name, List<Double> massesG) {
        List<String> cells = new ArrayList<>(List.of(name));
        double sum = 0;
        for (double g : massesG) {
            cells.add(g == 0 ? "–" : Figures.fixed(g, balance.decimals()));
            sum += g;
        }
        cells.add(Figures.fixed(sum, balance.decimals()));
        table.row(cells.toArray(String[]::new));
    }

    private void targets() {
        out.println();
        boolean narrow = plan.phantoms().stream()
                        .allMatch(p -> points(p).equals(points(plan.phantoms().get(0))))
                && points(plan.phantoms().get(0)).size() <= MOST_COLUMNS;
        out.println("Where they land, " + units.sign() + (narrow ? ": predicted (wanted) ± u" : ""));
        List<String> heads = narrow ? points(plan.phantoms().get(0)) : List.of();
        TextTable table = new TextTable("  ", "l" + "r".repeat(heads.size()) + "lrl");
        List<String> head = new ArrayList<>(List.of("phantom"));
        head.addAll(heads);
        head.addAll(List.of("worst miss", "", "lands"));
        table.row(head.toArray(String[]::new));
        for (Phantom p : plan.phantoms()) {
            List<String> cells = new ArrayList<>(List.of(p.name()));
            if (narrow) p.outlook().predicted().forEach(x -> cells.add(figures(x)));
            Answer.Predicted worst = worst(p);
            cells.add(LandingGauge.of(worst.miss()));
            cells.add((worst.miss() < 0 ? "−" : "+") + Figures.fixed(Math.abs(worst.miss()), 2));
            cells.add(DesignText.times(p.outlook().chance()) + " in 100"
                    + (narrow
                            ? ""
                            : ", " + worst.point().quantity().sign() + " "
                                    + Figures.plain(worst.point().wavelengthNm()))
                    + (p.meets() ? "" : "  OUTSIDE"));
            table.row(cells.toArray(String[]::new));
        }
        table.print(out);
    }

    static Answer.Predicted worst(Phantom p) {
        return p.outlook().predicted().stream()
                .max(Comparator.comparingDouble(x -> Math.abs(x.miss())))
                .orElseThrow();
    }

    private static List<String> points(Phantom p) {
        return p.outlook().predicted().stream()
                .map(x -> x.point().quantity().sign() + " "
                        + Figures.plain(x.point().wavelengthNm()))
                .toList();
    }

    private String figures(Answer.Predicted x) {
        double u = units.of(x.uPerCm());
        int decimals = Math.max(
                Figures.decimalsFor(u), Figures.decimalsFor(units.of(x.point().tolerancePerCm())));
        return Figures.fixed(units.of(x.perCm()), decimals) + " ("
                + Figures.fixed(units.of(x.point().wantedPerCm()), decimals) + ") ± " + Figures.fixed(u, decimals);
    }

    static void buy(PrintWriter out, Map<Ingredient, Double> buyG, Balance balance) {
        out.println();
        out.println("To have at hand, stocks included");
        TextTable table = new TextTable("  ", "lrrl");
        buyG.forEach((i, g) -> table.row(
                i.id(),
                grams(g, balance),
                i.form() == Form.LIQUID ? Figures.significant(g / i.densityGPerMl(), 4) + " mL" : "",
                i.name()));
        table.print(out);
    }

    static void section(PrintWriter out, String title, List<String> sentences) {
        if (sentences.isEmpty()) return;
        out.println();
        out.println(title);
        for (String s : sentences) for (String line : DesignText.wrapped(s)) out.println("  " + line);
    }

    static String grams(double g, Balance balance) {
        return Figures.fixed(g, balance.decimals()) + " g";
    }
}
