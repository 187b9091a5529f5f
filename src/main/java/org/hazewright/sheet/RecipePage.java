package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answer.Predicted;
import org.hazewright.bench.Cautions;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Leftover;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Warning;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point.Quantity;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.picture.Palette;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Source;

/** The recipe on one printed page: what to weigh, where it lands, what holds it back, what to mind, where figures come from. */
final class RecipePage {
    private static final int LAST = 9;
    private static final int CHART_ROWS = 10;
    private static final int LONGEST_SOURCE = 260;
    private static final double CHART_ROW_PT = 13.5;
    private static final Face HEAD = Face.HEAD;
    private static final Face LINE = Face.TEXT.rule();
    private static final Face LINE_QUIET = Face.QUIET.points(8).rule();

    private final Page page;
    private final Answer answer;
    private final List<Sensitivity> bands;
    private final List<Warning> warnings;
    private final Balance balance;
    private final Face grams;
    private final Set<String> stocksInHand;
    private int row;

    RecipePage(Page page, Answer answer, List<Sensitivity> bands, List<Warning> warnings, Set<String> stocksInHand) {
        this.page = page;
        this.answer = answer;
        this.bands = bands;
        this.warnings = warnings;
        this.stocksInHand = stocksInHand;
        this.balance = answer.brief().balance();
        this.grams = LINE.decimals(balance.decimals()).points(11).bolder().right();
    }

    void write(SpectraPage spectra) {
        page.columns(42, 52, 70, 70, 84, 68, 64, 76, 92, 80);
        heading();
        if (answer.recipe().stocks().stream().anyMatch(s -> !stocksInHand.contains(s.id()))) stocks();
        weighOut();
        targets();
        charts(spectra);
        Sentences.couldMove(answer).ifPresent(s -> sentences("What could move it", List.of(s)));
        sentences("What holds it back", answer.limits());
        mind();
        sources();
        answer.recipe()
                .briefSha256()
                .ifPresent(sha -> page.text(
                        row++, 0, "brief " + sha.substring(0, Math.min(12, sha.length())), Face.QUIET.points(7)));
        print();
    }

    private void heading() {
        page.sentence(row++, 0, LAST, answer.brief().title(), Face.TITLE);
        page.sentence(row++, 0, LAST, Sentences.summary(answer), Face.QUIET);
        String colour = answer.meets() ? Palette.TEAL : Palette.BRICK;
        page.sentence(
                row++,
                0,
                LAST,
                Sentences.chance(answer.chance()),
                Face.TEXT.points(11).bolder().ink(colour));
        page.sentence(row++, 0, LAST, Sentences.verdict(answer), Face.TEXT.ink(colour));
    }

    private void section(String title) {
        page.height(row++, 5);
        page.text(row, 0, title, Face.SECTION);
        page.height(row++, 15);
    }

    private void stocks() {
        section("Make first");
        heads("no", "stock", 1, 3, "take", 4, 4, "g", 5, 5, "allowed", 6, 7, "", 8, 9);
        for (Sensitivity s : bands) {
            Weighing w = s.weighing();
            if (w.into().isEmpty() || stocksInHand.contains(w.into().get())) continue;
            Stock stock = answer.recipe().stock(w.into().get());
            boolean first = w.role() == Weighing.Role.STOCK_SUBSTANCE;
            String what = first ? stock.id() + ", 1 in " + Grams.plain(stock.ratio()) : "";
            String note = first ? Sentences.lot(stock.lot()) : left(stock);
            line(what, w.label(), s, note);
        }
    }

    private String left(Stock stock) {
        return Leftover.of(answer.recipe()).stream()
                .filter(l -> l.stock().equals(stock.id()))
                .map(l -> "makes " + Grams.plain(l.madeG()) + " g, " + Grams.plain(l.leftG()) + " g left over")
                .findFirst()
                .orElse("");
    }

    private void weighOut() {
        section("Weigh, in this order");
        heads("no", "what", 1, 3, "from", 4, 4, "g", 5, 5, "allowed", 6, 7, "note", 8, 9);
        for (Sensitivity s : bands) {
            Weighing w = s.weighing();
            if (w.into().isPresent()) continue;
            Item item = answer.recipe().items().get(w.place());
            String from = w.from().isPresent()
                    ? "stock"
                    : item.lot().map(l -> "lot " + l).orElse("bottle");
            String what = w.from()
                    .map(stock -> "stock " + stock)
                    .orElse(w.ingredient().name());
            line(what, from, s, Sentences.note(answer, w));
        }
    }

    /** Weighings are numbered as on "Fill in". */
    private void line(String what, String from, Sensitivity s, String note) {
        page.number(row, 0, bands.indexOf(s) + 1, LINE_QUIET.centred());
        page.text(row, 1, what, LINE.wrap());
        page.span(row, 1, 3);
        page.text(row, 4, from, LINE_QUIET.wrap());
        page.number(row, 5, s.weighing().massG(), grams);
        page.text(row, 6, band(s), LINE_QUIET.right());
        page.span(row, 6, 7);
        page.text(row, 8, note, LINE_QUIET.wrap().indent());
        page.span(row, 8, LAST);
        page.height(row, 15.5);
        page.roomFor(row, what, LINE, 1, 3);
        page.roomFor(row, from, LINE_QUIET, 4, 4);
        page.roomFor(row, note, LINE_QUIET, 8, LAST);
        row++;
    }

