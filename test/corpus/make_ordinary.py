"""Writes the ordinary books with XlsxWriter and with openpyxl into the folder books: python3 make_ordinary.py

Neither of them computes. LibreOffice does: its results are read from a copy and stored in the XlsxWriter books; the openpyxl books stay
without results, as that library leaves them. Needs soffice, openpyxl 3.0 and XlsxWriter 3.0.
"""
import subprocess
import tempfile
from datetime import datetime
from pathlib import Path

import openpyxl
import xlsxwriter
from openpyxl.utils.cell import coordinate_from_string, column_index_from_string, get_column_letter, range_boundaries
from openpyxl.utils.datetime import to_excel
from openpyxl.worksheet.table import Table, TableFormula

from ordinary_books import BOOKS

FOLDER = Path(__file__).parent / "books"
CREATED = datetime(2026, 1, 1)


def place(address):
    letters, row = coordinate_from_string(address)
    return row - 1, column_index_from_string(letters) - 1


def with_xlsxwriter(path, sheets, values):
    """values: sheet name -> address -> stored result, or None before they are known."""
    book = xlsxwriter.Workbook(str(path))
    book.set_properties({"created": CREATED})
    for spec in sheets:
        page = book.add_worksheet(spec["name"])
        known = (values or {}).get(spec["name"], {})
        for address, content in spec["cells"].items():
            row, col = place(address)
            if isinstance(content, str) and content.startswith("="):
                page.write_formula(row, col, content, None, known.get(address, 0))
            elif isinstance(content, str):
                page.write_string(row, col, content)
            else:
                page.write(row, col, content)
        for area, formula in spec["arrays"].items():
            left, top, right, bottom = range_boundaries(area)
            page.write_array_formula(top - 1, left - 1, bottom - 1, right - 1, formula, None, known.get(f"{get_column_letter(left)}{top}", 0))
            for r in range(top, bottom + 1):
                for c in range(left, right + 1):
                    if (r, c) != (top, left):
                        page.write(r - 1, c - 1, known.get(f"{get_column_letter(c)}{r}", 0))
        if spec["filter"]:
            area, col, condition, out = spec["filter"]
            page.autofilter(area)
            page.filter_column(col, condition)
            for r in out:
                page.set_row(r - 1, None, None, {"hidden": True})
        for r in spec["hidden"]:
            page.set_row(r - 1, None, None, {"hidden": True})
        if spec["table"]:
            area, name, headers, formulas = spec["table"]
            page.add_table(area, {"name": name, "columns": [{"header": h} | ({"formula": formulas[h]} if h in formulas else {}) for h in headers]})
            for address, content in spec["cells"].items():  # the table has written its formulas with 0 as their result
                row, col = place(address)
                if isinstance(content, str) and content.startswith("="):
                    page.write_formula(row, col, content, None, known.get(address, 0))
    book.close()


def with_openpyxl(path, sheets):
    book = openpyxl.Workbook()
    book.remove(book.active)
    for spec in sheets:
        page = book.create_sheet(spec["name"])
        for address, content in spec["cells"].items():
            page[address] = content
            if isinstance(content, str) and not content.startswith("="):
                page[address].data_type = "s"
        for area, formula in spec["arrays"].items():
            left, top, _, _ = range_boundaries(area)
            first = f"{get_column_letter(left)}{top}"
            page[first] = formula
            page.formula_attributes[first] = {"t": "array", "ref": area}
        if spec["filter"]:
            area, col, _, out = spec["filter"]
            page.auto_filter.ref = area
            page.auto_filter.add_filter_column(col, ["shelf A", "cold room"])
            for r in out:
                page.row_dimensions[r].hidden = True
        for r in spec["hidden"]:
            page.row_dimensions[r].hidden = True
        if spec["table"]:
            area, name, headers, formulas = spec["table"]
            table = Table(displayName=name, ref=area)
            table._initialise_columns()
            for column, header in zip(table.tableColumns, headers):
                column.name = header
                if header in formulas:
                    column.calculatedColumnFormula = TableFormula(attr_text=formulas[header][1:])
            page.add_table(table)
    book.properties.created = book.properties.modified = CREATED
    book.save(path)


def computed(path):
    """What LibreOffice shows in each cell: sheet name -> address -> value."""
    with tempfile.TemporaryDirectory() as folder:
        subprocess.run(["soffice", f"-env:UserInstallation=file://{folder}/profile", "--headless", "--convert-to", "xlsx", "--outdir", f"{folder}/out", str(path)],
                       check=True, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)
        book = openpyxl.load_workbook(f"{folder}/out/{path.name}", data_only=True)
        return {page.title: {cell.coordinate: plain(cell.value) for row in page.iter_rows() for cell in row if cell.value is not None} for page in book}


def plain(value):
    return to_excel(value) if isinstance(value, datetime) else value


def empty_results(sheets, values):
    """A formula that shows empty text is read back as nothing."""
    for spec in sheets:
        for address, content in spec["cells"].items():
            if isinstance(content, str) and content.startswith("="):
                values[spec["name"]].setdefault(address, "")


def main():
    FOLDER.mkdir(exist_ok=True)
    for name, build in BOOKS.items():
        sheets = build()
        with tempfile.TemporaryDirectory() as folder:
            draft = Path(folder) / f"{name}.xlsx"
            with_openpyxl(draft, sheets)
            values = computed(draft)
        empty_results(sheets, values)
        with_xlsxwriter(FOLDER / f"{name}-xlsxwriter.xlsx", sheets, values)
        with_openpyxl(FOLDER / f"{name}-openpyxl.xlsx", sheets)
        print(name, sum(isinstance(c, str) and c.startswith("=") for s in sheets for c in s["cells"].values()), "formulas")


if __name__ == "__main__":
    main()
