import { type Native, rangeFunction } from '../native';
import { multiply } from '../operators';
import { numbersOf } from '../ranges';
import type { Run } from '../run';
import { NONE, type Num, type Scalar, num } from '../scalar';
import { type Value, at } from '../value';
import { errorFrom, linked } from './linked';

const many = { args: [1, 255] as [number, number], repeating: 1 };

/** SUM, AVERAGE, PRODUCT, SUMSQ, SUMPRODUCT: single steps over ranges. */
export const sums: Native[] = [
  rangeFunction('SUM', ['range'], (run, args) => {
    const over: Scalar[] = [];
    const xs = numbersOf(run, args, over);
    return 'k' in xs ? xs : linked(run, total(xs), xs, 1, over);
  }, many),
  rangeFunction('AVERAGE', ['range'], (run, args) => {
    const over: Scalar[] = [];
    const xs = numbersOf(run, args, over);
    if ('k' in xs) return xs;
    if (xs.length === 0) return errorFrom(run, '#DIV/0!', over);
    return linked(run, total(xs) / xs.length, xs, 1 / xs.length, over);
  }, many),
  rangeFunction('SUMSQ', ['range'], (run, args) => {
    const over: Scalar[] = [];
    const xs = numbersOf(run, args, over);
    if ('k' in xs) return xs;
    return linked(run, xs.reduce((s, x) => s + x.v * x.v, 0), xs, xs.map((x) => 2 * x.v), over);
  }, many),
  rangeFunction('PRODUCT', ['range'], (run, args) => {
    const over: Scalar[] = [];
    const xs = numbersOf(run, args.filter((a) => a.k !== 'missing'), over);
    if ('k' in xs) return xs;
    const product = xs.reduce<Scalar>((p, x) => (p.k === 'number' ? multiply(run.steps, p, x) : p), num(xs.length ? 1 : 0));
    return run.steps.chosenByAll(product, over);
  }, many),
  rangeFunction('SUMPRODUCT', ['range'], sumProduct, many),
];

/** Plain summation from left to right, as the sheet does it. */
const total = (xs: readonly Num[]): number => xs.reduce((s, x) => s + x.v, 0);

/** The sum of products of corresponding elements; what is no number counts as 0. */
function sumProduct(run: Run, args: readonly Value[]): Scalar {
  const ms = args.map((a) => run.matrix(a));
  const { rows, cols } = ms[0];
  if (ms.some((m) => m.rows !== rows || m.cols !== cols)) return run.steps.error('#VALUE!');
  const height = Math.max(...ms.map((m) => (m.fill.k === 'blank' ? m.height : m.rows)));
  const width = Math.max(...ms.map((m) => (m.fill.k === 'blank' ? m.width : m.cols)));
  const parents: Scalar[] = [];
  const slopes: number[] = [];
  let value = 0;
  for (let i = 0; i < height; i++) {
    for (let j = 0; j < width; j++) {
      const xs = ms.map((m) => at(m, i, j));
      const bad = xs.find((x) => x.k === 'error');
      if (bad) return bad;
      const vs = xs.map((x) => (x.k === 'number' ? x.v : 0));
      value += vs.reduce((p, v) => p * v, 1);
      xs.forEach((x, place) => {
        if (x.d === NONE) return;
        parents.push(x);
        slopes.push(x.k === 'number' ? vs.reduce((p, v, other) => (other === place ? p : p * v), 1) : 0);
      });
    }
  }
  return run.steps.many(value, parents, slopes);
}
