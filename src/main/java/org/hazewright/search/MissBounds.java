package org.hazewright.search;

/**
 * Proofs that some sets cannot come closer than a certain worst miss, each taken from the dual of a set already solved.
 *
 * <p>For point weights y with Σ|y_j| = 1 and misses e = Mc − r, max|e_j| ≥ yᵀe = yᵀMc − yᵀr, whatever c. Over 0 ≤ c ≤ reach
 * within the volume the right side is at least −yᵀr less the most that columns with yᵀM_i &lt; 0 can pull it down. So a dual
 * found for one set bounds every other set, exactly so for sets of columns that do not help against that conflict.
 */
final class MissBounds {
    private static final int MOST = 96;

    private final Columns columns;
    private final double[] base = new double[MOST];
    private final double[][] perVolume = new double[MOST][];
    private final double[][] perReach = new double[MOST][];
    private int count;
    private int next;

    MissBounds(Columns columns) {
        this.columns = columns;
    }

    /** Takes in point weights; any will do, their magnitudes are made to sum to 1. */
    void add(double[] pointWeight) {
        double sum = 0;
        for (double y : pointWeight) sum += Math.abs(y);
        if (!(sum > 0) || Double.isInfinite(sum)) return;
        int at = count < MOST ? count++ : next++ % MOST;
        double start = 0;
        for (int j = 0; j < pointWeight.length; j++) start -= pointWeight[j] / sum * columns.residual[j];
        base[at] = start;
        if (perVolume[at] == null) {
            perVolume[at] = new double[columns.size];
            perReach[at] = new double[columns.size];
        }
        for (int i = 0; i < columns.size; i++) {
            double pull = 0;
            double[] m = columns.miss[i];
            for (int j = 0; j < pointWeight.length; j++) pull -= pointWeight[j] * m[j];
            pull = Math.max(0, pull / sum);
            perVolume[at][i] = pull / columns.volume[i];
            perReach[at][i] = pull * columns.reach[i];
        }
    }

    /** Whether some proof gives the set a worst miss of at least {@code least}. */
    boolean exclude(int[] set, int size, double least) {
        for (int b = 0; b < count; b++) {
            double room = base[b] - least;
            if (room < 0) continue;
            double[] reaches = perReach[b];
            double sum = 0;
            for (int k = 0; k < size; k++) sum += reaches[set[k]];
            if (sum > room && mostPull(b, set, size) > room) continue;
            if (b > 0) swap(b, b - 1);
            return true;
        }
        return false;
    }

    /** The most that the columns can pull a bound down within the volume: filled by the greatest pull per volume first. */
    private double mostPull(int b, int[] set, int size) {
        double[] perShare = perVolume[b];
        double pull = 0;
        double left = 1;
        double below = Double.POSITIVE_INFINITY;
        int after = -1;
        while (left > 0) {
            int next = -1;
            for (int k = 0; k < size; k++) {
                double v = perShare[set[k]];
                boolean later = v < below || v == below && k > after;
                if (later && (next < 0 || v > perShare[set[next]])) next = k;
            }
            if (next < 0 || perShare[set[next]] == 0) break;
            below = perShare[set[next]];
            after = next;
            double share = Math.min(left, columns.reach[set[next]] * columns.volume[set[next]]);
            pull += share * below;
            left -= share;
        }
        return pull;
    }

    private void swap(int a, int b) {
        double v = base[a];
        base[a] = base[b];
        base[b] = v;
        double[] r = perVolume[a];
        perVolume[a] = perVolume[b];
        perVolume[b] = r;
        r = perReach[a];
        perReach[a] = perReach[b];
        perReach[b] = r;
    }
}
