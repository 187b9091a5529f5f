package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Predicate;
import org.apache.poi.ss.util.CellRangeAddress;
import org.hazewright.optics.Figures;
import org.hazewright.picture.Palette;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Quantity;
import org.hazewright.reading.Reading;
import org.hazewright.reading.SetUp;

/** The charts of the readings, two by two, with the figures that they draw in columns to the right of the page. */
final class ReadingCharts {
    private static final int ROWS = 15;
    private static final double ROW_PT = 12;
    /** Most points of a time curve that are drawn. */
    private static final int TIMES = 150;

    private final Page page;
    private final List<Foreseen> foreseen;
    private final int lastColumn;
    private int dataColumn;
    private int drawn;
    private int top;

    ReadingCharts(Page page, List<Foreseen> foreseen, int lastColumn) {
        this.page = page;
        this.foreseen = foreseen;
        this.lastColumn = lastColumn;
        this.dataColumn = lastColumn + 3;
    }

    /** Draws from a row on and gives the row after the last chart. */
    int draw(int row) {
        top = row;
        Optional<Foreseen> slope = of(f -> f.setUp().kind() == SetUp.Kind.SLOPE);
        slope.or(() -> of(f -> f.setUp().kind() == SetUp.Kind.REFLECTANCE))
                .ifPresent(f -> distances(f, Quantity.REFLECTANCE_PER_MM2, "reflectance, /mm², over mm"));
        of(f -> f.setUp().kind() == SetUp.Kind.FREQUENCY)
                .ifPresent(f -> distances(f, Quantity.PHASE_DEG, "phase lag, °, over mm"));
        of(f -> f.setUp().kind() == SetUp.Kind.TIME).ifPresent(this::times);
        of(f -> f.setUp().kind() == SetUp.Kind.SLAB).ifPresent(this::slab);
        int last = top + (drawn + 1) / 2 * ROWS;
        for (int r = row; r < last; r++) page.height(r, ROW_PT);
        return last;
    }

    private Optional<Foreseen> of(Predicate<Foreseen> which) {
        return foreseen.stream().filter(which).findFirst();
    }

    private ReadingChart next(String title) {
        int middle = 4; // after the first wavelength: about half of the page's width
        int left = drawn % 2 == 0 ? 0 : middle;
        int right = drawn % 2 == 0 ? middle : lastColumn + 1;
        int from = top + drawn / 2 * ROWS;
        drawn++;
        return new ReadingChart(page.sheet, title, left, from, right, from + ROWS);
    }

    private void distances(Foreseen f, Quantity q, String what) {
        List<ReadingChart.Series> series = new ArrayList<>();
        double high = 0;
        double low = Double.MAX_VALUE;
        for (int w = 0; w < f.setUp().wavelengthsNm().size(); w++) {
            double nm = f.setUp().wavelengthsNm().get(w);
            List<Reading> line = at(f.line(), q, nm);
            List<Reading> points = at(f.readings(), q, nm);
            if (points.isEmpty()) continue;
            for (List<Reading> some : List.of(line, points))
                for (Reading r : some) {
                    high = Math.max(high, r.value());
                    low = Math.min(low, r.value());
                }
            int rows = Math.max(most(f.line(), q, f), most(f.readings(), q, f));
            if (!line.isEmpty()) series.add(column("", line, rows, Palette.ofWavelength(w), false));
            series.add(column(Figures.plain(nm) + " nm", points, rows, Palette.ofWavelength(w), true));
        }
        if (series.isEmpty()) return;
        double most = f.setUp().distancesMm().stream().mapToDouble(x -> x).max().orElse(1);
        ReadingChart chart = next(f.setUp().title() + ": " + what);
        if (q == Quantity.REFLECTANCE_PER_MM2)
            chart.scatter(
                    series,
                    0,
                    1.15 * most,
                    Math.pow(10, Math.floor(Math.log10(low))),
                    Math.pow(10, Math.ceil(Math.log10(high))),
                    true);
        else chart.scatter(series, 0, 1.15 * most, 0, 1.05 * high, false);
    }

    private static int most(List<Reading> all, Quantity q, Foreseen f) {
        return f.setUp().wavelengthsNm().stream()
                .mapToInt(nm -> at(all, q, nm).size())
                .max()
                .orElse(0);
    }

