package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.time.LocalDate;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Quotes as in RFC 4180 (Common Format and MIME Type for CSV Files, 2005), section 2, rules 5 to 7; formulas made harmless. */
class CsvTextReferenceTest {
    private static String row(Object... cells) {
        return new CsvText().row(Arrays.asList(cells)).toString();
    }

    @Test
    void commasAndQuotesAreQuoted() {
        // Rule 7's own example: a quote within a field is doubled, the field quoted.
        assertEquals("aaa,\"b\"\"bb\",ccc\n", row("aaa", "b\"bb", "ccc"));
        assertEquals("aaa,\"b,bb\",ccc\n", row("aaa", "b,bb", "ccc"));
        assertEquals("zzz,yyy,xxx\n", row("zzz", "yyy", "xxx"));
    }

    @Test
    void aRowIsALineWhateverItsCellsHold() {
        assertEquals("\"one; two\",three\n", row("one\r\n two", "three\n"));
        assertEquals(",,\n", row(null, "", null));
    }

    @Test
    void numbersKeepTheirSignAndTakeAPoint() {
        assertEquals(
                "-0.5,10,1.0E-5,0.005,7,2026-03-02\n",
                row(-0.5, 10.0, 1e-5, 0.005000000000000001, 7, LocalDate.of(2026, 3, 2)));
    }

    /** Beginnings that spreadsheet programs take for a formula: common practice, and the full-width forms of the same signs. */
    @ParameterizedTest
    @ValueSource(strings = {"=1+2", "+1", "-1+x|' /C y'!A0", "@SUM(A1)", "\t=1", "  =1", "\r\n=1", "|x", "%x", "＝1"})
    void textThatWouldRunBeginsWithAnApostrophe(String evil) {
        assertEquals("'" + evil.strip() + ",x\n", row(evil, "x").replace("\"", ""));
    }

    @Test
    void plainTextIsNotMarked() {
        assertEquals(
                "µs' (690),—,1 % solution\n",
                new CsvText().row(List.of("µs' (690)", "—", "1 % solution")).toString());
    }
}
