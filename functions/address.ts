import { columnLetters } from './engine/graph/address';
import type { PortArea } from './workbook';

/** Size of a worksheet. */
export const sheetRows = 1_048_576;
export const sheetCols = 16_384;

/**
 * Reads a range address as the host writes it: `Sheet1!A1:B2`, `'My sheet'!$C$4`, `Sheet1!A:A`, `Sheet1!1:3`, apostrophes doubled
 * inside quotes. The sheet of another workbook keeps its brackets, `[Book2]Sheet1`, which no sheet name of this one can hold.
 *
 * @returns   undefined for anything else: several areas, a name, no sheet.
 * @example   parseAddress("'It''s'!B3:C4") // { sheet: "It's", row: 3, col: 2, rows: 2, cols: 2 }
 */
export function parseAddress(address: string): PortArea | undefined {
  const split = /^(?:'((?:[^']|'')+)'|([^'!]+))!(.+)$/.exec(address.trim());
  if (!split) return undefined;
  const sheet = split[1] === undefined ? split[2] : split[1].replaceAll("''", "'");
  const corners = split[3].replaceAll('$', '').toUpperCase().split(':');
  if (corners.length > 2) return undefined;
  const [first, last] = [corner(corners[0]), corner(corners[corners.length - 1])];
  if (!first || !last || first.kind !== last.kind) return undefined;
  if (first.kind !== 'cell' && corners.length === 1) return undefined;
  const [r1, r2] = first.kind === 'cols' ? [1, sheetRows] : ordered(first.row, last.row);
  const [c1, c2] = first.kind === 'rows' ? [1, sheetCols] : ordered(first.col, last.col);
  return { sheet, row: r1, col: c1, rows: r2 - r1 + 1, cols: c2 - c1 + 1 };
}

/** `E7` for a cell of an area, counted from its upper left one with 0. */
export function cellName(area: PortArea, row: number, col: number): string {
  return columnLetters(area.col + col) + (area.row + row);
}

/** True for an area of another workbook. */
export const isExternal = (area: PortArea): boolean => area.sheet.includes('[');

interface Corner {
  readonly kind: 'cell' | 'rows' | 'cols';
  readonly row: number;
  readonly col: number;
}

function corner(text: string): Corner | undefined {
  const parts = /^([A-Z]{0,3})(\d{0,7})$/.exec(text);
  if (!parts || text === '') return undefined;
  const col = [...parts[1]].reduce((n, letter) => n * 26 + letter.charCodeAt(0) - 64, 0);
  const row = Number(parts[2] || 0);
  if (col > sheetCols || row > sheetRows || (parts[2] !== '' && row === 0)) return undefined;
  return { kind: parts[1] === '' ? 'rows' : parts[2] === '' ? 'cols' : 'cell', row, col };
}

const ordered = (a: number, b: number): [number, number] => (a <= b ? [a, b] : [b, a]);
