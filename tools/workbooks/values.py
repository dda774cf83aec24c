"""How values are written, and what stands where a value is missing."""
from corpus import fixture
from grid import Formula, Styled
from plants import CALENDER, COATER, CT, CW, DE, EO, OT, PH, SLURRY, SO, VI, WT, every, series
from with_openpyxl import OPENPYXL, write as openpyxl_write
from with_xlsxwriter import XLSXWRITER, write as xlsxwriter_write

WIDE = ["Time", "Lot", "Product", "Coat weight", "Web thickness", "Oven exit temperature"]


def coater(case, sheet, start, lot, columns, minutes=20):
    """Rows of the coater from columns of (cell, what it must give): a number, a censoring, or None for no reading."""
    for step, moment in enumerate(every(start, minutes, len(columns[0]))):
        row = case.data(sheet, [moment, lot, "SEP-12", *(column[step][0] for column in columns)], moment, lot, "SEP-12")
        for place, one in enumerate([CW, WT, OT][: len(columns)]):
            given = columns[place][step][1]
            if given in ("below", "above"):
                row.reads("DEF"[place], one, censoring=given)
            elif given is not None:
                row.reads("DEF"[place], one, given)
        if not row.is_used:
            row.not_used("no-value")


def same(values):
    return [(value, value) for value in values]


@fixture("decimal-comma-texts.xlsx", OPENPYXL, "all values are texts with a decimal comma", COATER)
def decimal_comma(case):
    case.layout = "wide"
    sheet = case.sheet("Werte")
    sheet.add(WIDE)
    columns = [[(str(value).replace(".", ","), value) for value in series("texts", one, 20)] for one in (CW, WT)]
    coater(case, sheet, "2026-03-03T06:00", "24180", columns)
    case.counts("number-stored-as-text", 40)
    return openpyxl_write(case.sheets)


@fixture("three-decimals.xlsx", OPENPYXL, "\"12,125\" throughout: a decimal comma, or thousands", COATER)
def three_decimals(case):
    case.layout = "wide"
    sheet = case.sheet("Werte")
    sheet.add(WIDE)
    values = [value if round(value * 1000) % 10 else round(value + 0.001, 3) for value in series("three", CW, 16, digits=3)]
    coater(case, sheet, "2026-03-03T14:00", "24181", [[(f"{value:.3f}".replace(".", ","), value) for value in values]])
    case.asks("decimal-sign", sheets={"Werte": {"decimalSign": ","}})
    return openpyxl_write(case.sheets)


@fixture("thousands.xlsx", XLSXWRITER, "a sheet each with thin blanks, apostrophes and points between thousands, as texts", SLURRY)
def thousands(case):
    case.layout = "wide"
    styles = {"Thin": ("\u2009", ","), "No break": ("\u202f", ","), "Schweiz": ("’", "."), "Punkt": (".", ",")}
    for day, (name, (group, sign)) in enumerate(styles.items(), 2):
        sheet = case.sheet(name)
        sheet.add(["Zeitpunkt", "Charge", "Material", "Viskosität [mPa·s]", "Dichte [kg/m³]"])
        vi, de = series(name, VI, 8, "S-4", 1), series(name, DE, 8, "S-4", 2)
        for step, moment in enumerate(every(f"2026-03-0{day}T06:00", 45, 8)):
            written = [f"{value:,.2f}".replace(",", "\0").replace(".", sign).replace("\0", group) for value in (vi[step], de[step])]
            row = case.data(sheet, [moment, f"SL-330{day}", "S-4", *written], moment, f"SL-330{day}", "S-4")
            row.reads("D", VI, vi[step]).reads("E", DE, de[step])
    return xlsxwriter_write(case.sheets)


