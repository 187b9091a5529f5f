package org.hazewright.desk.paper;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.function.Consumer;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Cautions;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Outlook;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Step;
import org.hazewright.bench.Steps;
import org.hazewright.bench.Warning;
import org.hazewright.bench.Warnings;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.pen.Pen;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Figures;

/** A recipe on pages of A4: what to weigh with its bands and boxes to write in, the steps, where it lands, the spectra, what to mind. */
public final class RecipePaper {
    private static final double LEFT = 48;
    private static final double RIGHT = Paper.WIDTH - 48;
    private static final double TOP = 52;
    private static final double BOTTOM = Paper.HEIGHT - 56;
    private static final double SIZE = 9.5;
    private static final double LINE = 13.2;

    private final Palette c = Palette.LIGHT;
    private final Paper paper;
    private final Outlook outlook;
    private final Answer answer;
    private final LocalDate day;
    private Pen pen;
    private double y;
    private int page;

    /**
     * @param answer the search behind the recipe, for what holds it back
     * @param day of making, for the dates of lots
     */
    public RecipePaper(Paper paper, Outlook outlook, Answer answer, LocalDate day) {
        this.paper = paper;
        this.outlook = outlook;
        this.answer = answer;
        this.day = day;
    }

    /** Draws all pages; {@code spectra} draws the plots with a pen whose room is {@link #spectraWidth} by {@link #spectraHeight} at its origin. */
    public void draw(Consumer<Pen> spectra) {
        Brief brief = outlook.brief();
        Recipe recipe = outlook.recipe();
        Balance balance = brief.balance();
        List<Sensitivity> bands = Sensitivity.of(recipe, balance, brief.points());
        List<Step> steps = Steps.of(recipe, balance, bands);
        newPage();
        pen.text(brief.title(), LEFT, y, 17, true, c.ink(), Pen.Align.LEFT);
        y += 17;
        pen.text(
                Words.shortName(recipe.base()) + ", " + Figures.plain(Math.rint(10 * brief.volumeMl()) / 10)
                        + " mL to make, used at " + Figures.plain(brief.temperatureC()) + " °C",
                LEFT,
                y,
                SIZE,
                false,
                c.slate(),
                Pen.Align.LEFT);
        y += 20;
        wrapped(Words.verdict(outlook), 12, true, outlook.meets() ? c.ink() : c.brick());
        y += 4;
        steps(steps, balance);
        landing();
        section("What holds it back", answer.limits());
        section(
                "Mind",
                Stream.concat(Warnings.of(recipe, day).stream().map(Warning::text), Cautions.GENERAL.stream())
                        .toList());
        if (y + spectraHeight() + 40 > BOTTOM) newPage();
        heading("Spectra");
        spectra.accept(new Shifted(pen, LEFT, y));
        y += spectraHeight() + 10;
        pen.text("made by", LEFT, BOTTOM + 18, SIZE, false, c.slate(), Pen.Align.LEFT);
        pen.line(LEFT + 44, BOTTOM + 20, LEFT + 190, BOTTOM + 20, c.slate(), 0.6);
        pen.text("on", LEFT + 204, BOTTOM + 18, SIZE, false, c.slate(), Pen.Align.LEFT);
        pen.line(LEFT + 222, BOTTOM + 20, LEFT + 320, BOTTOM + 20, c.slate(), 0.6);
    }

    public static double spectraWidth() {
        return RIGHT - LEFT;
    }

    public static double spectraHeight() {
        return 330;
    }

    private void newPage() {
        pen = paper.nextPage();
        page++;
        y = TOP;
        pen.text(
                outlook.brief().title() + " · " + day + " · page " + page,
                RIGHT,
                Paper.HEIGHT - 26,
                7.5,
                false,
                c.slate(),
                Pen.Align.RIGHT);
    }

    private void room(double height) {
        if (y + height > BOTTOM) newPage();
    }

    private void heading(String text) {
        room(3 * LINE);
        y += 8;
        pen.text(text, LEFT, y, 11, true, c.ink(), Pen.Align.LEFT);
        y += 16;
    }

