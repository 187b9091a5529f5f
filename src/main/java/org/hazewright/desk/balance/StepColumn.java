package org.hazewright.desk.balance;

import java.util.ArrayList;
import java.util.List;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Say;

/** The steps, done, present and to come, with what each asks for or what was weighed. */
final class StepColumn extends ScrollPane {
    private final VBox rows = new VBox();

    StepColumn() {
        rows.getStyleClass().add("step-rows");
        setContent(rows);
        setFitToWidth(true);
        setHbarPolicy(ScrollBarPolicy.NEVER);
        setFocusTraversable(false);
    }

    void show(AtBalance weighing) {
        AtBalance.Now now = weighing.nowProperty().get();
        List<Node> all = new ArrayList<>();
        for (int k = 0; k < now.lines().size(); k++)
            all.add(row(weighing, now.lines().get(k), k + 1));
        rows.getChildren().setAll(all);
        int at = Math.min(now.at(), all.size() - 1);
        if (at >= 0) keepInSight(at, all.size());
    }

    /** The present step stays in sight, with what comes next. */
    private void keepInSight(int at, int of) {
        layout();
        double tall = rows.getHeight() - getViewportBounds().getHeight();
        if (tall > 0) setVvalue(Math.max(0, Math.min(1, (double) Math.max(0, at - 3) / Math.max(1, of - 6))));
    }

    private Node row(AtBalance weighing, AtBalance.Line line, int number) {
        boolean done = line.state() == AtBalance.State.DONE;
        boolean present = line.state() == AtBalance.State.NOW;
        Label disc = Say.label(
                done ? "✓" : Integer.toString(number), "number-disc", done ? "done" : present ? "now" : "later");
        Label name = Say.wrapped(line.weighs() ? line.name() : firstSentence(line.name()));
        if (present) name.getStyleClass().add("strong");
        else if (!done) name.getStyleClass().add("quiet");
        VBox words = new VBox(name);
        String why = weighing.why(line);
        if (!why.isEmpty()) words.getChildren().add(Say.wrapped(why, "wanted", "small"));
        HBox.setHgrow(words, Priority.ALWAYS);
        Label right = Say.label("");
        if (done && line.weighs()) right = Say.label(Words.grams(line.weighedG(), weighing.balance()) + " g", "lands");
        else if (present) right = Say.label("now", "quiet");
        else if (line.weighs()) right = Say.label(Words.grams(line.wantedG(), weighing.balance()) + " g", "quiet");
        right.setMinWidth(Region.USE_PREF_SIZE);
        HBox row = new HBox(disc, words, right);
        row.getStyleClass().add("gap-m");
        row.setAlignment(Pos.TOP_LEFT);
        row.setAccessibleText(
                "step " + number + ", " + (done ? "done" : present ? "now" : "later") + ": " + line.name());
        return row;
    }

    private static String firstSentence(String text) {
        int end = text.indexOf(". ");
        String first = end > 0 ? text.substring(0, end) : text.replaceFirst("\\.$", "");
        int comma = first.indexOf(", ");
        if (first.length() > 60 && comma > 20) first = first.substring(0, comma);
        return first.length() > 72 ? first.substring(0, first.lastIndexOf(' ', 70)) + " …" : first;
    }
}
