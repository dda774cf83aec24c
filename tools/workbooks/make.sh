#!/bin/sh
# npm run corpus             makes the corpus of workbooks into a temporary folder and compares it with the committed one
# npm run corpus -- --make   writes it into fixtures/workbooks/corpus instead
#
# The workbooks are written by openpyxl, XlsxWriter, LibreOffice and R (Debian: python3-openpyxl, python3-xlsxwriter,
# libreoffice-calc-nogui, python3-uno, r-base-core), so that none is written by the reader's own makers. Other versions of
# them write other bytes. Exit status: 0 as committed, 1 a file differs, 2 a program is missing.
set -eu
here=$(cd "$(dirname "$0")" && pwd)
committed=$here/../../fixtures/workbooks/corpus
python=${PYTHON:-/usr/bin/python3}
case ${1:-} in
  --help | -h) sed -n '2,7s/^# \{0,1\}//p' "$0"; exit 0 ;;
  --make | '') ;;
  *) echo "unknown option $1; see --help" >&2; exit 2 ;;
esac

missing=
need() { # its Debian package, then how to see whether it is there
  package=$1
  shift
  "$@" > /dev/null 2>&1 || missing="$missing $package,"
}
need python3-openpyxl "$python" -c 'import openpyxl'
need python3-xlsxwriter "$python" -c 'import xlsxwriter'
need python3-uno "$python" -c 'import uno'
need libreoffice-calc-nogui soffice --version
need r-base-core Rscript -e 'invisible(0)'
if [ -n "$missing" ]; then
  echo "The workbooks cannot be made here. Missing Debian packages:${missing%,}." >&2
  exit 2
fi

work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
PYTHONDONTWRITEBYTECODE=1 "$python" "$here/make_corpus.py" "$work"
if [ "${1:-}" = --make ]; then
  mkdir -p "$committed"
  cp "$work"/* "$committed"
  exit 0
fi
status=0
for file in "$work"/*; do
  name=$(basename "$file")
  # Its encryption takes a random salt.
  [ "$name" = password.xlsx ] && [ -f "$committed/$name" ] && continue
  cmp -s "$file" "$committed/$name" || { echo "$name differs" >&2; status=1; }
done
[ $status = 0 ] && echo "All as committed."
exit $status
