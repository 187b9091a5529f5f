package org.hazewright.desk.parts;

import javafx.collections.ListChangeListener;
import javafx.scene.control.Label;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;
import org.hazewright.desk.model.Notice;
import org.hazewright.desk.model.Notices;

/** What stands to be told, a line each, with the words to press. */
public final class NoticeBar extends VBox {
    private final Notices notices;

    public NoticeBar(Notices notices) {
        this.notices = notices;
        notices.all().addListener((ListChangeListener<Notice>) c -> show());
        show();
    }

    private void show() {
        getChildren().clear();
        for (Notice n : notices.all()) getChildren().add(line(n));
        Say.show(this, !notices.all().isEmpty());
    }

    private HBox line(Notice n) {
        Label text = Say.wrapped((n.kind() == Notice.Kind.WRONG ? "✕ " : "") + n.text());
        HBox.setHgrow(text, Priority.ALWAYS);
        text.setMaxWidth(Double.MAX_VALUE);
        HBox line = new HBox(text);
        line.getStyleClass().add("notice");
        if (n.kind() == Notice.Kind.WRONG) line.getStyleClass().add("wrong");
        if (n.kind() == Notice.Kind.ASKED) line.getStyleClass().add("asked");
        for (Notice.Way way : n.ways())
            line.getChildren()
                    .add(new Word(way.word(), () -> {
                                notices.putAway(n);
                                way.act().run();
                            })
                            .styled("strong"));
        if (n.kind() != Notice.Kind.ASKED)
            line.getChildren().add(new Word("×", () -> notices.putAway(n)).named("put this away: " + n.text()));
        return line;
    }
}
