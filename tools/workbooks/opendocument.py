"""Writes flat OpenDocument sheets (.fods), for LibreOffice to convert."""
import datetime as dt
from xml.sax.saxutils import escape, quoteattr

from grid import Formula, Styled

SPACES = " ".join(
    f'xmlns:{short}="urn:oasis:names:tc:opendocument:xmlns:{long}:1.0"'
    for short, long in (("office", "office"), ("table", "table"), ("text", "text"), ("number", "datastyle"), ("style", "style"))
) + ' xmlns:of="urn:oasis:names:tc:opendocument:xmlns:of:1.2"'

STYLES = """<office:automatic-styles>
<number:date-style style:name="N1"><number:day number:style="long"/><number:text>.</number:text><number:month number:style="long"/><number:text>.</number:text><number:year number:style="long"/><number:text> </number:text><number:hours number:style="long"/><number:text>:</number:text><number:minutes number:style="long"/></number:date-style>
<number:date-style style:name="N2"><number:day number:style="long"/><number:text>.</number:text><number:month number:style="long"/><number:text>.</number:text><number:year number:style="long"/></number:date-style>
<number:time-style style:name="N3"><number:hours number:style="long"/><number:text>:</number:text><number:minutes number:style="long"/></number:time-style>
<style:style style:name="stamp" style:family="table-cell" style:data-style-name="N1"/>
<style:style style:name="day" style:family="table-cell" style:data-style-name="N2"/>
<style:style style:name="clock" style:family="table-cell" style:data-style-name="N3"/>
</office:automatic-styles>"""


def cell(value):
    if isinstance(value, Styled):
        value = value.value
    if value is None:
        return "<table:table-cell/>"
    if isinstance(value, Formula):
        return f"<table:table-cell table:formula={quoteattr('of:' + value.text)}/>"
    if isinstance(value, dt.datetime):
        return f'<table:table-cell table:style-name="stamp" office:value-type="date" office:date-value="{value.isoformat()}"/>'
    if isinstance(value, dt.date):
        return f'<table:table-cell table:style-name="day" office:value-type="date" office:date-value="{value.isoformat()}"/>'
    if isinstance(value, dt.time):
        return f'<table:table-cell table:style-name="clock" office:value-type="time" office:time-value="PT{value.hour}H{value.minute}M{value.second}S"/>'
    if isinstance(value, str):
        return f'<table:table-cell office:value-type="string"><text:p>{escape(value)}</text:p></table:table-cell>'
    return f'<table:table-cell office:value-type="float" office:value="{value!r}"/>'


def flat(sheets):
    tables = "".join(
        f"<table:table table:name={quoteattr(sheet.name)}>"
        + "".join(f"<table:table-row>{''.join(map(cell, row)) or cell(None)}</table:table-row>" for row in sheet.rows)
        + "</table:table>"
        for sheet in sheets
    )
    return (
        f'<?xml version="1.0" encoding="UTF-8"?>\n<office:document {SPACES} office:version="1.3" '
        f'office:mimetype="application/vnd.oasis.opendocument.spreadsheet">{STYLES}<office:body><office:spreadsheet>{tables}</office:spreadsheet></office:body></office:document>'
    )
