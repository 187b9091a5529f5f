package org.hazewright.desk.model;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Optional;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Numbers as people and balances type them. */
class TypedTest {
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "0.108|0.108",
                "0,108|0.108",
                " .5 |0.5",
                "250 mL|250",
                "250ML|250",
                "1 250|1250",
                "1,250.5|1250.5",
                "−3|-3",
                "1e-3|0.001",
                "1'000|1000"
            })
    void readsNumbers(String text, double value) {
        assertEquals(value, Typed.number(text, "mL"));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {"0.1o", "abc", "1.2.3", "12 kg", "''", "1e999"})
    void refusesTheRestInWords(String text) {
        Refusal refusal = assertThrows(Refusal.class, () -> Typed.number(text, "mL"));
        assertTrue(refusal.getMessage().length() > 15, refusal.getMessage());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "11.502 g|11.502",
                "11,502 g|11.502",
                "11.502|11.502",
                "+    11.502 g|11.502",
                "N     11.502 g|11.502",
                "G S      11.502 g|11.502",
                "-  0.004 g|-0.004",
                "11502 mg|11.502",
                "0.0115 kg|11.5",
                "ST,+00011.502  g|11.502"
            })
    void readsWhatBalancesType(String text, double grams) {
        assertEquals(grams, Typed.grams(text).orElseThrow(), 1e-12);
    }

    @Test
    void anotherUnitOnTheBalanceIsRefused() {
        assertThrows(Refusal.class, () -> Typed.grams("11.502 ct"));
        assertEquals(Optional.empty(), Typed.grams("?"));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {"5 %|5 %", "5|5 %", "±3 %|3 %", "0.004|0.004", "0.5 /cm|0.5", "12.5 %|12.5 %"})
    void tolerancesAreSharesOrHalfWidths(String text, String shown) {
        assertEquals(shown, Allowed.typed(text).text());
    }
}
