package org.hazewright.desk.balance;

import java.util.List;
import java.util.Optional;
import javafx.application.Platform;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.TextField;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.StackPane;
import javafx.scene.layout.VBox;
import org.hazewright.bench.Outlook;
import org.hazewright.bench.Step;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.Typed;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.StillCaret;
import org.hazewright.desk.parts.Word;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/** The view that takes the place of the others while someone stands at the balance. */
public final class BalanceView extends BorderPane {
    private final AtBalance weighing;
    private final Runnable finish;
    private final StepColumn column = new StepColumn();
    private final Label chance = Say.wrapped("", "lands");
    private final Label name = Say.wrapped("", "step-name");
    private final Label notes = Say.wrapped("", "step-notes");
    private final Label mind = Say.wrapped("", "step-mind");
    private final Label grams = Say.label("", "step-grams");
    private final Label sentence = Say.wrapped("", "step-sentence");
    private final BandGauge band = new BandGauge();
    private final TextField reads = new TextField();
    private final HBox readsBox;
    private final Label complaint = Say.wrapped("", "step-complaint");
    private final Label below = Say.label("", "quiet");
    private final AsMade asMade = new AsMade();
    private final Button go = new Button();

    /**
     * @param leave goes back to the desk, the weighing kept
     * @param finish is called when all is weighed and the person is done
     */
    public BalanceView(AtBalance weighing, Runnable leave, Runnable finish) {
        this.weighing = weighing;
        this.finish = finish;
        getStyleClass().add("balance-view");
        Label reading = Say.label("reads", "reads-label");
        grams.setMinWidth(USE_PREF_SIZE);
        reads.getStyleClass().setAll("text-input", "text-field", "reads");
        StillCaret.in(reads);
        reads.setAccessibleText("grams that the balance shows");
        HBox.setHgrow(reads, Priority.ALWAYS);
        readsBox = new HBox(reading, reads);
        readsBox.getStyleClass().add("reads-box");
        readsBox.setAlignment(Pos.CENTER_LEFT);
        go.getStyleClass().setAll("go");
        go.setOnAction(e -> enter());
        setTop(head(leave));
        setLeft(left());
        setCenter(centre());

        reads.textProperty().addListener((p, before, now) -> showBand());
        reads.setOnAction(e -> enter());
        weighing.nowProperty().addListener((p, before, now) -> show());
        weighing.bandProperty().addListener((p, before, now) -> showBand());
        weighing.complaintProperty().addListener((p, before, now) -> complain());
        weighing.outlookProperty().addListener((p, before, now) -> showOutlook(now));
        weighing.moreBaseProperty()
                .addListener((p, before, now) ->
                        showOutlook(weighing.outlookProperty().get()));
        addEventFilter(KeyEvent.KEY_PRESSED, e -> {
            if (e.getCode() == KeyCode.ESCAPE) {
                leave.run();
                e.consume();
            } else if (e.getCode() == KeyCode.BACK_SPACE && e.isShortcutDown()) {
                weighing.back();
                e.consume();
            } else if (e.getCode() == KeyCode.ENTER && !reads.isFocused() && !(e.getTarget() instanceof Button)) {
                enter();
                e.consume();
            }
        });
        show();
        showOutlook(weighing.outlookProperty().get());
    }

    private Node head(Runnable leave) {
        HBox head = new HBox(
                Say.label("At the balance", "title"),
                Say.quiet(weighing.plan().title()),
                Say.spring(),
                new Word("one step back", weighing::back).named("open the step before again"),
                Say.quiet("·"),
                new Word("Esc: back to the desk", leave));
        head.getStyleClass().addAll("head", "gap-m");
        head.setAlignment(Pos.BASELINE_LEFT);
        return head;
    }

    private Node left() {
        VBox.setVgrow(column, Priority.ALWAYS);
        VBox left = new VBox(column, chance);
        left.getStyleClass().addAll("place", "side-left", "step-column", "gap-m");
        return left;
    }

    private Node centre() {
        VBox big = new VBox(name, sentence, notes, mind, grams, band, readsBox, complaint, go, below);
        big.getStyleClass().add("step-centre");
        big.setAlignment(Pos.CENTER);
        for (Label l : List.of(name, notes, mind, sentence, complaint)) l.setAlignment(Pos.CENTER);
        VBox.setVgrow(big, Priority.ALWAYS);
        StackPane foot = new StackPane(asMade);
        foot.getStyleClass().addAll("place", "above");
        VBox all = new VBox(big, foot);
        return all;
    }

