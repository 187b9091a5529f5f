package org.hazewright.search;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.function.BooleanSupplier;
import org.hazewright.optics.Refusal;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Group;
import org.hazewright.search.SetProblem.Limits;

/**
 * Why no set comes closer than the best possible worst miss, and what would help.
 *
 * <p>The dual of the best set's linear programme names the targets that pull against each other and the limits that bind.
 * What a relaxation buys is never read off the dual: each is the answer to the relaxed problem, solved over all its sets.
 */
public final class LimitProof {
    /** A target in the conflict: positive weight where the value comes out too high, negative where too low; Σ|weight| = 1. */
    public record Pull(int point, double weight) {}

    /** What may be relaxed. */
    public enum Loosening {
        /** one more of a group at once; {@code index} is the group's ordinal */
        ONE_MORE,
        /** no upper limit of its own for candidate {@code index} */
        UPPER_LIFTED,
        /** target {@code index} left out */
        TARGET_LEFT_OUT,
        /** no least share of the base; {@code index} is −1 */
        BASE_SHARE_LIFTED,
        /** the conflicts of candidate {@code index} set aside */
        CONFLICTS_LIFTED
    }

    /**
     * A relaxation and its verified worth.
     *
     * @param before best possible worst miss as the problem stands
     * @param after the relaxed problem's optimum over all its sets; its point weights are those of the relaxed problem's
     *     points, so one fewer when a target was left out
     */
    public record Relaxation(Loosening loosening, int index, double before, LeastWorstMiss after) {
        /** How far the best possible worst miss falls, in tolerances. */
        public double gain() {
            return before - after.value();
        }
    }

    private static final double NEGLIGIBLE = 1e-9;

    private final SetProblem problem;
    private final LeastWorstMiss least;
    private final BooleanSupplier stop;

    /** {@code least} must be the problem's own; {@code stop} ends the solving of relaxed problems, which then say too little. */
    public LimitProof(SetProblem problem, LeastWorstMiss least, BooleanSupplier stop) {
        if (least.pointWeight().length != problem.points().size())
            throw new Refusal("The proof has " + least.pointWeight().length + " targets and the problem "
                    + problem.points().size() + "; they must belong together.");
        this.problem = problem;
        this.least = least;
        this.stop = stop;
    }

    public LimitProof(SetProblem problem, LeastWorstMiss least) {
        this(problem, least, () -> false);
    }

    /** The targets that conflict, heaviest first. */
    public List<Pull> conflict() {
        List<Pull> pulls = new ArrayList<>();
        for (int j = 0; j < least.pointWeight().length; j++)
            if (Math.abs(least.pointWeight()[j]) > NEGLIGIBLE) pulls.add(new Pull(j, least.pointWeight()[j]));
        pulls.sort(Comparator.comparingDouble((Pull p) -> -Math.abs(p.weight)).thenComparingInt(Pull::point));
        return List.copyOf(pulls);
    }

    /** Candidates whose own upper limit binds at the best possible worst miss. */
    public List<Integer> bindingUppers() {
        List<Integer> found = new ArrayList<>();
        for (int i = 0; i < least.upperWeight().length; i++)
            if (least.upperWeight()[i] * problem.reach(i) > NEGLIGIBLE) found.add(i);
        return List.copyOf(found);
    }

    /** Whether the base's least share binds at the best possible worst miss. */
    public boolean volumeBinds() {
        return least.volumeWeight() * problem.limits().addedVolume() > NEGLIGIBLE;
    }

    /** Least |miss| that any set can reach at one target when no other counts: above 1 the target cannot be met at all. */
    public double alone(int point) {
        List<Candidate> narrowed = new ArrayList<>();
        for (Candidate c : problem.candidates()) narrowed.add(withEffect(c, new double[] {c.effect()[point]}));
        return solve(new SetProblem(List.of(problem.points().get(point)), narrowed, problem.limits()))
                .value();
    }

    /** One more of a group at once. */
    public Relaxation oneMore(Group group) {
        SetProblem relaxed = new SetProblem(
                problem.points(), problem.candidates(), problem.limits().oneMore(group));
        return relaxation(Loosening.ONE_MORE, group.ordinal(), relaxed);
    }

