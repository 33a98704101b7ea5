import { dot } from './centred';

/** A linear fit of y on columns, without a constant. */
export interface Fit {
  readonly coefficients: number[];
  readonly residuals: Float64Array;
  /** One row a column, (XᵀX)⁻¹Xᵀ: the slopes of the coefficients by y. */
  readonly byY: Float64Array[];
}

/** A column of which less than this part is left when the others are taken out is taken to follow from them. */
const INDEPENDENT = 1e-12;

/**
 * Least squares by orthogonal columns (Gram–Schmidt, each column reduced twice), with one step of refinement.
 *
 * @param columns   k columns of n numbers each.
 * @returns         Undefined if a column follows from the others (always if k > n).
 * @source          Å. Björck, Numerical Methods for Least Squares Problems (SIAM 1996), 2.4: twice is enough.
 */
export function leastSquares(columns: readonly ArrayLike<number>[], y: ArrayLike<number>): Fit | undefined {
  const k = columns.length;
  const q: Float64Array[] = [];
  const r = Array.from({ length: k }, () => new Float64Array(k));
  for (let j = 0; j < k; j++) {
    const v = Float64Array.from(columns[j]);
    const before = Math.sqrt(dot(v, v));
    for (let pass = 0; pass < 2; pass++) {
      for (let i = 0; i < j; i++) {
        const part = dot(q[i], v);
        r[i][j] += part;
        for (let t = 0; t < v.length; t++) v[t] -= part * q[i][t];
      }
    }
    const left = Math.sqrt(dot(v, v));
    if (!(left > INDEPENDENT * before)) return undefined;
    r[j][j] = left;
    q.push(v.map((x) => x / left));
  }
  const byY = columns.map(() => new Float64Array(y.length));
  for (let t = 0; t < y.length; t++) backwards(r, q.map((column) => column[t])).forEach((p, j) => (byY[j][t] = p));
  const solve = (of: ArrayLike<number>): number[] => backwards(r, q.map((column) => dot(column, of)));
  const residualsOf = (b: readonly number[]): Float64Array =>
    Float64Array.from(y, (v, t) => v - b.reduce((s, c, j) => s + c * columns[j][t], 0));
  const first = solve(y);
  const correction = solve(residualsOf(first));
  const coefficients = first.map((c, j) => c + correction[j]);
  return { coefficients, residuals: residualsOf(coefficients), byY };
}

/** Solves R b = c for an upper triangular R. */
function backwards(r: readonly Float64Array[], c: readonly number[]): number[] {
  const b = [...c];
  for (let j = b.length - 1; j >= 0; j--) {
    for (let m = j + 1; m < b.length; m++) b[j] -= r[j][m] * b[m];
    b[j] /= r[j][j];
  }
  return b;
}
