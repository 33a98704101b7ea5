import { type Native, rangeFunction } from '../native';
import { pairsOf } from '../ranges';
import type { Run } from '../run';
import type { Scalar } from '../scalar';
import type { Value } from '../value';
import { centred, dot } from './centred';
import { errorFrom, linked } from './linked';
import { refuseUse } from './refuseUse';

/** Covariances, and sums over pairs. Pairs with anything that is no number are passed over. */
export const pairSums: Native[] = [
  covariance('COVAR', 0), covariance('COVARIANCE.P', 0), covariance('COVARIANCE.S', 1),
  pairSum('SUMX2MY2', (x, y) => [x * x - y * y, 2 * x, -2 * y]),
  pairSum('SUMX2PY2', (x, y) => [x * x + y * y, 2 * x, 2 * y]),
  pairSum('SUMXMY2', (x, y) => [(x - y) ** 2, 2 * (x - y), -2 * (x - y)]),
];

/** The sum of products of deviations over n − `lost`; too few pairs are #DIV/0!. */
function covariance(name: string, lost: 0 | 1): Native {
  return rangeFunction(name, ['range', 'range'], (run, args) => overPairs(run, args, (xs, ys) => {
    const n = xs.length - lost;
    if (n < 1) return undefined;
    const [dx, dy] = [centred(xs).left, centred(ys).left];
    return { value: dot(dx, dy) / n, byX: Array.from(dy, (d) => d / n), byY: Array.from(dx, (d) => d / n) };
  }));
}

function pairSum(name: string, term: (x: number, y: number) => readonly [value: number, byX: number, byY: number]): Native {
  return rangeFunction(name, ['range', 'range'], (run, args) => overPairs(run, args, (xs, ys) => {
    if (xs.length === 0) refuseUse(name, 'it has no pair of numbers');
    const terms = xs.map((x, i) => term(x, ys[i]));
    return { value: terms.reduce((sum, t) => sum + t[0], 0), byX: terms.map((t) => t[1]), byY: terms.map((t) => t[2]) };
  }));
}

interface OfPairs {
  readonly value: number;
  readonly byX: readonly number[];
  readonly byY: readonly number[];
}

function overPairs(run: Run, [a, b]: readonly Value[], of: (xs: number[], ys: number[]) => OfPairs | undefined): Scalar {
  const over: Scalar[] = [];
  const pairs = pairsOf(run, a, b, over);
  if ('k' in pairs) return pairs;
  const { x, y } = pairs;
  const found = of(x.map((s) => s.v), y.map((s) => s.v));
  return found ? linked(run, found.value, [...x, ...y], [...found.byX, ...found.byY], over) : errorFrom(run, '#DIV/0!', [...x, ...y, ...over]);
}
