"""How dates and times are written."""
import datetime as dt
from datetime import timedelta

from corpus import fixture
from grid import Styled
from plants import COATER, CW, TANSLEY, WT, at, every, series
from texts import text
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write

EPOCH_1900, EPOCH_1904 = dt.datetime(1899, 12, 30), dt.datetime(1904, 1, 1)
HEADER = ["Time", "Lot", "Product", "Coat weight", "Web thickness"]


def rows(case, name, moments, write, lot="24210", header=HEADER, product="SEP-12", above=(), sheet_name="Shift"):
    """A row a moment; `write` turns the moment into the cells that stand first."""
    case.layout = "wide"
    sheet = case.sheet(sheet_name)
    for title in above:
        sheet.add(title)
    sheet.add(header)
    cw, wt = series(name, CW, len(moments)), series(name, WT, len(moments))
    for step, moment in enumerate(moments):
        first = write(moment)
        row = case.data(sheet, [*first, lot, product, cw[step], wt[step]], moment, lot, product)
        letters = "ABCDEFGH"[len(first) + 2 :]
        row.reads(letters[0], CW, cw[step]).reads(letters[1], WT, wt[step])
    return sheet


@fixture("serials.xlsx", OPENPYXL, "times are plain numbers, since the date format was lost", COATER)
def serials(case):
    rows(case, "serials", every("2026-03-03T06:05", 20, 16), lambda moment: [(moment - EPOCH_1900) / timedelta(days=1)])
    return openpyxl_write(case.sheets)


@fixture("date-facts.xlsx", OPENPYXL, "serials whose days are known: 40729 is 5 July 2011; 60 is a day that never was", COATER)
def date_facts(case):
    case.layout = "wide"
    sheet = case.sheet("Facts")
    sheet.add(HEADER)
    known = {40729: "2011-07-05T00:00", 40729.75: "2011-07-05T18:00", 36526.5: "2000-01-01T12:00", 45351: "2024-02-29T00:00"}
    for serial, text_ in known.items():
        case.data(sheet, [serial, "24212", "SEP-12", 12.1, 16.4], at(text_), "24212", "SEP-12").reads("D", CW, 12.1).reads("E", WT, 16.4)
    case.data(sheet, [60.25, "24212", "SEP-12", 12.1, 16.4]).not_used("date-does-not-exist")
    case.data(sheet, [59.25, "24212", "SEP-12", 12.1, 16.4]).not_used("stamp-before-2000")
    return openpyxl_write(case.sheets)


@fixture("dates-1904.xlsx", XLSXWRITER, "the 1904 date system", COATER)
def dates_1904(case):
    rows(case, "1904", every("2026-03-03T14:05", 20, 16), lambda moment: [moment])
    return xlsxwriter_write(case.sheets, is_1904=True)


@fixture("serials-1904.xlsx", OPENPYXL, "plain numbers in the 1904 date system", COATER)
def serials_1904(case):
    rows(case, "serials 1904", every("2026-03-03T22:05", 20, 16), lambda moment: [(moment - EPOCH_1904) / timedelta(days=1)])
    return openpyxl_write(case.sheets, is_1904=True)


