package org.hazewright.brief;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/**
 * What is wanted: targets, tolerances, base, batch and balance.
 *
 * @param name of the file, without its ending; results are called after it
 * @param bases one or more candidate bases by id
 * @param batchMl wanted volume before the extra share {@code overage}
 * @param stocksInHand dilutions that are made already and may be used, in making order
 * @param tissue the composition that the targets were made from, when they were
 */
public record Brief(
        String name,
        String title,
        List<String> bases,
        double batchMl,
        double overage,
        double temperatureC,
        List<Target> targets,
        List<Mould> moulds,
        SearchLimits limits,
        Balance balance,
        List<StockInHand> stocksInHand,
        Optional<Tissue> tissue,
        Optional<String> sha256) {

    private static final double MOST_ML = 1e6;
    private static final int MOST_LOADS = 1000;

    public Brief {
        bases = List.copyOf(bases);
        targets = List.copyOf(targets);
        moulds = List.copyOf(moulds);
        stocksInHand = List.copyOf(stocksInHand);
        if (bases.isEmpty())
            throw new Refusal("The brief names no base; give base = \"water\" or another base of the shelf.");
        if (targets.isEmpty())
            throw new Refusal(
                    "The brief has no targets; give at least one [[target]] with wavelength_nm and mua_per_cm or"
                            + " musp_per_cm, or a [tissue].");
        Refusal.positive("batch_ml", batchMl);
        if (batchMl > MOST_ML)
            throw new Refusal("The batch is " + Figures.plain(batchMl) + " mL; it may be at most "
                    + Figures.plain(MOST_ML) + " mL, a cubic metre.");
        if (batchMl > MOST_LOADS * balance.capacityG())
            throw new Refusal("A batch of " + Figures.plain(batchMl) + " mL takes more than " + MOST_LOADS
                    + " loads on a balance of " + Figures.plain(balance.capacityG())
                    + " g capacity; check the unit of either, or make it in parts.");
        Refusal.within("overage", overage, 0, 2);
        Refusal.within("temperature_c", temperatureC, 0, 100);
    }

    /** Without stocks in hand. */
    public Brief(
            String name,
            String title,
            List<String> bases,
            double batchMl,
            double overage,
            double temperatureC,
            List<Target> targets,
            List<Mould> moulds,
            SearchLimits limits,
            Balance balance,
            Optional<Tissue> tissue,
            Optional<String> sha256) {
        this(
                name,
                title,
                bases,
                batchMl,
                overage,
                temperatureC,
                targets,
                moulds,
                limits,
                balance,
                List.of(),
                tissue,
                sha256);
    }

    /** Volume to make, mL: the batch and the extra share. */
    public double volumeMl() {
        return batchMl * (1 + overage);
    }

    /** The wanted numbers one by one: by target, µa before µs'. */
    public List<Point> points() {
        List<Point> points = new ArrayList<>();
        for (Target t : targets) {
            t.muaPerCm()
                    .ifPresent(v -> points.add(
                            new Point(Point.Quantity.MUA, t.wavelengthNm(), v, t.muaTolerancePerCm(), t.weight())));
            t.muspPerCm()
                    .ifPresent(v -> points.add(
                            new Point(Point.Quantity.MUSP, t.wavelengthNm(), v, t.muspTolerancePerCm(), t.weight())));
        }
        return points;
    }

    /** Wavelengths wanted, in nm, ascending, each once. */
    public double[] wavelengthsNm() {
        return targets.stream()
                .mapToDouble(Target::wavelengthNm)
                .sorted()
                .distinct()
                .toArray();
    }

    /** The same brief with other targets. */
    public Brief withTargets(List<Target> others) {
        return new Brief(
                name,
                title,
                bases,
                batchMl,
                overage,
                temperatureC,
                others,
                moulds,
                limits,
                balance,
                stocksInHand,
                tissue,
                Optional.empty());
    }
}
