import { describe, expect, it } from 'vitest';
import { conformity } from '../../../functions/engine/decide/conformity';
import { decide } from '../../../functions/engine/decide/decide';
import { guardedLimit } from '../../../functions/engine/decide/guardedLimit';
import { enScore, enVerdict, zScore, zVerdict, zetaScore } from '../../../functions/engine/decide/scores';
import { tQuantile } from '../../../functions/engine/numbers/tQuantile';
import { seeded } from '../formula/crosscheck/seeded';

const open = { lower: -Infinity, upper: Infinity };

describe('probability of conformity (JCGM 106:2012)', () => {
  // Examples of 7.3.3 and 7.4; printed to two digits, the further digits recomputed with 40-digit arithmetic.
  it.each([
    ['breakdown voltage of a Zener diode, 7.3.3', -5.47, 0.05, { ...open, upper: -5.4 }, 0.92, 0.91924334076623],
    ['burst pressure of a container, 7.3.3', 509.7, 8.6, { ...open, lower: 490 }, 0.99, 0.98900954738482],
    ['viscosity of an oil, 7.4', 13.6, 1.8, { lower: 12.5, upper: 16.3 }, 0.66, 0.66262978649531],
  ] as const)('%s', (_title, value, u, limits, printed, exact) => {
    const p = conformity(value, u, limits);
    expect(Math.abs(p - printed)).toBeLessThanOrEqual(0.005);
    expect(Math.abs(p / exact - 1)).toBeLessThan(1e-13);
  });

  it('with one degree of freedom is that of an arctangent: a quarter beyond one u (closed form)', () => {
    expect(conformity(0, 1, { ...open, upper: 1 }, 1)).toBeCloseTo(0.75, 14);
    expect(conformity(0, 1, { lower: -1, upper: 1 }, 1)).toBeCloseTo(0.5, 14);
  });

  it('keeps its digits where little is left, by symmetry of the two sides', () => {
    const far = conformity(0, 1, { lower: 10, upper: 11 });
    expect(far).toBeGreaterThan(7e-24);
    expect(conformity(0, 1, { lower: -11, upper: -10 })).toBe(far);
  });

  it('grows with its upper limit, and parts add up to the whole (seeded)', () => {
    const draws = seeded(11);
    for (let i = 0; i < 300; i++) {
      const [value, u, dof] = [draws.between(-5, 5), draws.between(0.1, 3), draws.between(1, 30)];
      const [a, b, c] = [draws.between(-9, -3), draws.between(-3, 3), draws.between(3, 9)];
      const p = (lower: number, upper: number) => conformity(value, u, { lower, upper }, dof);
      expect(p(a, b)).toBeLessThanOrEqual(p(a, c));
      expect(Math.abs(p(a, b) + p(b, c) - p(a, c))).toBeLessThan(1e-14);
      expect(Math.abs(p(-Infinity, b) + p(b, Infinity) - 1)).toBeLessThan(1e-14);
    }
  });

  it('refuses limits that leave nothing', () => {
    expect(() => conformity(1, 1, open)).toThrow('conformity needs at least one limit, got none');
    expect(() => conformity(1, 1, { lower: 2, upper: 1 })).toThrow('conformity needs a lower limit below the upper one, got 2 and 1');
    expect(() => conformity(1, 0, { ...open, upper: 1 })).toThrow('standard uncertainty > 0');
  });
});

