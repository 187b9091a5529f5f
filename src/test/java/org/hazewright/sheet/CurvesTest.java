package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.SplittableRandom;
import org.hazewright.bench.Answer;
import org.hazewright.picture.RoundStep;
import org.junit.jupiter.api.Test;

/** The spectra reach as far as every ingredient's figures and no further, and pass through the targets. */
class CurvesTest {

    @Test
    void gridCoversTheSharedRangeAndTheTargets() {
        Answer a = Answers.gelatin(); // the ink's table ends at 980 nm, all others reach 1100
        double[] nm = Curves.of(a).nm();
        assertEquals(400, nm[0]);
        assertEquals(980, nm[nm.length - 1]);
        for (double wanted : a.brief().wavelengthsNm())
            assertTrue(Arrays.binarySearch(nm, wanted) >= 0, wanted + " nm");
        for (int k = 1; k < nm.length; k++) assertTrue(nm[k] > nm[k - 1] && nm[k] - nm[k - 1] <= 10);
    }

    @Test
    void curvesPassThroughWhatIsPredicted() {
        Answer a = Answers.bath();
        Curves c = Curves.of(a);
        for (Answer.Predicted p : a.predicted()) {
            int j = Arrays.binarySearch(c.nm(), p.point().wavelengthNm());
            boolean mua = p.point().quantity() == org.hazewright.brief.Point.Quantity.MUA;
            assertEquals(p.perCm(), mua ? c.muaPerCm()[j] : c.muspPerCm()[j]);
            assertEquals(p.uPerCm(), mua ? c.uMuaPerCm()[j] : c.uMuspPerCm()[j], 1e-12);
        }
    }

    @Test
    void axisStepsAreRoundAndThreeToEight() {
        SplittableRandom random = new SplittableRandom(3);
        for (int k = 0; k < 2000; k++) {
            double top = Math.pow(10, 8 * random.nextDouble() - 4);
            double unit = RoundStep.over(top);
            double lines = top / unit;
            assertTrue(lines >= 3 && lines < 8, top + " by " + unit);
            double figure = unit / Math.pow(10, Math.floor(Math.log10(unit) + 1e-9));
            assertTrue(
                    Arrays.stream(new double[] {1, 2, 5}).anyMatch(f -> Math.abs(f - figure) < 1e-9), "step " + unit);
        }
    }

    @Test
    void aNarrowerCellTakesMoreLines() {
        String text =
                "Measure the finished phantom before relying on it: the prediction is as good as the figures of its"
                        + " ingredients, and Donaudampfschifffahrtsgesellschaftskapitän is a long word.";
        int before = 1;
        for (double width = 800; width > 20; width *= 0.9) {
            int lines = TextLines.count(text, 9, false, width);
            assertTrue(lines >= before, width + " pt");
            before = lines;
        }
        assertTrue(before > 20);
        assertEquals(3, TextLines.count("a\nb\nc", 9, false, 400));
    }
}
