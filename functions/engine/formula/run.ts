import type { ParameterKind } from './native';
import type { RowState } from './rowState';
import type { Scalar } from './scalar';
import type { Steps } from './steps';
import type { Area, Matrix, Union, Value } from './value';

/**
 * The evaluation of one cell's formula, as native functions see it.
 */
export interface Run {
  /** Where numbers with their slopes are recorded. */
  readonly steps: Steps;
  /** The cell that holds the formula: index of its sheet, 1-based row and column. */
  readonly sheet: number;
  readonly row: number;
  readonly col: number;

  /** A value as a matrix: references are read, a scalar becomes 1 × 1. A union of several areas is #VALUE!. */
  matrix(value: Value): Matrix;
  /** The areas of a reference, or undefined if the value is none. */
  areas(value: Value): readonly Area[] | undefined;
  /** One scalar out of a value: the cell in the formula's own row or column where the sheet asks for that, else the first. */
  scalar(value: Value): Scalar;
  /** Calls the body once for each element of arguments that are ranges or matrices, with coercion by kind. */
  lift(
    args: readonly Value[],
    kindOf: (i: number) => ParameterKind,
    body: (run: Run, args: readonly (Scalar | undefined)[]) => Scalar,
  ): Value;
  /** The size of the sheet's used part: the last row and column that may hold something. */
  used(sheet: number): { rows: number; cols: number };
  /** Whether a row shows. */
  rowState(sheet: number, row: number): RowState;
  /** The formula (R1C1, with its `=`) that stands in a cell, if one does. */
  formulaAt(sheet: number, row: number, col: number): string | undefined;
  /** The index of the sheet of that name, whatever its case. */
  sheetNamed(name: string): number | undefined;
  /** The areas of `value`, or the value itself, in order: for functions that take several ranges. */
  parts(value: Value): readonly (Area | Exclude<Value, Union>)[];
}
