#!/usr/bin/env python3
"""Writes reference.json: complex modes of limp sheets in fluid with sound.

Needs NumPy and SciPy. Takes some minutes:

    python3 make.py > reference.json

The same variational problem as core/modes, put together by other means: matrices
by quadrature in the complex plane of z = sqrt(k^2 - k0^2) with SciPy's Bessel
functions of complex argument, the nonlinear eigenproblem by Newton's method on
the full pair with NumPy's solvers, started from still fluid and led there in
small steps of the speed of sound. No series, no closed form but Hankel
transforms. The sheet's shapes are r^m (1-r^2) P_j^(m,1), their transforms
J_b(k)/k^2, b = m+2j+2; the pressure jump of open faces is sqrt(1-r^2)
r^m P_q^(m,1/2), transforms k^-3/2 J_mu(k), mu = m+2q+3/2.
"""
import json
import numpy as np
from scipy.special import jv, roots_legendre

X60, W60 = roots_legendre(60)
X20, W20 = roots_legendre(20)
LAST = 300.0


def segment(a, b, x=X60, w=W60):
    return (a + b) / 2 + (b - a) / 2 * x, (b - a) / 2 * w


def path(k0):
    """Nodes and weights in z from -i k0 over 0 to LAST."""
    zs, ws = zip(*([segment(-1j * k0, 0)] + [segment(float(i), i + 2.0, X20, W20) for i in range(0, int(LAST), 2)]))
    return np.concatenate(zs), np.concatenate(ws)


def held(m, n, k):
    b = m + 2 * np.arange(n) + 2
    return jv(b[:, None], k[None, :]) / k ** 2


def baffled(m, n, k0):
    """integral U_i U_j k dk / sqrt(k^2 - k0^2)."""
    z, w = path(k0)
    u = held(m, n, np.sqrt(k0 ** 2 + z * z))
    f = (u * w) @ u.T
    s = (-1.0) ** np.arange(n)
    return f + np.outer(s, s) / (4 * np.pi * LAST ** 4)  # mean of J J' beyond


def jump(m, n, k0):
    """Half the integral of V_p V_q k dk sqrt(k^2 - k0^2), from the known
    integral of J_mu^2/k and the quickly convergent difference."""
    q = np.arange(n)
    mu = m + 2 * q + 1.5

    def v(k):
        return jv(mu[:, None], k[None, :]) * k ** -1.5

    z, w = path(k0)
    k = np.sqrt(k0 ** 2 + z * z)
    a = v(k)
    f = (a * (w * z * z)) @ a.T
    # The end of the path in k, and the same for still fluid up to there.
    end = np.sqrt(k0 ** 2 + LAST ** 2)
    zs, ws = zip(*([segment(0.0, 1.0, X60, W60)] + [segment(1.0 + i * (end - 1) / 160, 1.0 + (i + 1) * (end - 1) / 160, X20, W20) for i in range(160)]))
    k, w = np.concatenate(zs), np.concatenate(ws)
    b = v(k)
    f -= (b * (w * k * k)) @ b.T
    s = (-1.0) ** q
    f -= np.outer(s, s) * k0 ** 2 / 2 / (3 * np.pi * LAST ** 3)  # beyond
    return f / 2 + np.diag(1 / (4 * mu))


def coupling(m, n):
    """integral of u_j s_q r dr by quadrature in k with a tail by its mean."""
    x, w = roots_legendre(200)
    from scipy.special import eval_jacobi, gamma, factorial
    # t = r^2, weight sqrt(1-t): substitute 1-t = y^2.
    y = (x + 1) / 2
    w = w / 2
    t = 1 - y * y
    j = np.arange(n)[:, None]
    u = 1 / (2 * (j + 1)) * (1 - t) * eval_jacobi(j, m, 1, 1 - 2 * t)
    q = np.arange(n + 1)[:, None]
    c = factorial(q) / (np.sqrt(2) * gamma(q + 1.5))
    s = c * y * eval_jacobi(q, m, 0.5, 1 - 2 * t)
    # r dr = dt/2 = y dy; r^m twice is t^m.
    return (s * (w * y * t ** m)) @ u.T


def sheet(m, n):
    b = m + 2 * np.arange(n) + 2.0
    mass = np.diag(1 / (4 * (b - 1) * b * (b + 1)))
    off = 1 / (8 * b[:-1] * (b[:-1] + 1) * (b[:-1] + 2))
    return np.diag(1 / (2 * b)), mass + np.diag(off, 1) + np.diag(off, -1)


def modes(case, m, count, n):
    a, T, sigma = case["radius"], case["tension"], case["arealDensity"]
    k, mass = sheet(m, n)
    k, mass = T * k, sigma * a * a * mass
    if case["kind"] == "open":
        b = coupling(m, n)

        def fluid(k0):
            return b.T @ np.linalg.solve(jump(m, n + 1, k0), b)
    else:
        def fluid(k0):
            return case["sides"] * baffled(m, n, k0)

    rho, c0 = case["density"], case["soundSpeed"]

    def total(w, tau):
        return mass + rho * a ** 3 * fluid(w * a / c0 * tau)

    from scipy.linalg import eigh
    still = total(1e-6 * c0 / a, 1.0).real
    values, vectors = eigh(k, still)
    out = []
    for i in range(count):
        w, q = np.sqrt(values[i]) + 0j, vectors[:, i].astype(complex)
        for tau in (0.5, 1.0):
            for _ in range(30):
                # Residual inverse iteration with a difference quotient.
                h = 1e-5 * w
                t0, t1 = total(w, tau), total(w + h, tau)
                d = k - w * w * t0
                dd = (k - (w + h) ** 2 * t1 - d) / h
                step = (q @ d @ q) / (q @ dd @ q)
                w -= step
                q = np.linalg.solve(k - w * w * t0, dd @ q)
                q /= np.sqrt(q @ still @ q)
                if abs(step) < 1e-12 * abs(w):
                    break
        out.append([w.real, w.imag])
    return out


CASES = [
    dict(name="foil, baffled on both sides", kind="baffled", sides=2, radius=0.75, tension=180.0, arealDensity=0.032, density=1.2, soundSpeed=343.5),
    dict(name="stiff drum skin, baffled on one side", kind="baffled", sides=1, radius=0.328, tension=20000.0, arealDensity=0.262, density=1.2, soundSpeed=343.5),
    dict(name="membrane under water on one side", kind="baffled", sides=1, radius=0.2, tension=20000.0, arealDensity=1.0, density=998.0, soundSpeed=1482.0),
    dict(name="drum skin, open", kind="open", sides=2, radius=0.328, tension=3990.0, arealDensity=0.262, density=1.2, soundSpeed=343.5),
    dict(name="foil, open", kind="open", sides=2, radius=0.75, tension=180.0, arealDensity=0.032, density=1.2, soundSpeed=343.5),
]

if __name__ == "__main__":
    result = []
    for case in CASES:
        n = 18 if case["kind"] == "baffled" else 26
        for m in (0, 1, 3):
            result.append(dict(case, m=m, omega=modes(case, m, 3, n)))
    print(json.dumps({"made by": "testdata/wet/make.py, SciPy", "omega": "complex, rad/s, of exp(-i omega t)", "cases": result}, indent=1))
