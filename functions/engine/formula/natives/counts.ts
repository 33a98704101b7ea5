import { type Native, rangeFunction } from '../native';
import { textNumber } from '../numberText';
import type { Run } from '../run';
import type { Scalar } from '../scalar';
import { type Value, isScalar } from '../value';
import { errorFrom } from './linked';

const many = { args: [1, 255] as [number, number], repeating: 1 };

/** Counts: slope 0 to every cell looked at, for each of them decided whether it counts. */
export const counts: Native[] = [
  rangeFunction('COUNT', ['range'], (run, args) => count(run, args, isNumber, readsAsNumber), many),
  rangeFunction('COUNTA', ['range'], (run, args) => count(run, args, isFilled, isFilled), many),
  rangeFunction('COUNTBLANK', ['range'], (run, args) =>
    run.areas(args[0])?.length === 1 ? count(run, args, isEmpty, isEmpty) : errorFrom(run, '#VALUE!', args.filter(isScalar))),
];

type Test = (s: Scalar) => boolean;

const isNumber: Test = (s) => s.k === 'number';
const isFilled: Test = (s) => s.k !== 'blank';
const isEmpty: Test = (s) => s.k === 'blank' || (s.k === 'text' && s.v === '');

/** A scalar written as an argument counts as a number if it can be read as one. */
const readsAsNumber: Test = (s) => s.k === 'number' || s.k === 'boolean' || (s.k === 'text' && textNumber(s.v) !== undefined);

function count(run: Run, args: readonly Value[], inRange: Test, asArgument: Test): Scalar {
  const seen: Scalar[] = [];
  let n = 0;
  for (const part of args.flatMap((a) => run.parts(a))) {
    if (part.k === 'missing') {
      n += 1; // an argument left empty counts, as 0
    } else if (isScalar(part)) {
      seen.push(part);
      if (asArgument(part)) n += 1;
    } else {
      const m = run.matrix(part);
      for (const s of m.cells) {
        seen.push(s);
        if (inRange(s)) n += 1;
      }
      if (inRange(m.fill)) n += m.rows * m.cols - m.height * m.width;
    }
  }
  return run.steps.many(n, seen, 0);
}
