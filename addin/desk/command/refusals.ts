import { areaName } from '../book/area';
import { BookError } from '../book/BookError';
import type { Book } from '../book/Book';
import { placeOf } from '../sheet/places';
import type { CellRefusal } from '../sheet/recalculate';

/** A line for each refused cell: where, what it shows, and why. Neighbours with the same words share a line: `Titrant!G33:O33`. */
export function refusalLines(refused: readonly CellRefusal[], prefix = ''): string[] {
  return runs(refused).map(({ first, last }) => {
    const from = placeOf(first.key);
    const to = placeOf(last.key);
    const sheet = first.cell.slice(0, first.cell.lastIndexOf('!'));
    const area = areaName({ top: from.row, left: from.col, bottom: to.row, right: to.col });
    return `${prefix}${sheet}!${area}: ${first.error ?? 'left without a result'}: ${first.message}`;
  });
}

interface Run {
  first: CellRefusal;
  last: CellRefusal;
}

/** Neighbours in a row, then whole rows or columns of one below the other. */
function runs(refused: readonly CellRefusal[]): Run[] {
  const acrossRows = joined(refused.map((one) => ({ first: one, last: one })), (a, b) => {
    const [left, right] = [placeOf(a.last.key), placeOf(b.first.key)];
    return left.row === right.row && left.col + 1 === right.col;
  });
  const byColumn = [...acrossRows].sort((a, b) => placeOf(a.first.key).sheet - placeOf(b.first.key).sheet || placeOf(a.first.key).col - placeOf(b.first.key).col);
  const joinedDown = joined(byColumn, (a, b) => {
    const [upper, lower] = [placeOf(a.last.key), placeOf(b.first.key)];
    return placeOf(a.first.key).col === lower.col && upper.col === placeOf(b.last.key).col && upper.row + 1 === lower.row;
  });
  return joinedDown.sort((a, b) => a.first.key - b.first.key);
}

function joined(list: readonly Run[], meet: (a: Run, b: Run) => boolean): Run[] {
  const out: Run[] = [];
  for (const run of list) {
    const before = out.at(-1);
    const same = before && before.first.message === run.first.message && before.first.error === run.first.error &&
      placeOf(before.first.key).sheet === placeOf(run.first.key).sheet;
    if (same && meet(before, run)) before.last = run.last;
    else out.push({ ...run });
  }
  return out;
}

/** A program refuses to open a workbook whose name does not tell whether it holds macros. */
export function checkExtension(book: Book, path: string): void {
  const macros = /\.(xlsm|xltm)$/i.test(path);
  if (book.macros && !macros) throw new BookError(`it holds macros, so the new file needs a name that ends in .xlsm, got ${path}`);
  if (!book.macros && macros) throw new BookError(`it holds no macros, so the new file needs a name that ends in .xlsx, got ${path}`);
}
