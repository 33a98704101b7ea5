import { EngineError } from '../../EngineError';
import { excelRound } from '../../numbers/excelRound';
import { type Native, scalarFunction } from '../native';
import type { Run } from '../run';
import type { Scalar } from '../scalar';
import { numberOf } from './argument';

/**
 * Functions of one number that go in steps, and MOD. ROUND, ROUNDUP, ROUNDDOWN and MROUND pass slope 1 (a convention: what a
 * template rounds keeps its uncertainty); SIGN, INT and TRUNC have slope 0.
 */
export const rounding: Native[] = [
  rounded('ROUND', 'half'),
  rounded('ROUNDUP', 'up'),
  rounded('ROUNDDOWN', 'down'),
  scalarFunction('MROUND', ['number', 'number'], toMultiple),
  scalarFunction('TRUNC', ['number', 'number'], (run, args) => {
    const x = numberOf(args[0]);
    const digits = numberOf(args[1]);
    return run.steps.count(excelRound(x.v, digits.v, 'down'), x, digits);
  }, { args: [1, 2] }),
  scalarFunction('INT', ['number'], (run, [a]) => run.steps.count(floor15(numberOf(a).v), numberOf(a))),
  scalarFunction('SIGN', ['number'], (run, [a]) => run.steps.count(Math.sign(numberOf(a).v), numberOf(a))),
  scalarFunction('MOD', ['number', 'number'], remainder),
];

function rounded(name: string, way: 'half' | 'up' | 'down'): Native {
  return scalarFunction(name, ['number', 'number'], (run, args) => {
    const x = numberOf(args[0]);
    const digits = numberOf(args[1]);
    const y = roundedOrUndefined(x.v, digits.v, way);
    return y === undefined ? run.steps.error('#NUM!', x, digits) : run.steps.binary(y, x, 1, digits, 0);
  });
}

/** Rounding away from 0 can leave the range of numbers (ROUNDUP(1, -400)). */
function roundedOrUndefined(x: number, digits: number, way: 'half' | 'up' | 'down'): number | undefined {
  try {
    return excelRound(x, digits, way);
  } catch (e) {
    if (e instanceof EngineError && e.kind === 'notFinite') return undefined;
    throw e;
  }
}

/**
 * MROUND(x, multiple): the nearest multiple, halves away from 0; 0 where either is 0, #NUM! where the signs differ.
 *
 * @source Microsoft's function reference; the quotient is rounded as it stands in binary, which gives the reference's own
 *         examples of midpoints: MROUND(6.05, 0.1) is 6, MROUND(7.05, 0.1) is 7.1
 */
function toMultiple(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const x = numberOf(args[0]);
  const multiple = numberOf(args[1]);
  if (x.v * multiple.v < 0) return run.steps.error('#NUM!', x, multiple);
  const y = x.v === 0 || multiple.v === 0 ? 0 : multiple.v * Math.floor(x.v / multiple.v + 0.5);
  return run.steps.binary(y, x, 1, multiple, 0);
}

/** MOD(n, d) = n − d·INT(n/d), with the sign of d. */
function remainder(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const n = numberOf(args[0]);
  const d = numberOf(args[1]);
  if (d.v === 0) return run.steps.error('#DIV/0!', n, d);
  const whole = Math.floor(n.v / d.v);
  return run.steps.binary(n.v - d.v * whole, n, 1, d, -whole);
}

/**
 * INT works on the 15 digits that the sheet shows: INT(123456789-0.0000004) is 123456789 there.
 *
 * @source observed by users of the sheet; no documentation
 */
const floor15 = (x: number): number => Math.floor(Number(x.toPrecision(15)));
