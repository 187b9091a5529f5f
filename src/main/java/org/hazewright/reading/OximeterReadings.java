package org.hazewright.reading;

import java.util.List;
import java.util.Locale;
import org.hazewright.optics.Refusal;

/** Haemoglobin-equivalent saturation and concentration from the phantom's true absorption. */
final class OximeterReadings {
    private OximeterReadings() {}

    static List<Reading> of(SetUp setUp, Foresight foresight) {
        Oximeter oximeter = foresight.oximeter();
        if (oximeter == null)
            throw new Refusal(
                    "The set-up \"" + setUp.title() + "\" reads haemoglobin, but no extinction table was given.");
        int n = setUp.wavelengthsNm().size();
        double[] nm = new double[n];
        double[] mua = new double[n];
        double[] u = new double[n];
        boolean known = true;
        for (int i = 0; i < n; i++) {
            nm[i] = setUp.wavelengthsNm().get(i);
            mua[i] = foresight.medium().apply(nm[i]).muaPerCm();
            Spread spread = foresight.spread().apply(nm[i]);
            known &= spread != null;
            u[i] = spread == null ? 0 : spread.uMuaPerCm();
        }
        Oximeter.Answer answer = oximeter.read(nm, mua, known ? u : new double[n]);
        boolean blood = answer.oxyUmolPerL() >= 0 && answer.deoxyUmolPerL() >= 0;
        String note = blood
                ? null
                : "No mixture of the two haemoglobins absorbs like this; a concentration comes out below 0.";
        if (n > 2) {
            String left = String.format(
                    Locale.ROOT, "Haemoglobin leaves %.2g /cm (root mean square) unexplained.", answer.residualPerCm());
            note = note == null ? left : note + " " + left;
        }
        String model = "least squares with " + oximeter.name();
        Answers answers = new Answers(setUp, null);
        answers.add(
                null,
                Quantity.SATURATION,
                answer.saturation(),
                known ? answer.uSaturation() : null,
                model,
                blood,
                note);
        answers.add(
                null,
                Quantity.HAEMOGLOBIN_UMOL_PER_L,
                answer.haemoglobinUmolPerL(),
                known ? answer.uHaemoglobinUmolPerL() : null,
                model,
                blood,
                note);
        return answers.all();
    }
}
