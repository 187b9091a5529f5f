package org.hazewright.desk.readings;

import java.util.Optional;
import java.util.function.Function;
import java.util.function.Supplier;
import javafx.beans.property.ReadOnlyDoubleProperty;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.Foreseeing;
import org.hazewright.desk.model.Foreseen;
import org.hazewright.desk.model.Remembered;
import org.hazewright.desk.parts.ErrorLine;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.desk.pen.Pen;
import org.hazewright.optics.Figures;

/** The place Readings, at the foot of the window; opens upward. */
public final class ReadingsPlace extends VBox {
    private final Foreseeing foreseeing;
    private final Look look;
    private final HBox cards = new HBox();
    private final VBox body = new VBox();
    private final Picture distances;
    private final Picture pulse;
    private final Picture slab;
    private final Label distancesSaid = Say.wrapped("", "small");
    private final Label pulseSaid = Say.wrapped("", "small");
    private final Label slabSaid = Say.wrapped("", "small");
    private final Label slabInWords = Say.wrapped(" ", "small");
    private final Label saturation = Say.label("", "reads-as");
    private final Label saturationSaid = Say.wrapped("", "small");
    private final Label wanted = Say.label("", "wanted", "small");
    private final Label bloodSaid = Say.wrapped("", "small", "quiet");
    private final Label distancesTitle = Say.label("R(ρ)", "strong");
    private final Label trouble = Say.wrapped("", "error-line");

    public ReadingsPlace(Foreseeing foreseeing, Look look, Remembered remembered) {
        this.foreseeing = foreseeing;
        this.look = look;
        getStyleClass().addAll("place", "above", "readings", "gap-s");
        distances = new Picture(look);
        pulse = new Picture(look);
        slab = new Picture(look);
        Field nm = asked(() -> foreseeing.asked().nm(), foreseeing::nm, "wavelength in nm");
        Field mm = asked(() -> foreseeing.asked().distanceMm(), foreseeing::distance, "distance in mm");
        Field thick = asked(() -> foreseeing.asked().thicknessMm(), foreseeing::thickness, "slab's thickness in mm");
        HBox asking = new HBox(
                Say.quiet("at"), nm, Say.quiet("nm,"), mm, Say.quiet("mm apart, slab of"), thick, Say.quiet("mm"));
        asking.setAlignment(Pos.BASELINE_LEFT);
        Word opener = new Word("", () -> {});
        HBox head = new HBox(Say.place("Readings"), Say.spring(), asking, opener);
        head.getStyleClass().add("gap-m");
        head.setAlignment(Pos.BASELINE_LEFT);
        cards.getStyleClass().add("gap-m");
        cards.getChildren()
                .addAll(
                        card(distancesTitle, distances, distancesSaid),
                        card(Say.label("time of flight", "strong"), pulse, pulseSaid),
                        card(Say.label("slab", "strong"), slab, slabSaid),
                        readsAs());
        body.getStyleClass().add("gap-xs");
        body.getChildren().addAll(new ErrorLine(nm, mm, thick), trouble, cards, slabInWords);
        getChildren().addAll(head, body);
        foreseeing.openProperty().addListener((p, was, is) -> {
            opener.setText(is ? "close" : "open");
            opener.setAccessibleText(is ? "close the readings" : "open the readings");
            Say.show(body, is);
            Say.show(asking, is);
        });
        opener.setOnAction(e -> {
            foreseeing.openProperty().set(!foreseeing.openProperty().get());
            remembered.keep("readings.open", foreseeing.openProperty().get());
        });
        foreseeing.openProperty().set(true);
        foreseeing.openProperty().set(!remembered.text("readings.open", "yes").equals("no"));
        foreseeing.foreseenProperty().addListener((p, before, now) -> show());
        foreseeing.troubleProperty().addListener((p, before, now) -> show());
        show();
    }

    private static Field asked(Supplier<Double> value, Function<String, Optional<String>> take, String name) {
        return new Field(() -> Figures.plain(value.get()), take, true)
                .named(name)
                .fitted(1);
    }

    private static Node card(Label title, Picture picture, Label said) {
        VBox.setVgrow(picture, Priority.ALWAYS);
        VBox card = new VBox(title, picture, said);
        card.getStyleClass().addAll("card", "reading-card", "gap-xs");
        HBox.setHgrow(card, Priority.ALWAYS);
        return card;
    }

