"""Workbooks with everything that is no cell: tables, charts, comments, rules, names; and shapes that are not read."""
from corpus import fixture
from plants import COATER, CW, OT, WT, every, series
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write


def decorate(book, sheets):
    [sheet, *_] = sheets
    small = book.add_format({"font_script": 1})
    sheet.write_rich_string(0, 3, "Coat weight [g/m", small, "2", "]")
    sheet.add_table("A1:E21", {"autofilter": True, "columns": [{"header": name} for name in ("Time", "Lot", "Product", "Coat weight [g/m2]", "Web thickness [µm]")]})
    sheet.write_rich_string(0, 3, "Coat weight [g/m", small, "2", "]")
    sheet.write_comment("D5", "checked twice", {"author": "K. Alder"})
    sheet.conditional_format("D2:D21", {"type": "cell", "criteria": ">", "value": 12.4, "format": book.add_format({"bg_color": "#ffcccc"})})
    sheet.data_validation("C2:C21", {"validate": "list", "source": ["SEP-12", "SEP-16"]})
    sheet.freeze_panes(1, 0)
    book.define_name("Lots", "=Readings!$B$2:$B$21")
    chart = book.add_chart({"type": "line"})
    chart.add_series({"values": "=Readings!$D$2:$D$21"})
    sheet.insert_chart("H2", chart)
    columns = book.add_chart({"type": "column"})
    columns.add_series({"values": "=Readings!$E$2:$E$21"})
    book.add_chartsheet("Chart").set_chart(columns)


@fixture("decorated.xlsx", XLSXWRITER, "a table object, rich text in the header, comments, rules, lists, names, a chart and a sheet that is a chart", COATER)
def decorated(case):
    case.layout = "wide"
    sheet = case.sheet("Readings")
    sheet.add(["Time", "Lot", "Product", "Coat weight [g/m2]", "Web thickness [µm]"])
    cw, wt = series("decorated", CW, 20), series("decorated", WT, 20)
    for step, moment in enumerate(every("2026-03-02T06:00", 20, 20)):
        row = case.data(sheet, [moment, "L-24240", "SEP-12", cw[step], wt[step]], moment, "L-24240", "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    return xlsxwriter_write(case.sheets, decorate=decorate)


@fixture("subtotals.xlsx", OPENPYXL, "a row of averages after each lot, in the middle of the table", COATER)
def subtotals(case):
    case.layout = "wide"
    sheet = case.sheet("Lots")
    sheet.add(["Zeitpunkt", "Los", "Sorte", "Flächengewicht", "Ofentemperatur"])
    cw, ot = series("subtotals", CW, 24), series("subtotals", OT, 24, digits=1)
    moments = every("2026-03-02T14:00", 15, 24)
    for group in range(3):
        lot = f"2424{group + 1}"
        for step in range(group * 8, group * 8 + 8):
            row = case.data(sheet, [moments[step], lot, "SEP-12", cw[step], ot[step]], moments[step], lot, "SEP-12")
            row.reads("D", CW, cw[step]).reads("E", OT, ot[step])
        part = slice(group * 8, group * 8 + 8)
        means = [round(sum(values[part]) / 8, 3) for values in (cw, ot)]
        case.data(sheet, ["Mittelwert", None, None, *means]).not_used("summary-row")
    return openpyxl_write(case.sheets)


@fixture("transposed.xlsx", XLSXWRITER, "hours across and channels down: no layout that is read, so it is said and nothing is guessed", COATER)
def transposed(case):
    case.is_blocked = True
    sheet = case.sheet("Day")
    moments = every("2026-03-03T06:00", 60, 8)
    sheet.add(["Hour", *moments])
    sheet.add(["Lot", *["24245"] * 8])
    for one in (CW, WT, OT):
        sheet.add([one["name"], *series("across", one, 8)])
    return xlsxwriter_write(case.sheets)


@fixture("with-notes-sheet.xlsx", OPENPYXL, "a second sheet of notes in words", COATER)
def with_notes(case):
    case.layout = "wide"
    sheet = case.sheet("Coater 2")
    sheet.add(["Time", "Lot", "Product", "Coat weight", "Web thickness"])
    cw, wt = series("own", CW, 12), series("own", WT, 12)
    for step, moment in enumerate(every("2026-03-03T14:00", 30, 12)):
        row = case.data(sheet, [moment, "24246", "SEP-12", cw[step], wt[step]], moment, "24246", "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step])
    notes = case.sheet("Notes")
    for line in ("Roll change at 16:20", "Edge trim worn", "see log book"):
        notes.add([line])
    return openpyxl_write(case.sheets)
