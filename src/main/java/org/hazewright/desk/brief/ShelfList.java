package org.hazewright.desk.brief;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import javafx.geometry.Pos;
import javafx.geometry.VPos;
import javafx.scene.Node;
import javafx.scene.control.CheckBox;
import javafx.scene.control.Label;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.brief.SearchLimits;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.ErrorLine;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;

/** What the search may take from the shelf: a tick for each ingredient, and how many of a part at once. */
final class ShelfList extends VBox {
    private static final int SHORT = 8;

    private final Desk desk;
    private final VBox rows = new VBox();
    private final Label refused = Say.wrapped("", "error-line");
    private boolean all;
    private List<Object> drawn = List.of();

    ShelfList(Desk desk, Runnable openShelf) {
        this.desk = desk;
        getStyleClass().add("gap-s");
        rows.getStyleClass().add("gap-xs");
        HBox head = new HBox(
                Say.place("Shelf"), Say.spring(), new Word("look through", openShelf).named("look through the shelf"));
        head.setAlignment(Pos.BASELINE_LEFT);
        Say.show(refused, false);
        getChildren().addAll(head, rows, refused, limits());
        desk.edits().nowProperty().addListener((p, before, now) -> show());
        desk.solving().shownProperty().addListener((p, before, now) -> show());
        desk.shelfProperty().addListener((p, before, now) -> show());
        show();
    }

    private Node limits() {
        Field absorbers = count(
                () -> desk.edits().now().limits().maxAbsorbers(),
                text -> desk.editing().maxAbsorbers(text),
                "most absorbers");
        Field scatterers = count(
                () -> desk.edits().now().limits().maxScatterers(),
                text -> desk.editing().maxScatterers(text),
                "most scatterers");
        Field modifiers = count(
                () -> desk.edits().now().limits().maxModifiers(),
                text -> desk.editing().maxModifiers(text),
                "most modifiers");
        FlowPane line = new FlowPane(
                Say.quiet("at most"),
                together(absorbers, "absorbers,"),
                together(scatterers, "scatterers,"),
                together(modifiers, "modifiers"));
        line.getStyleClass().add("flow");
        line.setRowValignment(VPos.BASELINE);
        desk.edits()
                .nowProperty()
                .addListener((p, before, now) ->
                        List.of(absorbers, scatterers, modifiers).forEach(Field::refresh));
        return new VBox(line, new ErrorLine(absorbers, scatterers, modifiers));
    }

    private static HBox together(Field field, String word) {
        HBox box = new HBox(field, Say.quiet(word));
        box.setAlignment(Pos.BASELINE_LEFT);
        return box;
    }

    private Field count(
            java.util.function.IntSupplier value,
            java.util.function.Function<String, Optional<String>> take,
            String name) {
        return new Field(() -> desk.edits().now() == null ? "" : Integer.toString(value.getAsInt()), take, true)
                .named(name)
                .fitted(1);
    }

    private void show() {
        Draft draft = desk.edits().now();
        Optional<Shelf> shelf = desk.shelfProperty().get().shelf();
        if (draft == null || shelf.isEmpty()) {
            rows.getChildren().clear();
            drawn = List.of();
            return;
        }
        Shown shown = desk.solving().shownProperty().get();
        Set<String> inUse = new HashSet<>();
        Map<String, String> leftOut = Map.of();
        if (shown != null) {
            shown.recipe().massesG().keySet().forEach(i -> inUse.add(i.id()));
            leftOut = shown.answer().leftOut();
        }
        List<Object> now = List.of(draft.limits(), draft.bases(), inUse, leftOut, all, shelf.get(), draft.chosen());
        if (now.equals(drawn)) return;
        drawn = now;
        rows(draft, shelf.get(), inUse, leftOut);
    }

