package org.hazewright.sheet;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.apache.poi.xssf.usermodel.XSSFFormulaEvaluator;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.bench.Answer.Predicted;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Step;
import org.hazewright.bench.TitrationPlan;
import org.hazewright.bench.Warnings;
import org.hazewright.optics.Figures;
import org.hazewright.picture.Palette;
import org.hazewright.shelf.Ingredient;

/**
 * The workbook of a titration: bath and titrant, one line a step with a place for what was really added, the order of work, the
 * sources. Equal input gives equal bytes.
 */
public final class TitrationSheet {
    private static final int LAST = 10;

    private final TitrationPlan plan;
    private final LocalDate day;

    private TitrationSheet(TitrationPlan plan, LocalDate day) {
        this.plan = plan;
        this.day = day;
    }

    /** The workbook as bytes (Office Open XML, .xlsx); {@code day} is the day of making, for the dates of lots. */
    public static byte[] write(TitrationPlan plan, LocalDate day) {
        return new TitrationSheet(plan, day).bytes();
    }

    private byte[] bytes() {
        try (XSSFWorkbook workbook = new XSSFWorkbook()) {
            Looks looks = new Looks(workbook);
            mixtures(new Page(workbook.createSheet("Mix"), looks));
            additions(new Page(workbook.createSheet("Add"), looks));
            steps(new Page(workbook.createSheet("Steps"), looks));
            SourcesPage.write(
                    new Page(workbook.createSheet("Sources"), looks),
                    plan.base(),
                    plan.buyG().keySet());
            XSSFFormulaEvaluator.evaluateAllFormulaCells(workbook);
            return FixedBytes.of(workbook, plan.series().title());
        } catch (IOException e) {
            throw new UncheckedIOException("The workbook could not be closed.", e);
        }
    }

    private void mixtures(Page page) {
        page.columns(126, 210, 84, 150, 84, 70, 70);
        SetPage mix = new SetPage(page, 6, plan.balance());
        long inside = plan.steps().stream().filter(TitrationPlan.Step::meets).count();
        mix.heading(
                plan.series().title(),
                plan.base().name() + ", " + plan.steps().size() + " phantoms in one vessel that holds "
                        + Grams.plain(plan.vesselMl()) + " mL and room to stir, at "
                        + Figures.plain(plan.start().temperatureC()) + " °C",
                "By plan " + inside + " of " + plan.steps().size()
                        + " steps lie inside every tolerance; all together land "
                        + Figures.fixed(100 * plan.chanceOfAll(), 0) + " times in 100."
                        + (plan.proven() ? "" : " The search was stopped: not proven."),
                plan.meets());
        mix.stocks(plan.stocks(), plan.leftovers());
        mix.mixture("Bath: the phantom " + plan.steps().get(0).name(), plan.start());
        mix.mixture(
                "Titrant, of which " + Grams.shown(plan.titrantUsedG(), plan.balance()) + " are used", plan.titrant());
        mix.atHand(plan.buyG());
        Set<Ingredient> all = new LinkedHashSet<>();
        all.add(plan.base());
        all.addAll(plan.buyG().keySet());
        mix.mind(plan.notes(), Warnings.of(plan.titrant(), day), all);
        mix.print(false);
    }

