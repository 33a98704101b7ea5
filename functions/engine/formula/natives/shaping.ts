import { toNumber } from '../coerce';
import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Num, type Scalar, err, num } from '../scalar';
import { type Matrix, type Value, at, matrix } from '../value';
import { NOT_AVAILABLE, built, checkSize, decidedBy, elementsOf, matricesOf, transposed } from './arrays';
import { follow, portion, sizeOf } from './follow';
import { errorFrom } from './linked';
import { arrayFunction, isError, optionsOf, present, whole } from './options';

const chosen = { args: [2, 254] as [number, number], repeating: 1, shareable: false };
const joined = { args: [1, 254] as [number, number], repeating: 1, shareable: false };
const SIZES = ['number', 'number'] as const;

/**
 * Functions that cut, join and lay out arrays, and SEQUENCE. Cells keep their slopes in their new places; the numbers that say
 * how are linked with slope 0. TAKE and DROP of a reference give a reference.
 */
export const shaping: Native[] = [
  rangeFunction('SEQUENCE', ['range', 'range', 'range', 'range'], sequence, { args: [1, 4], shareable: false }),
  arrayFunction('TAKE', SIZES, 2, (run, given, options) => cut(run, given, options, (n, size) => taken(n, size))),
  arrayFunction('DROP', SIZES, 2, (run, given, options) => cut(run, given, options, (n, size) => dropped(n, size))),
  arrayFunction('EXPAND', ['number', 'number', 'scalar'], 2, expand),
  rangeFunction('CHOOSEROWS', ['range', 'range'], (run, [given, ...which]) => chooseRows(run, run.matrix(given), which), chosen),
  rangeFunction('CHOOSECOLS', ['range', 'range'], (run, [given, ...which]) => {
    const found = chooseRows(run, transposed(run.matrix(given)), which);
    return found.k === 'matrix' ? transposed(found) : found;
  }, chosen),
  rangeFunction('VSTACK', ['range'], (run, args) => stacked(args.flatMap((a) => matricesOf(run, a))), joined),
  rangeFunction('HSTACK', ['range'], (run, args) => transposed(stacked(args.flatMap((a) => matricesOf(run, a).map(transposed)))), joined),
  arrayFunction('TOCOL', ['number', 'boolean'], 1, (run, given, options) => inLine(run, given, options)),
  arrayFunction('TOROW', ['number', 'boolean'], 1, (run, given, options) => {
    const found = inLine(run, given, options);
    return found.k === 'matrix' ? transposed(found) : found;
  }),
  arrayFunction('WRAPROWS', ['number', 'scalar'], 2, wrapped),
  arrayFunction('WRAPCOLS', ['number', 'scalar'], 2, (run, given, options) => {
    const found = wrapped(run, given, options);
    return found.k === 'matrix' ? transposed(found) : found;
  }),
];

/** SEQUENCE(rows, [columns], [start], [step]): slope 1 by the start, and by the step how often it was added. */
function sequence(run: Run, given: readonly Value[]): Value {
  const options = optionsOf(run, 'SEQUENCE', given, ['number', 'number', 'number', 'number']);
  if (isError(options)) return options;
  const rows = whole(options[0], 1);
  const cols = whole(options[1], 1);
  const sizes = present(options.slice(0, 2));
  if (rows < 0 || cols < 0) return run.steps.error('#VALUE!', ...sizes);
  if (rows === 0 || cols === 0) return run.steps.error('#CALC!', ...sizes);
  const start = (options[2] ?? num(1)) as Num;
  const step = (options[3] ?? num(1)) as Num;
  const numbers = built(rows, cols, (i, j) => {
    const k = i * cols + j;
    return run.steps.binary(start.v + k * step.v, start, 1, step, k);
  });
  return decidedBy(run, numbers, sizes);
}

/** A stretch of a line: its first place and its length. */
interface Stretch {
  readonly from: number;
  readonly length: number;
}

const taken = (n: number, size: number): Stretch =>
  n >= 0 ? { from: 0, length: Math.min(n, size) } : { from: Math.max(0, size + n), length: Math.min(-n, size) };

const dropped = (n: number, size: number): Stretch =>
  n >= 0 ? { from: n, length: Math.max(0, size - n) } : { from: 0, length: Math.max(0, size + n) };

