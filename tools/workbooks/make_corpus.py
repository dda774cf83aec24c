#!/usr/bin/python3
"""Writes the corpus of workbooks, each with what it must yield beside it, and PROVENANCE.md.

usage: make_corpus.py FOLDER [NAME...]     all files, or those whose names are given
"""
import argparse
import os

import containers  # noqa: F401  (each module registers its files)
import layouts  # noqa: F401
import layouts_decorated  # noqa: F401
import layouts_messiest  # noqa: F401
import layouts_sheets  # noqa: F401
import layouts_wide  # noqa: F401
import lots  # noqa: F401
import texts  # noqa: F401
import texts_machines  # noqa: F401
import times  # noqa: F401
import times_saving  # noqa: F401
import units  # noqa: F401
import values  # noqa: F401
import values_doubtful  # noqa: F401
from corpus import FIXTURES, Case, to_json
from provenance import describe


def main():
    parser = argparse.ArgumentParser(description=__doc__, formatter_class=argparse.RawDescriptionHelpFormatter)
    parser.add_argument("folder")
    parser.add_argument("names", nargs="*")
    args = parser.parse_args()
    for name, writer, hard, plant, make in FIXTURES:
        if args.names and name not in args.names:
            continue
        case = Case(plant)
        data = make(case)
        with open(os.path.join(args.folder, name), "wb") as file:
            file.write(data)
        with open(os.path.join(args.folder, f"{name}.expected.json"), "w", encoding="utf-8") as file:
            file.write(to_json(case.expectation()))
        print(f"{name}: {len(data)} bytes, {len(case.readings)} readings")
    there = [one for one in FIXTURES if os.path.exists(os.path.join(args.folder, one[0]))]
    with open(os.path.join(args.folder, "PROVENANCE.md"), "w", encoding="utf-8") as file:
        file.write(describe(there))


if __name__ == "__main__":
    main()
