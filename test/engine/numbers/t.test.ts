import stdlibQuantile from '@stdlib/stats-base-dists-t-quantile';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { normalCdf } from '../../../functions/engine/numbers/normalCdf';
import { normalQuantile } from '../../../functions/engine/numbers/normalQuantile';
import { tCdf, tDensity, tUpperTail, tWithin } from '../../../functions/engine/numbers/tCdf';
import { tFactor, tQuantile, tUpperQuantile } from '../../../functions/engine/numbers/tQuantile';
import { expectRefusal, expectRelative } from './expectations';
import * as reference from './studentReference';

const anyDof = fc.double({ min: Math.log(0.5), max: Math.log(1e8), noNaN: true }).map(Math.exp);

describe('tQuantile', () => {
  test.each(reference.tQuantiles)('with %d degrees of freedom', (nu, quantiles) => {
    quantiles.forEach((q, i) => {
      const p = reference.tProbabilities[i];
      expectRelative(tQuantile(p, nu), q, 5e-14, [nu, p]);
      // The mirrored argument is rounded: 1 − p is off by 1e-16, which is 1e-12 of the smallest tail here.
      expectRelative(-tQuantile(1 - p, nu), q, 1e-12 * Math.max(1, 2 / nu), [nu, 1 - p]);
    });
  });

  test.each(reference.tUpperQuantiles)('next to one half and far out, with %d degrees of freedom', (nu, quantiles) => {
    quantiles.forEach((q, i) => expectRelative(tUpperQuantile(reference.tTails[i], nu), q, 5e-14, [nu, reference.tTails[i]]));
  });

  test('has its closed forms: 1 degree of freedom tan, 2 degrees of freedom algebraic', () => {
    for (const p of [1e-12, 0.003, 0.1, 0.26, 0.4, 0.49, 0.4999999]) {
      expectRelative(tQuantile(p, 1), -1 / Math.tan(Math.PI * p), 1e-14 + 1e-16 / (0.5 - p), p); // tan loses digits next to its zero
      expectRelative(tQuantile(p, 2), -(1 - 2 * p) / Math.sqrt(2 * p * (1 - p)), 1e-14, p);
    }
  });

  test('goes out to the last tails: 1/(π q) with 1 degree of freedom, 1/√(2 q) with 2', () => {
    for (const tail of [1e-60, 1e-104, 1e-105, 1e-200, 1e-290]) {
      // The result is the exponential of a logarithm as large as ln(tail).
      expectRelative(tUpperQuantile(tail, 1), 1 / (Math.PI * tail), -4e-16 * Math.log(tail), tail);
      expectRelative(tUpperQuantile(tail, 2), 1 / Math.sqrt(2 * tail), -4e-16 * Math.log(tail), tail);
    }
  });

  test('agrees with an independent implementation', () => {
    fc.assert(
      fc.property(fc.double({ min: Math.log(1e-12), max: Math.log(0.49), noNaN: true }).map(Math.exp), anyDof, (p, nu) => {
        expectRelative(tQuantile(p, nu), stdlibQuantile(p, nu), 1e-12, [p, nu]);
      }),
      { seed: 21, numRuns: 2000 },
    );
  });

  test('inverts the distribution function', () => {
    fc.assert(
      fc.property(fc.double({ min: Math.log(1e-250), max: Math.log(0.499), noNaN: true }).map(Math.exp), anyDof, (tail, nu) => {
        const nuHere = Math.max(nu, tail < 1e-100 ? 2 : 0.5); // keeps t a number
        const t = tUpperQuantile(tail, nuHere);
        // d ln tail / d ln t is at most nu and at most about 1 + t²; the tail is the exponential of a logarithm as large as ln(tail).
        const allowed = 1e-13 + 4e-16 * (Math.min(nuHere, 2 + t * t) - Math.log(tail));
        expectRelative(tUpperTail(t, nuHere), tail, allowed, [tail, nuHere]);
      }),
      { seed: 22, numRuns: 1000 },
    );
  });

  test('is the normal quantile for infinite degrees of freedom, and comes to it as (z³ + z)/(4 nu)', () => {
    for (const p of [0.001, 0.3, 0.8, 0.999]) {
      expect(tQuantile(p, Infinity)).toBe(normalQuantile(p));
      const z = normalQuantile(p);
      expectRelative(tQuantile(p, 1e9), z + (z ** 3 + z) / 4e9, 1e-14, p); // the density goes through a logarithm near 10
      expectRelative(tQuantile(p, 1e19), z, 3e-15, p);
    }
  });

  test('is odd, and zero at one half', () => {
    expect(tQuantile(0.5, 7)).toBe(0);
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1023 }), anyDof, (n, nu) => {
        expect(tQuantile(n / 1024, nu)).toBe(0 - tQuantile(1 - n / 1024, nu));
      }),
      { seed: 23, numRuns: 300 },
    );
  });

  test('falls as degrees of freedom rise', () => {
    for (const p of [0.6, 0.975, 0.9999999]) {
      let last = Infinity;
      for (const nu of [0.5, 0.9, 1, 1.1, 2, 3.5, 10, 49, 50, 1e3, 1e6]) {
        const t = tQuantile(p, nu);
        expect(t).toBeLessThan(last);
        last = t;
      }
    }
  });

  test('refuses what has no quantile', () => {
    for (const p of [0, 1, NaN]) expectRefusal(() => tQuantile(p, 5), 'domain', `between 0 and 1, got ${p}`);
    for (const nu of [0, -1, NaN]) expectRefusal(() => tQuantile(0.9, nu), 'domain', `degrees of freedom > 0, got ${nu}`);
    expectRefusal(() => tUpperQuantile(1e-300, 5), 'domain', 'tail probability of at least 1e-290, got 1e-300');
    expectRefusal(() => tUpperQuantile(1e-280, 0.5), 'notFinite', 'below 1.8e308');
  });
});

