package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.List;
import org.hazewright.bench.Weighing;

/**
 * Which row of "Fill in" holds what: fixed before anything is written, since other sheets' formulas point there. Rows from 0.
 *
 * @param headRows rows that introduce a stock, in making order
 * @param weighingRows one a weighing, in the order of {@link Weighing#of}
 */
record FillInPlan(List<Integer> headRows, int vesselRow, List<Integer> weighingRows, int targetsRow, int lastRow) {
    static final int TABLE = 7;
    static final int NUMBER = 0;
    static final int WHAT = 1;
    static final int FROM = 2;
    static final int PLANNED = 3;
    static final int WEIGHED = 4;
    static final int LOW = 5;
    static final int HIGH = 6;
    static final int WORD = 7;
    static final int LOT = 8;
    static final int DONE = 9;
    static final int NOTE = 10;
    static final int KEY = 11;

    static FillInPlan of(List<Weighing> weighings, int points) {
        List<Integer> heads = new ArrayList<>();
        List<Integer> rows = new ArrayList<>();
        int row = TABLE + 1;
        int vessel = -1;
        for (Weighing w : weighings) {
            if (w.role() == Weighing.Role.STOCK_SUBSTANCE) heads.add(row++);
            if (w.role() == Weighing.Role.ITEM && vessel < 0) vessel = row++;
            rows.add(row++);
        }
        int targets = row + 1;
        return new FillInPlan(List.copyOf(heads), vessel, List.copyOf(rows), targets, targets + 1 + points);
    }
}
