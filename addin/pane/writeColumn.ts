import { columnLetters } from '../../functions/engine/graph/address';
import type { PortArea } from '../../functions/workbook';
import { addressOf } from './areas';
import { occupied } from './cells';
import type { StepContext } from './Steps';

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
 * Writes one spilling formula with its headings above. What stands there is never written over without a second press: the first one
 * names it.
 *
 * @param where    The cells of the result, headings not counted; the row above them takes the headings.
 * @param again    True where the user has seen what would be written over.
 * @returns        'written', 'asked' where cells are in the way, or 'failed'; the user has been told.
 */
export async function writeColumn(
  { host, say, written }: StepContext, where: PortArea, headings: readonly string[], formula: string, again: boolean, numberFormat?: string,
): Promise<'written' | 'asked' | 'failed'> {
  if (where.row < 2) return say('There is no row above the results for headings: insert one first', true), 'failed';
  const whole = { ...where, row: where.row - 1, rows: where.rows + 1 };
  const table = (await host.port.tables()).find(({ area: a }) =>
    a.sheet === where.sheet && a.row < where.row + where.rows && where.row < a.row + a.rows && a.col < where.col + where.cols && where.col < a.col + a.cols);
  if (table) return say(`A formula cannot spill inside table ${table.name}: choose a column outside it`, true), 'failed';
  const taken = await occupied(host.port, whole);
  if (taken.length > 0 && !again) {
    say(`${taken.length === 1 ? `${taken[0]} is` : `${taken.slice(0, 3).join(', ')}${taken.length > 3 ? ` and ${taken.length - 3} more are` : ' are'}`} occupied. Press again to write over, or choose another place.`, true);
    return 'asked';
  }
  try {
    await host.write([
      ...headings.map((value, i) => ({ sheet: where.sheet, row: where.row - 1, col: where.col + i, value })),
      { sheet: where.sheet, row: where.row, col: where.col, formula, spill: { rows: where.rows, cols: where.cols }, numberFormat },
    ]);
  } catch (problem) {
    say(`Nothing was written: ${(problem as Error).message}`, true);
    return 'failed';
  }
  written.push({
    sheet: where.sheet, anchor: `${columnLetters(where.col)}${where.row - 1}`, header: headings.length === 1 ? headings[0] : headings, formula, mode: 'spill',
    rows: `${where.row}:${where.row + where.rows - 1}`, ...(numberFormat !== undefined && headings.length === 1 && { numberFormat }),
  });
  await host.show(where);
  say(`${headings.join(', ')} written into ${addressOf(where)}`);
  return 'written';
}
