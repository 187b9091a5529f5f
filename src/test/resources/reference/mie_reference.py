"""Mie efficiencies and intensities to 30 digits, by a method that the program does not use.

  python3 mie_reference.py            writes mie-efficiencies.csv and mie-intensities.csv beside this file

Needs mpmath (arbitrary precision). About 15 minutes on one core.

Method: a_n, b_n exactly as Bohren & Huffman, Absorption and Scattering of Light by Small Particles, Wiley 1983, eq. 4.53,
with psi_n' written out, all functions carried with so many digits that cancellation does not matter.
  x <= DIRECT_UP_TO: psi_n and chi_n are half-integer Bessel functions, each order evaluated by itself (mpmath besselj, bessely);
  above: upward recurrence from sin and cos, which is unstable, with guard digits for all that it loses.
Each case above DIRECT_UP_TO is computed twice, with the estimated number of digits and with 50 more, and must agree to 32
digits; on the cases of DIRECT_UP_TO both methods are run and must agree likewise.
The program itself goes downward in ratios of functions in double precision: no step is shared.
"""
import math
import os
import sys
from multiprocessing import Pool

import mpmath
from mpmath import mp, mpf, mpc

DIRECT_UP_TO = 12.0
KEEP = 150  # digits of the functions after the recurrence: small spheres cancel up to 100 of them
HERE = os.path.dirname(os.path.abspath(__file__))

SIZES = [1e-4, 1e-3, 0.01, 0.05, 0.2, 0.5, 1.0, 2.1, 3.7, 6.0, 10.0, 17.3, 30.0, 55.0, 100.0, 250.0, 500.0, 1000.0,
         3000.0, 10000.0, 20000.0]
INDICES = [(0.2, 0), (0.5, 0), (0.75, 0), (0.999, 0), (1.000001, 0), (1.001, 0), (1.05, 0), (1.104, 0), (1.2, 0),
           (1.33, 0), (1.55, 0), (1.9, 0), (2.7, 0), (4.0, 0), (10.0, 0),
           (1.0, 1e-9), (1.0, 1e-3), (1.104, 1e-9), (1.33, 1e-5), (0.75, 1e-6), (0.2, 1e-9), (0.2, 0.1), (0.2, 3.0),
           (0.9, 1.0), (1.5, 1e-3), (1.5, 0.1), (1.5, 1.0), (1.78, 0.6), (2.7, 1e-9), (4.0, 0.05), (10.0, 1e-5),
           (10.0, 10.0), (0.2, 10.0)]
ANGLE_CASES = [(0.01, 1.55, 0), (1.0, 1.33, 1e-5), (5.213, 1.55, 0), (10.0, 0.75, 0), (30.0, 1.104, 0), (30.0, 2.7, 1e-9),
               (100.0, 1.5, 1.0), (1000.0, 1.2, 0)]
COSINES = [1.0, 0.875, 0.5, 0.0, -0.25, -0.75, -1.0]


def orders(x):
    return int(x + 5 * x ** (1 / 3) + 14)


def guard_digits(order, z):
    """Digits that the upward recurrence of psi loses up to this order, from ratios in double precision."""
    ratio, lost = 0.0, 0.0
    start = max(order, int(abs(z) + 6 * abs(z) ** (1 / 3))) + 20
    for n in range(start, 0, -1):
        ratio = 1 / ((2 * n + 1) / z - ratio)
        if n - 1 <= order:
            lost -= math.log10(abs(ratio) + 1e-300)
    return max(0.0, lost) * 2


def upward(z, top, digits, second=False):
    """psi_0..psi_top of z, or chi, by upward recurrence with so many digits; kept to KEEP digits."""
    with mp.workdps(digits):
        s, c = mpmath.sin(z), mpmath.cos(z)
        below, here = (c, c / z + s) if second else (s, s / z - c)
        inverse = 1 / z
    out = [rounded(below), rounded(here)]
    with mp.workdps(digits):
        for n in range(1, top):
            below, here = here, (2 * n + 1) * inverse * here - below
            out.append(rounded(here))
    return out


def rounded(value):
    with mp.workdps(KEEP):
        return +value


def direct(z, top, second):
    with mp.workdps(KEEP):
        root = mpmath.sqrt(mpmath.pi * z / 2)
        half = mpf(1) / 2
        return [root * (-mpmath.bessely(n + half, z) if second else mpmath.besselj(n + half, z)) for n in range(top + 1)]


def coefficients(x, n, k, more, by_order):
    """a_1.. and b_1.., the functions carried with `more` digits beyond the estimated loss."""
    top = orders(x)
    with mp.workdps(KEEP):
        mx = mpf(x)
        m = mpc(n, k) if k else mpf(n)
    with mp.workdps(2 * KEEP):
        y = m * mx  # exact: a product of two double-precision numbers
    if by_order:
        psi, chi, inside = direct(mx, top, False), direct(mx, top, True), direct(y, top, False)
    else:
        loss = int(guard_digits(top, x)) + KEEP + more
        psi, chi = upward(mx, top, loss), upward(mx, top, loss, True)
        inside = upward(y, top, int(guard_digits(top, complex(n, k) * x)) + KEEP + more)
    a, b = [], []
    with mp.workdps(KEEP):
        for i in range(1, top + 1):
            p, pb, q, qb, s, sb = psi[i], psi[i - 1], chi[i], chi[i - 1], inside[i], inside[i - 1]
            dp, dq, ds = pb - i * p / mx, qb - i * q / mx, sb - i * s / y
            xi, dxi = mpc(p, -q), mpc(dp, -dq)
            a.append((m * s * dp - p * ds) / (m * s * dxi - xi * ds))
            b.append((s * dp - m * p * ds) / (s * dxi - m * xi * ds))
    return a, b


