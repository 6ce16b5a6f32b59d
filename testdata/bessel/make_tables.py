#!/usr/bin/env python3
"""Reference values for core/bessel, to 40 digits with mpmath.

    python3 make_tables.py jy ik zeros annulus

writes jy.tsv.gz, ik.tsv.gz, zeros.tsv.gz and annulus.tsv.gz beside this file.
Every argument is written so that reading it as a double gives exactly the
number whose function value stands beside it. See README.md for the columns.
Needs mpmath only. Takes ten to twenty minutes on two cores.
"""
import gzip
import math
import multiprocessing
import os
import random
import sys

import mpmath as mp

SEED = 20261201
DIGITS = 40
mp.mp.dps = DIGITS + 15
HERE = os.path.dirname(os.path.abspath(__file__))


def rounded(x, digits=7):
    """A double with few digits, to keep the table small."""
    return float("%.*g" % (digits, x))


def out(v):
    return mp.nstr(v, 21, min_fixed=0, max_fixed=0, strip_zeros=True)


# ---------------------------------------------------------------- functions

def ladder(start, nu, x, sign):
    """C_nu, C_{nu+1} by the upward recurrence C_{k+1} = 2k/x C_k + sign C_{k-1},
    from start(mu, x), mu = nu - floor(nu). Only used where it is stable."""
    n = int(mp.floor(nu))
    mu = nu - n
    a, b = start(mu, x), start(mu + 1, x)
    for k in range(1, n + 1):
        a, b = b, 2 * (mu + k) / x * b + sign * a
    return a, b


def pair_jy(nu, x):
    """J_nu, J_{nu+1}, Y_nu, Y_{nu+1}."""
    nu, x = mp.mpf(nu), mp.mpf(x)
    if x < 150:
        return (mp.besselj(nu, x), mp.besselj(nu + 1, x),
                mp.bessely(nu, x), mp.bessely(nu + 1, x))
    y, y1 = ladder(mp.bessely, nu, x, -1)
    if nu <= x:
        j, j1 = ladder(mp.besselj, nu, x, -1)
    else:
        j, j1 = mp.besselj(nu, x), mp.besselj(nu + 1, x)
    # The Wronskian guards both the recurrence and mpmath's own sums.
    w = (j1 * y - j * y1) * mp.pi * x / 2
    if abs(w - 1) > mp.mpf(10) ** (15 - mp.mp.dps) * (1 + abs(j * y1)):
        raise ArithmeticError("Wronskian fails at nu=%s x=%s: %s" % (nu, x, w))
    return j, j1, y, y1


def pair_ik(nu, x):
    """I_nu, I_{nu+1}, K_nu, K_{nu+1}."""
    nu, x = mp.mpf(nu), mp.mpf(x)
    i, i1 = mp.besseli(nu, x), mp.besseli(nu + 1, x)
    k, k1 = ladder(mp.besselk, nu, x, 1)
    w = (i * k1 + i1 * k) * x
    if abs(w - 1) > mp.mpf(10) ** -DIGITS:
        raise ArithmeticError("Wronskian fails at nu=%s x=%s: %s" % (nu, x, w))
    return i, i1, k, k1


# ------------------------------------------------------------------ J and Y

def between(rng, a, b):
    return rounded(rng.uniform(a, b))


def logbetween(rng, a, b):
    return rounded(math.exp(rng.uniform(math.log(a), math.log(b))))


def order(rng, top):
    """An order: whole, half-odd, arbitrary, or next to a whole number."""
    c = rng.random()
    if c < 0.45:
        return float(rng.randint(0, int(top)))
    if c < 0.55:
        return rng.randint(0, int(top) - 1) + 0.5
    if c < 0.92:
        return between(rng, 0, top)
    n = rng.randint(1, int(top))
    return n + rng.choice([-1, 1]) * rng.choice([1e-3, 1e-6, 1e-9, 2.0 ** -40])


def phase_start(nu, target):
    """x where the leading Debye phase sqrt(x^2-nu^2) - nu acos(nu/x) - pi/4
    has the given value."""
    c = target + math.pi / 4
    lo, hi = nu, nu + c + math.pi * nu + 10
    for _ in range(200):
        m = 0.5 * (lo + hi)
        v = math.sqrt((m - nu) * (m + nu)) - (nu * math.acos(nu / m) if nu else 0)
        lo, hi = (m, hi) if v < c else (lo, m)
    return hi


