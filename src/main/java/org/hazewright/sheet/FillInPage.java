package org.hazewright.sheet;

import java.util.List;
import java.util.Set;
import org.apache.poi.ss.usermodel.DataValidation;
import org.apache.poi.ss.usermodel.DataValidationConstraint;
import org.apache.poi.ss.usermodel.DataValidationConstraint.OperatorType;
import org.apache.poi.ss.usermodel.DataValidationHelper;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.ss.util.CellRangeAddressList;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFConditionalFormattingRule;
import org.apache.poi.xssf.usermodel.XSSFSheetConditionalFormatting;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answer.Predicted;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point.Quantity;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Stock;
import org.hazewright.picture.Palette;

/**
 * The sheet to fill in at the balance: grams as weighed, lots, who and when. Its predictions are live: any spreadsheet program
 * computes them from the grams as weighed, and from the planned ones where none are filled in yet.
 */
final class FillInPage {
    private static final Face LINE = Face.TEXT.points(10).rule();
    private static final Face QUIET = Face.QUIET.rule();
    private static final int LAST = FillInPlan.NOTE;
    private static final int BATCH_ROW = 2;
    private static final int VERDICT_ROW = 4;

    private final Page page;
    private final Answer answer;
    private final List<Sensitivity> bands;
    private final FillInPlan plan;
    private final Set<String> stocksInHand;
    private final Balance balance;
    private final Face grams;

    FillInPage(Page page, Answer answer, List<Sensitivity> bands, FillInPlan plan, Set<String> stocksInHand) {
        this.page = page;
        this.answer = answer;
        this.bands = bands;
        this.plan = plan;
        this.stocksInHand = stocksInHand;
        this.balance = answer.brief().balance();
        this.grams = LINE.decimals(balance.decimals()).right();
    }

    /** Names the cells to fill in; before the formulas of this and other sheets are written. */
    void name(Names names) {
        int first = plan.weighingRows().get(0);
        int last = plan.weighingRows().get(plan.weighingRows().size() - 1);
        names.give(Names.BATCH, page.address(BATCH_ROW, 1));
        names.give(Names.OPERATOR, page.address(BATCH_ROW, 4));
        names.give(Names.DATE, page.address(BATCH_ROW, 8));
        names.give(Names.BALANCE, page.address(BATCH_ROW, 10));
        names.give(Names.PLANNED_G, page.address(first, FillInPlan.PLANNED, last, FillInPlan.PLANNED));
        names.give(Names.WEIGHED_G, page.address(first, FillInPlan.WEIGHED, last, FillInPlan.WEIGHED));
        names.give(Names.LANDED, page.address(plan.targetsRow() + 2, FillInPlan.WORD, plan.lastRow(), FillInPlan.WORD));
    }

    void write() {
        page.columns(46, 236, 100, 88, 96, 88, 88, 160, 104, 62, 212, 20);
        page.sheet.setColumnHidden(FillInPlan.KEY, true);
        heading();
        weighings();
        targets();
        validation();
        colours();
        page.sheet.createFreezePane(0, FillInPlan.TABLE + 1);
        page.sheet
                .getWorkbook()
                .setPrintArea(page.sheet.getWorkbook().getSheetIndex(page.sheet), 0, LAST, 0, plan.lastRow());
        PrintSetup.onePage(page.sheet, true);
        page.sheet.enableLocking();
        page.sheet.lockFormatColumns(false);
        page.sheet.lockFormatRows(false);
        page.sheet.lockSelectLockedCells(false);
    }

