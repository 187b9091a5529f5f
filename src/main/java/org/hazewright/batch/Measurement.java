package org.hazewright.batch;

import java.time.LocalDate;
import java.util.List;
import org.hazewright.bench.Grams;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Method;
import org.hazewright.optics.Refusal;

/**
 * What was measured of a batch on one day with one instrument.
 *
 * @param instrument in the words of whoever measured; may be empty
 * @param correction how many corrections were in the vessel by then: 0 before the first
 */
public record Measurement(LocalDate on, Method method, String instrument, int correction, List<MeasuredValue> values) {
    public Measurement {
        values = List.copyOf(values);
        if (correction < 0) throw new Refusal("A measurement counts " + correction + " corrections; 0 or more.");
        if (values.isEmpty())
            throw new Refusal("The measurement of " + on + " has no values; give µa or µs' at one wavelength or more.");
        for (int i = 0; i < values.size(); i++)
            for (int k = 0; k < i; k++)
                if (values.get(i).quantity() == values.get(k).quantity()
                        && values.get(i).wavelengthNm() == values.get(k).wavelengthNm())
                    throw new Refusal("The measurement of " + on + " gives "
                            + values.get(i).quantity().sign() + " at "
                            + Grams.plain(values.get(i).wavelengthNm())
                            + " nm twice; keep one, or their mean.");
    }
}
