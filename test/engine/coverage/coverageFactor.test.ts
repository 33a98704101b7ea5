import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { coverageFactor } from '../../../functions/engine/coverage/coverageFactor';
import type { CoverageShape } from '../../../functions/engine/coverage/coverageFactor';
import { normalWithin } from '../../../functions/engine/numbers/normalCdf';
import { tFactor } from '../../../functions/engine/numbers/tQuantile';
import { expectPrinted, expectRefusal, expectRelative } from '../numbers/expectations';
import { tableG2 } from './tableG2';

// The columns 68.27, 95.45 and 99.73 are the exact probabilities of 1, 2 and 3 standard deviations.
const probabilities = [normalWithin(1), 0.9, 0.95, normalWithin(2), 0.99, normalWithin(3)];

describe('JCGM 100:2008, Table G.2', () => {
  test.each(tableG2)('with %d degrees of freedom', (dof, printed) => {
    printed.forEach((figure, i) => {
      const k = coverageFactor({ probability: probabilities[i], dof });
      // Prints 1.70; the value is 1.68957 (the neighbours 1.70 and 1.68 of the table are right).
      if (dof === 35 && i === 1) expectRelative(k, 1.68957245778, 1e-11);
      else expectPrinted(k, figure, [dof, probabilities[i]]);
    });
  });
});

describe('coverageFactor', () => {
  test('JCGM 100:2008, 4.3.4 and 4.3.5: 2.58 for 99 %, 1.48 for 50 %, normal', () => {
    expectPrinted(coverageFactor({ probability: 0.99 }), '2.58');
    expectPrinted(1 / coverageFactor({ probability: 0.5 }), '1.48');
  });

  test('takes t where degrees of freedom are finite, normal where the shape says so', () => {
    expect(coverageFactor({ probability: 0.95, dof: 9 })).toBe(tFactor(0.95, 9));
    expect(coverageFactor({ probability: 0.95, dof: 9, shape: 't' })).toBe(tFactor(0.95, 9));
    expect(coverageFactor({ probability: 0.95, shape: 't' })).toBe(tFactor(0.95, Infinity));
    expect(coverageFactor({ probability: 0.95, dof: 9, shape: 'normal' })).toBe(tFactor(0.95, Infinity));
  });

  // Densities of unit half-width; k is counted in standard uncertainties, so each is checked by integrating its density over ±k u.
  const shapes: { shape: CoverageShape; edgeRatio?: number; divisor: number; density: (x: number) => number }[] = [
    { shape: 'rectangular', divisor: Math.sqrt(3), density: () => 0.5 },
    { shape: 'triangular', divisor: Math.sqrt(6), density: (x) => 1 - x },
    ...[0, 0.3, 0.5, 0.9, 1].map((b) => ({
      shape: 'trapezoidal' as const,
      edgeRatio: b,
      divisor: Math.sqrt(6 / (1 + b * b)),
      density: (x: number) => (x <= b ? 1 / (1 + b) : (1 - x) / (1 - b * b)),
    })),
  ];
  test.each(shapes)('holds its probability: $shape $edgeRatio', ({ shape, edgeRatio, divisor, density }) => {
    for (const probability of [0.001, 0.2, 0.5, 0.9, 0.95, 0.9999]) {
      const end = coverageFactor({ probability, shape, edgeRatio }) / divisor;
      // The densities are made of straight lines: the trapezium rule is exact but for the one step that holds the edge.
      const steps = 20_000;
      let area = 0;
      for (let i = 0; i < steps; i++) area += ((density((i * end) / steps) + density(((i + 1) * end) / steps)) * end) / steps;
      expectRelative(area, probability, 1e-8, probability);
    }
  });

  test('arcsine: P(|X| <= x) = (2/π) asin(x/a), a = √2 u', () => {
    for (const probability of [0.01, 0.5, 0.95])
      expectRelative((2 / Math.PI) * Math.asin(coverageFactor({ probability, shape: 'arcsine' }) / Math.SQRT2), probability, 1e-14);
  });

  test('rectangular at 95 % is 1.65, and a whole interval is the half-width', () => {
    expectPrinted(coverageFactor({ probability: 0.95, shape: 'rectangular' }), '1.65'); // EA-4/02, S9 (from memory)
    expectRelative(coverageFactor({ probability: 1 - 1e-15, shape: 'rectangular' }), Math.sqrt(3), 2e-15);
    expectRelative(coverageFactor({ probability: 1 - 2 ** -52, shape: 'triangular' }), Math.sqrt(6) * (1 - 2 ** -26), 1e-15);
  });

  test('a trapezoid goes from triangle to rectangle', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 0.999999, noNaN: true }), (probability) => {
        const of = (shape: CoverageShape, edgeRatio?: number) => coverageFactor({ probability, shape, edgeRatio });
        expectRelative(of('trapezoidal', 0), of('triangular'), 1e-15, probability);
        expectRelative(of('trapezoidal', 1), of('rectangular'), 1e-15, probability);
        // Small p: k = p/(2 f(0) u), to first order; no digits are lost there.
        expectRelative(coverageFactor({ probability: 1e-13, shape: 'triangular' }), (Math.sqrt(6) * 1e-13) / 2, 1e-13);
      }),
      { seed: 51, numRuns: 300 },
    );
  });

  test('refuses what it cannot answer', () => {
    for (const probability of [0, 1, 95, NaN]) expectRefusal(() => coverageFactor({ probability }), 'domain', `between 0 and 1, got ${probability}`);
    expectRefusal(() => coverageFactor({ probability: 0.9, dof: 0 }), 'domain', 'degrees of freedom > 0, got 0');
    expectRefusal(() => coverageFactor({ probability: 0.9, shape: 'trapezoidal' }), 'domain', 'got none');
    expectRefusal(() => coverageFactor({ probability: 0.9, shape: 'trapezoidal', edgeRatio: 1.5 }), 'domain', 'got 1.5');
    expectRefusal(() => coverageFactor({ probability: 0.9, shape: 'rectangular', dof: 8 }), 'domain', 'for the shape rectangular, got 8');
    expectRefusal(() => coverageFactor({ probability: 0.9, shape: 'square' as CoverageShape }), 'choice', 'got square');
  });
});
