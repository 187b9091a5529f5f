package org.hazewright.shelf;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Spectrum;

/**
 * A second look at a shelf whose files all read well: figures that are allowed and still look wrong.
 *
 * <p>What it asks about: densities outside 0.6 to 6 g/mL; spectra that jump by more than a factor of {@value #JUMP} between
 * neighbours at most 20 nm apart, or at one row against both of its neighbours, however far they are; an uncertainty of 0 for a figure that is used, or one below 0.2 %; lots of an unknown ingredient
 * and lots past their date or drifting; conflicts with nobody; tables that end within the range people ask for most, 650 to 900 nm.
 */
public final class Inspection {
    static final double JUMP = 4;
    private static final double LEAST_DENSITY = 0.6;
    private static final double MOST_DENSITY = 6;

    private Inspection() {}

    /** One doubt about one ingredient. */
    public record Doubt(String ingredient, String sentence) {}

    public static List<Doubt> of(Shelf shelf, LocalDate today) {
        List<Doubt> doubts = new ArrayList<>();
        for (Ingredient i : shelf.ingredients()) {
            if (!i.isBlend() && (i.densityGPerMl() < LEAST_DENSITY || i.densityGPerMl() > MOST_DENSITY))
                doubts.add(new Doubt(
                        i.id(),
                        "a density of " + Figures.plain(i.densityGPerMl())
                                + " g/mL is unusual; is it in g/mL and not kg/m³?"));
            i.absorption().ifPresent(a -> {
                spectrum(i, a.table(), doubts);
                uncertainty(i, "absorption", i.uncertainty().absorption(), doubts);
            });
            i.scattering().ifPresent(s -> {
                if (s instanceof Scattering.Tabulated t) spectrum(i, t.musp(), doubts);
                uncertainty(i, "scattering", i.uncertainty().scattering(), doubts);
            });
            i.lot().ifPresent(lot -> {
                if (shelf.find(lot.of()).isEmpty())
                    doubts.add(
                            new Doubt(i.id(), "it is a lot of \"" + lot.of() + "\", which the shelf does not hold."));
                if (lot.expiredOn(today))
                    doubts.add(new Doubt(
                            i.id(),
                            "lot " + lot.number() + " is past its date, "
                                    + lot.expires().orElseThrow() + "."));
                lot.drift().ifPresent(d -> doubts.add(new Doubt(i.id(), "lot " + lot.number() + " is drifting: " + d)));
            });
            if (i.blend().isEmpty()
                    && i.absorption().isEmpty()
                    && i.scattering().isEmpty()
                    && i.part() != Part.MODIFIER)
                doubts.add(new Doubt(
                        i.id(),
                        "it neither absorbs nor scatters, so as " + i.part().word()
                                + " it does nothing; give it [absorption] or [scattering]."));
        }
        return doubts;
    }

    private static void spectrum(Ingredient i, Spectrum s, List<Doubt> doubts) {
        double[] nm = s.wavelengthsNm();
        double[] v = s.values();
        double most = 0;
        for (double x : v) most = Math.max(most, x);
        for (int k = 1; k < nm.length; k++) {
            double low = Math.min(v[k - 1], v[k]);
            double high = Math.max(v[k - 1], v[k]);
            boolean alone = k + 1 < nm.length
                    && (v[k] > JUMP * Math.max(v[k - 1], v[k + 1]) || JUMP * v[k] < Math.min(v[k - 1], v[k + 1]));
            if ((nm[k] - nm[k - 1] <= 20 || alone) && high > 0.02 * most && high > JUMP * low) {
                doubts.add(new Doubt(
                        i.id(),
                        s.name() + " jumps from " + Figures.significant(v[k - 1], 3) + " to "
                                + Figures.significant(v[k], 3) + " between " + Figures.plain(nm[k - 1]) + " and "
                                + Figures.plain(nm[k]) + " nm; is a digit missing?"));
                break;
            }
        }
        if (s.fromNm() > 650 || s.toNm() < 900)
            doubts.add(new Doubt(
                    i.id(),
                    s.name() + " covers " + Figures.plain(s.fromNm()) + " to " + Figures.plain(s.toNm())
                            + " nm only; briefs often ask for 650 to 900 nm."));
    }

    private static void uncertainty(Ingredient i, String what, double u, List<Doubt> doubts) {
        if (u < 0.002)
            doubts.add(new Doubt(
                    i.id(),
                    "its " + what + " is said to be known to " + Figures.significant(100 * u, 2)
                            + " %; few bottles are known better than 0.2 %."));
    }
}
