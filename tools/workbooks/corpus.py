"""What a file of the corpus is: its bytes, what it must yield, and where it comes from."""
import json
from datetime import datetime, timezone
from zoneinfo import ZoneInfo

from grid import Sheet

FIXTURES = []


def fixture(name, writer, hard, plant):
    """Registers a function that fills a Case and returns the file's bytes."""

    def register(make):
        FIXTURES.append((name, writer, hard, plant, make))
        return make

    return register


class Row:
    """A non-empty row below a header: it either gives readings or is not used."""

    def __init__(self, case, sheet, number, at, lot, product):
        self.case, self.sheet, self.number = case, sheet, number
        self.at, self.lot, self.product = at, lot, product
        self.is_used = False
        self.is_settled = False

    def reads(self, column, channel, value=None, **more):
        """One reading: a value or a censoring, and serial or position where the file says them."""
        reading = {
            "sheet": self.sheet,
            "row": self.number,
            "column": column,
            "lot": self.lot,
            "product": self.product,
            "channel": channel["name"],
            "at": self.case.utc(self.at),
            "value": value,
            "censoring": more.pop("censoring", None),
            **more,
        }
        assert (value is None) != (reading["censoring"] is None), "a value or a censoring, never both"
        self.case.readings.append(reading)
        self.is_used = self.is_settled = True
        return self

    def not_used(self, code=None):
        assert not self.is_used
        self.is_settled = True
        if code:
            self.case.counts(code)
        return self


class Case:
    """One file in the making."""

    def __init__(self, plant):
        self.plant = plant
        self.context = json.loads(json.dumps(plant))
        self.zone = ZoneInfo(plant["timeZone"])
        self.sheets, self.rows, self.readings = [], [], []
        self.problem_codes, self.questions = {}, []
        self.answers = self.refused = self.layout = self.is_blocked = None

    def sheet(self, name, **more):
        self.sheets.append(Sheet(name, **more))
        return self.sheets[-1]

    def data(self, sheet, cells, at=None, lot=None, product=None):
        """Writes a row below the header, which counts as read."""
        row = Row(self, sheet.name, sheet.add(cells), at, lot, product)
        self.rows.append(row)
        return row

    def counts(self, code, times=1):
        """A problem that must be reported so often."""
        self.problem_codes[code] = self.problem_codes.get(code, 0) + times

    def asks(self, code, **answers):
        """A question that must be asked; the answers are those under which the file yields its rows."""
        self.questions.append(code)
        self.answers = {**(self.answers or {}), **answers}

    def utc(self, at):
        aware = at if at.tzinfo else at.replace(tzinfo=self.zone)
        text = aware.astimezone(timezone.utc).isoformat(timespec="milliseconds")
        return text.replace(".000", "").replace("+00:00", "Z")

    def expectation(self):
        for row in self.rows:
            assert row.is_settled, f"row {row.number} of {row.sheet} is neither used nor not used"
        if self.refused:
            return {"context": self.context, "expected": {"refused": self.refused}}
        expected = {
            "layout": self.layout,
            "isBlocked": self.is_blocked,
            "rowsRead": len(self.rows),
            "rowsNotUsed": sum(not row.is_used for row in self.rows),
            "readings": self.readings,
            "problemCodes": self.problem_codes,
            "questions": sorted(set(self.questions)),
        }
        known = {key: value for key, value in expected.items() if key == "readings" or value not in (None, {}, [])}
        return {"context": self.context, **({"answers": self.answers} if self.answers else {}), "expected": known}


def to_json(expectation):
    """JSON with a line a reading, so that a change shows as a line."""
    readings = expectation["expected"].pop("readings", None)
    text = json.dumps(expectation, ensure_ascii=False, indent=1)
    if readings is None:
        return text + "\n"
    lines = ",\n".join("   " + json.dumps(one, ensure_ascii=False) for one in readings)
    head = text.rstrip()[: -len("\n }\n}")]
    return f'{head},\n  "readings": [\n{lines}\n  ]\n }}\n}}\n'
