package org.hazewright.sheet;

import java.util.List;
import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xddf.usermodel.XDDFColor;
import org.apache.poi.xddf.usermodel.XDDFLineProperties;
import org.apache.poi.xddf.usermodel.XDDFNoFillProperties;
import org.apache.poi.xddf.usermodel.XDDFShapeProperties;
import org.apache.poi.xddf.usermodel.XDDFSolidFillProperties;
import org.apache.poi.xddf.usermodel.chart.AxisCrossBetween;
import org.apache.poi.xddf.usermodel.chart.AxisCrosses;
import org.apache.poi.xddf.usermodel.chart.AxisPosition;
import org.apache.poi.xddf.usermodel.chart.ChartTypes;
import org.apache.poi.xddf.usermodel.chart.LegendPosition;
import org.apache.poi.xddf.usermodel.chart.MarkerStyle;
import org.apache.poi.xddf.usermodel.chart.ScatterStyle;
import org.apache.poi.xddf.usermodel.chart.XDDFCategoryAxis;
import org.apache.poi.xddf.usermodel.chart.XDDFChartAxis;
import org.apache.poi.xddf.usermodel.chart.XDDFDataSourcesFactory;
import org.apache.poi.xddf.usermodel.chart.XDDFLineChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFNumericalDataSource;
import org.apache.poi.xddf.usermodel.chart.XDDFScatterChartData;
import org.apache.poi.xddf.usermodel.chart.XDDFValueAxis;
import org.apache.poi.xssf.usermodel.XSSFChart;
import org.apache.poi.xssf.usermodel.XSSFClientAnchor;
import org.apache.poi.xssf.usermodel.XSSFDrawing;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.hazewright.picture.Palette;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTAxDataSource;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTLineSer;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTMarker;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTNumDataSource;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTScatterSer;

/**
 * The logbook's two native charts, measured over predicted by date and by lot. They are drawn once; when rows are added, the cells
 * that they show are followed, and whatever people changed on them stays. A chart that was deleted stays deleted.
 */
final class LogbookCharts {
    private LogbookCharts() {}

    static void draw(XSSFSheet on, XSSFSheet values, XSSFSheet lots, int headRow) {
        int date = LogbookEntry.VALUE_COLUMNS.indexOf(LogbookEntry.DATE);
        int mua = LogbookEntry.VALUE_COLUMNS.indexOf(LogbookEntry.MUA_RATIO);
        int musp = LogbookEntry.VALUE_COLUMNS.indexOf(LogbookEntry.MUSP_RATIO);
        byDate(on, values, headRow + 1, date, mua, musp);
        byLot(on, lots, headRow + 1);
    }

    private static XSSFChart chart(XSSFSheet on, int row, String title) {
        XSSFChart chart =
                on.createDrawingPatriarch().createChart(new XSSFClientAnchor(0, 0, 0, 0, 0, row, 11, row + 19));
        chart.setTitleText(title);
        chart.setTitleOverlay(false);
        chart.getTitle()
                .getBody()
                .getParagraphs()
                .forEach(p -> p.getTextRuns().forEach(r -> {
                    r.setLanguage(java.util.Locale.ENGLISH);
                    r.setFontSize(10d);
                    r.setBold(true);
                }));
        chart.displayBlanksAs(org.apache.poi.xddf.usermodel.chart.DisplayBlanks.GAP);
        chart.getOrAddLegend().setPosition(LegendPosition.BOTTOM);
        return chart;
    }

    private static void byDate(XSSFSheet on, XSSFSheet values, int row, int date, int mua, int musp) {
        XSSFChart chart = chart(on, 3, "measured over predicted, by date");
        XDDFValueAxis x = chart.createValueAxis(AxisPosition.BOTTOM);
        x.setNumberFormat("yyyy-mm-dd");
        XDDFValueAxis y = chart.createValueAxis(AxisPosition.LEFT);
        look(x, y);
        XDDFScatterChartData data = (XDDFScatterChartData) chart.createData(ChartTypes.SCATTER, x, y);
        data.setStyle(ScatterStyle.LINE_MARKER);
        data.setVaryColors(false);
        series(data, values, row, date, mua, "µa", MarkerStyle.CIRCLE, true);
        series(data, values, row, date, musp, "µs'", MarkerStyle.DIAMOND, false);
        chart.plot(data);
        chart.getCTChart().getPlotArea().getScatterChartArray(0).getSerList().forEach(s -> {
            if (!s.isSetSmooth()) s.addNewSmooth();
            s.getSmooth().setVal(false);
        });
    }

    private static void series(
            XDDFScatterChartData data,
            XSSFSheet sheet,
            int row,
            int x,
            int y,
            String name,
            MarkerStyle marker,
            boolean circle) {
        var s = (XDDFScatterChartData.Series) data.addSeries(cells(sheet, row, x), cells(sheet, row, y));
        s.setTitle(name, null);
        s.setSmooth(false);
        s.setLineProperties(noLine());
        s.setMarkerStyle(marker);
        s.setMarkerSize((short) 7);
        mark(s.getCTScatterSer().getMarker(), circle);
    }

