"""Wide layouts: a column a channel, or a column a position within the lot."""
from corpus import fixture
from grid import Formula
from plants import CALENDER, COATER, CT, CW, NF, OT, WT, every, series
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write


@fixture("wide-by-channel.xlsx", OPENPYXL, "German headers, date and time of day apart, columns of shift and operator that are not read", COATER)
def by_channel(case):
    case.layout = "wide"
    sheet = case.sheet("Daten")
    sheet.add(["Datum", "Uhrzeit", "Schicht", "Charge", "Artikel", "Flächengewicht [g/m²]", "Bahndicke [µm]", "Ofentemperatur [°C]", "Bediener"])
    cw, wt, ot = series("wide", CW, 24), series("wide", WT, 24), series("wide", OT, 24, digits=1)
    for step, moment in enumerate(every("2026-03-04T06:10", 18, 24)):
        lot = "L-24140" if step < 12 else "L-24141"
        row = case.data(sheet, [moment.date(), moment.time(), "F", lot, "SEP-12", cw[step], wt[step], ot[step], "JE"], moment, lot, "SEP-12")
        row.reads("F", CW, cw[step]).reads("G", WT, wt[step]).reads("H", OT, ot[step])
    return openpyxl_write(case.sheets)


@fixture("wide-by-position.xlsx", OPENPYXL, "a sheet of one channel with a column a position across the web, then mean and range", COATER)
def by_position(case):
    case.layout = "wide"
    sheet = case.sheet("Coat weight")
    sheet.add(["Time", "Lot", "Product", "Pos 1", "Pos 2", "Pos 3", "Pos 4", "Pos 5", "Mean", "Range"])
    drawn = series("positions", CW, 60)
    for step, moment in enumerate(every("2026-03-04T14:20", 30, 12)):
        five = drawn[step * 5 : step * 5 + 5]
        number = sheet.next_row
        lot = "24142" if step < 6 else "24143"
        ends = [Formula(f"=AVERAGE(D{number}:H{number})"), Formula(f"=MAX(D{number}:H{number})-MIN(D{number}:H{number})")]
        row = case.data(sheet, [moment, lot, "SEP-12", *five, *ends], moment, lot, "SEP-12")
        for place, value in enumerate(five):
            row.reads("DEFGH"[place], CW, value, position=str(place + 1))
    return openpyxl_write(case.sheets)


@fixture("two-row-header.xlsx", OPENPYXL, "names over units, the names of time, lot and product merged over both rows", COATER)
def two_rows(case):
    case.layout = "wide"
    sheet = case.sheet("Readings", merged=["A1:A2", "B1:B2", "C1:C2"])
    sheet.add(["Time", "Lot", "Product", "Coat weight", "Web thickness", "Oven exit temperature"])
    sheet.add([None, None, None, "[g/m²]", "[µm]", "[°C]"])
    cw, wt, ot = series("two", CW, 20), series("two", WT, 20), series("two", OT, 20, digits=1)
    for step, moment in enumerate(every("2026-03-05T06:05", 22, 20)):
        row = case.data(sheet, [moment, "24144", "SEP-12", cw[step], wt[step], ot[step]], moment, "24144", "SEP-12")
        row.reads("D", CW, cw[step]).reads("E", WT, wt[step]).reads("F", OT, ot[step])
    return openpyxl_write(case.sheets)


@fixture("channel-over-positions.xlsx", XLSXWRITER, "a channel's name merged over its three positions, and those in the row below", CALENDER)
def over_positions(case):
    case.layout = "wide"
    sheet = case.sheet("Calender 1", merged=["D1:F1", "G1:H1"])
    sheet.add([None, None, None, "Thickness [µm]", None, None, "Nip force [kN]", None])
    sheet.add(["Time", "Lot", "Product", "left", "middle", "right", "drive side", "operator side"])
    ct, nf = series("over", CT, 36), series("over", NF, 24, digits=1)
    for step, moment in enumerate(every("2026-03-05T06:40", 35, 12)):
        cells = [moment, "C-5501", "SEP-12", *ct[step * 3 : step * 3 + 3], *nf[step * 2 : step * 2 + 2]]
        row = case.data(sheet, cells, moment, "C-5501", "SEP-12")
        for place, name in enumerate(["left", "middle", "right"]):
            row.reads("DEF"[place], CT, ct[step * 3 + place], position=name)
        for place, name in enumerate(["drive side", "operator side"]):
            row.reads("GH"[place], NF, nf[step * 2 + place], position=name)
    return xlsxwriter_write(case.sheets)


@fixture("channel-and-position-in-header.xlsx", XLSXWRITER, "channel and position in one header cell, the unit in a row below", CALENDER)
def in_one_cell(case):
    case.layout = "wide"
    sheet = case.sheet("K1")
    sheet.add(["Datum/Zeit", "Los", "Sorte", "Dicke 1", "Dicke 2", "Dicke 3", "Liniendruck"])
    sheet.add([None, None, None, "µm", "µm", "µm", "kN"])
    ct, nf = series("cell", CT, 30), series("cell", NF, 10, digits=1)
    for step, moment in enumerate(every("2026-03-05T14:40", 40, 10)):
        row = case.data(sheet, [moment, "C-5502", "SEP-12", *ct[step * 3 : step * 3 + 3], nf[step]], moment, "C-5502", "SEP-12")
        for place in range(3):
            row.reads("DEF"[place], CT, ct[step * 3 + place], position=str(place + 1))
        row.reads("G", NF, nf[step])
    return xlsxwriter_write(case.sheets)
