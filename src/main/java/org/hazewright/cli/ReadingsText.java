package org.hazewright.cli;

import java.io.PrintWriter;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.hazewright.optics.Figures;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Phantom;
import org.hazewright.reading.Quantity;
import org.hazewright.reading.Reading;
import org.hazewright.reading.SetUp;
import org.hazewright.reading.Spread;
import org.hazewright.transport.Medium;

/** Readings as a person reads them: a table for each set-up, a plain word where a model is not to be trusted, notes below. */
final class ReadingsText {
    private static final int WIDTH = 100;

    private final Phantom phantom;
    private final Shared.Units units;
    private final PrintWriter out;

    ReadingsText(Phantom phantom, Shared.Units units, PrintWriter out) {
        this.phantom = phantom;
        this.units = units;
        this.out = out;
    }

    /** What the light meets: the true coefficients at the wavelengths of the set-ups. */
    void medium(List<Double> wavelengthsNm) {
        TextTable table = new TextTable("  ", "rrrrr");
        String unit = " " + units.sign();
        table.row("nm", "true µa" + unit, "true µs'" + unit, "g", "n");
        for (double nm : wavelengthsNm) {
            Medium m = phantom.medium(nm);
            Spread u = phantom.spread(nm);
            table.row(
                    phantom.isRecipe() ? Figures.plain(nm) : "any",
                    amount(units.of(m.muaPerCm()), u == null ? null : (Double) units.of(u.uMuaPerCm())),
                    amount(units.of(m.muspPerCm()), u == null ? null : (Double) units.of(u.uMuspPerCm())),
                    Figures.fixed(m.g(), 3),
                    Figures.fixed(m.n(), 4));
            if (!phantom.isRecipe()) break;
        }
        table.print(out);
    }

    void print(Foreseen foreseen) {
        out.println();
        out.println(foreseen.setUp().title() + where(foreseen.setUp()));
        List<String> notes = new ArrayList<>();
        TextTable table = new TextTable("  ", "rrlllll");
        boolean distances = foreseen.readings().stream().anyMatch(r -> r.distanceMm() != null);
        table.row("nm", distances ? "mm" : "", "", "", "", "by", "");
        for (Reading r : foreseen.readings()) row(table, r, foreseen.setUp(), notes);
        table.print(out);
        for (int i = 0; i < notes.size(); i++) wrapped("  [" + (i + 1) + "] ", notes.get(i));
        String convention = foreseen.setUp().convention().inWords();
        if (foreseen.readings().stream().anyMatch(r -> r.model().contains(": " + convention)))
            wrapped("  ", "diffusion: " + convention + ".");
    }

    /** Once, at the end. */
    void legend(boolean doubtful) {
        out.println();
        out.println("±: standard uncertainty (k = 1), the recipe's and, by packets, that of counting them");
        if (doubtful) wrapped("", "DOUBTFUL: the model is not to be trusted there; the note says why.");
    }

    private static String where(SetUp s) {
        if (s.kind() == SetUp.Kind.OXIMETER) return "";
        String body = s.thicknessMm() == null ? "semi-infinite" : Figures.plain(s.thicknessMm()) + " mm thick";
        String modulated = s.modulationMhz() == null ? "" : ", " + Figures.plain(s.modulationMhz()) + " MHz";
        return " (" + body + ", n " + Figures.plain(s.outsideIndex()) + " outside" + modulated + ")";
    }

    private void row(TextTable table, Reading r, SetUp setUp, List<String> notes) {
        String note = ownNote(r);
        String mark = "";
        if (note != null) {
            if (!notes.contains(note)) notes.add(note);
            mark = "[" + (notes.indexOf(note) + 1) + "]";
        }
        table.row(
                r.wavelengthNm() == null || !phantom.isRecipe() ? "" : Figures.plain(r.wavelengthNm()),
                r.distanceMm() == null ? "" : Figures.plain(r.distanceMm()),
                name(r.quantity()),
                value(r),
                besideTrue(r),
                r.model().replace(": " + setUp.convention().inWords(), ""),
                (r.insideRange() ? "" : "DOUBTFUL ") + mark);
    }

