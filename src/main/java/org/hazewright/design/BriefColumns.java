package org.hazewright.design;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.brief.SearchLimits;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.mixture.Mixture;
import org.hazewright.optics.Crowding;
import org.hazewright.search.SetProblem;
import org.hazewright.shelf.Conflict;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Shelf;

/**
 * A brief and one base as the plain numbers of a {@link SetProblem}: one column a candidate, one row a wanted point.
 *
 * <p>What is added displaces base: with the base's own µ_b and the candidate's density ρ_i, a_ij = κ_ij − µ_bj/ρ_i (cm²/g), and the
 * residual to fill is t_j − µ_bj. κ depends on the host index and, with crowding, on the concentration; the columns are right at
 * one state of the mixture; {@link FixedPoint} moves that state to the answer, with slopes of the full model in place of a_ij.
 */
final class BriefColumns {
    private final Brief brief;
    private final Candidates candidates;
    private final List<Point> points;
    private final double baseDensity;

    BriefColumns(Brief brief, Shelf shelf, Candidates candidates) {
        this.brief = brief;
        this.candidates = candidates;
        this.points = brief.points();
        this.baseDensity = shelf.densityGPerMl(candidates.base);
    }

    List<Point> points() {
        return points;
    }

    /** The mixture of base and amounts in g per mL, as {@code volumeMl} of it. */
    Mixture mixture(Map<Ingredient, Double> concentrationGPerMl, double volumeMl) {
        double added = 0;
        for (var c : concentrationGPerMl.entrySet())
            added += c.getValue() / c.getKey().densityGPerMl();
        double baseG = baseDensity * Math.max(0, 1 - added) * volumeMl;
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        candidates.baseParts.forEach((part, share) -> masses.put(part, share * baseG));
        concentrationGPerMl.forEach((i, c) -> masses.merge(i, c * volumeMl, Double::sum));
        return new Mixture(masses, brief.temperatureC());
    }

    /** What the pure base does at each point, 1/cm. */
    double[] baseValues(Mixture state) {
        double[] values = new double[points.size()];
        double[] host = hostIndex(state);
        for (int j = 0; j < values.length; j++) {
            double sum = 0;
            for (var part : candidates.baseParts.entrySet())
                sum += part.getValue()
                        * Frozen.of(
                                points.get(j),
                                MassSpecific.of(
                                        part.getKey(),
                                        points.get(j).wavelengthNm(),
                                        brief.temperatureC(),
                                        host[j],
                                        state.crowdFraction(part.getKey())));
            values[j] = sum * baseDensity;
        }
        return values;
    }

    private double[] hostIndex(Mixture state) {
        Map<Double, Double> known = new HashMap<>();
        double[] host = new double[points.size()];
        for (int j = 0; j < host.length; j++)
            host[j] = known.computeIfAbsent(points.get(j).wavelengthNm(), state::hostIndex);
        return host;
    }

    /** κ_ij at each point for an ingredient whose particles feel the volume fraction {@code phi}, cm²/g. */
    private double[] kappa(Ingredient i, double[] host, double phi) {
        double[] kappa = new double[points.size()];
        Map<Double, MassSpecific> at = new HashMap<>();
        for (int j = 0; j < kappa.length; j++) {
            double n = host[j];
            MassSpecific m = at.computeIfAbsent(
                    points.get(j).wavelengthNm(), nm -> MassSpecific.of(i, nm, brief.temperatureC(), n, phi));
            kappa[j] = Frozen.of(points.get(j), m);
        }
        return kappa;
    }

    /** The problem over all candidates, each at the crowding it would have if it alone gave the wanted µs'. */
    SetProblem everything() {
        Mixture alone = mixture(Map.of(), 1);
        double[] base = baseValues(alone);
        double[] host = hostIndex(alone);
        List<double[]> kappas = new ArrayList<>();
        for (Ingredient i : candidates.ingredients) kappas.add(kappaAlone(i, host, base));
        List<double[]> slopes = new ArrayList<>();
        double[] residual = new double[base.length];
        for (int j = 0; j < base.length; j++) residual[j] = points.get(j).wantedPerCm() - base[j];
        for (int k = 0; k < kappas.size(); k++)
            slopes.add(displaced(candidates.ingredients.get(k), kappas.get(k), base));
        SearchLimits l = brief.limits();
        SetProblem.Limits limits = new SetProblem.Limits(
                l.maxAbsorbers(),
                l.maxScatterers(),
                l.maxModifiers(),
                l.maxAbsorbers() + l.maxScatterers() + l.maxModifiers(),
                addedVolume(),
                exclusive(candidates.ingredients));
        return problem(candidates.ingredients, kappas, slopes, residual, 1, limits);
    }

