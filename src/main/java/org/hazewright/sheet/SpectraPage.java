package org.hazewright.sheet;

import java.util.List;
import org.apache.poi.ss.util.CellRangeAddress;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answer.Predicted;
import org.hazewright.brief.Point.Quantity;

/** The figures that the charts draw: the predicted spectra with their 95 % band, and the targets. */
final class SpectraPage {
    private static final int HEAD = 3;
    private static final int FIRST = 4;

    /** Coverage factor of a 95 % interval of a normal quantity (JCGM 100:2008, table G.1). */
    private static final double K95 = 1.96;

    private final Page page;
    private final Answer answer;
    private final Curves curves;

    SpectraPage(Page page, Answer answer, Curves curves) {
        this.page = page;
        this.answer = answer;
        this.curves = curves;
    }

    void write() {
        page.columns(64, 76, 76, 76, 76, 76, 76, 24, 64, 76, 76, 24, 64, 76, 76);
        page.text(0, 0, "Spectra", Face.TITLE);
        page.height(0, 24);
        page.text(
                1,
                0,
                "As planned, in 1/cm. Low and high are the ends of the 95 % interval from the uncertainty budget.",
                Face.QUIET);
        String[] heads = {"nm", "µa", "µa low", "µa high", "µs'", "µs' low", "µs' high"};
        for (int c = 0; c < heads.length; c++) page.text(HEAD, c, heads[c], Face.HEAD.right());
        Face nm = Face.TEXT.right();
        Face mua = Face.TEXT.format("0.00000");
        Face musp = Face.TEXT.format("0.000");
        for (int j = 0; j < curves.nm().length; j++) {
            int row = FIRST + j;
            page.number(row, 0, curves.nm()[j], nm);
            three(row, 1, curves.muaPerCm()[j], curves.uMuaPerCm()[j], mua);
            three(row, 4, curves.muspPerCm()[j], curves.uMuspPerCm()[j], musp);
        }
        targets(Quantity.MUA, 8, mua);
        targets(Quantity.MUSP, 12, musp);
        page.sheet.createFreezePane(0, FIRST);
        PrintSetup.onePage(page.sheet, false);
    }

    private void three(int row, int column, double value, double u, Face face) {
        page.number(row, column, value, face);
        page.number(row, column + 1, Math.max(0, value - K95 * u), face);
        page.number(row, column + 2, value + K95 * u, face);
    }

    private void targets(Quantity quantity, int column, Face face) {
        page.text(HEAD - 1, column, "Targets of " + quantity.sign(), Face.QUIET);
        page.text(HEAD, column, "nm", Face.HEAD.right());
        page.text(HEAD, column + 1, "wanted", Face.HEAD.right());
        page.text(HEAD, column + 2, "±", Face.HEAD.right());
        int row = FIRST;
        for (Predicted p : points(quantity)) {
            page.number(row, column, p.point().wavelengthNm(), Face.TEXT.right());
            page.number(row, column + 1, p.point().wantedPerCm(), face);
            page.number(row, column + 2, p.point().tolerancePerCm(), face);
            row++;
        }
    }

    List<Predicted> points(Quantity quantity) {
        return answer.predicted().stream()
                .filter(p -> p.point().quantity() == quantity)
                .toList();
    }

    /** Cells of a column of the curves: 0 nm, 1 µa, 2 and 3 its band, 4 µs', 5 and 6 its band. */
    CellRangeAddress curve(int column) {
        return new CellRangeAddress(FIRST, FIRST + curves.nm().length - 1, column, column);
    }

    /** Cells of the targets of a quantity: 0 nm, 1 wanted, 2 half-width. */
    CellRangeAddress targets(Quantity quantity, int column) {
        int first = quantity == Quantity.MUA ? 8 : 12;
        return new CellRangeAddress(FIRST, FIRST + points(quantity).size() - 1, first + column, first + column);
    }

    Curves curves() {
        return curves;
    }

    Page page() {
        return page;
    }
}
