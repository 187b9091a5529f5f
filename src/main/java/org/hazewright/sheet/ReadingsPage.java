package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import org.hazewright.bench.Answer;
import org.hazewright.optics.Figures;
import org.hazewright.picture.Palette;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Quantity;
import org.hazewright.reading.Reading;
import org.hazewright.reading.SetUp;
import org.hazewright.reading.Spread;
import org.hazewright.transport.Medium;

/** What instruments will show on the recipe: a row for each reading, its wavelengths side by side, charts below, notes last. */
final class ReadingsPage {
    private static final int WHAT = 0;
    private static final int MM = 1;
    private static final int FIRST = 2;

    private final Page page;
    private final Answer answer;
    private final InstrumentReadings readings;
    private final List<Double> nm;
    private final List<String> notes = new ArrayList<>();
    private final int by;
    private final int trust;
    private int row;

    ReadingsPage(Page page, Answer answer, InstrumentReadings readings) {
        this.page = page;
        this.answer = answer;
        this.readings = readings;
        TreeSet<Double> all = new TreeSet<>();
        for (Foreseen f : readings.foreseen())
            for (Reading r : f.readings()) if (r.wavelengthNm() != null) all.add(r.wavelengthNm());
        this.nm = List.copyOf(all);
        this.by = FIRST + 2 * Math.max(1, nm.size());
        this.trust = by + 1;
    }

    void write() {
        int[] widths = new int[trust + 1];
        widths[WHAT] = 200;
        widths[MM] = 40;
        for (int c = FIRST; c < by; c++) widths[c] = (c - FIRST) % 2 == 0 ? 78 : 66;
        widths[by] = 150;
        widths[trust] = 96;
        page.columns(widths);
        page.text(0, 0, "Readings", Face.TITLE);
        page.height(0, 24);
        page.sentence(
                1,
                0,
                trust,
                answer.brief().title() + " · what instruments will show on it as planned" + body()
                        + ". ±: standard uncertainty (k = 1), from the recipe's budget.",
                Face.QUIET);
        page.text(2, WHAT, "", Face.HEAD);
        page.text(2, MM, "mm", Face.HEAD.right());
        for (int j = 0; j < nm.size(); j++) {
            page.text(2, FIRST + 2 * j, Figures.plain(nm.get(j)) + " nm", Face.HEAD.right());
            page.text(2, FIRST + 2 * j + 1, "±", Face.HEAD.right());
        }
        page.text(2, by, "by", Face.HEAD.indent());
        page.text(2, trust, "", Face.HEAD);
        row = 3;
        for (Foreseen f : readings.foreseen()) setUp(f);
        row++;
        row = new ReadingCharts(page, readings.foreseen(), trust).draw(row) + 1;
        for (int i = 0; i < notes.size(); i++)
            page.sentence(row++, 0, trust, "[" + (i + 1) + "] " + notes.get(i), Face.SMALL);
        for (String out : readings.leftOut()) page.sentence(row++, 0, trust, "Not here: " + out, Face.SMALL);
        page.sentence(row++, 0, trust, conventions(), Face.SMALL);
        var book = page.sheet.getWorkbook();
        book.setPrintArea(book.getSheetIndex(page.sheet), 0, trust, 0, row - 1);
        PrintSetup.onePage(page.sheet, false);
    }

    private String body() {
        return readings.phantom()
                .body()
                .map(b -> ", " + Figures.plain(b.thicknessMm()) + " mm thick as its mould")
                .orElse("");
    }

    private String conventions() {
        TreeSet<String> words = new TreeSet<>();
        for (Foreseen f : readings.foreseen())
            if (!f.setUp().distancesMm().isEmpty())
                words.add(f.setUp().convention().inWords());
        return words.isEmpty() ? "" : "Diffusion: " + String.join("; ", words) + ".";
    }

    private void setUp(Foreseen f) {
        page.text(row, 0, f.setUp().title() + geometry(f.setUp()), Face.SECTION);
        page.height(row++, 17);
        Map<String, List<Reading>> rows = new LinkedHashMap<>();
        for (Reading r : f.readings())
            if (r.curve() == null)
                rows.computeIfAbsent(r.quantity() + "@" + r.distanceMm(), k -> new ArrayList<>())
                        .add(r);
        rows.values().forEach(same -> reading(f, same));
    }

    private static String geometry(SetUp s) {
        String body = s.thicknessMm() == null ? "semi-infinite" : Figures.plain(s.thicknessMm()) + " mm thick";
        return s.kind() == SetUp.Kind.OXIMETER
                ? ""
                : " · " + body + ", n " + Figures.plain(s.outsideIndex()) + " outside";
    }

