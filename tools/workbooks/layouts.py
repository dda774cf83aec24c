"""One sheet, one table: long layouts and what stands around the table."""
from corpus import fixture
from grid import Formula
from plants import COATER, CW, OT, SLURRY, VI, PH, DE, WT, every, series
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write

LONG = ["Time", "Lot", "Product", "Gauge", "Characteristic", "Value", "Unit", "Operator", "Remark"]


def long_rows(case, sheet, name, moments, lots):
    """A row a reading, the three channels in turn."""
    channels = [CW, WT, OT]
    values = {one["name"]: series(name, one, len(moments), digits=1 if one is OT else 2) for one in channels}
    for step, moment in enumerate(moments):
        one = channels[step % 3]
        lot = lots[step * len(lots) // len(moments)]
        value = values[one["name"]][step]
        cells = [moment, lot, "SEP-12", one["aliases"][0], one["name"], value, one["unit"], "K. Alder", None]
        case.data(sheet, cells, moment, lot, "SEP-12").reads("F", one, value)


@fixture("long.xlsx", XLSXWRITER, "nothing: a row a reading, with columns that are not read (operator, remark)", COATER)
def long(case):
    case.layout = "long"
    sheet = case.sheet("Readings")
    sheet.add(LONG)
    long_rows(case, sheet, "long", every("2026-03-03T06:05", 7, 60), ["24117", "24118", "24119", "24120"])
    return xlsxwriter_write(case.sheets)


@fixture("title-rows-25.xlsx", XLSXWRITER, "25 title rows above the header: addresses, a revision table, limits, which are no readings", COATER)
def title_rows(case):
    case.layout = "long"
    sheet = case.sheet("Form QF-17")
    titles = [["Marrowby Works"], ["Separator film, Coater 2"], [], ["Form", "QF-17"], ["Revision", "Date", "By", "Change"]]
    titles += [[step, f"0{step}.11.2025", "R. Tamm", "Limits"] for step in range(1, 7)]
    titles += [["Characteristic", "Nominal", "LSL", "USL", "Unit"]]
    titles += [["Coat weight", 12, 11.4, 12.6, "g/m²"], ["Web thickness", 16.4, 15.6, 17.2, "µm"], ["Oven exit temperature", 84, 81, 87, "°C"]]
    titles += [[f"{step}. Read the gauge with the web running."] for step in range(1, 10)] + [["Readings"]]
    assert len(titles) == 25
    for title in titles:
        sheet.add(title)
    sheet.add(LONG)
    long_rows(case, sheet, "titles", every("2026-03-03T14:02", 9, 24), ["24121", "24122"])
    return xlsxwriter_write(case.sheets)


@fixture("repeated-headers.xlsx", XLSXWRITER, "the header again after every ten rows, as printed pages have it, with a page number", COATER)
def repeated_headers(case):
    case.layout = "wide"
    sheet = case.sheet("Print")
    header = ["Time", "Lot", "Product", "Coat weight [g/m²]", "Web thickness [µm]"]
    sheet.add(header)
    moments = every("2026-03-02T22:10", 15, 30)
    cw, wt = series("pages", CW, 30), series("pages", WT, 30)
    for step, moment in enumerate(moments):
        if step in (10, 20):
            sheet.blank()
            case.data(sheet, header).not_used("repeated-header")
        lot = "24123" if step < 17 else "24124"
        row = case.data(sheet, [moment, lot, "SEP-12", cw[step], wt[step]], moment, lot, "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    return xlsxwriter_write(case.sheets)


@fixture("totals-at-foot.xlsx", XLSXWRITER, "rows of averages, deviations, counts and capability below the readings, as formulas with results", COATER)
def totals(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(["Time", "Lot", "Product", "Coat weight [g/m²]", "Web thickness [µm]"])
    moments = every("2026-03-03T06:00", 20, 20)
    cw, wt = series("totals", CW, 20), series("totals", WT, 20)
    for step, moment in enumerate(moments):
        lot = "24125" if step < 12 else "24126"
        row = case.data(sheet, [moment, lot, "SEP-12", cw[step], wt[step]], moment, lot, "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    sheet.blank()
    for label, function in (("Average", "AVERAGE"), ("Std. dev.", "STDEV"), ("Min", "MIN"), ("Max", "MAX"), ("n", "COUNT")):
        cells = [Formula(f"={function}({letter}2:{letter}21)", 12.0 if function != "COUNT" else 20) for letter in "DE"]
        case.data(sheet, [label, None, None, *cells]).not_used("summary-row")
    case.data(sheet, [None, None, "Cpk", 1.41, 1.38]).not_used("summary-row")
    return xlsxwriter_write(case.sheets)


@fixture("spacer-columns.xlsx", OPENPYXL, "begins in B3, with blank columns between those that are filled", COATER)
def spacers(case):
    case.layout = "wide"
    sheet = case.sheet("Tabelle1")
    sheet.blank(2)
    sheet.add([None, "Datum", "Uhrzeit", None, "Charge", None, "Artikel", None, "Flächengewicht", None, None, "Bahndicke"])
    cw, wt = series("spacers", CW, 16), series("spacers", WT, 16)
    for step, moment in enumerate(every("2026-03-04T06:15", 25, 16)):
        cells = [None, moment.date(), moment.time(), None, 24127, None, "SEP-12", None, cw[step], None, None, wt[step]]
        row = case.data(sheet, cells, moment, "24127", "SEP-12")
        row.reads("I", CW, cw[step]).reads("L", WT, wt[step])
    return openpyxl_write(case.sheets)


@fixture("hidden-parts.xlsx", OPENPYXL, "hidden rows, a hidden column and a hidden sheet hold readings", COATER)
def hidden(case):
    case.layout = "wide"
    for name, start, lot in (("Early", "2026-03-04T06:00", "24128"), ("Old", "2026-03-03T06:00", "24110")):
        sheet = case.sheet(name, state="visible" if name == "Early" else "hidden")
        sheet.add(["Time", "Lot", "Product", "Coat weight", "Oven exit temperature"])
        cw, ot = series(name, CW, 12), series(name, OT, 12, digits=1)
        for step, moment in enumerate(every(start, 30, 12)):
            row = case.data(sheet, [moment, lot, "SEP-12", cw[step], ot[step]], moment, lot, "SEP-12")
            row.reads("D", CW, cw[step]).reads("E", OT, ot[step])
    case.sheets[0].hidden_rows = {4, 5, 9}
    case.sheets[0].hidden_columns = {"E"}
    case.counts("hidden-rows-read")
    case.counts("hidden-sheet-read")
    return openpyxl_write(case.sheets)


@fixture("autofilter.xlsx", XLSXWRITER, "a filter is set, so that most of the rows do not show", COATER)
def autofilter(case):
    case.layout = "long"
    sheet = case.sheet("Readings", filter_ref="A1:I37")
    sheet.add(LONG)
    long_rows(case, sheet, "filter", every("2026-03-04T14:00", 10, 36), ["24129", "24130"])
    sheet.hidden_rows = {number for number in range(2, 38) if (number - 2) % 3}
    case.counts("hidden-rows-read")
    return xlsxwriter_write(case.sheets)


@fixture("merged-titles.xlsx", OPENPYXL, "merged title cells, and pairs of name and content above the table", COATER)
def merged_titles(case):
    case.layout = "wide"
    sheet = case.sheet("Schichtbericht", merged=["A1:F1", "A2:F2", "B4:C4", "E4:F4"])
    sheet.add(["Marrowby Works"])
    sheet.add(["Schichtbericht Beschichter 2"])
    sheet.blank()
    sheet.add(["Schicht:", "Früh", None, "Bediener:", "J. Ebert"])
    sheet.blank()
    sheet.add(["Zeitpunkt", "Losnummer", "Sorte", "Flächengewicht (g/m²)", "Bahndicke (µm)", "Ofentemperatur (°C)"])
    cw, wt, ot = series("merged", CW, 18), series("merged", WT, 18), series("merged", OT, 18, digits=1)
    for step, moment in enumerate(every("2026-03-05T06:00", 20, 18)):
        row = case.data(sheet, [moment, 24131, "SEP-12", cw[step], wt[step], ot[step]], moment, "24131", "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step]).reads("F", OT, ot[step])
    return openpyxl_write(case.sheets)


@fixture("lot-in-title.xlsx", OPENPYXL, "the lot and the product stand above the table, not in a column", COATER)
def lot_in_title(case):
    case.layout = "wide"
    sheet = case.sheet("24132")
    sheet.add(["Coater 2: readings of a lot"])
    sheet.add(["Lot:", 24132])
    sheet.add(["Product:", "SEP-16"])
    sheet.blank()
    sheet.add(["Time", "Coat weight [g/m²]", "Web thickness [µm]"])
    cw, wt = series("title", CW, 20, "SEP-16"), series("title", WT, 20, "SEP-16")
    for step, moment in enumerate(every("2026-03-05T09:00", 6, 20)):
        row = case.data(sheet, [moment, cw[step], wt[step]], moment, "24132", "SEP-16")
        row.reads("B", CW, cw[step]).reads("C", WT, wt[step])
    return openpyxl_write(case.sheets)


@fixture("shared-name-columns.xlsx", XLSXWRITER, "lot sizes, orders, shifts and limits in columns beside the readings; a column nobody knows", SLURRY)
def many_columns(case):
    case.layout = "long"
    sheet = case.sheet("Tank 7")
    sheet.add(["Nr.", "Datum", "Zeit", "Schicht", "Auftrag", "Charge", "Material", "Merkmal", "Sollwert", "USG", "OSG", "Messwert", "Einheit", "Rührer", "Prüfer", "Bemerkung"])
    for step, moment in enumerate(every("2026-03-04T06:30", 12, 30)):
        one = [VI, PH, DE][step % 3]
        spec = one["specifications"][0]
        value = series("tank", one, 30, "S-4", {"Viscosity": 0, "pH": 2, "Density": 1}[one["name"]])[step]
        cells = [step + 1, moment.date(), moment.time(), "F", 810022, "SL-3301", "S-4", one["aliases"][1]]
        cells += [spec["nominal"], spec["lower"], spec["upper"], value, one["unit"] or None, 180 + step, "MB", "ok" if step == 4 else None]
        case.data(sheet, cells, moment, "SL-3301", "S-4").reads("L", one, value)
    case.counts("column-not-used")
    return xlsxwriter_write(case.sheets)