    private Node readsAs() {
        VBox card = new VBox(Say.label("reads as", "strong"), saturation, saturationSaid, wanted, bloodSaid);
        card.getStyleClass().addAll("card", "reading-card", "gap-xs");
        HBox.setHgrow(card, Priority.ALWAYS);
        return card;
    }

    private void show() {
        Foreseen f = foreseeing.foreseenProperty().get();
        String wrong = foreseeing.troubleProperty().get();
        if (f != null && !f.notes().isEmpty()) wrong = f.notes().get(0);
        trouble.setText(wrong.isEmpty() ? "" : "✕ " + wrong);
        Say.show(trouble, !wrong.isEmpty());
        if (f == null) return;
        distancesTitle.setText("R(ρ) at " + Figures.plain(f.asked().nm()) + " nm");
        distances(f);
        pulse(f);
        slab(f);
        blood(f);
    }

    private void distances(Foreseen f) {
        if (f.distances().isEmpty()) {
            distances.show((pen, w, h) -> {});
            distancesSaid.setText("–");
            return;
        }
        Foreseen.Distances d = f.distances().get();
        distancesSaid.setText(Figures.plain(f.asked().distanceMm()) + " mm: "
                + Figures.withUncertainty(d.attenuationDb(), d.uDb()) + " dB" + doubt(d.holds()));
        tip(distancesSaid, d.note());
        double[] logs = java.util.Arrays.stream(d.perMm2())
                .map(v -> Math.log10(Math.max(v, 1e-30)))
                .toArray();
        distances.show((pen, w, h) -> curve(pen, w, h, d.mm(), logs, f.asked().distanceMm(), "mm", false));
        distances.setAccessibleText("diffuse reflectance over distance, " + distancesSaid.getText());
    }

    private static String doubt(boolean holds) {
        return holds ? "" : "; ✕ beyond diffusion";
    }

    private static void tip(Label label, String note) {
        label.setTooltip(note.isEmpty() ? null : new Tooltip(note));
    }

    private void pulse(Foreseen f) {
        if (f.pulse().isEmpty()) {
            pulse.show((pen, w, h) -> {});
            pulseSaid.setText("–");
            return;
        }
        Foreseen.Pulse p = f.pulse().get();
        pulseSaid.setText(
                "mean " + Figures.withUncertainty(p.meanPs() / 1000, p.uPs() / 1000) + " ns" + doubt(p.holds()));
        tip(pulseSaid, p.note());
        double[] ns = java.util.Arrays.stream(p.ps()).map(t -> t / 1000).toArray();
        pulse.show((pen, w, h) -> curve(pen, w, h, cut(ns, p), cutHeights(p), p.meanPs() / 1000, "ns", true));
        pulse.setAccessibleText("curve of a short pulse, " + pulseSaid.getText());
    }

    /** How many points of a pulse are worth drawing: to a thousandth of its height. */
    private static int worth(Foreseen.Pulse p) {
        double most = java.util.Arrays.stream(p.height()).max().orElse(1);
        int last = p.height().length - 1;
        while (last > 10 && p.height()[last] < 0.004 * most) last--;
        return last + 1;
    }

    private static double[] cut(double[] x, Foreseen.Pulse p) {
        return java.util.Arrays.copyOf(x, worth(p));
    }

    private static double[] cutHeights(Foreseen.Pulse p) {
        return java.util.Arrays.copyOf(p.height(), worth(p));
    }

    /** A curve with its x axis and a mark where the reading is taken. */
    private void curve(
            Pen pen, double w, double h, double[] x, double[] y, double mark, String unit, boolean fromZero) {
        Palette c = look.palette();
        double em = look.em() * 0.86;
        double bottom = h - 1.3 * em;
        double low = fromZero ? 0 : java.util.Arrays.stream(y).min().orElse(0);
        double high = java.util.Arrays.stream(y).max().orElse(1);
        double from = fromZero ? 0 : x[0];
        double to = x[x.length - 1];
        double[] px = new double[x.length];
        double[] py = new double[x.length];
        for (int k = 0; k < x.length; k++) {
            px[k] = 2 + (x[k] - from) / (to - from) * (w - 4);
            py[k] = bottom - 2 - (y[k] - low) / Math.max(1e-300, high - low) * (bottom - 0.5 * em);
        }
        pen.line(0, bottom, w, bottom, c.line(), 1.2);
        double at = 2 + (mark - from) / (to - from) * (w - 4);
        if (at > 0 && at < w) pen.line(at, 0.3 * em, at, bottom, c.slate(), 1, 2, 3);
        pen.line(px, py, x.length, c.teal(), 0.14 * em);
        pen.text(Figures.significant(from, 2), 0, h - 0.15 * em, em, false, c.slate(), Pen.Align.LEFT);
        pen.text(Figures.significant(to, 2) + " " + unit, w, h - 0.15 * em, em, false, c.slate(), Pen.Align.RIGHT);
    }