    private void reading(Foreseen f, List<Reading> same) {
        Reading first = same.get(0);
        Quantity q = first.quantity();
        page.text(row, WHAT, name(q), Face.TEXT);
        if (first.distanceMm() != null) page.number(row, MM, first.distanceMm(), Face.TEXT.right());
        boolean trusted = true;
        StringBuilder marks = new StringBuilder();
        for (Reading r : same) {
            int column = FIRST + (r.wavelengthNm() == null ? 0 : 2 * nm.indexOf(r.wavelengthNm()));
            if (r.value() == null) page.text(row, column, "none", Face.QUIET.right());
            else number(row, column, q, r.value(), r.u());
            trusted &= r.insideRange();
            String note = ownNote(r);
            if (note == null) continue;
            if (!notes.contains(note)) notes.add(note);
            String mark = "[" + (notes.indexOf(note) + 1) + "]";
            if (marks.indexOf(mark) < 0)
                marks.append(marks.length() == 0 ? "" : " ").append(mark);
        }
        String convention = ": " + f.setUp().convention().inWords();
        page.text(row, by, shortened(first.model().replace(convention, "")), Face.QUIET.indent());
        String word = trusted ? "" : "doubtful ";
        Face face = trusted ? Face.SMALL : Face.TEXT.ink(Palette.BRICK).bolder();
        page.text(row++, trust, word + marks, face);
        if (q == Quantity.APPARENT_MUA_PER_CM || q == Quantity.APPARENT_MUSP_PER_CM) trueValues(q, same);
    }

    private void trueValues(Quantity q, List<Reading> same) {
        boolean absorption = q == Quantity.APPARENT_MUA_PER_CM;
        page.text(row, WHAT, absorption ? "beside the true µa" : "beside the true µs'", Face.QUIET.indent());
        for (Reading r : same) {
            if (r.wavelengthNm() == null) continue;
            Medium m = readings.phantom().medium(r.wavelengthNm());
            Spread u = readings.phantom().spread(r.wavelengthNm());
            int column = FIRST + 2 * nm.indexOf(r.wavelengthNm());
            number(
                    row,
                    column,
                    q,
                    absorption ? m.muaPerCm() : m.muspPerCm(),
                    u == null ? null : (Double) (absorption ? u.uMuaPerCm() : u.uMuspPerCm()));
        }
        row++;
    }

    private void number(int row, int column, Quantity q, double value, Double u) {
        String format;
        if (q == Quantity.SATURATION) format = u != null && u > 0 && u < 0.0005 ? "0.00%" : "0.0%";
        else if (value != 0 && Math.abs(value) < 1e-3) format = "0.00E+00";
        else if (u != null && u > 0) format = Face.numberFormat(Figures.decimalsFor(u));
        else format = "0.0000";
        page.number(row, column, value, Face.TEXT.format(format).right());
        if (u != null && u > 0)
            page.number(row, column + 1, u, Face.QUIET.format(format).right());
    }

    private static String shortened(String model) {
        if (model.startsWith("least squares")) return "least squares";
        if (model.startsWith("diffusion fit")) return "fit of the curve";
        if (model.startsWith("slope over")) return "slope";
        if (model.startsWith("slopes of")) return "slopes";
        return model;
    }

    private static String ownNote(Reading r) {
        if (r.note() == null) return null;
        String rest = r.note().replaceFirst("^The true µ\\S+ is \\S+ /cm\\.\\s*", "");
        return rest.isEmpty() ? null : rest;
    }

    static String name(Quantity q) {
        return switch (q) {
            case SPECULAR_REFLECTANCE -> "specular reflectance";
            case DIFFUSE_REFLECTANCE -> "diffuse reflectance";
            case DIFFUSE_TRANSMITTANCE -> "diffuse transmittance";
            case UNSCATTERED_TRANSMITTANCE -> "unscattered transmittance";
            case TOTAL_REFLECTANCE -> "total reflectance";
            case TOTAL_TRANSMITTANCE -> "total transmittance";
            case REFLECTANCE_PER_MM2 -> "reflectance, /mm²";
            case ATTENUATION_DB -> "attenuation, dB";
            case MEAN_TIME_PS -> "mean time of flight, ps";
            case TIME_VARIANCE_PS2 -> "variance of times, ps²";
            case PHASE_DEG -> "phase lag, °";
            case MODULATION -> "modulation";
            case SATURATION -> "saturation";
            case HAEMOGLOBIN_UMOL_PER_L -> "haemoglobin, µmol/L";
            case APPARENT_MUA_PER_CM -> "apparent µa, /cm";
            case APPARENT_MUSP_PER_CM -> "apparent µs', /cm";
            case TIME_CURVE -> "curve";
        };
    }
}