def mp_zero(nu, n, prime):
    """The n-th positive zero of J_nu or J'_nu by Newton's method."""
    nu = mp.mpf(nu)
    if prime and nu == 0:
        return mp_zero(1, n, False)
    if prime and n == 1 and nu < 1:
        x = mp.sqrt(2 * nu * (nu + 1) * (1 - nu / (2 * (nu + 2))))
    else:
        x = mp.mpf(phase_start(float(nu), math.pi * (n - (1 if prime else 0.5))))
    start = x
    for _ in range(60):
        j, j1 = pair_jy(nu, x)[:2] if x > 150 else (mp.besselj(nu, x), mp.besselj(nu + 1, x))
        d = nu / x * j - j1
        h = -j / d if not prime else d / (d / x + (1 - nu * nu / x / x) * j)
        # Newton within a quarter of a wave of the start, whose phase is
        # within 0.3 of the truth for every order and index.
        x = x + h
        if abs(x - start) > max(mp.mpf(1.2), mp.cbrt(nu)):
            raise ArithmeticError("zero %s %s leaves its place" % (nu, n))
        if abs(h) < abs(x) * mp.mpf(10) ** -(DIGITS / 2 + 3):
            return x
    raise ArithmeticError("no zero %s %s" % (nu, n))


def points_jy(rng):
    pts = []

    def add(code, nu, x):
        if nu >= 0 and x > 0:
            pts.append((code, nu, x))

    for _ in range(5000):
        add("int", float(rng.randint(0, 200)), between(rng, 0, 200))
    for _ in range(4500):
        add("real", between(rng, 0, 200), between(rng, 0, 200))
    for _ in range(3000):  # around the turning point
        nu = order(rng, 200) + (1 if rng.random() < 0.5 else 0)
        nu = max(nu, 1.0)
        add("turn", nu, rounded(nu + rng.uniform(-4, 4) * nu ** (1 / 3), 9))
    for _ in range(2000):  # near zeros: the nearest double, and a little beside
        nu = order(rng, 200)
        n = rng.randint(1, 40)
        z = float(mp_zero(nu, n, False))
        if z < 230:
            add("zero", nu, z + rng.choice([0, 0, 0, 1e-12, -1e-9, 1e-6, -1e-3]))
    for _ in range(2200):  # branch switches, both sides
        c = rng.randint(0, 6)
        side = rng.choice([0.0, -1.0, 1.0])
        if c == 0:
            x, nu = 25.0, order(rng, 80)
        elif c == 1:
            nu = order(rng, 200)
            x = max(nu, 0.5)
        elif c == 2:
            nu = order(rng, 60)
            x = 2 * math.sqrt(nu + 1)
        elif c == 3:
            nu, x = order(rng, 60), float(rng.choice([1, 2, 3, 4, 5, 8, 10, 12, 16, 20, 30]))
        elif c == 4:
            nu = float(rng.choice([15, 20, 25, 30, 40, 50, 60, 80, 100]))
            x = between(rng, 0, 200)
            nu = math.nextafter(nu, nu + side)
        elif c == 5:
            nu = order(rng, 40)
            x = max(25.0, 0.5 * nu * nu)
        else:
            nu = order(rng, 180)
            x = nu + 1.0
        add("switch", nu, math.nextafter(x, x + side))
    for _ in range(1500):  # small arguments and small orders
        c = rng.random()
        if c < 0.5:
            add("small", order(rng, 30), logbetween(rng, 1e-10, 1))
        elif c < 0.7:
            add("small", order(rng, 6), logbetween(rng, 1e-45, 1e-10))
        else:
            add("small", rng.choice([1e-20, 1e-12, 1e-6, 1e-3]) * rounded(rng.random()),
                logbetween(rng, 1e-8, 100))
    for _ in range(1000):
        add("low", between(rng, 0, 2), between(rng, 0, 60))
    for _ in range(1200):  # beyond 200
        add("high", order(rng, 1000), between(rng, 200, 1100))
    for _ in range(1600):
        add("far", order(rng, 1000), logbetween(rng, 200, 1e6))
    for _ in range(600):
        add("far", order(rng, 3), logbetween(rng, 200, 1e6))
    for _ in range(700):  # where Y starts from its series
        add("start", order(rng, 40), between(rng, 0.05, 1.2))
    for _ in range(700):  # far above the argument
        add("deep", order(rng, 1000), between(rng, 1, 400))
    return pts


