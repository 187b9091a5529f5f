package org.hazewright.desk;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.InputStream;
import java.io.OutputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.bench.Batch;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.Notice;
import org.hazewright.files.BriefReader;
import org.hazewright.files.BriefWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.files.TissueSpectra;
import org.hazewright.mixture.Recipe;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Files dropped on the window: each opens as what it is, and what is none of ours is said in words. */
class DropTest {
    @TempDir
    Path folder;

    private final PlannedChooser chooser = new PlannedChooser();
    private Window window;

    @BeforeEach
    void open() {
        window = Stagehand.open(folder.resolve("memory"), 1280, 800, Optional.of(bath()), Optional.of(chooser));
        Stagehand.untilSettled(window);
    }

    @AfterEach
    void close() {
        Stagehand.ui(() -> window.stage().close());
    }

    private Path bath() {
        Path file = folder.resolve("bath.brief.toml");
        if (!Files.exists(file))
            BriefWriter.write(
                    file,
                    BriefReader.readShipped("wrist-bath"),
                    List.of(),
                    TissueSpectra.of(null),
                    SafeFile.Overwrite.NEVER);
        return file;
    }

    private void drop(Path file) {
        assertTrue(Stagehand.onUi(() -> window.drop(List.of(file.toFile()))));
    }

    private String told(String strand) {
        Stagehand.until(
                "words",
                () -> window.desk().notices().all().stream()
                        .anyMatch(n -> n.strand().equals(strand)));
        return Stagehand.onUi(() -> window.desk().notices().all().stream()
                .filter(n -> n.strand().equals(strand))
                .map(Notice::text)
                .reduce("", (a, b) -> b));
    }

    private Batch made() {
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        return Stagehand.onUi(() ->
                window.desk().madeProperty().get().orElseThrow().batchProperty().get());
    }

    @Test
    void aBriefReplacesTheBriefAndIsSolved() {
        Path other = folder.resolve("slab.brief.toml");
        BriefWriter.write(
                other,
                BriefReader.readShipped("bench-slab"),
                List.of(),
                TissueSpectra.of(null),
                SafeFile.Overwrite.NEVER);
        drop(other);
        Stagehand.until("the brief", () -> window.desk().edits().now().name().equals("slab"));
        Stagehand.untilSettled(window);
        assertEquals(
                BriefReader.readShipped("bench-slab").title(),
                Stagehand.onUi(() ->
                        window.desk().solving().shownProperty().get().recipe().title()));
    }

    @Test
    void aRecipeBringsItsBriefOrBecomesOne() throws Exception {
        Stagehand.ui(() -> window.desk().editing().title("The same bath"));
        Stagehand.untilSettled(window);
        Recipe before = Stagehand.onUi(
                () -> window.desk().solving().shownProperty().get().recipe());
        Path recipe = folder.resolve("bath.recipe.toml");
        Stagehand.ui(() -> new Eyes(window).button("Copy grams").requestFocus());
        new Hand().press(javafx.scene.input.KeyCode.CONTROL, javafx.scene.input.KeyCode.S);
        Stagehand.until("saved", () -> Files.exists(recipe));
        Path alone = Files.createDirectory(folder.resolve("elsewhere")).resolve("found.recipe.toml");
        Files.copy(recipe, alone);
        drop(alone);
        assertTrue(told("open").contains("No brief beside found.recipe.toml"), told("open"));
        Stagehand.untilSettled(window);
        Recipe now = Stagehand.onUi(
                () -> window.desk().solving().shownProperty().get().recipe());
        assertEquals(
                before.massesG().keySet().stream().map(i -> i.id()).sorted().toList(),
                now.massesG().keySet().stream().map(i -> i.id()).sorted().toList(),
                "what is weighed is kept to");
    }

    @Test
    void aBatchOpensAsTheBatchThatItIs() {
        Stagehand.ui(() -> window.desk().standAtBalance());
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        Stagehand.ui(() -> {
            AtBalance at = window.desk().weighingProperty().get().orElseThrow();
            while (!at.nowProperty().get().over()) {
                AtBalance.Line line = at.nowProperty().get().line();
                at.enter(line.weighs() ? at.loadWantedG() + " g" : "");
            }
            window.desk().finishWeighing();
        });
        Batch weighed = made();
        Path file = folder.resolve(weighed.id() + ".batch.toml");
        assertTrue(Files.exists(file), "no file of the batch beside the brief");
        Stagehand.ui(() -> window.desk().leaveBatch());
        drop(file);
        assertEquals(weighed.weighedG(), made().weighedG());
    }

