#!/usr/bin/python3
"""Times SciPy's make_smoothing_spline on a series of the bench, inside this process: start-up and reading the data are not counted.

usage: yardstick.py FOLDER POINTS LAMBDA REPEATS

FOLDER/series.bin holds t (s), y and weights, POINTS doubles each. LAMBDA is in raw units: sum w (y - g)^2 + LAMBDA * integral g''(t)^2 dt.
Time is scaled to [0, 1] beforehand, which is kindest to its digits. The spline is made and evaluated at the points; one call to warm up, then
REPEATS measurements (each repeats the call until 0.2 s are filled; garbage is collected first). Writes fitted values to FOLDER/scipy-fixed.bin, and
prints one JSON object: {"program", "routes": {"scipy-fixed": {"seconds": [...]}}}.
"""
import argparse
import gc
import json
import math
import os
import warnings
from time import perf_counter

import numpy as np
import scipy
from scipy.interpolate import make_smoothing_spline


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("folder")
    parser.add_argument("points", type=int)
    parser.add_argument("lam", metavar="lambda", type=float)
    parser.add_argument("repeats", type=int)
    args = parser.parse_args()
    warnings.simplefilter("ignore")
    t, y, w = np.fromfile(os.path.join(args.folder, "series.bin"), count=3 * args.points).reshape(3, args.points)
    span = t[-1] - t[0]
    u = (t - t[0]) / span
    lam = args.lam / span**3

    def call():
        return make_smoothing_spline(u, y, w, lam)(u)

    begun = perf_counter()
    fitted = call()
    calls = max(1, math.ceil(0.2 / (perf_counter() - begun)))
    seconds = []
    for _ in range(args.repeats):
        gc.collect()
        begun = perf_counter()
        for _ in range(calls):
            call()
        seconds.append((perf_counter() - begun) / calls)
    fitted.tofile(os.path.join(args.folder, "scipy-fixed.bin"))
    print(json.dumps({"program": f"SciPy {scipy.__version__}", "routes": {"scipy-fixed": {"seconds": seconds}}}))


if __name__ == "__main__":
    main()
