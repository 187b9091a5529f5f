package org.hazewright.desk.model;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.stream.DoubleStream;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Sweep;
import org.hazewright.shelf.Ingredient;

/**
 * A recipe's prediction over wavelength, for drawing: values and standard uncertainties in 1/cm at ascending wavelengths in nm, each
 * ingredient's share, and where no figures reach.
 */
public final class Curves {
    /** Widest range that is drawn, nm. */
    public static final double FROM_NM = 400;

    public static final double TO_NM = 1100;
    private static final double STEP_NM = 5;

    /** A stretch of wavelengths that some ingredient's figures do not reach, and the words for the first such. */
    public record Gap(double fromNm, double toNm, String why) {}

    /** One ingredient's part, 1/cm at each wavelength; shares sum to the values. */
    public record Share(Ingredient ingredient, double[] mua, double[] musp) {}

    private final Sweep sweep;
    private final double capacityG;
    private final List<Gap> gaps;
    private final double[] nm;
    private final double[] mua;
    private final double[] musp;
    private final double[] uMua;
    private final double[] uMusp;
    private final List<Share> shares;

    private Curves(Recipe recipe, Sweep sweep, double capacityG, List<Gap> gaps) {
        this.sweep = sweep;
        this.capacityG = capacityG;
        this.gaps = List.copyOf(gaps);
        Map<Ingredient, Double> masses = recipe.massesG();
        nm = sweep.wavelengthsNm();
        mua = sweep.muaPerCm(masses);
        musp = sweep.muspPerCm(masses);
        Budget budget = Budget.of(recipe, sweep, capacityG);
        uMua = budget.uMuaPerCm();
        uMusp = budget.uMuspPerCm();
        List<Share> parts = new ArrayList<>();
        for (Ingredient i : masses.keySet())
            parts.add(new Share(i, sweep.muaShare(i, masses), sweep.muspShare(i, masses)));
        shares = List.copyOf(parts);
    }

    /** Over 400 to 1100 nm, and at some wavelengths more. */
    public static Curves of(Recipe recipe, double capacityG, double[] alsoNm) {
        List<Double> outside = new ArrayList<>();
        List<String> why = new ArrayList<>();
        double[] grid = DoubleStream.concat(
                        DoubleStream.iterate(FROM_NM, x -> x <= TO_NM, x -> x + STEP_NM),
                        Arrays.stream(alsoNm).filter(x -> x >= FROM_NM && x <= TO_NM))
                .sorted()
                .distinct()
                .toArray();
        Sweep sweep = Sweep.within(Mixture.of(recipe), grid, (x, words) -> {
            outside.add(x);
            why.add(words);
        });
        return new Curves(recipe, sweep, capacityG, gaps(grid, outside, why));
    }

    private static List<Gap> gaps(double[] grid, List<Double> outside, List<String> why) {
        List<Gap> gaps = new ArrayList<>();
        for (int k = 0; k < outside.size(); ) {
            int at = Arrays.binarySearch(grid, outside.get(k));
            int end = k;
            while (end + 1 < outside.size() && outside.get(end + 1) == grid[at + end + 1 - k]) end++;
            double from = at == 0 ? grid[0] : grid[at - 1];
            int last = at + end - k;
            double to = last == grid.length - 1 ? grid[last] : grid[last + 1];
            gaps.add(new Gap(from, to, why.get(k)));
            k = end + 1;
        }
        return gaps;
    }

    /** Whether {@link #near} can answer for a recipe. */
    public boolean covers(Recipe recipe) {
        return sweep.covers(recipe.massesG().keySet());
    }

    /** The curves of another recipe of the same ingredients, host index and crowding held. */
    public Curves near(Recipe recipe) {
        return new Curves(recipe, sweep, capacityG, gaps);
    }

    public int size() {
        return nm.length;
    }

    public double nm(int k) {
        return nm[k];
    }

    public double value(Point.Quantity q, int k) {
        return (q == Point.Quantity.MUA ? mua : musp)[k];
    }

    public double u(Point.Quantity q, int k) {
        return (q == Point.Quantity.MUA ? uMua : uMusp)[k];
    }

    public List<Share> shares() {
        return shares;
    }

    public List<Gap> gaps() {
        return gaps;
    }

    /** Value and standard uncertainty at a wavelength, linear between neighbours; NaN where no figures reach. */
    public double[] at(Point.Quantity q, double wavelengthNm) {
        int k = Arrays.binarySearch(nm, wavelengthNm);
        if (k >= 0) return new double[] {value(q, k), u(q, k)};
        int next = -k - 1;
        if (next == 0 || next == nm.length || nm[next] - nm[next - 1] > STEP_NM + 1e-9)
            return new double[] {Double.NaN, Double.NaN};
        double t = (wavelengthNm - nm[next - 1]) / (nm[next] - nm[next - 1]);
        return new double[] {
            value(q, next - 1) + t * (value(q, next) - value(q, next - 1)),
            u(q, next - 1) + t * (u(q, next) - u(q, next - 1))
        };
    }
}
