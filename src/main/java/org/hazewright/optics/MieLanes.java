package org.hazewright.optics;

/**
 * Many spheres side by side: the equations of {@link MieSeries}, one partial wave at a time for {@value #LANES} spheres.
 *
 * <p>The cost of one sphere is a chain of divisions, each waiting for the one before. Here the inner loop runs over spheres,
 * which do not wait for each other, and the compiler turns it into vector instructions. For that each loop is short and
 * addresses few arrays, each cut into sections of {@value #LANES} numbers at constant offsets. A block keeps ψ, F and K of all
 * its orders between the downward and the upward pass.
 *
 * <p>Spheres of a block share the number of orders (that of the largest), so they should be of similar size: {@link #leastBeside}
 * says how similar they must be for ψ and χ to stay within the range of double precision. Not for use by two threads at once.
 */
final class MieLanes {
    static final int LANES = 32;

    private static final int L1 = LANES;
    private static final int L2 = 2 * LANES;
    private static final int L3 = 3 * LANES;
    private static final int L4 = 4 * LANES;
    private static final int L5 = 5 * LANES;
    private static final int L6 = 6 * LANES;
    private static final int L7 = 7 * LANES;

    /** Rows kept from one use to the next; spheres with more orders are rare, and their rows are given back. */
    private static final int KEPT_ROWS = 600;

    private static final ThreadLocal<MieLanes> PER_THREAD = ThreadLocal.withInitial(MieLanes::new);

    private final double[] x = new double[LANES];
    private final double[] n = new double[LANES];
    private final double[] k = new double[LANES];

    /** Sections: 1/x, Re m², Im m², Re(m² − 1), Im(m² − 1), the last two times the factor that scales ψ, that factor. */
    private final double[] sphere = new double[8 * LANES];

    /** Sections: χ_n, χ_{n−1}, then L and B of the order (real and imaginary parts where complex). */
    private final double[] side = new double[8 * LANES];

    /** Sections: A of the order, its parts, then 1/((2n + 1)/x − F). */
    private final double[] top = new double[4 * LANES];

    /** a and b of this order and of the one before: sections Re a, Im a, Re b, Im b. */
    private double[] wave = new double[4 * LANES];

    private double[] waveBefore = new double[4 * LANES];

    /** Sections: scattering, asymmetry, absorption. */
    private final double[] sums = new double[3 * LANES];

    /** One row an order: sections ψ, Re F, Re K, Im F, Im K. */
    private double[][] rows = new double[0][];

    private int filled;

    /** The block of the calling thread, to be cleared and used again. */
    static MieLanes ofThisThread() {
        MieLanes lanes = PER_THREAD.get();
        if (lanes.rows.length > KEPT_ROWS) lanes.rows = new double[0][];
        return lanes;
    }

    /** The smallest sphere that may share a block with one of size x. */
    static double leastBeside(double x) {
        // ψ and χ of the smaller sphere at the orders of the larger must stay within 1e±75 or so
        double orders = Mie.orders(x, true);
        double spread = Math.cbrt(100 / orders);
        double fewest = Math.max(orders / 2 - 6, orders / (1 + spread * spread));
        double root = Math.cbrt(fewest);
        for (int i = 0; i < 8; i++) root -= (root * (root * root + 7) + 3 - fewest) / (3 * root * root + 7);
        return Math.min(0.95 * x, root * root * root);
    }

    void clear() {
        filled = 0;
    }

    int filled() {
        return filled;
    }

    void add(double size, double index, double absorption) {
        x[filled] = size;
        n[filled] = index;
        k[filled] = absorption;
        filled++;
    }

    double qSca(int lane) {
        return 2 / (x[lane] * x[lane]) * sums[lane];
    }

    double qAbs(int lane) {
        return 2 / (x[lane] * x[lane]) * sums[lane + L2];
    }

    double g(int lane) {
        return sums[lane] > 0 ? 2 * sums[lane + L1] / sums[lane] : 0;
    }

    /** Solves the spheres added since {@link #clear}: all with k = 0 or none, all |m| ≥ 1 ({@code dense}) or none. */
    void solve(boolean absorbing, boolean dense) {
        double largest = 0;
        double largestInside = 0;
        for (int i = 0; i < LANES; i++) {
            if (i >= filled) {
                x[i] = x[0];
                n[i] = n[0];
                k[i] = k[0];
            }
            double uRe = (n[i] - 1) * (n[i] + 1) - k[i] * k[i];
            double uIm = 2 * n[i] * k[i];
            sphere[i] = 1 / x[i];
            sphere[i + L1] = uRe + 1;
            sphere[i + L2] = uIm;
            sphere[i + L3] = uRe;
            sphere[i + L4] = uIm;
            largest = Math.max(largest, x[i]);
            largestInside = Math.max(largestInside, x[i] * x[i] * (n[i] * n[i] + k[i] * k[i]));
        }
        int orders = Mie.orders(largest, absorbing);
        int startOfPsi = Mie.startOfDownward(largest);
        int start = Mie.startOfDownward(Math.sqrt(largestInside));
        start = Math.max(start, startOfPsi);
        begin(orders, absorbing ? 5 : 3);
        psi(orders, startOfPsi);
        if (absorbing) {
            downComplex(orders, start, dense);
            upComplex(orders);
        } else {
            downReal(orders, start, dense);
            upReal(orders);
        }
    }