    private void heading() {
        page.text(0, 0, "At the balance", Face.TITLE);
        page.height(0, 24);
        page.text(1, 0, answer.brief().title() + " · " + Sentences.summary(answer), Face.QUIET);
        input(BATCH_ROW, 0, "batch", 1, Face.TEXT.points(10).left().fillIn().format("@"));
        input(BATCH_ROW, 3, "operator", 4, Face.TEXT.points(10).left().fillIn().format("@"));
        page.span(BATCH_ROW, 4, 5);
        input(BATCH_ROW, 7, "date", 8, Face.TEXT.points(10).left().fillIn().format("yyyy-mm-dd"));
        input(BATCH_ROW, 9, "balance", 10, Face.TEXT.points(10).left().fillIn().format("@"));
        page.height(BATCH_ROW, 19);
        page.height(3, 6);
        String count = "COUNTIF(" + Names.LANDED + ",\"OUTSIDE\")";
        int points = answer.predicted().size();
        page.formula(
                VERDICT_ROW,
                0,
                "IF(" + count
                        + "=0,\"With the grams so far every target lands inside its tolerance.\",\"With the grams so far \"&"
                        + count + "&\" of " + points + " targets land OUTSIDE.\")",
                Face.TEXT.points(12).bolder().ink(Palette.TEAL));
        page.height(VERDICT_ROW, 19);
        page.formula(
                VERDICT_ROW + 1,
                0,
                "COUNT(" + Names.WEIGHED_G + ")&\" of " + bands.size() + " weighings filled in; together \"&FIXED("
                        + Names.MASS_G + ",2,TRUE)&\" g, \"&FIXED(" + Names.VOLUME_ML
                        + ",2,TRUE)&\" mL. An empty cell counts as planned. More than one load: type = and the loads with"
                        + " + between.\"",
                Face.QUIET);
        String[] heads = {
            "no",
            "what",
            "from",
            "planned g",
            "as weighed g",
            "allowed from",
            "to",
            "as weighed is",
            "lot",
            "done",
            "note"
        };
        for (int c = 0; c < heads.length; c++) page.text(FillInPlan.TABLE, c, heads[c], headFace(c, c >= 3 && c <= 6));
    }

    private static Face headFace(int column, boolean figures) {
        if (column == FillInPlan.PLANNED && figures) return Face.HEAD.indent().right(); // clear of the box beside it
        if (figures) return Face.HEAD.right();
        return column == FillInPlan.NUMBER || column == FillInPlan.DONE ? Face.HEAD.centred() : Face.HEAD.indent();
    }

    private void input(int row, int labelColumn, String label, int column, Face face) {
        page.text(row, labelColumn, label, Face.QUIET.indent().right());
        page.text(row, column, "", face).setBlank();
    }

    private void weighings() {
        for (int k = 0; k < plan.headRows().size(); k++) {
            Stock s = answer.recipe().stocks().get(k);
            String what = s.id() + ", 1 in " + Grams.plain(s.ratio());
            head(
                    plan.headRows().get(k),
                    stocksInHand.contains(s.id())
                            ? "Stock " + what + ", is made already: fill in its grams if they were written down"
                            : "Make the stock " + what);
        }
        head(plan.vesselRow(), "Into the vessel");
        for (int n = 0; n < bands.size(); n++) weighing(n, plan.weighingRows().get(n));
    }

    private void head(int row, String text) {
        page.text(row, 0, text, Face.SECTION);
        page.height(row, 20);
    }

    private void weighing(int n, int row) {
        Sensitivity s = bands.get(n);
        Weighing w = s.weighing();
        page.number(row, FillInPlan.NUMBER, n + 1, QUIET.centred());
        String what =
                w.from().map(stock -> "stock " + stock).orElse(w.ingredient().name());
        page.text(row, FillInPlan.WHAT, what, LINE.wrap().indent());
        page.text(
                row,
                FillInPlan.FROM,
                w.from().isPresent() ? "stock" : lot(w).isEmpty() ? "bottle" : lot(w),
                QUIET.indent());
        page.number(row, FillInPlan.PLANNED, w.massG(), grams.bolder().indent().right());
        page.cell(row, FillInPlan.WEIGHED, grams.points(11).bolder().fillIn());
        page.number(row, FillInPlan.LOW, s.lowG(), grams);
        page.number(row, FillInPlan.HIGH, s.highG(), grams);
        page.formula(row, FillInPlan.WORD, word(row), LINE.indent());
        page.cell(row, FillInPlan.LOT, LINE.left().fillIn().format("@"));
        page.cell(row, FillInPlan.DONE, LINE.centred().fillIn().format("@"));
        String note = Sentences.note(answer, w);
        page.text(row, FillInPlan.NOTE, note, QUIET.wrap().indent());
        page.text(row, FillInPlan.KEY, RecordPage.key(w), Face.QUIET);
        page.height(row, 22);
        page.roomFor(row, what, LINE, FillInPlan.WHAT, FillInPlan.WHAT);
        page.roomFor(row, note, QUIET, FillInPlan.NOTE, FillInPlan.NOTE);
    }