@fixture("units-in-cells.xlsx", OPENPYXL, "each value with its unit behind it, with and without a blank", COATER)
def units_in_cells(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(WIDE)
    cw = [(f"{value} g/m²", value) for value in series("cells", CW, 16)]
    wt = [(f"{value}µm", value) for value in series("cells", WT, 16)]
    ot = [(f"{value} °C".replace(".", ","), value) for value in series("cells", OT, 16, digits=1)]
    coater(case, sheet, "2026-03-03T22:00", "24182", [cw, wt, ot])
    return openpyxl_write(case.sheets)


@fixture("percent.xlsx", XLSXWRITER, "a share stored as 0.482 and shown as 48.2 %, for a channel in %", SLURRY)
def percent(case):
    case.layout = "wide"
    sheet = case.sheet("Mixer")
    sheet.add(["Time", "Lot", "Product", "Solids", "pH"])
    so, ph = series("percent", SO, 16, "S-4", 1), series("percent", PH, 16, "S-4")
    for step, moment in enumerate(every("2026-03-04T06:00", 30, 16)):
        cells = [moment, "SL-3341", "S-4", Styled(round(so[step] / 100, 5), "0.0%"), ph[step]]
        case.data(sheet, cells, moment, "SL-3341", "S-4").reads("D", SO, so[step]).reads("E", PH, ph[step])
    return xlsxwriter_write(case.sheets)


@fixture("formulas-with-results.xlsx", XLSXWRITER, "values, lots and times worked out by formulas, with their results stored", COATER)
def with_results(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(WIDE)
    values = series("results", CW, 16)
    moments = every("2026-03-04T06:00", 15, 16)
    for step, moment in enumerate(moments):
        number = sheet.next_row
        serial = 46085 + 0.25 + step / 96
        stamp = Formula(f"=A{number - 1}+1/96", serial, "yyyy\\-mm\\-dd\\ hh:mm") if step else moment
        cells = [stamp, Formula('="L-"&24183', "L-24183"), "SEP-12", Formula(f"={values[step]}*1", values[step])]
        case.data(sheet, cells, moment, "L-24183", "SEP-12").reads("D", CW, values[step])
    return xlsxwriter_write(case.sheets)


@fixture("formulas-without-results.xlsx", OPENPYXL, "every third value is a formula whose result nobody stored", COATER)
def without_results(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(WIDE)
    cw, wt = series("without", CW, 18), series("without", WT, 18)
    cells = [(Formula(f"=8.1+{value}-8.1"), None) if step % 3 == 2 else (value, value) for step, value in enumerate(cw)]
    coater(case, sheet, "2026-03-04T14:00", "24184", [cells, same(wt)])
    case.counts("formula-without-result", 6)
    return openpyxl_write(case.sheets)


@fixture("error-cells.xlsx", XLSXWRITER, "Excel's errors where values and times should be", COATER)
def errors(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(WIDE)
    shown = ["#DIV/0!", "#N/A", "#REF!", "#VALUE!", "#NAME?", "#NUM!"]
    cw, wt = series("errors", CW, 15), series("errors", WT, 15)
    first = [(Formula("=1/0", shown[step]), None) if step < 6 else (value, value) for step, value in enumerate(cw)]
    second = [(Formula("=NA()", "#N/A"), None) if step in (2, 9) else (value, value) for step, value in enumerate(wt)]
    coater(case, sheet, "2026-03-04T22:00", "24185", [first, second])
    row = case.data(sheet, [Formula("=#REF!", "#REF!"), "24185", "SEP-12", 12.1, 16.4])
    row.not_used("error-cell")
    case.counts("error-cell", 8)
    return xlsxwriter_write(case.sheets)


@fixture("censored.xlsx", OPENPYXL, "off scale and below detection: censored, and counted in the lot", COATER)
def censored(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(WIDE)
    marks = [("OL", "above"), ("<0.05", "below"), (">MAX", "above"), ("<LOD", "below"), ("O.L.", "above"), ("OVER", "above"), ("UNDER", "below"), ("> 20,0 g/m²", "above")]
    cw = [marks[step // 2] if step % 2 else (value, value) for step, value in enumerate(series("censored", CW, 16))]
    wt = [("<10", "below") if step == 5 else (">100 µm", "above") if step == 6 else (value, value) for step, value in enumerate(series("censored", WT, 16))]
    coater(case, sheet, "2026-03-05T06:00", "24186", [cw, wt])
    case.counts("censored-reading", 10)
    return openpyxl_write(case.sheets)


@fixture("missing.xlsx", OPENPYXL, "ten ways to write that nothing was measured; none of them is zero", COATER)
def missing(case):
    case.layout = "wide"
    sheet = case.sheet("Shift")
    sheet.add(WIDE)
    marks = ["-", "--", "n/a", "N/A", "k.A.", "NA", "—", "n.a.", " ", None]
    cw = [(marks[step // 2], None) if step % 2 else (value, value) for step, value in enumerate(series("missing", CW, 20))]
    wt = [(marks[step // 2], None) if step in (3, 7) else (value, value) for step, value in enumerate(series("missing", WT, 20))]
    coater(case, sheet, "2026-03-05T14:00", "24187", [cw, wt])
    return openpyxl_write(case.sheets)


@fixture("codes.xlsx", XLSXWRITER, "9999 where the gauge had nothing to say", COATER)
def codes(case):
    case.layout = "wide"
    sheet = case.sheet("Logger")
    sheet.add(WIDE)
    cw = [(9999, None) if step in (3, 4, 11) else (value, value) for step, value in enumerate(series("codes", CW, 16))]
    coater(case, sheet, "2026-03-05T22:00", "24188", [cw, same(series("codes", WT, 16))])
    case.asks("code-or-value", sheets={"Logger": {"missing": ["9999"]}})
    return xlsxwriter_write(case.sheets)


@fixture("zeros-and-signs.xlsx", OPENPYXL, "zeros that are readings, and minus signs of two kinds in texts", CALENDER)
def zeros(case):
    case.layout = "wide"
    sheet = case.sheet("K1")
    sheet.add(["Time", "Lot", "Product", "Edge offset [mm]", "Thickness [µm]"])
    offsets = [0, 0.4, ("−0,3", -0.3), 0, -0.2, ("-0,1", -0.1), 0.0, ("+0,5", 0.5), 0.1, ("0,0", 0)]
    ct = series("zeros", CT, 10)
    for step, moment in enumerate(every("2026-03-04T06:00", 40, 10)):
        written, value = offsets[step] if isinstance(offsets[step], tuple) else (offsets[step], offsets[step])
        row = case.data(sheet, [moment, "C-5520", "SEP-12", written, ct[step]], moment, "C-5520", "SEP-12")
        row.reads("D", EO, value).reads("E", CT, ct[step])
    return openpyxl_write(case.sheets)
