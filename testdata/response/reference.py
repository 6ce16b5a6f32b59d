"""Reference displacements of the ideal sheet after initial values.

Independent of the Go code in every step: zeros from scipy.special.jn_zeros,
projections by brute quadrature of the shapes over the disc (Gauss-Legendre in
the radius, even steps around; no closed forms), time by the matrix exponential
of each mode's first-order system.

Run with numpy 1.24 and scipy 1.10 or later:

    python3 testdata/response/reference.py > testdata/response/reference.json

Seeded: the same versions give the same file.
"""

import json

import numpy as np
from scipy.linalg import expm
from scipy.special import jn_zeros, jv

SEED = 20240611
ORDERS, CIRCLES = 6, 7


def bump(radius, angle, width):
    def f(r, theta):
        x = r * np.cos(theta) - radius * np.cos(angle)
        y = r * np.sin(theta) - radius * np.sin(angle)
        s2 = (x * x + y * y) / width**2
        return np.where(s2 < 1, (1 - np.minimum(s2, 1)) ** 3, 0.0)

    return f


FORMULAS = {
    "(1 - r^2)*exp(x - 0.5*y)": lambda r, t: (1 - r**2) * np.exp(r * np.cos(t) - 0.5 * r * np.sin(t)),
    "(1 - r^4)*cos(3*theta)*r^3 + x*(1 - r)": lambda r, t: (1 - r**4) * np.cos(3 * t) * r**3 + r * np.cos(t) * (1 - r),
    "sin(pi*(1 - r^2))*(1 + y)^2": lambda r, t: np.sin(np.pi * (1 - r**2)) * (1 + r * np.sin(t)) ** 2,
}


def project(f, zeros, split):
    """Coefficients by quadrature. The bump has a kink in its third derivative
    at its edge, so the rule is made of many panels."""
    nodes, weights = np.polynomial.legendre.leggauss(12)
    edges = np.linspace(0, 1, split + 1)
    r = np.concatenate([(b - a) / 2 * nodes + (a + b) / 2 for a, b in zip(edges, edges[1:])])
    w = np.concatenate([(b - a) / 2 * weights for a, b in zip(edges, edges[1:])])
    count = 1536
    theta = 2 * np.pi * np.arange(count) / count
    values = f(r[:, None], theta[None, :])
    a = np.zeros((ORDERS + 1, CIRCLES))
    b = np.zeros((ORDERS + 1, CIRCLES))
    for m in range(ORDERS + 1):
        cosine = values @ np.cos(m * theta) * (2 * np.pi / count)
        sine = values @ np.sin(m * theta) * (2 * np.pi / count)
        for n in range(CIRCLES):
            j = zeros[m][n]
            shape = jv(m, j * r) * r * w
            norm = (np.pi if m == 0 else np.pi / 2) * jv(m + 1, j) ** 2
            a[m, n] = shape @ cosine / norm
            b[m, n] = shape @ sine / norm if m else 0.0
    return a, b


def main():
    random = np.random.default_rng(SEED)
    zeros = [jn_zeros(m, CIRCLES) for m in range(ORDERS + 1)]
    formulas = list(FORMULAS)
    shapes = {}

    def shape(kind):
        if kind == "formula":
            text = formulas[random.integers(len(formulas))]
            key = text
            if key not in shapes:
                shapes[key] = project(FORMULAS[text], zeros, 16)
            return {"kind": kind, "peak": 1, "formula": text}, shapes[key]
        width = round(float(random.uniform(0.2, 0.5)), 3)
        radius = round(float(random.uniform(0, 1 - width)), 3)
        angle = round(float(random.uniform(-3, 3)), 3)
        spec = {"kind": kind, "peak": 1, "radius": radius, "angle": angle, "width": width}
        return spec, project(bump(radius, angle, width), zeros, 192)

    cases = []
    for zeta in (0, 0.02, 0.7, 1, 1.8):
        displacement, (a, b) = shape("formula" if zeta in (0, 1) else "bump")
        velocity, (va, vb) = shape("bump" if zeta in (0, 1) else "formula")
        points = []
        for _ in range(4):
            r = round(float(random.uniform(0, 1)), 3)
            theta = round(float(random.uniform(0, 6)), 3)
            t = round(float(random.uniform(0, 6)), 3)
            w = 0.0
            for m in range(ORDERS + 1):
                for n in range(CIRCLES):
                    j = zeros[m][n]
                    system = np.array([[0, 1], [-j * j, -2 * zeta * j]])
                    motion = expm(system * t)[0]
                    w += jv(m, j * r) * (
                        (motion @ [a[m, n], va[m, n]]) * np.cos(m * theta)
                        + (motion @ [b[m, n], vb[m, n]]) * np.sin(m * theta)
                    )
            points.append({"r": r, "theta": theta, "t": t, "w": float(w)})
        cases.append({"zeta": zeta, "displacement": displacement, "velocity": velocity, "points": points})
    print(json.dumps({"orders": ORDERS, "circles": CIRCLES, "cases": cases}, indent=1))


main()