    private String lot(Weighing w) {
        return switch (w.role()) {
            case ITEM -> {
                Item item = answer.recipe().items().get(w.place());
                yield Sentences.lot(item.lot());
            }
            case STOCK_SUBSTANCE ->
                Sentences.lot(answer.recipe().stocks().get(w.place()).lot());
            case STOCK_DILUENT -> "";
        };
    }

    private static String word(int row) {
        String weighed = cell(row, FillInPlan.WEIGHED);
        return "IF(ISBLANK(" + weighed + "),\"\",IF(ISNUMBER(" + weighed + "),IF(" + weighed
                + "<0,\"not a mass\",IF(" + weighed + "<" + cell(row, FillInPlan.LOW) + ",\"OUTSIDE, too little\",IF("
                + weighed + ">" + cell(row, FillInPlan.HIGH)
                + ",\"OUTSIDE, too much\",\"inside\"))),\"not a number\"))";
    }

    private void targets() {
        int row = plan.targetsRow();
        page.text(row, 0, "Where it lands with the grams so far, in 1/cm", Face.SECTION);
        page.height(row++, 20);
        String[] heads = {
            "nm",
            "",
            "wanted",
            "± tolerance",
            "as made",
            "as planned",
            "± u",
            "lands",
            "miss",
            "",
            "miss in half-widths, −1 [ ] +1"
        };
        for (int c = 0; c < heads.length; c++)
            page.text(row, c, heads[c], headFace(c, c == 0 || c >= 2 && c <= 6 || c == 8));
        row++;
        for (Predicted p : answer.predicted()) target(row++, p);
    }

    private void target(int row, Predicted p) {
        String format = Face.numberFormat(Sentences.decimals(p));
        Face figure = LINE.format(format).right();
        page.number(row, 0, p.point().wavelengthNm(), LINE.bolder().right());
        page.text(row, 1, p.point().quantity().sign(), LINE.indent());
        page.number(row, 2, p.point().wantedPerCm(), figure.ink(Palette.AMBER_TYPE));
        page.number(
                row, 3, p.point().tolerancePerCm(), figure.format("± " + format).ink(Palette.AMBER_TYPE));
        String kappa = p.point().quantity() == Quantity.MUA ? Names.KAPPA_MUA : Names.KAPPA_MUSP;
        page.formula(
                row,
                4,
                "SUMPRODUCT(" + Names.CONCENTRATION + ",INDEX(" + kappa + ",0,MATCH(" + cell(row, 0) + ","
                        + Names.KAPPA_NM + ",0)))",
                figure.bolder().ink(Palette.TEAL));
        page.number(row, 5, p.perCm(), figure);
        page.number(row, 6, p.uPerCm(), figure.format("± " + format).ink(Palette.QUIET));
        String miss = cell(row, FillInPlan.LOT);
        page.formula(
                row,
                FillInPlan.WORD,
                "IF(ABS(" + miss + ")<=1,\"inside\",\"OUTSIDE\")",
                LINE.ink(Palette.TEAL).indent());
        page.formula(
                row,
                FillInPlan.LOT,
                "(" + cell(row, 4) + "-" + cell(row, 2) + ")/" + cell(row, 3),
                LINE.format("+0.00;−0.00;0.00").right());
        page.text(row, FillInPlan.DONE, "", LINE);
        page.formula(
                row,
                FillInPlan.NOTE,
                LandingGauge.formula(miss),
                LINE.typewriter().indent());
        page.height(row, 17);
    }