describe('tFactor', () => {
  test('is the quantile at (1 + p)/2', () => {
    expectRelative(tFactor(0.95, 10), tQuantile(0.975, 10), 1e-14);
    expectRelative(tFactor(0.95, Infinity), normalQuantile(0.975), 1e-15);
  });

  test('keeps its digits at both ends: small probability p/(2 f(0)), small tail with 1 degree of freedom 2/(π (1 − p))', () => {
    for (const nu of [0.5, 4, 1e6]) expectRelative(tFactor(1e-12, nu), 1e-12 / (2 * tDensity(0, nu)), 1e-14, nu);
    for (const n of [50, 53]) expectRelative(tFactor(1 - 2 ** -n, 1), 2 ** (n + 1) / Math.PI, 1e-14, n);
  });

  test('refuses probabilities that are not between 0 and 1', () => {
    for (const p of [0, 1, 95, NaN]) expectRefusal(() => tFactor(p, 5), 'domain', `tFactor needs a probability between 0 and 1, got ${p}`);
  });
});

describe('tCdf', () => {
  test.each(reference.tProbabilitiesBelow)('with %d degrees of freedom at %d', (nu, t, p) => {
    expectRelative(tCdf(t, nu), p, 5e-15);
    expectRelative(tUpperTail(-t, nu), p, 5e-15);
  });

  test('is the normal one for infinite degrees of freedom', () => {
    for (const t of [-3, 0, 1.96]) expect(tCdf(t, Infinity)).toBe(normalCdf(t));
  });

  test('within and the two tails add up to 1', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 30, noNaN: true }), anyDof, (t, nu) => {
        expect(Math.abs(tWithin(t, nu) + 2 * tUpperTail(t, nu) - 1)).toBeLessThan(2e-14);
      }),
      { seed: 24, numRuns: 500 },
    );
  });

  test('reaches out to the largest arguments: with 1 degree of freedom the tail is 1/(π t)', () => {
    for (const t of [1e80, 1e120, 1e250]) expectRelative(tUpperTail(t, 1), 1 / (Math.PI * t), 2e-13, t); // ln t times 2^-53
    expect(tCdf(Infinity, 3)).toBe(1);
    expect(tWithin(Infinity, 3)).toBe(1);
  });

  test('has the density as its slope', () => {
    for (const nu of [0.7, 3, 60]) {
      for (const t of [0.3, 1.7, 4]) {
        const slope = (tUpperTail(t - 1e-5, nu) - tUpperTail(t + 1e-5, nu)) / 2e-5;
        expectRelative(slope, tDensity(t, nu), 1e-8, [nu, t]); // a central difference: h² and 1e-16/h
      }
    }
  });

  test('refuses NaN', () => {
    expectRefusal(() => tCdf(NaN, 5), 'domain', 'got NaN');
    expectRefusal(() => tWithin(-1, 5), 'domain', 'tWithin needs t >= 0, got -1');
    expectRefusal(() => tCdf(1, 0), 'domain', 'tCdf needs degrees of freedom > 0, got 0');
  });
});
