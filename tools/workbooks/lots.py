"""Lots and products as they are written, and rows that are no product."""
from datetime import datetime

from corpus import fixture
from grid import Styled
from plants import COATER, CW, WT, every, series
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write

HEADER = ["Time", "Lot", "Product", "Coat weight", "Web thickness"]


def rows(case, name, start, written, minutes=15):
    """A row for each of (lot as written, lot as meant or None for a row that is not used)."""
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(HEADER)
    cw, wt = series(name, CW, len(written)), series(name, WT, len(written))
    for step, moment in enumerate(every(start, minutes, len(written))):
        shown, meant, *code = written[step]
        row = case.data(sheet, [moment, shown, "SEP-12", cw[step], wt[step]], moment, meant, "SEP-12")
        if meant is None:
            row.not_used(*code)
        else:
            row.reads("D", CW, cw[step]).reads("E", WT, wt[step])


@fixture("lot-spellings.xlsx", OPENPYXL, "one lot spelled in three ways within the file", COATER)
def spellings(case):
    spelled = ["L-0123"] * 5 + ["L123"] * 3 + ["l 0123"] * 2 + ["L-0124"] * 6
    meant = ["L-0123"] * 10 + ["L-0124"] * 6
    rows(case, "spellings", "2026-03-03T06:00", list(zip(spelled, meant)))
    case.asks("lot-spelling", lots={"L123": "L-0123", "l 0123": "L-0123"})
    return openpyxl_write(case.sheets)


@fixture("lot-known-otherwise.xlsx", XLSXWRITER, "the lot is known on the line in another spelling", COATER)
def known(case):
    case.context["lots"] = ["L-24194", "L-24195"]
    rows(case, "known", "2026-03-03T14:00", [("L24194", "L-24194")] * 8 + [("L-24195", "L-24195")] * 4)
    case.asks("lot-spelling", lots={"L24194": "L-24194"})
    return xlsxwriter_write(case.sheets)


@fixture("lot-zeros.xlsx", OPENPYXL, "lots are numbers shown with leading zeros by their format", COATER)
def zeros(case):
    written = [(Styled(117, "00000"), "00117")] * 8 + [(Styled(118, "00000"), "00118")] * 8
    rows(case, "zeros", "2026-03-03T22:00", written)
    return openpyxl_write(case.sheets)


@fixture("lot-as-date.xlsx", XLSXWRITER, "the lot 2-3 was typed, and Excel made the second of March of it", COATER)
def as_date(case):
    mangled = Styled(datetime(2026, 3, 2), "dd\\-mmm")
    rows(case, "date", "2026-03-04T06:00", [(mangled, None, "lot-is-a-date")] * 4 + [("2-4", "2-4")] * 8)
    return xlsxwriter_write(case.sheets)


@fixture("lot-missing.xlsx", OPENPYXL, "no lot in some rows", COATER)
def without(case):
    rows(case, "without", "2026-03-04T14:00", [("24196", "24196")] * 5 + [(None, None, "lot-missing")] * 3 + [("24196", "24196")] * 4)
    return openpyxl_write(case.sheets)


@fixture("check-standards.xlsx", XLSXWRITER, "readings of check standards between those of product", COATER)
def check_standards(case):
    marks = ["MASTER", "REF", "CHK", "Zero", "Master 2"]
    written = [(mark, None, "check-standard-row") for mark in marks]
    lot = [("24197", "24197")] * 4
    rows(case, "checks", "2026-03-04T22:00", [*written[:2], *lot, written[2], *lot, written[3], *lot, written[4]])
    return xlsxwriter_write(case.sheets)


def by_product(case, name, start, written):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(HEADER)
    cw, wt = series(name, CW, len(written)), series(name, WT, len(written))
    for step, moment in enumerate(every(start, 15, len(written))):
        lot, shown, meant = written[step]
        row = case.data(sheet, [moment, lot, shown, cw[step], wt[step]], moment, lot, meant)
        if meant is None:
            row.not_used("unknown-product")
        else:
            row.reads("D", CW, cw[step]).reads("E", WT, wt[step])


@fixture("unknown-product.xlsx", OPENPYXL, "a trial product that the plant has not set up", COATER)
def unknown_product(case):
    by_product(case, "trial", "2026-03-05T06:00", [("24198", "SEP-12", "SEP-12")] * 8 + [("24199", "TRIAL-9", None)] * 4)
    return openpyxl_write(case.sheets)


@fixture("product-by-name.xlsx", XLSXWRITER, "products by their names, in other spellings", COATER)
def by_name(case):
    written = [("24200", "Separator 12 µm", "SEP-12")] * 4 + [("24200", "separator 12µm", "SEP-12")] * 4 + [("24201", "sep 12", "SEP-12")] * 4
    by_product(case, "name", "2026-03-05T14:00", written)
    return xlsxwriter_write(case.sheets)


@fixture("pieces.xlsx", XLSXWRITER, "serial numbers, positions and lot sizes beside each reading", COATER)
def pieces(case):
    case.layout = "long"
    sheet = case.sheet("Lab")
    sheet.add(["Time", "Lot", "Lot size [m]", "Product", "Sample", "Lane", "Characteristic", "Value"])
    values = series("pieces", WT, 24)
    for step, moment in enumerate(every("2026-03-05T22:00", 5, 24)):
        lane = ["A", "B", "C"][step % 3]
        cells = [moment, "24202", 5200, "SEP-12", f"P{step // 3 + 1:03}", lane, "LS-305", values[step]]
        row = case.data(sheet, cells, moment, "24202", "SEP-12")
        row.reads("H", WT, values[step], serial=f"P{step // 3 + 1:03}", position=lane)
    return xlsxwriter_write(case.sheets)
