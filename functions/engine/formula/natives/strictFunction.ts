import { toNumber, toText } from '../coerce';
import { type Native, kindAt, rangeFunction } from '../native';
import type { Run } from '../run';
import { BLANK, type Err, type Num, type Scalar, type Text, err } from '../scalar';
import type { Value } from '../value';
import { toDate } from './dateArgument';
import { sizeOf } from './follow';
import { refuseUse } from './refuseUse';

type StrictKind = 'number' | 'date' | 'text' | 'whole range';

/** Coerced arguments, undefined where omitted. */
export type StrictArguments = readonly (Num | Text | undefined)[];

/**
 * A function that came to the sheet as an extension and still takes its arguments strictly: a boolean or a reference to several
 * cells is #VALUE! where a number or date is wanted. Arrays are taken element by element. An argument left empty between commas
 * is refused, for what the sheet makes of it differs from function to function; arguments of kind `whole range` are passed as they
 * are, to `ranges`.
 *
 * @source common practice; no documentation
 */
export function strictFunction(
  name: string,
  kinds: readonly StrictKind[],
  body: (run: Run, args: StrictArguments, ranges: readonly Value[]) => Scalar,
  arity: { args?: [least: number, most: number]; repeating?: number } = {},
): Native {
  const kindOf = (i: number): StrictKind => kindAt(kinds, arity.repeating ?? 0, i);
  return rangeFunction(name, kinds.map(() => 'range' as const), (run, args) => {
    const single = args.filter((_, i) => kindOf(i) !== 'whole range');
    for (const a of single) {
      if (a.k === 'missing') refuseUse(name, 'an argument is left empty');
      if (a.k === 'error') return a;
      if (severalCells(run, a)) return err('#VALUE!');
    }
    return run.lift(single, () => 'scalar', (_run, scalars) => {
      const coerced: (Num | Text)[] = [];
      for (let i = 0; i < scalars.length; i++) {
        const c = strictly(run, name, scalars[i] ?? BLANK, kindOf(i));
        if (c.k === 'error') return c;
        coerced.push(c);
      }
      return body(run, coerced, args.filter((_, i) => kindOf(i) === 'whole range'));
    });
  }, { ...arity, shareable: false });
}

/** Whether an argument is a reference to more than one cell. */
export function severalCells(run: Run, a: Value): boolean {
  if (a.k !== 'area' && a.k !== 'union') return false;
  const size = sizeOf(run, a);
  return size === undefined || size.rows * size.cols > 1;
}

function strictly(run: Run, name: string, s: Scalar, kind: StrictKind): Num | Text | Err {
  if (s.k === 'boolean') return run.steps.error('#VALUE!', s);
  if (kind === 'text') return toText(run.steps, s);
  return kind === 'date' ? toDate(run, name, s) : toNumber(run.steps, s);
}
