package org.hazewright.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.OutputStream;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Everything out as CSV, as a person asks for it: a logbook with what people added to it, a batch, a recipe, its spectra. */
class BatchExportTest {
    @TempDir
    Path folder;

    private Path logbook;

    private record Ran(int status, String out, String err) {}

    private static Ran run(String... args) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int status = Hazewright.run(new PrintWriter(out), new PrintWriter(err), args);
        return new Ran(status, out.toString(), err.toString());
    }

    private String file(String name) {
        return folder.resolve(name).toString();
    }

    @BeforeEach
    void twoBatches() throws IOException {
        Files.copy(Path.of("recipes-demo/made/wrist-bath.recipe.toml"), folder.resolve("bath.recipe.toml"));
        for (String id : List.of("b-1", "b-2")) {
            Ran open =
                    run("batch", "open", file("bath.recipe.toml"), "--id", id, "--who", "=1+2", "--on", "2026-03-02");
            assertEquals(0, open.status(), open.err());
        }
        Ran weigh = run("batch", "weigh", file("b-1.batch.toml"), "--item", "1", "--grams", "0.5");
        assertEquals(0, weigh.status(), weigh.err());
        Ran measure = run(
                "batch", "measure", file("b-1.batch.toml"), "--method", "slab, fit", "--value", "690,0.101,0.002,,");
        assertEquals(0, measure.status(), measure.err());
        logbook = folder.resolve("logbook.xlsx");
    }

    private List<String> lines(String name) throws IOException {
        return Files.readAllLines(folder.resolve("tables").resolve(name));
    }

    private Ran export() {
        return run("batch", "export", logbook.toString(), "--out", file("tables"));
    }

    @Test
    void everyTableGoesOut() throws IOException {
        Ran ran = export();
        assertEquals(0, ran.status(), ran.err());
        List<String> batches = lines("logbook-batches.csv");
        assertEquals(3, batches.size(), "headings and two batches");
        assertTrue(batches.get(0).startsWith("batch,date,title,base,who,state,wanted_per_cm,"), batches.get(0));
        assertTrue(batches.get(1).startsWith("b-1,2026-03-02,Wrist oximeter bath,water,'=1+2,"), batches.get(1));
        List<String> values = lines("logbook-values.csv");
        assertEquals(2, values.size());
        assertTrue(values.get(0).contains(",wavelength_nm,quantity,")
                && values.get(0).contains(",u_measured_per_cm,"));
        assertTrue(values.get(1).contains(",0.101,0.002,") && values.get(1).contains(",\"slab, fit\","), values.get(1));
        assertTrue(lines("logbook-lots.csv").get(0).startsWith("ingredient_and_lot,batches,"));
    }

    @Test
    void whatPeopleAddedGoesOutToo() throws IOException {
        try (var in = Files.newInputStream(logbook);
                XSSFWorkbook book = new XSSFWorkbook(in)) {
            XSSFSheet sheet = book.getSheet("Batches");
            int last = sheet.getRow(3).getLastCellNum();
            sheet.getRow(3).createCell(last).setCellValue("room");
            sheet.getRow(4).createCell(last).setCellValue("=2+2, \"cold\"");
            XSSFSheet own = book.createSheet("Our notes, 2026");
            own.createRow(1).createCell(1).setCellValue("lamp changed");
            own.getRow(1).createCell(2).setCellValue(3.5);
            book.createSheet("Empty");
            try (OutputStream out = Files.newOutputStream(logbook)) {
                book.write(out);
            }
        }
        assertEquals(0, export().status());
        List<String> batches = lines("logbook-batches.csv");
        assertTrue(batches.get(0).endsWith(",room"), batches.get(0));
        assertTrue(batches.get(1).endsWith(",\"'=2+2, \"\"cold\"\"\""), batches.get(1));
        assertEquals(List.of(",,", ",lamp changed,3.5"), lines("logbook-page-our-notes-2026.csv"));
        assertFalse(Files.exists(folder.resolve("tables/logbook-page-empty.csv")));
    }

    @Test
    void aTableOfBeforeIsKeptAndThePersonTold() throws IOException {
        assertEquals(0, export().status());
        assertFalse(export().out().contains("previous"), "the same again replaces nothing");
        Path table = folder.resolve("tables/logbook-batches.csv");
        Files.writeString(table, "mine\n");
        Ran again = export();
        assertTrue(again.out().contains("kept as logbook-batches.csv.previous"), again.out());
        assertEquals("mine\n", Files.readString(folder.resolve("tables/logbook-batches.csv.previous")));
    }

    @Test
    void recordsThatWaitBesideTheLogbookAreTold() throws IOException {
        Files.writeString(folder.resolve(".~lock.logbook.xlsx#"), "somebody");
        assertEquals(
                4,
                run("batch", "weigh", file("b-2.batch.toml"), "--item", "1", "--grams", "0.5")
                        .status());
        Ran ran = export();
        assertEquals(0, ran.status());
        assertTrue(ran.err().contains("1 record waits beside the logbook"), ran.err());
    }

    @Test
    void whatIsNoLogbookIsRefusedInOneSentence() throws IOException {
        Files.copy(Path.of("recipes-demo/made/wrist-bath.xlsx"), folder.resolve("sheet.xlsx"));
        Files.createDirectory(folder.resolve("dir.xlsx"));
        for (String name : new String[] {"missing.xlsx", "sheet.xlsx", "b-1.batch.toml", "dir.xlsx"}) {
            Ran ran = run("batch", "export", file(name), "--out", file("tables"));
            assertEquals(2, ran.status(), name);
            assertTrue(ran.err().contains(name), ran.err());
            assertTrue(ran.err().strip().lines().count() == 1, ran.err());
            assertEquals("", ran.out());
        }
        assertFalse(Files.exists(folder.resolve("tables")));
    }

    /** What the tables say is what the program prints for other programs. */
    @Test
    void aRecipeGoesOutAsItsGramsAndItsSpectra() throws IOException {
        Ran ran = run(
                "predict",
                file("bath.recipe.toml"),
                "--at",
                "690,830",
                "--csv",
                file("spectra.csv"),
                "--grams-csv",
                file("grams.csv"),
                "--json");
        assertEquals(0, ran.status(), ran.err());
        List<?> rows = (List<?>)
                com.fasterxml.jackson.jr.ob.JSON.std.mapFrom(ran.out()).get("rows");
        List<String> spectra = Files.readAllLines(folder.resolve("spectra.csv"));
        assertEquals("wavelength_nm,mua_per_cm,u_mua_per_cm,musp_per_cm,u_musp_per_cm,mus_per_cm,g,n", spectra.get(0));
        for (int r = 0; r < 2; r++) {
            String[] names = spectra.get(0).split(",");
            String[] cells = spectra.get(r + 1).split(",");
            var row = (java.util.Map<?, ?>) rows.get(r);
            for (int c = 0; c < names.length; c++) {
                double told = ((Number) row.get(names[c])).doubleValue();
                assertEquals(told, Double.parseDouble(cells[c]), 1e-11 * told, names[c]); // twelve digits are written
            }
        }
        List<String> grams = Files.readAllLines(folder.resolve("grams.csv"));
        assertEquals("number,what,ingredient,lot,into_stock,mass_g,concentration_g_per_ml", grams.get(0));
        long masses = Files.readAllLines(folder.resolve("bath.recipe.toml")).stream()
                .filter(l -> l.matches("(mass_g|ingredient_g|diluent_g) .*"))
                .count();
        assertEquals(masses, grams.size() - 1, "every mass of the file is a row");
    }
}