    private void begin(int orders, int sections) {
        if (rows.length < orders + 2) {
            double[][] more = new double[orders + 2][];
            System.arraycopy(rows, 0, more, 0, rows.length);
            rows = more;
        }
        for (int i = 0; i < orders + 2; i++)
            if (rows[i] == null || rows[i].length < sections * LANES) rows[i] = new double[sections * LANES];
    }

    /** ψ of all orders, downward, then the factor that gives ψ_0 = sin x and ψ_{−1} = cos x. */
    private void psi(int orders, int start) {
        double[] above = rows[orders + 1];
        double[] here = rows[orders];
        for (int i = 0; i < LANES; i++) {
            above[i] = 0;
            here[i] = 1e-60;
        }
        for (int i = start; i > orders; i--) {
            psiStep(2 * i + 1, sphere, above, here, above);
            double[] spare = above;
            above = here;
            here = spare;
        }
        if (here != rows[orders]) {
            double[] spare = rows[orders];
            rows[orders] = here;
            rows[orders + 1] = spare;
        }
        for (int i = orders; i >= 1; i--) psiStep(2 * i + 1, sphere, rows[i + 1], rows[i], rows[i - 1]);
        double[] zero = rows[0];
        double[] one = rows[1];
        for (int i = 0; i < LANES; i++) {
            double sin = Math.sin(x[i]);
            double cos = Math.cos(x[i]);
            double minusOne = zero[i] * sphere[i] - one[i];
            double scale = (sin * zero[i] + cos * minusOne) / (zero[i] * zero[i] + minusOne * minusOne);
            sphere[i + L7] = scale;
            sphere[i + L5] = sphere[i + L3] * scale;
            sphere[i + L6] = sphere[i + L4] * scale;
            side[i] = cos * sphere[i] + sin;
            side[i + L1] = cos;
        }
    }

    private static void psiStep(double c, double[] sphere, double[] above, double[] here, double[] below) {
        for (int i = 0; i < LANES; i++) below[i] = c * sphere[i] * here[i] - above[i];
    }

    // ---- real index

    private void downReal(int orders, int start, boolean dense) {
        double[] f = rows[orders];
        for (int i = 0; i < LANES; i++) f[i + L1] = 0;
        for (int i = start; i > orders; i--) fStepReal(2 * i + 1, sphere, f);
        double[] psiAbove = rows[orders + 1];
        for (int i = 0; i < LANES; i++) f[i + L2] = (f[i + L1] * f[i] - psiAbove[i]) * sphere[i + L7];
        for (int i = orders; i >= 1; i--) {
            if (dense) stepRealDense(2 * i + 1, sphere, rows[i], rows[i - 1]);
            else stepRealThin(2 * i + 1, sphere, rows[i], rows[i - 1]);
        }
    }

    private static void fStepReal(double c, double[] sphere, double[] row) {
        for (int i = 0; i < LANES; i++) row[i + L1] = sphere[i + L1] / (c * sphere[i] - row[i + L1] + Mie.OFF_POLE);
    }

    private static void stepRealDense(double c, double[] sphere, double[] here, double[] below) {
        for (int i = 0; i < LANES; i++) {
            double r = 1 / (c * sphere[i] - here[i + L1] + Mie.OFF_POLE);
            below[i + L1] = sphere[i + L1] * r;
            below[i + L2] = (here[i + L2] + sphere[i + L5] * below[i]) * r;
        }
    }

    private static void stepRealThin(double c, double[] sphere, double[] here, double[] below) {
        for (int i = 0; i < LANES; i++) {
            double f = sphere[i + L1] / (c * sphere[i] - here[i + L1] + Mie.OFF_POLE);
            below[i + L1] = f;
            below[i + L2] = here[i + L2] * f + sphere[i + L5] * here[i];
        }
    }

