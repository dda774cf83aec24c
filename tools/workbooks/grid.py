"""Sheets as plain rows of Python values, which each writer turns into its own file."""
from dataclasses import dataclass, field


@dataclass
class Styled:
    """A value with a number format of its own."""

    value: object
    format: str


@dataclass
class Formula:
    """A formula; `cached` is the result stored beside it, None for none."""

    text: str
    cached: object = None
    format: str = None


@dataclass
class Sheet:
    name: str
    rows: list = field(default_factory=list)
    merged: list = field(default_factory=list)
    hidden_rows: set = field(default_factory=set)
    hidden_columns: set = field(default_factory=set)
    filter_ref: str = None
    state: str = "visible"

    @property
    def next_row(self):
        return len(self.rows) + 1

    def add(self, cells=()):
        """Appends a row and returns its number."""
        self.rows.append(list(cells))
        return len(self.rows)

    def blank(self, count=1):
        for _ in range(count):
            self.add()


DAY, STAMP, CLOCK = "dd\\.mm\\.yyyy", "yyyy\\-mm\\-dd\\ hh:mm", "hh:mm"


def format_of(value, given=None):
    """The number format a plant's sheet would show a value in."""
    import datetime as dt

    if given:
        return given
    if isinstance(value, dt.datetime):
        return STAMP
    if isinstance(value, dt.date):
        return DAY
    return CLOCK if isinstance(value, dt.time) else None
