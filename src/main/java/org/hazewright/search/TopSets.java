package org.hazewright.search;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * The best few sets so far, least score first.
 *
 * <p>Scores that differ by less than 1e-9 of themselves (or 1e-14 of the score of the base alone, the grain of their sums)
 * tie; then the smaller set comes first, then the one with the lower indices. A set enters once.
 */
final class TopSets {
    /** A set by candidate indices, ascending, with its score. */
    record Entry(int[] members, double score, boolean meets) {}

    private final int most;
    private final double grain;
    private final List<Entry> entries = new ArrayList<>();

    TopSets(int most, double grain) {
        this.most = most;
        this.grain = grain;
    }

    List<Entry> entries() {
        return entries;
    }

    boolean full() {
        return entries.size() == most;
    }

    /** A score at or above which no set can enter; infinite while there is room. */
    double ceiling() {
        if (!full()) return Double.POSITIVE_INFINITY;
        double last = entries.get(most - 1).score;
        return last + 2 * tie(last);
    }

    private double tie(double score) {
        return 1e-9 * Math.abs(score) + 1e-14 * grain;
    }

    private boolean before(Entry a, Entry b) {
        if (Math.abs(a.score - b.score) > tie(Math.max(a.score, b.score))) return a.score < b.score;
        if (a.members.length != b.members.length) return a.members.length < b.members.length;
        for (int k = 0; k < a.members.length; k++) if (a.members[k] != b.members[k]) return a.members[k] < b.members[k];
        return false;
    }

    /** Whether the set would enter as things stand. */
    boolean wants(Entry e) {
        if (full() && !before(e, entries.get(most - 1))) return false;
        return !holds(e.members);
    }

    boolean holds(int[] members) {
        for (Entry e : entries) if (Arrays.equals(e.members, members)) return true;
        return false;
    }

    void add(Entry e) {
        int at = entries.size();
        while (at > 0 && before(e, entries.get(at - 1))) at--;
        entries.add(at, e);
        if (entries.size() > most) entries.remove(most);
    }
}