    private void wrapped(String text, double size, boolean bold, String colour) {
        for (String line : lines(text, RIGHT - LEFT, size, bold)) {
            room(size * 1.4);
            pen.text(line, LEFT, y, size, bold, colour, Pen.Align.LEFT);
            y += size * 1.4;
        }
    }

    private List<String> lines(String text, double width, double size, boolean bold) {
        List<String> lines = new ArrayList<>();
        StringBuilder line = new StringBuilder();
        for (String word : text.split("\\s+")) {
            String longer = line.isEmpty() ? word : line + " " + word;
            if (!line.isEmpty() && pen.width(longer, size, bold) > width) {
                lines.add(line.toString());
                line = new StringBuilder(word);
            } else line = new StringBuilder(longer);
        }
        if (!line.isEmpty()) lines.add(line.toString());
        return lines;
    }

    private void steps(List<Step> steps, Balance balance) {
        Step.Stage stage = null;
        int n = 0;
        for (Step s : steps) {
            if (s.stage() != stage) heading(s.stage().heading());
            stage = s.stage();
            boolean weighs = s.weighing().isPresent();
            double textRight = weighs ? RIGHT - 168 : RIGHT;
            List<String> lines = new ArrayList<>(lines(s.text(), textRight - LEFT - 28, SIZE, false));
            String mind = s.cautions().stream().map(t -> "Mind: " + t).collect(Collectors.joining(" "));
            List<String> minds = mind.isEmpty() ? List.of() : lines(mind, textRight - LEFT - 28, SIZE - 1, false);
            double tall = Math.max(weighs ? 24 : 0, lines.size() * LINE + minds.size() * (LINE - 1.5)) + 4;
            room(tall);
            pen.box(LEFT, y - 7.5, 8.5, 8.5, 1, null, 1, c.slate(), 0.8);
            pen.text(Integer.toString(++n), LEFT + 23, y, SIZE - 1, false, c.slate(), Pen.Align.RIGHT);
            double at = y;
            for (String line : lines) {
                pen.text(line, LEFT + 28, at, SIZE, false, c.ink(), Pen.Align.LEFT);
                at += LINE;
            }
            for (String line : minds) {
                pen.text(line, LEFT + 28, at, SIZE - 1, false, c.amberText(), Pen.Align.LEFT);
                at += LINE - 1.5;
            }
            if (weighs) {
                pen.text(
                        Words.grams(s.weighing().get().massG(), balance) + " g",
                        RIGHT - 84,
                        y,
                        12,
                        true,
                        c.ink(),
                        Pen.Align.RIGHT);
                s.allowed()
                        .ifPresent(a -> pen.text(
                                Grams.band(a.lowG(), a.highG(), balance),
                                RIGHT - 84,
                                y + 11,
                                7.5,
                                false,
                                c.amberText(),
                                Pen.Align.RIGHT));
                pen.box(RIGHT - 76, y - 11, 76, 17, 2, null, 1, c.slate(), 0.8);
            }
            y += tall;
        }
    }

