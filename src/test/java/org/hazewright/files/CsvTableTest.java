package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.file.Path;
import java.util.List;
import java.util.function.Consumer;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

class CsvTableTest {
    private static final Consumer<CsvTable> NOTHING = t -> {};

    @TempDir
    Path folder;

    @Test
    void readsColumnsByNameAroundCommentsAndBlankLines() {
        CsvTable table = CsvTable.read(Marked.write(
                folder.resolve("t.csv"),
                "# unit: nm, 1/cm\n\n wavelength_nm , mua_per_cm\r\n# more\n400, 1e-3\r\n 500 ,+.5\n600,-2.\n"));
        assertEquals(List.of("wavelength_nm", "mua_per_cm"), table.header());
        assertEquals(3, table.rows());
        assertArrayEquals(new double[] {400, 500, 600}, table.column("wavelength_nm"));
        assertArrayEquals(new double[] {1e-3, 0.5, -2}, table.column("mua_per_cm"));
        assertEquals(7, table.at(2).line());
    }

    @Test
    void aSpectrumIsLinearBetweenItsRows() {
        CsvTable table = CsvTable.read(Marked.write(folder.resolve("t.csv"), "wavelength_nm,n\n400,1\n500,2\n"));
        assertEquals(1.25, table.spectrum("n", "t").at(425), 1e-15);
    }

    static Stream<Arguments> refused() {
        return Stream.of(
                kind("", NOTHING, "The table is empty"),
                kind("# only words\n\n", NOTHING, "The table is empty"),
                kind("# c\n▶a,b\n", NOTHING, "no rows"),
                kind("a▶;b\n1;2\n", NOTHING, "semicolons", "commas between columns and decimal points"),
                kind("a▶\tb\n1\t2\n", NOTHING, "tabs"),
                kind("a,b\n1,2\n1▶;2\n", NOTHING, "A semicolon"),
                kind("a,b\n▶1,5,2,5\n", NOTHING, "4 cells and the header has 2", "decimal point"),
                kind("a,b\n▶1\n", NOTHING, "1 cells and the header has 2", "missing cells"),
                kind("a,b\n1,2\n3, ▶x \n", NOTHING, "b is \"x\" in this row", "0.125"),
                kind("a,b\n1,▶\n", NOTHING, "b is empty"),
                kind("a,b\n▶0x10,1\n", NOTHING, "a is \"0x10\""),
                kind("a,b\n▶1d,1\n", NOTHING, "a is \"1d\""),
                kind("a,b\n▶NaN,1\n", NOTHING, "a is \"NaN\""),
                kind("a,b\n▶\"1\",1\n", NOTHING, "without quotes"),
                kind("a,b\n▶1 nm,1\n", NOTHING, "without quotes or units"),
                kind("a,b\n▶1e999,1\n", NOTHING, "too large"),
                kind("a,b\n▶1e,1\n", NOTHING, "a is \"1e\""),
                kind("a,b\n▶.,1\n", NOTHING, "a is \".\""),
                kind("a,b\n▶-,1\n", NOTHING, "a is \"-\""),
                kind("a,▶a\n1,2\n", NOTHING, "Two columns are called a"),
                kind("a,▶\n1,2\n", NOTHING, "A column has no name"),
                kind("▶400,2\n410,3\n", NOTHING, "first row holds the number 400"),
                kind("▶" + "a,".repeat(70) + "b\n", NOTHING, "71 columns; at most 64"),
                kind("▶a,b\n1,2\n", t -> t.column("c"), "The column c is missing", "a, b"),
                kind(
                        "▶wavelenght_nm,b\n1,2\n",
                        t -> t.column("wavelength_nm"),
                        "Perhaps wavelenght_nm is to be renamed"),
                kind("▶a,mua_per_mm\n1,2\n", t -> t.refuseUnknown("a", "mua_per_cm"), "Perhaps mua_per_cm is meant"),
                kind("▶a,b\n1,2\n", t -> t.oneOf("c", "d"), "none of the columns c, d"),
                kind("▶a,b\n1,2\n", t -> t.oneOf("a", "b"), "2 of the columns a, b", "exactly one"),
                kind("a,b\n1,2\n▶1,-2\n", t -> t.refuseNegative("b"), "b is -2"),
                kind("wavelength_nm,b\n400,2\n▶400,3\n", t -> t.spectrum("b", "t"), "goes from 400 to 400", "ascend"),
                kind("wavelength_nm,b\n400,2\n▶390,3\n", t -> t.spectrum("b", "t"), "Sort the rows"),
                kind("wavelength_nm,b\n▶0,2\n390,3\n", t -> t.spectrum("b", "t"), "must be above 0"),
                kind("wavelength_nm,b\n▶400,2\n", t -> t.spectrum("b", "t"), "at least two"));
    }

    @ParameterizedTest
    @MethodSource
    void refused(String text, Consumer<CsvTable> asking, String[] words) {
        Path file = folder.resolve("t.csv");
        Marked.of(text).refusedAs(file, () -> asking.accept(CsvTable.read(file)), words);
    }

    @ParameterizedTest
    @ValueSource(strings = {"0", "-0", "1.", ".5", "+1.5", "1e5", "1E-5", "1.5e+05", "00012", "123456789.123456789"})
    void everyUsualWayToWriteANumberIsRead(String number) {
        CsvTable table = CsvTable.read(Marked.write(folder.resolve("t.csv"), "a\n" + number + "\n"));
        assertEquals(Double.parseDouble(number), table.column("a")[0]);
    }

    @Test
    void askedForColumnsMustAllBeThere() {
        Path file = folder.resolve("t.csv");
        Marked.of("▶a,b\n1,2\n")
                .refusedAs(file, () -> CsvTable.read(file, List.of("a", "b", "c")), "column c is missing");
        Marked.of("▶a,b\n1,2\n").refusedAs(file, () -> CsvTable.read(file, List.of("a")), "column b is not known");
    }

    @Test
    void moreThan200000RowsAreRefused() {
        Path file = folder.resolve("t.csv");
        Marked.of("a\n" + "1\n".repeat(200_000) + "▶1\n")
                .refusedAs(file, () -> CsvTable.read(file), "more than 200000 rows");
    }

    private static Arguments kind(String text, Consumer<CsvTable> asking, String... words) {
        return Arguments.of(text, asking, words);
    }
}
