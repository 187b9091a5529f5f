package org.hazewright.desk.balance;

import java.util.LinkedHashMap;
import java.util.Map;
import javafx.geometry.Pos;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.VBox;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Outlook;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Gauge;
import org.hazewright.desk.parts.Say;
import org.hazewright.optics.Figures;

/** What the batch will give as made so far, a small table for each wavelength. */
final class AsMade extends VBox {
    private final FlowPane flow = new FlowPane();

    AsMade() {
        getStyleClass().addAll("gap-s", "as-made");
        flow.getStyleClass().add("as-made-flow");
        getChildren().addAll(Say.place("As made so far"), flow);
    }

    void show(Outlook o) {
        flow.getChildren().clear();
        if (o == null) return;
        Map<Double, VBox> at = new LinkedHashMap<>();
        for (Answer.Predicted p : o.predicted()) {
            VBox box = at.computeIfAbsent(p.point().wavelengthNm(), nm -> {
                VBox fresh = new VBox(Say.label(Figures.plain(nm) + " nm", "heading"));
                fresh.getStyleClass().add("gap-xs");
                return fresh;
            });
            Gauge gauge = new Gauge();
            gauge.getStyleClass().add("in-card");
            gauge.land(p.miss());
            HBox line = new HBox(
                    Say.label(Words.sign(p.point().quantity()) + " " + Words.predicted(p), "as-made-value"), gauge);
            line.setAlignment(Pos.CENTER_LEFT);
            box.getChildren().add(line);
        }
        flow.getChildren().addAll(at.values());
    }
}
