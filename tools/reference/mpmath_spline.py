#!/usr/bin/python3
"""Reference values of the smoothing spline in 50 decimal digits (mpmath), on small awkward series.

usage: mpmath_spline.py OUTPUT.json

Solves (W + lambda Q R^-1 Q') g = W y (Green & Silverman 1994, ch. 2) and inverts it, with the doubles taken as exact numbers. Writes fitted values,
slopes, curvatures, posterior standard deviations, leverages, residual of each point from the fit without it, values between and beyond the points with
their standard deviations and covariances (the fit with points of no weight there), integral of g''^2, weighted RSS and log-determinants.
"""
import argparse
import json

import mpmath
from mpmath import matrix, mp, mpf

mp.dps = 50


def bands(t):
    n = len(t)
    q, r = mpmath.zeros(n, n - 2), mpmath.zeros(n - 2, n - 2)
    for j in range(1, n - 1):
        left, right = t[j] - t[j - 1], t[j + 1] - t[j]
        q[j - 1, j - 1], q[j, j - 1], q[j + 1, j - 1] = 1 / left, -1 / left - 1 / right, 1 / right
        r[j - 1, j - 1] = (left + right) / 3
        if j < n - 2:
            r[j - 1, j] = r[j, j - 1] = right / 6
    return q, r


def fit(t, y, w, lam):
    """Values, posterior covariance, second derivatives and the matrix of the natural spline."""
    q, r = bands(t)
    k = q * (r**-1) * q.T
    a = mpmath.diag(w) + lam * k
    cov = a**-1
    g = cov * (mpmath.diag(w) * matrix(y))
    gamma = [mpf(0)] + list(r**-1 * (q.T * g)) + [mpf(0)]
    return g, cov, gamma, a, (g.T * k * g)[0]


def slopes(t, g, gamma):
    out = []
    for i in range(len(t)):
        if i + 1 < len(t):
            h = t[i + 1] - t[i]
            out.append((g[i + 1] - g[i]) / h - h * (2 * gamma[i] + gamma[i + 1]) / 6)
        else:
            h = t[i] - t[i - 1]
            out.append((g[i] - g[i - 1]) / h + h * (gamma[i - 1] + 2 * gamma[i]) / 6)
    return out


def reference(t, y, w, lam, extra):
    t, y, w, lam = [mpf(v) for v in t], [mpf(v) for v in y], [mpf(v) for v in w], mpf(lam)
    n = len(t)
    g, cov, gamma, a, penalty = fit(t, y, w, lam)
    s = [cov[i, i] * w[i] for i in range(n)]
    at = []
    for x in extra:
        times = sorted(t + [mpf(x)])
        p = times.index(mpf(x))
        weights, values = w[:p] + [mpf(0)] + w[p:], y[:p] + [mpf(0)] + y[p:]
        ge, ce, gm, _, _ = fit(times, values, weights, lam)
        at.append({"t": x, "value": float(ge[p]), "slope": float(slopes(times, ge, gm)[p]), "curvature": float(gm[p]), "standardError": float(mpmath.sqrt(ce[p, p]))})
    wanted = extra + [float(t[1])]
    pairs = [(p, q) for i, p in enumerate(wanted) for q in wanted[:i]]
    covariance = []
    for early, late in pairs:
        times, weights, values = list(t), list(w), list(y)
        for x in (mpf(early), mpf(late)):
            if x not in times:
                p = sum(1 for v in times if v < x)
                times.insert(p, x)
                weights.insert(p, mpf(0))
                values.insert(p, mpf(0))
        _, ce, _, _, _ = fit(times, values, weights, lam)
        i, j = times.index(mpf(early)), times.index(mpf(late))
        covariance.append({"a": early, "b": late, "covariance": float(ce[i, j]), "scale": float(mpmath.sqrt(ce[i, i] * ce[j, j]))})
    rss = sum(w[i] * (y[i] - g[i]) ** 2 for i in range(n))
    return {
        "lambda": float(lam),
        "fitted": [float(v) for v in g],
        "slope": [float(v) for v in slopes(t, g, gamma)],
        "curvature": [float(v) for v in gamma],
        "standardError": [float(mpmath.sqrt(cov[i, i])) for i in range(n)],
        "leverage": [float(v) for v in s],
        "deletedResidual": [float((y[i] - g[i]) / (1 - s[i])) for i in range(n)],
        "deletedVariance": [float(1 / (w[i] * (1 - s[i]))) for i in range(n)],
        "edf": float(sum(s)),
        "weightedRss": float(rss),
        "penalty": float(penalty),
        "logDetA": float(mpmath.log(mpmath.det(a))),
        "deviance": float(rss + lam * penalty + mpmath.log(mpmath.det(a)) - (n - 2) * mpmath.log(lam)),
        "at": at,
        "covariance": covariance,
    }


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("output")
    args = parser.parse_args()
    n = 16
    even = [float(i) for i in range(n)]
    wave = [float((7 * i * i + 3 * i) % 23) / 8 - 1 + i / 4 for i in range(n)]
    near = [0.0, 1e-5, 1.0, 2.0, 2.00001, 2.00002, 4.0, 5.0, 7.0, 9.0, 9.00001, 10.0]
    cases = {
        "even": (even, wave, [1.0] * n, [1e-15, 1e-12, 1e-6, 1e-3, 1.0, 1e3, 1e4, 1e6, 1e12], [-3.0, 0.25, 7.5, 14.9, 20.0]),
        "weights over 18 decades": (even, wave, [10.0 ** ((5 * i) % 19 - 9) for i in range(n)], [1e-6, 1.0, 1e6], [2.5, 17.0]),
        "gaps of a millionth": (near, wave[: len(near)], [1.0 + (i % 3) for i in range(len(near))], [1e-20, 1e-10, 1e-3, 1.0, 1e4], [0.5, 2.000005, 12.0]),
        "epoch seconds": ([1.7e9 + 600 * i + (i * i) % 7 for i in range(n)], [v + 1000 for v in wave], [4.0] * n, [1e6, 1e10, 1e14], [1.7e9 + 1000, 1.7e9 + 20000]),
        "three points": ([0.0, 1.0, 3.0], [1.0, 3.0, 2.0], [1.0, 2.0, 1.0], [0.1, 10.0], [0.5, 4.0]),
        "four points": ([0.0, 1.0, 3.0, 4.0], [1.0, 3.0, 2.0, 2.5], [1.0, 2.0, 1.0, 0.5], [0.1, 10.0], [-1.0, 2.0]),
    }
    out = {"madeBy": f"tools/reference/mpmath_spline.py, mpmath {mpmath.__version__}, 50 digits", "cases": {}}
    for name, (t, y, w, lambdas, extra) in cases.items():
        out["cases"][name] = {"t": t, "y": y, "w": w, "fits": [reference(t, y, w, lam, extra) for lam in lambdas]}
    with open(args.output, "w") as file:
        json.dump(out, file, indent=1)
        file.write("\n")


if __name__ == "__main__":
    main()