    private void additions(Page page) {
        List<Predicted> points = plan.steps().get(0).predicted();
        int[] widths = new int[LAST + 3 * points.size()];
        java.util.Arrays.fill(widths, 74);
        widths[0] = 70;
        page.columns(widths);
        page.text(0, 0, "Add", Face.TITLE);
        page.height(0, 24);
        int last = widths.length - 1;
        page.sentence(
                1,
                0,
                last,
                plan.series().title()
                        + " · each row: take out, give back, add, stir, measure. Coefficients in 1/cm: wanted, predicted, ± u",
                Face.QUIET);
        String[] heads = {
            "phantom",
            "take out mL",
            "water back g",
            "add titrant g",
            "really added g",
            "in vessel g",
            "mL",
            "worst miss",
            "lands, in 100",
            "done"
        };
        for (int c = 0; c < heads.length; c++)
            page.text(2, c, heads[c], c == 0 ? Face.HEAD : Face.HEAD.right().wrap());
        for (int j = 0; j < points.size(); j++) {
            String what = points.get(j).point().quantity().sign() + " "
                    + Figures.plain(points.get(j).point().wavelengthNm());
            page.text(2, LAST + 3 * j, what, Face.HEAD.right());
            page.text(2, LAST + 3 * j + 1, "predicted", Face.HEAD.right());
            page.text(2, LAST + 3 * j + 2, "± u", Face.HEAD.right());
        }
        page.height(2, 26);
        Face grams = SetPage.LINE.decimals(plan.balance().decimals()).right();
        int row = 3;
        for (TitrationPlan.Step s : plan.steps()) {
            page.text(row, 0, s.name(), SetPage.LINE.points(11).bolder());
            amount(page, row, 1, s.takenOutMl(), SetPage.LINE.format("General").right());
            amount(page, row, 2, s.waterBackG(), grams);
            amount(page, row, 3, s.addG(), grams.points(11).bolder());
            page.cell(row, 4, grams.fillIn());
            page.number(row, 5, s.contentG(), SetPage.LINE.decimals(1).right());
            page.number(row, 6, s.contentMl(), SetPage.LINE.decimals(1).right());
            page.text(
                    row,
                    7,
                    Figures.fixed(s.worstMiss(), 2) + (s.meets() ? "" : " OUTSIDE"),
                    s.meets()
                            ? SetPage.LINE.right()
                            : SetPage.LINE.bolder().ink(Palette.BRICK).right());
            page.text(row, 8, Figures.fixed(100 * s.chance(), 0), SetPage.LINE.right());
            page.cell(row, 9, SetPage.LINE.fillIn());
            for (int j = 0; j < points.size() && j < s.predicted().size(); j++) {
                Predicted p = s.predicted().get(j);
                String format = Face.numberFormat(Sentences.decimals(p));
                Face figure = SetPage.LINE.format(format).right();
                page.number(row, LAST + 3 * j, p.point().wantedPerCm(), figure.ink(Palette.AMBER_TYPE));
                page.number(row, LAST + 3 * j + 1, p.perCm(), figure.bolder().ink(Palette.TEAL));
                page.number(
                        row,
                        LAST + 3 * j + 2,
                        p.uPerCm(),
                        figure.format("± " + format).ink(Palette.QUIET));
            }
            page.height(row++, 18);
        }
        page.sheet.createFreezePane(1, 3);
        page.sheet.getWorkbook().setPrintArea(page.sheet.getWorkbook().getSheetIndex(page.sheet), 0, last, 0, row - 1);
        PrintSetup.pages(page.sheet, true, 2);
    }

    private static void amount(Page page, int row, int column, double value, Face face) {
        if (value > 0) page.number(row, column, value, face);
        else page.text(row, column, "–", face.ink(Palette.QUIET));
    }

    private void steps(Page page) {
        StepsPage steps = new StepsPage(page, plan.balance(), List.of());
        steps.heading("Steps", plan.series().title() + " · first stocks, bath and titrant, then the additions");
        if (!plan.stocks().isEmpty()) {
            steps.part("Stocks");
            steps.steps(SetSteps.stocks(plan.titrant(), plan.stocks(), plan.balance()));
        }
        steps.part("Bath");
        steps.steps(SetSteps.madeStocks(plan.start(), plan.balance()));
        steps.part("Titrant, in a bottle of its own");
        steps.steps(SetSteps.madeStocks(plan.titrant(), plan.balance()));
        steps.part("For each row of the page Add");
        steps.steps(additionSteps());
        steps.print();
    }

    private List<Step> additionSteps() {
        TitrationPlan.Step any = plan.steps().get(plan.steps().size() - 1);
        List<String> texts = new ArrayList<>();
        texts.add("Measure the phantom that is in the vessel before going on to the next row.");
        if (any.takenOutMl() > 0)
            texts.add("Stir, and take out " + Grams.plain(any.takenOutMl())
                    + " mL; keep it closed and labelled with the name of the phantom.");
        if (any.waterBackG() > 0)
            texts.add(
                    "Give back what evaporated: the grams of the column water back. If the vessel can be weighed, give back what"
                            + " it really lost.");
        texts.add(
                "Shake the titrant, weigh its bottle, pour or pipette the grams of the column add titrant into the vessel while it"
                        + " is stirred, weigh the bottle again, and write what was really added into the box.");
        texts.add("Stir until it is even: at least five minutes, without drawing in air (common practice).");
        return texts.stream()
                .map(t -> new Step(
                        Step.Stage.ADD,
                        t,
                        Optional.empty(),
                        List.of(),
                        Optional.empty(),
                        OptionalDouble.empty(),
                        OptionalDouble.empty(),
                        OptionalDouble.empty(),
                        List.of(),
                        List.of()))
                .toList();
    }
}
