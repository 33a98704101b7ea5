import type { Grid } from './cells';
import type { Bounds, NumberBlock, Parameter } from './declaration';

interface Options {
  readonly help: string;
  readonly label?: string;
}

interface NumberOptions<F extends number> extends Options, Bounds {
  readonly optional?: boolean;
  readonly fallback?: F;
  readonly words?: Readonly<Record<string, number>>;
  readonly leads?: boolean;
}

type Optional<O, T> = O extends { readonly optional: true } ? (O extends { readonly fallback: unknown } ? T : T | undefined) : T;

/** A number a cell. */
export const number = <const O extends NumberOptions<number>>(o: O): Parameter<Optional<O, number>> => numeric(o, 'cell');

/** A number for the whole call. */
export const oneNumber = <const O extends NumberOptions<number>>(o: O): Parameter<Optional<O, number>> => numeric(o, 'call');

/** Degrees of freedom a cell: a number above 0 or `inf`, which is also what a blank means. */
export const dof = (help: string): Parameter<number> =>
  number({ help, above: 0, words: { inf: Infinity }, optional: true, fallback: Infinity });

/** Numbers of one row of a block, or of a whole row or column; blank cells are passed over. */
export const numbersOfRow = (o: Options & Bounds): Parameter<readonly number[]> => ({
  kind: 'numbers', per: 'row', help: o.help, label: o.label, optional: false, bounds: boundsOf(o),
});

/** A block of numbers as it stands; undefined where an optional one is left out. */
export const numbers = <const O extends Options & Bounds & { optional?: boolean }>(o: O): Parameter<Optional<O, NumberBlock>> => ({
  kind: 'numbers', per: 'call', help: o.help, label: o.label, optional: o.optional ?? false, bounds: boundsOf(o),
});

interface TextOptions extends Options {
  readonly optional?: boolean;
}

/** A text a cell. */
export const text = <const O extends TextOptions>(o: O): Parameter<Optional<O, string>> => ({
  kind: 'text', per: 'cell', help: o.help, label: o.label, optional: o.optional ?? false,
});

/** A text a cell that is read further; `read` throws EngineError where it cannot. */
export const parsed = <R, const O extends TextOptions>(read: (text: string) => R, o: O): Parameter<Optional<O, R>> => ({
  ...text(o), read, fallback: undefined,
});

/** A text for the whole call. */
export const oneText = <const O extends TextOptions>(o: O): Parameter<Optional<O, string>> => ({
  kind: 'text', per: 'call', help: o.help, label: o.label, optional: o.optional ?? false,
});

/** One of several words, for the whole call; the first is the default unless another is given. */
export const choice = <const C extends string>(o: Options & { choices: readonly C[]; fallback?: NoInfer<C> }): Parameter<C> => ({
  kind: 'choice', per: 'call', help: o.help, label: o.label, optional: true, choices: o.choices, fallback: o.fallback ?? o.choices[0],
});

/** TRUE or FALSE for the whole call, FALSE where left out. */
export const flag = (help: string): Parameter<boolean> => ({ kind: 'boolean', per: 'call', help, optional: true, fallback: false });

/** The last argument of every function that gives evidence. */
export const full = flag('TRUE spills u, degrees of freedom and shape, ready to be evidence');

/** A number or a text a cell, as it was entered. */
export const entry = (o: Options): Parameter<number | string> => ({ kind: 'entry', per: 'cell', help: o.help, label: o.label, optional: false });

/** Cells as they come, blanks told from zeros; undefined where an optional one is left out. */
export const range = <const O extends Options & { optional?: boolean }>(o: O): Parameter<Optional<O, Grid>> => ({
  kind: 'range', per: 'call', help: o.help, label: o.label, optional: o.optional ?? false,
});

/** Cells that must stand in a workbook: the body gets values as they arrive (a blank may be 0) and `area` where the host tells it. */
export const reference = <const O extends Options & { optional?: boolean }>(o: O): Parameter<Optional<O, Grid>> => ({
  kind: 'reference', per: 'call', help: o.help, label: o.label, optional: o.optional ?? false,
});

/** References or values given again and again, the last parameter of all; the same as `reference` otherwise. */
export const repeatingReference = (o: Options): Parameter<readonly Grid[]> => ({
  kind: 'reference', per: 'call', help: o.help, label: o.label, optional: false, repeating: true,
});

function numeric<T>(o: NumberOptions<number>, per: 'cell' | 'call'): Parameter<T> {
  const { help, label, words, leads, optional = false, fallback } = o;
  return { kind: 'number', per, help, label, words, leads, optional, fallback: fallback as T | undefined, bounds: boundsOf(o) };
}

function boundsOf({ above, atLeast, below, atMost, whole }: Bounds): Bounds {
  return { above, atLeast, below, atMost, whole };
}