    private Path sheet() {
        Path sheet = folder.resolve("bath.xlsx");
        chooser.next(sheet);
        Stagehand.ui(() -> new Eyes(window).button("Save sheet").fire());
        Stagehand.until("the sheet", () -> Files.exists(sheet));
        return sheet;
    }

    /** Types grams into the cells to fill in as a person would: half a per cent over the plan, which stands to the left. */
    private static int fill(Path sheet) throws Exception {
        int filled = 0;
        try (InputStream in = Files.newInputStream(sheet);
                XSSFWorkbook workbook = new XSSFWorkbook(in)) {
            AreaReference area = new AreaReference(
                    workbook.getName("weighed_g").getRefersToFormula(), workbook.getSpreadsheetVersion());
            for (CellReference ref : area.getAllReferencedCells()) {
                Row row = workbook.getSheet(ref.getSheetName()).getRow(ref.getRow());
                Cell plan = row == null ? null : row.getCell(ref.getCol() - 1);
                if (plan == null) continue;
                double grams = switch (plan.getCellType()) {
                    case NUMERIC, FORMULA -> plan.getNumericCellValue();
                    default -> 0;
                };
                if (!(grams > 0)) continue;
                row.getCell(ref.getCol(), Row.MissingCellPolicy.CREATE_NULL_AS_BLANK)
                        .setCellValue(Math.round(grams * 1005) / 1000.0);
                filled++;
            }
            try (OutputStream out = Files.newOutputStream(sheet)) {
                workbook.write(out);
            }
        }
        return filled;
    }

    @Test
    void aSheetThatWasFilledInBecomesABatch() throws Exception {
        Path sheet = sheet();
        int filled = fill(sheet);
        drop(sheet);
        Batch batch = made();
        assertEquals(
                filled, batch.weighedG().stream().filter(g -> g.isPresent()).count());
        for (int k = 0; k < batch.weighings().size(); k++)
            assertEquals(
                    batch.weighings().get(k).massG() * 1.005,
                    batch.weighedG().get(k).orElseThrow(),
                    6e-4,
                    "grams as typed, rounded to the balance");
    }

    @Test
    void aSheetOfAnotherRecipeIsSaidInWords() throws Exception {
        Path sheet = sheet();
        fill(sheet);
        drop(folder.resolve("none.brief.toml")); // what is not there is said as well
        assertTrue(told("open").contains("none.brief.toml"), told("open"));
        Path other = folder.resolve("slab.brief.toml");
        BriefWriter.write(
                other,
                BriefReader.readShipped("bench-slab"),
                List.of(),
                TissueSpectra.of(null),
                SafeFile.Overwrite.NEVER);
        drop(other);
        Stagehand.until("the brief", () -> window.desk().edits().now().name().equals("slab"));
        Stagehand.untilSettled(window);
        drop(sheet);
        String words = told("open");
        assertTrue(words.contains("bath.xlsx"), words);
        assertFalse(words.contains("Exception"), words);
        assertTrue(Stagehand.onUi(() -> window.desk().madeProperty().get().isEmpty()));
    }

    @ParameterizedTest
    @ValueSource(strings = {"holiday.mp3", "notes.docx", "recipe", "cat.png"})
    void whatIsNoneOfOursIsSaidInWordsAndNothingMoves(String name) throws Exception {
        Path file = folder.resolve(name);
        Files.write(file, new byte[] {1, 2, 3, 4});
        Recipe before = Stagehand.onUi(
                () -> window.desk().solving().shownProperty().get().recipe());
        drop(file);
        String words = told("open");
        assertTrue(words.contains(name) && words.contains(".brief.toml"), words);
        assertEquals(
                before,
                Stagehand.onUi(
                        () -> window.desk().solving().shownProperty().get().recipe()));
    }

    /** Names that promise one of ours, with something else inside. */
    @ParameterizedTest
    @ValueSource(strings = {"torn.brief.toml", "torn.recipe.toml", "torn.batch.toml", "torn.xlsx", "torn.csv"})
    void aTornFileIsSaidInWords(String name) throws Exception {
        Path file = folder.resolve(name);
        Files.write(file, new byte[] {'P', 'K', 3, 4, 0, (byte) 0xff, (byte) 0xfe, '\n'});
        drop(file);
        String words = told("open");
        assertTrue(words.contains(name), words);
        assertFalse(words.contains("Exception") || words.contains("null"), words);
    }
}
