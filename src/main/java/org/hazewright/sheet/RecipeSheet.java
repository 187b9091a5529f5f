package org.hazewright.sheet;

import java.time.LocalDate;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.concurrent.CompletableFuture;
import java.util.function.Supplier;
import org.apache.poi.xssf.usermodel.XSSFFormulaEvaluator;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Step;
import org.hazewright.bench.Steps;
import org.hazewright.bench.Warning;
import org.hazewright.bench.Warnings;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Tissue;
import org.hazewright.mixture.Recipe;

/**
 * The workbook that goes with a recipe: one page to carry to the balance, a sheet to fill in there whose predictions are live
 * formulas, and behind them the coefficients, the steps, the sources and the spectra.
 *
 * <p>Equal input gives equal bytes. Any spreadsheet program computes the formulas without this one; they hold for the planned
 * crowding and host index. Texts from files stay texts: none can run as a formula.
 */
public final class RecipeSheet {
    private RecipeSheet() {}

    /**
     * The workbook as bytes (Office Open XML, .xlsx).
     *
     * @param steps the order of work, of {@code Steps}; may be empty
     * @param warnings what to know before starting, the gravest first, of {@code Warnings}; may be empty
     */
    public static byte[] write(Answer answer, List<Step> steps, List<Warning> warnings) {
        return write(answer, steps, warnings, null);
    }

    /** {@code readings} is asked when all other pages are written; null for a workbook without that page. */
    private static byte[] write(
            Answer answer, List<Step> steps, List<Warning> warnings, Supplier<InstrumentReadings> readings) {
        List<Sensitivity> bands = Sensitivity.of(
                answer.recipe(), answer.brief().balance(), answer.brief().points());
        List<Weighing> weighings = bands.stream().map(Sensitivity::weighing).toList();
        Set<String> inHand = stocksInHand(answer.recipe(), steps);
        Curves curves = Curves.of(answer);
        try (XSSFWorkbook workbook = new XSSFWorkbook()) {
            Looks looks = new Looks(workbook);
            Page recipe = page(workbook, "Recipe", looks);
            Page fillIn = page(workbook, "Fill in", looks);
            Page coefficients = page(workbook, "Coefficients", looks);
            Page stepList = page(workbook, "Steps", looks);
            Page sources = page(workbook, "Sources", looks);
            Page spectra = page(workbook, "Spectra", looks);
            Page instruments = readings == null ? null : page(workbook, "Readings", looks);
            Page record = page(workbook, "Format", looks);

            FillInPlan plan = FillInPlan.of(weighings, answer.predicted().size());
            FillInPage fillInPage = new FillInPage(fillIn, answer, bands, plan, inHand);
            CoefficientsPage coefficientsPage = new CoefficientsPage(
                    coefficients,
                    answer.recipe(),
                    answer.mixture(),
                    weighings,
                    answer.brief().wavelengthsNm());
            SpectraPage spectraPage = new SpectraPage(spectra, answer, curves);
            Names names = new Names(workbook);
            RecordPage.name(record, names);
            fillInPage.name(names);
            coefficientsPage.name(names);

            spectraPage.write();
            new RecipePage(recipe, answer, bands, warnings, inHand).write(spectraPage);
            fillInPage.write();
            coefficientsPage.write(fillIn, plan);
            StepsPage.write(stepList, answer, steps, weighings);
            SourcesPage.write(sources, answer);
            RecordPage.write(record, answer, bands);
            if (readings != null) new ReadingsPage(instruments, answer, readings.get()).write();
            workbook.setSheetHidden(workbook.getSheetIndex(record.sheet), true);
            for (Page formulasOnly : List.of(coefficients, record)) formulasOnly.sheet.enableLocking();

            XSSFFormulaEvaluator.evaluateAllFormulaCells(workbook);
            workbook.setForceFormulaRecalculation(true);
            return FixedBytes.of(workbook, answer.brief().title());
        } catch (java.io.IOException e) {
            throw new java.io.UncheckedIOException("The workbook could not be closed.", e);
        }
    }

    /** The workbook with the steps and warnings of its own recipe; {@code day} is the day of making, for the dates of lots. */
    public static byte[] write(Answer answer, LocalDate day) {
        List<Sensitivity> bands = Sensitivity.of(
                answer.recipe(), answer.brief().balance(), answer.brief().points());
        return write(
                answer, Steps.of(answer.recipe(), answer.brief().balance(), bands), Warnings.of(answer.recipe(), day));
    }

    /**
     * The same with a page of what instruments will show on the recipe; {@code tables} gives the haemoglobin spectra for oximeters.
     */
    public static byte[] write(Answer answer, LocalDate day, Supplier<Tissue.Spectra> tables) {
        CompletableFuture<InstrumentReadings> readings =
                CompletableFuture.supplyAsync(() -> InstrumentReadings.of(answer, tables));
        List<Sensitivity> bands = Sensitivity.of(
                answer.recipe(), answer.brief().balance(), answer.brief().points());
        return write(
                answer,
                Steps.of(answer.recipe(), answer.brief().balance(), bands),
                Warnings.of(answer.recipe(), day),
                readings::join);
    }

    /**
     * Loads the workbook library on a thread of its own while other work is done. Never needed; called at the start of a command
     * that will write a sheet, it takes most of the first sheet's time off the end.
     */
    public static void getReady() {
        Thread loader = new Thread(Readiness::load, "workbook library");
        loader.setDaemon(true);
        loader.start();
    }

    /** Stocks that no step makes, when there are steps. */
    private static Set<String> stocksInHand(Recipe recipe, List<Step> steps) {
        Set<String> inHand = new HashSet<>();
        if (steps.isEmpty()) return inHand;
        recipe.stocks().forEach(s -> inHand.add(s.id()));
        for (Step s : steps) s.weighing().flatMap(Weighing::into).ifPresent(inHand::remove);
        return inHand;
    }

    private static Page page(XSSFWorkbook workbook, String name, Looks looks) {
        XSSFSheet sheet = workbook.createSheet(name);
        return new Page(sheet, looks);
    }
}