def efficiencies(x, a, b):
    with mp.workdps(60):
        ext = sca = absorbed = cosine = mpf(0)
        for i in range(len(a)):
            n = i + 1
            ext += (2 * n + 1) * (a[i].real + b[i].real)
            size = a[i].real ** 2 + a[i].imag ** 2 + b[i].real ** 2 + b[i].imag ** 2
            sca += (2 * n + 1) * size
            absorbed += (2 * n + 1) * (a[i].real + b[i].real - size)
            if i + 1 < len(a):
                cosine += mpf(n * (n + 2)) / (n + 1) * (
                    a[i].real * a[i + 1].real + a[i].imag * a[i + 1].imag
                    + b[i].real * b[i + 1].real + b[i].imag * b[i + 1].imag)
            cosine += mpf(2 * n + 1) / (n * (n + 1)) * (a[i].real * b[i].real + a[i].imag * b[i].imag)
        f = 2 / mpf(x) ** 2
        return [f * ext, f * sca, f * absorbed, 2 * cosine / sca]


def agree(one, two, k):
    for i, (u, v) in enumerate(zip(one, two)):
        if i == 2 and not k:
            continue
        if abs(u - v) > mpf(10) ** -32 * max(abs(v), mpf(10) ** -300):
            return False
    return True


def solve(case):
    x, n, k = case
    a, b = coefficients(x, n, k, 0, False)
    two = efficiencies(x, a, b)
    a, b = coefficients(x, n, k, 50, x <= DIRECT_UP_TO)
    one = efficiencies(x, a, b)
    if not agree(one, two, k):
        raise ArithmeticError("not settled: x %r m %r + %r i" % case)
    return case, one, a, b


def row(case):
    (x, n, k), q, _, _ = solve(case)
    if not k:
        q[2] = mpf(0)
    print(case, file=sys.stderr, flush=True)
    return ",".join([repr(x), repr(n), repr(float(k))] + [mpmath.nstr(v, 30, strip_zeros=False) if v else "0" for v in q])


def intensities(case):
    (x, n, k), q, a, b = solve(case)
    out = []
    with mp.workdps(60):
        for cosine in COSINES:
            mu = mpf(cosine)
            s1 = s2 = mpc(0)
            below, here = mpf(0), mpf(1)
            for i in range(1, len(a) + 1):
                tau = i * mu * here - (i + 1) * below
                f = mpf(2 * i + 1) / (i * (i + 1))
                s1 += f * (a[i - 1] * here + b[i - 1] * tau)
                s2 += f * (a[i - 1] * tau + b[i - 1] * here)
                below, here = here, ((2 * i + 1) * mu * here - (i + 1) * below) / i
            out.append(",".join([repr(x), repr(n), repr(float(k)), repr(cosine)]
                                + [mpmath.nstr(v.real ** 2 + v.imag ** 2, 30, strip_zeros=False) for v in (s1, s2)]))
    return out


HEADER = """# {what}
# producer: mie_reference.py beside this file (method and checks are described there), mpmath {version}, {date}
# inputs: size_parameter, index and absorption_index are double-precision numbers taken exactly as such
# units: none. convention: m = n + ik, k > 0 absorbs; relative to a host that does not absorb
# digits: 30 printed, two computations agree to 32
# make again: python3 mie_reference.py
"""

if __name__ == "__main__":
    import datetime

    date = datetime.date.today().isoformat()
    with Pool(2) as pool:
        cases = [(x, n, k) for x in SIZES for n, k in INDICES]
        rows = pool.map(row, cases, chunksize=1)
        rows.sort(key=lambda line: [float(v) for v in line.split(",")[:3]])
        with open(os.path.join(HERE, "mie-efficiencies.csv"), "w") as out:
            out.write(HEADER.format(what="Mie efficiencies of one sphere; g: mean cosine of the scattering angle",
                                    version=mpmath.__version__, date=date))
            out.write("size_parameter,index,absorption_index,q_ext,q_sca,q_abs,g\n" + "\n".join(rows) + "\n")
        with open(os.path.join(HERE, "mie-intensities.csv"), "w") as out:
            out.write(HEADER.format(what="|S1|^2 and |S2|^2 of one sphere at the cosine of the scattering angle",
                                    version=mpmath.__version__, date=date))
            out.write("size_parameter,index,absorption_index,cosine,s1_squared,s2_squared\n")
            for block in pool.map(intensities, ANGLE_CASES, chunksize=1):
                out.write("\n".join(block) + "\n")
