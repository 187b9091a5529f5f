package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Tables of coefficients under the headings that people write: the unit is never guessed, and what was read is said. */
class CoefficientTableTest {
    @TempDir
    Path folder;

    private CoefficientTable read(String text) throws IOException {
        return CoefficientTable.read(Files.writeString(folder.resolve("t.csv"), text), null);
    }

    /** 1/mm = 10/cm, 1/m = 0.01/cm: the metric prefixes (BIPM, The International System of Units, 9th edition, table 7). */
    @ParameterizedTest
    @CsvSource(delimiter = '|', quoteCharacter = '~', textBlock = """
                    wavelength_nm,mua_per_cm         | 690   | 0.1   | 1/cm
                    nm,µa (cm⁻¹)                     | 690   | 0.1   | 1/cm
                    lambda/nm,mu_a [1/mm]            | 690   | 0.01  | 1/mm
                    Wavelength (µm),mua mm-1         | 0.69  | 0.01  | 1/mm
                    Wavelength [um],Absorption per mm| 0.69  | 0.01  | 1/mm
                    wavelength_um,mua_per_m          | 0.69  | 10    | 1/m
                    λ (nm),absorption coefficient 1/m| 690   | 10    | 1/m
                    """)
    void headingsSayTheUnit(String heading, String nm, String value, String unit) throws IOException {
        CoefficientTable table = read(heading + "\n" + nm + "," + value + "\n");
        assertEquals(690, table.rows().get(0).wavelengthNm(), 1e-9);
        assertEquals(0.1, table.rows().get(0).mua().getAsDouble(), 1e-12);
        assertTrue(
                table.understood().get(1).contains(" in " + unit),
                table.understood().toString());
    }

    @Test
    void decimalCommasAreReadWhereSemicolonsPartTheColumns() throws IOException {
        CoefficientTable.Row row =
                read("nm;mua /cm;musp /cm\n690,5;0,1;\n").rows().get(0);
        assertEquals(690.5, row.wavelengthNm());
        assertEquals(0.1, row.mua().getAsDouble());
        assertTrue(row.musp().isEmpty());
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "nm,mua_per_cm,musp_per_cm\n690,0,1,10\n| 4 cells and the heading has 3. If a comma stands inside a number",
                "nm,mua_per_cm\n0.69,0.1\n| If it is in µm, write that into the heading",
                "nm,mua_per_cm\n690 nm,0.1\n| The wavelength is \"690 nm\"",
                "nm,mua\n690,0.1\n| names no unit",
                "nm,mua (1/µm)\n690,0.1\n| names no unit",
                "nm,mua_per_cm per mm\n690,0.1\n| names two units",
                "nm,mua_per_cm\n690,0.1\n690,0.2\n| 690 nm stands in row 2 already",
            })
    void whatCouldBeReadTwoWaysIsRefused(String sample) {
        String[] parts = sample.split("[|] ");
        String said = assertThrows(Refusal.class, () -> read(parts[0])).getMessage();
        assertTrue(said.contains(parts[1]), said);
    }
}
