import { type Native, scalarFunction, smooth } from '../native';
import { power } from '../operators';
import type { Run } from '../run';
import { type Scalar, num } from '../scalar';
import { numberOf } from './argument';

const degree = Math.PI / 180;

/** Roots, powers, exponentials, logarithms and the change between degrees and radians. */
export const elementary: Native[] = [
  smooth('SQRT', Math.sqrt, (_x, y) => 0.5 / y),
  smooth('SQRTPI', (x) => Math.sqrt(x * Math.PI), (_x, y) => (0.5 * Math.PI) / y),
  smooth('EXP', Math.exp, (_x, y) => y),
  smooth('LN', (x) => (x > 0 ? Math.log(x) : NaN), (x) => 1 / x),
  smooth('LOG10', (x) => (x > 0 ? Math.log10(x) : NaN), (x) => 1 / (x * Math.LN10)),
  scalarFunction('LOG', ['number', 'number'], logarithm, { args: [1, 2] }),
  smooth('DEGREES', (x) => x / degree, () => 1 / degree),
  smooth('RADIANS', (x) => x * degree, () => degree),
  smooth('ABS', Math.abs, (x) => Math.sign(x)),
  scalarFunction('POWER', ['number', 'number'], (run, [a, b]) => power(run.steps, numberOf(a), numberOf(b))),
  scalarFunction('PI', [], () => num(Math.PI)),
];

/** LOG(x, [base = 10]): base 1 is #DIV/0!, what is not above 0 #NUM!. */
function logarithm(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const x = numberOf(args[0]);
  const base = args.length > 1 ? numberOf(args[1]) : num(10);
  if (base.k === 'error') return base;
  if (x.v <= 0 || base.v <= 0) return run.steps.error('#NUM!', x, base);
  if (base.v === 1) return run.steps.error('#DIV/0!', x, base);
  const scale = Math.log(base.v);
  // Math.log10 and Math.log2 are exact at powers of their base, the quotient is not
  const y = base.v === 10 ? Math.log10(x.v) : base.v === 2 ? Math.log2(x.v) : Math.log(x.v) / scale;
  return run.steps.binary(y, x, 1 / (x.v * scale), base, -y / (base.v * scale));
}
