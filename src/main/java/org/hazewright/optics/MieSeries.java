package org.hazewright.optics;

/**
 * Light scattered by one homogeneous sphere: the Mie coefficients a_n and b_n, and what follows from them at an angle.
 *
 * <p>Size parameter x = πD n_h/λ (D diameter, n_h index of the host, λ wavelength in vacuum) and relative index
 * m = n + ik = (n_p + ik_p)/n_h; k ≥ 0 absorbs. Domain: 1e-4 ≤ x ≤ 2e4, 0.2 ≤ n ≤ 10, 0 ≤ k ≤ 10; outside it a {@link
 * Refusal}. No separate series for small x is needed: nothing below subtracts two near-equal numbers there.
 *
 * <p>With ψ_n, χ_n the Riccati–Bessel functions of x, y = mx and F_n = mψ_{n+1}(y)/ψ_n(y), the coefficients are those of
 * Bohren &amp; Huffman, <em>Absorption and Scattering of Light by Small Particles</em>, Wiley 1983, eq. 4.53, written as
 *
 * <pre>
 *   b_n = K/(K − iL)      K_n = F_n ψ_n − ψ_{n+1}            L_n = F_n χ_n − χ_{n+1}
 *   a_n = A/(A − iB)      A_n = K_n + (m² − 1) ψ_n'          B_n = L_n + (m² − 1) χ_n'
 * </pre>
 *
 * with, downward in n, F_{n−1} = m² r, r = 1/((2n + 1)/x − F_n), and K_{n−1} = (K_n + (m² − 1) ψ_{n−1}) r where |m| ≥ 1,
 * K_{n−1} = F_{n−1} K_n + (m² − 1) ψ_n where |m| &lt; 1 (the same K; an error made in one step shrinks by |m| or 1/|m| in the
 * next). The factor m² − 1 stands outside in every step, so that a sphere whose index is close to its host's keeps its digits. Of the light that
 * partial wave b_n takes from the beam, Im F_n/|K − iL|² is absorbed (Wronskian ψ_nχ_{n+1} − ψ_{n+1}χ_n = 1), so the
 * absorption of a nearly clear sphere is no difference of two near-equal numbers.
 */
public final class MieSeries {
    final double x;
    final double[] aRe;
    final double[] aIm;
    final double[] bRe;
    final double[] bIm;
    private final Efficiencies efficiencies;

    private MieSeries(double x, double[] aRe, double[] aIm, double[] bRe, double[] bIm, double absorbed) {
        this.x = x;
        this.aRe = aRe;
        this.aIm = aIm;
        this.bRe = bRe;
        this.bIm = bIm;
        this.efficiencies = sum(absorbed);
    }

