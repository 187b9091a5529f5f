package org.hazewright.search;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Conflict;
import org.hazewright.search.SetProblem.Group;
import org.hazewright.search.SetProblem.Limits;
import org.hazewright.search.SetProblem.Point;

/**
 * Seeded search problems that look like shelves: absorbers with bands, scatterers with power laws, columns thinned by what
 * they displace, targets near something that can be made or not.
 */
final class RandomProblems {
    /** What is unusual about a problem. */
    enum Twist {
        PLAIN,
        TWINS,
        NEARLY_COLLINEAR,
        SPREAD,
        BASE_ABOVE_TARGET,
        TIGHT_UPPERS,
        TIGHT_VOLUME,
        NO_PENALTIES,
        CONFLICTS,
        WILD_SIGNS
    }

    private RandomProblems() {}

    /** {@code wavelengths} give two points each, absorption and then scattering; {@code loose} scales the tolerances. */
    static SetProblem of(Twist twist, int candidates, int wavelengths, int mostTogether, double loose, long seed) {
        Random random = new Random(seed * 31 + twist.ordinal());
        int m = 2 * wavelengths;
        double[] base = new double[m];
        for (int k = 0; k < wavelengths; k++) base[k] = 0.02 + 0.3 * random.nextDouble() * random.nextDouble();
        List<double[]> effects = new ArrayList<>();
        List<Group> groups = new ArrayList<>();
        double[] volumes = new double[candidates];
        for (int i = 0; i < candidates; i++) {
            double[] a = new double[m];
            Group group = i % 3 == 2 ? Group.SCATTERER : i % 7 == 6 ? Group.MODIFIER : Group.ABSORBER;
            double size = Math.exp(random.nextGaussian() * 1.5);
            double centre = random.nextDouble() * wavelengths;
            double width = 0.3 + 2 * random.nextDouble();
            double power = 2 * random.nextDouble();
            for (int k = 0; k < wavelengths; k++) {
                double x = (k - centre) / width;
                double lambda = 1 + 0.5 * (k + 0.5) / wavelengths;
                switch (group) {
                    case ABSORBER -> {
                        a[k] = size * (0.05 + Math.exp(-x * x));
                        a[wavelengths + k] = random.nextInt(3) == 0 ? 0.02 * size : 0;
                    }
                    case SCATTERER -> {
                        a[k] = 0.002 * size * random.nextDouble();
                        a[wavelengths + k] = 20 * size * Math.pow(lambda, -power);
                    }
                    case MODIFIER -> a[k] = 0.05 * size * random.nextDouble();
                }
            }
            volumes[i] = 0.4 + random.nextDouble();
            for (int k = 0; k < m; k++) a[k] -= volumes[i] * base[k];
            effects.add(a);
            groups.add(group);
        }
        if (twist == Twist.WILD_SIGNS)
            for (double[] a : effects) for (int k = 0; k < m; k++) a[k] = random.nextGaussian();
        if (twist == Twist.TWINS)
            for (int i = 0; i + 3 < candidates; i += 4) {
                effects.set(i + 3, effects.get(i).clone());
                groups.set(i + 3, groups.get(i));
                volumes[i + 3] = volumes[i];
            }
        if (twist == Twist.NEARLY_COLLINEAR)
            for (int i = 0; i + 1 < candidates; i += 2) {
                double[] a = effects.get(i).clone();
                for (int k = 0; k < m; k++) a[k] *= 1 + 1e-7 * random.nextGaussian();
                effects.set(i + 1, a);
                groups.set(i + 1, groups.get(i));
            }
        double[] factor = new double[candidates];
        for (int i = 0; i < candidates; i++)
            factor[i] = twist == Twist.SPREAD ? Math.pow(10, 6 * random.nextDouble() - 3) : 1;

        double[] target = new double[m];
        for (int pick = 0; pick < Math.max(1, mostTogether); pick++) {
            int i = random.nextInt(candidates);
            double size = 0;
            for (double v : effects.get(i)) size = Math.max(size, Math.abs(v));
            double amount = (0.2 + random.nextDouble()) / size * (groups.get(i) == Group.SCATTERER ? 10 : 0.5);
            for (int k = 0; k < m; k++) target[k] += amount * effects.get(i)[k];
        }
        List<Point> points = new ArrayList<>();
        for (int k = 0; k < m; k++) {
            double r = target[k] * (1 + 0.05 * random.nextGaussian()) + 0.01 * random.nextDouble();
            if (twist == Twist.BASE_ABOVE_TARGET && k % 3 == 0) r = -0.3 * Math.abs(r);
            double tau = loose * (0.05 * Math.abs(r + base[k]) + 0.002);
            points.add(new Point(r, tau, random.nextInt(4) == 0 ? 0.5 + random.nextDouble() : 1));
        }
        List<Candidate> list = new ArrayList<>();
        for (int i = 0; i < candidates; i++) {
            double[] a = effects.get(i);
            double d = 0;
            double typical = 0;
            for (int k = 0; k < m; k++) {
                a[k] *= factor[i];
                d += Math.pow(0.03 * a[k] / points.get(k).halfWidth(), 2);
                typical = Math.max(typical, Math.abs(a[k]) / points.get(k).halfWidth());
            }
            double q = 1e-3 * random.nextDouble();
            if (twist == Twist.NO_PENALTIES) {
                d = 0;
                q = 0;
            }
            if (twist == Twist.TWINS && i % 4 == 3 && i >= 3) {
                d = list.get(i - 3).ingredientTerm();
                q = list.get(i - 3).weighingTerm();
            }
            double upper = random.nextInt(3) == 0 ? Double.POSITIVE_INFINITY : 1e4 / typical;
            if (twist == Twist.TIGHT_UPPERS) upper = (2 + 30 * random.nextDouble()) / typical;
            double v = volumes[i] * (twist == Twist.SPREAD ? factor[i] * 1e-2 : twist == Twist.TIGHT_VOLUME ? 1 : 0.05);
            if (twist == Twist.TWINS && i % 4 == 3 && i >= 3) {
                upper = list.get(i - 3).upper();
                v = list.get(i - 3).specificVolume();
            }
            list.add(new Candidate(a, d, q, upper, v, groups.get(i)));
        }
        List<Conflict> conflicts = new ArrayList<>();
        if (twist == Twist.CONFLICTS)
            for (int k = 0; k < candidates / 2; k++) {
                int a = random.nextInt(candidates);
                int b = random.nextInt(candidates);
                if (a != b) conflicts.add(new Conflict(a, b));
            }
        double added = twist == Twist.TIGHT_VOLUME ? 0.02 + 0.2 * random.nextDouble() : 0.9;
        return new SetProblem(points, list, new Limits(2, 2, 1, mostTogether, added, conflicts));
    }
}
