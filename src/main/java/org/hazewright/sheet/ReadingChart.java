package org.hazewright.sheet;

import java.util.List;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.xddf.usermodel.XDDFLineProperties;
import org.apache.poi.xddf.usermodel.XDDFNoFillProperties;
import org.apache.poi.xddf.usermodel.XDDFShapeProperties;
import org.apache.poi.xddf.usermodel.chart.AxisCrossBetween;
import org.apache.poi.xddf.usermodel.chart.AxisCrosses;
import org.apache.poi.xddf.usermodel.chart.AxisPosition;
import org.apache.poi.xddf.usermodel.chart.AxisTickMark;
import org.apache.poi.xddf.usermodel.chart.BarDirection;
import org.apache.poi.xddf.usermodel.chart.ChartTypes;
import org.apache.poi.xddf.usermodel.chart.DisplayBlanks;
import org.apache.poi.xddf.usermodel.chart.LegendPosition;
import org.apache.poi.xddf.usermodel.chart.MarkerStyle;
import org.apache.poi.xddf.usermodel.chart.ScatterStyle;
import org.apache.poi.xddf.usermodel.chart.XDDFBarChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFCategoryAxis;
import org.apache.poi.xddf.usermodel.chart.XDDFChartAxis;
import org.apache.poi.xddf.usermodel.chart.XDDFChartLegend;
import org.apache.poi.xddf.usermodel.chart.XDDFDataSourcesFactory;
import org.apache.poi.xddf.usermodel.chart.XDDFScatterChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFValueAxis;
import org.apache.poi.xssf.usermodel.XSSFChart;
import org.apache.poi.xssf.usermodel.XSSFClientAnchor;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.hazewright.optics.Figures;
import org.hazewright.picture.Palette;
import org.hazewright.picture.RoundStep;

/** A native chart of readings: curves and points over a distance or a time, or bars of shares. */
final class ReadingChart {
    /** Cells to draw; an empty name stays out of the legend; {@code points} draws marks, else a line. */
    record Series(String name, CellRangeAddress x, CellRangeAddress y, String colour, boolean points) {}

    private final XSSFSheet sheet;
    private final XSSFChart chart;

    ReadingChart(XSSFSheet sheet, String title, int col1, int row1, int col2, int row2) {
        this.sheet = sheet;
        chart = sheet.createDrawingPatriarch().createChart(new XSSFClientAnchor(0, 0, 0, 0, col1, row1, col2, row2));
        chart.displayBlanksAs(DisplayBlanks.GAP);
        chart.setTitleText(title);
        chart.setTitleOverlay(false);
        SpectrumChart.type(chart.getTitle().getBody(), 8, true, Palette.INK);
        chart.getOrAddShapeProperties().setLineProperties(SpectrumChart.line(Palette.RULE, 0.75));
    }

    void scatter(List<Series> all, double x0, double x1, double y0, double y1, boolean decades) {
        XDDFValueAxis x = chart.createValueAxis(AxisPosition.BOTTOM);
        XDDFValueAxis y = chart.createValueAxis(AxisPosition.LEFT);
        double step = RoundStep.over(x1 - x0);
        x.setMinimum(x0);
        x.setMaximum(Math.ceil(x1 / step) * step);
        x.setMajorUnit(step);
        x.setNumberFormat("0");
        y.setMinimum(y0);
        if (decades) {
            y.setLogBase(10);
            y.setMaximum(y1);
            y.setNumberFormat("0E+00");
        } else {
            double unit = RoundStep.over(y1 - y0);
            y.setMaximum(Math.ceil(y1 / unit) * unit);
            y.setMajorUnit(unit);
            y.setNumberFormat(unit < 1e-3 ? "0.0E+00" : Face.numberFormat(Figures.decimalsFor(unit * 10)));
        }
        look(x, y);
        XDDFScatterChartData data = (XDDFScatterChartData) chart.createData(ChartTypes.SCATTER, x, y);
        data.setStyle(ScatterStyle.LINE_MARKER);
        data.setVaryColors(false);
        for (Series s : all) curve(data, s);
        chart.plot(data);
        chart.getCTChart().getPlotArea().getScatterChartArray(0).getSerList().forEach(s -> {
            if (!s.isSetSmooth()) s.addNewSmooth();
            s.getSmooth().setVal(false);
        });
        legend(all);
    }