describe('guarded limits', () => {
  it('a speed limit of 100 km/h at 2 % and 99.9 % (JCGM 106:2012, 8.3.3.2: 107 km/h)', () => {
    const limit = guardedLimit(100, 0.02, { side: 'upper', zone: 'rejection', relative: true, risk: 0.001 });
    expect(Math.round(limit)).toBe(107);
    expect(Math.abs(limit / 106.58760948538 - 1)).toBeLessThan(1e-13);
  });

  it('the guard band is 1.645 u at 5 % (normal table)', () => {
    expect(guardedLimit(10, 0.1, { side: 'upper' })).toBeCloseTo(10 - 0.1644853626951, 12);
    expect(guardedLimit(10, 0.1, { side: 'lower' })).toBeCloseTo(10 + 0.1644853626951, 12);
    expect(guardedLimit(10, 0.1, { side: 'upper', zone: 'rejection' })).toBeCloseTo(10 + 0.1644853626951, 12);
  });

  it('at it, the probability of not conforming is the stated risk (seeded)', () => {
    const draws = seeded(5);
    for (let i = 0; i < 200; i++) {
      const [limit, u, risk, dof] = [draws.between(1, 9), draws.between(0.01, 0.05), draws.between(0.001, 0.4), draws.between(2, 40)];
      const accepted = guardedLimit(limit, u, { side: 'upper', risk, dof });
      expect(Math.abs(conformity(accepted, u, { ...open, upper: limit }, dof) - (1 - risk))).toBeLessThan(1e-12);
      const rejected = guardedLimit(limit, u, { side: 'lower', risk, dof, zone: 'rejection', relative: true });
      expect(Math.abs(conformity(rejected, u * rejected, { ...open, lower: limit }, dof) - risk)).toBeLessThan(1e-12);
    }
  });

  it('refuses an empty zone and what is outside its range', () => {
    const lower = { side: 'lower', relative: true, risk: 0.001 } as const;
    expect(() => guardedLimit(10, 0.4, lower)).toThrow('needs a relative uncertainty that leaves a zone, got 0.4');
    expect(() => guardedLimit(0, 0.1, lower)).toThrow('needs a limit above 0 where the uncertainty is relative, got 0');
    expect(() => guardedLimit(10, 0.1, { side: 'upper', risk: 0.5 })).toThrow('needs a risk above 0 and below 0.5, got 0.5');
    expect(() => guardedLimit(10, 0, { side: 'upper' })).toThrow('standard uncertainty > 0');
  });
});

describe('decisions', () => {
  const limits = { lower: 0, upper: 10 };
  const w = 0.1 * -tQuantile(0.05, Infinity);

  it.each([
    [5, 'pass', 'pass', 'pass', 'pass'],
    [10 - w - 1e-9, 'pass', 'pass', 'pass', 'pass'],
    [10 - w + 1e-9, 'conditional', 'fail', 'pass', 'pass'],
    [10, 'conditional', 'fail', 'pass', 'pass'],
    [10 + w - 1e-9, 'conditional', 'fail', 'pass', 'fail'],
    [10 + w + 1e-9, 'fail', 'fail', 'fail', 'fail'],
    [-w - 1e-9, 'fail', 'fail', 'fail', 'fail'],
  ] as const)('of %d: guarded %s, acceptance %s, rejection %s, simple %s (JCGM 106:2012, 8.2 and 8.3)', (value, guarded, acceptance, rejection, simple) => {
    expect(decide(value, 0.1, limits, 'guarded').decision).toBe(guarded);
    expect(decide(value, 0.1, limits, 'acceptance').decision).toBe(acceptance);
    expect(decide(value, 0.1, limits, 'rejection').decision).toBe(rejection);
    expect(decide(value, 0.1, limits, 'simple').decision).toBe(simple);
  });

  it('state their rule', () => {
    expect(decide(5, 0.1, limits).words).toBe(
      'Guard bands on both sides: pass at least 0.164 inside the limits, fail at least 0.164 outside, else conditional; risk of a wrong pass or fail at most 5 %',
    );
    expect(decide(5, 0.1, limits, 'simple').words).toMatch(/^Simple acceptance: .* up to 50 %$/);
    expect(decide(5, 0.1, limits, 'acceptance', 0.025).words).toBe('Guarded acceptance: pass at least 0.196 inside the limits, else fail; risk of a wrong pass at most 2.5 %');
  });

  it('refuse limits that the guard bands fill', () => {
    expect(() => decide(5, 4, limits)).toThrow('decide needs limits wider than the two guard bands of 6.58, got 0 and 10: nothing could pass');
    expect(decide(5, 4, limits, 'rejection').decision).toBe('pass');
  });
});

describe('scores (ISO 13528; closed forms)', () => {
  it('are differences over what they are compared with', () => {
    expect(zScore(10.5, 10, 0.25)).toBe(2);
    expect(zetaScore(10.5, 0.3, 10, 0.4)).toBe(1);
    expect(enScore(9.5, 0.6, 10, 0.8)).toBe(-0.5);
  });

  it('have verdicts that change at 2 and 3, and at 1', () => {
    expect([2, 2.01, -2.99, -3].map(zVerdict)).toEqual(['satisfactory', 'questionable', 'questionable', 'unsatisfactory']);
    expect([1, -1.01].map(enVerdict)).toEqual(['satisfactory', 'unsatisfactory']);
  });

  it('refuse a comparison with nothing', () => {
    expect(() => zetaScore(1, 0, 2, 0)).toThrow('zetaScore needs an uncertainty > 0 to compare with, got 0');
    expect(() => zScore(1e300, -1e300, 1e-300)).toThrow('too large for a number');
  });
});
