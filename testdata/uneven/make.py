"""Wave numbers k a of sheets that are not the same all around, by methods that
share nothing with core/modes. Needs NumPy and SciPy; some minutes.

    python3 make.py > reference.json

tension   Ritz in (1-x^2-y^2) times Legendre products in x and y, with the
          tension as a Cartesian tensor and a Gauss rule in polar coordinates.
strip     The same, with functions of x broken at the edges of the strip.
patch     Exact in the patch and around it (Bessel functions about its centre,
          matched at its edge), the rim by collocation: the method of particular
          solutions of Fox, Henrici & Moler, SIAM J. Numer. Anal. 4 (1967) 89-102.
"""

import json
import sys

import numpy as np
from numpy.polynomial import legendre as L
from scipy.linalg import eigh, svdvals
from scipy.optimize import minimize_scalar
from scipy.special import jv, jvp, yv, yvp


def basis(i, x):
    """Legendre polynomial i and its slope."""
    c = np.zeros(i + 1)
    c[i] = 1
    return L.legval(x, c), L.legval(x, L.legder(c))


def polar(radii, angles):
    g, w = L.leggauss(radii)
    r, wr = (g + 1) / 2, w / 2
    t = 2 * np.pi * np.arange(angles) / angles
    rr, tt = np.meshgrid(r, t, indexing="ij")
    weight = (wr * r)[:, None] * np.full(angles, 2 * np.pi / angles)[None, :]
    return rr.ravel(), tt.ravel(), weight.ravel()


def field(parts, r, t):
    """Tensor xx, yy, xy of a field: its parts in polar form, turned."""
    rr, tt, rt = np.ones_like(r), np.ones_like(r), np.zeros_like(r)
    for p in parts:
        kind, k, eps, angle = p["kind"], p["k"], p["eps"], p["angle"]
        c, s = np.cos(k * (t - angle)), np.sin(k * (t - angle))
        if kind == "sliding":
            rr = rr + eps / 2 * c * (k * r ** (k - 2) - (k - 2) * r**k)
            tt = tt + eps / 2 * c * ((k + 2) * r**k - k * r ** (k - 2))
            rt = rt + eps * k / 2 * s * (r**k - r ** (k - 2))
        elif kind == "warpweft":  # k = 2
            rr, tt, rt = rr + eps * c, tt - eps * c, rt - eps * s
        elif kind == "bonded1":  # k = 1, any Poisson's ratio
            rr, tt, rt = rr + eps * r * c, tt + 3 * eps * r * c, rt + eps * r * s
        elif kind == "weight":  # k = 1, eps is the pull, nu 0.3
            q = eps / 2.7
            rr, tt, rt = rr - 2 * q * r * c, tt - 0.6 * q * r * c, rt + 0.7 * q * r * s
    c, s = np.cos(t), np.sin(t)
    return (
        rr * c * c + tt * s * s - 2 * rt * c * s,
        rr * s * s + tt * c * c + 2 * rt * c * s,
        (rr - tt) * c * s + rt * (c * c - s * s),
    )


def tension(parts, degree, count):
    r, t, w = polar(degree + 10, 2 * degree + 24)
    x, y = r * np.cos(t), r * np.sin(t)
    xx, yy, xy = field(parts, r, t)
    px = [basis(i, x) for i in range(degree + 1)]
    py = [basis(i, y) for i in range(degree + 1)]
    rim = 1 - x * x - y * y
    f, fx, fy = [], [], []
    for i in range(degree + 1):
        for j in range(degree + 1 - i):
            a, ad = px[i]
            b, bd = py[j]
            f.append(rim * a * b)
            fx.append(rim * ad * b - 2 * x * a * b)
            fy.append(rim * a * bd - 2 * y * a * b)
    f, fx, fy = np.array(f), np.array(fx), np.array(fy)
    K = (fx * (xx * w)) @ fx.T + (fy * (yy * w)) @ fy.T + (fx * (xy * w)) @ fy.T + (fy * (xy * w)) @ fx.T
    M = (f * w) @ f.T
    return reduced(K, M, count)


def reduced(K, M, count):
    """Lowest roots of K x = k^2 M x, without the directions that rounding makes
    dependent."""
    scale = 1 / np.sqrt(np.diag(M))
    K, M = K * scale[:, None] * scale, M * scale[:, None] * scale
    v, u = np.linalg.eigh(M)
    keep = v > 1e-12 * v[-1]
    t = u[:, keep] / np.sqrt(v[keep])
    return np.sqrt(eigh(t.T @ K @ t, eigvals_only=True)[:count])