    private void enter() {
        if (weighing.nowProperty().get().over()) {
            finish.run();
            return;
        }
        if (weighing.enter(reads.getText())) reads.clear();
        else reads.selectAll();
        focusField();
    }

    /** Puts the cursor where the balance types. */
    public void focusField() {
        Platform.runLater(() -> {
            if (readsBox.isVisible()) reads.requestFocus();
            else go.requestFocus();
        });
    }

    /** The field that the balance types into. */
    public TextField field() {
        return reads;
    }

    private void show() {
        AtBalance.Now now = weighing.nowProperty().get();
        column.show(weighing);
        boolean over = now.over();
        boolean weighs = !over && now.line().weighs();
        Say.show(grams, weighs);
        Say.show(band, weighs);
        Say.show(readsBox, weighs);
        Say.show(sentence, !weighs);
        Say.show(name, weighs || over);
        Say.show(go, !weighs);
        if (over) showOver();
        else if (weighs) showWeighing(now.line());
        else showTask(now.line().step());
        showBand();
        complain();
        focusField();
    }

    private void showOver() {
        name.setText("Everything is weighed");
        Say.show(notes, false);
        Say.show(mind, false);
        sentence.setText(overWords());
        go.setText("Record this batch ⏎");
        below.setText("Ctrl+Backspace opens the last step again");
    }

    private String overWords() {
        Outlook o = weighing.outlookProperty().get();
        return o == null
                ? ""
                : Words.verdict(o).replace("this is the closest this shelf can come.", "see below where.");
    }

    private void showWeighing(AtBalance.Line line) {
        name.setText(line.name());
        Step step = line.step();
        String words = step.handling().isEmpty() ? "" : String.join(" ", step.handling());
        int count = weighing.loadCount();
        if (count > 1)
            words = "load " + (weighing.loads().size() + 1) + " of " + count + ", together "
                    + Words.grams(line.wantedG(), weighing.balance()) + " g. " + words;
        tell(words, step);
        grams.setText(Words.grams(weighing.loadWantedG(), weighing.balance()) + " g");
        below.setText("Enter: done, go on · the balance may type here");
    }

    private void tell(String words, Step step) {
        notes.setText(words.strip());
        Say.show(notes, !notes.getText().isEmpty());
        mind.setText(step.cautions().isEmpty() ? "" : "Mind: " + String.join(" ", step.cautions()));
        Say.show(mind, !mind.getText().isEmpty());
    }

    private void showTask(Step step) {
        sentence.setText(step.text());
        String facts = "";
        if (step.temperatureC().isPresent())
            facts += Figures.plain(step.temperatureC().getAsDouble()) + " °C";
        if (step.minutes().isPresent())
            facts += (facts.isEmpty() ? "" : " · ")
                    + Figures.plain(step.minutes().getAsDouble()) + " min";
        tell(facts + "  " + String.join(" ", step.handling()), step);
        go.setText("Done ⏎");
        below.setText("Enter: done, go on");
    }

    private void showBand() {
        AtBalance.Now now = weighing.nowProperty().get();
        if (now.over() || !now.line().weighs()) return;
        Optional<Double> read = Optional.empty();
        try {
            read = Typed.grams(reads.getText());
        } catch (Refusal other) {
            read = Optional.empty();
        }
        double sofar =
                weighing.loads().stream().mapToDouble(Double::doubleValue).sum();
        double rest = now.line().wantedG() - sofar - weighing.loadWantedG();
        Optional<AtBalance.Band> load = weighing.bandProperty()
                .get()
                .map(b -> new AtBalance.Band(
                        Math.max(0, b.lowG() - sofar - rest), Math.max(0, b.highG() - sofar - rest)));
        band.show(load, read, weighing.balance());
    }

    private void complain() {
        String words = weighing.complaintProperty().get();
        complaint.setText(words.isEmpty() ? "" : "✕ " + words);
        Say.show(complaint, !words.isEmpty());
    }

    private void showOutlook(Outlook o) {
        asMade.show(o);
        if (o == null) return;
        String words = o.meets()
                ? "Chance to land inside every tolerance: " + Words.times(o.chance()) + " in 100"
                : "✕ " + Words.outside(o.predicted());
        words += weighing.moreBaseProperty()
                .get()
                .map(g -> " " + Words.grams(g, weighing.balance()) + " g more "
                        + Words.inSentence(weighing.plan().base()) + " would bring every target inside.")
                .orElse("");
        chance.setText(words);
        chance.getStyleClass().setAll("label", o.meets() ? "lands" : "missed");
        if (weighing.nowProperty().get().over()) sentence.setText(overWords());
    }
}
