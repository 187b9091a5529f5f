package org.hazewright.sheet;

import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFName;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/** Names of cells and ranges, the same in every sheet, so that formulas read as sentences. */
final class Names {
    static final String FORMAT = "sheet_format";
    static final String BATCH = "batch_id";
    static final String OPERATOR = "operator";
    static final String DATE = "batch_date";
    static final String BALANCE = "balance_id";
    static final String PLANNED_G = "planned_g";
    static final String WEIGHED_G = "weighed_g";
    static final String VOLUME_ML = "volume_ml";
    static final String MASS_G = "mass_g";
    static final String DENSITY = "density_g_per_ml";
    static final String CONCENTRATION = "concentration_g_per_ml";
    static final String KAPPA_NM = "kappa_nm";
    static final String KAPPA_MUA = "kappa_mua_cm2_per_g";
    static final String KAPPA_MUSP = "kappa_musp_cm2_per_g";
    static final String LANDED = "landed";

    private final XSSFWorkbook workbook;

    Names(XSSFWorkbook workbook) {
        this.workbook = workbook;
    }

    /** Must come before the formulas that use the name. */
    void give(String name, String address) {
        XSSFName made = workbook.createName();
        made.setNameName(name);
        made.setRefersToFormula(address);
    }

    /** The cell of this name, the first one of a range; null when the name, or the page it stood for, is gone. */
    static CellReference cell(XSSFWorkbook workbook, String name) {
        XSSFName found = workbook.getName(name);
        if (found == null || found.isDeleted() || found.getRefersToFormula().contains("#REF")) return null;
        return new AreaReference(found.getRefersToFormula(), workbook.getSpreadsheetVersion()).getFirstCell();
    }
}
