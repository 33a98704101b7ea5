import { type Native, rangeFunction } from '../native';
import { numbersOf } from '../ranges';
import type { Run } from '../run';
import { type Num, type Scalar, num } from '../scalar';
import type { Value } from '../value';
import { numberOf } from './argument';
import { errorFrom, linked } from './linked';

const many = { args: [1, 255] as [number, number], repeating: 1 };

/**
 * Functions that pick by rank: slope 1 to the number picked (1/2 to each of the two in the middle), 0 to all others, which
 * decided. Of equal numbers one is picked.
 */
export const ranks: Native[] = [
  rangeFunction('MIN', ['range'], (run, args) => extreme(run, args, (a, b) => a < b), many),
  rangeFunction('MAX', ['range'], (run, args) => extreme(run, args, (a, b) => a > b), many),
  rangeFunction('MEDIAN', ['range'], median, many),
  rangeFunction('SMALL', ['range', 'number'], (run, args) => ranked(run, args, (_n, k) => k - 1)),
  rangeFunction('LARGE', ['range', 'number'], (run, args) => ranked(run, args, (n, k) => n - k)),
];

function extreme(run: Run, args: readonly Value[], better: (a: number, b: number) => boolean): Scalar {
  const over: Scalar[] = [];
  const xs = numbersOf(run, args, over);
  if ('k' in xs) return xs;
  if (xs.length === 0) return run.steps.chosenByAll(num(0), over);
  const best = xs.reduce((at, x, i) => (better(x.v, xs[at].v) ? i : at), 0);
  return picked(run, xs, [best], over);
}

function median(run: Run, args: readonly Value[]): Scalar {
  const over: Scalar[] = [];
  const xs = numbersOf(run, args, over);
  if ('k' in xs) return xs;
  if (xs.length === 0) return errorFrom(run, '#NUM!', over);
  const order = ascending(xs);
  const half = xs.length / 2;
  return picked(run, xs, Number.isInteger(half) ? [order[half - 1], order[half]] : [order[Math.floor(half)]], over);
}

/**
 * The number whose place in ascending order is `place(n, k)`. A fractional k is cut off, as two other sheets do it; for Excel
 * there is no documentation.
 */
function ranked(run: Run, [from, rank]: readonly Value[], place: (n: number, k: number) => number): Scalar {
  const over: Scalar[] = [];
  const xs = numbersOf(run, [from], over);
  if ('k' in xs) return xs;
  const wanted = run.scalar(rank);
  if (wanted.k === 'error') return wanted;
  const k = Math.trunc(numberOf(wanted).v);
  over.push(wanted);
  if (k < 1 || k > xs.length) return errorFrom(run, '#NUM!', [...xs, ...over]);
  return picked(run, xs, [ascending(xs)[place(xs.length, k)]], over);
}

/** Indices of the numbers in ascending order. */
const ascending = (xs: readonly Num[]): number[] => xs.map((_, i) => i).sort((i, j) => xs[i].v - xs[j].v);

/** The mean of the numbers at these places. */
function picked(run: Run, xs: readonly Num[], places: readonly number[], over: readonly Scalar[]): Scalar {
  const slopes = new Float64Array(xs.length);
  for (const i of places) slopes[i] = 1 / places.length;
  const value = places.length === 1 ? xs[places[0]].v : (xs[places[0]].v + xs[places[1]].v) / 2;
  return linked(run, value, xs, slopes, over);
}
