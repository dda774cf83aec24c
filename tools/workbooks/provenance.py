"""PROVENANCE.md from what the scripts say of their files."""
import os
import sys

HEAD = """# Where these workbooks come from

Made by `npm run corpus -- --make` (`tools/workbooks/`); all plants, lots, people and readings are invented (Marrowby Works and a sister plant).
Beside each file stands what it must yield, written by the same script from the numbers that it put in; no reader was asked.
Where a plant's person would have to answer something first, `questions` are those that must be asked and `answers` what is answered.
Python {python}. Times and authors inside the packages are set to one moment, so that a second run gives the same bytes;
the file marked * holds a random salt and differs at each run.

| file | script | written by | what is hard about it |
| --- | --- | --- | --- |
"""
VOLATILE = {"password.xlsx"}


def describe(fixtures):
    lines = [HEAD.format(python=sys.version.split()[0])]
    for name, writer, hard, _, make in sorted(fixtures, key=lambda one: one[0]):
        script = os.path.basename(sys.modules[make.__module__].__file__)
        lines.append(f"| {name}{'*' if name in VOLATILE else ''} | {script} | {writer} | {hard} |\n")
    return "".join(lines)