    private void validation() {
        DataValidationHelper helper = page.sheet.getDataValidationHelper();
        int first = plan.weighingRows().get(0);
        int last = plan.weighingRows().get(plan.weighingRows().size() - 1);
        validate(
                helper.createDecimalConstraint(OperatorType.GREATER_OR_EQUAL, "0", null),
                new CellRangeAddressList(first, last, FillInPlan.WEIGHED, FillInPlan.WEIGHED),
                "Grams as weighed",
                "A number, 0 or more, in g and without the unit; or leave the cell empty.");
        validate(
                helper.createDateConstraint(OperatorType.GREATER_OR_EQUAL, "DATE(2000,1,1)", null, "yyyy-mm-dd"),
                new CellRangeAddressList(BATCH_ROW, BATCH_ROW, 8, 8),
                "Date",
                "A date such as 2026-03-31.");
        validate(
                helper.createExplicitListConstraint(new String[] {"done", "skipped"}),
                new CellRangeAddressList(first, last, FillInPlan.DONE, FillInPlan.DONE),
                "Done",
                "\"done\" or \"skipped\", or leave the cell empty.");
    }

    private void validate(DataValidationConstraint rule, CellRangeAddressList where, String title, String message) {
        DataValidation validation = page.sheet.getDataValidationHelper().createValidation(rule, where);
        validation.setEmptyCellAllowed(true);
        validation.setErrorStyle(DataValidation.ErrorStyle.STOP);
        validation.setShowErrorBox(true);
        validation.createErrorBox(title, message);
        page.sheet.addValidationData(validation);
    }

    /** Colour follows the word, never alone. */
    private void colours() {
        int first = plan.weighingRows().get(0);
        int last = plan.weighingRows().get(plan.weighingRows().size() - 1);
        String word = "$" + cell(first, FillInPlan.WORD);
        CellRangeAddress[] weighed = {
            new CellRangeAddress(first, last, FillInPlan.WEIGHED, FillInPlan.WEIGHED),
            new CellRangeAddress(first, last, FillInPlan.WORD, FillInPlan.WORD)
        };
        paint(weighed, word + "=\"inside\"", Palette.TEAL, Palette.TEAL_GROUND, false);
        paint(weighed, "AND(" + word + "<>\"\"," + word + "<>\"inside\")", Palette.BRICK, Palette.BRICK_GROUND, true);
        int from = plan.targetsRow() + 2;
        String lands = "$" + cell(from, FillInPlan.WORD);
        CellRangeAddress[] landed = {
            new CellRangeAddress(from, plan.lastRow(), 4, 4),
            new CellRangeAddress(from, plan.lastRow(), FillInPlan.WORD, FillInPlan.LOT),
            new CellRangeAddress(from, plan.lastRow(), FillInPlan.NOTE, FillInPlan.NOTE)
        };
        paint(landed, lands + "=\"OUTSIDE\"", Palette.BRICK, Palette.BRICK_GROUND, true);
        CellRangeAddress[] verdict = {new CellRangeAddress(VERDICT_ROW, VERDICT_ROW, 0, 0)};
        paint(verdict, "COUNTIF(" + Names.LANDED + ",\"OUTSIDE\")>0", Palette.BRICK, "", true);
    }

    private void paint(CellRangeAddress[] where, String when, String ink, String ground, boolean bold) {
        XSSFSheetConditionalFormatting formatting = page.sheet.getSheetConditionalFormatting();
        XSSFConditionalFormattingRule rule = formatting.createConditionalFormattingRule(when);
        var font = rule.createFontFormatting();
        font.setFontColor(page.looks.colour(ink));
        if (bold) font.setFontStyle(false, true);
        if (!ground.isEmpty()) {
            var fill = rule.createPatternFormatting();
            fill.setFillBackgroundColor(page.looks.colour(ground));
            fill.setFillPattern(org.apache.poi.ss.usermodel.PatternFormatting.SOLID_FOREGROUND);
        }
        formatting.addConditionalFormatting(where, rule);
    }

    private static String cell(int row, int column) {
        return new CellReference(row, column).formatAsString();
    }
}
