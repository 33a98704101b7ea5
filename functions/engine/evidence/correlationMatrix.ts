import { EngineError } from '../EngineError';

// A matrix written to three digits may miss being semidefinite by its rounding; 1e-9 forgives binary rounding only, so a matrix
// that its own digits contradict is still refused.
const tolerance = 1e-9;

/**
 * Refuses what is no correlation matrix: square of order n, unit diagonal, symmetric, |r| <= 1, positive semidefinite.
 *
 * @param r     Rows of correlation coefficients.
 * @param n     Number of quantities.
 * @param who   Names the caller in the message.
 * @throws      EngineError "shape" or "domain", naming the entry by row and column counted from 1.
 * @source      JCGM 100:2008, 5.2.2; semidefinite through a symmetric elimination that takes the largest pivot first.
 */
export function requireCorrelationMatrix(r: ArrayLike<ArrayLike<number>>, n: number, who: string): void {
  if (r.length !== n) throw new EngineError('shape', `${who} needs ${n} rows of correlations, got ${r.length}`);
  for (let i = 0; i < n; i++)
    if (r[i].length !== n)
      throw new EngineError('shape', `${who} needs ${n} correlations a row, got ${r[i].length} in row ${i + 1}`);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const at = `in row ${i + 1}, column ${j + 1}`;
      if (!(Math.abs(r[i][j]) <= 1))
        throw new EngineError('domain', `${who} needs correlations from -1 to 1, got ${r[i][j]} ${at}`);
      if (i === j && r[i][j] !== 1)
        throw new EngineError('domain', `${who} needs 1 on the diagonal of the correlations, got ${r[i][j]} ${at}`);
    }
  }
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      if (Math.abs(r[i][j] - r[j][i]) > 1e-12)
        throw new EngineError(
          'domain',
          `${who} needs symmetric correlations, got ${r[i][j]} in row ${i + 1}, column ${j + 1}` +
            ` and ${r[j][i]} in row ${j + 1}, column ${i + 1}`,
        );
    }
  }
  requireSemidefinite(r, n, who);
}

function requireSemidefinite(r: ArrayLike<ArrayLike<number>>, n: number, who: string): void {
  const left = Array.from(r, (row) => Float64Array.from(row)); // the Schur complement, shrinking
  const open = Array.from({ length: n }, (_, i) => i);
  const limit = tolerance * n;
  while (open.length > 0) {
    const pivot = open.reduce((best, i) => (left[i][i] > left[best][best] ? i : best));
    const d = left[pivot][pivot];
    if (d <= limit) {
      for (const i of open) {
        if (left[i][i] < -limit) throw impossible(who, i);
        for (const j of open) if (j < i && Math.abs(left[i][j]) > limit) throw impossible(who, i, j);
      }
      return;
    }
    open.splice(open.indexOf(pivot), 1);
    for (const i of open) for (const j of open) left[i][j] -= (left[i][pivot] * left[pivot][j]) / d;
  }
}

function impossible(who: string, i: number, j?: number): EngineError {
  const where = j === undefined ? `row ${i + 1}` : `row ${i + 1}, column ${j + 1}`;
  return new EngineError(
    'domain',
    `${who} needs correlations that can hold together (positive semidefinite), got a contradiction in ${where}`,
  );
}
