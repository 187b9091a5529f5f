package org.hazewright.sheet;

import org.apache.poi.ss.usermodel.PageMargin;
import org.apache.poi.ss.usermodel.PaperSize;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.xssf.usermodel.XSSFSheet;

/** How sheets go to paper: A4, with margins that fit Letter too, since whatever is chosen is scaled to fit. */
final class PrintSetup {
    private static final double MARGIN_INCH = 0.45;

    private PrintSetup() {}

    /** The whole sheet on one page. */
    static void onePage(XSSFSheet sheet, boolean landscape) {
        fit(sheet, landscape, 1);
    }

    /** As wide as the page, as many pages long as it takes, the rows up to {@code headRow} on each. */
    static void pages(XSSFSheet sheet, boolean landscape, int headRow) {
        fit(sheet, landscape, 0);
        sheet.setRepeatingRows(new CellRangeAddress(headRow, headRow, -1, -1));
    }

    /** A table so many landscape pages wide, as many long as it takes, its headings and its first column on each. */
    static void pages(XSSFSheet sheet, int headRow, int pagesWide) {
        pages(sheet, true, headRow);
        sheet.getPrintSetup().setFitWidth((short) pagesWide);
        if (pagesWide > 1) sheet.setRepeatingColumns(new CellRangeAddress(-1, -1, 0, 0));
    }

    private static void fit(XSSFSheet sheet, boolean landscape, int pagesHigh) {
        var print = sheet.getPrintSetup();
        print.setPaperSize(PaperSize.A4_PAPER);
        print.setLandscape(landscape);
        print.setFitWidth((short) 1);
        print.setFitHeight((short) pagesHigh);
        sheet.setFitToPage(true);
        sheet.setHorizontallyCenter(true);
        for (PageMargin side : new PageMargin[] {PageMargin.LEFT, PageMargin.RIGHT, PageMargin.TOP})
            sheet.setMargin(side, MARGIN_INCH);
        sheet.setMargin(PageMargin.BOTTOM, 0.6);
        sheet.setMargin(PageMargin.HEADER, 0.25);
        sheet.setMargin(PageMargin.FOOTER, 0.25);
        sheet.getFooter().setLeft("&8Hazewright · &A");
        sheet.getFooter().setRight("&8&P / &N");
    }
}
