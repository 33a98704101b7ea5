import { type Native, rangeFunction, scalarFunction } from '../native';
import { numbersOf } from '../ranges';
import type { Scalar } from '../scalar';
import { numberOf } from './argument';
import { errorFrom, linked } from './linked';
import { strictFunction } from './strictFunction';

/** Counts of arrangements. Arguments are cut off to whole numbers, so all have slope 0. */
export const combinatorics: Native[] = [
  counted('FACT', 1, ([n]) => (n < 0 ? NaN : product(1, n))),
  strictFunction('FACTDOUBLE', ['number'], (run, [x]) => {
    const n = Math.trunc(numberOf(x).v);
    const value = n < -1 ? NaN : product(n % 2 === 0 ? 2 : 1, n, 2);
    return Number.isFinite(value) ? run.steps.count(value, x!) : run.steps.error('#NUM!', x!);
  }),
  counted('COMBIN', 2, ([n, k]) => (k < 0 || n < k ? NaN : combinations(n, k))),
  counted('COMBINA', 2, ([n, k]) => (n < 0 || k < 0 || (n === 0 && k > 0) ? NaN : combinations(Math.max(0, n + k - 1), k))),
  counted('PERMUT', 2, ([n, k]) => (n < 0 || k < 0 || n < k ? NaN : product(n - k + 1, n))),
  counted('PERMUTATIONA', 2, ([n, k]) => (n < 0 || k < 0 ? NaN : n === 0 && k === 0 ? 1 : n ** k)),
  rangeFunction('MULTINOMIAL', ['range'], (run, args) => {
    const written = args.find((a) => a.k === 'boolean');
    if (written) return run.steps.error('#VALUE!', written as Scalar);
    const over: Scalar[] = [];
    const xs = numbersOf(run, args, over);
    if ('k' in xs) return xs;
    const whole = xs.map((x) => Math.trunc(x.v));
    const value = whole.some((n) => n < 0) ? NaN : whole.reduce(
      (found, n, i) => found * combinations(whole.slice(0, i + 1).reduce((sum, m) => sum + m, 0), n), 1);
    return Number.isFinite(value) ? linked(run, value, xs, 0, over) : errorFrom(run, '#NUM!', [...xs, ...over]);
  }, { args: [1, 255], repeating: 1 }),
];

function counted(name: string, arguments_: 1 | 2, of: (whole: number[]) => number): Native {
  return scalarFunction(name, arguments_ === 1 ? ['number'] : ['number', 'number'], (run, args) => {
    const from = args.map(numberOf);
    const value = of(from.map(({ v }) => Math.trunc(v)));
    return Number.isFinite(value) ? run.steps.count(value, ...from) : run.steps.error('#NUM!', ...from);
  });
}

/** first · (first + step) … up to last; infinite as soon as it is too large. */
function product(first: number, last: number, step = 1): number {
  let value = 1;
  for (let i = first; i <= last && value < Infinity; i += step) value *= i;
  return value;
}

/** n over k. Each step divides without a rest, so it is exact as long as it can be held; where a product would not be, the quotient comes first. */
function combinations(n: number, k: number): number {
  const steps = Math.min(k, n - k);
  let value = 1;
  for (let i = 1; i <= steps && value < Infinity; i++) {
    const factor = n - steps + i;
    value = value * factor < Infinity ? (value * factor) / i : (value / i) * factor;
  }
  return value;
}
