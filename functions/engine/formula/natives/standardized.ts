import { type Native, rangeFunction, scalarFunction, smooth } from '../native';
import { pairsOf } from '../ranges';
import type { Run } from '../run';
import { type Num, type Scalar, NONE, num } from '../scalar';
import { type Value, matrix } from '../value';
import { numberOf } from './argument';
import { elementsOf } from './arrays';
import { together } from './follow';
import { errorFrom, linked } from './linked';
import { refuseUse } from './refuseUse';

/** STANDARDIZE, FISHER and its inverse, PROB, FREQUENCY. */
export const standardized: Native[] = [
  scalarFunction('STANDARDIZE', ['number', 'number', 'number'], (run, args) => {
    const [x, mean, sd] = args.map(numberOf);
    if (sd.v <= 0) return run.steps.error('#NUM!', x, mean, sd);
    const z = (x.v - mean.v) / sd.v;
    return run.steps.many(z, [x, mean, sd], [1 / sd.v, -1 / sd.v, -z / sd.v]);
  }),
  smooth('FISHER', (x) => (Math.abs(x) < 1 ? Math.atanh(x) : NaN), (x) => 1 / (1 - x * x)),
  smooth('FISHERINV', Math.tanh, (_x, y) => 1 - y * y),
  rangeFunction('PROB', ['range', 'range', 'number', 'number'], prob, { args: [3, 4] }),
  rangeFunction('FREQUENCY', ['range', 'range'], frequency),
];

/** PROB(values, probabilities, lower, [upper]): the sum of the probabilities of the values within the limits. They must add up to 1. */
function prob(run: Run, [values, chances, from, to]: readonly Value[]): Scalar {
  const over: Scalar[] = [];
  const pairs = pairsOf(run, values, chances, over);
  if ('k' in pairs) return pairs;
  const [low, high] = [run.scalar(from), to === undefined ? undefined : run.scalar(to)];
  for (const limit of [low, high]) if (limit?.k === 'error') return limit;
  const { x, y } = pairs;
  over.push(low, ...(high ? [high] : []), ...x);
  const total = y.reduce((sum, p) => sum + p.v, 0);
  if (y.some((p) => p.v <= 0 || p.v > 1) || Math.abs(total - 1) > 1e-9) return errorFrom(run, '#NUM!', [...y, ...over]);
  const [least, most] = [numberOf(low).v, numberOf(high ?? low).v];
  const taken = x.map((s) => (s.v >= least && s.v <= most ? 1 : 0));
  return linked(run, y.reduce((sum, p, i) => sum + p.v * taken[i], 0), y, taken, over);
}

/**
 * How many numbers lie up to each bin, above the one before it, and a last count of those above all; without bins, of all numbers. Bins
 * that fall are refused.
 */
function frequency(run: Run, [data, bins]: readonly Value[]): Value {
  const numbers: Num[] = [];
  const over: Scalar[] = [];
  for (const part of run.parts(data)) for (const s of run.matrix(part).cells) {
    if (s.k === 'error') return s;
    if (s.k === 'number') numbers.push(s);
    else if (s.d !== NONE) over.push(s);
  }
  const limits: Num[] = [];
  for (const part of run.parts(bins)) for (const s of elementsOf(run.matrix(part))) {
    if (s.k === 'error') return s;
    if (s.k === 'number') limits.push(s);
    else if (s.d !== NONE) over.push(s);
  }
  if (limits.some((b, i) => i > 0 && b.v <= limits[i - 1].v)) refuseUse('FREQUENCY', 'its bins do not rise');
  const below = [...limits.map((b) => numbers.filter((s) => s.v <= b.v).length), numbers.length];
  const by = together(run, [...numbers, ...limits, ...over]);
  return matrix(below.length, 1, below.map((count, i) => run.steps.chosen(num(count - (i > 0 ? below[i - 1] : 0)), by)));
}
