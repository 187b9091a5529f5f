package org.hazewright.desk.model;

import java.util.Arrays;
import java.util.Optional;
import java.util.function.Supplier;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Tissue;
import org.hazewright.optics.Figures;
import org.hazewright.reading.HaemoglobinEquivalent;
import org.hazewright.sheet.InstrumentReadings;

/** What a recipe for a tissue-like brief comes to as blood, beside the composition that was asked for. */
public record AsBlood(HaemoglobinEquivalent is, Tissue asked) {

    /** Empty for a brief that names no tissue, and where its wavelengths are targets no more or cannot tell. */
    static Optional<AsBlood> of(Answer answer, Supplier<Tissue.Spectra> spectra) {
        double[] targets = answer.brief().wavelengthsNm();
        return answer.brief()
                .tissue()
                .filter(t -> Arrays.stream(t.wavelengthsNm()).allMatch(nm -> Arrays.binarySearch(targets, nm) >= 0))
                .flatMap(t -> InstrumentReadings.haemoglobin(answer, spectra).map(h -> new AsBlood(h, t)));
    }

    /** "Less the tissue's water and fat it absorbs like blood with 58 ± 3 µmol/L …" */
    public String sentence() {
        return "Less the tissue’s water and fat, it absorbs like blood with "
                + Figures.withUncertainty(is.umolPerL(), is.uUmolPerL()) + " µmol/L of haemoglobin, "
                + Figures.withUncertainty(100 * is.saturation(), 100 * is.uSaturation())
                + " % of it with oxygen. Asked for: " + Figures.plain(asked.haemoglobinUmolPerL()) + " µmol/L, "
                + Figures.significant(100 * asked.saturation(), 3).replaceFirst("\\.0+$", "") + " %.";
    }
}
