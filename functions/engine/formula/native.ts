import type { Run } from './run';
import { num, type Scalar } from './scalar';
import type { Value } from './value';

/**
 * How a native function takes an argument.
 * - `number`, `text`, `boolean`: one scalar, coerced as Excel does; errors end the call; lifted over ranges and matrices.
 * - `scalar`: one scalar as it is, errors included; lifted likewise.
 * - `range`: whatever stands there, a reference included; nothing is coerced.
 */
export type ParameterKind = 'number' | 'text' | 'boolean' | 'scalar' | 'range';

/** A native worksheet function. */
export interface Native {
  readonly name: string;
  readonly least: number;
  readonly most: number;
  readonly kinds: readonly ParameterKind[];
  /** How many of the last kinds repeat for further arguments. */
  readonly repeating: number;
  readonly body: (run: Run, args: readonly Value[]) => Value;
  /** Arguments that are evaluated only when the body asks for them (IF, CHOOSE, IFERROR …). */
  readonly lazy?: (run: Run, args: readonly Lazy[]) => Value;
  /** Whether a call on fixed ranges may be computed once and shared by all cells that make it. */
  readonly shareable: boolean;
}

/** An argument that is evaluated when asked for; `missing` if nothing stands there. */
export interface Lazy {
  readonly missing: boolean;
  value(): Value;
}

interface Arity {
  /** Least and most number of arguments; by default as many as there are kinds. */
  args?: [least: number, most: number];
  /** How many of the last kinds repeat for further arguments. */
  repeating?: number;
}

/** A function of one number with its derivative: `slope(x, y)` where y is the value at x. A value that is not finite is #NUM!. */
export function smooth(name: string, value: (x: number) => number, slope: (x: number, y: number) => number): Native {
  return scalarFunction(name, ['number'], (run, [x = num(0)]) => {
    const v = (x as { v: number }).v;
    const y = value(v);
    if (!Number.isFinite(y)) return run.steps.error('#NUM!', x);
    return run.steps.unary(y, x, slope(v, y));
  });
}

/**
 * A function of scalars that gives a scalar. Arguments arrive coerced to their kinds, undefined where omitted or left empty
 * beyond `least`; an error in a coerced argument is returned without calling the body. Lifted over ranges and matrices.
 */
export function scalarFunction(
  name: string,
  kinds: readonly Exclude<ParameterKind, 'range'>[],
  body: (run: Run, args: readonly (Scalar | undefined)[]) => Scalar,
  arity: Arity = {},
): Native {
  const [least, most] = arity.args ?? [kinds.length, kinds.length];
  const repeating = arity.repeating ?? 0;
  return {
    name, least, most, kinds, repeating, shareable: false,
    body: (run, args) => run.lift(args, (i) => kindAt(kinds, repeating, i), body),
  };
}

/** A function that looks at whole ranges. Arguments arrive as they are; use the functions of `ranges` to read them. */
export function rangeFunction(
  name: string,
  kinds: readonly ParameterKind[],
  body: (run: Run, args: readonly Value[]) => Value,
  arity: Arity & { shareable?: boolean } = {},
): Native {
  const [least, most] = arity.args ?? [kinds.length, kinds.length];
  return { name, least, most, kinds, repeating: arity.repeating ?? 0, body, shareable: arity.shareable ?? true };
}

/** A function that evaluates an argument only when it needs it. */
export function lazyFunction(name: string, least: number, most: number, lazy: (run: Run, args: readonly Lazy[]) => Value): Native {
  return {
    name, least, most, kinds: ['range'], repeating: 1, shareable: false, lazy,
    body: (run, args) => lazy(run, args.map((a) => ({ missing: a.k === 'missing', value: () => a }))),
  };
}

/** The kind of the argument at index i, with the repeating tail unrolled. */
export function kindAt<K>(kinds: readonly K[], repeating: number, i: number): K {
  if (i < kinds.length || repeating === 0) return kinds[Math.min(i, kinds.length - 1)];
  const fixed = kinds.length - repeating;
  return kinds[fixed + ((i - fixed) % repeating)];
}