    private static List<Reading> at(List<Reading> all, Quantity q, double nm) {
        return all.stream()
                .filter(r -> r.quantity() == q && r.wavelengthNm() == nm && r.distanceMm() != null && r.value() != null)
                .toList();
    }

    private ReadingChart.Series column(String name, List<Reading> readings, int rows, String colour, boolean points) {
        double[] x = readings.stream().mapToDouble(Reading::distanceMm).toArray();
        double[] y = readings.stream().mapToDouble(Reading::value).toArray();
        return cells(name, "mm", x, y, rows, colour, points);
    }

    /**
     * Two columns of figures right of the page. All series of a chart take as many {@code rows}, the last of them empty: one
     * spreadsheet program puts points at 0 where a series is shorter than its neighbours.
     */
    private ReadingChart.Series cells(
            String name, String xName, double[] x, double[] y, int rows, String colour, boolean points) {
        page.text(0, dataColumn, xName, Face.HEAD.right());
        page.text(0, dataColumn + 1, name.isEmpty() ? "line" : name, Face.HEAD.right());
        for (int i = 0; i < x.length; i++) {
            page.number(i + 1, dataColumn, x[i], Face.QUIET);
            page.number(i + 1, dataColumn + 1, y[i], Face.QUIET);
        }
        var series = new ReadingChart.Series(
                name,
                new CellRangeAddress(1, rows, dataColumn, dataColumn),
                new CellRangeAddress(1, rows, dataColumn + 1, dataColumn + 1),
                colour,
                points);
        dataColumn += 2;
        return series;
    }

    private void times(Foreseen f) {
        List<ReadingChart.Series> series = new ArrayList<>();
        int last = 1;
        double high = 0;
        for (Reading r : f.readings()) {
            if (r.curve() == null) continue;
            double[] y = r.curve().y();
            double peak = 0;
            for (double v : y) peak = Math.max(peak, v);
            for (int i = last; i < y.length; i++) if (y[i] > 0.002 * peak) last = i;
            high = Math.max(high, peak);
        }
        int step = (last + TIMES - 1) / TIMES;
        int count = last / step + 1;
        String unit = "";
        double end = 1;
        for (Reading r : f.readings()) {
            if (r.curve() == null) continue;
            Reading.Curve c = r.curve();
            unit = c.yUnit();
            end = c.x()[last];
            double[] x = new double[count];
            double[] y = new double[count];
            for (int i = 0; i < count; i++) {
                x[i] = c.x()[i * step];
                y[i] = c.y()[i * step];
            }
            int w = f.setUp().wavelengthsNm().indexOf(r.wavelengthNm());
            String name = Figures.plain(r.wavelengthNm()) + " nm, " + Figures.plain(r.distanceMm()) + " mm";
            series.add(cells(name, "ps", x, y, count, Palette.ofWavelength(w), false));
        }
        if (series.isEmpty()) return;
        next(f.setUp().title() + ": " + unit + " over ps").scatter(series, 0, end, 0, 1.05 * high, false);
    }

    private void slab(Foreseen f) {
        List<ReadingChart.Series> series = new ArrayList<>();
        int names = dataColumn++;
        List<Quantity> shown = List.of(Quantity.TOTAL_REFLECTANCE, Quantity.TOTAL_TRANSMITTANCE);
        page.text(1, names, "reflected", Face.QUIET);
        page.text(2, names, "transmitted", Face.QUIET);
        for (int w = 0; w < f.setUp().wavelengthsNm().size(); w++) {
            double nm = f.setUp().wavelengthsNm().get(w);
            String name = Figures.plain(nm) + " nm";
            page.text(0, dataColumn, name, Face.HEAD.right());
            for (int i = 0; i < shown.size(); i++)
                for (Reading r : f.readings())
                    if (r.quantity() == shown.get(i) && r.wavelengthNm() == nm && r.value() != null)
                        page.number(i + 1, dataColumn, r.value(), Face.QUIET);
            series.add(new ReadingChart.Series(
                    name,
                    new CellRangeAddress(1, 2, names, names),
                    new CellRangeAddress(1, 2, dataColumn, dataColumn),
                    Palette.ofWavelength(w),
                    false));
            dataColumn++;
        }
        next(f.setUp().title() + ": share of the light").bars(series);
    }
}
