/**
 * What one cell, or one step of a formula, holds. Every scalar remembers in `d` where it came from: a node of the cell graph
 * (`d >= 0`), a step recorded while the present cell is evaluated (`d <= -2`), or nothing that could be uncertain (`NONE`).
 */
export type Scalar = Num | Text | Bool | Err | Blank;

/** A finite number. */
export interface Num {
  readonly k: 'number';
  readonly v: number;
  readonly d: number;
}

/** Text; `tainted` when a number was written into it, so that reading it back as a number would lose the doubt. */
export interface Text {
  readonly k: 'text';
  readonly v: string;
  readonly d: number;
  readonly tainted: boolean;
}

export interface Bool {
  readonly k: 'boolean';
  readonly v: boolean;
  readonly d: number;
}

/** An error value of the sheet. */
export interface Err {
  readonly k: 'error';
  readonly v: ErrorCode;
  readonly d: number;
}

export interface Blank {
  readonly k: 'blank';
  readonly v: null;
  readonly d: number;
}

export type ErrorCode =
  | '#NULL!' | '#DIV/0!' | '#VALUE!' | '#REF!' | '#NAME?' | '#NUM!' | '#N/A' | '#SPILL!' | '#CALC!' | '#GETTING_DATA'
  | '#FIELD!' | '#BLOCKED!' | '#UNKNOWN!' | '#CONNECT!' | '#BUSY!' | '#EXTERNAL!';

/** `d` of a scalar that depends on no cell. */
export const NONE = -1;

export const BLANK: Blank = { k: 'blank', v: null, d: NONE };
export const TRUE: Bool = { k: 'boolean', v: true, d: NONE };
export const FALSE: Bool = { k: 'boolean', v: false, d: NONE };

/** A number, or #NUM! where it is not finite: NaN and infinity never travel on. */
export const num = (v: number, d = NONE): Num | Err => (Number.isFinite(v) ? { k: 'number', v, d } : err('#NUM!', d));
export const text = (v: string, d = NONE, tainted = false): Text => ({ k: 'text', v, d, tainted });
export const bool = (v: boolean, d = NONE): Bool => (d === NONE ? (v ? TRUE : FALSE) : { k: 'boolean', v, d });
export const err = (v: ErrorCode, d = NONE): Err => ({ k: 'error', v, d });

/** The same value with another origin. */
export function withOrigin<S extends Scalar>(scalar: S, d: number): S {
  return scalar.d === d ? scalar : { ...scalar, d };
}
