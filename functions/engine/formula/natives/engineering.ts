import { compareNumbers } from '../compare';
import type { Native } from '../native';
import type { Run } from '../run';
import { type Num, type Scalar, num } from '../scalar';
import type { Value } from '../value';
import { together } from './follow';
import { refuseUse } from './refuseUse';
import { strictFunction } from './strictFunction';

/** DELTA and GESTEP, which decide with slope 0, and SERIESSUM. */
export const engineering: Native[] = [
  decision('DELTA', (a, b) => a === b),
  decision('GESTEP', (a, b) => a >= b),
  strictFunction('SERIESSUM', ['number', 'number', 'number', 'whole range'], (run, args, [given]) => seriesSum(run, args as Num[], given)),
];

function decision(name: string, holds: (a: number, b: number) => boolean): Native {
  return strictFunction(name, ['number', 'number'], (run, args) => {
    const [a, b = num(0) as Num] = args as Num[];
    if (a.v !== b.v && compareNumbers(a.v, b.v) === 0) refuseUse(name, 'its numbers differ beyond the 15th digit only');
    return run.steps.count(holds(a.v, b.v) ? 1 : 0, a, b);
  }, { args: [1, 2] });
}

/**
 * SERIESSUM(x, n, m, coefficients) = Σ a_i x^(n + i·m), i from 0, coefficients row by row, which must all be numbers. Slopes by n
 * and m exist for x > 0 only.
 */
function seriesSum(run: Run, args: readonly Num[], given: Value): Scalar {
  const [x, n, m] = args;
  if (given.k === 'missing' || given.k === 'union') refuseUse('SERIESSUM', 'its coefficients are not one range');
  const { cells, rows, cols } = run.matrix(given);
  const bad = cells.find((s) => s.k === 'error');
  if (bad) return bad;
  if (cells.length < rows * cols || cells.some((s) => s.k !== 'number')) refuseUse('SERIESSUM', 'a coefficient is no number');
  if (x.v === 0 && Math.min(n.v, n.v + (cells.length - 1) * m.v) <= 0) refuseUse('SERIESSUM', '0 is raised to a power that is not above 0');
  let [value, byX, byN, byM] = [0, 0, 0, 0];
  const powers = (cells as readonly Num[]).map((a, i) => {
    const exponent = n.v + i * m.v;
    const power = x.v ** exponent;
    const log = x.v > 0 ? Math.log(x.v) : NaN;
    value += a.v * power;
    byX += exponent === 0 ? 0 : a.v * exponent * x.v ** (exponent - 1);
    byN += a.v * power * log;
    byM += a.v * power * log * i;
    return power;
  });
  if (!Number.isFinite(value)) return run.steps.error('#NUM!', ...args, together(run, cells));
  return run.steps.many(value, [...args, ...cells], [byX, byN, byM, ...powers]);
}
