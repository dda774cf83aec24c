"""Writes sheets with XlsxWriter."""
import datetime as dt
import io
import os
import tempfile

import xlsxwriter

from grid import Formula, Styled, format_of
from repack import repack

XLSXWRITER = f"XlsxWriter {xlsxwriter.__version__}"


def write(sheets, is_1904=False, macros=None, is_inline=False, decorate=None):
    """`macros`: bytes put into the package as its VBA project, which nobody runs; `decorate` adds what is no cell."""
    out = io.BytesIO()
    options = {"in_memory": True, "default_date_format": None}
    if is_1904:
        options["date_1904"] = True
    if is_inline:
        options = {"constant_memory": True}
    book = xlsxwriter.Workbook(out, options)
    book.set_properties({"created": dt.datetime(2026, 3, 2)})
    formats = {}
    for sheet in sheets:
        target = book.add_worksheet(sheet.name)
        for number, cells in enumerate(sheet.rows):
            for column, value in enumerate(cells):
                if value is not None:
                    put(target, number, column, value, lambda code: formats.setdefault(code, book.add_format({"num_format": code})))
        for ref in sheet.merged:
            merge(target, sheet, ref, book)
        for number in sheet.hidden_rows:
            target.set_row(number - 1, None, None, {"hidden": True})
        for letters in sheet.hidden_columns:
            target.set_column(f"{letters}:{letters}", None, None, {"hidden": True})
        if sheet.filter_ref:
            target.autofilter(sheet.filter_ref)
        if sheet.state == "hidden":
            target.hide()
    if decorate:
        decorate(book, book.worksheets())
    if macros is not None:
        with tempfile.TemporaryDirectory() as folder:
            path = os.path.join(folder, "vbaProject.bin")
            with open(path, "wb") as file:
                file.write(macros)
            book.add_vba_project(path)
            book.close()
    else:
        book.close()
    return repack(out.getvalue())


def put(target, row, column, value, format_for):
    given = value.format if isinstance(value, (Styled, Formula)) else None
    plain = value.value if isinstance(value, Styled) else value
    code = format_of(plain, given)
    style = format_for(code) if code else None
    if isinstance(value, Formula):
        target.write_formula(row, column, value.text, style, value.cached)
    elif isinstance(plain, (dt.datetime, dt.date, dt.time)):
        target.write_datetime(row, column, plain, style)
    elif isinstance(plain, str):
        target.write_string(row, column, plain, style)
    else:
        target.write(row, column, plain, style)


def merge(target, sheet, ref, book):
    first = ref.split(":")[0]
    letters, number = first.rstrip("0123456789"), int(first.lstrip("ABCDEFGHIJKLMNOPQRSTUVWXYZ"))
    column = 0
    for letter in letters:
        column = column * 26 + ord(letter) - 64
    cells = sheet.rows[number - 1]
    value = cells[column - 1] if column <= len(cells) else None
    target.merge_range(ref, "" if value is None else value, book.add_format({"align": "center"}))
