package org.hazewright.cli;

import java.io.PrintWriter;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.hazewright.bench.Answer;
import org.hazewright.bench.TitrationPlan;
import org.hazewright.bench.Warning;
import org.hazewright.bench.Warnings;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Figures;

/** A titration as text: stocks, bath, titrant, and one line a step. */
final class TitrationText {
    private final TitrationPlan plan;
    private final Shared.Units units;
    private final PrintWriter out;
    private final Balance balance;

    TitrationText(TitrationPlan plan, Shared.Units units, PrintWriter out) {
        this.plan = plan;
        this.units = units;
        this.out = out;
        this.balance = plan.balance();
    }

    void print(LocalDate day) {
        out.println(plan.series().title());
        out.println(plan.base().name() + ", " + plan.steps().size() + " phantoms in one vessel of at least "
                + Figures.significant(plan.vesselMl(), 4) + " mL and room to stir, at "
                + Figures.plain(plan.start().temperatureC()) + " °C");
        out.println();
        long inside = plan.steps().stream().filter(TitrationPlan.Step::meets).count();
        out.println(
                inside == plan.steps().size()
                        ? "By plan every step lies inside every tolerance; all of them together land "
                                + DesignText.times(plan.chanceOfAll()) + " in 100."
                        : "By plan " + inside + " of " + plan.steps().size() + " steps lie inside every tolerance.");
        SeriesText.stocks(out, plan.stocks(), plan.leftovers(), balance);
        recipe("Mix the bath, " + plan.steps().get(0).name(), plan.start());
        recipe(
                "Mix the titrant, of which " + SeriesText.grams(plan.titrantUsedG(), balance) + " are used",
                plan.titrant());
        steps();
        SeriesText.buy(out, plan.buyG(), balance);
        List<String> mind = new ArrayList<>(plan.notes());
        Warnings.of(plan.titrant(), day).stream().map(Warning::text).forEach(mind::add);
        SeriesText.section(out, "Mind", mind);
        if (!plan.proven()) {
            out.println();
            out.println("The search was stopped: this is the best so far, not proven.");
        }
    }

    private void recipe(String title, Recipe recipe) {
        out.println();
        out.println(title);
        TextTable table = new TextTable("  ", "rlr");
        int n = 0;
        double sum = 0;
        for (Item i : recipe.items()) {
            table.row(Integer.toString(++n), i.label(), SeriesText.grams(i.massG(), balance));
            sum += i.massG();
        }
        table.row("", "together", SeriesText.grams(sum, balance));
        table.print(out);
    }

    private void steps() {
        out.println();
        out.println("Step by step, coefficients in " + units.sign() + ": predicted (wanted) ± u");
        boolean aliquots = plan.steps().stream().anyMatch(s -> s.takenOutMl() > 0);
        boolean water = plan.steps().stream().anyMatch(s -> s.waterBackG() > 0);
        List<Answer.Predicted> points = plan.steps().get(0).predicted();
        List<String> head = new ArrayList<>(List.of("phantom"));
        if (aliquots) head.add("take out mL");
        if (water) head.add("water back g");
        head.addAll(List.of("add titrant g", "in vessel g", "mL"));
        points.forEach(p -> head.add(
                p.point().quantity().sign() + " " + Figures.plain(p.point().wavelengthNm())));
        head.addAll(List.of("worst miss", "lands"));
        TextTable table = new TextTable("  ", "l" + "r".repeat(head.size() - 1));
        table.row(head.toArray(String[]::new));
        for (TitrationPlan.Step s : plan.steps()) {
            List<String> cells = new ArrayList<>(List.of(s.name()));
            if (aliquots) cells.add(s.takenOutMl() == 0 ? "–" : Figures.plain(s.takenOutMl()));
            if (water) cells.add(s.waterBackG() == 0 ? "–" : Figures.fixed(s.waterBackG(), balance.decimals()));
            cells.add(s.addG() == 0 ? "–" : Figures.fixed(s.addG(), balance.decimals()));
            cells.add(Figures.fixed(s.contentG(), 1));
            cells.add(Figures.fixed(s.contentMl(), 1));
            for (Answer.Predicted p : points) cells.add(figures(s, p));
            cells.add(Figures.fixed(s.worstMiss(), 2) + (s.meets() ? "" : " OUTSIDE"));
            cells.add(DesignText.times(s.chance()) + " in 100");
            table.row(cells.toArray(String[]::new));
        }
        table.print(out);
    }

    private String figures(TitrationPlan.Step step, Answer.Predicted column) {
        for (Answer.Predicted p : step.predicted()) {
            if (p.point().quantity() != column.point().quantity()
                    || p.point().wavelengthNm() != column.point().wavelengthNm()) continue;
            int decimals = Figures.decimalsFor(units.of(p.uPerCm()));
            return Figures.fixed(units.of(p.perCm()), decimals) + " ("
                    + Figures.fixed(units.of(p.point().wantedPerCm()), decimals) + ") ± "
                    + Figures.fixed(units.of(p.uPerCm()), decimals);
        }
        return "–";
    }

    /** The JSON document of {@code series --json} for a titration; coefficients in 1/cm. */
    static Json json(TitrationPlan plan) {
        List<Map<String, Object>> steps = new ArrayList<>();
        for (TitrationPlan.Step s : plan.steps()) {
            List<Map<String, Object>> predicted = new ArrayList<>();
            for (Answer.Predicted p : s.predicted())
                predicted.add(Json.object()
                        .with("wavelength_nm", p.point().wavelengthNm())
                        .with(
                                "quantity",
                                p.point().quantity() == org.hazewright.brief.Point.Quantity.MUA ? "mua" : "musp")
                        .with("per_cm", p.perCm())
                        .with("u_per_cm", p.uPerCm())
                        .with("miss", p.miss())
                        .fields());
            steps.add(Json.object()
                    .with("name", s.name())
                    .with("status", s.meets() ? "meets" : "misses")
                    .with("take_out_ml", s.takenOutMl())
                    .with("water_back_g", s.waterBackG())
                    .with("add_titrant_g", s.addG())
                    .with("content_g", s.contentG())
                    .with("content_ml", s.contentMl())
                    .with("chance_within_tolerance", s.chance())
                    .with("predicted", predicted)
                    .fields());
        }
        return Json.object()
                .with("format", 1)
                .with("status", plan.meets() ? "meets" : "misses")
                .with("title", plan.series().title())
                .with("base", plan.base().id())
                .with("vessel_ml", plan.vesselMl())
                .with("chance_all_within_tolerance", plan.chanceOfAll())
                .with("stocks", DesignJson.stocks(plan.stocks()))
                .with("bath", DesignJson.items(plan.start()))
                .with("titrant", DesignJson.items(plan.titrant()))
                .with("buy", SeriesJson.buy(plan.buyG()))
                .with("steps", steps)
                .with("notes", plan.notes())
                .with("proven", plan.proven());
    }
}
