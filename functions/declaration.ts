import type { CellResult, Grid } from './cells';
import type { WorkbookPort } from './workbook';

/** What a body may know of its call besides its arguments. */
export interface CallContext {
  readonly name: string;
  /** The calling cell, where asked for: `Sheet1!F5`. */
  readonly address?: string;
  /** One address an argument, flat over a repeating one; undefined for what is no reference. */
  readonly parameterAddresses?: readonly (string | undefined)[];
  readonly port?: WorkbookPort;
  readonly decimalSeparator: '.' | ',';
}

/** Limits of a number, as data: messages and help are written from them. */
export interface Bounds {
  readonly above?: number;
  readonly atLeast?: number;
  readonly below?: number;
  readonly atMost?: number;
  readonly whole?: boolean;
}

/**
 * What one argument is. `T` is what the body receives.
 *     per 'cell'   a range gives one result a cell; a single cell serves all of them
 *     per 'row'    a block gives one result a row; a single row or column gives one result
 *     per 'call'   one for the whole call
 */
export interface Parameter<T = unknown> {
  readonly kind: 'number' | 'numbers' | 'text' | 'choice' | 'boolean' | 'entry' | 'range' | 'reference';
  readonly per: 'cell' | 'row' | 'call';
  readonly help: string;
  readonly optional: boolean;
  /** Where it is left out or its cell is blank. */
  readonly fallback?: T;
  readonly bounds?: Bounds;
  /** Words that stand for a number: `inf`. */
  readonly words?: Readonly<Record<string, number>>;
  readonly choices?: readonly string[];
  /** Reads text further; throws EngineError where it cannot. */
  readonly read?: (text: string) => unknown;
  /** May be given again and again; the last one only. The body receives an array. */
  readonly repeating?: boolean;
  /** Shown in place of the key. */
  readonly label?: string;
  /** A blank cell here makes a blank result, whatever the other arguments hold. */
  readonly leads?: boolean;
}

export type Parameters = Readonly<Record<string, Parameter<unknown>>>;

/** What the body receives, by argument name. */
export type Values<P extends Parameters> = { readonly [K in keyof P]: P[K] extends Parameter<infer T> ? T : never };

export type Matrix = readonly (readonly CellResult[])[];

/** The declaration of one worksheet function: everything else is derived from it. */
export interface Declaration {
  /** Without the namespace; id and name at once, never to be changed after release. */
  readonly name: string;
  readonly family: Family;
  /** One sentence or two: what it gives. */
  readonly help: string;
  readonly parameters: Parameters;
  /** The columns of the result in words. */
  readonly result: string;
  /** Needs the addresses of the caller and of the arguments, and the workbook. */
  readonly readsWorkbook: boolean;
  readonly body: Body;
}

/** In the order in which they are listed. */
export const families = [
  'Evidence to standard uncertainty',
  'Carry',
  'Pairs',
  'Report and decide',
  'Significant figures',
  'Straight-line calibration',
  'Chemistry and weighing',
  'Proof',
] as const;
export type Family = (typeof families)[number];

export type Body =
  | {
      readonly kind: 'each';
      /** Width of one result; only arguments given once a call may be read here. */
      readonly columns: (values: never) => number;
      readonly run: (values: never, context: CallContext) => CellResult | readonly CellResult[];
    }
  | { readonly kind: 'whole'; readonly run: (values: never, context: CallContext) => Matrix | Promise<Matrix> };

interface Head<P extends Parameters> {
  readonly name: string;
  readonly family: Family;
  readonly help: string;
  readonly parameters: P;
  readonly result: string;
}

/**
 * A function that is computed cell by cell (or row by row): the body sees plain values, and one result a cell is spilled in the shape of
 * the arguments. What it throws is the error of that cell alone.
 *
 * @param columns   Width of one result, default 1; more than one needs arguments of one column.
 */
export function each<P extends Parameters>(
  given: Head<P> & {
    readonly columns?: (values: Values<P>) => number;
    readonly body: (values: Values<P>, context: CallContext) => CellResult | readonly CellResult[];
  },
): Declaration {
  const { body, columns = () => 1, ...head } = given;
  return { ...head, readsWorkbook: false, body: { kind: 'each', columns, run: body } };
}

/** A function of whole ranges: the body gives the whole result, row by row. What it throws is the one error of the call. */
export function whole<P extends Parameters>(
  given: Head<P> & {
    readonly readsWorkbook?: boolean;
    readonly body: (values: Values<P>, context: CallContext) => Matrix | Promise<Matrix>;
  },
): Declaration {
  const { body, readsWorkbook = false, ...head } = given;
  return { ...head, readsWorkbook, body: { kind: 'whole', run: body } };
}

/** A block of numbers; null where a cell is blank. */
export interface NumberBlock {
  readonly grid: Grid;
  readonly values: readonly (readonly (number | null)[])[];
}
