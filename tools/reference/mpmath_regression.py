#!/usr/bin/python3
"""Regression baselines on small awkward series at 60 digits, by normal equations on truncated powers.

usage: mpmath_regression.py OUTPUT.json

For each series and basis: fitted values, standard errors at sigma = 1, leverages, and the residuals of each lot from the fit without it (the knots and
ends staying). Times are epoch seconds; lots of two interleave. "decades" has weights over 18 decades, "gaps" has gaps of a millionth of the range, and ties.
"""
import argparse
import json
import pathlib

import mpmath
from mpmath import mp, mpf

mp.dps = 60
N = 24


def series():
    steps = [600 + 97 * ((7 * i) % 11) for i in range(N)]
    t = [1.7e9 + sum(steps[:i]) for i in range(N)]
    y = [42 + 0.25 * i - (0.5 * (i - 14) if i > 14 else 0) + ((13 * i) % 17) / 17 for i in range(N)]
    lot = [2 * (i // 4) + i % 2 for i in range(N)]
    near = [t[i] if i % 6 else t[i - 1] + (0.015625 if i % 12 else 0) if i else t[i] for i in range(N)]
    return {
        "plain": {"t": t, "y": y, "w": [1.0 + i % 3 for i in range(N)], "lot": lot},
        "decades": {"t": t, "y": y, "w": [10.0 ** (9 - 18 * ((7 * i) % N) / (N - 1)) for i in range(N)], "lot": lot},
        "gaps": {"t": near, "y": y, "w": [1.0 + i % 2 for i in range(N)], "lot": lot},
    }


def basis(method, size, inner):
    """The functions of u on [0, 1]; natural splines in the form of differences of truncated cubes."""
    if method == "polynomial":
        return lambda u: [u**k for k in range(size + 1)]
    if method == "b-spline":
        return lambda u: [u**k for k in range(4)] + [max(u - q, mpf(0)) ** 3 for q in inner]
    knots = [mpf(0)] + inner + [mpf(1)]

    def cube(u, j):
        return (max(u - knots[j], mpf(0)) ** 3 - max(u - 1, mpf(0)) ** 3) / (1 - knots[j])

    return lambda u: [mpf(1), u] + [cube(u, j) - cube(u, len(knots) - 2) for j in range(len(knots) - 2)]


def solve(rows, w, y, keep):
    """Coefficients and inverse of X'WX over the rows that are kept."""
    p = len(rows[0])
    a = mpmath.matrix(p, p)
    b = mpmath.matrix(p, 1)
    for i in keep:
        for r in range(p):
            b[r] += w[i] * rows[i][r] * y[i]
            for s in range(p):
                a[r, s] += w[i] * rows[i][r] * rows[i][s]
    inverse = mpmath.inverse(a)
    return inverse * b, inverse


def one_fit(s, method, size):
    t = [mpf(v) for v in s["t"]]
    w = [mpf(v) for v in s["w"]]
    y = [mpf(v) for v in s["y"]]
    length = t[-1] - t[0]
    count = 0 if method == "polynomial" else size
    knots = [float(t[0] + length * (j + 1) / (count + 1)) for j in range(count)]
    functions = basis(method, size, [(mpf(k) - t[0]) / length for k in knots])
    rows = [functions((v - t[0]) / length) for v in t]
    row = lambda i: mpmath.matrix([rows[i]])
    beta, inverse = solve(rows, w, y, range(N))
    variance = [(row(i) * inverse * row(i).T)[0] for i in range(N)]
    deleted = [None] * N
    for lot in set(s["lot"]):
        own = [i for i in range(N) if s["lot"][i] == lot]
        others, _ = solve(rows, w, y, [i for i in range(N) if i not in own])
        for i in own:
            deleted[i] = float(y[i] - (row(i) * others)[0])
    return {
        "method": method,
        "size": size,
        "knots": knots,
        "fitted": [float((row(i) * beta)[0]) for i in range(N)],
        "standardError": [float(mp.sqrt(v)) for v in variance],
        "leverage": [float(w[i] * variance[i]) for i in range(N)],
        "deletedResidual": deleted,
    }


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("output", type=pathlib.Path)
    args = parser.parse_args()
    kinds = [("natural-spline", 1), ("natural-spline", 4), ("b-spline", 3), ("polynomial", 4)]
    answer = {"madeBy": f"tools/reference/mpmath_regression.py, mpmath {mpmath.__version__}, 60 digits", "series": {}}
    for name, s in series().items():
        answer["series"][name] = {**s, "fits": [one_fit(s, *kind) for kind in kinds]}
    args.output.write_text(json.dumps(answer, separators=(",", ":")).replace('"fits"', '\n"fits"').replace("},{", "},\n{") + "\n")


if __name__ == "__main__":
    main()