    private void landing() {
        heading("Where it lands, /cm");
        double[] x = {LEFT, LEFT + 40, LEFT + 120, LEFT + 200, LEFT + 290, LEFT + 400};
        String[] head = {"nm", "", "wanted", "±", "predicted", ""};
        for (int k = 0; k < head.length; k++)
            pen.text(head[k], x[k], y, SIZE - 1, false, c.slate(), k > 1 ? Pen.Align.RIGHT : Pen.Align.LEFT);
        y += LINE;
        double before = Double.NaN;
        for (Answer.Predicted p : outlook.predicted()) {
            room(LINE);
            double nm = p.point().wavelengthNm();
            if (nm != before) pen.text(Figures.plain(nm), LEFT, y, SIZE, true, c.ink(), Pen.Align.LEFT);
            before = nm;
            int decimals = Figures.decimalsFor(Math.min(p.point().tolerancePerCm(), p.uPerCm() > 0 ? p.uPerCm() : 1));
            pen.text(Words.sign(p.point().quantity()), x[1], y, SIZE, false, c.amberText(), Pen.Align.LEFT);
            pen.text(
                    Figures.fixed(p.point().wantedPerCm(), decimals),
                    x[2],
                    y,
                    SIZE,
                    false,
                    c.amberText(),
                    Pen.Align.RIGHT);
            pen.text(
                    Figures.fixed(p.point().tolerancePerCm(), decimals),
                    x[3],
                    y,
                    SIZE,
                    false,
                    c.slate(),
                    Pen.Align.RIGHT);
            pen.text(
                    Figures.withUncertainty(p.perCm(), p.uPerCm()),
                    x[4] + 10,
                    y,
                    SIZE,
                    false,
                    p.inside() ? c.teal() : c.brick(),
                    Pen.Align.RIGHT);
            gauge(x[4] + 40, y - 3, 120, p.miss());
            y += LINE;
        }
        pen.text(
                "± is the tolerance; after a prediction its standard uncertainty (k = 1)",
                LEFT,
                y,
                7.5,
                false,
                c.slate(),
                Pen.Align.LEFT);
        y += LINE;
    }

    /** The landing gauge. */
    private void gauge(double x, double at, double w, double miss) {
        double middle = x + w / 2;
        double unit = w / 3.4;
        pen.line(x, at, x + w, at, c.line(), 1);
        for (int side : new int[] {-1, 1}) {
            double edge = middle + side * unit;
            pen.line(
                    new double[] {edge - side * 3, edge, edge, edge - side * 3},
                    new double[] {at - 4, at - 4, at + 4, at + 4},
                    4,
                    c.amber(),
                    1.2);
        }
        double p = middle + Math.max(-1.6, Math.min(1.6, miss)) * unit;
        if (Math.abs(miss) <= 1) pen.disc(p, at, 2.7, c.teal());
        else {
            pen.line(p - 3, at - 3, p + 3, at + 3, c.brick(), 1.6);
            pen.line(p - 3, at + 3, p + 3, at - 3, c.brick(), 1.6);
        }
    }

    private void section(String title, List<String> sentences) {
        if (sentences.isEmpty()) return;
        heading(title);
        for (String s : sentences) {
            wrapped(s, SIZE, false, c.ink());
            y += 3;
        }
    }

    /** A pen whose origin lies elsewhere. */
    private record Shifted(Pen pen, double dx, double dy) implements Pen {
        private static double[] moved(double[] values, double by) {
            double[] out = values.clone();
            for (int k = 0; k < out.length; k++) out[k] += by;
            return out;
        }

        @Override
        public void area(double[] x, double[] y, int count, String colour, double opacity) {
            pen.area(moved(x, dx), moved(y, dy), count, colour, opacity);
        }

        @Override
        public void line(double[] x, double[] y, int count, String colour, double width, double... dash) {
            pen.line(moved(x, dx), moved(y, dy), count, colour, width, dash);
        }

        @Override
        public void box(
                double x,
                double y,
                double w,
                double h,
                double radius,
                String fill,
                double opacity,
                String stroke,
                double width) {
            pen.box(x + dx, y + dy, w, h, radius, fill, opacity, stroke, width);
        }

        @Override
        public void disc(double x, double y, double radius, String colour) {
            pen.disc(x + dx, y + dy, radius, colour);
        }

        @Override
        public void text(String text, double x, double y, double size, boolean bold, String colour, Align align) {
            pen.text(text, x + dx, y + dy, size, bold, colour, align);
        }

        @Override
        public void clip(double x, double y, double w, double h) {
            pen.clip(x + dx, y + dy, w, h);
        }

        @Override
        public void unclip() {
            pen.unclip();
        }

        @Override
        public double width(String text, double size, boolean bold) {
            return pen.width(text, size, bold);
        }
    }

    /** The name that a file of it is offered. */
    public static String fileName(Brief brief) {
        return brief.name().toLowerCase(Locale.ROOT) + ".pdf";
    }
}
