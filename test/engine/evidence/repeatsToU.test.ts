import { describe, expect, test } from 'vitest';
import { repeatsToU } from '../../../functions/engine/evidence/repeatsToU';
import { expectPrinted, expectRefusal, expectRelative } from '../numbers/expectations';
import { lew, lottery, mavro } from '../numbers/strdReadings';

describe('repeatsToU', () => {
  test('JCGM 100:2008, 4.4.3, Table 1: mean 100.145, s 1.489, u 0.333, 19 degrees of freedom', () => {
    const readings = [
      96.9, 98.18, 98.25, 98.61, 99.03, 99.49, 99.56, 99.74, 99.89, 100.07, 100.33, 100.42, 100.68, 100.95, 101.11, 101.2, 101.57, 101.84,
      102.36, 102.72,
    ];
    const found = repeatsToU(readings);
    expectPrinted(found.mean, '100.145');
    expectPrinted(found.s, '1.489');
    expectPrinted(found.u, '0.333');
    expectRelative(found.s, 1.4888444830595, 1e-13); // exact rational arithmetic, 14 digits
    expectRelative(found.u, 0.33291574720467, 1e-13);
    expect([found.n, found.dof]).toEqual([20, 19]);
  });

  test('NIST TN 1900, E2: mean 25.6, s 4.1, u 0.872 (the readings from memory, the 15th inferred from these results)', () => {
    const readings = [
      18.75, 28.25, 25.75, 28, 28.5, 20.75, 21, 22.75, 18.5, 27.25, 20.75, 26.5, 28, 23.25, 28, 21.75, 26, 26.5, 28, 33.25, 32, 29.5,
    ];
    const found = repeatsToU(readings);
    expectPrinted(found.mean, '25.6');
    expectPrinted(found.s, '4.1');
    expectPrinted(found.u, '0.872');
  });

  // NIST StRD, univariate; s certified.
  test.each([
    ['Lew', lew, '277.3321680443161', 1e-15],
    ['Lottery', lottery, '291.6997274709691', 1e-15],
    ['Mavro', mavro, '0.0004291234540030528', 1e-12], // what the storage of 2.0018 leaves of deviations of 4e-4
  ] as const)('StRD %s', (_, readings, s, tolerance) => {
    const found = repeatsToU(readings);
    expectRelative(found.s, s, tolerance);
    expectRelative(found.u, Number(s) / Math.sqrt(readings.length), tolerance + 5e-16);
    expect(found.dof).toBe(readings.length - 1);
  });

  test('JCGM 100:2008, H.1.3.2: pooled s 13 nm from 25 readings, five averaged, is 5.8 nm with 24 degrees of freedom', () => {
    const { u, dof, s, n } = repeatsToU([215], { averaged: 5, priorS: 13, priorDof: 24 });
    expectPrinted(u, '5.8');
    expect({ dof, s, n }).toEqual({ dof: 24, s: 13, n: 1 });
  });

  test('averaged says how many readings the reported value is the mean of', () => {
    const readings = [10, 12, 14]; // s = 2
    expectRelative(repeatsToU(readings, { averaged: 1 }).u, 2, 3e-16);
    expectRelative(repeatsToU(readings, { averaged: 2 }).u, Math.SQRT2, 3e-16);
    expectRelative(repeatsToU(readings).u, 2 / Math.sqrt(3), 3e-16);
    expect(repeatsToU(readings, { averaged: 1 }).dof).toBe(2);
  });

  test('a prior standard deviation replaces that of the readings', () => {
    const found = repeatsToU([10, 10.1], { priorS: 0.5 });
    expectRelative(found.u, 0.5 / Math.SQRT2, 3e-16);
    expect([found.s, found.dof, found.n]).toEqual([0.5, Infinity, 2]);
    expect(repeatsToU([10], { priorS: 0.5 })).toEqual({ u: 0.5, dof: Infinity, s: 0.5, n: 1, mean: 10 });
  });

  test('refuses', () => {
    expectRefusal(() => repeatsToU([]), 'shape', 'at least one reading');
    expectRefusal(() => repeatsToU([5]), 'shape', 'two readings or more, or a prior standard deviation');
    expectRefusal(() => repeatsToU([1, 2], { averaged: 1.5 }), 'domain', 'got 1.5');
    expectRefusal(() => repeatsToU([1, 2], { averaged: 0 }), 'domain', 'got 0');
    expectRefusal(() => repeatsToU([1, 2], { priorS: -1 }), 'domain', 'prior standard deviation >= 0, got -1');
    expectRefusal(() => repeatsToU([1, 2], { priorDof: 9 }), 'shape', 'for the prior degrees of freedom 9, got none');
    expectRefusal(() => repeatsToU([1, 2], { priorS: 1, priorDof: 0 }), 'domain', 'prior degrees of freedom > 0, got 0');
    expectRefusal(() => repeatsToU([1, NaN]), 'domain', 'got NaN at index 1');
  });
});
