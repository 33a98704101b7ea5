import { cellName, parseAddress, sheetCols, sheetRows } from './address';
import { CellError, errorCodes, refusal, toExcelError } from './errors';
import type { ErrorCode } from './errors';
import type { PortArea } from './workbook';

/*
 * The only place that knows how Excel hands cells over and takes them back. A blank cell arrives as 0 on one platform and as null on
 * another, an omitted argument as null, an error inside a range as an object, a number with properties as an object with a basic value;
 * a number stored as text and a boolean arrive as they are. Going back, NaN and infinity inside an array would show as 0.
 */

/** A 0 that may be a blank cell, where the cell cannot be looked up. */
export const ZERO_OR_BLANK: unique symbol = Symbol('0 or blank');

/** A data type without a value of its own: an entity, an array, a picture. */
export class DataTypeCell {
  constructor(readonly type: string) {}
}

/** One cell of an argument; null is a blank one, and so is the text "". */
export type Cell = number | string | boolean | null | CellError | DataTypeCell | typeof ZERO_OR_BLANK;

/** What a body gives for one cell; "" for a blank one. */
export type CellResult = number | string | boolean | CellError;

/** An argument as a rectangle of cells. */
export interface Grid {
  readonly rows: number;
  readonly cols: number;
  readonly cells: readonly (readonly Cell[])[];
  /** Where it stands, if it is a reference and the host tells. */
  readonly area?: PortArea;
}

export function readCell(raw: unknown): Cell {
  switch (typeof raw) {
    case 'number':
      return Number.isFinite(raw) ? raw : new CellError('#NUM!');
    case 'string':
      return raw === '' ? null : raw;
    case 'boolean':
      return raw;
    case 'object':
      return raw === null ? null : readObject(raw as Record<string, unknown>);
    default:
      return null;
  }
}

/** Number with properties, entity, error value: data types; and the host's own error object, which has a code. */
function readObject(raw: Record<string, unknown>): Cell {
  if (typeof raw.code === 'string' && raw.code.startsWith('#')) return new CellError(knownCode(raw.code));
  if (raw.type === 'Error') return new CellError(knownCode(raw.basicValue));
  if (raw.type === 'Empty') return null;
  if (['Double', 'FormattedNumber', 'String', 'Boolean'].includes(String(raw.type)) && typeof raw.basicValue !== 'object')
    return readCell(raw.basicValue);
  return new DataTypeCell(typeof raw.type === 'string' ? raw.type : 'unknown');
}

const knownCode = (code: unknown): ErrorCode => errorCodes.find((known) => known === code) ?? '#VALUE!';

/** The raw rectangle of an argument: one cell for a scalar, a blank or an omitted one. */
export function rawRows(raw: unknown): readonly (readonly unknown[])[] {
  if (!Array.isArray(raw)) return [[raw]];
  const rows = raw.filter((row): row is unknown[] => Array.isArray(row) && row.length > 0);
  return rows.length > 0 ? rows : [[null]];
}

/** Where an argument stands; undefined where the address is missing or does not fit what was handed over. */
export function areaOf(rows: readonly (readonly unknown[])[], address: string | undefined): PortArea | undefined {
  const area = address ? parseAddress(address) : undefined;
  return area && area.rows === rows.length && area.cols === rows[0].length ? area : undefined;
}

/** A whole column, or one that begins below some header rows. */
export const isWholeColumn = (rows: readonly unknown[]): boolean => rows.length > sheetRows - 1000;
export const isWholeRow = (rows: readonly (readonly unknown[])[]): boolean => rows[0].length >= sheetCols;

/** Number of leading rows up to the last one that surely holds something, and up to the last one that holds something or 0. */
export function filledRows(rows: readonly (readonly unknown[])[]): { sure: number; possible: number } {
  let sure = 0;
  let possible = 0;
  for (let i = rows.length; i > 0 && sure === 0; i--) {
    for (const raw of rows[i - 1]) {
      if (raw == null || raw === '') continue;
      if (possible === 0) possible = i;
      if (raw !== 0) sure = i;
    }
  }
  return { sure, possible };
}

/** The first rows of an argument as a grid. */
export function gridOf(rows: readonly (readonly unknown[])[], area: PortArea | undefined, height = rows.length): Grid {
  const kept = height < rows.length ? rows.slice(0, Math.max(1, height)) : rows;
  return {
    rows: kept.length,
    cols: kept[0].length,
    cells: kept.map((row) => row.map(readCell)),
    area: area && { ...area, rows: kept.length },
  };
}

/** ` in cell B7` where the address is known, ` in row 3` or ` in row 3, column 2` otherwise, nothing for a single cell. */
export function whereIn(grid: Grid, row: number, col: number): string {
  if (grid.area) return ` in cell ${cellName(grid.area, row, col)}`;
  if (grid.rows === 1 && grid.cols === 1) return '';
  return grid.cols === 1 ? ` in row ${row + 1}` : ` in row ${row + 1}, column ${col + 1}`;
}

/** A cell in words, for a message. */
export function showCell(cell: Cell): string {
  if (cell === null) return 'a blank cell';
  if (cell === ZERO_OR_BLANK) return '0 or a blank cell';
  if (cell instanceof CellError) return `the error ${cell.code}`;
  if (cell instanceof DataTypeCell) return `a data type (${cell.type})`;
  if (typeof cell === 'string') return `the text "${cell.length > 40 ? `${cell.slice(0, 40)}…` : cell}"`;
  return typeof cell === 'boolean' ? String(cell).toUpperCase() : showNumber(cell);
}

/** A number with the 15 digits of a worksheet. */
export const showNumber = (x: number): string => (x === Infinity ? 'inf' : String(Number(x.toPrecision(15))));

/**
 * A result as the host takes it: a full rectangle, errors as the host's own objects, no NaN, no infinity, nothing missing.
 *
 * @param name   The function, for the messages.
 */
export function writeCells(name: string, result: readonly (readonly CellResult[])[]): unknown[][] {
  const width = result.reduce((longest, row) => Math.max(longest, row.length), 0);
  if (width === 0) return [[toExcelError(name, refusal('fault in the library (an empty result)'))]];
  return result.map((row) => Array.from({ length: width }, (_, i) => writeCell(name, i < row.length ? row[i] : '')));
}


function writeCell(name: string, cell: CellResult): unknown {
  if (cell instanceof CellError) return toExcelError(name, cell);
  if (typeof cell === 'number') {
    if (!Number.isFinite(cell)) return toExcelError(name, refusal('the result is not a finite number'));
    return cell === 0 ? 0 : cell;
  }
  if (typeof cell === 'string' || typeof cell === 'boolean') return cell;
  return toExcelError(name, refusal(`fault in the library (a result of type ${typeof cell})`));
}
