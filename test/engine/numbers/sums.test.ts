import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { meanAndDeviation } from '../../../functions/engine/numbers/meanAndDeviation';
import { rootSumSquares } from '../../../functions/engine/numbers/rootSumSquares';
import { sum } from '../../../functions/engine/numbers/sum';
import { expectRefusal, expectRelative } from './expectations';
import { lew, lottery, mavro } from './strdReadings';

describe('sum', () => {
  test('keeps what plain addition loses', () => {
    expect(sum([1, 1e100, 1, -1e100])).toBe(2);
    expect(sum(new Array(10).fill(0.1))).toBe(1);
    expect(sum([])).toBe(0);
  });

  test('is exact for whole numbers and does not mind their order', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -1e9, max: 1e9 })), (values) => {
        const exact = Number(values.reduce((total, v) => total + BigInt(v), 0n));
        expect(sum(values)).toBe(exact);
        expect(sum([...values].reverse())).toBe(exact);
      }),
      { seed: 31 },
    );
  });

  test('lets an infinite sum be infinite', () => {
    expect(sum([1e308, 1e308])).toBe(Infinity);
  });
});

describe('rootSumSquares', () => {
  test('is exact for Pythagorean numbers, also where the squares leave the range of numbers', () => {
    expect(rootSumSquares([3, -4])).toBe(5);
    expect(rootSumSquares([2, 3, 6])).toBe(7);
    expectRelative(rootSumSquares([3e200, 4e200]), 5e200, 3e-16);
    expectRelative(rootSumSquares([3e-200, 4e-200]), 5e-200, 3e-16);
    expect(rootSumSquares([3 * 2 ** -1070, 4 * 2 ** -1070])).toBe(5 * 2 ** -1070);
  });

  test('gives 0 for nothing, and passes on what is not finite', () => {
    expect(rootSumSquares([])).toBe(0);
    expect(rootSumSquares([0, -0])).toBe(0);
    expect(rootSumSquares([1, -Infinity])).toBe(Infinity);
    expect(rootSumSquares([NaN, 1])).toBeNaN();
    expect(rootSumSquares([1, NaN])).toBeNaN();
  });

  test('of n equal numbers is sqrt(n) times one', () => {
    for (const n of [7, 1000, 100_000]) expectRelative(rootSumSquares(new Array(n).fill(0.1)), 0.1 * Math.sqrt(n), 5e-16, n);
  });
});

describe('meanAndDeviation', () => {
  // NIST Statistical Reference Datasets, univariate: certified mean and standard deviation (exact rational arithmetic, 16 digits).
  test.each([
    ['Lew', lew, 200, '-177.435', '277.3321680443161'],
    ['Lottery', lottery, 218, '518.9587155963303', '291.6997274709691'],
    ['Mavro', mavro, 50, '2.001856', '0.0004291234540030528'],
  ] as const)('StRD %s', (_, readings, n, mean, s) => {
    const found = meanAndDeviation(readings);
    expect(found.n).toBe(n);
    expectRelative(found.mean, mean, 3e-16);
    // Mavro: a reading of 2.0018 is stored to 2e-16, its deviation of 4e-4 therefore to 1e-12 only.
    expectRelative(found.s!, s, readings === mavro ? 1e-12 : 1e-15);
  });

  test('loses nothing to a large common part (closed form: 0, 1, 2 has s = 1)', () => {
    expect(meanAndDeviation([1e15, 1e15 + 1, 1e15 + 2])).toEqual({ mean: 1e15 + 1, s: 1, n: 3 });
    expect(meanAndDeviation([5, 5, 5]).s).toBe(0);
    expectRelative(meanAndDeviation([1e200, 3e200]).s!, Math.SQRT2 * 1e200, 3e-16);
  });

  test('has no deviation for a single reading', () => {
    expect(meanAndDeviation([7])).toEqual({ mean: 7, s: undefined, n: 1 });
  });

  test('refuses no readings and readings that are not finite', () => {
    expectRefusal(() => meanAndDeviation([]), 'shape', 'at least one reading');
    expectRefusal(() => meanAndDeviation([1, Infinity]), 'domain', 'got Infinity at index 1');
  });
});
