import { type Native, scalarFunction } from '../native';
import type { ErrorCode } from '../scalar';
import { numberOf } from './argument';

/** A value with a slope by each argument (NaN where it is not known, or the argument is cut off to a whole number), or an error. */
export type WithSlopes = readonly [value: number, ...slopes: number[]] | ErrorCode;

/**
 * A function of numbers with its slopes. A value that is not finite is #NUM!.
 *
 * @param least   How many arguments must be given; `of` sees NaN for the others.
 * @param of      Gets the arguments; TRUE and FALSE arrive as 1 and 0.
 */
export function ofNumbers(name: string, least: number, most: number, of: (args: number[]) => WithSlopes): Native {
  return scalarFunction(name, Array.from({ length: most }, () => 'number' as const), (run, args) => {
    const from = args.map(numberOf);
    const found = of(Array.from({ length: most }, (_, i) => (i < args.length ? from[i].v : NaN)));
    if (typeof found === 'string') return run.steps.error(found, ...from);
    const [value, ...slopes] = found;
    return Number.isFinite(value) ? run.steps.many(value + 0, from, from.map((_, i) => slopes[i] ?? NaN)) : run.steps.error('#NUM!', ...from);
  }, { args: [least, most] });
}

/** The same function under several names. */
export const named = (names: string, least: number, most: number, of: (args: number[]) => WithSlopes): Native[] =>
  names.split(' ').map((name) => ofNumbers(name, least, most, of));
