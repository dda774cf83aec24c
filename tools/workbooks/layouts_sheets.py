"""Several sheets, and several tables on a sheet."""
from corpus import fixture
from plants import COATER, CW, OT, SLURRY, DE, PH, VI, WT, every, series
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write


@fixture("sheet-a-gauge.xlsx", XLSXWRITER, "a sheet a gauge, named by its asset number, and a cover sheet without readings", COATER)
def a_gauge(case):
    case.layout = "long"
    cover = case.sheet("Cover")
    cover.add(["Marrowby Works, Coater 2"])
    cover.add(["Gauge", "Characteristic"])
    for one in (CW, WT, OT):
        cover.add([one["aliases"][0], one["name"]])
    for one in (CW, WT, OT):
        sheet = case.sheet(one["aliases"][0])
        sheet.add(["Time", "Lot", "Product", f"Reading [{one['unit']}]"])
        values = series("gauge", one, 15, digits=1 if one is OT else 2)
        for step, moment in enumerate(every("2026-03-05T06:00", 15, 15)):
            case.data(sheet, [moment, "24150", "SEP-12", values[step]], moment, "24150", "SEP-12").reads("D", one, values[step])
    return xlsxwriter_write(case.sheets)


@fixture("sheet-a-shift.xlsx", OPENPYXL, "a sheet a shift; the night's goes over midnight with dates as they were", COATER)
def a_shift(case):
    case.layout = "wide"
    for name, start, lot in (("Früh", "2026-03-03T06:00", "24151"), ("Spät", "2026-03-03T14:00", "24152"), ("Nacht", "2026-03-03T22:00", "24153")):
        sheet = case.sheet(name)
        sheet.add([f"Schicht {name}"])
        sheet.add(["Datum", "Uhrzeit", "Los", "Sorte", "Flächengewicht", "Bahndicke"])
        cw, wt = series(name, CW, 16), series(name, WT, 16)
        for step, moment in enumerate(every(start, 30, 16)):
            row = case.data(sheet, [moment.date(), moment.time(), lot, "SEP-12", cw[step], wt[step]], moment, lot, "SEP-12")
            row.reads("E", CW, cw[step]).reads("F", WT, wt[step])
    return openpyxl_write(case.sheets)


@fixture("several-tables.xlsx", OPENPYXL, "two tables below each other on one sheet, with other columns and a title each", SLURRY)
def several(case):
    sheet = case.sheet("Shift")
    sheet.add(["Viscosity, every hour"])
    sheet.add(["Time", "Lot", "Product", "Viscosity [mPa·s]"])
    vi = series("several", VI, 8, "S-4", 0)
    for step, moment in enumerate(every("2026-03-05T06:00", 60, 8)):
        case.data(sheet, [moment, "SL-3310", "S-4", vi[step]], moment, "SL-3310", "S-4").reads("D", VI, vi[step])
    sheet.blank(2)
    case.data(sheet, ["pH and density, every two hours"]).not_used()
    case.data(sheet, ["Lot", "Time", "Product", "pH", "Density [kg/m³]"]).not_used()
    ph, de = series("several", PH, 4, "S-4"), series("several", DE, 4, "S-4", 1)
    for step, moment in enumerate(every("2026-03-05T06:30", 120, 4)):
        row = case.data(sheet, ["SL-3310", moment, "S-4", ph[step], de[step]], moment, "SL-3310", "S-4")
        row.reads("D", PH, ph[step]).reads("E", DE, de[step])
    return openpyxl_write(case.sheets)
