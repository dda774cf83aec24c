"""Files of every kind: packages written in unusual ways, and those that are turned away."""
import platform

from corpus import fixture
from grid import Formula
from layouts import LONG, long_rows
from ooxml import STRICT, Package
from opendocument import flat
from plain_office import LIBREOFFICE, convert
from plants import COATER, CW, OT, WT, every, series
from repack import pack, repack
from with_password import protect
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write

ZIPFILE = f"Python {platform.python_version()}'s zipfile"


def wide(case, name, start, count, lot):
    case.layout = "wide"
    sheet = case.sheet(name)
    sheet.add(["Time", "Lot", "Product", "Coat weight [g/m²]", "Web thickness [µm]", "Oven exit temperature [°C]"])
    cw, wt, ot = series(name, CW, count), series(name, WT, count), series(name, OT, count, digits=1)
    for step, moment in enumerate(every(start, 16, count)):
        row = case.data(sheet, [moment, lot, "SEP-12", cw[step], wt[step], ot[step]], moment, lot, "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step]).reads("F", OT, ot[step])


@fixture("with-macros.xlsm", XLSXWRITER, "a macro workbook: its VBA project is bytes that are never looked at", COATER)
def macros(case):
    case.layout = "long"
    sheet = case.sheet("Readings")
    sheet.add(LONG)
    long_rows(case, sheet, "macros", every("2026-03-03T06:00", 11, 30), ["24170"])
    return xlsxwriter_write(case.sheets, macros=b"no real project: nothing reads it\0" * 8)


@fixture("strict.xlsx", ZIPFILE, "strict Office Open XML: other namespaces throughout, dates as ISO texts", COATER)
def strict(case):
    wide(case, "Strict", "2026-03-03T14:00", 20, "L-24171")
    return Package(STRICT, is_shared=True, has_iso_dates=True).write(case.sheets)


@fixture("iso-date-cells.xlsx", ZIPFILE, "cells of type d (ISO 8601) in an ordinary package", COATER)
def iso_dates(case):
    wide(case, "Export", "2026-03-03T22:00", 20, "L-24172")
    return Package(has_iso_dates=True).write(case.sheets)


@fixture("inline-strings.xlsx", ZIPFILE, "texts inside their cells, no table of shared texts, every tag with a prefix", COATER)
def inline(case):
    wide(case, "Export", "2026-03-04T06:00", 20, "L-24173")
    return Package(prefix="x:").write(case.sheets)


@fixture("no-cell-names.xlsx", ZIPFILE, "rows and cells without their r attribute", COATER)
def without_names(case):
    wide(case, "Export", "2026-03-04T14:00", 20, "L-24174")
    return Package(is_named=False, is_shared=True).write(case.sheets)


@fixture("constant-memory.xlsx", f"{XLSXWRITER} in its constant-memory mode", "written row by row with texts inside the cells", COATER)
def constant(case):
    wide(case, "Export", "2026-03-04T22:00", 20, "L-24175")
    return xlsxwriter_write(case.sheets, is_inline=True)


@fixture("shared-formulas.xlsx", ZIPFILE, "values from a formula that is written once and shared by the rows below it", COATER)
def shared_formulas(case):
    case.layout = "wide"
    sheet = case.sheet("Weigher")
    sheet.add(["Time", "Lot", "Product", "Gross", "Tare", "Coat weight [g/m²]"])
    net = series("weigher", CW, 20)
    for step, moment in enumerate(every("2026-03-05T06:00", 20, 20)):
        number = sheet.next_row
        formula = f'<f t="shared" ref="F2:F21" si="0">D{number}-E{number}</f>' if step == 0 else '<f t="shared" si="0"/>'
        cells = [moment, "L-24176", "SEP-12", round(net[step] + 8.1, 2), 8.1, Formula(formula, net[step])]
        case.data(sheet, cells, moment, "L-24176", "SEP-12").reads("F", CW, net[step])
    return Package(is_shared=True).write(case.sheets)


@fixture("from-ods.xlsx", f"{LIBREOFFICE} from .ods", "saved as .xlsx by LibreOffice from its own format, with formulas that it worked out", COATER)
def from_ods(case):
    case.layout = "wide"
    sheet = case.sheet("Tabelle1")
    sheet.add(["Datum", "Uhrzeit", "Charge", "Artikel", "Flächengewicht [g/m²]", "Bahndicke [µm]", "Summe"])
    cw, wt = series("ods", CW, 20), series("ods", WT, 20)
    for step, moment in enumerate(every("2026-03-05T14:05", 20, 20)):
        number = sheet.next_row
        cells = [moment.date(), moment.time(), 24177, "SEP-12", cw[step], wt[step], Formula(f"=[.E{number}]+[.F{number}]")]
        row = case.data(sheet, cells, moment, "24177", "SEP-12")
        row.reads("E", CW, cw[step]).reads("F", WT, wt[step])
    ods = convert(flat(case.sheets), "shift.fods", "ods")
    return repack(convert(ods, "shift.ods", "xlsx"))


def one_shift(case):
    wide(case, "Readings", "2026-03-05T06:00", 12, "L-24178")
    sheets, case.rows, case.readings, case.sheets = case.sheets, [], [], []
    return sheets


@fixture("old-format.xls", LIBREOFFICE, "the format before 2007", COATER)
def old(case):
    case.refused = "old-format"
    return convert(xlsxwriter_write(one_shift(case)), "shift.xlsx", "xls")


@fixture("binary.xlsb", ZIPFILE, "the binary workbook: a package whose main part is workbook.bin (its content is made up)", COATER)
def binary(case):
    case.refused = "old-format"
    types = '<?xml version="1.0" encoding="UTF-8"?><Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="bin" ContentType="application/vnd.ms-excel.sheet.binary.macroEnabled.main"/><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/></Types>'
    relations = '<?xml version="1.0" encoding="UTF-8"?><Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="rId1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/officeDocument" Target="xl/workbook.bin"/></Relationships>'
    return pack([("[Content_Types].xml", types), ("_rels/.rels", relations), ("xl/workbook.bin", b"\x83\x01\x00\x84\x01\x00")])


@fixture("password.xlsx", LIBREOFFICE, "a password is needed to open it", COATER)
def password(case):
    case.refused = "password-protected"
    return protect(xlsxwriter_write(one_shift(case)), "marrowby")


@fixture("calc.ods", LIBREOFFICE, "LibreOffice's own format", COATER)
def calc(case):
    case.refused = "not-excel"
    return repack(convert(flat(one_shift(case)), "shift.fods", "ods"))


@fixture("web-page.xls", f"Python {platform.python_version()}", "a web page under a workbook's name, as some programs export", COATER)
def page(case):
    case.refused = "not-excel"
    [sheet] = one_shift(case)
    rows = "".join(f"<tr>{''.join(f'<td>{cell}</td>' for cell in row)}</tr>" for row in sheet.rows)
    return f"<html><head><meta charset='utf-8'></head><body><table>{rows}</table></body></html>".encode()
