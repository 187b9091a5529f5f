package org.hazewright.desk.look;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Contrast by the Web Content Accessibility Guidelines 2.2 (W3C Recommendation, 2023): relative luminance and contrast ratio as they
 * define them; 4.5:1 for text (success criterion 1.4.3), 3:1 for what is needed to understand a graphic (1.4.11).
 */
class PaletteReferenceTest {
    private static double luminance(String hex) {
        double[] part = {0.2126, 0.7152, 0.0722};
        double sum = 0;
        for (int k = 0; k < 3; k++) {
            double c = Integer.parseInt(hex.substring(1 + 2 * k, 3 + 2 * k), 16) / 255.0;
            sum += part[k] * (c <= 0.04045 ? c / 12.92 : Math.pow((c + 0.055) / 1.055, 2.4));
        }
        return sum;
    }

    private static double contrast(String a, String b) {
        double la = luminance(a);
        double lb = luminance(b);
        return (Math.max(la, lb) + 0.05) / (Math.min(la, lb) + 0.05);
    }

    /** Ratios that the guidelines themselves and their techniques state: black on white 21, #767676 on white 4.54 (technique G18). */
    @ParameterizedTest
    @CsvSource({"#000000,#ffffff,21", "#767676,#ffffff,4.54", "#ffffff,#ffffff,1"})
    void theFormulaGivesPublishedRatios(String a, String b, double ratio) {
        assertEquals(ratio, contrast(a, b), 0.005, "two decimals are published");
    }

    @ParameterizedTest
    @ValueSource(booleans = {false, true})
    void lettersStandOutOnEveryGround(boolean dark) {
        Palette p = dark ? Palette.DARK : Palette.LIGHT;
        Map<String, String> letters = Map.of(
                "ink", p.ink(), "slate", p.slate(), "amber text", p.amberText(), "teal", p.teal(), "brick", p.brick());
        Map<String, String> grounds = Map.of("milk", p.milk(), "paper", p.paper(), "wash", p.wash());
        letters.forEach((letter, colour) -> grounds.forEach((ground, under) ->
                assertTrue(contrast(colour, under) >= 4.5, letter + " on " + ground + ": " + contrast(colour, under))));
        for (String share : p.shares())
            assertTrue(
                    contrast(p.slate(), share) >= 4.5,
                    "slate on the share " + share + ": " + contrast(p.slate(), share));
        assertTrue(contrast(p.ink(), p.tealSoft()) >= 4.5, "ink on a hint");
        assertTrue(contrast(p.milk(), p.ink()) >= 4.5, "letters of the button");
        assertTrue(contrast(p.milk(), p.teal()) >= 4.5, "tick on a done step");
    }

    @ParameterizedTest
    @ValueSource(booleans = {false, true})
    void linesOfGaugesAndCurvesStandOut(boolean dark) {
        Palette p = dark ? Palette.DARK : Palette.LIGHT;
        for (String line : new String[] {p.amber(), p.teal(), p.brick()})
            for (String under : new String[] {p.milk(), p.paper()})
                assertTrue(contrast(line, under) >= 3, line + " on " + under + ": " + contrast(line, under));
    }

    @Test
    void theStyleSheetIsToldEveryColour() {
        for (String name : new String[] {
            "-milk",
            "-paper",
            "-wash",
            "-line",
            "-ink",
            "-slate",
            "-amber",
            "-amber-text",
            "-teal",
            "-teal-soft",
            "-brick"
        }) assertTrue(Palette.LIGHT.css().contains(name + ":#"), name);
    }
}