    /**
     * The problem over some candidates, straightened at a state of the mixture: µ_j(c) ≈ µ_j(c₀) + Σ_i a_ij (c_i − c₀_i) with given
     * slopes a_ij. Tolerances are narrowed to {@code edge} times themselves as limits, and left as they are in the score.
     */
    SetProblem tangent(Map<Ingredient, Double> at, List<Ingredient> members, List<double[]> slopes, double edge) {
        Mixture state = mixture(at, 1);
        double[] host = hostIndex(state);
        double[] here = values(state);
        double[] residual = new double[here.length];
        for (int j = 0; j < here.length; j++) residual[j] = points.get(j).wantedPerCm() - here[j];
        List<double[]> kappas = new ArrayList<>();
        for (int k = 0; k < members.size(); k++) {
            Ingredient i = members.get(k);
            kappas.add(kappa(i, host, state.crowdFraction(i)));
            for (int j = 0; j < here.length; j++) residual[j] += slopes.get(k)[j] * at.get(i);
        }
        int count = members.size(); // the set is chosen: only amounts are limited here
        SetProblem.Limits free = new SetProblem.Limits(count, count, count, count, addedVolume(), List.of());
        return problem(members, kappas, slopes, residual, edge, free);
    }

    /** Slopes ∂µ_j/∂c_i of the full model at a state, cm²/g, base displacement included. */
    List<double[]> slopes(Map<Ingredient, Double> at, List<Ingredient> members) {
        Mixture state = mixture(at, 1);
        double[] host = hostIndex(state);
        double[] here = values(state);
        double[] base = baseValues(state);
        List<double[]> slopes = new ArrayList<>();
        for (Ingredient i : members)
            slopes.add(
                    movesOthers(i, at)
                            ? slope(i, at, here)
                            : displaced(i, kappa(i, host, state.crowdFraction(i)), base));
        return slopes;
    }

    /** Whether an ingredient changes what the others do: by crowding, or by enough volume to move the host index. */
    private static boolean movesOthers(Ingredient i, Map<Ingredient, Double> at) {
        boolean crowds = i.scattering().orElse(null) instanceof Scattering.MieParticles m
                && !(m.crowding() instanceof Crowding.None);
        return crowds || at.get(i) / i.densityGPerMl() > 0.005;
    }

    /** Slope of the full model along one ingredient, by a forward difference of a part in ten thousand. */
    private double[] slope(Ingredient i, Map<Ingredient, Double> at, double[] here) {
        double step = Math.max(1e-4 * at.get(i), 1e-6);
        Map<Ingredient, Double> moved = new LinkedHashMap<>(at);
        moved.merge(i, step, Double::sum);
        double[] there = values(mixture(moved, 1));
        double[] slope = new double[here.length];
        for (int j = 0; j < here.length; j++) slope[j] = (there[j] - here[j]) / step;
        return slope;
    }

    private double[] displaced(Ingredient i, double[] kappa, double[] base) {
        double[] slope = new double[base.length];
        for (int j = 0; j < base.length; j++) slope[j] = kappa[j] - base[j] / i.densityGPerMl();
        return slope;
    }

    /** The full model at the wanted points, 1/cm. */
    double[] values(Mixture mixture) {
        Map<Double, Coefficients> known = new HashMap<>();
        double[] values = new double[points.size()];
        for (int j = 0; j < values.length; j++) {
            Point p = points.get(j);
            Coefficients at = known.computeIfAbsent(p.wavelengthNm(), mixture::at);
            values[j] = p.quantity() == Point.Quantity.MUA ? at.muaPerCm() : at.muspPerCm();
        }
        return values;
    }

