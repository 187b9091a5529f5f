package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.io.OutputStream;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.zip.ZipEntry;
import java.util.zip.ZipOutputStream;
import org.hazewright.cli.OneLine;
import org.hazewright.optics.Refusal;
import org.hazewright.sheet.FirstPage;
import org.hazewright.sheet.Logbook;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Files made to harm are refused with a word: what nests without end, what unpacks without end, what leads elsewhere. */
class HostileFilesTest {
    private static final String HEAD = "<?xml version=\"1.0\" encoding=\"UTF-8\"?>";
    private static final String TYPES = HEAD
            + "<Types xmlns=\"http://schemas.openxmlformats.org/package/2006/content-types\">"
            + "<Default Extension=\"rels\" ContentType=\"application/vnd.openxmlformats-package.relationships+xml\"/>"
            + "<Override PartName=\"/xl/workbook.xml\""
            + " ContentType=\"application/vnd.openxmlformats-officedocument.spreadsheetml.sheet.main+xml\"/>"
            + "<Override PartName=\"/xl/worksheets/sheet1.xml\""
            + " ContentType=\"application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml\"/></Types>";
    private static final String RELS = HEAD
            + "<Relationships xmlns=\"http://schemas.openxmlformats.org/package/2006/relationships\"><Relationship Id=\"r1\""
            + " Type=\"http://schemas.openxmlformats.org/officeDocument/2006/relationships/%s\" Target=\"%s\"/></Relationships>";
    private static final String MAIN = "http://schemas.openxmlformats.org/spreadsheetml/2006/main";
    private static final String BOOK = HEAD + "<workbook xmlns=\"" + MAIN
            + "\" xmlns:r=\"http://schemas.openxmlformats.org/officeDocument/2006/relationships\">"
            + "<sheets><sheet name=\"a\" sheetId=\"1\" r:id=\"r1\"/></sheets></workbook>";
    private static final String PAGE = "<worksheet xmlns=\"" + MAIN
            + "\"><sheetData><row r=\"1\"><c r=\"A1\" t=\"inlineStr\"><is><t>%s</t></is></c></row>"
            + "</sheetData></worksheet>";

    @TempDir
    Path folder;

