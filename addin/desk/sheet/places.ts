import { cellKey, cellOfKey, MAX_COLS, MAX_ROWS } from '../book/area';
import type { Area } from '../book/area';
import { cellName, sheetPrefix } from '../../../functions/engine/graph/address';
import type { CellPlace } from '../../../functions/engine/graph/cellGraph';

/** Cells of one sheet take this many numbers. */
const SHEET = MAX_ROWS * MAX_COLS * 2;

/** One number for a cell of the workbook: by sheet, then row, then column. */
export const placeKey = (sheet: number, row: number, col: number): number => sheet * SHEET + cellKey(row, col);

export function placeOf(key: number): CellPlace {
  const sheet = Math.floor(key / SHEET);
  return { sheet, ...cellOfKey(key - sheet * SHEET) };
}

/** `Sheet1!B7`, the sheet quoted where it has to be: as Excel gives a calling cell and what a message names. */
export const addressOf = (sheet: string, row: number, col: number): string => cellName(row, col, sheet);

/** `'My sheet'!A1:B2`, `Sheet1!A:C`, `Sheet1!1:3`: as Excel gives the address of an argument. */
export function rangeAddress(sheet: string, { top, left, bottom, right }: Area): string {
  const first = cellName(top, left);
  const last = cellName(bottom, right);
  const prefix = sheetPrefix(sheet);
  if (top === 1 && bottom === MAX_ROWS) return `${prefix}${first.replace(/\d+$/, '')}:${last.replace(/\d+$/, '')}`;
  if (left === 1 && right === MAX_COLS) return `${prefix}${top}:${bottom}`;
  return `${prefix}${first}${first === last ? '' : `:${last}`}`;
}
