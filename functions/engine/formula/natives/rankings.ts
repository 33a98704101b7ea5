import { type Native, rangeFunction } from '../native';
import { numbersOf } from '../ranges';
import type { Run } from '../run';
import type { Err, Num, Scalar } from '../scalar';
import { type Value, matrix } from '../value';
import { numberOf } from './argument';
import { errorFrom, linked } from './linked';

/** The rank of a number among others, the share of others below it, and the numbers that stand there most often. */
export const rankings: Native[] = [
  ...['RANK', 'RANK.EQ'].map((name) => rank(name, () => 0)),
  rank('RANK.AVG', (equal) => (equal - 1) / 2),
  ...['PERCENTRANK', 'PERCENTRANK.INC'].map((name) => share(name, (place, n) => (n === 1 ? 1 : place / (n - 1)))),
  share('PERCENTRANK.EXC', (place, n) => (place + 1) / (n + 1)),
  ...['MODE', 'MODE.SNGL'].map((name) => rangeFunction(name, ['range'], (run, args) => {
    const found = modes(run, args);
    return 'k' in found ? found : found[0];
  }, { args: [1, 255], repeating: 1 })),
  rangeFunction('MODE.MULT', ['range'], (run, args) => {
    const found = modes(run, args);
    return 'k' in found ? found : matrix(found.length, 1, found);
  }, { args: [1, 255], repeating: 1 }),
];

/** RANK(number, reference, [ascending]): equal numbers share the rank of the first of them, or the mean of all. */
function rank(name: string, onTop: (equal: number) => number): Native {
  return rangeFunction(name, ['number', 'range', 'number'], (run, [given, from, order]) => {
    const x = run.scalar(given);
    if (x.k === 'error') return x;
    const ascending = order === undefined ? undefined : run.scalar(order);
    if (ascending?.k === 'error') return ascending;
    const over: Scalar[] = [x, ...(ascending ? [ascending] : [])];
    const xs = numbersOf(run, [from], over);
    if ('k' in xs) return xs;
    const { v } = numberOf(x);
    const equal = xs.filter((other) => other.v === v).length;
    if (equal === 0) return errorFrom(run, '#N/A', [...xs, ...over]);
    const up = ascending !== undefined && numberOf(ascending).v !== 0;
    const before = xs.filter((other) => (up ? other.v < v : other.v > v)).length;
    return linked(run, before + 1 + onTop(equal), xs, 0, over);
  }, { args: [2, 3] });
}

/**
 * PERCENTRANK(array, number, [digits]): the share of the array below a number, in a straight line between neighbours, cut off to
 * three digits unless more or fewer are wanted. Cut off it has no slope (NaN).
 */
function share(name: string, of: (place: number, n: number) => number): Native {
  return rangeFunction(name, ['range', 'number', 'number'], (run, [from, given, places]) => {
    const x = run.scalar(given);
    if (x.k === 'error') return x;
    const digits = places === undefined ? undefined : run.scalar(places);
    if (digits?.k === 'error') return digits;
    const over: Scalar[] = digits ? [digits] : [];
    const xs = numbersOf(run, [from], over);
    if ('k' in xs) return xs;
    const kept = digits ? Math.trunc(numberOf(digits).v) : 3;
    if (xs.length === 0 || kept < 1) return errorFrom(run, '#NUM!', [...xs, ...over, x]);
    const place = placeOf(xs.map((s) => s.v).sort((a, b) => a - b), numberOf(x).v);
    if (place === undefined) return errorFrom(run, '#N/A', [...xs, ...over, x]);
    const scale = 10 ** kept;
    const cut = Math.floor(Number((of(place, xs.length) * scale).toPrecision(15))) / scale;
    return run.steps.many(cut, [...xs, x, ...over], NaN);
  }, { args: [2, 3] });
}

/** The 0-based place of a number among sorted ones: the first of equal ones, a fraction between two; undefined outside. */
function placeOf(sorted: readonly number[], v: number): number | undefined {
  if (!(v >= sorted[0] && v <= sorted[sorted.length - 1])) return undefined;
  const at = sorted.findIndex((x) => x >= v);
  return sorted[at] === v ? at : at - 1 + (v - sorted[at - 1]) / (sorted[at] - sorted[at - 1]);
}

/** The most frequent numbers in the order in which they were met; #N/A where none stands twice. All numbers decide. */
function modes(run: Run, args: readonly Value[]): Scalar[] | Err {
  const over: Scalar[] = [];
  const xs: Num[] | Err = numbersOf(run, args, over);
  if ('k' in xs) return xs;
  const counts = new Map<number, number>();
  for (const { v } of xs) counts.set(v, (counts.get(v) ?? 0) + 1);
  const most = Math.max(0, ...counts.values());
  if (most < 2) return errorFrom(run, '#N/A', [...xs, ...over]);
  return [...counts].filter(([, count]) => count === most).map(([v]) => {
    const slopes = new Float64Array(xs.length);
    slopes[xs.findIndex((x) => x.v === v)] = NaN; // an uncertain number has no most frequent one
    return linked(run, v, xs, slopes, over);
  });
}
