package org.hazewright.sheet;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.time.LocalDate;
import java.util.Comparator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import org.apache.poi.xssf.usermodel.XSSFFormulaEvaluator;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.bench.Answer.Predicted;
import org.hazewright.bench.SeriesPlan;
import org.hazewright.bench.SeriesPlan.Phantom;
import org.hazewright.bench.Warnings;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Mould;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Figures;
import org.hazewright.picture.Palette;
import org.hazewright.shelf.Ingredient;

/**
 * The workbook of a set of phantoms: a page with stocks, totals and cautions; one weighing table for the balance; where each
 * phantom lands; the order of work; the sources. Sums are live formulas. Equal input gives equal bytes.
 */
public final class SeriesSheet {
    /** Most columns of the weighing table that stand on an upright page. */
    private static final int UPRIGHT = 4;

    private final SeriesPlan plan;
    private final LocalDate day;
    private final Recipe fullest;

    private SeriesSheet(SeriesPlan plan, LocalDate day) {
        this.plan = plan;
        this.day = day;
        this.fullest = plan.phantoms().stream()
                .map(Phantom::recipe)
                .max(Comparator.comparingInt(r -> r.items().size()))
                .orElseThrow();
    }

    /** The workbook as bytes (Office Open XML, .xlsx); {@code day} is the day of making, for the dates of lots. */
    public static byte[] write(SeriesPlan plan, LocalDate day) {
        return new SeriesSheet(plan, day).bytes();
    }

    private byte[] bytes() {
        try (XSSFWorkbook workbook = new XSSFWorkbook()) {
            Looks looks = new Looks(workbook);
            set(new Page(workbook.createSheet("Set"), looks));
            weigh(new Page(workbook.createSheet("Weigh"), looks));
            lands(new Page(workbook.createSheet("Lands"), looks));
            steps(new Page(workbook.createSheet("Steps"), looks));
            Page sources = new Page(workbook.createSheet("Sources"), looks);
            SourcesPage.write(sources, plan.base(), ingredients());
            XSSFFormulaEvaluator.evaluateAllFormulaCells(workbook);
            return FixedBytes.of(workbook, plan.series().title());
        } catch (IOException e) {
            throw new UncheckedIOException("The workbook could not be closed.", e);
        }
    }

    private Set<Ingredient> ingredients() {
        return new LinkedHashSet<>(plan.buyG().keySet());
    }

    private String summary() {
        Brief first = plan.phantoms().get(0).brief();
        return plan.base().name() + ", " + plan.phantoms().size() + " phantoms of "
                + Figures.significant(first.volumeMl(), 5) + " mL each"
                + (first.moulds().isEmpty() ? "" : " for " + Mould.words(first.moulds())) + ", at "
                + Figures.plain(first.temperatureC()) + " °C"
                + first.sha256().map(sha -> " · brief " + sha.substring(0, 12)).orElse("");
    }

    private void set(Page page) {
        page.columns(126, 210, 84, 150, 84, 70, 70);
        SetPage set = new SetPage(page, 6, plan.balance());
        long inside = plan.phantoms().stream().filter(Phantom::meets).count();
        set.heading(
                plan.series().title(),
                summary(),
                "On average " + Figures.fixed(plan.expectedToLand(), 1) + " of "
                        + plan.phantoms().size() + " phantoms land inside every tolerance"
                        + (plan.meets() ? "." : "; " + (plan.phantoms().size() - inside) + " miss by plan.")
                        + (plan.proven() ? "" : " The search was stopped: not proven."),
                plan.meets());
        set.stocks(plan.stocks(), plan.leftovers());
        set.atHand(plan.buyG());
        Set<Ingredient> all = new LinkedHashSet<>();
        all.add(plan.base());
        all.addAll(ingredients());
        set.mind(plan.notes(), Warnings.of(fullest, day), all);
        set.print(false);
    }

