import { normalUpperTail, normalWithin } from '../../numbers/normalCdf';
import type { Native } from '../native';
import type { Num } from '../scalar';
import { strictFunction } from './strictFunction';

/** 2/sqrt(pi) · exp(−x²), the slope of ERF. */
const slope = (x: number): number => (2 / Math.sqrt(Math.PI)) * Math.exp(-x * x);

/** erf(x) = 2Φ(x·sqrt 2) − 1. @source DLMF 7.2.1, 7.17.1 with 7.2.2 */
const erf = (x: number): number => Math.sign(x) * normalWithin(Math.abs(x) * Math.SQRT2);

/** erfc(x) = 1 − erf(x), with its digits in the far tail. @source DLMF 7.2.2 */
const erfc = (x: number): number => 2 * normalUpperTail(x * Math.SQRT2);

/** ERF, ERFC and their PRECISE forms through the normal distribution. */
export const errorFunction: Native[] = [
  strictFunction('ERF', ['number', 'number'], (run, args) => {
    const [a, b] = args as Num[];
    if (b === undefined) return run.steps.unary(erf(a.v), a, slope(a.v));
    return run.steps.binary(between(a.v, b.v), a, -slope(a.v), b, slope(b.v));
  }, { args: [1, 2] }),
  strictFunction('ERF.PRECISE', ['number'], (run, [a]) => run.steps.unary(erf((a as Num).v), a!, slope((a as Num).v))),
  ...['ERFC', 'ERFC.PRECISE'].map((name) =>
    strictFunction(name, ['number'], (run, [a]) => run.steps.unary(erfc((a as Num).v), a!, -slope((a as Num).v)))),
];

/** erf(b) − erf(a), by the tails where both limits lie in one. */
function between(a: number, b: number): number {
  if (Math.min(a, b) > 0.5) return erfc(a) - erfc(b);
  return Math.max(a, b) < -0.5 ? erfc(-b) - erfc(-a) : erf(b) - erf(a);
}
