#!/usr/bin/env python3
"""Writes reference.json: values for the tests of core/disc.

Everything is computed with mpmath at 50 digits or more by ways that share
nothing with the Go code: shapes from the explicit sum of the Jacobi polynomial,
Hankel transforms and inner products by quadrature of those sums, forms from the
gamma functions of Weber and Schafheitlin's integral (DLMF 10.22.57), moments of
test functions by adaptive quadrature. Points are drawn with a fixed seed.

    python3 make.py > reference.json
"""
import json
import random
import sys

from mpmath import (mp, mpf, binomial, gamma, rgamma, besselj, besseljzero,
                    quad, sqrt, pi, factorial, sin, cos)

mp.dps = 50
rng = random.Random(20240607)
NU = {"root": mpf(1) / 2, "held": mpf(1), "clamped": mpf(2)}


def shape(nu, m, j, r):
    """c_j r^m (1-r^2)^nu P_j^(m,nu)(1-2r^2), by the explicit sum."""
    old, mp.dps = mp.dps, 400
    r = mpf(r)
    t = r * r
    s = mpf(0)
    # P_j^(a,b)(x) = sum_s C(j+a, j-s) C(j+b, s) ((x-1)/2)^s ((x+1)/2)^(j-s)
    for k in range(j + 1):
        s += binomial(j + m, j - k) * binomial(j + nu, k) * (-t) ** k * (1 - t) ** (j - k)
    v = factorial(j) / (2 ** nu * gamma(j + nu + 1)) * r ** m * (1 - t) ** nu * s
    mp.dps = old
    return +v


def order(nu, m, j):
    return m + 2 * j + nu + 1


def weber(mu, nu, lam):
    """Integral of J_mu J_nu t^-lam over t > 0, or its analytic continuation."""
    return (gamma(lam) * gamma((mu + nu - lam + 1) / 2) / 2 ** lam
            * rgamma((nu - mu + lam + 1) / 2) * rgamma((mu + nu + lam + 1) / 2)
            * rgamma((mu - nu + lam + 1) / 2))


def num(x):
    return float(x)


out = {"source": "mpmath, 50 digits, seed 20240607, testdata/disc/make.py"}

# Shapes: the corners of m, j <= 200, radii dense beside centre and rim.
rows = []
for name, nu in NU.items():
    for m in (0, 1, 2, 7, 50, 200):
        for j in (0, 1, 2, 5, 24, 75, 200):
            rs = [rng.random() for _ in range(2)]
            rs += [rng.random() * 0.02, 1 - rng.random() * 1e-3, 0.7071067811865475, 0.7071067811865476]
            for r in rs:
                rows.append([name, m, j, r, num(shape(nu, m, j, r))])
out["shapes"] = rows

# Hankel transform of a shape by quadrature: [family, m, j, k, value].
rows = []
for name, nu in NU.items():
    for m, j, k in ((0, 0, 0.7), (0, 3, 11.3), (1, 2, 4.1), (4, 5, 20.5), (3, 0, 6.25)):
        f = lambda r: shape(nu, m, j, r) * besselj(m, mpf(k) * r) * r
        rows.append([name, m, j, k, num(quad(f, [0, 0.25, 0.5, 0.75, 1]))])
out["hankel"] = rows

# Forms: [family, m, i, j, p, value] from gamma functions at 50 digits.
rows = []
PS = {"root": (1, 0, -1, -2, -3), "held": (2, 1, 0, -1, -3, -5, -7), "clamped": (4, 3, 2, 1, 0, -1, -2, -3, -5)}
for name, nu in NU.items():
    for p in PS[name]:
        lam = 2 * nu + 1 - p
        for m in (0, 1, 3, 40, 200):
            for i, j in ((0, 0), (1, 0), (0, 2), (5, 5), (23, 24), (60, 3), (200, 199), (200, 200)):
                a, b = order(nu, m, i), order(nu, m, j)
                try:
                    v = weber(a, b, lam)
                except ValueError:  # a pole: no finite part
                    rows.append([name, m, i, j, p, "inf"])
                    continue
                rows.append([name, m, i, j, p, num(v)])
out["forms"] = rows

