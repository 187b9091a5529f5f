package org.hazewright.shelf;

import java.util.Collection;
import java.util.Comparator;
import java.util.Locale;
import java.util.Optional;

/**
 * The known word nearest to a mistyped one, by the optimal string alignment distance (Damerau, Commun. ACM 7, 171, 1964), when
 * near enough to be worth suggesting: at most a third of its letters differ, or one contains the other.
 */
public final class Nearest {
    private Nearest() {}

    public static Optional<String> to(String word, Collection<String> known) {
        String w = word.toLowerCase(Locale.ROOT);
        return known.stream()
                .filter(k -> near(w, k.toLowerCase(Locale.ROOT)))
                .min(Comparator.<String>comparingInt(k -> distance(w, k.toLowerCase(Locale.ROOT)))
                        .thenComparing(Comparator.naturalOrder()));
    }

    private static boolean near(String word, String known) {
        if (word.length() >= 3 && (known.contains(word) || word.contains(known))) return true;
        return distance(word, known) <= Math.max(1, Math.max(word.length(), known.length()) / 3);
    }

    static int distance(String a, String b) {
        int[][] d = new int[a.length() + 1][b.length() + 1];
        for (int i = 0; i <= a.length(); i++) d[i][0] = i;
        for (int j = 0; j <= b.length(); j++) d[0][j] = j;
        for (int i = 1; i <= a.length(); i++)
            for (int j = 1; j <= b.length(); j++) {
                int swap = a.charAt(i - 1) == b.charAt(j - 1) ? 0 : 1;
                d[i][j] = Math.min(Math.min(d[i - 1][j], d[i][j - 1]) + 1, d[i - 1][j - 1] + swap);
                if (i > 1 && j > 1 && a.charAt(i - 1) == b.charAt(j - 2) && a.charAt(i - 2) == b.charAt(j - 1))
                    d[i][j] = Math.min(d[i][j], d[i - 2][j - 2] + 1);
            }
        return d[a.length()][b.length()];
    }
}
