package org.hazewright.bench;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Ingredient;

/**
 * What one weighing does to the targets when it is off and all else is as planned, and how far it may be off.
 *
 * <p>{@code lowG} to {@code highG} are the grams over which no target that is inside its tolerance leaves it and no miss moves by
 * more than {@value #QUARTER}: a phantom takes about four weighings that matter, so with every one of them at the end of its band
 * and all against one target the miss moves by one half-width at most, and by half of one when they are as likely up as down (in
 * quadrature). The band is cut inwards to what the balance shows, never narrower than one last digit either way, never wider than
 * {@value #WIDEST} of the mass (grams that do nothing to light still have a recipe to keep), and for the parts of a base that
 * cures never wider than {@value #WIDEST_PART} (their ratio decides the cure; common practice).
 *
 * <p>µ of a weighing of m grams is (A + t B)/(C + t D), with t the grams of an item, or the share s/(s + d) of a stock: exact but
 * for the host index and crowding, which are held at their planned values.
 */
public record Sensitivity(Weighing weighing, double lowG, double highG, List<Effect> effects) {
    private static final double QUARTER = 0.25;
    private static final double WIDEST = 0.05;
    private static final double WIDEST_PART = 0.02;

    /** How far one target moves, in 1/cm and in half-widths of its tolerance, for one per cent and for one milligram more. */
    public record Effect(
            Point point, double perPercentPerCm, double perPercentMiss, double perMgPerCm, double perMgMiss) {}

    public Sensitivity {
        effects = List.copyOf(effects);
    }

    /** The largest move of any target for one per cent more, in half-widths. */
    public double worstPerPercentMiss() {
        return effects.stream()
                .mapToDouble(e -> Math.abs(e.perPercentMiss()))
                .max()
                .orElse(0);
    }

    /** One for every mass of the recipe, in the order of {@link Weighing#of}. */
    public static List<Sensitivity> of(Recipe recipe, Balance balance, List<Point> points) {
        Map<Ingredient, Double> masses = recipe.massesG();
        Map<Ingredient, double[]> kappa = kappa(Mixture.of(recipe), points);
        double[] mu = values(masses, kappa, points.size());
        List<Sensitivity> all = new ArrayList<>();
        for (Weighing w : Weighing.of(recipe)) {
            List<Effect> effects = new ArrayList<>();
            double[] percent = moved(recipe, w, 0.01 * w.massG(), kappa, points.size());
            double[] mg = moved(recipe, w, 0.001, kappa, points.size());
            for (int j = 0; j < mu.length; j++) {
                Point p = points.get(j);
                effects.add(new Effect(
                        p,
                        percent[j] - mu[j],
                        (percent[j] - mu[j]) / p.tolerancePerCm(),
                        mg[j] - mu[j],
                        (mg[j] - mu[j]) / p.tolerancePerCm()));
            }
            double[] band = new Band(recipe, w, balance, points, kappa, mu).grams();
            all.add(new Sensitivity(w, band[0], band[1], effects));
        }
        return all;
    }

    /** Mass-specific coefficients of what is in the mixture, cm²/g, at the points. */
    private static Map<Ingredient, double[]> kappa(Mixture mixture, List<Point> points) {
        Map<Ingredient, double[]> kappa = new LinkedHashMap<>();
        mixture.massesG().keySet().forEach(i -> kappa.put(i, new double[points.size()]));
        Map<Double, Coefficients> at = new LinkedHashMap<>();
        for (int j = 0; j < points.size(); j++) {
            Point p = points.get(j);
            for (Coefficients.Share share :
                    at.computeIfAbsent(p.wavelengthNm(), mixture::at).shares()) {
                double c = mixture.concentrationGPerMl(share.ingredient());
                double mu = p.quantity() == Point.Quantity.MUA ? share.muaPerCm() : share.muspPerCm();
                kappa.get(share.ingredient())[j] = c > 0 ? mu / c : 0;
            }
        }
        return kappa;
    }

    private static double[] moved(Recipe recipe, Weighing w, double byG, Map<Ingredient, double[]> kappa, int points) {
        return values(w.changed(recipe, w.massG() + byG).massesG(), kappa, points);
    }

    private static double[] values(Map<Ingredient, Double> massesG, Map<Ingredient, double[]> kappa, int points) {
        double[] mu = new double[points];
        double volume = add(massesG, kappa, mu);
        for (int j = 0; j < points; j++) mu[j] /= volume;
        return mu;
    }

