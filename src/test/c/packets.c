/*
 * The peer of PhotonPackets for the throughput figure: the same physics, written straightforwardly.
 *
 *   gcc -O3 -o packets packets.c -lm && ./packets mua_per_mm mus_per_mm g n thickness_mm packets seed
 *
 * thickness 0 means semi-infinite. Prints packets per second, scatterings per second, total diffuse reflectance and
 * transmittance and the absorbed share. Totals and one ring histogram of 50 rings of 1 mm, like the Java side.
 */
#include <math.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

static uint64_t s[4];

static uint64_t splitmix(uint64_t *x) {
    uint64_t z = (*x += 0x9e3779b97f4a7c15u);
    z = (z ^ (z >> 30)) * 0xbf58476d1ce4e5b9u;
    z = (z ^ (z >> 27)) * 0x94d049bb133111ebu;
    return z ^ (z >> 31);
}

static inline uint64_t rotl(uint64_t x, int k) { return (x << k) | (x >> (64 - k)); }

static inline double uniform(void) {
    uint64_t r = rotl(s[0] + s[3], 23) + s[0], t = s[1] << 17;
    s[2] ^= s[0];
    s[3] ^= s[1];
    s[1] ^= s[2];
    s[0] ^= s[3];
    s[2] ^= t;
    s[3] = rotl(s[3], 45);
    return (double)(r >> 11) * 0x1p-53;
}

static double fresnel(double m, double mu) {
    double t2 = 1 - m * m * (1 - mu * mu);
    if (t2 <= 0) return 1;
    double t = sqrt(t2), a = (m * mu - t) / (m * mu + t), b = (mu - m * t) / (mu + m * t);
    return 0.5 * (a * a + b * b);
}

int main(int argc, char **argv) {
    if (argc != 8) return 2;
    double mua = atof(argv[1]), mus = atof(argv[2]), g = atof(argv[3]), n = atof(argv[4]), d = atof(argv[5]);
    long packets = atol(argv[6]);
    uint64_t seed = strtoull(argv[7], 0, 10);
    for (int i = 0; i < 4; i++) s[i] = splitmix(&seed);
    if (d <= 0) d = INFINITY;
    double mut = mua + mus, albedo = mus / mut, r0 = (n - 1) * (n - 1) / ((n + 1) * (n + 1));
    double reflected = 0, transmitted = 0, absorbed = 0, ring[50] = {0};
    long scatterings = 0;
    struct timespec a, b;
    clock_gettime(CLOCK_MONOTONIC, &a);
    for (long p = 0; p < packets; p++) {
        double x = 0, y = 0, z = 0, ux = 0, uy = 0, uz = 1, w = 1 - r0, path = 0;
        double step = -log(1 - uniform()) / mut;
        for (;;) {
            double zn = z + uz * step;
            if (zn < 0 || zn > d) {
                double face = zn < 0 ? 0 : d, part = (face - z) / uz;
                x += ux * part;
                y += uy * part;
                z = face;
                path += part;
                step -= part;
                if (uniform() < fresnel(n, fabs(uz))) {
                    uz = -uz;
                    continue;
                }
                if (face == 0) {
                    reflected += w;
                    double rho = sqrt(x * x + y * y);
                    if (rho < 50) ring[(int)rho] += w;
                } else
                    transmitted += w;
                break;
            }
            x += ux * step;
            y += uy * step;
            z = zn;
            path += step;
            absorbed += w * (1 - albedo);
            w *= albedo;
            scatterings++;
            double c, xi = uniform();
            if (g == 0)
                c = 2 * xi - 1;
            else {
                double q = (1 - g * g) / (1 - g + 2 * g * xi);
                c = (1 + g * g - q * q) / (2 * g);
            }
            double st = sqrt(1 - c * c), phi = 2 * M_PI * uniform(), cp = cos(phi), sp = sin(phi);
            if (fabs(uz) > 0.99999) {
                ux = st * cp;
                uy = st * sp;
                uz = uz > 0 ? c : -c;
            } else {
                double t = sqrt(1 - uz * uz);
                double vx = st * (ux * uz * cp - uy * sp) / t + ux * c;
                double vy = st * (uy * uz * cp + ux * sp) / t + uy * c;
                uz = -st * cp * t + uz * c;
                ux = vx;
                uy = vy;
            }
            if (w < 1e-3) {
                if (uniform() >= 0.1) break;
                w *= 10;
            }
            if (path > 1e5) break;
            step = -log(1 - uniform()) / mut;
        }
    }
    clock_gettime(CLOCK_MONOTONIC, &b);
    double t = (b.tv_sec - a.tv_sec) + 1e-9 * (b.tv_nsec - a.tv_nsec);
    printf("%.6g %.6g %.6f %.6f %.6f %.3g\n", packets / t, scatterings / t, reflected / packets, transmitted / packets,
           absorbed / packets, ring[20] / packets);
    return 0;
}
