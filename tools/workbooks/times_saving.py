"""The nights on which clocks are put forward and back."""
from datetime import datetime, timedelta, timezone
from zoneinfo import ZoneInfo

from corpus import fixture
from plants import COATER, CW, TANSLEY, WT, series
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write

HEADER = ["Time", "Lot", "Product", "Coat weight", "Web thickness"]


def night(case, name, lot, first, minutes, count, now):
    """Rows at even steps of real time, each with the wall clock that the plant's people saw; `first` is in UTC."""
    case.layout = "wide"
    case.context["now"] = now
    sheet = case.sheet("Night")
    sheet.add(HEADER)
    cw, wt = series(name, CW, count), series(name, WT, count)
    start = datetime.fromisoformat(first).replace(tzinfo=timezone.utc)
    zone = ZoneInfo(case.plant["timeZone"])
    for step in range(count):
        moment = start + timedelta(minutes=minutes * step)
        shown = moment.astimezone(zone).replace(tzinfo=None)
        row = case.data(sheet, [shown, lot, "SEP-12", cw[step], wt[step]], moment, lot, "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    return sheet


@fixture("spring-berlin.xlsx", OPENPYXL, "the night of seven hours: 2026-03-29, 02:00 to 03:00 is missing", COATER)
def spring_berlin(case):
    night(case, "spring", "24220", "2026-03-28T21:00", 20, 21, "2026-04-02T12:00:00Z")
    return openpyxl_write(case.sheets)


@fixture("spring-impossible.xlsx", XLSXWRITER, "a clock that was not put forward: stamps in the missing hour", COATER)
def spring_impossible(case):
    sheet = night(case, "impossible", "24221", "2026-03-29T00:00", 15, 4, "2026-04-02T12:00:00Z")
    for minute in (0, 15, 30):
        case.data(sheet, [datetime(2026, 3, 29, 2, minute), "24221", "SEP-12", 12.1, 16.4]).not_used("time-does-not-exist")
    return xlsxwriter_write(case.sheets)


@fixture("autumn-berlin.xlsx", OPENPYXL, "the night of nine hours: 2026-10-25, 02:00 to 03:00 twice, told by the order of rows", COATER)
def autumn_berlin(case):
    night(case, "autumn", "24222", "2026-10-24T20:00", 20, 27, "2026-10-30T12:00:00Z")
    return openpyxl_write(case.sheets)


@fixture("autumn-asked.xlsx", XLSXWRITER, "rows only from within the repeated hour, so that nothing tells which pass it was", COATER)
def autumn_asked(case):
    night(case, "within", "24223", "2026-10-25T01:05", 10, 5, "2026-10-30T12:00:00Z")
    case.asks("repeated-hour", repeatedHour="second")
    return xlsxwriter_write(case.sheets)


@fixture("autumn-new-york.xlsx", XLSXWRITER, "2026-11-01, 01:00 to 02:00 twice, in New York", TANSLEY)
def autumn_new_york(case):
    night(case, "fall", "T-710", "2026-11-01T03:00", 20, 24, "2026-11-05T12:00:00Z")
    return xlsxwriter_write(case.sheets)


@fixture("spring-new-york.xlsx", OPENPYXL, "2026-03-08, 02:00 to 03:00 is missing, in New York", TANSLEY)
def spring_new_york(case):
    night(case, "spring NY", "T-711", "2026-03-08T04:30", 20, 21, "2026-03-12T12:00:00Z")
    return openpyxl_write(case.sheets)
