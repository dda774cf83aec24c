#!/usr/bin/python3
"""Reference values of the smoothing spline from SciPy's make_smoothing_spline.

usage: scipy_spline.py R_REFERENCE.json OUTPUT.json

Takes the series of smooth_spline.R (ties merged to their weighted mean, since SciPy wants increasing times), and writes for each of R's lambdas
SciPy's lam = lambda * range^3 * (sum w) / n in raw units, with fitted values, slopes, and values between the points.
"""
import argparse
import json

import numpy as np
import scipy
from scipy.interpolate import make_smoothing_spline


def merged(x, y, w):
    """Distinct times with the weighted mean and the sum of weights at each."""
    ux = np.unique(x)
    uw = np.array([w[x == v].sum() for v in ux])
    uy = np.array([(w[x == v] * y[x == v]).sum() for v in ux]) / uw
    return ux, uy, uw


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("r_reference")
    parser.add_argument("output")
    args = parser.parse_args()
    with open(args.r_reference) as file:
        source = json.load(file)["series"]
    series = {}
    for name, s in source.items():
        x, y, w = merged(*(np.array(s[k], float) for k in "xyw"))
        if len(x) > 200:
            continue
        middle = (x[1:] + x[:-1]) / 2
        fits = []
        for fit in s["fits"]:
            lam = fit["lambda"] * (x[-1] - x[0]) ** 3 * w.sum() / len(x)
            # Shifted to start at 0 and scaled to [0, 1]: lam scales with the cube of the range.
            scale = x[-1] - x[0]
            spline = make_smoothing_spline((x - x[0]) / scale, y, w, lam / scale**3)
            u = (x - x[0]) / scale
            fits.append({
                "lam": lam,
                "fitted": spline(u).tolist(),
                "slope": (spline(u, 1) / scale).tolist(),
                "middle": spline((middle - x[0]) / scale).tolist(),
            })
        series[name] = {"x": x.tolist(), "y": y.tolist(), "w": w.tolist(), "middle": middle.tolist(), "fits": fits}
    with open(args.output, "w") as file:
        json.dump({"madeBy": f"tools/reference/scipy_spline.py, SciPy {scipy.__version__}, NumPy {np.__version__}", "series": series}, file)
        file.write("\n")


if __name__ == "__main__":
    main()
