package org.hazewright.desk.brief;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.Collectors;
import javafx.geometry.Pos;
import javafx.geometry.VPos;
import javafx.scene.Node;
import javafx.scene.control.CheckMenuItem;
import javafx.scene.control.Menu;
import javafx.scene.control.MenuButton;
import javafx.scene.control.ScrollPane;
import javafx.scene.control.SeparatorMenuItem;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Mould;
import org.hazewright.brief.Point;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.ErrorLine;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;

/** The place Brief. */
public final class BriefPlace extends VBox {
    private final Desk desk;
    private final List<Field> fields = new ArrayList<>();
    private final MenuButton base = new MenuButton();
    private final Word balance = new Word("", () -> {});
    private final Word inHand = new Word("", () -> {});
    private final TargetTable table;
    private final TissuePanel tissuePanel;
    private final VBox balancePanel = new VBox();
    private List<Object> offered = List.of();

    public BriefPlace(Desk desk, Runnable openShelf) {
        this.desk = desk;
        getStyleClass().addAll("place", "side-left");
        table = new TargetTable(desk);
        TissuePanel tissue = new TissuePanel(desk);
        Say.show(tissue, false);
        tissuePanel = tissue;
        Word fromTissue = new Word("from tissue-like values…", this::openTissue);
        VBox all = new VBox(particulars(), table, adding(fromTissue), tissue, new ShelfList(desk, openShelf));
        all.getStyleClass().add("gap-l");
        ScrollPane scroll = new ScrollPane(all);
        scroll.setFitToWidth(true);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        VBox.setVgrow(scroll, Priority.ALWAYS);
        getStyleClass().add("gap-m");
        getChildren().addAll(Say.place("Brief"), scroll);
        desk.edits().nowProperty().addListener((p, before, now) -> show(now));
        desk.shelfProperty().addListener((p, before, now) -> show(desk.edits().now()));
        show(desk.edits().now());
    }

    private Field field(
            Function<Draft, String> value, Function<String, Optional<String>> take, String name, int least) {
        Field f = new Field(
                        () -> desk.edits().now() == null
                                ? ""
                                : value.apply(desk.edits().now()),
                        take,
                        true)
                .named(name)
                .fitted(least)
                .onDone(() -> desk.editing().settle());
        fields.add(f);
        return f;
    }

    private Node particulars() {
        GridPane grid = new GridPane();
        grid.getStyleClass().add("particulars");
        base.getStyleClass().setAll("menu-word", "value");
        grid.addRow(0, Say.quiet("Base"), base);

        Field batch = field(
                d -> Figures.significant(d.batchMl(), 6)
                        .replaceFirst("(\\.\\d*?)0+$", "$1")
                        .replaceFirst("\\.$", ""),
                desk.editing()::batchMl,
                "batch in mL",
                2);
        Field overage = field(d -> percent(d.overage()), desk.editing()::overage, "extra share in per cent", 1);
        HBox amount = new HBox(batch, Say.label("mL +"), overage, Say.label("% extra"));
        amount.setAlignment(Pos.BASELINE_LEFT);
        grid.addRow(1, Say.quiet("Batch"), amount);
        MouldPanel moulds = new MouldPanel(desk);
        Say.show(moulds, false);
        Word filling = new Word("", () -> Say.show(moulds, !moulds.isVisible()));
        filling.getStyleClass().add("small");
        filling.setMinWidth(0);
        desk.edits()
                .nowProperty()
                .addListener((p, before, now) -> filling.setText(
                        now == null || now.moulds().isEmpty() ? "for moulds…" : "for " + moulds(now.moulds())));
        grid.add(filling, 1, 2);
        grid.add(moulds, 0, 8, 2, 1);
        grid.add(new ErrorLine(batch, overage), 0, 3, 2, 1);

        Field temperature =
                field(d -> Figures.plain(d.temperatureC()), desk.editing()::temperatureC, "temperature in °C", 2);
        HBox warmth = new HBox(temperature, Say.label("°C"));
        warmth.setAlignment(Pos.BASELINE_LEFT);
        grid.addRow(4, Say.quiet("Used at"), warmth);
        grid.add(new ErrorLine(temperature), 0, 5, 2, 1);

        balance.setOnAction(e -> Say.show(balancePanel, !balancePanel.isVisible()));
        balance.getStyleClass().add("strong-text");
        grid.addRow(6, Say.quiet("Balance"), balance);
        balancePanel();
        grid.add(balancePanel, 0, 7, 2, 1);

        StockPanel stocks = new StockPanel(desk);
        Say.show(stocks, false);
        inHand.setOnAction(e -> Say.show(stocks, !stocks.isVisible()));
        inHand.getStyleClass().add("strong-text");
        inHand.setMinWidth(0);
        grid.addRow(9, Say.quiet("Stocks"), inHand);
        grid.add(stocks, 0, 10, 2, 1);
        return grid;
    }

    private static String percent(double share) {
        return Figures.plain(new java.math.BigDecimal(100 * share)
                .round(new java.math.MathContext(6))
                .doubleValue());
    }

