import stdlibQuantile from '@stdlib/stats-base-dists-normal-quantile';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { normalCdf, normalDensity, normalUpperTail, normalWithin } from '../../../functions/engine/numbers/normalCdf';
import { normalQuantile, normalUpperQuantile } from '../../../functions/engine/numbers/normalQuantile';
import { expectRefusal, expectRelative } from './expectations';
import { normalProbabilitiesBelow, normalQuantiles } from './studentReference';

describe('normalCdf', () => {
  test.each(normalProbabilitiesBelow)('at %d', (z, reference) => expectRelative(normalCdf(z), reference, 2e-15));

  // mpmath, 50 digits
  test.each([
    [10, '7.619853024160526066e-24'],
    [20, '2.7536241186062336951e-89'],
    [30, '4.9067139271481870595e-198'],
    [37, '5.7255712225245768227e-300'],
  ])('keeps its digits in the tail above %d', (z, reference) => expectRelative(normalUpperTail(z), reference, 2e-15));

  test('keeps its digits near zero: normalWithin(z) = sqrt(2/π) (z − z³/6 + …)', () => {
    for (const z of [1e-12, 1e-6]) expectRelative(normalWithin(z), Math.sqrt(2 / Math.PI) * (z - z ** 3 / 6), 1e-15, z);
  });

  test('has no step where one method takes over from another', () => {
    // The change over ±1e-8 around z = 1 is the density times the distance, to the rounding of the difference.
    expectRelative((normalUpperTail(1 - 1e-8) - normalUpperTail(1 + 1e-8)) / 2e-8, normalDensity(1), 1e-7);
  });

  test('goes to its limits', () => {
    expect(normalCdf(-Infinity)).toBe(0);
    expect(normalCdf(Infinity)).toBe(1);
    expect(normalCdf(-50)).toBe(0);
    expect(normalWithin(Infinity)).toBe(1);
  });

  test('within and the two tails add up to 1', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 9, noNaN: true }), (z) => {
        expect(Math.abs(normalWithin(z) + 2 * normalUpperTail(z) - 1)).toBeLessThan(3e-16);
      }),
      { seed: 11, numRuns: 500 },
    );
  });

  test('refuses NaN', () => {
    expectRefusal(() => normalCdf(NaN), 'domain', 'got NaN');
    expectRefusal(() => normalWithin(-1), 'domain', 'normalWithin needs z >= 0, got -1');
  });
});

describe('normalQuantile', () => {
  test.each(normalQuantiles)('of %d', (p, reference) => expectRelative(normalQuantile(p), reference, 1e-15));

  test('agrees with an independent implementation', () => {
    // The other one goes through 2 p − 1 and loses as much of p as that rounds off.
    fc.assert(
      fc.property(fc.double({ min: Math.log(1e-9), max: Math.log(0.4999), noNaN: true }).map(Math.exp), (p) => {
        expectRelative(normalQuantile(p), stdlibQuantile(p, 0, 1), 3e-15 + 2e-16 / p, p);
      }),
      { seed: 12, numRuns: 2000 },
    );
  });

  test('inverts the distribution function on every branch', () => {
    for (const p of [1e-290, 1e-100, 1e-20, 1e-11, 1e-5, 0.02, 0.0749, 0.0751, 0.2, 0.49, 0.6, 0.92, 0.95, 0.999])
      // d ln p / d ln z is about z² in the tail, so the rounding of z is magnified by as much.
      expectRelative(normalCdf(normalQuantile(p)), p, 4e-16 * (5 + normalQuantile(p) ** 2), p);
    expect(normalUpperQuantile(1e-30)).toBe(-normalQuantile(1e-30));
  });

  test('refuses probabilities that are not between 0 and 1', () => {
    for (const p of [0, 1, -0.1, 1.1, NaN]) expectRefusal(() => normalQuantile(p), 'domain', `between 0 and 1, got ${p}`);
  });
});
