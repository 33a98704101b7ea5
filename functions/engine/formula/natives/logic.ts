import { toBool } from '../coerce';
import { type Native, rangeFunction, scalarFunction } from '../native';
import type { Run } from '../run';
import { type Bool, type Scalar, FALSE, TRUE } from '../scalar';
import type { Value } from '../value';
import { together } from './follow';

const many = { args: [1, 255] as [number, number], repeating: 1 };

/** AND, OR, XOR, NOT and the two constants. A decision links all that took part in it with slope 0. */
export const logic: Native[] = [
  rangeFunction('AND', ['range'], (run, args) => decide(run, args, (trues, all) => trues === all), many),
  rangeFunction('OR', ['range'], (run, args) => decide(run, args, (trues) => trues > 0), many),
  rangeFunction('XOR', ['range'], (run, args) => decide(run, args, (trues) => trues % 2 === 1), many),
  scalarFunction('NOT', ['boolean'], (run, [b]) => run.steps.decision(!(b as Bool | undefined)?.v, b ?? FALSE)),
  scalarFunction('TRUE', [], () => TRUE),
  scalarFunction('FALSE', [], () => FALSE),
];

/**
 * In a range numbers and booleans count, text and blank cells are passed over; a scalar argument is coerced. The first error is
 * returned; where nothing counts, #VALUE!.
 */
function decide(run: Run, args: readonly Value[], verdict: (trues: number, all: number) => boolean): Scalar {
  const by: Scalar[] = [];
  let trues = 0;
  let all = 0;
  const take = (s: Scalar, truth: boolean, times = 1): void => {
    by.push(s);
    all += times;
    if (truth) trues += times;
  };
  for (const arg of args) {
    if (arg.k === 'missing') {
      take(FALSE, false);
      continue;
    }
    for (const part of run.parts(arg)) {
      if (part.k !== 'area' && part.k !== 'matrix') {
        const b = toBool(run.steps, run.scalar(part));
        if (b.k === 'error') return b;
        take(b, b.v);
        continue;
      }
      const m = run.matrix(part);
      for (const s of m.cells) {
        if (s.k === 'error') return s;
        if (s.k === 'number' || s.k === 'boolean') take(s, Boolean(s.v));
      }
      const rest = m.rows * m.cols - m.height * m.width;
      if (rest > 0 && m.fill.k === 'error') return m.fill;
      if (rest > 0 && (m.fill.k === 'number' || m.fill.k === 'boolean')) take(m.fill, Boolean(m.fill.v), rest);
    }
  }
  if (all === 0) return run.steps.error('#VALUE!');
  return run.steps.decision(verdict(trues, all), together(run, by));
}
