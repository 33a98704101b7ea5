import { BookError } from './BookError';

/** A rectangle of cells, 1-based, both ends included. */
export interface Area {
  top: number;
  left: number;
  bottom: number;
  right: number;
}

/** One cell, 1-based. */
export interface CellAddress {
  row: number;
  col: number;
}

/** The size of a worksheet (ECMA-376 leaves it open; these are the limits of the file's usual reader). */
export const MAX_ROWS = 1_048_576;
export const MAX_COLS = 16_384;

/** 1 is "A", 27 is "AA". */
export function columnName(col: number): string {
  let name = '';
  for (let left = col; left > 0; left = Math.floor((left - 1) / 26)) {
    name = String.fromCharCode(65 + ((left - 1) % 26)) + name;
  }
  return name;
}

/** "A" is 1; letters of either case. NaN for other characters. */
export function columnNumber(name: string): number {
  let col = 0;
  for (let i = 0; i < name.length; i++) {
    const letter = (name.charCodeAt(i) | 32) - 96;
    if (letter < 1 || letter > 26) return NaN;
    col = col * 26 + letter;
  }
  return col === 0 ? NaN : col;
}

/** `B3`, without `$`. */
export function cellName(row: number, col: number): string {
  return columnName(col) + row;
}

/** Reads `B3` or `$B$3`; undefined for anything else and beyond the edges of a sheet. */
export function parseCell(text: string): CellAddress | undefined {
  const match = /^\$?([A-Za-z]{1,3})\$?([1-9]\d{0,6})$/.exec(text);
  if (!match) return undefined;
  const row = Number(match[2]);
  const col = columnNumber(match[1]);
  return row <= MAX_ROWS && col <= MAX_COLS ? { row, col } : undefined;
}

/** Reads `B3` or `B3:C9`, corners in any order. @throws BookError that begins with `where`. */
export function parseArea(text: string, where: string): Area {
  const parts = text.trim().split(':');
  const first = parseCell(parts[0]);
  const last = parts.length === 1 ? first : parts.length === 2 ? parseCell(parts[1]) : undefined;
  if (!first || !last) throw new BookError(`${where} needs an area such as A1:B2, got "${text.slice(0, 60)}"`);
  return {
    top: Math.min(first.row, last.row),
    left: Math.min(first.col, last.col),
    bottom: Math.max(first.row, last.row),
    right: Math.max(first.col, last.col),
  };
}

/** `A1:B2`, or `A1` for a single cell. */
export function areaName(area: Area): string {
  const first = cellName(area.top, area.left);
  return isOneCell(area) ? first : `${first}:${cellName(area.bottom, area.right)}`;
}

export function isOneCell(area: Area): boolean {
  return area.top === area.bottom && area.left === area.right;
}

export function contains(area: Area, row: number, col: number): boolean {
  return row >= area.top && row <= area.bottom && col >= area.left && col <= area.right;
}

export function intersects(a: Area, b: Area): boolean {
  return a.top <= b.bottom && b.top <= a.bottom && a.left <= b.right && b.left <= a.right;
}

/** One number for a cell, in row-major order. */
export function cellKey(row: number, col: number): number {
  return row * MAX_COLS + (col - 1);
}

export function cellOfKey(key: number): CellAddress {
  return { row: Math.floor(key / MAX_COLS), col: (key % MAX_COLS) + 1 };
}
