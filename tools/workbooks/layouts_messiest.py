"""Everything at once, as it comes on a Monday."""
import datetime as dt

from corpus import fixture
from plants import CALENDER, CT, CW, NF, OT, TANSLEY, WT, every, series
from texts import PYTHON, comma, text
from units import MICROMETRES_A_MIL
from with_openpyxl import OPENPYXL, write as openpyxl_write


@fixture(
    "night-report.xlsx",
    OPENPYXL,
    "all at once: a merged title, the date above, times over midnight, a channel over positions, a spacer, decimal commas as texts, off scale, missing, a check standard, the header again, hidden rows, averages",
    CALENDER,
)
def night_report(case):
    case.layout = "wide"
    sheet = case.sheet("Nachtschicht", merged=["A1:I1", "D4:F4"])
    sheet.add(["Marrowby Works, Kalander 1: Schichtprotokoll"])
    sheet.add(["Datum:", dt.date(2026, 3, 4), None, "Schicht:", "Nacht", None, "Bediener:", "T. Ohlsen"])
    sheet.blank()
    header = ["Uhrzeit", "Los", "Sorte", "Dicke [µm]", None, None, None, "Liniendruck [kN]", "Bemerkung"]
    positions = [None, None, None, "links", "mitte", "rechts"]
    sheet.add(header)
    sheet.add(positions)
    ct, nf = series("report", CT, 48), series("report", NF, 16, digits=1)
    marks = {(3, 1): ("OL", "above"), (6, 0): ("k.A.", None), (9, 2): ("<10", "below"), (11, 1): (None, None)}
    for step, moment in enumerate(every("2026-03-04T22:05", 29, 16)):
        if step == 8:
            case.data(sheet, header).not_used()
            case.data(sheet, positions).not_used()
        if step == 5:
            number = moment - dt.timedelta(minutes=10)
            case.data(sheet, [number.time(), "MASTER", None, "12,00", "12,00", "12,00", None, None, "Prüfnormal"]).not_used("check-standard-row")
        lot = "C-5550" if step < 10 else "C-5551"
        cells, given = [], []
        for place in range(3):
            value = ct[step * 3 + place]
            written, side = marks.get((step, place), (comma(f"{value:.2f}"), "value"))
            cells.append(written)
            given.append((value, side))
        row = case.data(sheet, [moment.time(), lot, "SEP-12", *cells, None, nf[step], "Walze gereinigt" if step == 4 else None], moment, lot, "SEP-12")
        for place, (value, side) in enumerate(given):
            name = ["links", "mitte", "rechts"][place]
            if side == "value":
                row.reads("DEF"[place], CT, value, position=name)
            elif side:
                row.reads("DEF"[place], CT, censoring=side, position=name)
        row.reads("H", NF, nf[step])
    sheet.blank()
    case.data(sheet, ["Mittelwert", None, None, "12,21", "12,22", "12,20", None, 42.1]).not_used("summary-row")
    sheet.hidden_rows = {9, 10}
    return openpyxl_write(case.sheets)


@fixture(
    "shift-export.csv",
    PYTHON,
    "all at once in America: a sep line, titles, month first with AM and PM in a column of its own, mil and °F, blank lines, OL, averages",
    TANSLEY,
)
def shift_export(case):
    case.layout = "wide"
    sheet = case.sheet("*")
    sheet.add(["sep=,"])
    sheet.add(["Tansley Mill - Coater 5", "Shift B"])
    sheet.add(["Printed", "3/2/2026 11:02 PM"])
    sheet.blank()
    sheet.add(["Date", "Time", "Batch", "Part No.", "Coat weight (gsm)", "Web thickness (mil)", "Oven exit temperature (°F)"])
    cw, wt, ot = series("export", CW, 18), series("export", WT, 18), series("export", OT, 18, digits=1)
    for step, moment in enumerate(every("2026-02-27T15:05", 27, 18)):
        if step == 9:
            sheet.blank()
        mil, hot = round(wt[step] / MICROMETRES_A_MIL, 4), round(ot[step] * 1.8 + 32, 1)
        clock = f"{moment.hour % 12 or 12}:{moment:%M} {'PM' if moment.hour >= 12 else 'AM'}"
        weight = "OL" if step == 7 else cw[step]
        cells = [f"{moment.month}/{moment.day}/{moment.year}", clock, "T-720", "SEP-12", weight, mil, hot]
        row = case.data(sheet, cells, moment, "T-720", "SEP-12")
        if step == 7:
            row.reads("E", CW, censoring="above")
        else:
            row.reads("E", CW, cw[step])
        row.reads("F", WT, round(mil * MICROMETRES_A_MIL, 9)).reads("G", OT, round((hot - 32) / 1.8, 12))
    case.data(sheet, ["Average", "", "", "", 12.04, 0.6458, 183.3]).not_used("summary-row")
    return text(sheet.rows, ",").replace('"sep=,"', "sep=,").encode("utf-8-sig")
