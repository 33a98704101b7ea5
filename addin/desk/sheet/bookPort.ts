import type { PortArea, PortCell, PortName, PortSheet, PortTable, PortTile, WorkbookPort } from '../../../functions/workbook';
import { placeKey } from './places';
import type { WorkingBook } from './WorkingBook';

/** What the functions may read of a working book: its cells as they stand now. */
export function bookPort(working: WorkingBook): WorkbookPort {
  const { book } = working;
  const area = (sheet: number, top: number, left: number, bottom: number, right: number): PortArea =>
    ({ sheet: working.sheetName(sheet), row: top, col: left, rows: bottom - top + 1, cols: right - left + 1 });
  return {
    revision: () => working.revision,
    sheets: async (): Promise<PortSheet[]> => book.sheets.map(({ name, index }) => ({ name, ...working.used(index) })),
    date1904: async () => book.date1904,
    names: async (): Promise<PortName[]> => working.allNames().map(({ name, sheet, formula }) =>
      ({ name, formula, ...(sheet !== undefined && { sheet: working.sheetName(sheet) }) })),
    tables: async (): Promise<PortTable[]> => working.tables.map(({ name, sheet, ref, columns, headerRows, totalsRows }) =>
      ({ name, area: area(sheet, ref.top, ref.left, ref.bottom, ref.right), columns, headerRows, totalsRows })),
    hiddenRows: async (sheet) => [...(working.hiddenRows(working.sheetIndex(sheet)!))].map(([row, state]) => ({ row, filtered: state === 'filtered' })),
    read: async (areas): Promise<PortTile[]> => areas.map((asked) => ({ area: asked, cells: cellsOf(working, asked) })),
  };
}

function cellsOf(working: WorkingBook, { sheet, row, col, rows, cols }: PortArea): (PortCell | null)[] {
  const place = working.sheetIndex(sheet);
  const cells: (PortCell | null)[] = [];
  for (let r = 0; r < rows; r++) for (let c = 0; c < cols; c++) cells.push(place === undefined ? null : portCell(working, place, row + r, col + c));
  return cells;
}

function portCell(working: WorkingBook, sheet: number, row: number, col: number): PortCell | null {
  const cell = working.cell(sheet, row, col);
  if (!cell) return null;
  const { value, formula, array, partOf, hidden } = cell;
  return {
    value,
    ...(formula !== undefined && { formula: working.relativeFormula(placeKey(sheet, row, col), cell) }),
    ...(formula !== undefined && !array && { implicit: true }),
    ...(array && { array: { rows: array.rows, cols: array.cols } }),
    ...(partOf && { partOf: { row: partOf.row, col: partOf.col } }),
    ...(hidden && { hidden }),
  };
}