/** TAKE and DROP: a count for rows and one for columns, from the end where negative; all where nothing stands. */
function cut(run: Run, given: Value, options: readonly (Scalar | undefined)[], stretch: (n: number, size: number) => Stretch): Value {
  const size = sizeOf(run, given);
  if (!size) return err('#VALUE!');
  const by = present(options);
  const along = (i: number, length: number): Stretch =>
    options[i] === undefined ? { from: 0, length } : stretch(whole(options[i], 0), length);
  const rows = along(0, size.rows);
  const cols = along(1, size.cols);
  if (rows.length === 0 || cols.length === 0) return run.steps.error('#CALC!', ...by);
  return follow(run, portion(run, given, rows.from, cols.from, rows.length, cols.length), ...by);
}

/** EXPAND(array, rows, [columns], [pad]): a size smaller than the array's is #VALUE!. */
function expand(run: Run, given: Value, options: readonly (Scalar | undefined)[]): Value {
  const m = run.matrix(given);
  const rows = whole(options[0], m.rows);
  const cols = whole(options[1], m.cols);
  const by = present(options.slice(0, 2));
  if (rows < m.rows || cols < m.cols) return run.steps.error('#VALUE!', ...by);
  const pad = options[2] ?? NOT_AVAILABLE;
  return decidedBy(run, built(rows, cols, (i, j) => (i < m.rows && j < m.cols ? at(m, i, j) : pad)), by);
}

/** Rows by number, from the end where negative; a number that is no row's is #VALUE!. */
function chooseRows(run: Run, m: Matrix, which: readonly Value[]): Matrix | Scalar {
  const numbers: Num[] = [];
  for (const s of which.flatMap((value) => elementsOf(run.matrix(value)))) {
    const n = toNumber(run.steps, s);
    if (n.k === 'error') return n;
    numbers.push(n);
  }
  const cells: Scalar[] = [];
  checkSize(numbers.length, m.width);
  for (const n of numbers) {
    const row = Math.trunc(n.v);
    if (row === 0 || Math.abs(row) > m.rows) return run.steps.error('#VALUE!', ...numbers);
    for (let c = 0; c < m.width; c++) cells.push(at(m, row > 0 ? row - 1 : m.rows + row, c));
  }
  // each row is there for its own number only
  const linked = cells.map((s, i) => run.steps.chosen(s, numbers[Math.floor(i / m.width)]));
  return { k: 'matrix', rows: numbers.length, cols: m.cols, height: numbers.length, width: m.width, cells: linked, fill: m.fill };
}

/** Matrices below each other; the narrower ones are filled up with #N/A. */
function stacked(parts: readonly Matrix[]): Matrix {
  const rows = parts.reduce((sum, m) => sum + m.rows, 0);
  const cols = Math.max(...parts.map((m) => m.cols));
  checkSize(rows, cols);
  return matrix(rows, cols, parts.flatMap((m) => built(m.rows, cols, (i, j) => (j < m.cols ? at(m, i, j) : NOT_AVAILABLE)).cells));
}

/**
 * TOCOL(array, [ignore], [by column]): all cells below each other. Ignore 1 leaves out blank cells, 2 errors, 3 both; the others
 * are linked with slope 0 to what was left out.
 */
function inLine(run: Run, given: Value, options: readonly (Scalar | undefined)[]): Matrix | Scalar {
  const ignore = whole(options[0], 0);
  const by = present(options);
  if (ignore < 0 || ignore > 3) return run.steps.error('#VALUE!', ...by);
  const left = (s: Scalar): boolean => (s.k === 'blank' && ignore % 2 === 1) || (s.k === 'error' && ignore >= 2);
  const m = run.matrix(given);
  const stored = left(m.fill) ? { ...m, rows: m.height, cols: m.width } : m;
  const all = elementsOf(options[1]?.v === true ? transposed(stored) : stored);
  const kept = all.filter((s) => !left(s));
  by.push(...all.filter(left));
  if (kept.length === 0) return errorFrom(run, '#CALC!', by);
  return decidedBy(run, matrix(kept.length, 1, kept), by);
}

/** WRAPROWS(line, length, [pad]): a line broken into rows of a length. */
function wrapped(run: Run, given: Value, options: readonly (Scalar | undefined)[]): Matrix | Scalar {
  const m = run.matrix(given);
  const by = present(options.slice(0, 1));
  const length = whole(options[0], 0);
  if (m.rows !== 1 && m.cols !== 1) return err('#VALUE!');
  if (length < 1) return run.steps.error('#NUM!', ...by);
  const line = elementsOf(m);
  const pad = options[1] ?? NOT_AVAILABLE;
  return decidedBy(run, built(Math.ceil(line.length / length), length, (i, j) => line[i * length + j] ?? pad), by);
}
