import { compareText } from '../compare';
import { toNumber } from '../coerce';
import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Scalar, BLANK, err, num } from '../scalar';
import { type Matrix, type Value, at } from '../value';
import { checkSize, decidedBy, elementsOf, transposed } from './arrays';
import { isError, optionsOf } from './options';

/**
 * SORT and SORTBY. Cells keep their slopes in their new places, and are linked with slope 0 to the keys that decided the order.
 * Numbers come before text, text before FALSE and TRUE, errors behind; blank cells are last either way; equal keys keep their order.
 */
export const sorting: Native[] = [
  rangeFunction('SORT', ['range', 'range', 'range', 'range'], sort, { args: [1, 4], shareable: false }),
  rangeFunction('SORTBY', ['range', 'range', 'range'], sortBy, { args: [2, 253], repeating: 2, shareable: false }),
];

/** One line of keys, in the order of the rows, with the direction it is sorted in. */
interface Keys {
  readonly line: readonly Scalar[];
  readonly fill: Scalar;
  readonly direction: number;
}

/** SORT(array, [index], [order], [by columns]); several keys as arrays of indices and orders. */
function sort(run: Run, [given, index, order, across]: readonly Value[]): Value {
  const options = optionsOf(run, 'SORT', across ? [across] : [], ['boolean']);
  if (isError(options)) return options;
  const indices = numbers(run, index);
  if ('k' in indices) return indices;
  const orders = numbers(run, order);
  if ('k' in orders) return orders;
  if (orders.length > 1 && orders.length !== indices.length) return err('#VALUE!');
  const deciders: Scalar[] = [...indices, ...orders, ...options.filter((s) => s !== undefined)];
  const sideways = options[0]?.v === true;
  const m = sideways ? transposed(run.matrix(given)) : run.matrix(given);
  const keys: Keys[] = [];
  for (const [i, which] of indices.entries()) {
    const col = Math.trunc(which.v) - 1;
    const direction = Math.trunc(orders[orders.length === 1 ? 0 : i].v);
    if (col < 0 || col >= m.cols || Math.abs(direction) !== 1) return run.steps.error('#VALUE!', ...deciders);
    keys.push({ line: Array.from({ length: m.height }, (_, r) => at(m, r, col)), fill: m.fill, direction });
  }
  const sorted = reordered(run, m, keys, deciders);
  return sideways ? transposed(sorted) : sorted;
}

/** SORTBY(array, keys, [order], keys, [order] …): keys down sort the rows, keys along the columns. */
function sortBy(run: Run, [given, ...rest]: readonly Value[]): Value {
  const m = run.matrix(given);
  const deciders: Scalar[] = [];
  const keys: Keys[] = [];
  let sideways: boolean | undefined;
  for (let i = 0; i < rest.length; i += 2) {
    if (rest[i].k === 'error') return rest[i];
    const by = run.matrix(rest[i]);
    const options = optionsOf(run, 'SORTBY', rest.slice(i + 1, i + 2), ['number']);
    if (isError(options)) return options;
    const order = options[0] ?? num(1);
    deciders.push(order);
    const down = by.cols === 1 && by.rows === m.rows;
    const along = by.rows === 1 && by.cols === m.cols;
    sideways ??= !down;
    const direction = Math.trunc(order.v as number);
    if (!(sideways ? along : down) || Math.abs(direction) !== 1) return run.steps.error('#VALUE!', ...deciders);
    keys.push({ line: by.cells, fill: by.fill, direction });
  }
  if (!sideways) return reordered(run, m, keys, deciders);
  return transposed(reordered(run, transposed(m), keys, deciders));
}

function reordered(run: Run, m: Matrix, keys: readonly Keys[], deciders: readonly Scalar[]): Matrix {
  const height = Math.max(m.height, ...keys.map((k) => k.line.length));
  // where rows beyond the stored ones have keys that may come first, all of them are laid out
  const rows = keys.every((k) => k.fill.k === 'blank') ? height : m.rows;
  checkSize(rows, m.width);
  const keyAt = ({ line, fill }: Keys, row: number): Scalar => (row < line.length ? line[row] : fill);
  const order = Array.from({ length: rows }, (_, i) => i).sort((a, b) => {
    for (const k of keys) {
      const c = ordered(keyAt(k, a), keyAt(k, b), k.direction);
      if (c !== 0) return c;
    }
    return a - b;
  });
  const cells = order.flatMap((row) => Array.from({ length: m.width }, (_, c) => at(m, row, c)));
  return decidedBy(run, { ...m, height: rows, cells }, [...deciders, ...keys.flatMap((k) => k.line)]);
}

const RANK = { number: 0, text: 1, boolean: 2, error: 3, blank: 4 } as const;

/** Numbers are compared in full, not in 15 digits, so that the order is one. */
function ordered(a: Scalar, b: Scalar, direction: number): number {
  if (a.k === 'blank' || b.k === 'blank') return RANK[a.k] - RANK[b.k] === 0 ? 0 : a.k === 'blank' ? 1 : -1;
  if (a.k !== b.k) return direction * (RANK[a.k] - RANK[b.k]);
  if (a.k === 'error') return 0;
  if (a.k === 'text') return direction * compareText(a.v, b.v as string);
  return direction * (Number(a.v) - Number(b.v));
}

/** Numbers of an argument that may be one or an array; 1 where nothing stands. */
function numbers(run: Run, given: Value | undefined): { v: number; d: number; k: 'number' }[] | Err {
  if (given === undefined || given.k === 'missing') return [{ k: 'number', v: 1, d: BLANK.d }];
  const found = [];
  for (const s of elementsOf(run.matrix(given))) {
    const n = toNumber(run.steps, s);
    if (n.k === 'error') return n;
    found.push(n);
  }
  return found;
}