def line_jy(p):
    code, nu, x = p
    j, _, y, _ = pair_jy(nu, x)
    return "%s\t%r\t%r\t%s\t%s" % (code, nu, x, out(j), out(y))


# ------------------------------------------------------------------ I and K

def points_ik(rng):
    pts = []
    for _ in range(2500):
        pts.append(("mid", order(rng, 200), between(rng, 0, 200)))
    for _ in range(800):
        pts.append(("small", order(rng, 40), logbetween(rng, 1e-8, 1)))
    for _ in range(800):
        pts.append(("low", between(rng, 0, 2), between(rng, 0, 40)))
    for _ in range(700):
        pts.append(("high", order(rng, 1000), between(rng, 1, 2000)))
    for _ in range(700):
        pts.append(("far", order(rng, 1000), logbetween(rng, 200, 1e8)))
    for _ in range(700):
        c = rng.randint(0, 3)
        nu = order(rng, 100)
        x = [2.0, 25.0, 30.0, 2 * math.sqrt(nu + 1)][c]
        pts.append(("switch", nu, math.nextafter(x, x + rng.choice([-1, 0, 1]))))
    for _ in range(700):  # where K starts from its series
        pts.append(("start", between(rng, 0, 1.6), between(rng, 0.05, 1.2)))
    return [p for p in pts if p[2] > 0]


def line_ik(p):
    code, nu, x = p
    i, i1, k, k1 = pair_ik(nu, x)
    X = mp.mpf(x)
    return "%s\t%r\t%r\t%s\t%s\t%s\t%s" % (
        code, nu, x, out(i * mp.exp(-X)), out(k * mp.exp(X)),
        out(i1 / i + mp.mpf(nu) / X), out(mp.mpf(nu) / X - k1 / k))


# -------------------------------------------------------------------- zeros

def points_zeros(rng):
    pts = [("first", float(m), n) for m in range(0, 21) for n in range(1, 11)]
    for _ in range(900):
        pts.append(("mid", order(rng, 200), rng.randint(1, 100)))
    for _ in range(500):
        pts.append(("small", rng.choice([1, 1, 1e-3, 1e-8]) * rounded(rng.random() * 3, 6),
                    rng.randint(1, 8)))
    for _ in range(500):
        pts.append(("high", order(rng, 1000), rng.randint(1, 30)))
    for _ in range(500):
        pts.append(("far", order(rng, 1000), int(logbetween(rng, 10, 1e6))))
    return [(c, nu, n) for c, nu, n in pts if nu >= 0]


def line_zeros(p):
    code, nu, n = p
    j = mp_zero(nu, n, False)
    q = mp_zero(nu, n, True)
    slope = -pair_jy(nu, j)[1]
    value = pair_jy(nu, q)[0]
    return "%s\t%r\t%d\t%s\t%s\t%s\t%s" % (code, nu, n, out(j), out(q), out(slope), out(value))


# ------------------------------------------------------------------ annulus

def mod_phase(m, x):
    """Continuous phase of J + iY, rising from -pi/2 at x = 0, and the phase of
    J' + iY', rising through pi/2 (m > 0: from pi/2 down to a minimum at the
    turning point, then up)."""
    with mp.workdps(20):
        j, j1, y, y1 = pair_jy(m, x)
        t = float(mp.atan2(y, j))
        d = float(mp.atan2(m / mp.mpf(x) * y - y1, m / mp.mpf(x) * j - j1))
    guess = -math.pi / 2
    if x > m:
        guess = math.sqrt((x - m) * (x + m)) - (m * math.acos(m / x) if m else 0) - math.pi / 4
    t += 2 * math.pi * round((guess - t) / (2 * math.pi))
    d += 2 * math.pi * round((guess + math.pi / 2 - d) / (2 * math.pi))
    return t, d


