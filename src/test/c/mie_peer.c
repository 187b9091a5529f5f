/*
 * A straightforward Mie program in C, to measure against: one sphere at a time, real arithmetic where k = 0.
 *
 * MieBenchmark builds it with gcc -O3 -march=native and runs it. It prints two spheres of the published tables, then ns per
 * sphere of each workload and the time of a whole emulsion spectrum, in lines with an equals sign.
 *
 * Equations: Bohren & Huffman, Absorption and Scattering of Light by Small Particles, Wiley 1983, ch. 4.8: logarithmic
 * derivative downward, Riccati-Bessel functions upward, x + 4.05 x^(1/3) + 2 orders, 16 more for the derivative. That
 * start is the usual one and good to 1e-5 or so; a better one would make it slower.
 */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

typedef struct { double qext, qsca, g; } result;

static double dreal[400000];

static result sphere_real(double x, double m)
{
    double inverse_y = 1 / (m * x), inverse_x = 1 / x, inverse_m = 1 / m;
    int nstop = (int)(x + 4.05 * cbrt(x) + 2);
    int nmax = (int)fmax(nstop, m * x) + 16;
    dreal[nmax] = 0;
    for (int n = nmax; n > 0; n--) {
        double t = n * inverse_y;
        dreal[n - 1] = t - 1 / (dreal[n] + t);
    }
    double psi0 = cos(x), psi1 = sin(x), chi0 = -sin(x), chi1 = cos(x);
    double ext = 0, asym = 0, par = 0, pai = 0, pbr = 0, pbi = 0;
    for (int n = 1; n <= nstop; n++) {
        double f = (2 * n - 1) * inverse_x;
        double psi = f * psi1 - psi0, chi = f * chi1 - chi0;
        double ta = dreal[n] * inverse_m + n * inverse_x, tb = m * dreal[n] + n * inverse_x;
        double pa = ta * psi - psi1, qa = ta * chi - chi1;
        double pb = tb * psi - psi1, qb = tb * chi - chi1;
        double da = 1 / (pa * pa + qa * qa), db = 1 / (pb * pb + qb * qb);
        double ar = pa * pa * da, ai = pa * qa * da, br = pb * pb * db, bi = pb * qb * db;
        ext += (2 * n + 1) * (ar + br);
        asym += (2 * n + 1.0) / (n * (n + 1.0)) * (ar * br + ai * bi);
        if (n > 1) asym += (n - 1) * (n + 1.0) / n * (ar * par + ai * pai + br * pbr + bi * pbi);
        par = ar, pai = ai, pbr = br, pbi = bi;
        psi0 = psi1, psi1 = psi, chi0 = chi1, chi1 = chi;
    }
    return (result){2 / (x * x) * ext, 2 / (x * x) * ext, 2 * asym / ext};
}

/* complex arithmetic written out: the library's own checks every product for infinities and is three times as slow */
typedef struct { double re, im; } cplx;

static cplx dcomplex[400000];

static inline cplx mul(cplx a, cplx b) { return (cplx){a.re * b.re - a.im * b.im, a.re * b.im + a.im * b.re}; }

static inline cplx inv(cplx a)
{
    double d = 1 / (a.re * a.re + a.im * a.im);
    return (cplx){a.re * d, -a.im * d};
}

static inline double dot(cplx a, cplx b) { return a.re * b.re + a.im * b.im; }

