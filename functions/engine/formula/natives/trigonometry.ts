import { type Native, scalarFunction, smooth } from '../native';
import type { Run } from '../run';
import type { Scalar } from '../scalar';
import { numberOf } from './argument';

/**
 * Circular and hyperbolic functions and their inverses. Each slope is written in the form that loses no digits where the
 * function is flat or steep: 1 − x² as (1 − x)(1 + x), the slope of TANH as 1/cosh².
 */
export const trigonometry: Native[] = [
  smooth('SIN', Math.sin, (x) => Math.cos(x)),
  smooth('COS', Math.cos, (x) => -Math.sin(x)),
  smooth('TAN', Math.tan, (_x, y) => 1 + y * y),
  smooth('SEC', (x) => 1 / Math.cos(x), (x, y) => y * Math.tan(x)),
  reciprocal('CSC', (x) => 1 / Math.sin(x), (x, y) => -y / Math.tan(x)),
  reciprocal('COT', (x) => 1 / Math.tan(x), (_x, y) => -1 - y * y),
  smooth('ASIN', Math.asin, (x) => 1 / Math.sqrt((1 - x) * (1 + x))),
  smooth('ACOS', Math.acos, (x) => -1 / Math.sqrt((1 - x) * (1 + x))),
  smooth('ATAN', Math.atan, (x) => 1 / (1 + x * x)),
  smooth('ACOT', arcCotangent, (x) => -1 / (1 + x * x)),
  scalarFunction('ATAN2', ['number', 'number'], angle),
  smooth('SINH', Math.sinh, (x) => Math.cosh(x)),
  smooth('COSH', Math.cosh, (x) => Math.sinh(x)),
  smooth('TANH', Math.tanh, (x) => 1 / Math.cosh(x) ** 2),
  smooth('SECH', (x) => 1 / Math.cosh(x), (x, y) => -y * Math.tanh(x)),
  reciprocal('CSCH', (x) => 1 / Math.sinh(x), (x, y) => -y / Math.tanh(x)),
  reciprocal('COTH', (x) => 1 / Math.tanh(x), (x) => -1 / Math.sinh(x) ** 2),
  smooth('ASINH', Math.asinh, (x) => 1 / Math.hypot(1, x)),
  smooth('ACOSH', Math.acosh, (x) => 1 / Math.sqrt((x - 1) * (x + 1))),
  smooth('ATANH', Math.atanh, (x) => 1 / ((1 - x) * (1 + x))),
  smooth('ACOTH', (x) => Math.atanh(1 / x), (x) => 1 / ((1 - x) * (1 + x))),
];

/** A function of one number that has a pole at 0, where it is #DIV/0!. */
function reciprocal(name: string, value: (x: number) => number, slope: (x: number, y: number) => number): Native {
  return scalarFunction(name, ['number'], (run, [a]) => {
    const x = numberOf(a);
    if (x.v === 0) return run.steps.error('#DIV/0!', x);
    const y = value(x.v);
    return run.steps.unary(y, x, slope(x.v, y));
  });
}

/** The angle between 0 and π whose cotangent is x. */
function arcCotangent(x: number): number {
  if (x === 0) return Math.PI / 2;
  return x > 0 ? Math.atan(1 / x) : Math.PI + Math.atan(1 / x);
}

/** ATAN2(x, y) in the sheet's order of arguments; #DIV/0! at the origin. */
function angle(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const x = numberOf(args[0]);
  const y = numberOf(args[1]);
  if (x.v === 0 && y.v === 0) return run.steps.error('#DIV/0!', x, y);
  const r = Math.hypot(x.v, y.v);
  return run.steps.binary(Math.atan2(y.v, x.v), x, -(y.v / r) / r, y, x.v / r / r);
}
