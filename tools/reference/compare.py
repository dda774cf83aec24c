#!/usr/bin/python3
"""Compares the JSON files of one folder with those of the same names in another, number by number.

usage: compare.py COMMITTED MADE

The tolerance is 1e-9 of the largest number in the same list, 1e-4 of each number that a program found by a search of its own; `madeBy` may differ.
Exit status 1 when a file differs or one of the two folders has a file more.
"""
import argparse
import json
import pathlib
import sys

TOLERANCE = 1e-9
SEARCH_TOLERANCE = 1e-4
# What was searched for: R's choices, all that mgcv answers (its penalty is a search's end).
SEARCHED_KEYS = ("choices",)
SEARCHED_FILES = ("mgcv-smoothing-spline.json",)
# Published values, copied by hand.
PUBLISHED_FILES = ("strd.json",)


def differs(a, b, scale, tolerance):
    """The first place where two values differ, or None."""
    if isinstance(a, dict) and isinstance(b, dict) and a.keys() == b.keys():
        pairs = [(k, a[k], b[k]) for k in a if k != "madeBy"]
    elif isinstance(a, list) and isinstance(b, list) and len(a) == len(b):
        pairs = [(i, x, y) for i, (x, y) in enumerate(zip(a, b))]
        scale = max([abs(x) for x in a if isinstance(x, (int, float))], default=scale)
    elif isinstance(a, (int, float)) and isinstance(b, (int, float)):
        return None if abs(a - b) <= tolerance * max(abs(a), scale) else f"{a} against {b}"
    else:
        return None if a == b else f"{a!r} against {b!r}"
    for key, x, y in pairs:
        found = differs(x, y, scale, SEARCH_TOLERANCE if key in SEARCHED_KEYS else tolerance)
        if found:
            return f"{key}: {found}"
    return None


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("committed", type=pathlib.Path)
    parser.add_argument("made", type=pathlib.Path)
    args = parser.parse_args()
    failed = False
    for name in sorted({path.name for folder in (args.committed, args.made) for path in folder.glob("*.json")} - set(PUBLISHED_FILES)):
        committed, made = args.committed / name, args.made / name
        if committed.exists() and made.exists():
            tolerance = SEARCH_TOLERANCE if name in SEARCHED_FILES else TOLERANCE
            found = differs(json.loads(committed.read_text()), json.loads(made.read_text()), 0.0, tolerance)
        else:
            found = "not committed" if made.exists() else "no script makes it"
        print(f"{name}: {found or 'as committed'}")
        failed = failed or found is not None
    sys.exit(1 if failed else 0)


if __name__ == "__main__":
    main()
