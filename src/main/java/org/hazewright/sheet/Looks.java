package org.hazewright.sheet;

import java.util.HashMap;
import java.util.Map;
import org.apache.poi.ss.usermodel.BorderStyle;
import org.apache.poi.ss.usermodel.FillPatternType;
import org.apache.poi.ss.usermodel.VerticalAlignment;
import org.apache.poi.xssf.usermodel.XSSFCellStyle;
import org.apache.poi.xssf.usermodel.XSSFColor;
import org.apache.poi.xssf.usermodel.XSSFFont;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.picture.Palette;

/** The cell styles and fonts of one workbook, each made once: a workbook holds a limited number of them. */
final class Looks {
    /** Both on every system with an office program, or with a twin of equal widths that stands in for it. */
    static final String TYPE = "Arial";

    static final String TYPEWRITER = "Courier New";

    private final XSSFWorkbook workbook;
    private final Map<Face, XSSFCellStyle> plain = new HashMap<>();
    private final Map<Face, XSSFCellStyle> quoted = new HashMap<>();
    private final Map<String, XSSFFont> fonts = new HashMap<>();

    Looks(XSSFWorkbook workbook) {
        this.workbook = workbook;
        XSSFFont first = workbook.getFontAt(0);
        first.setFontName(TYPE);
        first.setFontHeightInPoints((short) 10);
    }

    XSSFCellStyle of(Face face) {
        return plain.computeIfAbsent(face, f -> make(f, false));
    }

    /** The same look for text that would turn into a formula if somebody edited the cell: it stays text. */
    XSSFCellStyle quoted(Face face) {
        return quoted.computeIfAbsent(face, f -> make(f, true));
    }

    XSSFFont font(Face face) {
        return font(face.points(), face.bold(), face.mono(), face.ink());
    }

    XSSFFont font(double points, boolean bold, boolean mono, String ink) {
        return fonts.computeIfAbsent(points + "/" + bold + "/" + mono + "/" + ink, key -> {
            XSSFFont font = workbook.createFont();
            font.setFontName(mono ? TYPEWRITER : TYPE);
            font.setFontHeight(points);
            font.setBold(bold);
            font.setColor(colour(ink));
            return font;
        });
    }

    XSSFColor colour(String hex) {
        return new XSSFColor(Palette.rgb(hex), workbook.getStylesSource().getIndexedColors());
    }

    private XSSFCellStyle make(Face face, boolean asText) {
        XSSFCellStyle style = workbook.createCellStyle();
        style.setFont(font(face));
        style.setAlignment(face.align());
        style.setVerticalAlignment(VerticalAlignment.CENTER);
        style.setWrapText(face.wrapped());
        if (face.indented()) style.setIndention((short) 1);
        style.setLocked(!face.open());
        style.setQuotePrefixed(asText);
        if (!face.format().isEmpty())
            style.setDataFormat(workbook.createDataFormat().getFormat(face.format()));
        if (!face.ground().isEmpty()) {
            style.setFillForegroundColor(colour(face.ground()));
            style.setFillPattern(FillPatternType.SOLID_FOREGROUND);
        }
        if (face.ruled() || face.open()) {
            style.setBorderBottom(BorderStyle.THIN);
            style.setBottomBorderColor(colour(face.open() ? Palette.QUIET : Palette.RULE));
        }
        if (face.open()) {
            style.setBorderTop(BorderStyle.THIN);
            style.setTopBorderColor(colour(Palette.QUIET));
            style.setBorderLeft(BorderStyle.THIN);
            style.setLeftBorderColor(colour(Palette.QUIET));
            style.setBorderRight(BorderStyle.THIN);
            style.setRightBorderColor(colour(Palette.QUIET));
        }
        return style;
    }
}
