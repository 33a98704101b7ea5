import { describe, expect, it } from 'vitest';
import { firstWhere } from '../../../functions/engine/numbers/firstWhere';
import { normalWithin } from '../../../functions/engine/numbers/normalCdf';
import { regularizedGamma } from '../../../functions/engine/numbers/regularizedGamma';
import { seeded } from '../formula/crosscheck/seeded';

const close = (a: number, b: number, tolerance: number): void => expect(Math.abs(a / b - 1)).toBeLessThan(tolerance);

describe('regularizedGamma', () => {
  it('is an exponential for a = 1 and a normal distribution for a = 1/2 (closed forms, DLMF 8.4)', () => {
    for (const x of [1e-6, 0.1, 1, 1.9, 2.1, 10, 300]) {
      close(regularizedGamma(1, x).upper, Math.exp(-x), 5e-14);
      close(regularizedGamma(0.5, x).lower, normalWithin(Math.sqrt(2 * x)), 5e-14);
    }
  });

  it('obeys Q(a + 1, x) = Q(a, x) + x^a e^(−x)/Γ(a + 1) for whole a: the sum of a Poisson distribution (DLMF 8.8.6; seeded)', () => {
    const draws = seeded(3);
    for (let i = 0; i < 200; i++) {
      const x = draws.between(0.1, 60);
      const a = Math.floor(draws.between(1, 40));
      let [term, sum] = [Math.exp(-x), Math.exp(-x)];
      for (let k = 1; k < a; k++) sum += term *= x / k;
      close(regularizedGamma(a, x).upper, sum, 1e-12);
    }
  });

  it('ends at 0 and 1, and refuses what is outside', () => {
    expect(regularizedGamma(3, 0)).toEqual({ lower: 0, upper: 1 });
    expect(regularizedGamma(3, Infinity)).toEqual({ lower: 1, upper: 0 });
    expect(() => regularizedGamma(0, 1)).toThrow('needs a above 0 and up to 1e8, got 0');
    expect(() => regularizedGamma(1, -1)).toThrow('needs x >= 0, got -1');
  });
});

describe('firstWhere', () => {
  it('finds the first double where a condition holds', () => {
    expect(firstWhere((x) => x >= Math.PI, 0, Infinity)).toBe(Math.PI);
    expect(firstWhere((x) => x >= 1e-200, 0, 1)).toBe(1e-200);
    expect(firstWhere((x) => x >= 1e300, 0, Infinity)).toBe(1e300);
    expect(firstWhere(() => false, 0, Infinity)).toBe(Infinity);
  });
});
