import { type Native, rangeFunction } from '../native';
import { numbersOf } from '../ranges';
import type { Run } from '../run';
import type { Num, Scalar } from '../scalar';
import type { Value } from '../value';
import { numberOf } from './argument';
import { centred } from './centred';
import { errorFrom, linked } from './linked';

const many = { args: [1, 255] as [number, number], repeating: 1 };

/** Other means than the arithmetic one, and the mean deviation. In ranges only numbers count. */
export const means: Native[] = [
  rangeFunction('GEOMEAN', ['range'], (run, args) => overNumbers(run, args, (xs) => {
    if (xs.some((x) => x <= 0)) return undefined;
    const value = Math.exp(xs.reduce((sum, x) => sum + Math.log(x), 0) / xs.length);
    return { value, slopes: xs.map((x) => value / (xs.length * x)) };
  }), many),
  rangeFunction('HARMEAN', ['range'], (run, args) => overNumbers(run, args, (xs) => {
    if (xs.some((x) => x <= 0)) return undefined;
    const value = xs.length / xs.reduce((sum, x) => sum + 1 / x, 0);
    return { value, slopes: xs.map((x) => (value / x) ** 2 / xs.length) };
  }), many),
  rangeFunction('AVEDEV', ['range'], (run, args) => overNumbers(run, args, (xs) => {
    const { left } = centred(xs);
    const n = xs.length;
    const signs = Array.from(left, Math.sign);
    const shift = signs.reduce((sum, s) => sum + s, 0) / n;
    return { value: left.reduce((sum, d) => sum + Math.abs(d), 0) / n, slopes: signs.map((s) => (s - shift) / n) };
  }), many),
  rangeFunction('TRIMMEAN', ['range', 'number'], (run, [from, percent]) => {
    const share = run.scalar(percent);
    if (share.k === 'error') return share;
    const { v } = numberOf(share);
    return overNumbers(run, [from], (xs) => (v >= 0 && v < 1 ? trimmed(xs, v) : undefined), [share]);
  }),
];

interface Smooth {
  readonly value: number;
  readonly slopes: readonly number[];
}

/** A value of numbers with its slopes; undefined from `of`, or no number at all, is #NUM!. */
function overNumbers(run: Run, args: readonly Value[], of: (xs: number[]) => Smooth | undefined, deciders: readonly Scalar[] = []): Scalar {
  const over: Scalar[] = [...deciders];
  const xs: Num[] | Scalar = numbersOf(run, args, over);
  if ('k' in xs) return xs;
  const found = xs.length === 0 ? undefined : of(xs.map((x) => x.v));
  return found ? linked(run, found.value, xs, found.slopes, over) : errorFrom(run, '#NUM!', [...xs, ...over]);
}

/** The mean of what is left when a share of the numbers is taken away, half of it at each end, rounded down. */
function trimmed(xs: readonly number[], share: number): Smooth {
  const cut = Math.floor(Number(((xs.length * share) / 2).toPrecision(15)));
  const kept = xs.map((_, i) => i).sort((i, j) => xs[i] - xs[j]).slice(cut, xs.length - cut);
  const slopes = xs.map(() => 0);
  for (const i of kept) slopes[i] = 1 / kept.length;
  return { value: centred(kept.map((i) => xs[i])).mean, slopes };
}
