package org.hazewright.search;

import java.util.ArrayList;
import java.util.List;
import org.hazewright.optics.Refusal;

/**
 * A convex quadratic programme of a few variables: minimise ½xᵀGx − aᵀx + constant subject to lower ≤ x ≤ upper and any
 * number of two-sided linear limits low ≤ row·x ≤ high.
 *
 * <p>G is symmetric and positive semidefinite; it may be singular (equal or nearly collinear columns), and then one of the
 * optima is returned. Limits may be infinite (lower −∞, upper +∞, low −∞, high +∞). The constructor refuses shapes that do
 * not fit, numbers that are not finite where they must be, and a G that is not symmetric to 1e-9 of its diagonal.
 *
 * <p>Method: {@link ActiveSet}, in variables scaled so that G has a unit diagonal, rows scaled to unit length, a ridge of
 * 1e-11 on the diagonal while factoring, its effect taken out again by correction; when that does not settle (G singular
 * along a direction in which the value is linear), proximal steps (Rockafellar, SIAM J. Control Optim. 14, 877, 1976)
 * repeat the work around the last point. What is returned has been checked again on the programme as given: see
 * {@link Solution#kktResidual}.
 */
public record ConvexProgramme(
        double[][] quadratic, double[] linear, double constant, double[] lower, double[] upper, List<Limit> limits) {

    /** A two-sided linear limit: low ≤ row·x ≤ high, either side possibly infinite. low above high contradicts itself. */
    public record Limit(double[] row, double low, double high) {
        public Limit {
            row = row.clone();
            for (double v : row) finite("Coefficient of a limit", v);
            if (Double.isNaN(low)
                    || Double.isNaN(high)
                    || low == Double.POSITIVE_INFINITY
                    || high == Double.NEGATIVE_INFINITY)
                throw new Refusal(
                        "A limit from " + low + " to " + high + " leaves nothing; give numbers, or leave a side open.");
        }
    }

    public enum Status {
        /** x is an optimum; its KKT residual on the programme as given is at most 1e-9. */
        OPTIMAL,
        /** No x meets all limits; {@link Solution#binding} holds limits that contradict each other. */
        INFEASIBLE,
        /** Neither could be established: unbounded below, or too badly conditioned for double precision. */
        UNSETTLED
    }

    public enum Side {
        /** variable {@code index} at its lower limit */
        LOWER,
        /** variable {@code index} at its upper limit */
        UPPER,
        /** linear limit {@code index} at its low side */
        LOW,
        /** linear limit {@code index} at its high side */
        HIGH
    }

    /**
     * A limit in force. The multiplier (≥ 0) is the fall of the value for each unit by which the limit is loosened; in a
     * contradiction, the weights with which the limits add up to something impossible.
     */
    public record Binding(Side side, int index, double multiplier) {}

    /**
     * The outcome.
     *
     * <p>{@code kktResidual} is the largest of: what is left of the gradient after the multipliers, each component taken
     * times its variable's scale 1/√G_ii and over the largest term met; violation of a linear limit, and distance from a binding
     * one, over the sum of the magnitudes of its terms; a negative multiplier, scaled as the gradient. Without unit; NaN
     * unless OPTIMAL or UNSETTLED with an x.
     */
    public record Solution(Status status, double[] x, double value, double kktResidual, List<Binding> binding) {
        /** Multiplier of one limit, 0 when it is not in force. */
        public double multiplier(Side side, int index) {
            for (Binding b : binding) if (b.side == side && b.index == index) return b.multiplier;
            return 0;
        }
    }

    private static final double RIDGE = 1e-11;
    private static final double SETTLED = 1e-11;
    private static final double ACCEPTED = 1e-9;

    public ConvexProgramme {
        int n = linear.length;
        if (n == 0 || quadratic.length != n || lower.length != n || upper.length != n)
            throw new Refusal("A programme of " + n + " variables came with " + quadratic.length + " rows of G, "
                    + lower.length + " lower and " + upper.length + " upper limits; all must be equal and at least 1.");
        quadratic = quadratic.clone();
        for (int i = 0; i < n; i++) {
            if (quadratic[i].length != n)
                throw new Refusal("Row " + i + " of G has " + quadratic[i].length + " entries, not " + n + ".");
            quadratic[i] = quadratic[i].clone();
            finite("Linear term", linear[i]);
            for (double v : quadratic[i]) finite("Entry of G", v);
            Refusal.notNegative("Diagonal of G", quadratic[i][i]);
            if (Double.isNaN(lower[i])
                    || Double.isNaN(upper[i])
                    || lower[i] == Double.POSITIVE_INFINITY
                    || upper[i] == Double.NEGATIVE_INFINITY)
                throw new Refusal("Limits " + lower[i] + " to " + upper[i] + " of variable " + i + " leave nothing.");
        }
        for (int i = 0; i < n; i++)
            for (int j = 0; j < i; j++) {
                double scale = Math.sqrt(quadratic[i][i] * quadratic[j][j]);
                if (Math.abs(quadratic[i][j] - quadratic[j][i]) > 1e-9 * scale
                        || Math.abs(quadratic[i][j]) > (1 + 1e-9) * scale)
                    throw new Refusal("G is not symmetric and positive semidefinite at " + i + ", " + j + ".");
            }
        finite("Constant", constant);
        linear = linear.clone();
        lower = lower.clone();
        upper = upper.clone();
        limits = List.copyOf(limits);
        for (Limit l : limits)
            if (l.row.length != n)
                throw new Refusal("A limit has " + l.row.length + " coefficients for " + n + " variables.");
    }

    /** Amounts that cannot be negative, with upper limits: lower = 0 everywhere. */
    public static ConvexProgramme ofAmounts(
            double[][] quadratic, double[] linear, double constant, double[] upper, List<Limit> limits) {
        return new ConvexProgramme(quadratic, linear, constant, new double[linear.length], upper, limits);
    }

    private static void finite(String what, double v) {
        if (Double.isNaN(v) || Double.isInfinite(v))
            throw new Refusal(what + " is " + v + "; it must be a finite number.");
    }

    /** Solves the programme; deterministic. */
    public Solution solve() {
        return new ProgrammeRun(this).solve();
    }

    /** One solve: the programme in scaled variables, the engine, and the check on the programme as given. */
    private static final class ProgrammeRun {
        final ConvexProgramme p;
        final int n;
        final double[] scale;
        final double[] rowScale;
        final int[] rowIndex;
        final int rows;
        final ActiveSet engine;
        final double[] trueH;

        ProgrammeRun(ConvexProgramme p) {
            this.p = p;
            n = p.linear.length;
            scale = new double[n];
            for (int i = 0; i < n; i++) {
                double size = Math.sqrt(p.quadratic[i][i]);
                if (size == 0) for (Limit l : p.limits) size = Math.max(size, Math.abs(l.row[i]));
                scale[i] = size == 0 ? 1 : 1 / size;
            }
            rowScale = new double[p.limits.size()];
            rowIndex = new int[p.limits.size()];
            int count = 0;
            for (int k = 0; k < rowScale.length; k++) {
                double sum = 0;
                for (int i = 0; i < n; i++) sum += square(p.limits.get(k).row[i] * scale[i]);
                if (sum > 0) {
                    rowScale[k] = 1 / Math.sqrt(sum);
                    rowIndex[count++] = k;
                }
            }
            rows = count;
            engine = new ActiveSet(n, rows);
            engine.ridge = RIDGE;
            trueH = new double[n * n];
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) trueH[i * n + j] = p.quadratic[i][j] * scale[i] * scale[j];
                engine.b[i] = p.linear[i] * scale[i];
                engine.lower[i] = p.lower[i] / scale[i];
                engine.upper[i] = p.upper[i] / scale[i];
                engine.column[i] = new double[rows];
            }
            for (int r = 0; r < rows; r++) {
                Limit l = p.limits.get(rowIndex[r]);
                double f = rowScale[rowIndex[r]];
                for (int i = 0; i < n; i++) engine.column[i][r] = l.row[i] * scale[i] * f;
                engine.low[r] = l.low * f;
                engine.high[r] = l.high * f;
            }
        }

        Solution solve() {
            for (int k = 0; k < p.limits.size(); k++) {
                Limit l = p.limits.get(k);
                if (rowScale[k] == 0 && (l.low > 0 || l.high < 0))
                    return infeasible(List.of(new Binding(l.low > 0 ? Side.LOW : Side.HIGH, k, 1)));
            }
            System.arraycopy(trueH, 0, engine.h, 0, n * n);
            Solution best = attempt();
            double ridge = 1e-6;
            double[] centre = new double[n];
            for (int round = 0; round < 200 && !settled(best); round++) {
                if (round == 100) ridge = 1e-3;
                for (int i = 0; i < n; i++) {
                    double around = best.x == null ? 0 : engine.x[i];
                    centre[i] = Math.max(engine.lower[i], Math.min(engine.upper[i], around));
                    if (Double.isNaN(centre[i]) || Math.abs(centre[i]) > 1e9 && round == 0)
                        centre[i] = Math.max(engine.lower[i], Math.min(engine.upper[i], 0));
                }
                System.arraycopy(trueH, 0, engine.h, 0, n * n);
                for (int i = 0; i < n; i++) {
                    engine.h[i * n + i] += ridge;
                    engine.b[i] = p.linear[i] * scale[i] + ridge * centre[i];
                }
                Solution next = attempt();
                if (next.status == Status.INFEASIBLE) return next;
                if (next.x == null) break;
                if (best.x == null || next.kktResidual < best.kktResidual) best = next;
            }
            if (best.status == Status.INFEASIBLE) return best;
            boolean accepted = best.x != null && best.kktResidual <= ACCEPTED;
            return new Solution(
                    accepted ? Status.OPTIMAL : Status.UNSETTLED, best.x, best.value, best.kktResidual, best.binding);
        }

        private static boolean settled(Solution s) {
            return s.status == Status.INFEASIBLE || s.x != null && s.kktResidual <= SETTLED;
        }

        /** One run of the engine, checked; a run whose limits contradict counts only when the contradiction is proven. */
        private Solution attempt() {
            int outcome = engine.solve(n, rows, Double.POSITIVE_INFINITY);
            if (outcome == ActiveSet.INFEASIBLE) {
                List<Binding> proof = contradiction();
                return proof == null
                        ? new Solution(Status.UNSETTLED, null, Double.NaN, Double.NaN, List.of())
                        : infeasible(proof);
            }
            if (outcome != ActiveSet.OPTIMAL)
                return new Solution(Status.UNSETTLED, null, Double.NaN, Double.NaN, List.of());
            Solution plain = checked();
            if (plain.kktResidual <= SETTLED) return plain;
            double[] b = engine.b.clone();
            for (int i = 0; i < n; i++) engine.b[i] = p.linear[i] * scale[i];
            double[] x = engine.x.clone();
            engine.settle(trueH);
            Solution corrected = checked();
            System.arraycopy(b, 0, engine.b, 0, n);
            if (corrected.kktResidual <= plain.kktResidual) return corrected;
            System.arraycopy(x, 0, engine.x, 0, n);
            return plain;
        }

        private Solution infeasible(List<Binding> proof) {
            return new Solution(Status.INFEASIBLE, null, Double.NaN, Double.NaN, proof);
        }

        private Binding unscaled(int code, double multiplier) {
            if (engine.isLower(code)) return new Binding(Side.LOWER, code, multiplier / scale[code]);
            if (engine.isUpper(code)) return new Binding(Side.UPPER, code - n, multiplier / scale[code - n]);
            int k = rowIndex[engine.rowOf(code)];
            return new Binding(engine.isHigh(code) ? Side.HIGH : Side.LOW, k, multiplier * rowScale[k]);
        }

        private double[] normal(Binding b) {
            double[] normal = new double[n];
            switch (b.side) {
                case LOWER -> normal[b.index] = 1;
                case UPPER -> normal[b.index] = -1;
                case LOW -> normal = p.limits.get(b.index).row.clone();
                case HIGH -> {
                    for (int i = 0; i < n; i++) normal[i] = -p.limits.get(b.index).row[i];
                }
            }
            return normal;
        }

        private double limitOf(Binding b) {
            return switch (b.side) {
                case LOWER -> p.lower[b.index];
                case UPPER -> -p.upper[b.index];
                case LOW -> p.limits.get(b.index).low;
                case HIGH -> -p.limits.get(b.index).high;
            };
        }

        /** Farkas' proof on the programme as given: the weighted limits ask for more than any x can give; else null. */
        private List<Binding> contradiction() {
            List<Binding> proof = new ArrayList<>();
            for (int k = 0; k <= engine.active; k++) {
                if (engine.contradiction[k] <= 0) continue;
                int code = k == engine.active ? engine.contradicting : engine.limit[k];
                proof.add(unscaled(code, engine.contradiction[k]));
            }
            double wanted = 0;
            double size = 0;
            double[] sum = new double[n];
            double[] terms = new double[n];
            for (Binding b : proof) {
                double part = b.multiplier * limitOf(b);
                wanted += part;
                size += Math.abs(part);
                double[] normal = normal(b);
                for (int i = 0; i < n; i++) {
                    sum[i] += b.multiplier * normal[i];
                    terms[i] += Math.abs(b.multiplier * normal[i]);
                }
            }
            double given = 0;
            for (int i = 0; i < n; i++) {
                if (Math.abs(sum[i]) <= 1e-15 * terms[i]) continue;
                double reach = sum[i] > 0 ? p.upper[i] : p.lower[i];
                if (Double.isInfinite(reach)) {
                    if (Math.abs(sum[i]) > 1e-9 * terms[i]) return null;
                    reach = Math.signum(sum[i]) * size / Math.max(terms[i], Double.MIN_NORMAL);
                }
                given += sum[i] * reach;
            }
            return wanted - given > 1e-12 * size ? List.copyOf(proof) : null;
        }

        /** The engine's point as a solution of the programme as given, with its residual. */
        private Solution checked() {
            double[] x = new double[n];
            for (int i = 0; i < n; i++) x[i] = Math.max(p.lower[i], Math.min(p.upper[i], engine.x[i] * scale[i]));
            for (int k = 0; k < engine.active; k++) {
                int code = engine.limit[k];
                if (engine.isLower(code)) x[code] = p.lower[code];
                if (engine.isUpper(code)) x[code - n] = p.upper[code - n];
            }
            List<Binding> binding = new ArrayList<>();
            double[] gradient = new double[n];
            double largest = 0;
            double value = 0;
            for (int i = 0; i < n; i++) {
                double gx = 0;
                for (int j = 0; j < n; j++) {
                    gx += p.quadratic[i][j] * x[j];
                    largest = Math.max(largest, Math.abs(p.quadratic[i][j] * x[j] * scale[i]));
                }
                gradient[i] = gx - p.linear[i];
                largest = Math.max(largest, Math.abs(p.linear[i] * scale[i]));
                value += x[i] * (0.5 * gx - p.linear[i]);
            }
            double residual = 0;
            double negative = 0;
            for (int k = 0; k < engine.active; k++) {
                Binding b = unscaled(engine.limit[k], engine.multiplier[k]);
                double[] normal = normal(b);
                double sum = -limitOf(b);
                double size = Math.abs(sum);
                for (int i = 0; i < n; i++) {
                    gradient[i] -= b.multiplier * normal[i];
                    largest = Math.max(largest, Math.abs(b.multiplier * normal[i] * scale[i]));
                    negative = Math.max(negative, -b.multiplier * Math.abs(normal[i]) * scale[i]);
                    sum += normal[i] * x[i];
                    size += Math.abs(normal[i] * x[i]);
                }
                if (size > 0) residual = Math.max(residual, Math.abs(sum) / size);
                binding.add(b.multiplier < 0 ? new Binding(b.side, b.index, 0) : b);
            }
            for (int i = 0; i < n; i++) {
                if (largest > 0) residual = Math.max(residual, Math.abs(gradient[i]) * scale[i] / largest);
                residual = Math.max(residual, p.lower[i] > p.upper[i] ? 1 : 0);
            }
            if (largest > 0) residual = Math.max(residual, negative / largest);
            for (Limit l : p.limits) {
                double sum = 0;
                double size = 1e-300;
                for (int i = 0; i < n; i++) {
                    sum += l.row[i] * x[i];
                    size += Math.abs(l.row[i] * x[i]);
                }
                if (!Double.isInfinite(l.low)) residual = Math.max(residual, (l.low - sum) / (size + Math.abs(l.low)));
                if (!Double.isInfinite(l.high))
                    residual = Math.max(residual, (sum - l.high) / (size + Math.abs(l.high)));
            }
            if (Double.isNaN(residual)) residual = Double.POSITIVE_INFINITY;
            return new Solution(Status.OPTIMAL, x, value + p.constant, residual, List.copyOf(binding));
        }

        private static double square(double v) {
            return v * v;
        }
    }
}
