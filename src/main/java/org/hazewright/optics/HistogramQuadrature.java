package org.hazewright.optics;

import java.util.ArrayList;
import java.util.List;

/**
 * Averages over a histogram of sizes: Gauss–Kronrod rules of 7 and 15 points on each bin, bins halved where they disagree.
 *
 * <p>Error estimate: the sum over all panels of |15-point − 7-point|, which is the error of the coarser rule. Nodes and
 * weights: Piessens et al., <em>QUADPACK</em>, Springer 1983.
 */
final class HistogramQuadrature extends SizeQuadrature {
    private static final double[] NODE = {
        0.991455371120812639206854697526329,
        0.949107912342758524526189684047851,
        0.864864423359769072789712788640926,
        0.741531185599394439863864773280788,
        0.586087235467691130294144691258129,
        0.405845151377397166906606412076961,
        0.207784955007898467600689403773245,
        0
    };
    private static final double[] KRONROD = {
        0.022935322010529224963732008058970,
        0.063092092629978553290700663189204,
        0.104790010322250183839876322541518,
        0.140653259715525918745189590510238,
        0.169004726639267902826583426598550,
        0.190350578064785409913256402421014,
        0.204432940075298892414161999234649,
        0.209482141084727828012999174891714
    };

    /** Weights of the 7-point rule, which has every second node. */
    private static final double[] GAUSS = {
        0,
        0.129484966168869693270611432679082,
        0,
        0.279705391489276667901467771423780,
        0,
        0.381830050505118944950369775488975,
        0,
        0.417959183673469387755102040816327
    };

    private static final int POINTS = 15;

    /** No average is better than the spheres in it. */
    private static final double ROUNDING = 1e-10;

    /** A stretch of one bin; {@code density} is the number of particles in it per nm. */
    private static final class Panel {
        final double low;
        final double high;
        final double density;
        final double[] average = new double[FIGURES];
        final double[] error = new double[FIGURES];

        Panel(double low, double high, double density) {
            this.low = low;
            this.high = high;
            this.density = density;
        }

        /** Node of place 0 … 14 and, with it, the place in the tables. */
        double node(int place) {
            double z = place < 8 ? -NODE[place] : NODE[14 - place];
            return (low + high) / 2 + (high - low) / 2 * z;
        }

        static double kronrod(int place) {
            return KRONROD[place < 8 ? place : 14 - place];
        }

        static double gauss(int place) {
            return GAUSS[place < 8 ? place : 14 - place];
        }
    }

    private final List<Panel> settled = new ArrayList<>();
    private List<Panel> open = new ArrayList<>();
    private final double leastNm;
    private double[] averages;
    private double error = Double.NaN;

    HistogramQuadrature(SizeDistribution.Histogram sizes, double sizePerNm) {
        double[] edges = sizes.edgesNm();
        double[] weights = sizes.weights();
        if (edges[weights.length] * sizePerNm > Mie.X_MAX)
            throw new Refusal("This size table reaches " + Plain.number(edges[weights.length])
                    + " nm, a size parameter of " + Plain.number(Math.rint(edges[weights.length] * sizePerNm))
                    + "; spheres can be computed up to 20000.");
        this.leastNm = Mie.X_MIN / sizePerNm;
        for (int i = 0; i < weights.length; i++)
            if (weights[i] > 0) open.add(new Panel(edges[i], edges[i + 1], weights[i] / (edges[i + 1] - edges[i])));
    }

    @Override
    double[] wantedNm() {
        double[] out = new double[POINTS * open.size()];
        for (int i = 0; i < out.length; i++)
            // a bin may begin at 0; below the smallest sphere the cross section is as good as 0 beside the rest of the
            // bin
            out[i] = Math.max(leastNm, open.get(i / POINTS).node(i % POINTS));
        return out;
    }

    @Override
    void accept(double[][] figures) {
        for (int p = 0; p < open.size(); p++) {
            Panel panel = open.get(p);
            double half = panel.density * (panel.high - panel.low) / 2;
            for (int j = 0; j < FIGURES; j++) {
                double kronrod = 0;
                double gauss = 0;
                for (int i = 0; i < POINTS; i++) {
                    kronrod += Panel.kronrod(i) * figures[j][p * POINTS + i];
                    gauss += Panel.gauss(i) * figures[j][p * POINTS + i];
                }
                panel.average[j] = half * kronrod;
                panel.error[j] = half * Math.abs(kronrod - gauss);
            }
        }
        settled.addAll(open);
        averages = new double[FIGURES];
        double[] errors = new double[FIGURES];
        for (Panel panel : settled)
            for (int j = 0; j < FIGURES; j++) {
                averages[j] += panel.average[j];
                errors[j] += panel.error[j];
            }
        error = Math.max(worst(errors, averages), ROUNDING);
        open = new ArrayList<>();
        if (error <= WANTED || POINTS * settled.size() > MOST_SPHERES / 2) {
            return;
        }
        double share = WANTED / settled.size();
        List<Panel> good = new ArrayList<>();
        for (Panel panel : settled) {
            if (worst(panel.error, averages) <= share) {
                good.add(panel);
            } else {
                double middle = (panel.low + panel.high) / 2;
                open.add(new Panel(panel.low, middle, panel.density));
                open.add(new Panel(middle, panel.high, panel.density));
            }
        }
        settled.clear();
        settled.addAll(good);
    }

    @Override
    double[] averages() {
        return averages;
    }

    @Override
    double relativeError() {
        return error;
    }

    @Override
    double[] diametersNm() {
        double[] out = new double[POINTS * settled.size()];
        for (int i = 0; i < out.length; i++)
            out[i] = Math.max(leastNm, settled.get(i / POINTS).node(i % POINTS));
        return out;
    }

    @Override
    double[] weights() {
        double[] out = new double[POINTS * settled.size()];
        for (int i = 0; i < out.length; i++) {
            Panel panel = settled.get(i / POINTS);
            out[i] = panel.density * (panel.high - panel.low) / 2 * Panel.kronrod(i % POINTS);
        }
        return out;
    }
}
