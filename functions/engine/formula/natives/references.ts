import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Num, type Scalar, err, num } from '../scalar';
import { type Area, type Value, matrix } from '../value';
import { follow, portion, sizeOf } from './follow';

/** INDEX, and where a reference lies or how large a range is: ROW, ROWS, COLUMN, COLUMNS. */
export const references: Native[] = [
  rangeFunction('INDEX', ['range', 'number', 'number', 'number'], index, { args: [2, 4], shareable: false }),
  rangeFunction('ROW', ['range'], (run, args) => numbered(run, args, run.row, (a) => column(a.r1, a.r2)), { args: [0, 1] }),
  rangeFunction('COLUMN', ['range'], (run, args) => numbered(run, args, run.col, (a) => row(a.c1, a.c2)), { args: [0, 1] }),
  rangeFunction('ROWS', ['range'], (run, [given]) => extent(run, given, (size) => size.rows)),
  rangeFunction('COLUMNS', ['range'], (run, [given]) => extent(run, given, (size) => size.cols)),
];

/**
 * INDEX(range, row, [column], [area]): 0 takes the whole row or column. Of a single row or column one number is enough. Of a
 * reference it gives a reference, unless what chose the cell depends on cells.
 */
function index(run: Run, [range, ...numbers]: readonly Value[]): Value {
  const [first, second, which] = [0, 1, 2].map((i) => number(run, numbers[i]));
  for (const s of [range, first, second, which]) if (s?.k === 'error') return s;
  const areas = run.areas(range);
  const nth = which ? Math.trunc((which as Num).v) : 1;
  if (nth < 1) return run.steps.error('#VALUE!', which!);
  if (nth > (areas?.length ?? 1)) return run.steps.error('#REF!', which!);
  const from = areas ? areas[nth - 1] : range;
  const size = sizeOf(run, from)!;
  let r = first ? Math.trunc((first as Num).v) : 0;
  let c = second ? Math.trunc((second as Num).v) : 0;
  if (numbers.length === 1 && size.rows === 1) [r, c] = [c, r];
  const by: Scalar[] = [first, second, which].filter((s) => s !== undefined);
  if (r < 0 || c < 0) return run.steps.error('#VALUE!', ...by);
  if (r > size.rows || c > size.cols) return run.steps.error('#REF!', ...by);
  const part = portion(run, from, Math.max(0, r - 1), Math.max(0, c - 1), r === 0 ? size.rows : 1, c === 0 ? size.cols : 1);
  return follow(run, part, ...by);
}

function number(run: Run, given: Value | undefined): Num | Err | undefined {
  return given === undefined || given.k === 'missing' ? undefined : (run.scalar(given) as Num | Err);
}

function numbered(run: Run, [given]: readonly Value[], here: number, of: (area: Area) => Value): Value {
  if (given === undefined || given.k === 'missing') return num(here);
  if (given.k === 'error') return given;
  const areas = run.areas(given);
  return areas?.length === 1 ? of(areas[0]) : err('#VALUE!');
}

function extent(run: Run, given: Value, of: (size: { rows: number; cols: number }) => number): Value {
  if (given.k === 'error') return given;
  const size = sizeOf(run, given);
  return size ? num(of(size)) : err('#REF!');
}

const upTo = (from: number, to: number): Scalar[] => Array.from({ length: to - from + 1 }, (_, i) => num(from + i));
const column = (from: number, to: number): Value => (from === to ? num(from) : matrix(to - from + 1, 1, upTo(from, to)));
const row = (from: number, to: number): Value => (from === to ? num(from) : matrix(1, to - from + 1, upTo(from, to)));