    private void upReal(int orders) {
        for (int i = 0; i < 4 * LANES; i++) waveBefore[i] = 0;
        for (int i = 0; i < 3 * LANES; i++) sums[i] = 0;
        for (int i = 1; i <= orders; i++) {
            sidesReal(i, 2 * i + 1, sphere, rows[i], rows[i - 1], side, top);
            wavesReal(rows[i], side, top, wave);
            addOwn(2 * i + 1, (2 * i + 1.0) / (i * (i + 1.0)), wave, sums);
            addNext((i - 1) * (i + 1.0) / i, wave, waveBefore, sums);
            double[] spare = waveBefore;
            waveBefore = wave;
            wave = spare;
        }
    }

    private static void sidesReal(
            double n, double c, double[] sphere, double[] here, double[] below, double[] side, double[] top) {
        for (int i = 0; i < LANES; i++) {
            double inverse = sphere[i];
            double chi = side[i];
            double chiBelow = side[i + L1];
            double above = c * inverse * chi - chiBelow;
            double nx = n * inverse;
            double l = here[i + L1] * chi - above;
            side[i] = above;
            side[i + L1] = chi;
            side[i + L2] = l;
            side[i + L3] = l + sphere[i + L3] * (chiBelow - nx * chi);
            top[i] = here[i + L2] + sphere[i + L5] * (below[i] - nx * here[i]);
        }
    }

    private static void wavesReal(double[] here, double[] side, double[] top, double[] wave) {
        for (int i = 0; i < LANES; i++) {
            double a = top[i];
            double sideA = side[i + L3];
            double b = here[i + L2];
            double sideB = side[i + L2];
            double ra = a / (a * a + sideA * sideA);
            double rb = b / (b * b + sideB * sideB);
            wave[i] = a * ra;
            wave[i + L1] = sideA * ra;
            wave[i + L2] = b * rb;
            wave[i + L3] = sideB * rb;
        }
    }

    /** Scattering of this order (real index: |a|² = Re a) and the product of a and b in the asymmetry. */
    private static void addOwn(double c, double w, double[] wave, double[] sums) {
        for (int i = 0; i < LANES; i++) {
            sums[i] += c * (wave[i] + wave[i + L2]);
            sums[i + L1] += w * (wave[i] * wave[i + L2] + wave[i + L1] * wave[i + L3]);
        }
    }

    /** Products with the order before, in the asymmetry. */
    private static void addNext(double w, double[] wave, double[] before, double[] sums) {
        for (int i = 0; i < LANES; i++)
            sums[i + L1] += w
                    * (wave[i] * before[i]
                            + wave[i + L1] * before[i + L1]
                            + wave[i + L2] * before[i + L2]
                            + wave[i + L3] * before[i + L3]);
    }

    // ---- complex index

    private void downComplex(int orders, int start, boolean dense) {
        double[] f = rows[orders];
        for (int i = 0; i < LANES; i++) {
            f[i + L1] = 0;
            f[i + L3] = 0;
        }
        double[] psiAbove = rows[orders + 1];
        for (int i = start; i > orders; i--) fStepComplex(2 * i + 1, sphere, f, f, top);
        for (int i = 0; i < LANES; i++) {
            f[i + L2] = (f[i + L1] * f[i] - psiAbove[i]) * sphere[i + L7];
            f[i + L4] = f[i + L3] * f[i] * sphere[i + L7];
        }
        for (int i = orders; i >= 1; i--) {
            fStepComplex(2 * i + 1, sphere, rows[i], rows[i - 1], top);
            if (dense) kStepDense(sphere, rows[i], rows[i - 1], top);
            else kStepThin(sphere, rows[i], rows[i - 1]);
        }
    }

    private static void fStepComplex(double c, double[] sphere, double[] here, double[] below, double[] top) {
        for (int i = 0; i < LANES; i++) {
            double d = c * sphere[i] - here[i + L1] + Mie.OFF_POLE;
            double f = here[i + L3];
            double norm = 1 / (d * d + f * f);
            double re = d * norm;
            double im = f * norm;
            top[i + L2] = re;
            top[i + L3] = im;
            below[i + L1] = sphere[i + L1] * re - sphere[i + L2] * im;
            below[i + L3] = sphere[i + L1] * im + sphere[i + L2] * re;
        }
    }

    private static void kStepDense(double[] sphere, double[] here, double[] below, double[] top) {
        for (int i = 0; i < LANES; i++) {
            double re = here[i + L2] + sphere[i + L5] * below[i];
            double im = here[i + L4] + sphere[i + L6] * below[i];
            below[i + L2] = re * top[i + L2] - im * top[i + L3];
            below[i + L4] = re * top[i + L3] + im * top[i + L2];
        }
    }

