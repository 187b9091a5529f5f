package org.hazewright.desk.parts;

import java.util.Optional;
import java.util.function.Function;
import java.util.function.Supplier;
import javafx.beans.property.ReadOnlyStringProperty;
import javafx.beans.property.ReadOnlyStringWrapper;
import javafx.css.PseudoClass;
import javafx.scene.control.TextField;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.text.Text;

/**
 * A text that is edited where it stands: plain until it is pointed at or focused, taken while it is typed, said in words when it is wrong.
 *
 * <p>A live field takes every stroke that makes sense; what makes none is said when the field is left or Enter is pressed, and the last good
 * value holds meanwhile. Esc brings that value back.
 */
public final class Field extends TextField {
    private static final PseudoClass WRONG = PseudoClass.getPseudoClass("wrong");

    private final Supplier<String> value;
    private final Function<String, Optional<String>> take;
    private final boolean live;
    private final ReadOnlyStringWrapper error = new ReadOnlyStringWrapper("");
    private Runnable done = () -> {};
    private Optional<String> pending = Optional.empty();
    private boolean taking;
    private boolean showing;
    private boolean typed;

    /**
     * @param value the text of the value that holds
     * @param take tries a typed text; gives what is wrong with it
     * @param live whether each stroke is tried
     */
    public Field(Supplier<String> value, Function<String, Optional<String>> take, boolean live) {
        this.value = value;
        this.take = take;
        this.live = live;
        getStyleClass().add("field");
        StillCaret.in(this);
        textProperty().addListener((p, before, now) -> {
            if (showing) return;
            typed = true;
            if (this.live) attempt();
            else forget();
        });
        focusedProperty().addListener((p, before, now) -> {
            if (!now) leave();
        });
        setOnAction(e -> {
            leave();
            selectAll();
            done.run();
        });
        addEventFilter(KeyEvent.KEY_PRESSED, e -> {
            if (e.getCode() == KeyCode.ESCAPE && (typed || !error.get().isEmpty())) {
                typed = false;
                pending = Optional.empty();
                say("");
                put(value.get());
                selectAll();
                e.consume();
            }
        });
        refresh();
    }

    /** Called after Enter. */
    public Field onDone(Runnable run) {
        done = run;
        return this;
    }

    public Field named(String accessible) {
        setAccessibleText(accessible);
        return this;
    }

    public Field styled(String... classes) {
        getStyleClass().addAll(classes);
        return this;
    }

    public Field columns(int columns) {
        setPrefColumnCount(columns);
        return this;
    }

    /** As wide as its text, and no narrower than {@code least} letters. */
    public Field fitted(int least) {
        Runnable fit = () -> {
            Text measure = new Text(getText().isEmpty() && getPromptText() != null ? getPromptText() : getText());
            measure.setFont(getFont());
            double em = getFont().getSize();
            setPrefWidth(Math.ceil(
                    Math.max(least * em * 0.62, measure.getLayoutBounds().getWidth()) + 0.6 * em + 7));
        };
        textProperty().addListener((p, before, now) -> fit.run());
        fontProperty().addListener((p, before, now) -> fit.run());
        fit.run();
        return this;
    }

    /** What is wrong with the text, in words; empty when nothing is. */
    public ReadOnlyStringProperty errorProperty() {
        return error.getReadOnlyProperty();
    }

    /** Shows the value again after it changed elsewhere; what is being typed here is left alone. */
    public void refresh() {
        if (taking) return;
        String now = value.get();
        if (isFocused() && typed && pending.isPresent()) return;
        typed = false;
        pending = Optional.empty();
        say("");
        if (!now.equals(getText())) put(now);
    }

    private void put(String text) {
        showing = true;
        try {
            setText(text);
        } finally {
            showing = false;
        }
    }

    private void attempt() {
        taking = true;
        try {
            pending = take.apply(getText());
        } finally {
            taking = false;
        }
        if (pending.isEmpty()) say("");
    }

    private void forget() {
        pending = Optional.empty();
        say("");
    }

    private void leave() {
        if (typed && (!live || pending.isPresent())) attempt();
        if (pending.isPresent()) say(pending.get());
        else {
            typed = false;
            put(value.get());
            say("");
        }
    }

    private void say(String words) {
        error.set(words);
        pseudoClassStateChanged(WRONG, !words.isEmpty());
        setAccessibleHelp(words.isEmpty() ? null : words);
    }
}
