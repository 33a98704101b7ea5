import { columnLetters } from '../../functions/engine/graph/address';
import type { PortArea } from '../../functions/workbook';
import { addressOf } from './areas';
import { occupied } from './cells';
import type { StepContext } from './Steps';

/** One spilling formula with its headings. */
export interface NewColumn {
  readonly headings: readonly string[];
  readonly formula: string;
  readonly numberFormat?: string;
}

/** A column that was written: what a plan says of it. */
export interface Written {
  readonly sheet: string;
  readonly anchor: string;
  readonly header: string | readonly string[];
  readonly formula: string;
  readonly mode: 'spill';
  readonly rows: string;
  readonly numberFormat?: string;
}

/**
 * Writes spilling formulas side by side with their headings above, as one step. What stands there is never written over without a second
 * press for the very same place: the first one names it.
 *
 * @param where   The cells of the first result, headings not counted: its sheet, rows and first column. The row above takes the headings.
 * @param cols    How many columns each result takes; by default as many as it has headings.
 * @returns whether it was written; the user has been told.
 */
export async function writeColumns(context: StepContext, where: Omit<PortArea, 'cols'>, columns: readonly NewColumn[], cols = columns.map((c) => c.headings.length)): Promise<boolean> {
  const { host, say } = context;
  const whole = { ...where, cols: cols.reduce((a, b) => a + b, 0) };
  if (where.row < 2) return say('There is no row above the results for headings: insert one first', true), false;
  const table = (await host.port.tables()).find(({ area }) => meets(area, whole));
  if (table) return say(`A formula cannot spill inside table ${table.name}: choose a column outside it`, true), false;
  const taken = await occupied(host.port, { ...whole, row: whole.row - 1, rows: whole.rows + 1 });
  const place = addressOf(whole);
  if (taken.length > 0 && context.asked.place !== place) {
    context.asked.place = place;
    say(`${taken.length === 1 ? `${taken[0]} is` : `${taken.slice(0, 3).join(', ')}${taken.length > 3 ? ` and ${taken.length - 3} more are` : ' are'}`} occupied. Press again to write over, or choose another place.`, true);
    return false;
  }
  context.asked.place = undefined;
  const placed = columns.map((column, i) => ({ ...column, cols: cols[i], col: where.col + cols.slice(0, i).reduce((a, b) => a + b, 0) }));
  try {
    const step = await host.write(placed.flatMap(({ headings, formula, numberFormat, col, cols: width }) => [
      ...headings.map((value, i) => ({ sheet: where.sheet, row: where.row - 1, col: col + i, value })),
      { sheet: where.sheet, row: where.row, col, formula, spill: { rows: where.rows, cols: width }, numberFormat },
    ]));
    context.written.push({ step, columns: placed.map((column) => planned(where, column)) });
  } catch (problem) {
    say(`Nothing was written: ${(problem as Error).message}`, true);
    return false;
  }
  await host.show(whole);
  say(`${columns.flatMap((c) => c.headings).join(', ')} written into ${place}`);
  return true;
}

const meets = (a: PortArea, b: PortArea): boolean =>
  a.sheet === b.sheet && a.row < b.row + b.rows && b.row < a.row + a.rows && a.col < b.col + b.cols && b.col < a.col + a.cols;

const planned = ({ sheet, row, rows }: Omit<PortArea, 'cols'>, { col, headings, formula, numberFormat }: NewColumn & { readonly col: number }): Written => ({
  sheet, anchor: `${columnLetters(col)}${row - 1}`, header: headings.length === 1 ? headings[0] : headings, formula, mode: 'spill', rows: `${row}:${row + rows - 1}`,
  ...(numberFormat !== undefined && headings.length === 1 && { numberFormat }),
});
