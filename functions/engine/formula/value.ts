import { BLANK, type Scalar } from './scalar';

/** What an expression may give: one scalar, a matrix, or a reference that is not yet looked up. */
export type Value = Scalar | Matrix | Area | Union | Lambda | Missing;

/**
 * A rectangle of scalars, row by row. `rows` and `cols` are nominal (a whole column has 1,048,576 rows); only the first
 * `height` × `width` cells are stored, the rest are all `fill`.
 */
export interface Matrix {
  readonly k: 'matrix';
  readonly rows: number;
  readonly cols: number;
  readonly height: number;
  readonly width: number;
  readonly cells: readonly Scalar[];
  readonly fill: Scalar;
}

/** A rectangle of cells, 1-based, bounds inclusive. */
export interface Area {
  readonly k: 'area';
  readonly sheet: number;
  readonly r1: number;
  readonly c1: number;
  readonly r2: number;
  readonly c2: number;
  /** What decided that it is this area (the key of a lookup, a condition): whatever is read from it depends on that too. */
  readonly by?: Scalar;
}

export interface Union {
  readonly k: 'union';
  readonly areas: readonly Area[];
}

/** A function value: LAMBDA, or the name of a native function passed as one. */
export interface Lambda {
  readonly k: 'lambda';
  readonly call: (args: Value[]) => Value;
  readonly parameters: number;
}

/** An argument left empty between commas. */
export interface Missing {
  readonly k: 'missing';
}

export const MISSING: Missing = { k: 'missing' };

export const matrix = (rows: number, cols: number, cells: readonly Scalar[]): Matrix => ({
  k: 'matrix', rows, cols, height: rows, width: cols, cells, fill: BLANK,
});

/** The scalar at a 0-based row and column of a matrix. */
export function at(m: Matrix, row: number, col: number): Scalar {
  return row < m.height && col < m.width ? m.cells[row * m.width + col] : m.fill;
}

export const isScalar = (v: Value): v is Scalar =>
  v.k === 'number' || v.k === 'text' || v.k === 'boolean' || v.k === 'error' || v.k === 'blank';

export const isReference = (v: Value): v is Area | Union => v.k === 'area' || v.k === 'union';