    private void curve(XDDFScatterChartData data, Series s) {
        var series = (XDDFScatterChartData.Series) data.addSeries(
                XDDFDataSourcesFactory.fromNumericCellRange(sheet, s.x()),
                XDDFDataSourcesFactory.fromNumericCellRange(sheet, s.y()));
        series.setTitle(s.name().isEmpty() ? "diffusion" : s.name(), null);
        series.setSmooth(false);
        if (!s.points()) {
            series.setMarkerStyle(MarkerStyle.NONE);
            series.setLineProperties(SpectrumChart.line(s.colour(), 1.5));
            return;
        }
        XDDFLineProperties none = new XDDFLineProperties();
        none.setFillProperties(new XDDFNoFillProperties());
        series.setLineProperties(none);
        series.setMarkerStyle(MarkerStyle.CIRCLE);
        series.setMarkerSize((short) 6);
        XDDFShapeProperties marker = new XDDFShapeProperties();
        marker.setFillProperties(SpectrumChart.solid(s.colour()));
        marker.setLineProperties(SpectrumChart.line(s.colour(), 1));
        series.getCTScatterSer().getMarker().setSpPr(marker.getXmlObject());
    }

    void bars(List<Series> all) {
        XDDFCategoryAxis x = chart.createCategoryAxis(AxisPosition.BOTTOM);
        XDDFValueAxis y = chart.createValueAxis(AxisPosition.LEFT);
        y.setCrossBetween(AxisCrossBetween.BETWEEN);
        y.setMinimum(0.0);
        y.setMaximum(1.0);
        y.setMajorUnit(0.2);
        y.setNumberFormat("0.0");
        look(x, y);
        XDDFBarChartData data = (XDDFBarChartData) chart.createData(ChartTypes.BAR, x, y);
        data.setBarDirection(BarDirection.COL);
        data.setVaryColors(false);
        data.setGapWidth(80);
        for (Series s : all) {
            var series = (XDDFBarChartData.Series) data.addSeries(
                    XDDFDataSourcesFactory.fromStringCellRange(sheet, s.x()),
                    XDDFDataSourcesFactory.fromNumericCellRange(sheet, s.y()));
            series.setTitle(s.name(), null);
            series.setFillProperties(SpectrumChart.solid(s.colour()));
            series.setLineProperties(SpectrumChart.line(s.colour(), 0.5));
        }
        chart.plot(data);
        legend(all);
    }

    private static void look(XDDFChartAxis x, XDDFValueAxis y) {
        y.getOrAddMajorGridProperties().setLineProperties(SpectrumChart.line(Palette.RULE, 0.5));
        for (XDDFChartAxis axis : List.of(x, y)) {
            axis.getOrAddShapeProperties().setLineProperties(SpectrumChart.line(Palette.QUIET, 0.75));
            axis.setMajorTickMark(AxisTickMark.OUT);
            axis.setMinorTickMark(AxisTickMark.NONE);
            axis.getOrAddTextProperties().setFontSize(7d);
            axis.getOrAddTextProperties().setFillProperties(SpectrumChart.solid(Palette.QUIET));
        }
        x.setCrosses(AxisCrosses.MIN);
        y.setCrosses(AxisCrosses.MIN);
    }

    private void legend(List<Series> all) {
        XDDFChartLegend legend = chart.getOrAddLegend();
        legend.setPosition(LegendPosition.BOTTOM);
        legend.setOverlay(false);
        for (int i = 0; i < all.size(); i++)
            if (all.get(i).name().isEmpty()) {
                var entry = legend.addEntry();
                entry.setIndex(i);
                entry.setDelete(true);
            }
        var text = chart.getCTChart().getLegend();
        var paragraph = (text.isSetTxPr() ? text.getTxPr() : text.addNewTxPr());
        if (paragraph.getBodyPr() == null) paragraph.addNewBodyPr();
        var run = paragraph.addNewP().addNewPPr().addNewDefRPr();
        run.setSz(700);
    }
}
