"""Text files as machines and loggers write them."""
import datetime as dt

from corpus import fixture
from plants import CALENDER, COATER, CT, CW, NF, WT, every, series
from texts import PYTHON, comma, text


def rows(case, name, start, lot, count, stamp, header, number=str, shown_lot=None, above=(), after=()):
    """Rows of texts: time, lot, product, coat weight and web thickness."""
    case.layout = "wide"
    sheet = case.sheet("*")
    for line in [*above, header]:
        sheet.add(line)
    cw, wt = series(name, CW, count), series(name, WT, count)
    for step, moment in enumerate(every(start, 23, count)):
        cells = [stamp(moment), shown_lot or lot, "SEP-12", number(cw[step]), number(wt[step]), *after]
        row = case.data(sheet, cells, moment, lot, "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    return sheet


HEADER = ["Time", "Lot", "Product", "Coat weight [g/m²]", "Web thickness [µm]"]


@fixture("sep-line.csv", PYTHON, "a first line sep=; for Excel, which is no row of the table", COATER)
def sep_line(case):
    sheet = rows(case, "sep", "2026-03-03T06:00", "L-24230", 15, lambda at: f"{at:%d.%m.%Y %H:%M}", HEADER, comma, above=[["sep=;"]])
    return text(sheet.rows, ";").replace('"sep=;"', "sep=;").encode("utf-8-sig")


@fixture("trailing-separators.csv", PYTHON, "separators at the ends of lines, and lines of separators alone", COATER)
def trailing(case):
    sheet = rows(case, "trailing", "2026-03-03T14:00", "24231", 15, lambda at: f"{at:%Y-%m-%d %H:%M}", HEADER, after=["", "", ""])
    sheet.rows[0] += ["", "", ""]
    for _ in range(5):
        sheet.add([""] * 8)
    return text(sheet.rows, ",").encode()


@fixture("excel-texts.csv", PYTHON, "lots written as =\"00232\", so that Excel keeps their zeros", COATER)
def excel_texts(case):
    sheet = rows(case, "zeros", "2026-03-03T22:00", "00232", 15, lambda at: f"{at:%Y-%m-%d %H:%M}", HEADER, shown_lot='="00232"')
    return text(sheet.rows, ";").encode()


@fixture("logger-utf-16-be.csv", PYTHON, "UTF-16 BE with its mark; names, then units in a line of their own; a comment line first", COATER)
def logger(case):
    header = ["Time", "Lot", "Product", "CW", "LS-305"]
    sheet = rows(case, "logger", "2026-03-04T06:00", "24233", 15, lambda at: f"{at:%Y-%m-%dT%H:%M:%S}", header, above=[["# line computer 2, firmware 4.1"]])
    sheet.rows.insert(2, ["", "", "", "g/m²", "µm"])
    for one in case.readings:
        one["row"] += 1
    return b"\xfe\xff" + text(sheet.rows, ",").encode("utf-16-be")


@fixture("compact-stamps.txt", PYTHON, "stamps as 20260304 140000, tabs, signs before the numbers", COATER)
def compact(case):
    sheet = rows(case, "compact", "2026-03-04T14:00", "24234", 15, lambda at: f"{at:%Y%m%d %H%M%S}", HEADER, lambda value: f"+{value:09.3f}")
    return text(sheet.rows, "\t").encode()


@fixture("english-months.csv", PYTHON, "04-Mar-2026 22:00:00, as a process historian writes it", COATER)
def english(case):
    names = "Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec".split()
    stamp = lambda at: f"{at.day:02}-{names[at.month - 1]}-{at.year} {at:%H:%M:%S}"  # noqa: E731
    sheet = rows(case, "english", "2026-02-28T22:00", "24235", 15, stamp, HEADER)
    return text(sheet.rows, ",").encode()


@fixture("utc-column.csv", PYTHON, "the header says that the times are UTC", COATER)
def utc(case):
    to_utc = lambda at: f"{at - dt.timedelta(hours=1):%Y-%m-%d %H:%M}"  # noqa: E731
    sheet = rows(case, "utc", "2026-03-05T06:00", "24236", 15, to_utc, ["Time (UTC)", *HEADER[1:]])
    return text(sheet.rows, ",").encode()


@fixture("censored.csv", PYTHON, "long, with off scale, below detection and missing values beside decimal commas", CALENDER)
def censored(case):
    case.layout = "long"
    sheet = case.sheet("*")
    sheet.add(["Datum", "Zeit", "Charge", "Sorte", "Merkmal", "Messwert", "Einheit"])
    marks = {4: ("OL", "above"), 9: ("<0,05", "below"), 13: ("k.A.", None), 17: ("", None), 20: (">MAX", "above")}
    for step, moment in enumerate(every("2026-03-05T06:00", 11, 24)):
        one = [CT, NF][step % 2]
        value = series("off", one, 24)[step]
        written, side = marks.get(step, (comma(value), "value"))
        cells = [f"{moment:%d.%m.%Y}", f"{moment:%H:%M}", "C-5540", "SEP-12", one["aliases"][1], written, one["unit"]]
        row = case.data(sheet, cells, moment, "C-5540", "SEP-12")
        if side is None:
            row.not_used("value-missing")
        elif side == "value":
            row.reads("F", one, value)
        else:
            row.reads("F", one, censoring=side)
    return text(sheet.rows, ";").encode("cp1252")
