import { describe, expect, it } from 'vitest';
import { dot } from '../../../../functions/engine/formula/natives/centred';
import { leastSquares } from '../../../../functions/engine/formula/natives/leastSquares';

describe('leastSquares', () => {
  // P = (XᵀX)⁻¹Xᵀ is defined by P X = 1; the columns differ by 1e-6 of themselves (Läuchli's example), which may cost that much
  it('gives slopes by y that turn the columns into the unit matrix, also where they are nearly the same', () => {
    const e = 1e-6;
    const columns = [[1, e, 0, 0], [1, 0, e, 0], [1, 0, 0, e]];
    const fit = leastSquares(columns, [3, e, 2 * e, -e])!;
    fit.byY.forEach((p, i) => columns.forEach((c, j) => expect(Math.abs(dot(p, c) - (i === j ? 1 : 0))).toBeLessThan(1e-8)));
  });

  it('leaves residuals that are orthogonal to every column', () => {
    const columns = [[1, 2, 3, 4, 5], [2, 1, 0, 1, 7]];
    const { residuals, coefficients, byY } = leastSquares(columns, [1, -2, 4, 8, 3])!;
    for (const c of columns) expect(Math.abs(dot(c, residuals))).toBeLessThan(1e-13); // a few roundings of numbers below 40
    coefficients.forEach((b, j) => expect(b).toBeCloseTo(dot(byY[j], [1, -2, 4, 8, 3]), 13));
  });

  it('is undefined where a column follows from the others', () => {
    expect(leastSquares([[1, 2, 3], [2, 4, 6]], [1, 2, 3])).toBeUndefined();
    expect(leastSquares([[0, 0]], [1, 2])).toBeUndefined();
    expect(leastSquares([[1, 2], [3, 5], [7, 4]], [1, 2])).toBeUndefined();
  });
});