    private void rows(Draft draft, Shelf shelf, Set<String> inUse, Map<String, String> leftOut) {
        SearchLimits limits = draft.limits();
        Set<Family> families = new HashSet<>();
        Set<String> parts = new HashSet<>();
        for (String base : draft.bases())
            shelf.find(base).ifPresent(b -> {
                families.add(b.family());
                shelf.partsOf(b).keySet().forEach(i -> parts.add(i.id()));
            });
        List<Ingredient> can = new ArrayList<>();
        int others = 0;
        for (Ingredient i : shelf.ingredients()) {
            if (i.part() == Part.BASE || parts.contains(i.id())) continue;
            if (families.stream().noneMatch(i::mixesInto)) others++;
            else can.add(i);
        }
        List<Ingredient> first = new ArrayList<>(can);
        first.sort(Comparator.comparing((Ingredient i) -> !inUse.contains(i.id()))
                .thenComparing(i -> !ticked(limits, i.id()))
                .thenComparing(Ingredient::part)
                .thenComparing(Words::shortName));
        long worth = first.stream()
                .filter(i -> inUse.contains(i.id()) || ticked(limits, i.id()))
                .count();
        int count = all ? first.size() : (int) Math.min(first.size(), Math.max(3, Math.min(SHORT, worth)));
        rows.getChildren().clear();
        for (Ingredient i : first.subList(0, count)) rows.getChildren().add(row(i, limits, inUse, leftOut));
        FlowPane more = new FlowPane();
        more.getStyleClass().add("flow");
        more.setRowValignment(VPos.BASELINE);
        if (first.size() > count || all)
            more.getChildren().add(new Word(all ? "fewer" : (first.size() - count) + " more", () -> {
                all = !all;
                show();
            }));
        if (!limits.use().isEmpty() || !limits.avoid().isEmpty())
            more.getChildren().add(new Word("tick all", () -> say(desk.editing().allowAll())));
        if (others > 0)
            more.getChildren().add(Say.label(others + " do not mix into " + families(families), "quiet", "small"));
        rows.getChildren().add(more);
    }

    private static String families(Set<Family> families) {
        return families.stream()
                .map(Family::word)
                .sorted()
                .reduce((a, b) -> a + " or " + b)
                .orElse("it");
    }

    private static boolean ticked(SearchLimits l, String id) {
        return !l.avoid().contains(id) && (l.use().isEmpty() || l.use().contains(id));
    }

    private Node row(Ingredient i, SearchLimits limits, Set<String> inUse, Map<String, String> leftOut) {
        boolean ticked = ticked(limits, i.id());
        CheckBox tick = new CheckBox(Words.shortName(i));
        tick.setSelected(ticked);
        tick.setMnemonicParsing(false);
        tick.setMinWidth(0);
        HBox.setHgrow(tick, Priority.ALWAYS);
        tick.setMaxWidth(Double.MAX_VALUE);
        tick.setOnAction(e -> {
            Optional<String> wrong = desk.editing().allowIngredient(i.id(), tick.isSelected());
            if (wrong.isPresent()) tick.setSelected(ticked);
            say(wrong);
        });
        String reason = leftOut.get(i.id());
        boolean cannot = ticked && reason != null && !reason.equals("avoided");
        Label state;
        if (inUse.contains(i.id())) state = Say.label("in use", "lands");
        else if (cannot) state = Say.label(reason.length() > 22 ? "no figures here" : reason, "missed");
        else state = Say.label(ticked ? "allowed" : "left out", "quiet");
        state.getStyleClass().add("small");
        state.setMinWidth(Region.USE_PREF_SIZE);
        String tip = i.name() + (cannot ? "\n" + reason : "");
        tick.setTooltip(new Tooltip(tip));
        tick.setAccessibleText(Words.shortName(i) + ", " + state.getText());
        HBox row = new HBox(tick, state);
        row.getStyleClass().add("gap-s");
        row.setAlignment(Pos.BASELINE_LEFT);
        return row;
    }

    private void say(Optional<String> wrong) {
        refused.setText(wrong.map(w -> "✕ " + w).orElse(""));
        Say.show(refused, wrong.isPresent());
    }
}
