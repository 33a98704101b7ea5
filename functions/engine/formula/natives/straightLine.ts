import { type Native, rangeFunction } from '../native';
import { pairsOf } from '../ranges';
import type { Run } from '../run';
import { type Num, type Scalar, NONE } from '../scalar';
import type { Value } from '../value';
import { numberOf } from './argument';
import { type Centred, centred, dot } from './centred';
import { errorFrom, linked } from './linked';

/** Sums over n pairs, relative to the means; x and y as the sheet's argument names have them. */
interface Pairs {
  readonly n: number;
  readonly x: Centred;
  readonly y: Centred;
  /** Σ (x − x̄)(y − ȳ) */
  readonly products: number;
}

/** A value with its slopes by every y and every x; undefined where the sheet has #DIV/0!. */
type Result = { value: number; byY: (i: number) => number; byX: (i: number) => number } | undefined;

/**
 * The least-squares line and the correlation coefficient: values from sums over centred data, slopes by every y and x.
 * With b the slope of the line and S the sums of squares and products over centred data:
 *     ∂b/∂y_i = dx_i / Sxx        ∂b/∂x_i = (dy_i − 2 b dx_i) / Sxx
 *
 * @source the derivatives follow from the definitions; residuals are orthogonal to 1 and x, so those of their sum of squares are
 *         2 e_i by y_i and −2 b e_i by x_i
 */
export const straightLine: Native[] = [
  ofPairs('SLOPE', line),
  ofPairs('INTERCEPT', (p) => at(p, 0)),
  ofPairs('RSQ', (p) => {
    const r = correlation(p);
    return r && { value: r.value ** 2, byY: (i) => 2 * r.value * r.byY(i), byX: (i) => 2 * r.value * r.byX(i) };
  }),
  ofPairs('CORREL', correlation),
  ofPairs('PEARSON', correlation),
  ofPairs('STEYX', residualDeviation),
  forecast('FORECAST'),
  forecast('FORECAST.LINEAR'),
];

function line({ x, y, products }: Pairs): Result {
  if (x.squares === 0) return undefined;
  const b = products / x.squares;
  return { value: b, byY: (i) => x.left[i] / x.squares, byX: (i) => (y.left[i] - 2 * b * x.left[i]) / x.squares };
}

/** The height of the line at x0. */
function at(p: Pairs, x0: number): Result {
  const b = line(p);
  if (!b) return undefined;
  const reach = x0 - p.x.mean;
  return {
    value: p.y.mean + b.value * reach,
    byY: (i) => 1 / p.n + reach * b.byY(i),
    byX: (i) => reach * b.byX(i) - b.value / p.n,
  };
}

function correlation({ x, y, products }: Pairs): Result {
  if (x.squares === 0 || y.squares === 0) return undefined;
  const scale = Math.sqrt(x.squares) * Math.sqrt(y.squares);
  const r = products / scale;
  return {
    value: r,
    byY: (i) => x.left[i] / scale - (r * y.left[i]) / y.squares,
    byX: (i) => y.left[i] / scale - (r * x.left[i]) / x.squares,
  };
}

/** The residual standard deviation with n − 2; no finite slope where all points lie on the line. */
function residualDeviation(p: Pairs): Result {
  const b = line(p)?.value;
  if (b === undefined || p.n < 3) return undefined;
  const e = p.y.left.map((dy, i) => dy - b * p.x.left[i]);
  const s = Math.sqrt(dot(e, e) / (p.n - 2));
  const slope = (i: number): number => (s > 0 ? e[i] / ((p.n - 2) * s) : Infinity);
  return { value: s, byY: slope, byX: (i) => (b === 0 ? 0 : -b * slope(i)) };
}

function ofPairs(name: string, result: (p: Pairs) => Result): Native {
  return rangeFunction(name, ['range', 'range'], (run, [ys, xs]) => overPairs(run, ys, xs, result));
}

/** FORECAST(x, known_y, known_x) */
function forecast(name: string): Native {
  return rangeFunction(name, ['number', 'range', 'range'], (run, [where, ys, xs]) => {
    const given = run.scalar(where);
    if (given.k === 'error') return given;
    const x0 = numberOf(given);
    return overPairs(run, ys, xs, (p) => at(p, x0.v), { of: x0, slope: (p) => line(p)?.value ?? 0 });
  });
}

function overPairs(
  run: Run, ys: Value, xs: Value, result: (p: Pairs) => Result, also?: { of: Num; slope: (p: Pairs) => number },
): Scalar {
  const over: Scalar[] = [];
  const pairs = pairsOf(run, ys, xs, over);
  if ('k' in pairs) return pairs;
  const { x: y, y: x } = pairs; // pairsOf names its first range x
  const args: Scalar[] = [...y, ...x];
  if (also && also.of.d !== NONE) args.push(also.of);
  const p = x.length > 0 ? sumsOf(x, y) : undefined;
  const found = p && result(p);
  if (!p || !found) return errorFrom(run, '#DIV/0!', [...args, ...over]);
  const slopes = [...x.map((_, i) => found.byY(i)), ...x.map((_, i) => found.byX(i))];
  if (also && also.of.d !== NONE) slopes.push(also.slope(p));
  return linked(run, found.value, args, slopes, over);
}

function sumsOf(xs: readonly Num[], ys: readonly Num[]): Pairs {
  const x = centred(xs.map((s) => s.v));
  const y = centred(ys.map((s) => s.v));
  return { n: xs.length, x, y, products: dot(x.left, y.left) };
}