    private static void byLot(XSSFSheet on, XSSFSheet lots, int row) {
        XSSFChart chart = chart(on, 24, "measured over predicted, mean by lot");
        XDDFCategoryAxis x = chart.createCategoryAxis(AxisPosition.BOTTOM);
        XDDFValueAxis y = chart.createValueAxis(AxisPosition.LEFT);
        look(x, y);
        y.setCrossBetween(AxisCrossBetween.BETWEEN); // the first lot stands off the axis
        XDDFLineChartData data = (XDDFLineChartData) chart.createData(ChartTypes.LINE, x, y);
        data.setVaryColors(false);
        for (int k = 0; k < 2; k++) {
            var s = (XDDFLineChartData.Series) data.addSeries(
                    XDDFDataSourcesFactory.fromStringCellRange(lots, new CellRangeAddress(row, row, 0, 0)),
                    cells(lots, row, 5 + k));
            s.setTitle(k == 0 ? "µa" : "µs'", null);
            s.setSmooth(false);
            s.setLineProperties(noLine());
            s.setMarkerStyle(k == 0 ? MarkerStyle.CIRCLE : MarkerStyle.DIAMOND);
            s.setMarkerSize((short) 8);
            mark(s.getCTLineSer().getMarker(), k == 0);
        }
        chart.plot(data);
    }

    private static void mark(CTMarker marker, boolean circle) {
        XDDFShapeProperties shape = new XDDFShapeProperties();
        String colour = circle ? Palette.TEAL : Palette.AMBER_TYPE;
        shape.setFillProperties(solid(colour));
        XDDFLineProperties line = new XDDFLineProperties(solid(colour));
        line.setWidth(1.25);
        shape.setLineProperties(line);
        marker.setSpPr(shape.getXmlObject());
    }

    private static void look(XDDFChartAxis x, XDDFValueAxis y) {
        y.setNumberFormat("0.00");
        XDDFLineProperties rule = new XDDFLineProperties(solid(Palette.RULE));
        rule.setWidth(0.5);
        y.getOrAddMajorGridProperties().setLineProperties(rule);
        for (XDDFChartAxis axis : List.of(x, y)) {
            XDDFLineProperties line = new XDDFLineProperties(solid(Palette.QUIET));
            line.setWidth(0.75);
            axis.getOrAddShapeProperties().setLineProperties(line);
            axis.getOrAddTextProperties().setFontSize(8d);
        }
        x.setCrosses(AxisCrosses.MIN);
        y.setCrosses(AxisCrosses.MIN);
    }

    private static XDDFLineProperties noLine() {
        XDDFLineProperties none = new XDDFLineProperties();
        none.setFillProperties(new XDDFNoFillProperties());
        return none;
    }

    private static XDDFSolidFillProperties solid(String colour) {
        return new XDDFSolidFillProperties(XDDFColor.from(Palette.rgb(colour)));
    }

    private static XDDFNumericalDataSource<Double> cells(XSSFSheet sheet, int row, int column) {
        return XDDFDataSourcesFactory.fromNumericCellRange(sheet, new CellRangeAddress(row, row, column, column));
    }

    /** Makes the charts of a page show the rows of these tables down to their last. */
    static void follow(XSSFSheet charts, LogbookTable... tables) {
        if (charts == null || charts.getDrawingPatriarch() == null) return;
        XSSFDrawing drawing = charts.getDrawingPatriarch();
        for (XSSFChart chart : drawing.getCharts()) {
            var plot = chart.getCTChart().getPlotArea();
            plot.getScatterChartList().forEach(c -> {
                for (CTScatterSer s : c.getSerList()) {
                    follow(s.getXVal(), tables);
                    follow(s.getYVal(), tables);
                }
            });
            plot.getLineChartList().forEach(c -> {
                for (CTLineSer s : c.getSerList()) {
                    follow(s.getCat(), tables);
                    follow(s.getVal(), tables);
                }
            });
        }
    }

    private static void follow(CTAxDataSource source, LogbookTable[] tables) {
        if (source == null) return;
        if (source.isSetNumRef()) {
            source.getNumRef().setF(down(source.getNumRef().getF(), tables));
            if (source.getNumRef().isSetNumCache()) source.getNumRef().unsetNumCache();
        }
        if (source.isSetStrRef()) {
            source.getStrRef().setF(down(source.getStrRef().getF(), tables));
            if (source.getStrRef().isSetStrCache()) source.getStrRef().unsetStrCache();
        }
    }

    private static void follow(CTNumDataSource source, LogbookTable[] tables) {
        if (source == null || !source.isSetNumRef()) return;
        source.getNumRef().setF(down(source.getNumRef().getF(), tables));
        if (source.getNumRef().isSetNumCache()) source.getNumRef().unsetNumCache();
    }

    private static String down(String formula, LogbookTable[] tables) {
        AreaReference area;
        try {
            area = new AreaReference(formula, org.apache.poi.ss.SpreadsheetVersion.EXCEL2007);
        } catch (IllegalArgumentException somebodysOwn) {
            return formula;
        }
        CellReference first = area.getFirstCell();
        for (LogbookTable t : tables) {
            if (!t.sheet.getSheetName().equals(first.getSheetName())) continue;
            if (first.getRow() != t.headRow + 1 || t.last() <= t.headRow) return formula;
            CellReference from = new CellReference(first.getSheetName(), first.getRow(), first.getCol(), true, true);
            CellReference to = new CellReference(t.last(), first.getCol(), true, true);
            return from.formatAsString() + ":" + to.formatAsString();
        }
        return formula;
    }
}