    /** The coefficients for size parameter x and relative index n + ik. */
    public static MieSeries of(double x, double n, double k) {
        Mie.refuseOutsideDomain(x, n, k);
        int orders = Mie.orders(x, k > 0);
        double uRe = (n - 1) * (n + 1) - k * k;
        double uIm = 2 * n * k;
        double m2Re = uRe + 1;
        double m2Im = uIm;
        boolean dense = n * n + k * k >= 1;
        double[] psi = psi(x, orders);

        // downward: F and K
        double[] fRe = new double[orders + 1];
        double[] fIm = new double[orders + 1];
        double[] kRe = new double[orders + 1];
        double[] kIm = new double[orders + 1];
        double fr = 0;
        double fi = 0;
        double inverseX = 1 / x;
        int start = Math.max(Mie.startOfDownward(x), Mie.startOfDownward(x * Math.hypot(n, k)));
        double kr = 0;
        double ki = 0;
        for (int i = start; i >= 1; i--) {
            if (i <= orders) {
                fRe[i] = fr;
                fIm[i] = fi;
                if (i == orders) {
                    kr = fr * psi[i] - psi[i + 1];
                    ki = fi * psi[i];
                }
                kRe[i] = kr;
                kIm[i] = ki;
            }
            double dr = (2 * i + 1) * inverseX - fr + Mie.OFF_POLE;
            double norm = 1 / (dr * dr + fi * fi);
            double rr = dr * norm;
            double ri = fi * norm;
            fr = m2Re * rr - m2Im * ri;
            fi = m2Re * ri + m2Im * rr;
            if (i <= orders) {
                if (dense) {
                    double sr = kr + uRe * psi[i - 1];
                    double si = ki + uIm * psi[i - 1];
                    kr = sr * rr - si * ri;
                    ki = sr * ri + si * rr;
                } else {
                    double sr = kr * fr - ki * fi + uRe * psi[i];
                    ki = kr * fi + ki * fr + uIm * psi[i];
                    kr = sr;
                }
            }
        }

        // upward: χ, then a and b
        double[] aRe = new double[orders + 2];
        double[] aIm = new double[orders + 2];
        double[] bRe = new double[orders + 2];
        double[] bIm = new double[orders + 2];
        double chiBelow = Math.cos(x);
        double chi = chiBelow * inverseX + Math.sin(x);
        double absorbed = 0;
        for (int i = 1; i <= orders; i++) {
            double chiAbove = (2 * i + 1) * inverseX * chi - chiBelow;
            double lr = fRe[i] * chi - chiAbove;
            double li = fIm[i] * chi;
            double dPsi = psi[i - 1] - i * inverseX * psi[i];
            double dChi = chiBelow - i * inverseX * chi;
            double topRe = kRe[i] + uRe * dPsi;
            double topIm = kIm[i] + uIm * dPsi;
            double sideRe = lr + uRe * dChi;
            double sideIm = li + uIm * dChi;

            double denRe = kRe[i] + li;
            double denIm = kIm[i] - lr;
            double norm = 1 / (denRe * denRe + denIm * denIm);
            bRe[i] = (kRe[i] * denRe + kIm[i] * denIm) * norm;
            bIm[i] = (kIm[i] * denRe - kRe[i] * denIm) * norm;
            double taken = fIm[i] * norm;

            denRe = topRe + sideIm;
            denIm = topIm - sideRe;
            norm = 1 / (denRe * denRe + denIm * denIm);
            aRe[i] = (topRe * denRe + topIm * denIm) * norm;
            aIm[i] = (topIm * denRe - topRe * denIm) * norm;
            taken += (fIm[i] * m2Re + ((i + 1) * inverseX - fRe[i]) * m2Im) * norm;

            absorbed += (2 * i + 1) * taken;
            chiBelow = chi;
            chi = chiAbove;
        }
        return new MieSeries(x, aRe, aIm, bRe, bIm, absorbed);
    }

    /** Riccati–Bessel functions ψ_0 … ψ_{orders+1} of x: downward, scaled by ψ_0 = sin x and ψ_{−1} = cos x. */
    private static double[] psi(double x, int orders) {
        double[] psi = new double[orders + 2];
        double above = 0;
        double here = 1e-100;
        for (int i = Mie.startOfDownward(x) + 1; i >= 0; i--) {
            if (i <= orders + 1) psi[i] = here;
            double below = (2 * i + 1) / x * here - above;
            above = here;
            here = below;
        }
        // now above = ψ_0 and here = ψ_{−1}, both times the same unknown factor
        double scale = (Math.sin(x) * above + Math.cos(x) * here) / (above * above + here * here);
        for (int i = 0; i < psi.length; i++) psi[i] *= scale;
        return psi;
    }

    private Efficiencies sum(double absorbed) {
        double sca = 0;
        double asymmetry = 0;
        for (int i = aRe.length - 2; i >= 1; i--) {
            sca += (2 * i + 1) * (aRe[i] * aRe[i] + aIm[i] * aIm[i] + bRe[i] * bRe[i] + bIm[i] * bIm[i]);
            double next = aRe[i] * aRe[i + 1] + aIm[i] * aIm[i + 1] + bRe[i] * bRe[i + 1] + bIm[i] * bIm[i + 1];
            double across = aRe[i] * bRe[i] + aIm[i] * bIm[i];
            asymmetry += i * (i + 2.0) / (i + 1) * next + (2 * i + 1.0) / (i * (i + 1.0)) * across;
        }
        double each = 2 / (x * x);
        double qSca = each * sca;
        double qAbs = each * absorbed;
        return new Efficiencies(qSca + qAbs, qSca, qAbs, sca > 0 ? 2 * asymmetry / sca : 0);
    }