static result sphere_complex(double x, cplx m)
{
    cplx y = {m.re * x, m.im * x}, inverse = inv(y), inverse_m = inv(m);
    int nstop = (int)(x + 4.05 * cbrt(x) + 2);
    int nmax = (int)fmax(nstop, hypot(y.re, y.im)) + 16;
    dcomplex[nmax] = (cplx){0, 0};
    for (int n = nmax; n > 0; n--) {
        cplx t = {n * inverse.re, n * inverse.im};
        cplx r = inv((cplx){dcomplex[n].re + t.re, dcomplex[n].im + t.im});
        dcomplex[n - 1] = (cplx){t.re - r.re, t.im - r.im};
    }
    double psi0 = cos(x), psi1 = sin(x), chi0 = -sin(x), chi1 = cos(x), inverse_x = 1 / x;
    double ext = 0, sca = 0, asym = 0;
    cplx pa = {0, 0}, pb = {0, 0};
    for (int n = 1; n <= nstop; n++) {
        double f = (2 * n - 1) * inverse_x;
        double psi = f * psi1 - psi0, chi = f * chi1 - chi0;
        cplx ta = mul(dcomplex[n], inverse_m), tb = mul(dcomplex[n], m);
        ta.re += n * inverse_x;
        tb.re += n * inverse_x;
        cplx a = mul((cplx){ta.re * psi - psi1, ta.im * psi},
                     inv((cplx){ta.re * psi + ta.im * chi - psi1, ta.im * psi - ta.re * chi + chi1}));
        cplx b = mul((cplx){tb.re * psi - psi1, tb.im * psi},
                     inv((cplx){tb.re * psi + tb.im * chi - psi1, tb.im * psi - tb.re * chi + chi1}));
        ext += (2 * n + 1) * (a.re + b.re);
        sca += (2 * n + 1) * (dot(a, a) + dot(b, b));
        asym += (2 * n + 1.0) / (n * (n + 1.0)) * dot(a, b);
        if (n > 1) asym += (n - 1) * (n + 1.0) / n * (dot(a, pa) + dot(b, pb));
        pa = a, pb = b;
        psi0 = psi1, psi1 = psi, chi0 = chi1, chi1 = chi;
    }
    return (result){2 / (x * x) * ext, 2 / (x * x) * sca, 2 * asym / sca};
}

static double now(void)
{
    struct timespec t;
    clock_gettime(CLOCK_MONOTONIC, &t);
    return t.tv_sec * 1e9 + t.tv_nsec;
}

/* 200 radii, log-spaced over a factor 300, at 100 wavelengths from 400 to 1100 nm; the largest x is xmax */
static double workload(double xmax, double n, double k)
{
    double best = 1e300, sum = 0;
    static double x[20000];
    for (int i = 0; i < 20000; i++) x[i] = xmax * 400 / (400 + 700 * (i / 200) / 99.0) * pow(300, -(i % 200) / 199.0);
    for (int rep = 0; rep < 7; rep++) {
        double start = now();
        for (int i = 0; i < 20000; i++) {
            result q = k > 0 ? sphere_complex(x[i], (cplx){n, k}) : sphere_real(x[i], n);
            sum += q.qsca * (1 - q.g);
        }
        best = fmin(best, now() - start);
    }
    if (sum != sum) abort();
    return best / 20000;
}

/* Cauchy forms of Michels et al., Opt. Express 16, 5907, 2008; log-normal, number median 200 nm, GSD 1.6 */
static double spectrum(void)
{
    double best = 1e300, total = 0;
    for (int rep = 0; rep < 7; rep++) {
        double start = now();
        for (int w = 0; w < 71; w++) {
            double nm = 400 + 10 * w, l2 = 1 / (nm * nm);
            double tail = 1.154e4 * l2 - 1.132e9 * l2 * l2, host = 1.311 + tail, oil = 1.451 + tail;
            double s = log(1.6), from = 2 * s * s - 5 * s, to = 6 * s * s + 5 * s, h = (to - from) / 199, musp = 0;
            for (int r = 0; r < 200; r++) {
                double t = from + h * r, d = 200 * exp(t);
                result q = sphere_real(M_PI * d * host / nm, oil / host);
                musp += h * exp(-t * t / (2 * s * s)) * d * d * q.qsca * (1 - q.g);
            }
            total += musp * 6e7 * M_PI / 4 / (s * sqrt(2 * M_PI)) / (M_PI * 8e6 * exp(4.5 * s * s));
        }
        best = fmin(best, now() - start);
    }
    printf("sum of reduced scattering over the spectrum, /cm: %.9g\n", total / 7);
    return best;
}

int main(void)
{
    result q = sphere_real(5.213, 1.55);
    printf("m 1.55, x 5.213: %.8f %.8f\n", q.qext, q.g);
    q = sphere_complex(100, (cplx){1.33, 1e-5});
    printf("m 1.33 + 1e-5 i, x 100: %.8f %.8f %.8f\n", q.qext, q.qsca, q.g);
    printf("clear30      = %8.1f ns\n", workload(30, 1.2, 0));
    printf("absorbing30  = %8.1f ns\n", workload(30, 1.5, 0.1));
    printf("clear500     = %8.1f ns\n", workload(500, 1.2, 0));
    printf("absorbing500 = %8.1f ns\n", workload(500, 1.5, 0.1));
    printf("spectrum     = %8.1f us\n", spectrum() / 1e3);
    return 0;
}
