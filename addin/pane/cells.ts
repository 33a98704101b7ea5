import type { PortArea, PortCell, WorkbookPort } from '../../functions/workbook';
import { addressOf } from './areas';

/** The cells of one area, row by row. */
export async function cellsOf(port: WorkbookPort, area: PortArea): Promise<(PortCell | null)[][]> {
  const [{ cells }] = await port.read([area]);
  return Array.from({ length: area.rows }, (_, r) => cells.slice(r * area.cols, (r + 1) * area.cols));
}

/** Addresses of cells in an area that hold something. */
export async function occupied(port: WorkbookPort, area: PortArea): Promise<string[]> {
  const cells = await cellsOf(port, area);
  return cells.flatMap((row, r) => row.flatMap((cell, c) => (cell === null ? [] : [addressOf({ ...area, row: area.row + r, col: area.col + c, rows: 1, cols: 1 }, area.sheet)])));
}

/** The first column right of an area in which its rows and the row above are free, so many columns wide. */
export async function freeColumn(port: WorkbookPort, { sheet, row, col, rows, cols }: PortArea, width: number): Promise<number> {
  const used = (await port.sheets()).find((s) => s.name === sheet)?.cols ?? 0;
  for (let at = col + cols; ; at++) {
    if (at > used) return at;
    if ((await occupied(port, { sheet, row: Math.max(1, row - 1), col: at, rows: rows + (row > 1 ? 1 : 0), cols: width })).length === 0) return at;
  }
}

/** The heading above an area: the nearest text over its first column, a few rows up. */
export async function headingOf(port: WorkbookPort, { sheet, row, col }: PortArea): Promise<string> {
  for (let at = row - 1; at >= Math.max(1, row - 5); at--) {
    const [[cell]] = await cellsOf(port, { sheet, row: at, col, rows: 1, cols: 1 });
    if (typeof cell?.value === 'string' && cell.value.trim() !== '') return cell.value.trim();
  }
  return '';
}

/** The part of a selection that holds numbers: without a heading at the top, without blank rows at the end. */
export async function numbersIn(port: WorkbookPort, area: PortArea): Promise<PortArea | undefined> {
  const sheet = (await port.sheets()).find((s) => s.name === area.sheet);
  const bounded = { ...area, rows: Math.min(area.rows, Math.max(0, (sheet?.rows ?? 0) - area.row + 1)) };
  if (bounded.rows === 0) return undefined;
  const cells = await cellsOf(port, bounded);
  const isNumeric = (row: (PortCell | null)[]): boolean => row.some((cell) => typeof cell?.value === 'number');
  const first = cells.findIndex(isNumeric);
  if (first < 0) return undefined;
  let last = cells.length - 1;
  while (!isNumeric(cells[last])) last--;
  return { ...bounded, row: bounded.row + first, rows: last - first + 1 };
}
