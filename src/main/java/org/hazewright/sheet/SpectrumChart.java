package org.hazewright.sheet;

import java.util.List;
import java.util.Locale;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.xddf.usermodel.PresetLineDash;
import org.apache.poi.xddf.usermodel.XDDFColor;
import org.apache.poi.xddf.usermodel.XDDFLineProperties;
import org.apache.poi.xddf.usermodel.XDDFNoFillProperties;
import org.apache.poi.xddf.usermodel.XDDFPresetLineDash;
import org.apache.poi.xddf.usermodel.XDDFShapeProperties;
import org.apache.poi.xddf.usermodel.XDDFSolidFillProperties;
import org.apache.poi.xddf.usermodel.chart.AxisCrosses;
import org.apache.poi.xddf.usermodel.chart.AxisPosition;
import org.apache.poi.xddf.usermodel.chart.AxisTickMark;
import org.apache.poi.xddf.usermodel.chart.ChartTypes;
import org.apache.poi.xddf.usermodel.chart.MarkerStyle;
import org.apache.poi.xddf.usermodel.chart.ScatterStyle;
import org.apache.poi.xddf.usermodel.chart.XDDFChartAxis;
import org.apache.poi.xddf.usermodel.chart.XDDFDataSourcesFactory;
import org.apache.poi.xddf.usermodel.chart.XDDFNumericalDataSource;
import org.apache.poi.xddf.usermodel.chart.XDDFScatterChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFValueAxis;
import org.apache.poi.xddf.usermodel.text.XDDFTextBody;
import org.apache.poi.xssf.usermodel.XSSFChart;
import org.apache.poi.xssf.usermodel.XSSFClientAnchor;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.hazewright.bench.Answer.Predicted;
import org.hazewright.brief.Point.Quantity;
import org.hazewright.optics.Figures;
import org.hazewright.picture.Palette;
import org.hazewright.picture.RoundStep;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTErrBars;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTNumData;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTNumDataSource;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTNumRef;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTNumVal;
import org.openxmlformats.schemas.drawingml.x2006.chart.STErrBarType;
import org.openxmlformats.schemas.drawingml.x2006.chart.STErrDir;
import org.openxmlformats.schemas.drawingml.x2006.chart.STErrValType;

/**
 * A native chart of one spectrum: the prediction as a line with its 95 % band as thin dashes, targets as diamonds with brackets
 * as tall as their tolerance. Lines carry explicit properties, without which some spreadsheet programs draw none.
 */
final class SpectrumChart {
    private static final double HEADROOM = 2.5;

    private final SpectraPage spectra;
    private final Quantity quantity;

    SpectrumChart(SpectraPage spectra, Quantity quantity) {
        this.spectra = spectra;
        this.quantity = quantity;
    }

    void draw(XSSFSheet on, int col1, int row1, int col2, int row2) {
        XSSFClientAnchor anchor = new XSSFClientAnchor(0, 0, 0, 0, col1, row1, col2, row2);
        XSSFChart chart = on.createDrawingPatriarch().createChart(anchor);
        chart.setTitleText(
                quantity == Quantity.MUA ? "absorption µa, 1/cm, over nm" : "reduced scattering µs', 1/cm, over nm");
        chart.setTitleOverlay(false);
        type(chart.getTitle().getBody(), 8, true, Palette.INK);
        chart.getOrAddShapeProperties().setLineProperties(line(Palette.RULE, 0.75));

        XDDFValueAxis x = chart.createValueAxis(AxisPosition.BOTTOM);
        XDDFValueAxis y = chart.createValueAxis(AxisPosition.LEFT);
        double[] nm = spectra.curves().nm();
        double step = nm[nm.length - 1] - nm[0] > 250 ? 100 : 50;
        x.setMinimum(Math.floor(nm[0] / step) * step);
        x.setMaximum(Math.ceil(nm[nm.length - 1] / step) * step);
        x.setMajorUnit(step);
        x.setNumberFormat("0");
        double top = top();
        double unit = RoundStep.over(top);
        y.setMinimum(0.0);
        y.setMaximum(Math.ceil(top / unit) * unit);
        y.setMajorUnit(unit);
        y.setNumberFormat(Face.numberFormat(Figures.decimalsFor(unit * 10)));
        y.getOrAddMajorGridProperties().setLineProperties(line(Palette.RULE, 0.5));
        for (XDDFChartAxis axis : List.of(x, y)) {
            axis.getOrAddShapeProperties().setLineProperties(line(Palette.QUIET, 0.75));
            axis.setMajorTickMark(AxisTickMark.OUT);
            axis.setMinorTickMark(AxisTickMark.NONE);
            axis.getOrAddTextProperties().setFontSize(7d);
            axis.getOrAddTextProperties().setFillProperties(solid(Palette.QUIET));
        }
        x.setCrosses(AxisCrosses.MIN);
        y.setCrosses(AxisCrosses.MIN);

        XDDFScatterChartData data = (XDDFScatterChartData) chart.createData(ChartTypes.SCATTER, x, y);
        data.setStyle(ScatterStyle.LINE_MARKER);
        data.setVaryColors(false);
        int first = quantity == Quantity.MUA ? 1 : 4;
        curve(data, first + 1, "95 % from", Palette.TEAL, 0.5, true);
        curve(data, first + 2, "95 % to", Palette.TEAL, 0.5, true);
        curve(data, first, "predicted", Palette.TEAL, 1.75, false);
        if (!spectra.points(quantity).isEmpty()) targets(data);
        chart.plot(data);
        chart.getCTChart().getPlotArea().getScatterChartArray(0).getSerList().forEach(s -> {
            if (!s.isSetSmooth()) s.addNewSmooth();
            s.getSmooth().setVal(false);
        });
    }