    static String name(Quantity q) {
        return switch (q) {
            case SPECULAR_REFLECTANCE -> "specular reflectance";
            case DIFFUSE_REFLECTANCE -> "diffuse reflectance";
            case DIFFUSE_TRANSMITTANCE -> "diffuse transmittance";
            case UNSCATTERED_TRANSMITTANCE -> "unscattered transmittance";
            case TOTAL_REFLECTANCE -> "total reflectance";
            case TOTAL_TRANSMITTANCE -> "total transmittance";
            case REFLECTANCE_PER_MM2 -> "reflectance";
            case ATTENUATION_DB -> "attenuation";
            case MEAN_TIME_PS -> "mean time of flight";
            case TIME_VARIANCE_PS2 -> "variance of times";
            case PHASE_DEG -> "phase lag";
            case MODULATION -> "modulation";
            case SATURATION -> "saturation";
            case HAEMOGLOBIN_UMOL_PER_L -> "haemoglobin";
            case APPARENT_MUA_PER_CM -> "apparent µa";
            case APPARENT_MUSP_PER_CM -> "apparent µs'";
            case TIME_CURVE -> "curve";
        };
    }

    private String value(Reading r) {
        if (r.curve() != null) return curve(r.curve());
        if (r.value() == null) return "none";
        boolean coefficient = isCoefficient(r.quantity());
        double scale = coefficient ? units.of(1) : r.quantity() == Quantity.SATURATION ? 100 : 1;
        String unit = coefficient ? units.sign() : unit(r.quantity());
        String text = amount(scale * r.value(), r.u() == null ? null : (Double) (scale * r.u()));
        return unit.isEmpty() ? text : text + " " + unit;
    }

    static String unit(Quantity q) {
        return switch (q) {
            case REFLECTANCE_PER_MM2 -> "/mm²";
            case TIME_VARIANCE_PS2 -> "ps²";
            case PHASE_DEG -> "°";
            case HAEMOGLOBIN_UMOL_PER_L -> "µmol/L";
            case SATURATION -> "%";
            default -> q.unit().equals("1") ? "" : q.unit();
        };
    }

    private static boolean isCoefficient(Quantity q) {
        return q == Quantity.APPARENT_MUA_PER_CM || q == Quantity.APPARENT_MUSP_PER_CM;
    }

    private static String curve(Reading.Curve c) {
        int peak = 0;
        for (int i = 0; i < c.y().length; i++) if (c.y()[i] > c.y()[peak]) peak = i;
        return c.x().length + " points, peak at " + Figures.plain(c.x()[peak]) + " " + c.xUnit();
    }

    /** "12.4 ± 0.6"; very small and very large values with one power of ten for both. */
    static String amount(double value, Double u) {
        double size = Math.abs(value);
        if (size > 0 && (size < 1e-3 || size >= 1e6)) {
            int power = (int) Math.floor(Math.log10(size));
            double ten = Math.pow(10, power);
            boolean known = u != null && u > 0;
            String digits = known ? "(" + amount(value / ten, u / ten) + ")" : Figures.significant(value / ten, 4);
            return digits + "e" + power;
        }
        if (u == null || u == 0 || !Double.isFinite(u)) return Figures.significant(value, 4);
        if (u >= 10) {
            double step = Math.pow(10, Math.floor(Math.log10(u)) - 1);
            return Figures.plain(Math.rint(value / step) * step) + " ± " + Figures.plain(Math.rint(u / step) * step);
        }
        return Figures.withUncertainty(value, u);
    }

    /** The true coefficient and how far the method is off it. */
    private String besideTrue(Reading r) {
        if (r.value() == null || r.wavelengthNm() == null || !isCoefficient(r.quantity())) return "";
        Medium m = phantom.medium(r.wavelengthNm());
        double is = r.quantity() == Quantity.APPARENT_MUA_PER_CM ? m.muaPerCm() : m.muspPerCm();
        String off = is == 0 ? "" : percent(100 * (r.value() / is - 1));
        return "true " + Figures.significant(units.of(is), 4) + off;
    }

    private static String percent(double off) {
        String text = String.format(Locale.ROOT, "%+.1f %%", off);
        return " (" + (text.equals("-0.0 %") ? "+0.0 %" : text.replace('-', '−')) + ")";
    }

    /** The note without the true value, which stands beside the apparent one. */
    private static String ownNote(Reading r) {
        if (r.note() == null || !isCoefficient(r.quantity())) return r.note();
        String rest = r.note().replaceFirst("^The true µ\\S+ is \\S+ /cm\\.\\s*", "");
        return rest.isEmpty() ? null : rest;
    }

    private void wrapped(String head, String text) {
        StringBuilder line = new StringBuilder(head);
        boolean first = true;
        for (String word : text.split(" ")) {
            if (!first && line.length() + 1 + word.length() > WIDTH) {
                out.println(line);
                line = new StringBuilder(" ".repeat(head.length()));
                first = true;
            }
            if (!first) line.append(' ');
            line.append(word);
            first = false;
        }
        out.println(line);
    }
}