def strip(offset, width, mass, degree, count):
    """A strip at x = offset; area 1 per unit for the sheet."""
    edges = [-1, offset - width / 2, offset + width / 2, 1]
    g, wg = L.leggauss(degree + 30)
    # x and weight of each element; x = sin so that the roots at +-1 are smooth.
    xs, ws, phi, dphi = [], [], [], []
    for e in range(3):
        lo, hi = np.arcsin(edges[e]), np.arcsin(edges[e + 1])
        a = lo + (hi - lo) * (g + 1) / 2
        x = np.sin(a)
        xs.append(x)
        ws.append((hi - lo) / 2 * wg * np.cos(a))
    # Functions of x: hats at the two edges and bubbles in the three elements.
    functions = []
    for e in range(3):
        h = edges[e + 1] - edges[e]
        for i in range(2, degree + 2):
            c = np.zeros(i + 1)
            c[i], c[i - 2] = 1, -1
            functions.append({e: (c, h)})
    up, down = np.array([0.5, 0.5]), np.array([0.5, -0.5])
    for e in range(4):  # values at the four edges; the rim factor does the rest
        d = {}
        if e > 0:
            d[e - 1] = (up, edges[e] - edges[e - 1])
        if e < 3:
            d[e] = (down, edges[e + 1] - edges[e])
        functions.append(d)
    ge, we = L.leggauss(degree + 12)
    area = 2 * np.sum(ws[1] * np.sqrt(1 - xs[1] ** 2))
    K = M = 0
    keys = [(p, j) for p in range(len(functions)) for j in range(degree + 1)]
    for e in range(3):
        x = np.repeat(xs[e], len(ge))
        half = np.sqrt(1 - x * x)
        y = half * np.tile(ge, len(xs[e]))
        w = np.repeat(ws[e], len(ge)) * half * np.tile(we, len(xs[e]))
        rim = 1 - x * x - y * y
        py = [basis(j, y) for j in range(degree + 1)]
        F, FX, FY, index = [], [], [], []
        for n, (p, j) in enumerate(keys):
            if e not in functions[p]:
                continue
            c, h = functions[p][e]
            s = 2 * (x - edges[e]) / h - 1
            a, ad = L.legval(s, c), L.legval(s, L.legder(c)) * 2 / h
            b, bd = py[j]
            F.append(rim * a * b)
            FX.append(rim * ad * b - 2 * x * a * b)
            FY.append(rim * a * bd - 2 * y * a * b)
            index.append(n)
        F, FX, FY = np.array(F), np.array(FX), np.array(FY)
        if np.isscalar(K):
            K, M = np.zeros((len(keys), len(keys))), np.zeros((len(keys), len(keys)))
        ix = np.ix_(index, index)
        K[ix] += (FX * w) @ FX.T + (FY * w) @ FY.T
        M[ix] += (F * w) @ F.T * (1 + (mass / area if e == 1 else 0))
    return reduced(K, M, count)