    private void slab(Foreseen f) {
        if (f.slab().isEmpty()) {
            slab.show((pen, w, h) -> {});
            slabSaid.setText("–");
            slabInWords.setText(" ");
            return;
        }
        Foreseen.Slab s = f.slab().get();
        slabSaid.setText(
                Figures.plain(f.asked().thicknessMm()) + " mm thick, through " + percent(s.through(), s.uThrough()));
        slabInWords.setText("Slab of " + Figures.plain(f.asked().thicknessMm()) + " mm: "
                + Figures.significant(100 * s.reflected(), 2) + " % back, "
                + Figures.significant(100 * s.absorbed(), 2) + " % absorbed, " + percent(s.through(), s.uThrough())
                + " through");
        slab.show((pen, w, h) -> slab(pen, w, h, s));
        slab.setAccessibleText("slab, reflected " + percent(s.reflected(), s.uReflected()) + ", " + slabSaid.getText());
    }

    private static String percent(double share, double u) {
        if (u > 0) return Figures.withUncertainty(100 * share, 100 * u) + " %";
        return Figures.significant(100 * share, 3) + " %";
    }

    /** The light as a bar cut in three, each part named. */
    private void slab(Pen pen, double w, double h, Foreseen.Slab s) {
        Palette c = look.palette();
        double em = look.em() * 0.86;
        double[] share = {s.reflected(), s.absorbed(), s.through()};
        String[] name = {"back", "absorbed", "through"};
        String[] fill = {c.tealSoft(), c.wash(), c.tealSoft()};
        double tall = (h - 0.4 * em) / 3;
        for (int k = 0; k < 3; k++) {
            double y = 0.2 * em + k * tall;
            double bar = Math.min(tall * 0.55, 1.6 * em);
            pen.box(0, y, w, bar, 2, c.milk(), 1, null, 0);
            pen.box(0, y, Math.max(1, w * share[k]), bar, 2, fill[k], 1, c.line(), 1);
            pen.text(name[k], 0.4 * em, y + bar / 2 + 0.35 * em, em, false, c.ink(), Pen.Align.LEFT);
            pen.text(
                    Figures.significant(100 * share[k], 2) + " %",
                    w - 0.3 * em,
                    y + bar / 2 + 0.35 * em,
                    em,
                    false,
                    c.slate(),
                    Pen.Align.RIGHT);
        }
    }

    private void blood(Foreseen f) {
        if (f.blood().isEmpty()) {
            saturation.setText("–");
            saturationSaid.setText("oxygen saturation");
            bloodSaid.setText("");
            return;
        }
        Foreseen.Blood b = f.blood().get();
        saturation.setText(Figures.fixed(100 * b.saturation(), 0) + " %");
        boolean strange = b.saturation() < 0 || b.saturation() > 1;
        saturationSaid.setText("± " + Figures.significant(100 * b.uSaturation(), 2) + " % oxygen saturation"
                + (strange ? "; ✕ no blood reads so" : ""));
        wanted.setText(
                Double.isNaN(b.wanted()) ? "" : "wanted " + Figures.plain(Math.rint(1000 * b.wanted()) / 10) + " %");
        Say.show(wanted, !wanted.getText().isEmpty());
        bloodSaid.setText("Hb " + Figures.significant(b.umolPerL(), 3) + " µmol/L");
        saturation.setTooltip(new Tooltip("What an oximeter would believe that reads µa at the targets' wavelengths."));
    }

    /** Says the slab in words where there is no room for four pictures. */
    public void narrowWhen(ReadOnlyDoubleProperty width) {
        Runnable fit = () -> {
            boolean room = width.get() > 48 * look.em();
            Say.show(cards.getChildren().get(2), room);
            Say.show(slabInWords, !room);
        };
        width.addListener((p, was, is) -> fit.run());
        look.emProperty().addListener((p, was, is) -> fit.run());
        fit.run();
    }
}
