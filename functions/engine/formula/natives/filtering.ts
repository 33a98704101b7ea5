import { toBool } from '../coerce';
import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Scalar, err } from '../scalar';
import { type Matrix, type Value, at } from '../value';
import { checkSize, decidedBy, elementsOf, transposed } from './arrays';
import { follow } from './follow';
import { errorFrom } from './linked';
import { arrayFunction } from './options';

/**
 * FILTER and UNIQUE. What stays keeps its slopes, and is linked with slope 0 to what decided: the conditions, or all cells that
 * were compared.
 */
export const filtering: Native[] = [
  rangeFunction('FILTER', ['range', 'range', 'range'], filter, { args: [2, 3], shareable: false }),
  arrayFunction('UNIQUE', ['boolean', 'boolean'], 1, (run, given, [across, once]) => {
    const m = run.matrix(given);
    const sideways = across?.v === true;
    const deciders = [across, once].filter((s) => s !== undefined);
    const found = distinct(run, sideways ? transposed(m) : m, once?.v === true, deciders);
    return sideways && found.k === 'matrix' ? transposed(found) : found;
  }),
];

/** FILTER(array, include, [if none]): a column of conditions chooses rows, a row of them columns. */
function filter(run: Run, [given, include, otherwise]: readonly Value[]): Value {
  const m = run.matrix(given);
  const conditions = run.matrix(include);
  const rowwise = conditions.cols === 1 && conditions.rows === m.rows;
  if (!rowwise && !(conditions.rows === 1 && conditions.cols === m.cols)) return include.k === 'error' ? include : err('#VALUE!');
  const down = rowwise ? m : transposed(m);
  const truths: boolean[] = [];
  for (const s of conditions.cells) {
    const truth = truthOf(run, s);
    if (typeof truth !== 'boolean') return truth;
    truths.push(truth);
  }
  const stored = truths.length < down.rows ? truthOf(run, conditions.fill) : false;
  if (typeof stored !== 'boolean') return stored;
  const kept = keptRows(down, truths, stored);
  const deciders = [...conditions.cells, conditions.fill];
  if (kept.rows === 0) {
    return otherwise === undefined || otherwise.k === 'missing' ? errorFrom(run, '#CALC!', deciders) : follow(run, otherwise, ...deciders);
  }
  const linked = decidedBy(run, kept, deciders);
  return rowwise ? linked : transposed(linked);
}

/** The rows where the condition holds; beyond the stored conditions it holds everywhere or nowhere. */
function keptRows(m: Matrix, truths: readonly boolean[], beyond: boolean): Matrix {
  const cells: Scalar[] = [];
  let height = 0;
  const keep = (row: number): void => {
    height++;
    for (let c = 0; c < m.width; c++) cells.push(at(m, row, c));
  };
  truths.forEach((holds, row) => holds && keep(row));
  let rows = height;
  if (beyond) {
    for (let row = truths.length; row < m.height; row++) keep(row);
    rows = height + m.rows - Math.max(m.height, truths.length);
  }
  checkSize(height, m.width);
  return { k: 'matrix', rows, cols: m.cols, height, width: m.width, cells, fill: m.fill };
}

/** A condition: text is none. */
function truthOf(run: Run, s: Scalar): boolean | Err {
  if (s.k === 'text') return run.steps.error('#VALUE!', s);
  const b = toBool(run.steps, s);
  return b.k === 'error' ? b : b.v;
}

/** The first of each set of equal rows, or the rows that have no equal. Text is compared without regard to case, numbers in full. */
function distinct(run: Run, m: Matrix, once: boolean, deciders: readonly Scalar[]): Matrix | Err {
  const all = elementsOf(m.rows > m.height ? { ...m, rows: m.height + 1 } : m); // the rows beyond are all alike
  const seen = new Map<string, { row: number; times: number }>();
  for (let row = 0; row * m.cols < all.length; row++) {
    const key = all.slice(row * m.cols, (row + 1) * m.cols).map(keyOf).join('\u0000');
    const known = seen.get(key);
    const times = row < m.height ? 1 : m.rows - m.height;
    if (known) known.times += times;
    else seen.set(key, { row, times });
  }
  const rows = [...seen.values()].filter((s) => !once || s.times === 1).map((s) => s.row);
  const by = [...deciders, ...m.cells];
  if (rows.length === 0) return errorFrom(run, '#CALC!', by);
  const cells = rows.flatMap((row) => all.slice(row * m.cols, (row + 1) * m.cols));
  return decidedBy(run, { k: 'matrix', rows: rows.length, cols: m.cols, height: rows.length, width: m.cols, cells, fill: m.fill }, by);
}

function keyOf(s: Scalar): string {
  return s.k === 'text' ? `text${s.v.toLowerCase()}` : `${s.k}${s.v === 0 ? 0 : String(s.v)}`;
}
