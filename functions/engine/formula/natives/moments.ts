import { type Native, rangeFunction } from '../native';
import { numbersOf } from '../ranges';
import type { Run } from '../run';
import type { Num, Scalar } from '../scalar';
import type { Value } from '../value';
import { centred } from './centred';
import { errorFrom, linked } from './linked';

/**
 * Skewness and excess kurtosis, of a sample or (SKEW.P) of all there is. In ranges only numbers count.
 *
 * @source Excel's documentation of SKEW, SKEW.P and KURT
 */
export const moments: Native[] = [
  moment('SKEW', 3, (n) => n / ((n - 1) * (n - 2)), 3, 1, () => 0),
  moment('SKEW.P', 3, (n) => 1 / n, 3, 0, () => 0),
  moment('KURT', 4, (n) => (n * (n + 1)) / ((n - 1) * (n - 2) * (n - 3)), 4, 1, (n) => (3 * (n - 1) ** 2) / ((n - 2) * (n - 3))),
];

/** factor(n) Σ(d/s)^power − less(n), d the deviations from the mean, s² = Σd²/(n − lost). */
function moment(name: string, least: number, factor: (n: number) => number, power: 3 | 4, lost: 0 | 1, less: (n: number) => number): Native {
  const body = (run: Run, args: readonly Value[]): Scalar => {
    const over: Scalar[] = [];
    const xs: Num[] | Scalar = numbersOf(run, args, over);
    if ('k' in xs) return xs;
    const n = xs.length;
    const { left, squares } = n > 0 ? centred(xs.map((x) => x.v)) : { left: new Float64Array(), squares: 0 };
    if (n < least || squares === 0) return errorFrom(run, '#DIV/0!', [...xs, ...over]);
    const s = Math.sqrt(squares / (n - lost));
    const total = (of: number): number => left.reduce((sum, d) => sum + d ** of, 0);
    const [lower, upper] = [total(power - 1), total(power)];
    const slopes = Array.from(left, (d) =>
      factor(n) * (power * (d ** (power - 1) - lower / n) / s ** power - (power * upper * d) / ((n - lost) * s ** (power + 2))));
    return linked(run, factor(n) * upper / s ** power - less(n), xs, slopes, over);
  };
  return rangeFunction(name, ['range'], body, { args: [1, 255], repeating: 1 });
}
