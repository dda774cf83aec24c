"""Writes .xlsx packages by hand with Python's zipfile: the forms that line computers and libraries write and Excel does not."""
import datetime as dt
from xml.sax.saxutils import escape, quoteattr

from grid import Formula
from repack import pack

TRANSITIONAL = {
    "main": "http://schemas.openxmlformats.org/spreadsheetml/2006/main",
    "relations": "http://schemas.openxmlformats.org/officeDocument/2006/relationships",
}
#: ISO/IEC 29500-1:2016, annex A: the strict namespaces.
STRICT = {
    "main": "http://purl.oclc.org/ooxml/spreadsheetml/main",
    "relations": "http://purl.oclc.org/ooxml/officeDocument/relationships",
}
PACKAGE = "http://schemas.openxmlformats.org/package/2006"
CONTENT = "application/vnd.openxmlformats-officedocument.spreadsheetml"
HEAD = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n'


def letters(column):
    text = ""
    while column:
        column, rest = divmod(column - 1, 26)
        text = chr(65 + rest) + text
    return text


class Package:
    """One workbook in the making; `is_named` says whether rows and cells carry their `r`."""

    def __init__(self, names=TRANSITIONAL, is_named=True, is_shared=False, has_iso_dates=False, prefix=""):
        self.names, self.is_named, self.is_shared = names, is_named, is_shared
        self.has_iso_dates, self.prefix = has_iso_dates, prefix
        self.texts = {}

    def tag(self, name):
        return f"{self.prefix}{name}"

    def cell(self, value, place, style=""):
        name = f' r="{place}"' if self.is_named else ""
        c, v = self.tag("c"), self.tag("v")
        if value is None:
            return "" if self.is_named else f"<{c}/>"
        if isinstance(value, Formula):
            given = "" if value.cached is None else f"<{v}>{value.cached}</{v}>"
            return f"<{c}{name}>{value.text}{given}</{c}>"
        if isinstance(value, dt.datetime):
            if self.has_iso_dates:
                return f'<{c}{name} t="d" s="1"><{v}>{value.isoformat()}</{v}></{c}>'
            serial = (value - dt.datetime(1899, 12, 30)) / dt.timedelta(days=1)
            return f'<{c}{name} s="1"><{v}>{serial!r}</{v}></{c}>'
        if isinstance(value, str):
            if self.is_shared:
                index = self.texts.setdefault(value, len(self.texts))
                return f'<{c}{name} t="s"><{v}>{index}</{v}></{c}>'
            return f'<{c}{name} t="inlineStr"><{self.tag("is")}><{self.tag("t")}>{escape(value)}</{self.tag("t")}></{self.tag("is")}></{c}>'
        return f"<{c}{name}><{v}>{value!r}</{v}></{c}>"

    def sheet(self, rows):
        tag, lines = self.tag, []
        for number, cells in enumerate(rows, 1):
            inside = "".join(self.cell(value, f"{letters(column)}{number}") for column, value in enumerate(cells, 1))
            name = f' r="{number}"' if self.is_named else ""
            lines.append(f"<{tag('row')}{name}>{inside}</{tag('row')}>")
        space = f"xmlns:{self.prefix[:-1]}" if self.prefix else "xmlns"
        body = "".join(lines)
        return f'{HEAD}<{tag("worksheet")} {space}="{self.names["main"]}"><{tag("sheetData")}>{body}</{tag("sheetData")}></{tag("worksheet")}>'

    def write(self, sheets):
        main, relations = self.names["main"], self.names["relations"]
        parts = [(f"xl/worksheets/sheet{index}.xml", self.sheet(sheet.rows)) for index, sheet in enumerate(sheets, 1)]
        listed = "".join(f'<sheet name={quoteattr(sheet.name)} sheetId="{index}" r:id="rId{index}"/>' for index, sheet in enumerate(sheets, 1))
        links = "".join(f'<Relationship Id="rId{index}" Type="{relations}/worksheet" Target="worksheets/sheet{index}.xml"/>' for index in range(1, len(sheets) + 1))
        links += f'<Relationship Id="rIdS" Type="{relations}/styles" Target="styles.xml"/>'
        types = [("workbook.xml", "sheet.main"), ("styles.xml", "styles")] + [(f"worksheets/sheet{index}.xml", "worksheet") for index in range(1, len(sheets) + 1)]
        if self.texts:
            items = "".join(f"<si><t>{escape(text)}</t></si>" for text in self.texts)
            parts.append(("xl/sharedStrings.xml", f'{HEAD}<sst xmlns="{main}" count="{len(self.texts)}" uniqueCount="{len(self.texts)}">{items}</sst>'))
            links += f'<Relationship Id="rIdT" Type="{relations}/sharedStrings" Target="sharedStrings.xml"/>'
            types.append(("sharedStrings.xml", "sharedStrings"))
        overrides = "".join(f'<Override PartName="/xl/{name}" ContentType="{CONTENT}.{kind}+xml"/>' for name, kind in types)
        conformance = ' conformance="strict"' if self.names is STRICT else ""
        return pack([
            ("[Content_Types].xml", f'{HEAD}<Types xmlns="{PACKAGE}/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/>{overrides}</Types>'),
            ("_rels/.rels", f'{HEAD}<Relationships xmlns="{PACKAGE}/relationships"><Relationship Id="rId1" Type="{relations}/officeDocument" Target="xl/workbook.xml"/></Relationships>'),
            ("xl/workbook.xml", f'{HEAD}<workbook xmlns="{main}" xmlns:r="{relations}"{conformance}><workbookPr/><sheets>{listed}</sheets></workbook>'),
            ("xl/_rels/workbook.xml.rels", f'{HEAD}<Relationships xmlns="{PACKAGE}/relationships">{links}</Relationships>'),
            ("xl/styles.xml", f'{HEAD}<styleSheet xmlns="{main}"><numFmts count="1"><numFmt numFmtId="164" formatCode="dd/mm/yyyy\\ hh:mm"/></numFmts><fonts count="1"><font><sz val="11"/><name val="Calibri"/></font></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border><left/><right/><top/><bottom/><diagonal/></border></borders><cellStyleXfs count="1"><xf numFmtId="0" fontId="0" fillId="0" borderId="0"/></cellStyleXfs><cellXfs count="2"><xf numFmtId="0" fontId="0" fillId="0" borderId="0" xfId="0"/><xf numFmtId="164" fontId="0" fillId="0" borderId="0" xfId="0" applyNumberFormat="1"/></cellXfs></styleSheet>'),
            *parts,
        ])