    private String band(Sensitivity s) {
        return Figures.fixed(s.lowG(), balance.decimals()) + " – " + Figures.fixed(s.highG(), balance.decimals());
    }

    private void heads(String first, Object... headFromTo) {
        page.text(row, 0, first, HEAD.centred());
        for (int k = 0; k < headFromTo.length; k += 3) {
            int from = (int) headFromTo[k + 1];
            boolean figures = from == 5 || from == 6;
            Face words = from == 8 ? HEAD.indent() : HEAD;
            page.text(row, from, (String) headFromTo[k], figures ? HEAD.right() : words);
            page.span(row, from, (int) headFromTo[k + 2]);
        }
        page.height(row++, 12.5);
    }

    private void targets() {
        section("Where it lands, in 1/cm");
        String[] heads = {"nm", "", "wanted", "± tolerance", "predicted", "± u", "miss"};
        for (int c = 0; c < heads.length; c++) page.text(row, c, heads[c], c == 1 ? HEAD.indent() : HEAD.right());
        page.text(row, 7, "miss in half-widths, −1 [ ] +1", HEAD.centred());
        page.span(row, 7, 8);
        page.text(row, LAST, "lands", HEAD.indent());
        page.height(row++, 12.5);
        double before = -1;
        for (Predicted p : answer.predicted()) {
            String format = Face.numberFormat(Sentences.decimals(p));
            Face figure = LINE.format(format).right();
            if (p.point().wavelengthNm() != before)
                page.number(row, 0, p.point().wavelengthNm(), LINE.bolder().right());
            else page.text(row, 0, "", LINE);
            before = p.point().wavelengthNm();
            page.text(row, 1, p.point().quantity().sign(), LINE.indent());
            page.number(row, 2, p.point().wantedPerCm(), figure.ink(Palette.AMBER_TYPE));
            page.number(
                    row,
                    3,
                    p.point().tolerancePerCm(),
                    figure.format("± " + format).ink(Palette.AMBER_TYPE));
            page.number(row, 4, p.perCm(), figure.bolder().ink(Palette.TEAL));
            page.number(row, 5, p.uPerCm(), figure.format("± " + format).ink(Palette.QUIET));
            page.number(row, 6, p.miss(), figure.format("+0.00;−0.00;0.00"));
            page.rich(row, 7, LandingGauge.drawn(p.miss(), 8, page.looks), LINE.centred());
            page.span(row, 7, 8);
            page.text(
                    row,
                    LAST,
                    p.inside() ? "inside" : "OUTSIDE",
                    p.inside()
                            ? LINE.ink(Palette.TEAL).indent()
                            : LINE.bolder().ink(Palette.BRICK).indent());
            page.height(row++, 13.5);
        }
    }

    private void charts(SpectraPage spectra) {
        page.height(row++, 5);
        int from = row;
        for (int k = 0; k < CHART_ROWS; k++) page.height(row++, CHART_ROW_PT);
        new SpectrumChart(spectra, Quantity.MUA).draw(page.sheet, 0, from, 5, row);
        new SpectrumChart(spectra, Quantity.MUSP).draw(page.sheet, 5, from, LAST + 1, row);
        page.sentence(
                row++,
                0,
                LAST,
                "Line: predicted; thin dashes: 95 % interval; diamonds with brackets: wanted, with tolerance.",
                Face.QUIET.points(7));
    }

    private void sentences(String title, List<String> sentences) {
        if (sentences.isEmpty()) return;
        section(title);
        for (String s : sentences) page.sentence(row++, 0, LAST, s, Face.TEXT.points(8.5));
    }

    /** What to know before starting; then what the ingredients' files say; then what holds for every recipe. */
    private void mind() {
        List<String> first = new ArrayList<>(answer.notes());
        warnings.forEach(w -> first.add(w.text()));
        sentences("Mind", first);
        if (first.isEmpty()) section("Mind");
        Set<Ingredient> all = new LinkedHashSet<>();
        all.add(answer.recipe().base());
        all.addAll(answer.mixture().massesG().keySet());
        Sentences.cautionsByNames(all)
                .forEach((names, cautions) ->
                        page.sentence(row++, 0, LAST, names + ": " + String.join(" ", cautions), Face.TEXT.points(8)));
        page.sentence(row++, 0, LAST, String.join(" ", Cautions.GENERAL), Face.QUIET.points(7.5));
    }

    private void sources() {
        section("Where the figures come from");
        for (Ingredient i : answer.mixture().massesG().keySet())
            page.sentence(row++, 0, LAST, i.name() + ". " + capital(shortened(i.source())), Face.QUIET.points(7.5));
    }

    /** A long account is cut at a word; the sheet "Sources" holds it whole. */
    private static String shortened(Source source) {
        String text = Sentences.source(source);
        if (text.length() <= LONGEST_SOURCE) return text.endsWith(".") ? text : text + ".";
        int end = text.lastIndexOf(' ', LONGEST_SOURCE);
        return text.substring(0, end < 0 ? LONGEST_SOURCE : end) + " … (whole on sheet Sources)";
    }

    private static String capital(String text) {
        return text.substring(0, 1).toUpperCase(java.util.Locale.ROOT) + text.substring(1);
    }

    private void print() {
        var sheet = page.sheet;
        sheet.getWorkbook().setPrintArea(sheet.getWorkbook().getSheetIndex(sheet), 0, LAST, 0, row - 1);
        PrintSetup.onePage(sheet, false);
    }
}