@fixture("iso-texts.xlsx", OPENPYXL, "ISO 8601 as text: with offsets, with Z, and without", COATER)
def iso(case):
    def write(moment):
        utc = moment - timedelta(hours=1)
        kinds = [f"{moment.isoformat()}+01:00", f"{utc.isoformat()}Z", moment.isoformat(sep=" "), f"{utc.isoformat()}.000+00:00"]
        return [kinds[moment.minute // 10 % 4]]

    rows(case, "iso", every("2026-03-04T06:00", 10, 16), write)
    return openpyxl_write(case.sheets)


@fixture("german-months.xlsx", OPENPYXL, "months by their German names, in full and abbreviated", COATER)
def months(case):
    names = {1: ["Januar", "Jan.", "Jän"], 2: ["Februar", "Feb.", "Feb"], 3: ["März", "Mär.", "Mrz"]}

    def write(moment):
        return [f"{moment.day}. {names[moment.month][moment.hour % 3]} {moment.year} {moment:%H:%M}"]

    moments = every("2026-01-30T06:00", 65, 6) + every("2026-02-27T14:10", 65, 6) + every("2026-03-03T06:10", 65, 6)
    rows(case, "months", moments, write, header=["Zeitpunkt", "Los", "Sorte", "Flächengewicht", "Bahndicke"])
    return openpyxl_write(case.sheets)


@fixture("two-digit-years.csv", "Python's csv", "03.03.26, in a file that also has days beyond the twelfth", COATER)
def two_digits(case):
    moments = every("2026-02-27T22:00", 70, 12) + every("2026-03-03T06:00", 70, 6)
    sheet = rows(case, "years", moments, lambda moment: [f"{moment:%d.%m.%y %H:%M}"], header=["Zeitpunkt", "Los", "Sorte", "Flächengewicht", "Bahndicke"], sheet_name="*")
    return text(sheet.rows, ";").encode()


@fixture("date-order-asked.xlsx", XLSXWRITER, "03/02/2026 as text, and no row that tells day from month", COATER)
def order_asked(case):
    rows(case, "asked", every("2026-02-03T06:00", 25, 16), lambda moment: [f"{moment:%d/%m/%Y %H:%M}"])
    case.asks("date-order", sheets={"Shift": {"dateOrder": "day-month"}})
    return xlsxwriter_write(case.sheets)


@fixture("date-order-decided.csv", "Python's csv", "dd/mm/yyyy, told by days beyond the twelfth further down", COATER)
def order_decided(case):
    moments = every("2026-02-11T22:00", 300, 16)
    sheet = rows(case, "decided", moments, lambda moment: [f"{moment:%d/%m/%Y}", f"{moment:%H:%M}"], header=["Date", *HEADER], sheet_name="*")
    return text(sheet.rows, ",").encode()


@fixture("month-first.csv", "Python's csv", "2/27/2026 6:05:00 PM, as American programs write it", TANSLEY)
def month_first(case):
    def write(moment):
        return [f"{moment.month}/{moment.day}/{moment.year} {moment.hour % 12 or 12}:{moment:%M:%S} {'PM' if moment.hour >= 12 else 'AM'}"]

    sheet = rows(case, "american", every("2026-02-27T18:05", 55, 18), write, sheet_name="*")
    return text(sheet.rows, ",").encode()


@fixture("time-only.xlsx", OPENPYXL, "times of day over midnight, and no date anywhere", COATER)
def time_only(case):
    rows(case, "time only", every("2026-03-03T22:10", 25, 18), lambda moment: [moment.time()])
    case.asks("date-missing", date="2026-03-03")
    return openpyxl_write(case.sheets)


@fixture("date-in-title.xlsx", OPENPYXL, "times of day over midnight; the date stands above the table", COATER)
def date_in_title(case):
    titles = [["Nachtschicht Beschichter 2"], ["Datum:", dt.date(2026, 3, 4)], ["Schicht:", "Nacht"], []]
    rows(case, "title date", every("2026-03-04T22:10", 25, 18), lambda moment: [moment.time()], above=titles)
    return openpyxl_write(case.sheets)


@fixture("night-under-one-date.xlsx", XLSXWRITER, "the night shift keeps the date on which it began after midnight too", COATER)
def shift_date(case):
    started = dt.date(2026, 3, 4)
    rows(case, "night", every("2026-03-04T22:00", 30, 16), lambda moment: [started, moment.time()], header=["Date", *HEADER])
    case.asks("shift-date", sheets={"Shift": {"isShiftDate": True}})
    return xlsxwriter_write(case.sheets)


@fixture("out-of-order.xlsx", XLSXWRITER, "rows not in the order of time, and several within one minute", COATER)
def out_of_order(case):
    moments = every("2026-03-04T06:00", 10, 20)
    mixed = [moments[step * 7 % 20] for step in range(20)] + [moments[3]] * 3
    rows(case, "mixed", mixed, lambda moment: [moment])
    return xlsxwriter_write(case.sheets)


@fixture("clock-ahead.xlsx", OPENPYXL, "the gauge's clock runs two hours ahead, so that its last rows lie in the future", COATER)
def ahead(case):
    case.context["now"] = "2026-03-05T12:30:00Z"
    sheet = case.sheet("Shift")
    case.layout = "wide"
    sheet.add(HEADER)
    cw, wt = series("ahead", CW, 16), series("ahead", WT, 16)
    for step, moment in enumerate(every("2026-03-05T09:00", 25, 16)):
        row = case.data(sheet, [moment, "24211", "SEP-12", cw[step], wt[step]], moment, "24211", "SEP-12")
        if case.utc(moment) > "2026-03-05T12:40:00Z":
            row.not_used("stamp-ahead")
        else:
            row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    return openpyxl_write(case.sheets)


@fixture("date-only.xlsx", XLSXWRITER, "dates without a time of day", COATER)
def date_only(case):
    moments = [at(f"2026-03-0{day}T00:00") for day in (2, 2, 2, 3, 3, 4, 4, 4, 5, 5)]
    rows(case, "day", moments, lambda moment: [moment.date()])
    case.counts("no-time-of-day")
    return xlsxwriter_write(case.sheets)


@fixture("seconds-and-fractions.xlsx", OPENPYXL, "a logger's stamps to the tenth of a second, some rows in one second", COATER)
def fractions(case):
    moments = [at("2026-03-05T06:00:00") + timedelta(milliseconds=700 * step) for step in range(30)]
    rows(case, "logger", moments, lambda moment: [Styled(moment, "yyyy\\-mm\\-dd\\ hh:mm:ss.0")])
    return openpyxl_write(case.sheets)
