/**
 * The determinant of a square matrix, by elimination with the largest pivot of each column (partial pivoting).
 * An exactly singular one may come out as some units of rounding, as it does in Excel.
 *
 * @source common practice; G. H. Golub, C. F. Van Loan, Matrix Computations, algorithm 3.4.1 (from memory)
 */
export function determinant(of: readonly (readonly number[])[]): number {
  const { rows, sign } = eliminated(of);
  return rows.reduce<number>((product, row, i) => product * row[i], sign) + 0; // no negative zero
}

/** The cofactors of a square matrix: the slopes of its determinant by its elements, also where it is singular. */
export function cofactors(of: readonly (readonly number[])[]): number[][] {
  return of.map((row, i) => row.map((_, j) => {
    const minor = of.filter((_row, r) => r !== i).map((other) => other.filter((_x, c) => c !== j));
    return (i + j) % 2 === 0 ? determinant(minor) : -determinant(minor);
  }));
}

/** The inverse of a square matrix; undefined where a pivot is exactly zero. */
export function inverse(of: readonly (readonly number[])[]): number[][] | undefined {
  const n = of.length;
  const { rows } = eliminated(of.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]));
  if (rows.some((row, i) => row[i] === 0)) return undefined;
  for (let k = n - 1; k >= 0; k--) {
    for (let j = n; j < 2 * n; j++) {
      for (let i = k + 1; i < n; i++) rows[k][j] -= rows[k][i] * rows[i][j];
      rows[k][j] /= rows[k][k];
    }
  }
  return rows.map((row) => row.slice(n));
}

/** Upper triangular form of the leading square, the columns beyond it taken along; the sign is that of the exchanges of rows. */
function eliminated(of: readonly (readonly number[])[]): { rows: number[][]; sign: 1 | -1 } {
  const rows = of.map((row) => [...row]);
  let sign: 1 | -1 = 1;
  for (let k = 0; k < rows.length; k++) {
    let pivot = k;
    for (let i = k + 1; i < rows.length; i++) if (Math.abs(rows[i][k]) > Math.abs(rows[pivot][k])) pivot = i;
    if (rows[pivot][k] === 0) continue;
    if (pivot !== k) {
      [rows[k], rows[pivot]] = [rows[pivot], rows[k]];
      sign = sign === 1 ? -1 : 1;
    }
    for (let i = k + 1; i < rows.length; i++) {
      const factor = rows[i][k] / rows[k][k];
      rows[i][k] = 0;
      if (factor !== 0) for (let j = k + 1; j < rows[i].length; j++) rows[i][j] -= factor * rows[k][j];
    }
  }
  return { rows, sign };
}
