"""Text files: separators, decimal signs and encodings. Their one sheet is called by nobody, so any name will do."""
import csv
import io
import platform

from corpus import fixture
from plants import CALENDER, COATER, CT, CW, DE, NF, OT, PH, SLURRY, VI, WT, every, series
from plain_office import LIBREOFFICE, convert
from repack import repack
from with_r import R, write as r_write

PYTHON = f"Python {platform.python_version()}'s csv"


def comma(value):
    return str(value).replace(".", ",")


def wide(case, name, start, lot, count, stamp, header, number=str):
    """Rows of texts: time, lot, product and the coater's three channels."""
    sheet = case.sheet("*")
    sheet.add(header)
    channels = [CW, WT, OT]
    values = [series(name, one, count, digits=1 if one is OT else 2) for one in channels]
    for step, moment in enumerate(every(start, 17, count)):
        cells = [moment.strftime(stamp), lot, "SEP-12", *(number(column[step]) for column in values)]
        row = case.data(sheet, cells, moment, lot, "SEP-12")
        for place, one in enumerate(channels):
            row.reads("DEF"[place], one, values[place][step])
    return sheet


def text(rows, separator, quoting=csv.QUOTE_MINIMAL, end="\r\n"):
    out = io.StringIO(newline="")
    csv.writer(out, delimiter=separator, quoting=quoting, lineterminator=end).writerows(rows)
    return out.getvalue()


@fixture("comma.csv", f"{R}, write.csv", "comma, decimal point, all texts quoted, UTF-8", COATER)
def with_comma(case):
    case.layout = "wide"
    sheet = wide(case, "comma", "2026-03-04T06:00", "L-24160", 30, "%Y-%m-%d %H:%M", ["Time", "Lot", "Product", "Coat weight [g/m²]", "Web thickness [µm]", "Oven exit temperature [°C]"])
    return r_write("csv", "UTF-8", sheet.rows)


@fixture("semicolon-decimal-comma.csv", f"{R}, write.csv2", "semicolon, decimal comma, lots that are numbers", COATER)
def with_semicolon(case):
    case.layout = "wide"
    sheet = wide(case, "semicolon", "2026-03-04T14:00", "24161", 30, "%d.%m.%Y %H:%M", ["Zeitpunkt", "Charge", "Sorte", "Flächengewicht [g/m²]", "Bahndicke [µm]", "Ofentemperatur [°C]"])
    return r_write("csv2", "UTF-8", sheet.rows)


@fixture("tab.txt", PYTHON, "tabs, decimal point, lines end in LF alone", COATER)
def with_tabs(case):
    case.layout = "wide"
    sheet = wide(case, "tab", "2026-03-04T22:00", "24162", 25, "%Y-%m-%dT%H:%M:%S", ["Time", "Lot", "Product", "Coat weight", "Web thickness", "Oven exit temperature"])
    return text(sheet.rows, "\t", end="\n").encode()


@fixture("utf-8-bom.csv", PYTHON, "a byte order mark before the first header, semicolon, decimal comma", COATER)
def with_mark(case):
    case.layout = "wide"
    sheet = wide(case, "bom", "2026-03-05T06:00", "24163", 25, "%d.%m.%Y %H:%M:%S", ["Zeitpunkt", "Los", "Sorte", "Flächengewicht (g/m²)", "Bahndicke (µm)", "Ofentemperatur (°C)"], comma)
    return text(sheet.rows, ";").encode("utf-8-sig")


@fixture("utf-16-le.txt", PYTHON, "\"Unicode text\": UTF-16 LE with its mark, tabs, decimal comma", COATER)
def utf_16(case):
    case.layout = "wide"
    sheet = wide(case, "utf16", "2026-03-05T14:00", "24164", 25, "%d.%m.%Y %H:%M", ["Zeitpunkt", "Los", "Sorte", "Flächengewicht (g/m²)", "Bahndicke (µm)", "Ofentemperatur (°C)"], comma)
    return b"\xff\xfe" + text(sheet.rows, "\t").encode("utf-16-le")


@fixture("windows-1252.csv", f"{R}, write.csv2", "Windows-1252, in which µ, ², ° and ä are single bytes", COATER)
def windows(case):
    case.layout = "wide"
    sheet = wide(case, "windows", "2026-03-03T06:00", "L-24165", 25, "%d.%m.%Y %H:%M", ["Zeitpunkt", "Charge", "Sorte", "Flächengewicht [g/m²]", "Bahndicke [µm]", "Ofentemperatur [°C]"])
    return r_write("csv2", "CP1252", sheet.rows)


