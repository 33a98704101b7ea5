import { toNumber } from '../coerce';
import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Scalar, num } from '../scalar';
import { type Value, isScalar, matrix } from '../value';
import { ranks } from './ranks';
import { spread } from './spread';
import { sums } from './sums';

const siblings = new Map([...ranks, ...spread, ...sums].map((native) => [native.name, native]));

/** Functions that count text in ranges as 0, and TRUE and FALSE as 1 and 0; else what their namesakes without the A are. */
export const allValues: Native[] = [
  ['AVERAGEA', 'AVERAGE'], ['MAXA', 'MAX'], ['MINA', 'MIN'], ['VARA', 'VAR'], ['VARPA', 'VARP'], ['STDEVA', 'STDEV'], ['STDEVPA', 'STDEVP'],
].map(([name, sibling]) => rangeFunction(name, ['range'], (run, args) => {
  const numbers: Scalar[] = [];
  for (const arg of args) for (const part of run.parts(arg)) for (const s of counted(run, part)) numbers.push(s);
  return siblings.get(sibling)!.body(run, [matrix(numbers.length, 1, numbers)]);
}, { args: [1, 255], repeating: 1 }));

/** Everything but blanks, as numbers or errors. */
function counted(run: Run, part: Value): Scalar[] {
  if (part.k === 'missing') return [num(0)];
  if (isScalar(part)) return [toNumber(run.steps, part)];
  const found: Scalar[] = [];
  const m = run.matrix(part);
  const take = (s: Scalar): void => {
    if (s.k === 'number' || s.k === 'error') found.push(s);
    else if (s.k === 'boolean') found.push(num(s.v ? 1 : 0, s.d));
    else if (s.k === 'text') found.push(run.steps.chosen(num(0), s));
  };
  m.cells.forEach(take);
  if (m.fill.k !== 'blank') for (let i = m.height * m.width; i < m.rows * m.cols; i++) take(m.fill);
  return found;
}
