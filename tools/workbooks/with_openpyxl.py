"""Writes sheets with openpyxl."""
import io

import openpyxl
from openpyxl.utils.datetime import CALENDAR_MAC_1904

from grid import Formula, Styled, format_of
from repack import repack

OPENPYXL = f"openpyxl {openpyxl.__version__}"


def write(sheets, is_1904=False):
    book = openpyxl.Workbook()
    book.remove(book.active)
    if is_1904:
        book.epoch = CALENDAR_MAC_1904
    for sheet in sheets:
        target = book.create_sheet(sheet.name)
        for number, cells in enumerate(sheet.rows, 1):
            for column, value in enumerate(cells, 1):
                if value is not None:
                    put(target.cell(number, column), value)
        for ref in sheet.merged:
            target.merge_cells(ref)
        for number in sheet.hidden_rows:
            target.row_dimensions[number].hidden = True
        for letters in sheet.hidden_columns:
            target.column_dimensions[letters].hidden = True
        if sheet.filter_ref:
            target.auto_filter.ref = sheet.filter_ref
        target.sheet_state = sheet.state
    out = io.BytesIO()
    book.save(out)
    return repack(out.getvalue())


def put(cell, value):
    """openpyxl stores no results beside formulas."""
    given = value.format if isinstance(value, (Styled, Formula)) else None
    plain = value.text if isinstance(value, Formula) else value.value if isinstance(value, Styled) else value
    cell.value = plain
    shown = format_of(plain, given)
    if shown:
        cell.number_format = shown
