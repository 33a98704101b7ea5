import { type Native, rangeFunction } from '../native';
import { numbersOf } from '../ranges';
import type { Run } from '../run';
import type { ErrorCode, Num, Scalar } from '../scalar';
import type { Value } from '../value';
import { type Centred, centred } from './centred';
import { errorFrom, linked } from './linked';

/** Variances, standard deviations and the sum of squared deviations. In ranges only numbers count. */
export const spread: Native[] = [
  ...['VAR', 'VAR.S'].map((name) => variance(name, 1)),
  ...['VARP', 'VAR.P'].map((name) => variance(name, 0)),
  ...['STDEV', 'STDEV.S'].map((name) => deviation(name, 1)),
  ...['STDEVP', 'STDEV.P'].map((name) => deviation(name, 0)),
  overDeviations('DEVSQ', 1, '#NUM!', ({ squares, left }) => ({ value: squares, slopes: left.map((x) => 2 * x) })),
];

/** The sum of squared deviations over n − `lost`. */
function variance(name: string, lost: 0 | 1): Native {
  return overDeviations(name, 1 + lost, '#DIV/0!', ({ squares, left }) => {
    const dof = left.length - lost;
    return { value: squares / dof, slopes: left.map((x) => (2 * x) / dof) };
  });
}

/** The root of that. Where all numbers are equal it has a corner, so no finite slope; a single number always has deviation 0. */
function deviation(name: string, lost: 0 | 1): Native {
  return overDeviations(name, 1 + lost, '#DIV/0!', ({ squares, left }) => {
    const dof = left.length - lost;
    const s = Math.sqrt(squares / dof);
    return { value: s, slopes: left.map((x) => (s > 0 ? x / (dof * s) : left.length === 1 ? 0 : Infinity)) };
  });
}

function overDeviations(
  name: string, least: number, tooFew: ErrorCode, from: (c: Centred) => { value: number; slopes: Float64Array },
): Native {
  const body = (run: Run, args: readonly Value[]): Scalar => {
    const over: Scalar[] = [];
    const xs: Num[] | Scalar = numbersOf(run, args, over);
    if ('k' in xs) return xs;
    if (xs.length < least) return errorFrom(run, tooFew, [...xs, ...over]);
    const { value, slopes } = from(centred(xs.map((x) => x.v)));
    return linked(run, value, xs, slopes, over);
  };
  return rangeFunction(name, ['range'], body, { args: [1, 255], repeating: 1 });
}