    private static String moulds(List<Mould> moulds) {
        return moulds.stream()
                .map(m -> m.count() + (m.shape() == Mould.Shape.BOX ? " box" : " cylinder")
                        + (m.count() > 1 ? m.shape() == Mould.Shape.BOX ? "es " : "s " : " ")
                        + (m.shape() == Mould.Shape.BOX
                                ? Figures.plain(m.lengthMm()) + " × " + Figures.plain(m.widthMm()) + " × "
                                        + Figures.plain(m.heightMm())
                                : "⌀ " + Figures.plain(m.lengthMm()) + " × " + Figures.plain(m.heightMm()))
                        + " mm")
                .collect(Collectors.joining(", "));
    }

    private void balancePanel() {
        balancePanel.getStyleClass().addAll("soft-box", "gap-s");
        GridPane grid = new GridPane();
        grid.getStyleClass().add("form");
        ask(grid, "last digit", d -> d.balance().readabilityG(), desk.editing()::readability);
        ask(grid, "standard uncertainty", d -> d.balance().standardUncertaintyG(), desk.editing()::balanceUncertainty);
        ask(grid, "smallest load", d -> d.balance().smallestLoadG(), desk.editing()::smallestLoad);
        ask(grid, "capacity", d -> d.balance().capacityG(), desk.editing()::capacity);
        balancePanel.getChildren().add(grid);
        Say.show(balancePanel, false);
    }

    private void ask(
            GridPane grid, String what, Function<Draft, Double> value, Function<String, Optional<String>> take) {
        Field f = field(d -> Figures.plain(value.apply(d)), take, "balance: " + what + " in g", 6)
                .styled("boxed");
        int at = grid.getRowCount();
        grid.addRow(at, Say.quiet(what), f, Say.label("g", "quiet", "small"));
        grid.add(new ErrorLine(f), 0, at + 1, 3, 1);
    }

    private Node adding(Word fromTissue) {
        Field more = new Field(
                        () -> "",
                        text -> text.isBlank()
                                ? Optional.empty()
                                : desk.editing()
                                        .addWavelength(
                                                text,
                                                desk.solving().curvesProperty().get()),
                        false)
                .named("add a wavelength in nm")
                .styled("quiet");
        more.setPromptText("+ wavelength");
        more.fitted(8);
        FlowPane line = new FlowPane(more, fromTissue);
        line.getStyleClass().add("flow");
        line.setRowValignment(VPos.BASELINE);
        return new VBox(line, new ErrorLine(more));
    }

    private void show(Draft draft) {
        if (draft == null) return;
        fields.forEach(Field::refresh);
        Balance b = draft.balance();
        balance.setText(small(b.readabilityG()) + ", " + small(b.smallestLoadG()) + " to "
                + Figures.plain(b.capacityG()) + " g");
        balance.setAccessibleText("Balance: last digit " + small(b.readabilityG()) + ", smallest load "
                + small(b.smallestLoadG()) + ", capacity " + Figures.plain(b.capacityG()) + " g; press to change");
        inHand.setText(StockPanel.inWords(draft));
        inHand.setAccessibleText("Stocks in hand: " + inHand.getText() + "; press to change");
        Optional<Shelf> shelf = desk.shelfProperty().get().shelf();
        String names = draft.bases().stream()
                .map(id -> shelf.flatMap(s -> s.find(id)).map(Words::shortName).orElse(id))
                .collect(Collectors.joining(" or "));
        base.setText(names);
        base.setAccessibleText("Base: " + names + "; press to choose");
        List<Object> choice = List.of(draft.bases(), shelf);
        if (!choice.equals(offered)) shelf.ifPresent(s -> bases(draft, s));
        offered = choice;
    }

    private void bases(Draft draft, Shelf shelf) {
        List<Ingredient> bases = shelf.ingredients().stream()
                .filter(i -> i.part() == Part.BASE)
                .sorted(Comparator.comparing((Ingredient i) -> i.family()).thenComparing(Words::shortName))
                .toList();
        base.getItems().clear();
        Menu also = new Menu("try several");
        for (Ingredient i : bases) {
            boolean ticked = draft.bases().contains(i.id());
            base.getItems().add(item(i, ticked, () -> desk.editing().onlyBase(i.id())));
            also.getItems().add(item(i, ticked, () -> desk.editing().toggleBase(i.id())));
        }
        base.getItems().addAll(new SeparatorMenuItem(), also);
    }

    private CheckMenuItem item(Ingredient i, boolean ticked, Runnable act) {
        CheckMenuItem item = new CheckMenuItem(Words.shortName(i));
        item.setMnemonicParsing(false);
        item.setSelected(ticked);
        item.setOnAction(e -> {
            item.setSelected(ticked); // the draft decides
            act.run();
        });
        return item;
    }

    private static String small(double g) {
        return g < 1
                ? Figures.plain(new java.math.BigDecimal(1000 * g)
                                .round(new java.math.MathContext(6))
                                .doubleValue()) + " mg"
                : Figures.plain(g) + " g";
    }

    /** Opens or closes the panel that fills the table from a composition. */
    public void openTissue() {
        Say.show(tissuePanel, !tissuePanel.isVisible());
    }

    /** Puts the cursor where a wish can be typed. */
    public void focusFirst() {
        table.focusFirst();
    }

    /** The field of a wanted value, for a test to type in. */
    public Field wantedField(double nm, Point.Quantity q) {
        return table.wantedField(nm, q);
    }
}
