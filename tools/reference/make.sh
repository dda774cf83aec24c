#!/bin/sh
# Makes the reference values of the smoothing spline, or checks that the committed ones are what the scripts make.
#
# usage: make.sh [--check]
#
# Needs Rscript, /usr/bin/python3 with SciPy and mpmath (Debian: r-base-core, python3-scipy, python3-mpmath) and gcc with libquadmath.
# --check writes to a temporary folder and compares number by number (tolerance 1e-9 relative, for other versions of the programs).
set -eu
here=$(cd "$(dirname "$0")" && pwd)
committed=$here/../../fixtures/reference
case ${1:-} in
  --help | -h) sed -n '2,7s/^# \{0,1\}//p' "$0"; exit 0 ;;
  --check) out=$(mktemp -d); trap 'rm -rf "$out"' EXIT ;;
  '') out=$committed ;;
  *) echo "unknown option $1" >&2; exit 2 ;;
esac
mkdir -p "$out"
Rscript "$here/smooth_spline.R" "$out/r-smooth-spline.json"
/usr/bin/python3 "$here/scipy_spline.py" "$out/r-smooth-spline.json" "$out/scipy-smoothing-spline.json"
/usr/bin/python3 "$here/mpmath_spline.py" "$out/mpmath-smoothing-spline.json"
program=$(mktemp)
gcc -O2 -ffp-contract=off -o "$program" "$here/quad_spline.c" -lquadmath
"$program" 100000 1000 > "$out/quad-smoothing-spline.json"
rm -f "$program"
if [ "$out" != "$committed" ]; then /usr/bin/python3 "$here/compare.py" "$committed" "$out"; fi