    /** Efficiencies of the sphere; error as {@link Mie} says. */
    public Efficiencies efficiencies() {
        return efficiencies;
    }

    /** Number of partial waves kept. */
    public int orders() {
        return aRe.length - 2;
    }

    /**
     * |S1|² and |S2|² (no unit) at the cosine of the scattering angle: light polarised across and in the scattering plane
     * (Bohren &amp; Huffman 1983, eq. 4.74). A cosine outside [−1, 1] is a {@link Refusal}.
     */
    public double[] intensities(double cosTheta) {
        Refusal.within("Cosine of the scattering angle", cosTheta, -1, 1);
        double s1Re = 0;
        double s1Im = 0;
        double s2Re = 0;
        double s2Im = 0;
        double piBelow = 0;
        double pi = 1;
        for (int i = 1; i <= orders(); i++) {
            double tau = i * cosTheta * pi - (i + 1) * piBelow;
            double weight = (2 * i + 1.0) / (i * (i + 1.0));
            s1Re += weight * (aRe[i] * pi + bRe[i] * tau);
            s1Im += weight * (aIm[i] * pi + bIm[i] * tau);
            s2Re += weight * (aRe[i] * tau + bRe[i] * pi);
            s2Im += weight * (aIm[i] * tau + bIm[i] * pi);
            double piAbove = ((2 * i + 1) * cosTheta * pi - (i + 1) * piBelow) / i;
            piBelow = pi;
            pi = piAbove;
        }
        return new double[] {s1Re * s1Re + s1Im * s1Im, s2Re * s2Re + s2Im * s2Im};
    }

    /**
     * |S1|² + |S2|² at cos θ and at −cos θ, into {@code out}: the waves of even and of odd order are summed apart, and their
     * sum and difference serve the two directions.
     */
    void patterns(double cosTheta, double[] out) {
        // S1 + S2 = Σ w (a + b)(π + τ), S1 − S2 = Σ w (a − b)(π − τ); at −cos θ π + τ and π − τ change places, odd
        // orders' sign
        double sumRe = 0;
        double sumIm = 0;
        double difRe = 0;
        double difIm = 0;
        double backSumRe = 0;
        double backSumIm = 0;
        double backDifRe = 0;
        double backDifIm = 0;
        double piBelow = 0;
        double pi = 1;
        double sign = 1;
        int last = orders();
        for (int i = 1; i <= last; i++) {
            double muPi = cosTheta * pi;
            double tau = i * muPi - (i + 1) * piBelow;
            double weight = (2 * i + 1.0) / (i * (i + 1.0));
            double plus = weight * (pi + tau);
            double minus = weight * (pi - tau);
            double sRe = aRe[i] + bRe[i];
            double sIm = aIm[i] + bIm[i];
            double dRe = aRe[i] - bRe[i];
            double dIm = aIm[i] - bIm[i];
            sumRe += plus * sRe;
            sumIm += plus * sIm;
            difRe += minus * dRe;
            difIm += minus * dIm;
            plus *= sign;
            minus *= sign;
            backSumRe += minus * sRe;
            backSumIm += minus * sIm;
            backDifRe += plus * dRe;
            backDifIm += plus * dIm;
            sign = -sign;
            double piAbove = muPi + (i + 1.0) / i * (muPi - piBelow);
            piBelow = pi;
            pi = piAbove;
        }
        out[0] = (sumRe * sumRe + sumIm * sumIm + difRe * difRe + difIm * difIm) / 2;
        out[1] = (backSumRe * backSumRe + backSumIm * backSumIm + backDifRe * backDifRe + backDifIm * backDifIm) / 2;
    }

    /** Phase function for unpolarised light in 1/sr at the cosine of the scattering angle; ∫ p dΩ = 1 over all directions. */
    public double phaseFunction(double cosTheta) {
        double[] s = intensities(cosTheta);
        return (s[0] + s[1]) / (2 * Math.PI * x * x * efficiencies.qSca());
    }
}
