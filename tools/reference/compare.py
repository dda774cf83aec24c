#!/usr/bin/python3
"""Compares the JSON files of one folder with those of the same names in another, number by number.

usage: compare.py COMMITTED MADE

The tolerance is 1e-9 of the largest number in the same list; `madeBy` may differ. Exit status 1 when a file differs.
"""
import argparse
import json
import pathlib
import sys

TOLERANCE = 1e-9


def differs(a, b, scale):
    """The first place where two values differ, or None."""
    if isinstance(a, dict) and isinstance(b, dict) and a.keys() == b.keys():
        pairs = [(k, a[k], b[k]) for k in a if k != "madeBy"]
    elif isinstance(a, list) and isinstance(b, list) and len(a) == len(b):
        pairs = [(i, x, y) for i, (x, y) in enumerate(zip(a, b))]
        scale = max([abs(x) for x in a if isinstance(x, (int, float))], default=scale)
    elif isinstance(a, (int, float)) and isinstance(b, (int, float)):
        return None if abs(a - b) <= TOLERANCE * max(abs(a), scale) else f"{a} against {b}"
    else:
        return None if a == b else f"{a!r} against {b!r}"
    for key, x, y in pairs:
        found = differs(x, y, scale)
        if found:
            return f"{key}: {found}"
    return None


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("committed", type=pathlib.Path)
    parser.add_argument("made", type=pathlib.Path)
    args = parser.parse_args()
    failed = False
    for made in sorted(args.made.glob("*.json")):
        found = differs(json.loads((args.committed / made.name).read_text()), json.loads(made.read_text()), 0.0)
        print(f"{made.name}: {found or 'as committed'}")
        failed = failed or found is not None
    sys.exit(1 if failed else 0)


if __name__ == "__main__":
    main()