    /** Adds grams times coefficients to {@code sums}; returns the volume in mL. */
    private static double add(Map<Ingredient, Double> massesG, Map<Ingredient, double[]> kappa, double[] sums) {
        double volume = 0;
        for (var entry : massesG.entrySet()) {
            volume += entry.getValue() / entry.getKey().densityGPerMl();
            double[] k = kappa.get(entry.getKey());
            for (int j = 0; j < sums.length; j++) sums[j] += entry.getValue() * k[j];
        }
        return volume;
    }

    /** The allowed grams of one weighing. */
    private record Band(
            Recipe recipe,
            Weighing w,
            Balance balance,
            List<Point> points,
            Map<Ingredient, double[]> kappa,
            double[] mu) {

        double[] grams() {
            double[] t = allowed();
            double widest = (ofCuringBase() ? WIDEST_PART : WIDEST) * w.massG();
            double r = balance.readabilityG();
            double oneEnd = massOf(t[0]);
            double otherEnd = massOf(t[1]); // a stock's share falls with its diluent
            double low = Math.max(Math.min(oneEnd, otherEnd), w.massG() - widest);
            double high = Math.min(Math.max(oneEnd, otherEnd), w.massG() + widest);
            low = balance.rounded(Math.ceil(low / r - 1e-6) * r);
            high = balance.rounded(Math.floor(high / r + 1e-6) * r);
            return new double[] {
                Math.max(0, Math.min(low, balance.rounded(w.massG() - r))),
                Math.max(high, balance.rounded(w.massG() + r))
            };
        }

        private boolean ofCuringBase() {
            return WeighingOrder.castAndCured(recipe.base())
                    && w.role() == Weighing.Role.ITEM
                    && w.from().isEmpty()
                    && (w.ingredient().equals(recipe.base())
                            || recipe.base().blend().stream()
                                    .anyMatch(p ->
                                            p.ingredient().equals(w.ingredient().id())));
        }

        /** Ends of the interval of t around its plan in which every target allows it. */
        private double[] allowed() {
            double plan = tOf(w.massG());
            double other = tOf(w.massG() * 1.5);
            Map<Ingredient, Double> masses = recipe.massesG();
            Map<Ingredient, Double> slope = w.changed(recipe, w.massG() * 1.5).massesG();
            slope.replaceAll((i, g) -> (g - masses.getOrDefault(i, 0.0)) / (other - plan));
            double[] sums = new double[points.size()];
            double volume = add(masses, kappa, new double[points.size()]);
            double volumeSlope = add(slope, kappa, sums);
            double down = Double.NEGATIVE_INFINITY;
            double up = Double.POSITIVE_INFINITY;
            for (int j = 0; j < points.size(); j++) {
                Point p = points.get(j);
                double miss = p.miss(mu[j]);
                for (int side : new int[] {1, -1}) {
                    double toEdge = 1 - side * miss;
                    double slack = toEdge >= 0 ? Math.min(QUARTER, toEdge) : QUARTER;
                    double bound = mu[j] + side * slack * p.tolerancePerCm();
                    double room = volume * slack * p.tolerancePerCm();
                    double rate = side * (sums[j] - bound * volumeSlope); // side (µ − bound) ≤ 0 is δt · rate ≤ room
                    if (rate > 0) up = Math.min(up, room / rate);
                    if (rate < 0) down = Math.max(down, room / rate);
                }
            }
            return new double[] {plan + down, plan + up};
        }

        /** What the masses are linear in. */
        private double tOf(double massG) {
            if (w.role() == Weighing.Role.ITEM) return massG;
            double partnerG = partnerG();
            return w.role() == Weighing.Role.STOCK_SUBSTANCE
                    ? massG / (massG + partnerG)
                    : partnerG / (massG + partnerG);
        }

        private double massOf(double t) {
            if (w.role() == Weighing.Role.ITEM) return t;
            double share = Math.min(Math.max(t, 1e-12), 1 - 1e-12);
            double odds = share / (1 - share);
            return w.role() == Weighing.Role.STOCK_SUBSTANCE ? partnerG() * odds : partnerG() / odds;
        }

        private double partnerG() {
            var stock = recipe.stocks().get(w.place());
            return w.role() == Weighing.Role.STOCK_SUBSTANCE ? stock.diluentG() : stock.ingredientG();
        }
    }
}
