import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { worksheetDigits } from '../../../functions/engine/numbers/decimal';
import { pairRules, roundPair } from '../../../functions/engine/report/roundPair';
import type { PairRule } from '../../../functions/engine/report/roundPair';
import { expectRefusal } from '../numbers/expectations';

const texts = (value: number, u: number, digits?: number, rule?: PairRule) => {
  const { valueText, uText } = roundPair(value, u, digits, rule);
  return `${valueText} ± ${uText}`;
};

describe('roundPair', () => {
  test('JCGM 100:2008, 7.2.6: 10.05762 Ω with 27 mΩ is 10.058 Ω; 10.47 mΩ rounds up to 11 mΩ; 28.05 kHz is 28 kHz', () => {
    expect(texts(10.05762, 0.027)).toBe('10.058 ± 0.027');
    expect(roundPair(0, 10.47, 2, 'up').uText).toBe('11');
    expect(roundPair(0, 28.05, 2, 'even').uText).toBe('28');
    expect(roundPair(0, 28.05, 2, 'up5').uText).toBe('28');
  });

  // Particle Data Group, Review of Particle Physics, Introduction 5.3 (the first two from memory), and its use in print.
  test.each([
    [0.827, 0.119, '0.83 ± 0.12'],
    [0.827, 0.367, '0.8 ± 0.4'],
    [12.2135, 0.03215, '12.214 ± 0.032'],
    [12.2135, 0.06515, '12.21 ± 0.07'],
    [0.279008, 0.0123261, '0.279 ± 0.012'],
  ])('PDG: %d ± %d', (value, u, text) => expect(texts(value, u, 2, 'pdg')).toBe(text));

  test('PDG: 354 two digits, 355 and 949 one, 950 up to 1000 and two', () => {
    expect(texts(0.1, 0.354, 2, 'pdg')).toBe('0.10 ± 0.35');
    expect(texts(0.1, 0.355, 2, 'pdg')).toBe('0.1 ± 0.4');
    expect(texts(0.1, 0.949, 2, 'pdg')).toBe('0.1 ± 0.9');
    expect(texts(0.12, 0.95, 2, 'pdg')).toBe('0.1 ± 1.0');
    expect(texts(1234, 95.3, 2, 'pdg')).toBe('1230 ± 100');
    expect(texts(1234, 354.9, 2, 'pdg')).toBe('1230 ± 350'); // the digits as they stand
    expect(texts(1.5, 0.4, 5, 'pdg')).toBe('1.5 ± 0.4'); // chooses its own digits
  });

  test('a carry keeps the number of digits', () => {
    expect(roundPair(1.23456, 0.0996)).toEqual({ value: 1.23, u: 0.1, place: -2, valueText: '1.23', uText: '0.10' });
    expect(roundPair(1.23456, 0.0951, 1)).toEqual({ value: 1.2, u: 0.1, place: -1, valueText: '1.2', uText: '0.1' });
    expect(texts(1234.5, 99.7)).toBe('1230 ± 100');
    expect(texts(1234.5, 0.0991, 2, 'up')).toBe('1234.50 ± 0.10');
    expect(texts(0.05, 0.999999)).toBe('0.0 ± 1.0'); // a tie at 0.05: even
  });

  test('keeps trailing zeros of both', () => {
    expect(texts(12.1, 0.05, 1)).toBe('12.10 ± 0.05');
    expect(texts(5, 0.1)).toBe('5.00 ± 0.10');
    expect(texts(1200, 120)).toBe('1200 ± 120');
    expect(texts(1234567, 12345)).toBe('1235000 ± 12000');
  });

  test('rounds entries that are stored off their tie as they were entered', () => {
    expect(roundPair(0.285, 0.01, 1).valueText).toBe('0.28'); // tie to even; stored as 0.28499999999999998
    expect(roundPair(2.675, 0.01, 1).valueText).toBe('2.68');
    expect(roundPair(0, 0.285).uText).toBe('0.28');
    expect(roundPair(0, 4.35).uText).toBe('4.4');
    expect(roundPair(0, 1.1 * 1.1, 3, 'up').uText).toBe('1.21'); // 1.2100000000000002 is not above 1.21
  });

  test('the value is rounded half to even whatever the rule', () => {
    for (const rule of ['even', 'up', 'up5'] as const) {
      expect(roundPair(2.25, 0.5, 1, rule).valueText).toBe('2.2');
      expect(roundPair(2.35, 0.5, 1, rule).valueText).toBe('2.4');
      expect(roundPair(-2.25, 0.5, 1, rule).valueText).toBe('-2.2');
    }
  });

  test('up5 rounds down only where that loses at most 5 % (EA-4/02, from memory)', () => {
    expect(roundPair(0, 0.14, 1, 'up5').uText).toBe('0.2'); // down would lose 29 %
    expect(roundPair(0, 0.105, 1, 'up5').uText).toBe('0.1'); // 4.76 %
    expect(roundPair(0, 0.106, 1, 'up5').uText).toBe('0.2'); // 5.7 %
    expect(roundPair(0, 8.4, 1, 'up5').uText).toBe('8'); // 4.8 %
    expect(roundPair(0, 7.44, 1, 'up5').uText).toBe('8'); // 5.9 %
    expect(roundPair(0, 7.6, 1, 'up5').uText).toBe('8');
    // 20/19 loses exactly 5 % in the limit: 1.05263 loses 4.9999 %, 1.05264 loses 5.0008 %
    expect(roundPair(0, 1.05263, 1, 'up5').uText).toBe('1');
    expect(roundPair(0, 1.05264, 1, 'up5').uText).toBe('2');
  });

  test('takes any size', () => {
    expect(roundPair(1.5e300, 2.34e298).value).toBe(1.5e300);
    expect(roundPair(1.23456e-300, 2.34e-303).u).toBe(2.3e-303);
    expect(roundPair(1e10, 1.2e-9).valueText).toBe('10000000000.0000000000');
    expect(texts(0.04, 12)).toBe('0 ± 12');
    expect(texts(-0.04, 12)).toBe('0 ± 12');
    expect(texts(-0.04, 1.2)).toBe('0.0 ± 1.2');
  });

  test('obeys its rules on random numbers', () => {
    const anyRule = fc.constantFrom(...pairRules);
    const size = fc.double({ min: Math.log(1e-20), max: Math.log(1e20), noNaN: true }).map(Math.exp);
    fc.assert(
      fc.property(fc.double({ min: -1e6, max: 1e6, noNaN: true }), size, fc.integer({ min: 1, max: 6 }), anyRule, (value, u, digits, rule) => {
        const pair = roundPair(value, u, digits, rule);
        const shown = Number(u.toPrecision(15));
        // The texts read back as the numbers, and both end at the same place.
        expect(Number(pair.uText)).toBe(pair.u);
        expect(Number(pair.valueText)).toBe(Number(Number(pair.value).toPrecision(15)));
        expect(pair.valueText.split('.')[1]?.length ?? 0).toBe(Math.max(0, -pair.place));
        expect(pair.uText.split('.')[1]?.length ?? 0).toBe(Math.max(0, -pair.place));
        // The number of digits is kept, carried or not.
        const figures = pair.uText.replace('.', '').replace(/^0+/, '').length - Math.max(0, pair.place);
        if (rule === 'pdg') expect([1, 2]).toContain(figures);
        else expect(figures).toBe(digits);
        // Never more than a step off; 1e-9 of a step is binary rounding of this check.
        const step = 10 ** pair.place;
        if (rule !== 'pdg') expect(Math.abs(pair.u - shown)).toBeLessThanOrEqual(step * (rule === 'even' ? 0.5 + 1e-9 : 1));
        if (rule === 'up') expect(pair.u).toBeGreaterThanOrEqual(shown);
        if (rule === 'up5') expect(pair.u).toBeGreaterThanOrEqual(0.95 * shown * (1 - 1e-15));
        // Rounding what is rounded changes nothing.
        if (rule !== 'pdg') expect(roundPair(value, pair.u, digits, rule).uText).toBe(pair.uText);
      }),
      { seed: 71, numRuns: 3000 },
    );
  });

  test('multiplying by ten moves the place and nothing else', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 99999 }), fc.integer({ min: 1, max: 99999 }), fc.constantFrom(...pairRules), (n, m, rule) => {
        const one = roundPair(n, m, 2, rule);
        const ten = roundPair(n * 1000, m * 1000, 2, rule);
        expect(ten.place).toBe(one.place + 3);
        expect(worksheetDigits(ten.u).digits).toBe(worksheetDigits(one.u).digits);
        expect(worksheetDigits(ten.value).digits).toBe(worksheetDigits(one.value).digits);
      }),
      { seed: 72, numRuns: 1000 },
    );
  });

  test('refuses what cannot be rounded to', () => {
    for (const u of [0, -1, NaN, Infinity]) expectRefusal(() => roundPair(1, u), 'domain', `roundPair needs an uncertainty > 0, got ${u}`);
    for (const value of [NaN, Infinity]) expectRefusal(() => roundPair(value, 1), 'domain', `finite value, got ${value}`);
    for (const digits of [0, 16, 1.5, NaN]) expectRefusal(() => roundPair(1, 1, digits), 'domain', `digits from 1 to 15, got ${digits}`);
    expectRefusal(() => roundPair(1, 1, 2, 'odd' as PairRule), 'choice', 'a rule out of even, up, up5, pdg, got "odd"');
    expectRefusal(() => roundPair(1, 1.7976931348623157e308, 1), 'notFinite', 'too large');
  });
});
