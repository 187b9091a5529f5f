package org.hazewright.search;

/**
 * How many admissible sets there are: products of binomials over the groups, summed over the ways to choose among the
 * candidates that exclude others.
 */
final class SetCount {
    private final Columns columns;
    private final int[] free;
    private final int[] tied;
    private final boolean[] chosen;
    private final int[] used;

    private SetCount(Columns columns) {
        this.columns = columns;
        free = new int[columns.most.length];
        used = new int[columns.most.length];
        chosen = new boolean[columns.size];
        int count = 0;
        int[] list = new int[columns.size];
        for (int i = 0; i < columns.size; i++) {
            boolean any = false;
            if (columns.excludes != null) for (boolean no : columns.excludes[i]) any |= no;
            if (any) list[count++] = i;
            else free[columns.group[i]]++;
        }
        tied = java.util.Arrays.copyOf(list, count);
    }

    /** Admissible sets, the empty one included; {@link Long#MAX_VALUE} when there are more. */
    static long of(Columns columns) {
        double count = new SetCount(columns).from(0, columns.mostTogether);
        return count >= 9.2e18 ? Long.MAX_VALUE : Math.round(count);
    }

    private double from(int at, int left) {
        if (at == tied.length) return ofFree(0, left);
        int i = tied[at];
        double count = from(at + 1, left);
        boolean allowed = left > 0 && used[columns.group[i]] < columns.most[columns.group[i]];
        for (int k = 0; k < at && allowed; k++) allowed = !(chosen[tied[k]] && columns.excludes[i][tied[k]]);
        if (allowed) {
            chosen[i] = true;
            used[columns.group[i]]++;
            count += from(at + 1, left - 1);
            used[columns.group[i]]--;
            chosen[i] = false;
        }
        return count;
    }

    private double ofFree(int group, int left) {
        if (group == free.length) return 1;
        double count = 0;
        double ways = 1;
        int most = Math.min(Math.min(free[group], left), columns.most[group] - used[group]);
        for (int k = 0; k <= most; k++) {
            count += ways * ofFree(group + 1, left - k);
            ways = ways * (free[group] - k) / (k + 1);
        }
        return count;
    }
}
