"""Units other than the channel's, said and unsaid, and deviations from the nominal value."""
from corpus import fixture
from plants import CALENDER, COATER, CT, CW, NF, OT, TANSLEY, WT, every, series
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write

#: Exact by definition (international yard and pound agreement of 1959).
MICROMETRES_A_MIL = 25.4


def wide(case, sheet, start, lot, columns, product="SEP-12"):
    """Rows from columns of (channel, [(cell, value in the channel's unit)])."""
    for step, moment in enumerate(every(start, 20, len(columns[0][1]))):
        row = case.data(sheet, [moment, lot, product, *(cells[step][0] for _, cells in columns)], moment, lot, product)
        for place, (one, cells) in enumerate(columns):
            if cells[step][1] is not None:
                row.reads("DEFG"[place], one, cells[step][1])


def same(channel, name, count, digits=2, product="SEP-12"):
    return channel, [(value, value) for value in series(name, channel, count, product, digits)]


@fixture("millimetres.xlsx", OPENPYXL, "the header says mm, the channel is in µm", COATER)
def millimetres(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(["Time", "Lot", "Product", "Coat weight [g/m²]", "Web thickness [mm]"])
    wt = [(round(value / 1000, 5), value) for value in series("mm", WT, 16)]
    wide(case, sheet, "2026-03-03T06:00", "24190", [same(CW, "mm", 16), (WT, wt)])
    return openpyxl_write(case.sheets)


@fixture("fahrenheit-and-mil.xlsx", XLSXWRITER, "°F and mil in the headers of an American sister plant", TANSLEY)
def fahrenheit(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(["Time", "Lot", "Product", "Coat weight (gsm)", "Web thickness (mil)", "Oven exit temperature (°F)"])
    wt = [(mil, round(mil * MICROMETRES_A_MIL, 9)) for mil in (round(value / MICROMETRES_A_MIL, 4) for value in series("mil", WT, 16))]
    ot = [(hot, round((hot - 32) / 1.8, 12)) for hot in (round(value * 1.8 + 32, 1) for value in series("mil", OT, 16))]
    wide(case, sheet, "2026-03-03T06:00", "T-700", [same(CW, "mil", 16), (WT, wt), (OT, ot)])
    return xlsxwriter_write(case.sheets)


@fixture("unit-column.xlsx", XLSXWRITER, "the unit in a column of its own, where it changes from µm to mm within a channel", COATER)
def unit_column(case):
    case.layout = "long"
    sheet = case.sheet("Readings")
    sheet.add(["Time", "Lot", "Product", "Characteristic", "Unit", "Value"])
    values = series("column", WT, 20)
    for step, moment in enumerate(every("2026-03-03T14:00", 20, 20)):
        unit, written = ("mm", round(values[step] / 1000, 5)) if step >= 12 else (["µm", "um", "μm"][step % 3], values[step])
        cells = [moment, "24191", "SEP-12", "Web thickness", unit, written]
        case.data(sheet, cells, moment, "24191", "SEP-12").reads("F", WT, values[step])
    return xlsxwriter_write(case.sheets)


@fixture("unit-unsaid.xlsx", OPENPYXL, "a column in mm under a header without a unit; the channel is in µm", COATER)
def unit_unsaid(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(["Time", "Lot", "Product", "Coat weight", "Web thickness"])
    wt = [(round(value / 1000, 5), value) for value in series("unsaid", WT, 16)]
    wide(case, sheet, "2026-03-04T06:00", "24192", [same(CW, "unsaid", 16), (WT, wt)])
    case.asks("unit-suspect", sheets={"Shift": {"columns": {"E": {"role": "channel_values", "channelId": WT["id"], "unit": "mm"}}}})
    return openpyxl_write(case.sheets)


@fixture("deviation.xlsx", OPENPYXL, "thickness as deviation from the nominal value, under the usual header", COATER)
def deviation(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(["Time", "Lot", "Product", "Coat weight", "Web thickness"])
    wt = [(round(value - 16.4, 2), value) for value in series("deviation", WT, 16)]
    wide(case, sheet, "2026-03-04T14:00", "24193", [same(CW, "deviation", 16), (WT, wt)])
    answer = {"role": "channel_values", "channelId": WT["id"], "isDeviation": True}
    case.asks("deviation-suspect", sheets={"Shift": {"columns": {"E": answer}}})
    return openpyxl_write(case.sheets)


@fixture("unit-of-another-quantity.xlsx", XLSXWRITER, "kN/m where the channel is in kN: no conversion leads there", CALENDER)
def other_quantity(case):
    case.layout = "wide"
    sheet = case.sheet("K1")
    sheet.add(["Time", "Lot", "Product", "Thickness [µm]", "Nip force [kN/m]"])
    nf = NF, [(value, None) for value in series("other", NF, 10, digits=1)]
    wide(case, sheet, "2026-03-04T22:00", "C-5530", [same(CT, "other", 10), nf])
    case.is_blocked = True
    case.counts("unit-differs")
    return xlsxwriter_write(case.sheets)
