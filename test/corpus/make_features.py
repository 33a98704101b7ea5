"""Writes books with much beside their cells, by XlsxWriter, openpyxl and LibreOffice, into the folder features: python3 make_features.py

Each has a sheet "Results" with headings in row 3, samples in column A, volumes in B, factors in C, tolerances in D and results in E.
"""
import struct
import subprocess
import tempfile
import zlib
from datetime import datetime
from pathlib import Path
from random import Random

import openpyxl
import xlsxwriter
from openpyxl.chart import BarChart, Reference
from openpyxl.comments import Comment
from openpyxl.formatting.rule import ColorScaleRule, FormulaRule
from openpyxl.styles import Alignment, Border, Font, NamedStyle, PatternFill, Protection, Side
from openpyxl.workbook.defined_name import DefinedName
from openpyxl.worksheet.datavalidation import DataValidation
from openpyxl.worksheet.table import Table, TableStyleInfo

FOLDER = Path(__file__).parent / "features"
CREATED = datetime(2026, 1, 1)
ROWS = 12
draw = Random(21)
DATA = [(f"W-{i + 1:03d}", round(draw.uniform(9, 11), 3), draw.choice([1, 2, 5]), draw.choice([0.01, 0.02, 0.05])) for i in range(ROWS)]
HEADINGS = ["Sample", "Volume", "Factor", "Tolerance", "Result"]


def png():
    """A picture of 8 by 8 grey dots."""
    raw = b"".join(b"\0" + bytes(16 * (x ^ y) for x in range(8)) for y in range(8))

    def chunk(kind, data):
        return struct.pack(">I", len(data)) + kind + data + struct.pack(">I", zlib.crc32(kind + data))
    return b"\x89PNG\r\n\x1a\n" + chunk(b"IHDR", struct.pack(">IIBBBBB", 8, 8, 8, 0, 0, 0, 0)) + chunk(b"IDAT", zlib.compress(raw)) + chunk(b"IEND", b"")


def with_xlsxwriter(path, picture):
    book = xlsxwriter.Workbook(str(path))
    book.set_properties({"title": "Invented results", "created": CREATED})
    book.set_custom_property("Checked by", "nobody")
    book.set_custom_property("Version", 3)
    bold = book.add_format({"bold": True, "bg_color": "#DDEBF7", "bottom": 2, "text_wrap": True})
    grey = book.add_format({"font_color": "#777777", "italic": True})
    three = book.add_format({"num_format": "0.000", "align": "center"})
    unit = book.add_format({"num_format": '0.00" mL"'})
    red = book.add_format({"font_color": "#9C0006", "bg_color": "#FFC7CE"})
    locked = book.add_format({"locked": False})
    page = book.add_worksheet("Results")
    page.set_column("A:A", 14)
    page.set_column("B:E", 11, three)
    page.set_row(2, 30)
    page.merge_range("A1:E1", "Invented results", book.add_format({"bold": True, "font_size": 16}))
    page.write_rich_string("A2", "All data are ", bold, "invented", ", none was measured")
    page.write_row("A3", HEADINGS, bold)
    for i, (sample, volume, factor, tolerance) in enumerate(DATA):
        r = i + 3
        page.write(r, 0, sample)
        page.write(r, 1, volume, unit)
        page.write(r, 2, factor)
        page.write(r, 3, tolerance, three)
        page.write_formula(r, 4, f"=B{r + 1}*C{r + 1}*Factor", three, volume * factor * 1.5)
    last = 3 + ROWS
    page.write_formula(f"E{last + 2}", f"=SUM(E4:E{last})", three, sum(v * f * 1.5 for _, v, f, _ in DATA))
    page.write_array_formula(f"B{last + 2}:B{last + 2}", f"{{=SUM(B4:B{last}*C4:C{last})}}", three, sum(v * f for _, v, f, _ in DATA))
    page.freeze_panes(3, 1)
    page.autofilter(f"A3:E{last}")
    page.conditional_format(f"E4:E{last}", {"type": "cell", "criteria": ">", "value": 60, "format": red})
    page.conditional_format(f"B4:B{last}", {"type": "data_bar", "data_bar_2010": True, "bar_color": "#63C384"})
    page.conditional_format(f"C4:C{last}", {"type": "icon_set", "icon_style": "3_traffic_lights"})
    page.conditional_format(f"D4:D{last}", {"type": "3_color_scale"})
    page.data_validation(f"C4:C{last}", {"validate": "list", "source": [1, 2, 5], "input_title": "Factor"})
    page.write_comment("B4", "read twice", {"author": "analyst"})
    page.write_comment("E5", "above the limit?", {"visible": True})
    page.write_url("H2", "https://example.org/method", string="method")
    page.insert_image("H4", str(picture), {"x_scale": 4, "y_scale": 4})
    page.insert_textbox("H9", "Volumes at 20 °C", {"width": 160, "height": 40})
    page.insert_button("H12", {"caption": "Print"})
    for i in range(ROWS):
        page.add_sparkline(i + 3, 6, {"range": f"Results!B{i + 4}:E{i + 4}"})
    chart = book.add_chart({"type": "column"})
    chart.add_series({"name": "Result", "categories": f"=Results!$A$4:$A${last}", "values": f"=Results!$E$4:$E${last}", "trendline": {"type": "linear"}})
    chart.set_title({"name": "Results"})
    page.insert_chart("J2", chart)
    page.set_header("&L&F&R&D")
    page.set_footer("&CPage &P of &N")
    page.repeat_rows(2)
    page.set_landscape()
    page.set_paper(9)
    page.print_area(f"A1:E{last + 2}")
    page.set_h_pagebreaks([10])
    other = book.add_worksheet("Protected")
    other.protect("secret", {"sort": True})
    other.write("A1", "Factor")
    other.write("B1", 1.5, locked)
    other.write_formula("B2", "=B1*2", grey, 3)
    other.set_row(4, None, None, {"level": 1, "hidden": True})
    other.set_row(5, None, None, {"collapsed": True})
    lists = book.add_worksheet("Lists")
    lists.add_table("B2:D6", {"name": "Lots", "columns": [{"header": "Lot"}, {"header": "Mass"}, {"header": "Half", "formula": "=[@Mass]/2"}], "total_row": False, "data": [["a", 1], ["b", 2], ["c", 3], ["d", 4]]})
    for i in range(4):
        lists.write_formula(f"D{i + 3}", "=Lots[[#This Row],[Mass]]/2", None, (i + 1) / 2)
    lists.hide()
    sheet = book.add_chartsheet("Picture")
    line = book.add_chart({"type": "line"})
    line.add_series({"values": f"=Results!$B$4:$B${last}"})
    sheet.set_chart(line)
    book.define_name("Factor", "=Protected!$B$1")
    book.define_name("Twice", "=Protected!$B$1*2+1")
    book.define_name("Results!Local", "=Results!$B$4")
    book.close()


