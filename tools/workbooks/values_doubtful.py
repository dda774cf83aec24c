"""Values that make one wonder: codes of several kinds, a lot that really is far out, uncertainties beside values."""
from corpus import fixture
from plants import COATER, CW, OT, WT, every, series
from values import WIDE, coater, same
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write


@fixture("codes-in-long.xlsx", OPENPYXL, "-999, 99.99 and 0 for values that were not measured, one for each channel", COATER)
def codes_in_long(case):
    case.layout = "long"
    sheet = case.sheet("Logger")
    sheet.add(["Time", "Lot", "Product", "Characteristic", "Value"])
    channels, codes = [CW, WT, OT], [-999, 99.99, 0]
    values = [series("long codes", one, 14, digits=1 if one is OT else 2) for one in channels]
    for step, moment in enumerate(every("2026-03-02T22:00", 7, 42)):
        one = channels[step % 3]
        is_code = step // 3 in (3, 8)
        value = codes[step % 3] if is_code else values[step % 3][step // 3]
        row = case.data(sheet, [moment, "24250", "SEP-12", one["name"], value], moment, "24250", "SEP-12")
        if is_code:
            row.not_used("value-missing")
        else:
            row.reads("E", one, value)
    case.asks("code-or-value", sheets={"Logger": {"missing": ["-999", "99.99", "0"]}})
    return openpyxl_write(case.sheets)


@fixture("bad-lot.xlsx", XLSXWRITER, "one lot of three lies far outside its specification, and nobody must explain that away", COATER)
def bad_lot(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(WIDE[:5])
    cw, wt = series("bad", CW, 24), series("bad", WT, 24)
    for step, moment in enumerate(every("2026-03-05T06:00", 18, 24)):
        lot = f"2425{1 + step // 8}"
        weight = round(cw[step] - 2.4, 2) if lot == "24252" else cw[step]
        row = case.data(sheet, [moment, lot, "SEP-12", weight, wt[step]], moment, lot, "SEP-12")
        row.reads("D", CW, weight).reads("E", WT, wt[step])
    return xlsxwriter_write(case.sheets)


@fixture("uncertainties.xlsx", OPENPYXL, "each value with its uncertainty behind ±", COATER)
def uncertainties(case):
    sheet = case.sheet("Lab")
    sheet.add(WIDE[:5])
    case.layout = "wide"
    cw = [(f"{value} ± 0.15", value) for value in series("plus", CW, 12)]
    wt = same(series("plus", WT, 12))
    coater(case, sheet, "2026-03-05T14:00", "24254", [cw, wt])
    return openpyxl_write(case.sheets)
