import { toNumber } from '../coerce';
import { type Native, rangeFunction, scalarFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Num, type Scalar, err } from '../scalar';
import type { Value } from '../value';
import { numberOf } from './argument';
import { together } from './follow';
import { refuseUse } from './refuseUse';
import { strictFunction } from './strictFunction';
import { wholeOf } from './wholeOf';

/**
 * Multiples and whole quotients. CEILING and FLOOR have no slope (NaN), for what they cut off would be lost silently; EVEN, ODD,
 * QUOTIENT, GCD and LCM go in steps with slope 0, like INT.
 */
export const multiples: Native[] = [
  scalarFunction('CEILING', ['number', 'number'], (run, args) => {
    const [x, multiple] = args.map(numberOf);
    if (x.v > 0 && multiple.v < 0) return run.steps.error('#NUM!', x, multiple);
    return run.steps.many(multiple.v === 0 ? 0 : multiple.v * stepsIn('CEILING', x.v, multiple.v, Math.ceil) + 0, [x, multiple], NaN);
  }),
  scalarFunction('FLOOR', ['number', 'number'], (run, args) => {
    const [x, multiple] = args.map(numberOf);
    if (x.v > 0 && multiple.v < 0) return run.steps.error('#NUM!', x, multiple);
    if (multiple.v === 0) return x.v === 0 ? run.steps.many(0, [x, multiple], NaN) : run.steps.error('#DIV/0!', x, multiple);
    return run.steps.many(multiple.v * stepsIn('FLOOR', x.v, multiple.v, Math.floor) + 0, [x, multiple], NaN);
  }),
  scalarFunction('CEILING.MATH', ['number', 'number', 'number'], (run, args) => towards(run, 'CEILING.MATH', args, Math.ceil), { args: [1, 3] }),
  scalarFunction('FLOOR.MATH', ['number', 'number', 'number'], (run, args) => towards(run, 'FLOOR.MATH', args, Math.floor), { args: [1, 3] }),
  ...['CEILING.PRECISE', 'ISO.CEILING'].map((name) => scalarFunction(name, ['number', 'number'], (run, args) => towards(run, name, args, Math.ceil), { args: [1, 2] })),
  scalarFunction('FLOOR.PRECISE', ['number', 'number'], (run, args) => towards(run, 'FLOOR.PRECISE', args, Math.floor), { args: [1, 2] }),
  scalarFunction('EVEN', ['number'], (run, [a]) => awayFromZero(run, numberOf(a), (size) => 2 * Math.ceil(size / 2))),
  scalarFunction('ODD', ['number'], (run, [a]) => awayFromZero(run, numberOf(a), (size) => 2 * Math.ceil(Math.max(0, size - 1) / 2) + 1)),
  strictFunction('QUOTIENT', ['number', 'number'], (run, args) => {
    const [x, by] = args as Num[];
    if (by.v === 0) return run.steps.error('#DIV/0!', x, by);
    return run.steps.count(stepsIn('QUOTIENT', x.v, by.v, Math.trunc) + 0, x, by);
  }),
  rangeFunction('GCD', ['range'], (run, args) => ofWholeNumbers(run, 'GCD', args, commonDivisor), { args: [1, 255], repeating: 1 }),
  rangeFunction('LCM', ['range'], (run, args) => ofWholeNumbers(run, 'LCM', args, (a, b) =>
    (a === 0 || b === 0 ? 0 : (a / commonDivisor(a, b)) * b)), { args: [1, 255], repeating: 1 }),
];

/**
 * The quotient made whole. Refused where it is whole in its 15 digits but not in binary, so that the sheet's own rounding, which
 * is not documented, decides (`FLOOR(0.7, 0.1)`).
 */
function stepsIn(name: string, x: number, multiple: number, whole: (q: number) => number): number {
  const q = x / multiple;
  const found = whole(q);
  if (Number.isFinite(q) && found !== whole(Number(q.toPrecision(15)))) refuseUse(name, `${x} is a multiple of ${multiple} up to rounding`);
  return found;
}

/**
 * CEILING.MATH and FLOOR.MATH: the multiple is 1 unless given, its sign does not count. With a mode, negative numbers are rounded
 * by their size: CEILING.MATH away from 0, FLOOR.MATH towards it.
 */
function towards(run: Run, name: string, args: readonly (Scalar | undefined)[], whole: (q: number) => number): Scalar {
  if (args.some((a) => a === undefined)) refuseUse(name, 'an argument is left empty');
  const [x, multiple, mode] = [numberOf(args[0]), args.length > 1 ? numberOf(args[1]) : undefined, numberOf(args[2])];
  const size = Math.abs(multiple?.v ?? 1);
  const mirrored = x.v < 0 && mode.v !== 0;
  const value = size === 0 ? 0 : (mirrored ? -size : size) * stepsIn(name, mirrored ? -x.v : x.v, size, whole) + 0;
  return run.steps.many(value, [x, ...(multiple ? [multiple] : []), mode], NaN);
}

function awayFromZero(run: Run, x: Num, of: (size: number) => number): Scalar {
  return run.steps.count((x.v < 0 ? -1 : 1) * of(Math.abs(x.v)) + 0, x);
}

/** The largest whole number that GCD and LCM take or give. */
const LARGEST = 2 ** 53;

function ofWholeNumbers(run: Run, name: string, args: readonly Value[], combine: (a: number, b: number) => number): Scalar {
  const numbers = wholeNumbers(run, name, args);
  if ('k' in numbers) return numbers;
  const by = together(run, numbers);
  if (numbers.some(({ v }) => v < 0 || v >= LARGEST)) return run.steps.error('#NUM!', by);
  const value = numbers.map(({ v }) => wholeOf(name, v)).reduce(combine);
  return value > LARGEST ? run.steps.error('#NUM!', by) : run.steps.count(value, by);
}

function commonDivisor(a: number, b: number): number {
  while (b !== 0) [a, b] = [b, a % b];
  return a;
}

/** The numbers among the arguments, blank cells passed over; anything else in a range is refused, for its rules are not documented. */
function wholeNumbers(run: Run, name: string, args: readonly Value[]): Num[] | Err {
  const found: Num[] = [];
  for (const arg of args) {
    if (arg.k === 'missing') refuseUse(name, 'an argument is left empty');
    if (arg.k === 'boolean') return err('#VALUE!', arg.d);
    for (const part of run.parts(arg)) {
      const single = part.k !== 'area' && part.k !== 'matrix';
      const { cells, fill } = run.matrix(part);
      if (fill.k !== 'blank') refuseUse(name, 'a range is filled without end');
      for (const s of cells) {
        if (s.k === 'error') return s;
        if (s.k === 'blank') continue;
        if (s.k !== 'number' && !single) refuseUse(name, 'a range holds something that is no number');
        const n = toNumber(run.steps, s);
        if (n.k === 'error') return n;
        found.push(n);
      }
    }
  }
  if (found.length === 0) refuseUse(name, 'there is no number');
  return found;
}
