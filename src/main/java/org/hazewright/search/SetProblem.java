package org.hazewright.search;

import java.util.List;
import org.hazewright.optics.Refusal;

/**
 * Which candidates, and how much of each: the search of a recipe reduced to plain numbers.
 *
 * <p>For a set S of candidates and amounts c_i (g/mL, 0 ≤ c_i ≤ upper) the score is
 * J(S) = Σ_j w_j (Σ_i a_ij c_i − r_j)²/τ_j² + Σ_{i∈S} D_i c_i² + Σ_{i∈S} q_i, and the added volume Σ v_i c_i stays at or
 * below a limit. A target is met when |Σ_i a_ij c_i − r_j| ≤ τ_j; that ratio is its miss. Amounts have no smallest value
 * here, and the empty set is admissible.
 *
 * @param points the targets, at least one
 * @param candidates what may be used, in the order that settles ties
 * @param limits how many at once, how much volume, and who excludes whom
 */
public record SetProblem(List<Point> points, List<Candidate> candidates, Limits limits) {

    /** The kinds of which a recipe may hold only so many. */
    public enum Group {
        ABSORBER,
        SCATTERER,
        MODIFIER
    }

    /**
     * One target.
     *
     * @param residual r_j, wanted value less what the base gives by itself; negative when the base gives too much
     * @param halfWidth τ_j above 0, in the same unit
     * @param weight w_j above 0, without unit
     */
    public record Point(double residual, double halfWidth, double weight) {
        public Point {
            finite("What the base leaves to be added at a target", residual);
            Refusal.positive("Tolerance of a target", halfWidth);
            Refusal.positive("Weight of a target", weight);
        }
    }

    /**
     * One ingredient as a column.
     *
     * @param effect a_ij at each point, in the points' unit per g/mL, what it displaces of the base already taken off
     * @param ingredientTerm D_i ≥ 0: what is not known about it, per (g/mL)²
     * @param weighingTerm q_i ≥ 0: what its weighing adds to the score
     * @param upper most of it, g/mL; may be infinite, since the volume limits it too; 0 takes it out of the search
     * @param specificVolume v_i above 0, mL/g
     * @param group which limit it counts against
     */
    public record Candidate(
            double[] effect,
            double ingredientTerm,
            double weighingTerm,
            double upper,
            double specificVolume,
            Group group) {
        public Candidate {
            effect = effect.clone();
            for (double a : effect) finite("Effect of a candidate", a);
            Refusal.notNegative("Ingredient term of a candidate", ingredientTerm);
            Refusal.notNegative("Weighing term of a candidate", weighingTerm);
            if (!(upper >= 0))
                throw new Refusal("Upper limit of a candidate is " + upper + " g/mL; it must be 0 or above.");
            Refusal.positive("Specific volume of a candidate in mL/g", specificVolume);
            if (group == null)
                throw new Refusal("A candidate has no group; it must be an absorber, a scatterer or a modifier.");
        }

        /** A copy. */
        @Override
        public double[] effect() {
            return effect.clone();
        }
    }

    /** Two candidates (by index) that may not be in one recipe. */
    public record Conflict(int first, int second) {}

    /**
     * The limits of a set.
     *
     * @param mostAbsorbers most absorbers at once, ≥ 0; likewise the next two
     * @param mostTogether most members of any group at once, ≥ 0
     * @param addedVolume most volume of everything but the base, as a share of the whole: 1 less the base's least share
     * @param conflicts pairs that exclude each other
     */
    public record Limits(
            int mostAbsorbers,
            int mostScatterers,
            int mostModifiers,
            int mostTogether,
            double addedVolume,
            List<Conflict> conflicts) {
        public Limits {
            for (int most : new int[] {mostAbsorbers, mostScatterers, mostModifiers, mostTogether})
                if (most < 0)
                    throw new Refusal(
                            "A limit of " + most + " ingredients at once makes no sense; it must be 0 or above.");
            Refusal.within("Share of the volume left for ingredients beside the base", addedVolume, 0, 1);
            conflicts = List.copyOf(conflicts);
        }

        /** Most members of a group at once. */
        public int most(Group group) {
            return switch (group) {
                case ABSORBER -> mostAbsorbers;
                case SCATTERER -> mostScatterers;
                case MODIFIER -> mostModifiers;
            };
        }

        /** The same limits with one more of a group, and one more in all. */
        public Limits oneMore(Group group) {
            return new Limits(
                    more(mostAbsorbers, group == Group.ABSORBER),
                    more(mostScatterers, group == Group.SCATTERER),
                    more(mostModifiers, group == Group.MODIFIER),
                    more(mostTogether, true),
                    addedVolume,
                    conflicts);
        }

        private static int more(int most, boolean yes) {
            return yes && most < Integer.MAX_VALUE ? most + 1 : most;
        }
    }

    public SetProblem {
        points = List.copyOf(points);
        candidates = List.copyOf(candidates);
        if (points.isEmpty()) throw new Refusal("There is no target to search for; give at least one.");
        for (int i = 0; i < candidates.size(); i++)
            if (candidates.get(i).effect.length != points.size())
                throw new Refusal("Candidate " + i + " has " + candidates.get(i).effect.length + " effects for "
                        + points.size() + " targets.");
        for (Conflict c : limits.conflicts)
            if (c.first == c.second
                    || Math.min(c.first, c.second) < 0
                    || Math.max(c.first, c.second) >= candidates.size())
                throw new Refusal("Candidates " + c.first + " and " + c.second
                        + " cannot exclude each other: there are " + candidates.size() + ", counted from 0.");
    }

    /** Whether a set of candidate indices, ascending, keeps the limits on numbers and conflicts. */
    public boolean admits(int[] set) {
        int[] count = new int[Group.values().length];
        if (set.length > limits.mostTogether) return false;
        for (int k = 0; k < set.length; k++) {
            if (k > 0 && set[k] <= set[k - 1]) return false;
            Candidate c = candidates.get(set[k]);
            if (reach(set[k]) == 0 || ++count[c.group.ordinal()] > limits.most(c.group)) return false;
        }
        for (Conflict c : limits.conflicts) if (holds(set, c.first) && holds(set, c.second)) return false;
        return true;
    }

    /** Signed misses (Σ a_ij c_i − r_j)/τ_j of the amounts of a set. */
    public double[] misses(int[] set, double[] amounts) {
        double[] misses = new double[points.size()];
        for (int j = 0; j < misses.length; j++) {
            Point p = points.get(j);
            double sum = -p.residual;
            for (int k = 0; k < set.length; k++) sum += candidates.get(set[k]).effect[j] * amounts[k];
            misses[j] = sum / p.halfWidth;
        }
        return misses;
    }

    /** Most of a candidate that its own limit and the volume allow, g/mL. */
    public double reach(int candidate) {
        Candidate c = candidates.get(candidate);
        return Math.min(c.upper, limits.addedVolume / c.specificVolume);
    }

    private static boolean holds(int[] set, int index) {
        for (int i : set) if (i == index) return true;
        return false;
    }

    private static void finite(String what, double v) {
        if (Double.isNaN(v) || Double.isInfinite(v))
            throw new Refusal(what + " is " + v + "; it must be a finite number.");
    }
}