    /** No upper limit of its own for a candidate; the volume still limits it. */
    public Relaxation upperLifted(int candidate) {
        List<Candidate> candidates = new ArrayList<>(problem.candidates());
        Candidate c = candidates.get(candidate);
        candidates.set(
                candidate,
                new Candidate(
                        c.effect(),
                        c.ingredientTerm(),
                        c.weighingTerm(),
                        Double.POSITIVE_INFINITY,
                        c.specificVolume(),
                        c.group()));
        return relaxation(
                Loosening.UPPER_LIFTED, candidate, new SetProblem(problem.points(), candidates, problem.limits()));
    }

    /** A target left out; refused when it is the only one. */
    public Relaxation targetLeftOut(int point) {
        int m = problem.points().size();
        if (m == 1) throw new Refusal("The only target cannot be left out.");
        List<SetProblem.Point> points = new ArrayList<>(problem.points());
        points.remove(point);
        List<Candidate> candidates = new ArrayList<>();
        for (Candidate c : problem.candidates()) {
            double[] all = c.effect();
            double[] rest = new double[m - 1];
            System.arraycopy(all, 0, rest, 0, point);
            System.arraycopy(all, point + 1, rest, point, m - 1 - point);
            candidates.add(withEffect(c, rest));
        }
        return relaxation(Loosening.TARGET_LEFT_OUT, point, new SetProblem(points, candidates, problem.limits()));
    }

    /** No least share of the base. */
    public Relaxation baseShareLifted() {
        Limits l = problem.limits();
        Limits lifted = new Limits(
                l.mostAbsorbers(), l.mostScatterers(), l.mostModifiers(), l.mostTogether(), 1, l.conflicts());
        return relaxation(
                Loosening.BASE_SHARE_LIFTED, -1, new SetProblem(problem.points(), problem.candidates(), lifted));
    }

    /** The conflicts of a candidate set aside. */
    public Relaxation conflictsLifted(int candidate) {
        Limits l = problem.limits();
        List<SetProblem.Conflict> kept = new ArrayList<>(l.conflicts());
        kept.removeIf(c -> c.first() == candidate || c.second() == candidate);
        Limits lifted = new Limits(
                l.mostAbsorbers(), l.mostScatterers(), l.mostModifiers(), l.mostTogether(), l.addedVolume(), kept);
        return relaxation(
                Loosening.CONFLICTS_LIFTED, candidate, new SetProblem(problem.points(), problem.candidates(), lifted));
    }

    /**
     * Every relaxation that lowers the best possible worst miss by more than 1 % of a tolerance, largest gain first. Tried:
     * one more of each group that has candidates, each binding upper limit, the base's share when it binds, each target in
     * the conflict, each candidate with conflicts.
     */
    public List<Relaxation> whatHelps() {
        List<Relaxation> found = new ArrayList<>();
        for (Group g : Group.values()) {
            long of = problem.candidates().stream().filter(c -> c.group() == g).count();
            if (of > 0) found.add(oneMore(g));
        }
        for (int i : bindingUppers()) found.add(upperLifted(i));
        if (volumeBinds()) found.add(baseShareLifted());
        if (problem.points().size() > 1) for (Pull p : conflict()) found.add(targetLeftOut(p.point));
        problem.limits().conflicts().stream()
                .flatMap(c -> java.util.stream.Stream.of(c.first(), c.second()))
                .distinct()
                .sorted()
                .forEach(i -> found.add(conflictsLifted(i)));
        found.removeIf(r -> r.gain() <= 0.01);
        found.sort(Comparator.comparingDouble(r -> -r.gain()));
        return List.copyOf(found);
    }

    private Relaxation relaxation(Loosening loosening, int index, SetProblem relaxed) {
        return new Relaxation(loosening, index, least.value(), solve(relaxed));
    }

    private LeastWorstMiss solve(SetProblem relaxed) {
        return new SetSearch(relaxed).leastWorstMiss(stop);
    }

    private static Candidate withEffect(Candidate c, double[] effect) {
        return new Candidate(effect, c.ingredientTerm(), c.weighingTerm(), c.upper(), c.specificVolume(), c.group());
    }
}
