import { cellName, columnNumber, MAX_COLS, MAX_ROWS, parseCell } from '../book/area';
import type { Desk } from './Desk';
import { headersOf } from './Plan';
import type { PlanColumn } from './Plan';
import { showValue } from './values';

/** Where an entry of a plan goes in a workbook. Rows and columns are 1-based. */
export interface PlanTarget {
  readonly sheet: number;
  readonly headerRow: number;
  readonly left: number;
  readonly first: number;
  readonly last: number;
}

/** An entry that does not fit the workbook; the message names the place and what is needed. */
export class PlanRefusal extends Error {
  override name = 'PlanRefusal';
}

/**
 * Finds the place of an entry.
 *
 * @throws PlanRefusal if the workbook has no such sheet, heading or rows.
 */
export async function planTarget(desk: Desk, column: PlanColumn): Promise<PlanTarget> {
  const { working } = desk;
  const sheet = working.sheetIndex(column.sheet);
  if (sheet === undefined) throw new PlanRefusal(`the workbook has no sheet ${column.sheet}`);
  if (working.book.sheets[sheet].kind !== 'worksheet') throw new PlanRefusal(`sheet ${column.sheet} has no cells`);
  const { row, col } = parseCell(column.anchor) ?? besideHeading(desk, sheet, column);
  const [first, last] = await rowsOf(desk, sheet, row, column);
  if (first <= row) throw new PlanRefusal(`rows ${column.rows} must lie below the heading in ${cellName(row, col)}`);
  if (last > MAX_ROWS || col + headersOf(column).length - 1 > MAX_COLS) throw new PlanRefusal('its columns reach beyond the edge of the sheet');
  return { sheet, headerRow: row, left: col, first, last };
}

/** The first place to the right of a heading that is free, or that has the entry's own heading already. */
function besideHeading({ working }: Desk, sheet: number, column: PlanColumn): { row: number; col: number } {
  const wanted = column.anchor.trim().toLowerCase();
  const found: { row: number; col: number }[] = [];
  const { rows, cols } = working.used(sheet);
  for (let row = 1; row <= rows; row++) {
    for (let col = 1; col <= cols; col++) {
      const cell = working.cell(sheet, row, col);
      if (typeof cell?.value === 'string' && cell.value.trim().toLowerCase() === wanted) found.push({ row, col });
    }
  }
  if (found.length === 0) throw new PlanRefusal(`sheet ${column.sheet} has no cell with the text "${column.anchor}"`);
  if (found.length > 1) {
    const [a, b] = found.map(({ row, col }) => cellName(row, col));
    throw new PlanRefusal(`the text "${column.anchor}" stands in more than one cell of sheet ${column.sheet} (${a}, ${b}): give the address of the heading instead`);
  }
  const [{ row, col: beside }] = found;
  const [heading] = headersOf(column);
  for (let col = beside + 1; ; col++) {
    const cell = working.cell(sheet, row, col);
    if (!cell || cell.value === heading) return { row, col };
  }
}

async function rowsOf(desk: Desk, sheet: number, headerRow: number, column: PlanColumn): Promise<[first: number, last: number]> {
  const fixed = /^\s*(\d+)\s*:\s*(\d+)\s*$/.exec(column.rows);
  if (fixed) {
    const [first, last] = [Number(fixed[1]), Number(fixed[2])];
    if (first < 1 || last < first) throw new PlanRefusal(`rows ${column.rows} must be a first row, a colon and a last row that is not above it`);
    return [first, last];
  }
  const letters = /^\s*while\s+([A-Za-z]{1,3})\s+has\s+numbers\s*$/i.exec(column.rows)?.[1] ?? '';
  const counted = columnNumber(letters);
  if (!(counted <= MAX_COLS)) throw new PlanRefusal(`rows must be such as 6:69 or while D has numbers, got ${column.rows}`);
  const first = headerRow + 1;
  let row = first;
  for (let asked = false; ; row++) {
    const cell = desk.working.cell(sheet, row, counted);
    if (cell && cell.value === undefined && !asked) {
      asked = true;
      await desk.recalculate();
      row--;
    } else if (typeof cell?.value !== 'number') break;
  }
  if (row > first) return [first, row - 1];
  const found = desk.working.cell(sheet, first, counted);
  const name = cellName(first, counted);
  throw new PlanRefusal(`column ${letters.toUpperCase()} of sheet ${column.sheet} has no number in its first row: ${name} ${found ? `holds ${showValue(found.value)}` : 'is blank'}`);
}
