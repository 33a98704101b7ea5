import { parseCell } from '../../addin/desk/book/area';
import { openBook } from '../../addin/desk/book/openBook';
import { Desk } from '../../addin/desk/sheet/Desk';
import { storedFormula } from '../../addin/desk/sheet/functionNames';
import type { Example } from '../../reference/Entry';
import { builtFunctions } from '../desk/sheet/bundle';
import { smallBook } from '../desk/sheet/smallBook';
import type { SmallCell } from '../desk/sheet/smallBook';

/** What an example shows when its sheet is typed and computed, row by row, and what was refused. */
export async function runExample({ cells, at, formula }: Example): Promise<{ shown: unknown[][]; refused: string[] }> {
  const typed = Object.entries(cells).map(([address, value]): [string, SmallCell] =>
    [address, typeof value === 'string' && value.startsWith('=') ? { f: value.slice(1) } : value]);
  const desk = new Desk(openBook(smallBook({ Sheet1: { Z99: 0, ...Object.fromEntries(typed) } })), builtFunctions());
  const { row, col } = parseCell(at)!;
  await desk.recalculate();
  desk.working.setFormula(0, row, col, storedFormula(formula, desk.names), { spill: { rows: 1, cols: 1 } });
  const { refused } = await desk.recalculate();
  const { rows, cols } = desk.working.cell(0, row, col)!.array!;
  const shown = Array.from({ length: rows }, (_, r) => Array.from({ length: cols }, (_x, c) => desk.working.cell(0, row + r, col + c)?.value));
  return { shown, refused: refused.map((r) => r.message) };
}
