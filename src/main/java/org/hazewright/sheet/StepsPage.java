package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.List;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Step;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Balance;
import org.hazewright.picture.Palette;

/** The order of work, step by step, each with its handling and cautions and a place for a tick. */
final class StepsPage {
    private static final Face LINE = Face.WRAPPED.points(10).rule();
    private static final Face SMALL =
            Face.WRAPPED.points(8.5).ink(Palette.QUIET).rule();
    private static final int TEXT = 1;
    private static final int WHEN = 2;
    private static final int MIND = 3;
    private static final int DONE = 4;

    static void write(Page page, Answer answer, List<Step> steps, List<Weighing> weighings) {
        StepsPage sheet = new StepsPage(page, answer.brief().balance(), weighings);
        sheet.heading("Steps", answer.brief().title() + " · " + Sentences.summary(answer));
        sheet.steps(steps);
        sheet.print();
    }

    private final Page page;
    private final Balance balance;
    private final List<Weighing> weighings;
    private int row;
    private int number = 1;

    /** {@code weighings} are those that the steps number; empty when they have no numbers. */
    StepsPage(Page page, Balance balance, List<Weighing> weighings) {
        this.page = page;
        this.balance = balance;
        this.weighings = weighings;
    }

    void heading(String title, String summary) {
        page.columns(36, 286, 104, 242, 50);
        page.text(0, 0, title, Face.TITLE);
        page.height(0, 24);
        page.sentence(1, 0, DONE, summary, Face.QUIET);
        String[] heads = {"no", "do", "at, for", "mind", "done"};
        for (int c = 0; c < heads.length; c++)
            page.text(2, c, heads[c], c == MIND || c == WHEN ? Face.HEAD.indent() : Face.HEAD);
        row = 3;
    }

    /** A heading of its own over steps that follow. */
    void part(String title) {
        page.text(row, 0, title, Face.SECTION.points(12));
        page.height(row++, 26);
    }

    void steps(List<Step> steps) {
        Step.Stage stage = null;
        for (Step s : steps) {
            if (s.stage() != stage) {
                stage = s.stage();
                page.text(row, 0, stage.heading(), Face.SECTION);
                page.height(row++, 20);
            }
            step(page, row++, number++, s, weighings, balance);
        }
    }

    void print() {
        page.sheet.createFreezePane(0, 3);
        page.sheet.getWorkbook().setPrintArea(page.sheet.getWorkbook().getSheetIndex(page.sheet), 0, DONE, 0, row - 1);
        PrintSetup.pages(page.sheet, false, 2);
    }

    private static void step(Page page, int row, int number, Step s, List<Weighing> weighings, Balance balance) {
        String text = s.text()
                + s.allowed()
                        .map(a -> " Allowed " + Grams.band(a.lowG(), a.highG(), balance) + ".")
                        .orElse("");
        page.number(row, 0, number, LINE.centred());
        page.text(row, TEXT, text, LINE);
        String when = when(s, weighings);
        page.text(row, WHEN, when, SMALL.indent());
        List<String> mind = new ArrayList<>(s.handling());
        s.cautions().forEach(c -> mind.add("Caution: " + c));
        String words = String.join("\n", mind);
        page.text(row, MIND, words, SMALL.indent());
        page.cell(row, DONE, LINE.centred().fillIn());
        page.height(row, 16);
        page.roomFor(row, text, LINE, TEXT, TEXT);
        page.roomFor(row, when + "  ", SMALL, WHEN, WHEN);
        page.roomFor(row, words, SMALL, MIND, MIND);
    }

    private static String when(Step s, List<Weighing> weighings) {
        List<String> parts = new ArrayList<>();
        s.weighing().filter(weighings::contains).ifPresent(w -> parts.add("weighing " + (weighings.indexOf(w) + 1)));
        if (s.volumeMl().isPresent())
            parts.add("about " + Grams.plain(s.volumeMl().getAsDouble()) + " mL");
        if (s.temperatureC().isPresent()) parts.add(Grams.plain(s.temperatureC().getAsDouble()) + " °C");
        if (s.minutes().isPresent()) parts.add(length(s.minutes().getAsDouble()));
        return String.join(", ", parts);
    }

    private static String length(double minutes) {
        return minutes < 120 ? Grams.plain(minutes) + " min" : Grams.plain(minutes / 60) + " h";
    }
}