def patch(d, b, mass, rigid, sine, lo, hi, orders=26):
    """k a of the modes even (or odd) about the line through the patch centre."""
    a = (np.arange(3 * orders) + 0.5) * np.pi / (3 * orders)
    x, y = np.cos(a) - d, np.sin(a)
    rho, phi = np.hypot(x, y), np.arctan2(y, x)
    total = mass + np.pi * b * b

    def columns(k):
        inner = k * np.sqrt(1 + mass / (np.pi * b * b))
        cols = []
        for n in range(1 if sine else 0, orders):
            j, jd, yy, yd = jv(n, k * b), k * jvp(n, k * b), yv(n, k * b), k * yvp(n, k * b)
            if not rigid:  # slope/value inside
                v, dv = jv(n, inner * b), inner * jvp(n, inner * b)
            elif n == 0:  # 2 pi b w' = -k^2 total w
                v, dv = 2 * np.pi * b, -k * k * total
            elif n == 1:  # jump of slope pi b^2 (w' - w/b) = -k^2 (total b^2/4) w/b
                v, dv = np.pi * b * b, np.pi * b - k * k * total * b / 4
            else:
                v, dv = 0, 1
            # J + s Y around, with (jd + s yd) v = (j + s yy) dv
            p, q = j * dv - jd * v, yd * v - yy * dv
            f = q * jv(n, k * rho) + p * yv(n, k * rho)
            f = f * (np.sin(n * phi) if sine else np.cos(n * phi))
            cols.append(f / np.abs(f).max())
        return np.array(cols).T

    def ratio(k):
        # Angle between rim values and interior values (Betcke & Trefethen, SIAM
        # Review 47 (2005) 469-491).
        rng = np.random.default_rng(1)
        t = rng.uniform(0, np.pi, 60)
        r = np.sqrt(rng.uniform(0, 1, 60))
        xi, yi = r * np.cos(t) - d, r * np.sin(t)
        ri, ph = np.hypot(xi, yi), np.arctan2(yi, xi)
        out = ri > b
        nonlocal rho, phi
        keep = rho, phi
        rho, phi = np.concatenate([keep[0], ri[out]]), np.concatenate([keep[1], ph[out]])
        c = columns(k)
        rho, phi = keep
        q, _ = np.linalg.qr(c)
        return svdvals(q[: len(a)])[-1]

    ks = np.linspace(lo, hi, 400)
    v = np.array([ratio(k) for k in ks])
    found = []
    for i in range(1, len(ks) - 1):
        if v[i] < v[i - 1] and v[i] < v[i + 1]:
            m = minimize_scalar(ratio, bounds=(ks[i - 1], ks[i + 1]), method="bounded", options={"xatol": 1e-13})
            if m.fun < 1e-6:
                # The minimum is a corner: two lines left and right meet closer.
                k, h = m.x, 1e-5
                l1, l2, r1, r2 = ratio(k - 2 * h), ratio(k - h), ratio(k + h), ratio(k + 2 * h)
                sl, sr = (l2 - l1) / h, (r2 - r1) / h
                k = (l2 - r1 + sr * (k + h) - sl * (k - h)) / (sr - sl)
                found.append(k)
    return found


out = {"tension": [], "strip": [], "patch": []}
cases = [
    [{"kind": "sliding", "k": 2, "eps": 0.3, "angle": 0.4}],
    [{"kind": "sliding", "k": 3, "eps": 0.3, "angle": 0.4}],
    [{"kind": "sliding", "k": 2, "eps": 0.1, "angle": 0.2}, {"kind": "sliding", "k": 3, "eps": 0.2, "angle": 0.3},
     {"kind": "sliding", "k": 5, "eps": 0.1, "angle": -1}, {"kind": "bonded1", "k": 1, "eps": 0.1, "angle": 2}],
    [{"kind": "warpweft", "k": 2, "eps": 0.1, "angle": 0.9}, {"kind": "weight", "k": 1, "eps": 0.4, "angle": -1.5}],
]
for parts in cases:
    a, b = tension(parts, 24, 10), tension(parts, 28, 10)
    out["tension"].append({"parts": parts, "k": [round(v, 12) for v in b], "change": float(np.abs(a - b).max())})
for offset, width, mass in [(0, 0.04, 0.1), (0.5, 0.04, 0.1), (0, 0.3, 0.3), (0.3, 0.1, 1.0)]:
    a, b = strip(offset, width, mass, 14, 8), strip(offset, width, mass, 18, 8)
    out["strip"].append({"offset": offset, "width": width, "mass": mass, "k": [round(v, 10) for v in b], "change": float(np.abs(a - b).max())})
for d, b, mass, rigid in [(0.45, 0.1, 0.1, False), (0.45, 0.1, 0.1, True), (0.6, 0.3, 0.3, False), (0.3, 0.02, 0.2, False), (0.3, 0.05, 0.2, True), (0.2, 0.3, 0.5, True)]:
    row = {"d": d, "b": b, "mass": mass, "rigid": rigid}
    for name, sine in (("even", False), ("odd", True)):
        x, y = patch(d, b, mass, rigid, sine, 1.5, 6.7, 24)[:4], patch(d, b, mass, rigid, sine, 1.5, 6.7, 30)[:4]
        row[name] = [round(v, 10) for v in y]
        row[name + "Change"] = float(np.abs(np.array(x) - np.array(y)).max())
    out["patch"].append(row)
json.dump(out, sys.stdout, indent=1)
print()