def with_openpyxl(path):
    book = openpyxl.Workbook()
    page = book.active
    page.title = "Results"
    name = NamedStyle(name="Heading of ours", font=Font(bold=True, color="FF1F4E78"), border=Border(bottom=Side(style="double")), fill=PatternFill("solid", fgColor="FFFFF2CC"))
    book.add_named_style(name)
    page.merge_cells("A1:E1")
    page["A1"] = "Invented results"
    page["A1"].alignment = Alignment(horizontal="center", wrap_text=True)
    for col, text in enumerate(HEADINGS, 1):
        page.cell(3, col, text).style = "Heading of ours"
    for i, (sample, volume, factor, tolerance) in enumerate(DATA):
        r = i + 4
        for col, value in enumerate((sample, volume, factor, tolerance, f"=B{r}*C{r}*Factor"), 1):
            page.cell(r, col, value)
        page.cell(r, 5).number_format = "0.000"
        page.cell(r, 2).protection = Protection(locked=False, hidden=True)
    page["B5"].comment = Comment("read twice", "analyst", height=60, width=120)
    page.conditional_formatting.add("E4:E15", ColorScaleRule(start_type="min", start_color="FFF8696B", end_type="max", end_color="FF63BE7B"))
    page.conditional_formatting.add("D4:D15", FormulaRule(formula=["$D4>0.02"], font=Font(color="FFFF0000")))
    choice = DataValidation(type="list", formula1='"1,2,5"', allow_blank=True)
    page.add_data_validation(choice)
    choice.add("C4:C15")
    chart = BarChart()
    chart.add_data(Reference(page, min_col=5, min_row=3, max_row=15), titles_from_data=True)
    chart.set_categories(Reference(page, min_col=1, min_row=4, max_row=15))
    page.add_chart(chart, "H3")
    page.freeze_panes = "B4"
    page.auto_filter.ref = "A3:E15"
    page.print_title_rows = "3:3"
    page.oddHeader.center.text = "&F"
    page.column_dimensions["A"].width = 16
    page.column_dimensions.group("K", "M", hidden=True)
    page["A20"].hyperlink = "https://example.org/method"
    page["A20"] = "method"
    other = book.create_sheet("Lots")
    for row in (["Lot", "Mass"], ["a", 1], ["b", 2]):
        other.append(row)
    table = Table(displayName="Lots", ref="A1:B3")
    table.tableStyleInfo = TableStyleInfo(name="TableStyleLight9", showRowStripes=True)
    other.add_table(table)
    other["D1"] = 1.5
    other.sheet_state = "hidden"
    picture = book.create_chartsheet("Picture")
    line = BarChart()
    line.add_data(Reference(page, min_col=2, min_row=4, max_row=15))
    picture.add_chart(line)
    book.defined_names.append(DefinedName("Factor", attr_text="Lots!$D$1"))
    book.properties.created = book.properties.modified = CREATED
    book.save(path)


def main():
    FOLDER.mkdir(exist_ok=True)
    with tempfile.TemporaryDirectory() as folder:
        picture = Path(folder) / "dots.png"
        picture.write_bytes(png())
        with_xlsxwriter(FOLDER / "xlsxwriter.xlsx", picture)
        with_openpyxl(FOLDER / "openpyxl.xlsx")
        subprocess.run(["soffice", f"-env:UserInstallation=file://{folder}/profile", "--headless", "--convert-to", "xlsx", "--outdir", folder, str(FOLDER / "xlsxwriter.xlsx")],
                       check=True, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)
        (FOLDER / "libreoffice.xlsx").write_bytes((Path(folder) / "xlsxwriter.xlsx").read_bytes())


if __name__ == "__main__":
    main()