@fixture("pipe.txt", PYTHON, "pipes between the columns", COATER)
def with_pipes(case):
    case.layout = "wide"
    sheet = wide(case, "pipe", "2026-03-03T14:00", "24166", 15, "%Y-%m-%d %H:%M", ["Time", "Lot", "Product", "Coat weight", "Web thickness", "Oven exit temperature"])
    return text(sheet.rows, "|").encode()


@fixture("title-rows.csv", PYTHON, "lines of another width above the header, a line break and quotes inside a remark, blank lines, an average at the foot", CALENDER)
def titles(case):
    case.layout = "long"
    sheet = case.sheet("*")
    sheet.add(["Calender 1; export of the line computer"])
    sheet.add(["Exported", "2026-03-05 15:00"])
    sheet.blank()
    sheet.add(["Time", "Lot", "Product", "Characteristic", "Value", "Unit", "Remark"])
    for step, moment in enumerate(every("2026-03-05T06:00", 20, 20)):
        one = [CT, NF][step % 2]
        value = series("csv", one, 20)[step]
        remark = 'roll "B" cleaned,\nsee log' if step == 7 else ""
        cells = [moment.strftime("%Y-%m-%d %H:%M"), "C-5510", "SEP-12", one["name"], value, one["unit"], remark]
        case.data(sheet, cells, moment, "C-5510", "SEP-12").reads("E", one, value)
    sheet.blank()
    case.data(sheet, ["Average", "", "", "", 27.1, "", ""]).not_used("summary-row")
    return text(sheet.rows, ",").encode()


@fixture("long-decimal-comma.csv", PYTHON, "every text quoted, thousands with a point, decimals with a comma", SLURRY)
def long_comma(case):
    case.layout = "long"
    sheet = case.sheet("*")
    sheet.add(["Datum", "Uhrzeit", "Charge", "Material", "Merkmal", "Messwert", "Einheit"])
    for step, moment in enumerate(every("2026-03-05T06:00", 14, 30)):
        one = [VI, PH, DE][step % 3]
        value = series("quoted", one, 30, "S-4", 1 if one is not PH else 2)[step]
        written = f"{value:,.2f}".replace(",", " ").replace(".", ",").replace(" ", ".")
        cells = [moment.strftime("%d.%m.%Y"), moment.strftime("%H:%M"), "SL-3320", "S-4", one["aliases"][1], written, one["unit"]]
        case.data(sheet, cells, moment, "SL-3320", "S-4").reads("F", one, value)
    return text(sheet.rows, ";", csv.QUOTE_ALL).encode("cp1252")


def reopen(rows):
    """A text file opened in LibreOffice by German habits and saved as a workbook."""
    return repack(convert(text(rows, ",", csv.QUOTE_ALL).encode(), "shift.csv", "xlsx"))


@fixture("csv-opened-in-a-spreadsheet.xlsx", f"{LIBREOFFICE} from a .csv", "a text file opened and saved again: what looked like dates and numbers has become such", COATER)
def reopened(case):
    case.layout = "wide"
    sheet = case.sheet("shift")
    sheet.add(["Zeitpunkt", "Charge", "Sorte", "Flächengewicht [g/m²]", "Bahndicke [µm]"])
    cw, wt = series("reopened", CW, 20), series("reopened", WT, 20)
    for step, moment in enumerate(every("2026-03-02T06:00", 17, 20)):
        cells = [moment.strftime("%d.%m.%Y %H:%M"), "24167", "Separator 12 µm", comma(cw[step]), comma(wt[step])]
        row = case.data(sheet, cells, moment, "24167", "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    return reopen(sheet.rows)


@fixture("product-as-date.xlsx", f"{LIBREOFFICE} from a .csv", "opened and saved again, the product SEP-12 has become September 2012", COATER)
def product_as_date(case):
    case.layout = "wide"
    sheet = case.sheet("shift")
    sheet.add(["Zeitpunkt", "Charge", "Sorte", "Flächengewicht [g/m²]", "Bahndicke [µm]"])
    cw, wt = series("mangled", CW, 12), series("mangled", WT, 12)
    for step, moment in enumerate(every("2026-03-02T14:00", 30, 12)):
        product = "SEP-12" if step < 6 else "Separator 12 µm"
        cells = [moment.strftime("%d.%m.%Y %H:%M"), "24168", product, comma(cw[step]), comma(wt[step])]
        row = case.data(sheet, cells, moment, "24168", "SEP-12")
        if step < 6:
            row.not_used("product-is-a-date")
        else:
            row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    return reopen(sheet.rows)