    private double[] kappaAlone(Ingredient i, double[] host, double[] base) {
        double[] kappa = kappa(i, host, 0);
        if (!(i.scattering().orElse(null) instanceof Scattering.MieParticles mie)
                || mie.crowding() instanceof Crowding.None) return kappa;
        for (int pass = 0; pass < 3; pass++) {
            double up = 0;
            double down = 0;
            for (int j = 0; j < kappa.length; j++) {
                Point p = points.get(j);
                if (p.quantity() != Point.Quantity.MUSP) continue;
                double w = p.weight() / (p.tolerancePerCm() * p.tolerancePerCm());
                up += w * kappa[j] * (p.wantedPerCm() - base[j]);
                down += w * kappa[j] * kappa[j];
            }
            if (!(up > 0)) return kappa;
            double c = Math.min(up / down, upper(i));
            kappa = kappa(i, host, Math.min(c * mie.volumeFraction() / i.densityGPerMl(), 0.999 * crowdLimit(mie)));
        }
        return kappa;
    }

    private static double crowdLimit(Scattering.MieParticles mie) {
        return mie.crowding() instanceof Crowding.Polynomial p
                ? p.maxVolumeFraction()
                : mie.crowding() instanceof Crowding.PercusYevick ? 0.45 : 1;
    }

    /** Most of an ingredient in g/mL: its own limit, and where its crowding model ends. */
    private static double upper(Ingredient i) {
        double upper = i.maxGPerMl().orElse(Double.POSITIVE_INFINITY);
        if (i.scattering().orElse(null) instanceof Scattering.MieParticles mie
                && !(mie.crowding() instanceof Crowding.None))
            upper = Math.min(upper, 0.999 * crowdLimit(mie) * i.densityGPerMl() / mie.volumeFraction());
        return upper;
    }

    private SetProblem problem(
            List<Ingredient> members,
            List<double[]> kappas,
            List<double[]> slopes,
            double[] residual,
            double edge,
            SetProblem.Limits limits) {
        List<SetProblem.Point> rows = new ArrayList<>();
        for (int j = 0; j < residual.length; j++) {
            Point p = points.get(j);
            rows.add(new SetProblem.Point(residual[j], p.tolerancePerCm() * edge, p.weight() * edge * edge));
        }
        double uG = brief.balance().standardUncertaintyG();
        List<SetProblem.Candidate> columns = new ArrayList<>();
        for (int k = 0; k < members.size(); k++) {
            Ingredient i = members.get(k);
            double[] kappa = kappas.get(k);
            double unknown = 0;
            double weighing = 0;
            for (int j = 0; j < residual.length; j++) {
                Point p = points.get(j);
                double u = kappa[j] * Frozen.uncertaintyOf(i, p) / p.tolerancePerCm();
                double w = kappa[j] * uG / brief.volumeMl() / p.tolerancePerCm();
                unknown += p.weight() * u * u;
                weighing += p.weight() * w * w;
            }
            columns.add(new SetProblem.Candidate(
                    slopes.get(k), unknown, weighing, upper(i), 1 / i.densityGPerMl(), group(i)));
        }
        return new SetProblem(rows, columns, limits);
    }

    /** Share of the volume that what is added may take. */
    private double addedVolume() {
        return 1 - Math.max(candidates.base.leastShare(), brief.limits().leastBaseShare());
    }

    private static SetProblem.Group group(Ingredient i) {
        return switch (i.part()) {
            case ABSORBER -> SetProblem.Group.ABSORBER;
            case SCATTERER -> SetProblem.Group.SCATTERER;
            case BASE, MODIFIER -> SetProblem.Group.MODIFIER;
        };
    }

    /** Pairs never joined: conflicts that a file says to refuse, and two bottles of one ingredient. */
    private static List<SetProblem.Conflict> exclusive(List<Ingredient> members) {
        List<SetProblem.Conflict> pairs = new ArrayList<>();
        for (int a = 0; a < members.size(); a++)
            for (int b = a + 1; b < members.size(); b++)
                if (members.get(a).kind().equals(members.get(b).kind())
                        || refuses(members.get(a), members.get(b))
                        || refuses(members.get(b), members.get(a))) pairs.add(new SetProblem.Conflict(a, b));
        return pairs;
    }

    private static boolean refuses(Ingredient a, Ingredient b) {
        for (Conflict c : a.conflicts())
            if (c.refuse() && (c.with().equals(b.id()) || c.with().equals(b.kind()))) return true;
        return false;
    }
}
