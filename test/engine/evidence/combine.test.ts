import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { combine } from '../../../functions/engine/evidence/combine';
import { expectPrinted, expectRefusal, expectRelative } from '../numbers/expectations';

const filled = (n: number, r: number) => Array.from({ length: n }, (_, i) => Array.from({ length: n }, (__, j) => (i === j ? 1 : r)));

describe('combine', () => {
  test('JCGM 100:2008, 5.2.2: ten resistors of u = 100 mΩ, r = 1, give 1 Ω; independent 0.32 Ω', () => {
    const u = new Array(10).fill(0.1);
    expectRelative(combine(u, undefined, filled(10, 1)).u, 1, 3e-16);
    expectPrinted(combine(u).u, '0.32');
    expectPrinted(combine(u, undefined, filled(10, 0)).u, '0.32');
  });

  test('JCGM 100:2008, 5.1.5 (continuing 4.3.7): 12 µV and 8.7 µV give 15 µV', () => {
    expectPrinted(combine([12, 14.999994 / Math.sqrt(3)]).u, '15');
  });

  test('JCGM 100:2008, H.2: R, X, Z from V, I, φ with their correlations', () => {
    // Means and standard uncertainties of the means of Table H.2, correlations r(V,I), r(V,φ), r(I,φ): exact arithmetic, 14 digits.
    const [v, i, phi] = [4.999, 19.661e-3, 1.04446];
    const u = [0.0032093613071762, 9.4710083940413e-6, 0.00075206382707853];
    const [vi, vp, ip] = [-0.35531121981751, 0.85762421083995, -0.64511121768924];
    const r = [
      [1, vi, vp],
      [vi, 1, ip],
      [vp, ip, 1],
    ];
    const z = v / i;
    const ofR = combine(u, [Math.cos(phi) / i, (-z * Math.cos(phi)) / i, -z * Math.sin(phi)], r);
    const ofX = combine(u, [Math.sin(phi) / i, (-z * Math.sin(phi)) / i, z * Math.cos(phi)], r);
    const ofZ = combine(u, [1 / i, -z / i, 0], r);
    expectPrinted(ofR.u, '0.071');
    expectPrinted(ofZ.u, '0.236');
    // Prints 0.295; 0.29558 is what its own data give.
    expectRelative(ofX.u, 0.29558167735864, 1e-11); // the inputs have 14 digits; variance cancels to a tenth
    expectRelative(ofR.u, 0.071071407396996, 1e-11);
    expectRelative(ofZ.u, 0.23633613008238, 1e-11);
  });

  test('JCGM 100:2008, H.3.4: intercept and slope of the line, r = −0.930, give 0.0041 °C at 30 °C', () => {
    const r = -0.93042960309345;
    const u = [0.00287759783516, 0.00066793877322783];
    const found = combine(u, [1, 10], [[1, r], [r, 1]], [9, 9]);
    expectPrinted(found.u, '0.0041');
    expectRelative(found.u, 0.0041385957528549, 1e-11);
    expect(found.nuEff).toBeUndefined(); // one evaluation, correlated: Welch–Satterthwaite does not hold
  });

  test('JCGM 100:2008, G.4.1: 1.03 % with 19.0 effective degrees of freedom', () => {
    const found = combine([0.25, 0.57, 0.82], undefined, undefined, [9, 4, 14]);
    expectPrinted(found.u, '1.03');
    expectPrinted(found.nuEff!, '19.0');
  });

  test('weighs with sensitivity coefficients, whatever their sign', () => {
    expect(combine([3, 2], [1, -2])).toEqual({ u: 5, nuEff: Infinity });
    expectRelative(combine([3, 2], [1, -2], undefined, [10, 10]).nuEff!, 625 / 33.7, 1e-15);
    expectRelative(combine([3e200, 4e200], undefined, filled(2, 0.5)).u, Math.sqrt(37) * 1e200, 5e-16);
  });

  test('a difference of fully correlated equal quantities has no uncertainty', () => {
    expect(combine([0.1, 0.1], [1, -1], filled(2, 1))).toEqual({ u: 0, nuEff: undefined });
    expect(combine([0.1, 0.3], [3, -1], filled(2, 1)).u).toBe(0);
    expect(combine([0.76, 0.46, 1.22], [1, 1, -1], filled(3, 1)).u).toBe(0); // the products round, the difference is still none
    expect(combine([0.83, 0.04, 0.87], [1, 1, -1], filled(3, 1)).u).toBe(0);
    expect(combine([0, 0])).toEqual({ u: 0, nuEff: undefined });
  });

  test('keeps effective degrees of freedom where only exactly known components are correlated', () => {
    const r = [
      [1, 0.5, 0],
      [0.5, 1, 0],
      [0, 0, 1],
    ];
    // u² = 9 + 16 + 12 + 25 = 62, of which 25 has 6 degrees of freedom: 62² / (625/6)
    const found = combine([3, 4, 5], undefined, r, [Infinity, Infinity, 6]);
    expectRelative(found.u, Math.sqrt(62), 3e-16);
    expectRelative(found.nuEff!, (62 * 62 * 6) / 625, 1e-14);
    expect(combine([3, 4, 5], undefined, r, [6, Infinity, Infinity]).nuEff).toBeUndefined();
    expect(combine([3, 0, 5], undefined, r, [6, Infinity, Infinity]).nuEff).toBeDefined();
    expect(combine([3, 4, 5], undefined, r).nuEff).toBe(Infinity);
  });

  test('agrees with the standard deviation of a linear form of factors (law)', () => {
    // Correlated quantities built as x = L e from independent e; the variance of c·x is |Lᵀc|².
    const row = fc.array(fc.integer({ min: -9, max: 9 }), { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(fc.array(row, { minLength: 1, maxLength: 5 }), fc.infiniteStream(fc.integer({ min: -5, max: 5 })), (rows, stream) => {
        const usable = rows.filter((x) => x.some((v) => v !== 0));
        fc.pre(usable.length > 0);
        const c = usable.map(() => stream.next().value as number);
        const u = usable.map((x) => Math.hypot(...x));
        const r = usable.map((x, i) => usable.map((y, j) => (i === j ? 1 : cosine(x, y, u[i] * u[j]))));
        const direct = Math.hypot(...[0, 1, 2].map((k) => usable.reduce((total, x, i) => total + c[i] * x[k], 0)));
        const size = Math.hypot(...u.map((ui, i) => ui * c[i]));
        // Where effects cancel the rounding of r shows: relative to the effects, as a square root.
        expect(Math.abs(combine(u, c, r).u - direct)).toBeLessThanOrEqual(direct === 0 ? 1e-7 * size : (1e-14 * size * size) / direct);
      }),
      { seed: 61, numRuns: 500 },
    );
  });

  test('names the entry where a matrix is no correlation matrix', () => {
    const of = (r: number[][]) => () => combine(new Array(r.length).fill(1), undefined, r);
    expectRefusal(of([[1, 1.2], [1.2, 1]]), 'domain', 'correlations from -1 to 1, got 1.2 in row 1, column 2');
    expectRefusal(of([[1, 0.2], [NaN, 1]]), 'domain', 'got NaN in row 2, column 1');
    expectRefusal(of([[1, 0.2], [0.2, 0.9]]), 'domain', '1 on the diagonal of the correlations, got 0.9 in row 2, column 2');
    expectRefusal(of([[1, 0.2], [0.3, 1]]), 'domain', 'symmetric correlations, got 0.3 in row 2, column 1 and 0.2 in row 1, column 2');
    expectRefusal(of([[1, 0.2], [0.2]]), 'shape', 'combine needs 2 correlations a row, got 1 in row 2');
    expectRefusal(() => combine([1, 2, 3], undefined, filled(2, 0)), 'shape', '3 rows of correlations, got 2');
    // 1 and 2 alike, 2 and 3 alike, 1 and 3 opposite: smallest eigenvalue 1 − 2 × 0.9 < 0.
    expectRefusal(of([[1, 0.9, -0.9], [0.9, 1, 0.9], [-0.9, 0.9, 1]]), 'domain', 'hold together (positive semidefinite), got a contradiction in row');
    // All of 1 goes with 2 and with 3, which then must go together: nothing is left on the diagonal, something beside it.
    expectRefusal(of([[1, 1, 1], [1, 1, 0.9], [1, 0.9, 1]]), 'domain', 'contradiction in row 3, column 2');
    expectRefusal(of(filled(3, -0.51)), 'domain', 'hold together');
    expectRefusal(of([[1, 1, 0], [1, 1, 0.1], [0, 0.1, 1]]), 'domain', 'hold together');
  });

  test('accepts matrices on the edge: r = −1/2 among three, and r = 1', () => {
    expect(combine([1, 1, 1], undefined, filled(3, -0.5)).u).toBe(0);
    expectRelative(combine([1, 2, 3], undefined, filled(3, 1)).u, 6, 3e-16);
  });

  test('refuses lengths and numbers that do not fit', () => {
    expectRefusal(() => combine([]), 'shape', 'at least one standard uncertainty');
    expectRefusal(() => combine([1, 2], [1]), 'shape', '2 sensitivity coefficients, got 1');
    expectRefusal(() => combine([1, 2], undefined, undefined, [1]), 'shape', '2 degrees of freedom, got 1');
    expectRefusal(() => combine([1, -2]), 'domain', 'standard uncertainties >= 0, got -2 at index 1');
    expectRefusal(() => combine([1, 2], [1, NaN]), 'domain', 'finite sensitivity coefficients, got NaN at index 1');
    expectRefusal(() => combine([1, 2], undefined, undefined, [1, 0]), 'domain', 'degrees of freedom > 0, got 0 at index 1');
    expectRefusal(() => combine([1e308, 1e308], [10, 1]), 'notFinite', 'too large');
  });
});

function cosine(x: number[], y: number[], size: number): number {
  return Math.max(-1, Math.min(1, x.reduce((total, v, k) => total + v * y[k], 0) / size));
}
