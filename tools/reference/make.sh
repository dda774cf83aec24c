#!/bin/sh
# npm run reference             makes every file of reference values into a temporary folder and compares it with the committed one
# npm run reference -- --make   writes them into fixtures/reference instead
#
# Numbers are compared to 1e-9 of the largest in their list (what a program searched for: 1e-4), so that other versions of the programs pass.
# Needs R with its recommended packages, SciPy, mpmath and gcc with libquadmath. Exit status: 0 as committed, 1 a file differs, 2 a program is missing.
set -eu
here=$(cd "$(dirname "$0")" && pwd)
committed=$here/../../fixtures/reference
python=${PYTHON:-/usr/bin/python3}
case ${1:-} in
  --help | -h) sed -n '2,6s/^# \{0,1\}//p' "$0"; exit 0 ;;
  --make | '') ;;
  *) echo "unknown option $1; see --help" >&2; exit 2 ;;
esac

work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
missing=
need() { # what it is called, its Debian package, how to see whether it is there
  name=$1 package=$2
  shift 2
  "$@" > "$work/answer" 2>&1 || missing="$missing $name (Debian package: $package),"
}
printf '#include <quadmath.h>\nint main(void) { return (int)sqrtq(0.0Q); }\n' > "$work/try.c"
need R r-base-core Rscript -e 'invisible(0)'
need "R's mgcv, MASS and splines" r-recommended Rscript -e 'stopifnot(all(vapply(c("mgcv", "MASS", "splines"), requireNamespace, NA, quietly = TRUE)))'
need SciPy python3-scipy "$python" -c 'from scipy.interpolate import make_smoothing_spline'
need mpmath python3-mpmath "$python" -c 'import mpmath'
need 'gcc with libquadmath' gcc gcc -o "$work/try" "$work/try.c" -lquadmath
if [ -n "$missing" ]; then
  echo "The reference values cannot be made here. Missing:${missing%,}." >&2
  exit 2
fi

out=$work/made
mkdir "$out"
step() { # the file, then the command that makes it
  file=$1
  shift
  from=$(date +%s)
  "$@" > "$work/log" 2>&1 || { cat "$work/log" >&2; echo "$file could not be made." >&2; exit 1; }
  echo "$file: made in $(($(date +%s) - from)) s"
}
quad() {
  gcc -O2 -ffp-contract=off -o "$work/quad" "$here/quad_spline.c" -lquadmath
  "$work/quad" > "$1"
}
step r-smooth-spline.json Rscript "$here/smooth_spline.R" "$out/r-smooth-spline.json"
step mgcv-smoothing-spline.json Rscript "$here/mgcv.R" "$out/r-smooth-spline.json" "$out/mgcv-smoothing-spline.json"
step r-leave-lot-out.json Rscript "$here/leave_lot_out.R" "$out/r-leave-lot-out.json"
step mpmath-regression.json "$python" "$here/mpmath_regression.py" "$out/mpmath-regression.json"
step r-regression.json Rscript "$here/regression.R" "$out/r-regression.json"
step r-common-practice.json Rscript "$here/common_practice.R" "$out/r-common-practice.json"
step scipy-smoothing-spline.json "$python" "$here/scipy_spline.py" "$out/r-smooth-spline.json" "$out/scipy-smoothing-spline.json"
step mpmath-smoothing-spline.json "$python" "$here/mpmath_spline.py" "$out/mpmath-smoothing-spline.json"
step quad-smoothing-spline.json quad "$out/quad-smoothing-spline.json"

if [ "${1:-}" = --make ]; then
  cp "$out"/*.json "$committed"
else
  "$python" "$here/compare.py" "$committed" "$out"
fi