    private void curve(
            XDDFScatterChartData data, int column, String name, String colour, double widthPt, boolean dashed) {
        var series =
                (XDDFScatterChartData.Series) data.addSeries(cells(spectra.curve(0)), cells(spectra.curve(column)));
        series.setTitle(name, null);
        series.setSmooth(false);
        series.setMarkerStyle(MarkerStyle.NONE);
        XDDFLineProperties line = line(colour, widthPt);
        if (dashed) line.setPresetDash(new XDDFPresetLineDash(PresetLineDash.DASH));
        series.setLineProperties(line);
    }

    private void targets(XDDFScatterChartData data) {
        var series = (XDDFScatterChartData.Series)
                data.addSeries(cells(spectra.targets(quantity, 0)), cells(spectra.targets(quantity, 1)));
        series.setTitle("wanted", null);
        series.setSmooth(false);
        XDDFLineProperties none = new XDDFLineProperties();
        none.setFillProperties(new XDDFNoFillProperties());
        series.setLineProperties(none);
        series.setMarkerStyle(MarkerStyle.DIAMOND);
        series.setMarkerSize((short) 6);
        XDDFShapeProperties marker = new XDDFShapeProperties();
        marker.setFillProperties(solid(Palette.AMBER));
        marker.setLineProperties(line(Palette.AMBER, 1.25));
        series.getCTScatterSer().getMarker().setSpPr(marker.getXmlObject());

        brackets(series.getCTScatterSer().addNewErrBars());
    }

    /** As tall as the tolerance, from the cells that hold it. */
    private void brackets(CTErrBars bars) {
        bars.addNewErrDir().setVal(STErrDir.Y);
        bars.addNewErrBarType().setVal(STErrBarType.BOTH);
        bars.addNewErrValType().setVal(STErrValType.CUST);
        bars.addNewNoEndCap().setVal(false);
        var width = cells(spectra.targets(quantity, 2));
        width(bars.addNewPlus(), width);
        width(bars.addNewMinus(), width);
        XDDFShapeProperties shape = new XDDFShapeProperties();
        shape.setLineProperties(line(Palette.AMBER, 1.5));
        bars.setSpPr(shape.getXmlObject());
    }

    private static void width(CTNumDataSource where, XDDFNumericalDataSource<Double> values) {
        CTNumRef cells = where.addNewNumRef();
        cells.setF(values.getFormula());
        CTNumData kept = cells.addNewNumCache();
        kept.addNewPtCount().setVal(values.getPointCount());
        for (int k = 0; k < values.getPointCount(); k++) {
            CTNumVal point = kept.addNewPt();
            point.setIdx(k);
            point.setV(values.getPointAt(k).toString());
        }
    }

    private XDDFNumericalDataSource<Double> cells(CellRangeAddress range) {
        return XDDFDataSourcesFactory.fromNumericCellRange(spectra.page().sheet, range);
    }

    /**
     * Highest value to show: the curve's and the targets' with their tolerance, not the band's; but at most {@value #HEADROOM}
     * times the highest target, so that a band of water far above the targets does not flatten them: there the line leaves the
     * picture.
     */
    private double top() {
        double[] curve = quantity == Quantity.MUA
                ? spectra.curves().muaPerCm()
                : spectra.curves().muspPerCm();
        double line = 1e-6;
        for (double v : curve) line = Math.max(line, v);
        double wanted = 0;
        for (Predicted p : spectra.points(quantity))
            wanted = Math.max(
                    wanted,
                    Math.max(p.perCm(), p.point().wantedPerCm() + p.point().tolerancePerCm()));
        return 1.03 * (wanted > 0 ? Math.max(wanted, Math.min(line, HEADROOM * wanted)) : line);
    }

    static void type(XDDFTextBody body, double points, boolean bold, String colour) {
        body.getParagraphs()
                .forEach(p -> p.getTextRuns().forEach(r -> {
                    r.setLanguage(Locale.ENGLISH); // else that of whoever runs the program, and bytes would differ
                    r.setFontSize(points);
                    r.setBold(bold);
                    r.setFontColor(XDDFColor.from(Palette.rgb(colour)));
                }));
    }

    static XDDFLineProperties line(String colour, double widthPt) {
        XDDFLineProperties line = new XDDFLineProperties(solid(colour));
        line.setWidth(widthPt);
        return line;
    }

    static XDDFSolidFillProperties solid(String colour) {
        return new XDDFSolidFillProperties(XDDFColor.from(Palette.rgb(colour)));
    }
}
