import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { effectiveDof } from '../../../functions/engine/coverage/effectiveDof';
import { snapDof, truncateDof } from '../../../functions/engine/coverage/truncateDof';
import { expectPrinted, expectRefusal, expectRelative } from '../numbers/expectations';

describe('effectiveDof', () => {
  test('JCGM 100:2008, G.4.1: 0.25 %, 0.57 %, 0.82 % with 9, 4, 14 degrees of freedom give 19.0', () => {
    const nu = effectiveDof([0.25, 0.57, 0.82], [9, 4, 14]);
    expectPrinted(nu, '19.0');
    expectRelative(nu, 18.998742314268, 1e-13); // exact rational arithmetic
  });

  test('JCGM 100:2008, H.1.6: 16.7 from the components in nm', () => {
    // u(l_S) = 25, nu 18; d: 13/√5 nu 24, 10/2.57.. of t 95 % nu 5, 20/3 nu 8; α 50 × 1e-6 × 0.1…: the two temperature effects.
    const certificate = 10 / 2.57058183563631; // t(0.95, 5), mpmath
    const expansion = (50.000623e6 * 1e-6) / Math.sqrt(3) / 10; // l_S θ u(δα), θ = −0.1 °C
    const temperature = (50.000623e6 * 11.5e-6 * 0.05) / Math.sqrt(3); // l_S α u(δθ)
    const components = [25, 13 / Math.sqrt(5), certificate, 20 / 3, expansion, temperature];
    expectPrinted(effectiveDof(components, [18, 24, 5, 8, 50, 2]), '16.7');
  });

  test('of equal components with equal degrees of freedom is their number times these', () => {
    for (const n of [1, 2, 7, 1000]) expectRelative(effectiveDof(new Array(n).fill(0.3), new Array(n).fill(4)), 4 * n, 1e-14, n);
  });

  test('runs its example: 25² / (81/10 + 256/10)', () => {
    expectRelative(effectiveDof([3, 4], [10, 10]), 625 / 33.7, 1e-15);
  });

  test('counts exactly known components in u_c only', () => {
    expectRelative(effectiveDof([1, 1], [5, Infinity]), 20, 1e-15);
    expect(effectiveDof([1, 2], [Infinity, Infinity])).toBe(Infinity);
    expect(effectiveDof([0, 2], [3, Infinity])).toBe(Infinity);
  });

  test('does not depend on the unit, even where fourth powers leave the range of numbers', () => {
    expectRelative(effectiveDof([3e-200, 4e-200], [10, 10]), 625 / 33.7, 1e-14);
    expectRelative(effectiveDof([3e200, 4e200], [10, 10]), 625 / 33.7, 1e-14);
  });

  test('lies between the smallest and the sum of the degrees of freedom', () => {
    const component = fc.tuple(fc.double({ min: 1e-3, max: 1e3, noNaN: true }), fc.double({ min: 0.5, max: 200, noNaN: true }));
    fc.assert(
      fc.property(fc.array(component, { minLength: 1, maxLength: 12 }), (rows) => {
        const dof = rows.map((r) => r[1]);
        const nu = effectiveDof(rows.map((r) => r[0]), dof);
        expect(nu).toBeGreaterThanOrEqual(Math.min(...dof) * (1 - 1e-14));
        expect(nu).toBeLessThanOrEqual(dof.reduce((a, b) => a + b, 0) * (1 + 1e-14));
      }),
      { seed: 52 },
    );
  });

  test('refuses what has no degrees of freedom', () => {
    expectRefusal(() => effectiveDof([1, 2], [3]), 'shape', 'got 1 for 2');
    expectRefusal(() => effectiveDof([], []), 'shape', 'got 0 for 0');
    expectRefusal(() => effectiveDof([1, -2], [3, 3]), 'domain', 'components >= 0, got -2 at index 1');
    expectRefusal(() => effectiveDof([1, NaN], [3, 3]), 'domain', 'got NaN at index 1');
    expectRefusal(() => effectiveDof([1, 2], [3, -2]), 'domain', 'effectiveDof needs nu > 0, got -2 at index 1');
    expectRefusal(() => effectiveDof([0, 0], [3, 3]), 'domain', 'other than 0');
  });
});

describe('truncateDof', () => {
  test('JCGM 100:2008, H.1.6: 16.7 becomes 16', () => {
    expect(truncateDof(16.7411489)).toBe(16);
  });

  test('snaps what rounding has moved off an integer', () => {
    expect(truncateDof(8.999999999999998)).toBe(9);
    expect(truncateDof(9 - 8e-9)).toBe(9);
    expect(truncateDof(9 - 1.1e-8)).toBe(8);
    expect(truncateDof(1e12 - 0.5)).toBe(1e12);
    expect(snapDof(9.5)).toBe(9.5);
    expect(snapDof(1 - 1e-10)).toBe(1);
  });

  test('leaves infinity, and what is below 1, as it is', () => {
    expect(truncateDof(Infinity)).toBe(Infinity);
    expect(truncateDof(0.8)).toBe(0.8);
    expect(truncateDof(1e-12)).toBe(1e-12);
  });

  test('refuses what is not positive', () => {
    for (const nu of [0, -1, NaN]) expectRefusal(() => truncateDof(nu), 'domain', `degrees of freedom > 0, got ${nu}`);
  });
});