# The same forms by quadrature over the disc, no Hankel domain in it: mass is
# the integral of u_i u_j r dr: [family, m, i, j, value].
rows = []
for name, nu in NU.items():
    for m, i, j in ((0, 0, 0), (0, 1, 0), (2, 1, 1), (3, 2, 0), (1, 4, 3)):
        rows.append([name, m, i, j, num(quad(lambda r: shape(nu, m, i, r) * shape(nu, m, j, r) * r, [0, 0.5, 1]))])
out["mass"] = rows

# Coupling to the pressure family, by quadrature and by gamma functions.
rows = []
for name in ("held", "clamped"):
    nu = NU[name]
    for m in (0, 1, 2, 30, 200):
        for j, q in ((0, 0), (0, 1), (1, 0), (2, 4), (3, 3), (7, 2), (40, 41), (90, 12)):
            v = weber(order(nu, m, j), order(NU["root"], m, q), nu + mpf(3) / 2)
            if m < 3 and j < 8:
                w = quad(lambda r: shape(nu, m, j, r) * shape(NU["root"], m, q, r) * r, [0, 0.5, 0.9, 1])
                assert abs(v - w) < mpf(10) ** -20 * (1 + abs(v)), (name, m, j, q, v, w)
            rows.append([name, m, j, q, num(v)])
out["coupling"] = rows

# Radiation operators with sound, by quadrature in the wave number:
# [family, m, i, j, k0, real, imaginary]. Below k0 substitute k = k0 sin t; above
# it take off the leading power of k (two for open faces), integrated apart in
# closed form, so that the rest falls off like k^-6 or faster; beyond y = 118 its
# mean is added (J_a J_b has the mean (-1)^(i-j)/(pi k) there) and its
# oscillation, 1/118 of that, left. 20 digits are plenty here.
mp.dps = 20
rows = []
for name, sign in (("held", -1), ("clamped", -1), ("root", 1)):
    nu = NU[name]
    for m, i, j in ((0, 0, 0), (0, 1, 0), (1, 0, 0), (2, 1, 2)):
        a, b = order(nu, m, i), order(nu, m, j)
        u = lambda k: besselj(a, k) * besselj(b, k) / k ** (2 * nu + 1)
        for k0 in (mpf(1) / 2, mpf(2)):
            low = quad(lambda t: u(k0 * sin(t)) * k0 * cos(t) * (k0 * cos(t)) ** sign, [0, pi / 2])
            second = -sign * k0 ** 2 / 2 if name == "root" else mpf(0)
            first = lambda k: k ** sign + second * k ** (sign - 2)
            # k^2 = k0^2 + y^2 tames the root at k0.
            def rest(y):
                k = sqrt(k0 * k0 + y * y)
                return (y ** sign - first(k)) * u(k) * y / k
            real = quad(rest, [0] + [mpf(n) * 2 for n in range(1, 60)])
            real += weber(a, b, 2 * nu + 1 - sign)
            end = sqrt(k0 * k0 + mpf(118) ** 2)
            if sign < 0:
                tail = k0 ** 2 / 2 / ((2 * nu + 4) * end ** (2 * nu + 4))
            else:
                tail = -k0 ** 4 / 8 / (5 * end ** 5)
            real += (-1) ** (i - j) * tail / pi
            if second:
                real += second * weber(a, b, 2 * nu + 3 - sign)
            real -= quad(lambda k: first(k) * u(k), [0, k0])
            rows.append([name, m, i, j, num(k0), num(real), num(-sign * low)])
out["sound"] = rows
mp.dps = 50

# Gamma(n)/Gamma(n+1/2).
out["gammaRatio"] = [[n, num(gamma(n) / gamma(n + mpf(1) / 2))] for n in (1, 2, 3, 7, 15, 16, 17, 40, 200, 601)]

# r^m in full.
out["power"] = [[r, m, num(mpf(r) ** m)] for m in (0, 1, 2, 3, 17, 63, 64, 127, 200)
                for r in (0.03125 + 0.001 * rng.random(), rng.random(), 1 - 0.01 * rng.random(), 1.0)]

json.dump(out, sys.stdout, indent=0, separators=(",", ":"))
sys.stdout.write("\n")