    @ParameterizedTest
    @ValueSource(
            strings = {
                "x = %[",
                "x = %{a = ",
                "%[[",
                "x = %[{a = [",
                "%a.",
                "x = %[1, ",
                "%\"\"\"",
                "x = '''%'",
                "x = 1%0",
                "x = 1e9%9"
            })
    void nestingWithoutEnd(String pattern) throws IOException {
        int at = pattern.indexOf('%');
        String text = "format = 1\n" + pattern.substring(0, at)
                + pattern.substring(at + 1).repeat(200_000);
        for (String name : new String[] {"deep.brief.toml", "deep.recipe.toml"}) {
            Path file = Files.writeString(folder.resolve(name), text);
            refused(
                    name.contains("brief")
                            ? OneLine.run("design", file.toString())
                            : OneLine.run("predict", file.toString()));
        }
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "1e999999",
                "99999999999999999999999999",
                "1e308",
                "-1e308",
                "1e-400",
                "0x7fffffffffffffff",
                "nan",
                "inf"
            })
    void numbersBeyondReason(String number) throws IOException {
        String brief = Files.readString(Path.of("recipes-demo/wrist-bath.brief.toml"));
        for (String key : new String[] {"batch_ml", "wavelength_nm", "mua_per_cm", "musp_per_cm", "mua", "format"}) {
            Path file = Files.writeString(
                    folder.resolve("big.brief.toml"), brief.replaceAll("(?m)^" + key + " = .*$", key + " = " + number));
            OneLine ran = OneLine.run(
                    "design", file.toString(), "--out", folder.resolve("out").toString());
            assertTrue(ran.status() == 2 || ran.status() == 3, key + " = " + number + ": " + ran);
            if (ran.status() == 2) refused(ran);
        }
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "../../etc/passwd",
                "/etc/passwd",
                "spectra/../../secret.csv",
                "file:///etc/passwd",
                "spectra\\\\..\\\\x.csv",
                "\\u0000"
            })
    void aTableStaysInsideItsShelf(String table) throws IOException {
        Path shelf = shelfWith(table);
        Files.writeString(folder.resolve("secret.csv"), "wavelength_nm,mua_per_cm\n1,424242\n2,424242\n");
        OneLine ran = OneLine.run("ingredients", "check", shelf.toString());
        assertEquals(2, ran.status(), ran.toString());
        assertFalse(
                (ran.out() + ran.err()).contains("424242") || (ran.out() + ran.err()).contains("root:"),
                ran.toString());
    }

    @Test
    void linksAndDevices() throws IOException {
        assumeTrue(Files.exists(Path.of("/dev/zero")), "a system with devices and links");
        Path outside =
                Files.writeString(folder.resolve("secret.csv"), "wavelength_nm,mua_per_cm\n1,424242\n2,424242\n");
        for (Path to : new Path[] {outside, Path.of("/dev/zero"), Path.of("/proc/self/mem"), folder}) {
            Path shelf = shelfWith("spectra/link.csv");
            Files.deleteIfExists(shelf.resolve("spectra/link.csv"));
            Files.createSymbolicLink(shelf.resolve("spectra/link.csv"), to);
            OneLine ran = OneLine.run("ingredients", "check", shelf.toString());
            assertEquals(2, ran.status(), ran.toString());
            assertFalse((ran.out() + ran.err()).contains("424242"), ran.toString());
        }
        for (String command : new String[] {"design", "predict", "series", "correct"}) {
            refused(OneLine.run(command, "/dev/zero"));
            Path link = folder.resolve("endless." + (command.equals("predict") ? "recipe" : "brief") + ".toml");
            Files.deleteIfExists(link);
            refused(OneLine.run(
                    command,
                    Files.createSymbolicLink(link, Path.of("/dev/zero")).toString()));
        }
    }

    private Path shelfWith(String table) throws IOException {
        Path shelf = folder.resolve("shelf");
        Files.createDirectories(shelf.resolve("spectra"));
        Files.writeString(
                shelf.resolve("ink.toml"),
                "format = 1\nid = \"ink\"\nname = \"Ink\"\npart = \"absorber\"\nfamilies = [\"liquid\"]\nform = \"liquid\"\n"
                        + "density_g_per_ml = 1\n[source]\nbasis = \"invented\"\n[uncertainty]\nabsorption = 0.1\n"
                        + "[absorption]\ntable = \"" + table + "\"\n");
        return shelf;
    }

    @Test
    void thePlainWorkbookIsRead() throws IOException {
        assertEquals(
                "hello",
                FirstPage.cells(workbook(HEAD + PAGE.formatted("hello"), StandardCharsets.UTF_8))
                        .get(0)
                        .get(0));
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "<!DOCTYPE a [<!ENTITY b \"x\">]>",
                "<!DOCTYPE a [<!ENTITY b \"xxxxxxxxxx\"><!ENTITY c \"&b;&b;&b;&b;&b;&b;&b;&b;&b;&b;\">]>",
                "<!DOCTYPE a [<!ENTITY b SYSTEM \"file:///etc/passwd\">]>",
                "<!DOCTYPE a SYSTEM \"http://127.0.0.1:9/x.dtd\" [<!ENTITY b \"x\">]>"
            })
    void entitiesOfWorkbooks(String doctype) throws IOException {
        String late = "<!--" + " ".repeat(70_000) + "-->";
        for (Charset set : new Charset[] {StandardCharsets.UTF_8, StandardCharsets.UTF_16, StandardCharsets.UTF_16LE})
            for (String before : new String[] {"", late}) {
                String head = HEAD.replace("UTF-8", set == StandardCharsets.UTF_8 ? "UTF-8" : "UTF-16");
                Path file = workbook(head + before + doctype + PAGE.formatted("&b;"), set);
                Refusal said = assertThrows(Refusal.class, () -> FirstPage.cells(file), set + " " + doctype);
                Promise.wellSaid(said.getMessage(), "");
                assertFalse(said.getMessage().contains("root:"), said.getMessage());
            }
    }

    @Test
    void archivesThatBurst() throws IOException {
        Path file = folder.resolve("bomb.xlsx");
        byte[] zeros = new byte[1 << 20];
        try (ZipOutputStream zip = new ZipOutputStream(Files.newOutputStream(file))) {
            zip.putNextEntry(new ZipEntry("xl/workbook.xml"));
            zip.write(BOOK.getBytes(StandardCharsets.UTF_8));
            zip.putNextEntry(new ZipEntry("xl/sharedStrings.xml"));
            for (int i = 0; i < 300; i++) zip.write(zeros);
        }
        assertTrue(Files.size(file) < 1_000_000);
        wellRefused(file);
        Path many = folder.resolve("many.xlsx");
        try (ZipOutputStream zip = new ZipOutputStream(Files.newOutputStream(many))) {
            for (int i = 0; i < 5000; i++) zip.putNextEntry(new ZipEntry("xl/media/" + i));
        }
        wellRefused(many);
    }

    @Test
    void archivesWhosePartsLeadOutside() throws IOException {
        Path file = folder.resolve("outside.xlsx");
        Map<String, byte[]> parts = parts(HEAD + PAGE.formatted("x"), StandardCharsets.UTF_8);
        parts.put("../../outside.txt", new byte[] {'x'});
        parts.put("/tmp/hazewright-outside.txt", new byte[] {'x'});
        Files.write(file, Parts.packed(parts));
        Promise.refusesAtMost(() -> FirstPage.cells(file), "");
        assertFalse(Files.exists(folder.resolve("../../outside.txt")));
        assertFalse(Files.exists(Path.of("/tmp/hazewright-outside.txt")));
    }

    @Test
    void otherThingsThatAreNoWorkbook() throws IOException {
        byte[] whole = Parts.packed(parts(HEAD + PAGE.formatted("x"), StandardCharsets.UTF_8));
        Path file = folder.resolve("odd.xlsx");
        for (int keep = 0; keep < whole.length; keep += 37) {
            Files.write(file, java.util.Arrays.copyOf(whole, keep));
            wellRefused(file);
        }
        if (Files.exists(Path.of("/dev/zero"))) wellRefused(Path.of("/dev/zero"));
        wellRefused(folder);
    }

    @Test
    void rowsAndColumnsBeyondReason() throws IOException {
        for (String cell : new String[] {"XFD1048576", "ZZZZZ99999999", "A0", "-1", "\u00b5", ""}) {
            String page = "<worksheet xmlns=\"" + MAIN + "\"><sheetData><row><c r=\"" + cell
                    + "\"><v>1e999</v></c></row><row r=\"" + Integer.MAX_VALUE + "\"/></sheetData></worksheet>";
            Promise.refusesAtMost(() -> FirstPage.cells(workbook(HEAD + page, StandardCharsets.UTF_8)), cell);
        }
    }

    private void wellRefused(Path file) {
        Refusal said = assertThrows(Refusal.class, () -> FirstPage.cells(file));
        Promise.wellSaid(said.getMessage(), "");
    }

    private static void refused(OneLine ran) {
        assertEquals(2, ran.status(), ran.err());
        assertEquals("", ran.out());
        Promise.wellSaid(ran.err(), "");
    }

    private Path workbook(String sheet, Charset set) {
        try (OutputStream out = Files.newOutputStream(folder.resolve("made.xlsx"))) {
            out.write(Parts.packed(parts(sheet, set)));
        } catch (IOException e) {
            throw new java.io.UncheckedIOException(e);
        }
        return folder.resolve("made.xlsx");
    }

    private static Map<String, byte[]> parts(String sheet, Charset set) {
        Map<String, byte[]> parts = new LinkedHashMap<>();
        parts.put("[Content_Types].xml", TYPES.getBytes(StandardCharsets.UTF_8));
        parts.put(
                "_rels/.rels",
                RELS.formatted("officeDocument", "xl/workbook.xml").getBytes(StandardCharsets.UTF_8));
        parts.put("xl/workbook.xml", BOOK.getBytes(StandardCharsets.UTF_8));
        parts.put(
                "xl/_rels/workbook.xml.rels",
                RELS.formatted("worksheet", "worksheets/sheet1.xml").getBytes(StandardCharsets.UTF_8));
        parts.put("xl/worksheets/sheet1.xml", sheet.getBytes(set));
        return parts;
    }

    /** A page that the workbook names and does not hold: refused, where going on would write a logbook without it. */
    @Test
    void aLogbookWithoutOneOfItsPages() throws IOException {
        Seeds.lay(folder);
        Path whole = folder.resolve("logbook.xlsx");
        String part = "xl/_rels/workbook.xml.rels";
        String links = new String(Parts.of(whole).get(part), StandardCharsets.UTF_8);
        for (int page = 1; page <= 5; page++) {
            String without = links.replace("sheet" + page + ".xml", "sheet9.xml")
                    .replaceAll("<Relationship [^>]*sheet9[^>]*/>", "");
            assertNotEquals(links, without);
            Path book = Files.write(
                    folder.resolve("book.xlsx"),
                    Parts.replaced(whole, (part + "\n" + without).getBytes(StandardCharsets.UTF_8)));
            Refusal refusal = assertThrows(Refusal.class, () -> Logbook.batches(book));
            Promise.wellSaid(refusal.getMessage(), "");
        }
    }
}