    private static void kStepThin(double[] sphere, double[] here, double[] below) {
        for (int i = 0; i < LANES; i++) {
            double re = below[i + L1];
            double im = below[i + L3];
            below[i + L2] = here[i + L2] * re - here[i + L4] * im + sphere[i + L5] * here[i];
            below[i + L4] = here[i + L2] * im + here[i + L4] * re + sphere[i + L6] * here[i];
        }
    }

    private void upComplex(int orders) {
        for (int i = 0; i < 4 * LANES; i++) waveBefore[i] = 0;
        for (int i = 0; i < 3 * LANES; i++) sums[i] = 0;
        for (int i = 1; i <= orders; i++) {
            double c = 2 * i + 1;
            sidesComplex(c, sphere, rows[i], side);
            topsComplex(i, sphere, rows[i], rows[i - 1], side, top);
            sidesOfA(sphere, side);
            waveB(rows[i], side, wave, top);
            absorbB(c, rows[i], top, sums);
            waveA(side, wave, top);
            absorbA(c, i + 1, sphere, rows[i], top, sums);
            addScattering(c, wave, sums);
            addAcross((2 * i + 1.0) / (i * (i + 1.0)), wave, sums);
            addNext((i - 1) * (i + 1.0) / i, wave, waveBefore, sums);
            double[] spare = waveBefore;
            waveBefore = wave;
            wave = spare;
        }
    }

    /** χ one order up (the order's own in section 1), L in sections 2 and 3, χ' in section 4. */
    private static void sidesComplex(double c, double[] sphere, double[] here, double[] side) {
        for (int i = 0; i < LANES; i++) {
            double chi = side[i];
            double chiBelow = side[i + L1];
            double above = c * sphere[i] * chi - chiBelow;
            side[i] = above;
            side[i + L1] = chi;
            side[i + L2] = here[i + L1] * chi - above;
            side[i + L3] = here[i + L3] * chi;
            side[i + L4] = chiBelow;
        }
    }

    private static void topsComplex(
            double n, double[] sphere, double[] here, double[] below, double[] side, double[] top) {
        for (int i = 0; i < LANES; i++) {
            double nx = n * sphere[i];
            double slope = below[i] - nx * here[i];
            top[i] = here[i + L2] + sphere[i + L5] * slope;
            top[i + L1] = here[i + L4] + sphere[i + L6] * slope;
            side[i + L5] = side[i + L4] - nx * side[i + L1];
        }
    }

    private static void sidesOfA(double[] sphere, double[] side) {
        for (int i = 0; i < LANES; i++) {
            side[i + L6] = side[i + L2] + sphere[i + L3] * side[i + L5];
            side[i + L7] = side[i + L3] + sphere[i + L4] * side[i + L5];
        }
    }

    private static void waveB(double[] here, double[] side, double[] wave, double[] top) {
        for (int i = 0; i < LANES; i++) {
            double re = here[i + L2];
            double im = here[i + L4];
            double denRe = re + side[i + L3];
            double denIm = im - side[i + L2];
            double norm = 1 / (denRe * denRe + denIm * denIm);
            wave[i + L2] = (re * denRe + im * denIm) * norm;
            wave[i + L3] = (im * denRe - re * denIm) * norm;
            top[i + L2] = norm;
        }
    }

    private static void waveA(double[] side, double[] wave, double[] top) {
        for (int i = 0; i < LANES; i++) {
            double re = top[i];
            double im = top[i + L1];
            double denRe = re + side[i + L7];
            double denIm = im - side[i + L6];
            double norm = 1 / (denRe * denRe + denIm * denIm);
            wave[i] = (re * denRe + im * denIm) * norm;
            wave[i + L1] = (im * denRe - re * denIm) * norm;
            top[i + L2] = norm;
        }
    }

    private static void absorbB(double c, double[] here, double[] top, double[] sums) {
        for (int i = 0; i < LANES; i++) sums[i + L2] += c * here[i + L3] * top[i + L2];
    }

    private static void absorbA(double c, double next, double[] sphere, double[] here, double[] top, double[] sums) {
        for (int i = 0; i < LANES; i++)
            sums[i + L2] += c
                    * (here[i + L3] * sphere[i + L1] + (next * sphere[i] - here[i + L1]) * sphere[i + L2])
                    * top[i + L2];
    }

    private static void addScattering(double c, double[] wave, double[] sums) {
        for (int i = 0; i < LANES; i++)
            sums[i] += c
                    * (wave[i] * wave[i]
                            + wave[i + L1] * wave[i + L1]
                            + wave[i + L2] * wave[i + L2]
                            + wave[i + L3] * wave[i + L3]);
    }

    private static void addAcross(double w, double[] wave, double[] sums) {
        for (int i = 0; i < LANES; i++) sums[i + L1] += w * (wave[i] * wave[i + L2] + wave[i + L1] * wave[i + L3]);
    }
}