    private void weigh(Page page) {
        List<String> columns = plan.columns();
        int together = columns.size() + 1;
        int done = together + 1;
        int[] widths = new int[done + 2];
        java.util.Arrays.fill(widths, columns.size() > UPRIGHT ? 112 : 100);
        widths[0] = 84;
        widths[done] = 52;
        widths[done + 1] = columns.size() > UPRIGHT ? 160 : 110;
        page.columns(widths);
        page.text(0, 0, "Weigh", Face.TITLE);
        page.height(0, 24);
        page.sentence(
                1,
                0,
                done + 1,
                plan.series().title()
                        + " · grams, each row one phantom, from left to right; nothing where there is a dash",
                Face.QUIET);
        page.text(2, 0, "phantom", Face.HEAD);
        for (int c = 0; c < columns.size(); c++)
            page.text(2, c + 1, columns.get(c), Face.HEAD.right().wrap());
        page.text(2, together, "together", Face.HEAD.right());
        page.text(2, done, "done", Face.HEAD.centred());
        page.text(2, done + 1, "remarks", Face.HEAD.indent());
        page.height(2, 15);
        Face grams = SetPage.LINE.decimals(plan.balance().decimals()).points(11).right();
        int row = 3;
        for (Phantom p : plan.phantoms()) {
            page.text(row, 0, p.name(), SetPage.LINE.points(11).bolder());
            for (int c = 0; c < columns.size(); c++) {
                double g = p.massG(columns.get(c));
                if (g > 0) page.number(row, c + 1, g, grams.bolder());
                else page.text(row, c + 1, "–", grams.ink(Palette.QUIET));
            }
            page.formula(row, together, sum(row, 1, row, columns.size()), grams.ink(Palette.QUIET));
            page.cell(row, done, SetPage.LINE.centred().fillIn());
            page.cell(row, done + 1, SetPage.LINE.indent().fillIn());
            page.height(row++, 17);
        }
        page.text(row, 0, "all", SetPage.LINE.ink(Palette.QUIET));
        for (int c = 1; c <= together; c++) page.formula(row, c, sum(3, c, row - 1, c), grams.ink(Palette.QUIET));
        page.height(row, 17);
        page.sheet.createFreezePane(1, 3);
        page.sheet.getWorkbook().setPrintArea(page.sheet.getWorkbook().getSheetIndex(page.sheet), 0, done + 1, 0, row);
        PrintSetup.pages(page.sheet, columns.size() > UPRIGHT, 2);
    }

    private static String sum(int row1, int column1, int row2, int column2) {
        return "SUM(" + new org.apache.poi.ss.util.CellReference(row1, column1).formatAsString() + ":"
                + new org.apache.poi.ss.util.CellReference(row2, column2).formatAsString() + ")";
    }

    private void lands(Page page) {
        page.columns(84, 56, 44, 76, 84, 84, 76, 64, 140, 110);
        page.text(0, 0, "Lands", Face.TITLE);
        page.height(0, 24);
        page.sentence(
                1,
                0,
                9,
                plan.series().title() + " · coefficients in 1/cm; miss in half-widths of the tolerance, −1 [ ] +1",
                Face.QUIET);
        String[] heads = {"phantom", "nm", "", "wanted", "± tolerance", "predicted", "± u", "miss", "", "lands"};
        for (int c = 0; c < heads.length; c++)
            page.text(2, c, heads[c], c == 0 ? Face.HEAD : c == 2 || c == 9 ? Face.HEAD.indent() : Face.HEAD.right());
        int row = 3;
        for (Phantom p : plan.phantoms()) {
            boolean first = true;
            for (Predicted x : p.outlook().predicted()) {
                String format = Face.numberFormat(Sentences.decimals(x));
                Face figure = SetPage.LINE.format(format).right();
                page.text(row, 0, first ? p.name() : "", SetPage.LINE.bolder());
                page.number(row, 1, x.point().wavelengthNm(), SetPage.LINE.right());
                page.text(row, 2, x.point().quantity().sign(), SetPage.LINE.indent());
                page.number(row, 3, x.point().wantedPerCm(), figure.ink(Palette.AMBER_TYPE));
                page.number(
                        row,
                        4,
                        x.point().tolerancePerCm(),
                        figure.format("± " + format).ink(Palette.AMBER_TYPE));
                page.number(row, 5, x.perCm(), figure.bolder().ink(Palette.TEAL));
                page.number(row, 6, x.uPerCm(), figure.format("± " + format).ink(Palette.QUIET));
                page.number(row, 7, x.miss(), figure.format("+0.00;−0.00;0.00"));
                page.rich(row, 8, LandingGauge.drawn(x.miss(), 8, page.looks), SetPage.LINE.centred());
                String lands = first ? often(p.outlook().chance()) : "";
                page.text(
                        row,
                        9,
                        x.inside() ? lands : "OUTSIDE",
                        x.inside()
                                ? SetPage.LINE.ink(Palette.TEAL).indent()
                                : SetPage.LINE.bolder().ink(Palette.BRICK).indent());
                page.height(row++, 14);
                first = false;
            }
        }
        page.sheet.createFreezePane(1, 3);
        page.sheet.getWorkbook().setPrintArea(page.sheet.getWorkbook().getSheetIndex(page.sheet), 0, 9, 0, row - 1);
        PrintSetup.pages(page.sheet, false, 2);
    }

    /** Never 100 for what is not certain. */
    private static String often(double chance) {
        long times = Math.round(100 * chance);
        return (times == 100 && chance < 1 ? "more than 99" : Long.toString(times)) + " in 100";
    }

    private void steps(Page page) {
        StepsPage steps = new StepsPage(page, plan.balance(), List.of());
        steps.heading("Steps", plan.series().title() + " · first the stocks, then each phantom in turn");
        if (!plan.stocks().isEmpty()) {
            steps.part("Once for all");
            steps.steps(SetSteps.stocks(fullest, plan.stocks(), plan.balance()));
        }
        steps.part("For each phantom, with its row of the page Weigh");
        steps.steps(SetSteps.phantom(fullest, plan.balance()));
        steps.print();
    }
}