def annulus_root(m, q, n, outer, inner):
    """n-th positive root x of the cross product with condition 0 (value zero)
    or 1 (slope zero) at the outer edge x and the inner edge q x."""
    def f(x):
        a, b = mod_phase(m, x)[outer], mod_phase(m, q * x)[inner]
        return a - b

    # Between consecutive roots the phase difference grows by pi. Its value at
    # the n-th root follows from the limit x -> 0: values alone start at 0 and
    # reach pi first; slope outside, value inside start at pi (m > 0) and come
    # back to pi first; value outside, slope inside start at -pi and reach 0
    # first; slopes alone start at 0, dip, and reach 0 first (m > 0). For
    # m = 0 slopes have phase 0 at the origin, and start values shift.
    if m > 0:
        target = {(0, 0): n, (1, 0): n, (0, 1): n - 1, (1, 1): n - 1}[(outer, inner)] * math.pi
    else:
        target = {(0, 0): n, (1, 0): n, (0, 1): n - 1, (1, 1): n}[(outer, inner)] * math.pi
    lo = (m * 0.3 if m else 1e-3)
    hi = max(m, 1) + (n + 1) * math.pi / (1 - q) + m / q
    for _ in range(200):
        mid = 0.5 * (lo + hi)
        if f(mid) < target:
            lo = mid
        else:
            hi = mid
        if hi - lo < 1e-2 * hi * (1 - q):
            break
    Q = mp.mpf(q)

    def g(x):
        a, b = pair_jy(m, x), pair_jy(m, Q * x)
        v = []
        for (j, j1, y, y1), z, c in ((a, x, outer), (b, Q * x, inner)):
            v.append((m / z * j - j1, m / z * y - y1) if c else (j, y))
        return v[0][0] * v[1][1] - v[1][0] * v[0][1]

    # Secant steps at 40 digits, to 25 good ones.
    with mp.workdps(DIGITS):
        x0, x1 = mp.mpf(lo), mp.mpf(hi)
        g0, g1 = g(x0), g(x1)
        for _ in range(20):
            x = x1 - g1 * (x1 - x0) / (g1 - g0)
            x0, g0, x1, g1 = x1, g1, x, g(x)
            if abs(x1 - x0) < abs(x) * mp.mpf(10) ** -17:
                break
        x = x1 - g1 * (x1 - x0) / (g1 - g0)
    if not lo * (1 - 1e-3) < x < hi * (1 + 1e-3):
        raise ArithmeticError("annulus root %s %s %s leaves its place" % (m, q, n))
    return x


def points_annulus(rng):
    pts = []
    for _ in range(400):
        q = rng.choice([0.01, 0.05, 0.1, 0.2, 0.3, 0.5, 0.7, 0.9, 0.99, between(rng, 0.01, 0.99)])
        pts.append((rng.choice([0, 0, 1, 1, 2, 3, rng.randint(0, 40)]), q, rng.randint(1, 12)))
    return pts


def line_annulus(p):
    m, q, n = p
    r = [annulus_root(m, q, n, o, i) for o, i in ((0, 0), (1, 1), (0, 1), (1, 0))]
    return "%d\t%r\t%d\t%s" % (m, q, n, "\t".join(out(v) for v in r))


# --------------------------------------------------------------------- main

TABLES = {
    "jy": (points_jy, line_jy, "region nu x J Y"),
    "ik": (points_ik, line_ik, "region nu x exp(-x)I exp(x)K I'/I K'/K"),
    "zeros": (points_zeros, line_zeros, "region nu n j j' J'(j) J(j')"),
    "annulus": (points_annulus, line_annulus, "m q n value-value slope-slope value-slope slope-value (outer-inner)"),
}


def main():
    for name in sys.argv[1:] or list(TABLES):
        points, line, columns = TABLES[name]
        # One seed for each table, so that they can be made separately.
        pts = points(random.Random("%d %s" % (SEED, name)))
        with multiprocessing.Pool(2) as pool:
            lines = pool.map(line, pts, chunksize=25)
        head = "# %s; make_tables.py, mpmath %s, %d digits, seed %d, %d rows\n" % (
            columns, mp.__version__, DIGITS, SEED, len(lines))
        path = os.path.join(HERE, name + ".tsv.gz")
        with open(path, "wb") as raw, gzip.GzipFile(filename="", mode="wb", fileobj=raw, mtime=0) as z:
            z.write((head + "\n".join(lines) + "\n").encode("ascii"))
        print(name, len(lines), "rows", os.path.getsize(path), "bytes", flush=True)


if __name__ == "__main__":
    main()
