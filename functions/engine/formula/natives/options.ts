import { EngineError } from '../../EngineError';
import { type Native, type ParameterKind, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Scalar, BLANK } from '../scalar';
import type { Value } from '../value';

export type Options = readonly (Scalar | undefined)[];
type OptionKind = Exclude<ParameterKind, 'range'>;

/**
 * Scalar arguments of a function that gives a whole array or a reference, coerced by kind; undefined where nothing stands.
 * An array in such a place would make an array of arrays, of which sheets show different things: it is refused.
 */
export function optionsOf(run: Run, name: string, given: readonly Value[], kinds: readonly OptionKind[]): Options | Err {
  let found: Options | undefined;
  const value = run.lift(given, (i) => kinds[i], (_run, scalars) => {
    found = scalars;
    return BLANK;
  });
  if (value.k === 'matrix') throw new EngineError('refused', `gives ${name} an array where it takes one value, which cannot be followed`);
  return found ?? (value as Err);
}

export const isError = (options: Options | Err): options is Err => 'k' in options;

/** A function of one array or reference, taken as it is, and of scalar options. */
export function arrayFunction(
  name: string, kinds: readonly OptionKind[], least: number, body: (run: Run, given: Value, options: Options) => Value,
): Native {
  return rangeFunction(name, ['range', ...kinds.map(() => 'range' as const)], (run, [given, ...rest]) => {
    const options = optionsOf(run, name, rest, kinds);
    return isError(options) ? options : body(run, given, options);
  }, { args: [least, kinds.length + 1], shareable: false });
}

/** A whole number among options, cut off towards 0; the number given where nothing stands. */
export function whole(option: Scalar | undefined, otherwise: number): number {
  return option?.k === 'number' ? Math.trunc(option.v) : otherwise;
}

/** The options that stand there. */
export const present = (options: Options): Scalar[] => options.filter((s) => s !== undefined);
