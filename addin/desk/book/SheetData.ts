import { contains } from './area';
import type { Area } from './area';
import type { BookCell } from './BookCell';

/** The stored cells of a row, columns ascending. */
export interface RowRecord {
  row: number;
  cols: number[];
  cells: BookCell[];
  /** Style that empty cells of the row take, if the row has one. */
  style?: number;
  hidden?: boolean;
}

/** A shared formula: the cells that hold it, and how to write it for one of them. */
export interface SharedGroup {
  si: string;
  owner: number;
  /** Keys (see `cellKey`) of the cells that only point to the owner, in file order. */
  followers: number[];
  formula(row: number, col: number): string;
}

/** One worksheet as read. */
export interface SheetData {
  rows: RowRecord[];
  byRow: Map<number, RowRecord>;
  /** Array formulas over more than one cell, and data tables. */
  arrays: { ref: Area; row: number; col: number; dynamic: boolean }[];
  dataTables: Area[];
  shared: SharedGroup[];
  merges: Area[];
  /** Areas of filters that are in force: with a condition on some column. Tables keep their own. */
  filters: Area[];
  columnStyles: { first: number; last: number; style: number }[];
  protected: boolean;
  mainUri: string;
}

/** The record of a cell, or undefined where the file holds none. */
export function storedCell(sheet: SheetData, row: number, col: number): BookCell | undefined {
  const record = sheet.byRow.get(row);
  if (!record) return undefined;
  let low = 0;
  let high = record.cols.length - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    const at = record.cols[middle];
    if (at === col) return record.cells[middle];
    if (at < col) low = middle + 1;
    else high = middle - 1;
  }
  return undefined;
}

/** The cell as a user sees it: also one that shows part of an array formula although the file holds no record of it. */
export function cellAt(sheet: SheetData, row: number, col: number): BookCell | undefined {
  const cell = storedCell(sheet, row, col);
  if (cell) return cell;
  const array = sheet.arrays.find(({ ref }) => contains(ref, row, col));
  if (array) {
    const partOfArray = { row: array.row, col: array.col, dynamic: array.dynamic };
    return { value: undefined, style: defaultStyle(sheet, row, col), partOfArray };
  }
  if (sheet.dataTables.some((area) => contains(area, row, col))) {
    return { value: undefined, style: defaultStyle(sheet, row, col), dataTable: true };
  }
  return undefined;
}

/** The style that a new cell takes: its row's, else its column's, else the default. */
export function defaultStyle(sheet: SheetData, row: number, col: number): number {
  return sheet.byRow.get(row)?.style ?? sheet.columnStyles.find(({ first, last }) => col >= first && col <= last)?.style ?? 0;
}

/** Whether a cell holds or shows something. */
export function isOccupied(cell: BookCell | undefined): boolean {
  return cell !== undefined && (cell.value !== null || cell.formula !== undefined || cell.partOfArray !== undefined || cell.dataTable !== undefined);
}

/** Stored cells inside an area, in row-major order. */
export function* storedIn(sheet: SheetData, area: Area): Generator<[row: number, col: number, cell: BookCell]> {
  const few = area.bottom - area.top < sheet.rows.length;
  for (let i = 0; i < (few ? area.bottom - area.top + 1 : sheet.rows.length); i++) {
    const record = few ? sheet.byRow.get(area.top + i) : sheet.rows[i];
    if (!record || record.row < area.top || record.row > area.bottom) continue;
    for (let j = 0; j < record.cols.length; j++) {
      if (record.cols[j] >= area.left && record.cols[j] <= area.right) yield [record.row, record.cols[j], record.cells[j]];
    }
  }
}

