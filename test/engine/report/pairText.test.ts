import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { pairStyles, pairText } from '../../../functions/engine/report/pairText';
import type { PairStyle, PairTextOptions } from '../../../functions/engine/report/pairText';
import { expectRefusal } from '../numbers/expectations';

describe('pairText, plusminus', () => {
  test('JCGM 100:2008, 7.2.4: (100.02147 ± 0.00079) g, k = 2.26', () => {
    expect(pairText(100.02147, 0.00035, { unit: 'g', k: 2.2621571627982 })).toBe('(100.02147 ± 0.00079) g, k = 2.26');
  });

  test.each<[PairTextOptions, string]>([
    [{ digits: 1 }, '12.10 ± 0.05'],
    [{}, '12.100 ± 0.050'],
    [{ digits: 1, unit: 'mg/L' }, '(12.10 ± 0.05) mg/L'],
    [{ unit: 'mg/L', k: 2 }, '(12.10 ± 0.10) mg/L, k = 2'],
    [{ k: 2 }, '12.10 ± 0.10, k = 2'],
    [{ unit: ' % ', k: 1 }, '(12.100 ± 0.050) %, k = 1'],
    [{ unit: '  ' }, '12.100 ± 0.050'],
    [{ digits: 1, unit: 'mg/L', decimalSeparator: ',' }, '(12,10 ± 0,05) mg/L'],
  ])('12.1 with 0.05, %j', (options, text) => expect(pairText(12.1, 0.05, options)).toBe(text));

  test('rounds k u, not u', () => {
    // u = 0.0449 is 0.04 at one digit, 2 u = 0.0898 is 0.09
    expect(pairText(1, 0.0449, { digits: 1, k: 2 })).toBe('1.00 ± 0.09, k = 2');
  });

  test('states k with two decimals, three figures below 1, no trailing zeros', () => {
    const stated = (k: number) => pairText(1, 0.1, { k }).split(', ')[1];
    expect(stated(2)).toBe('k = 2');
    expect(stated(1.96)).toBe('k = 1.96');
    expect(stated(2.5)).toBe('k = 2.5');
    expect(stated(13.967811487502548)).toBe('k = 13.97'); // JCGM 100:2008, Table G.2
    expect(stated(0.6744897501960817)).toBe('k = 0.674');
    expect(stated(0.5)).toBe('k = 0.5');
    expect(stated(10)).toBe('k = 10');
    expect(pairText(1, 0.1, { k: 1.96, decimalSeparator: ',' })).toBe('1,00 ± 0,20, k = 1,96');
  });

  test('uses a hyphen as minus, and no exponent for any size', () => {
    expect(pairText(-0.1494, 0.0041)).toBe('-0.1494 ± 0.0041'); // JCGM 100:2008, H.3.4
    expect(pairText(1.2345e-9, 1.5e-11)).toBe('0.000000001234 ± 0.000000000015'); // tie to even
    expect(pairText(1.2345e22, 1.5e20)).toBe('12340000000000000000000 ± 150000000000000000000');
    expect(pairText(0, 1e-7, { digits: 1 })).toBe('0.0000000 ± 0.0000001');
  });

  test('takes the rounding rule', () => {
    expect(pairText(10.05762, 0.01047, { rule: 'up' })).toBe('10.058 ± 0.011'); // JCGM 100:2008, 7.2.6
    expect(pairText(12.2135, 0.06515, { rule: 'pdg' })).toBe('12.21 ± 0.07');
  });
});

describe('pairText, brackets', () => {
  test.each<[number, number, PairTextOptions, string]>([
    [12.1, 0.05, { digits: 1 }, '12.10(5)'],
    [12.1, 0.05, { digits: 1, unit: 'mg/L' }, '12.10(5) mg/L'],
    [100.02147, 0.00035, { unit: 'g' }, '100.02147(35) g'], // JCGM 100:2008, 7.2.2, form 2
    [6.6743, 0.00015, {}, '6.67430(15)'], // CODATA 2018, constant of gravitation
    [1.23456, 0.0996, {}, '1.23(10)'],
    [123.4, 1.2, {}, '123.4(12)'], // u in units of the last digit
    [1234, 120, {}, '1230(120)'],
    [1234, 12, {}, '1234(12)'],
    [-0.00123, 0.00004, { digits: 1 }, '-0.00123(4)'],
    [12.1, 0.05, { digits: 1, decimalSeparator: ',' }, '12,10(5)'],
  ])('%d with %d, %j', (value, u, options, text) => expect(pairText(value, u, { ...options, style: 'brackets' })).toBe(text));

  test('refuse a coverage factor', () => {
    expectRefusal(() => pairText(1, 0.1, { style: 'brackets', k: 2 }), 'domain', 'standard uncertainty alone for brackets, got a coverage factor 2');
  });
});

describe('pairText, scientific', () => {
  test.each<[number, number, PairTextOptions, string]>([
    [1210, 5, { digits: 1 }, '(1.210 ± 0.005) × 10³'],
    [1210, 5, { digits: 1, unit: 'mg/L' }, '(1.210 ± 0.005) × 10³ mg/L'],
    [1210, 5, { unit: 'mg/L', k: 2 }, '(1.210 ± 0.010) × 10³ mg/L, k = 2'],
    [-1.2345e-12, 1.5e-14, {}, '(-1.234 ± 0.015) × 10⁻¹²'],
    [12.1, 0.05, { digits: 1, decimalSeparator: ',' }, '(1,210 ± 0,005) × 10¹'],
    [9.9996, 0.0123, {}, '(1.0000 ± 0.0012) × 10¹'], // the power of the rounded value
    [9.9996, 0.00123, {}, '9.9996 ± 0.0012'],
    [1.21, 0.05, { digits: 1, unit: 'V' }, '(1.21 ± 0.05) V'],
    [3, 1200, {}, '(0.0 ± 1.2) × 10³'], // |value| < u: the power of u
    [0, 0.012, {}, '(0.0 ± 1.2) × 10⁻²'],
    [1.5e20, 2e18, { digits: 1 }, '(1.50 ± 0.02) × 10²⁰'],
  ])('%d with %d, %j', (value, u, options, text) => expect(pairText(value, u, { ...options, style: 'scientific' })).toBe(text));
});

describe('pairText, percent', () => {
  test.each<[number, number, PairTextOptions, string]>([
    [12.1, 0.05, {}, '12.100, u_rel = 0.41 %'], // 0.41322 %
    [12.1, 0.05, { k: 2 }, '12.10, U_rel = 0.83 %, k = 2'], // 0.82645 %
    [-12.1, 0.05, { digits: 1, unit: 'mg/L' }, '-12.10 mg/L, u_rel = 0.4 %'],
    [12.1, 0.05, { decimalSeparator: ',' }, '12,100, u_rel = 0,41 %'],
    [3, 6, { digits: 1 }, '3, u_rel = 200 %'],
  ])('%d with %d, %j', (value, u, options, text) => expect(pairText(value, u, { ...options, style: 'percent' })).toBe(text));

  test('refuses a value of 0', () => {
    expectRefusal(() => pairText(0, 1, { style: 'percent' }), 'domain', 'a value other than 0 for a relative uncertainty, got 0');
  });
});

describe('pairText', () => {
  test('reads back in every style, with no exponent and one separator', () => {
    const size = fc.double({ min: Math.log(1e-12), max: Math.log(1e12), noNaN: true }).map(Math.exp);
    const style = fc.constantFrom(...pairStyles);
    fc.assert(
      fc.property(fc.double({ min: -1e9, max: 1e9, noNaN: true }), size, style, fc.constantFrom('.' as const, ',' as const), (value, u, how, separator) => {
        fc.pre(Math.abs(value) > 1e-200); // else a relative uncertainty is no number
        const text = pairText(value, u, { style: how, decimalSeparator: separator, unit: 'kg' });
        expect(text).not.toMatch(/e[+-]?\d|NaN|Infinity/i);
        if (separator === ',') expect(text).not.toContain('.');
        const first = text.match(/-?\d+([.,]\d+)?/)![0].replace(',', '.');
        const power = text.match(/10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)/)?.[1] ?? '⁰';
        const read = Number(`${first}e${[...power].map((c) => (c === '⁻' ? '-' : '⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(c))).join('')}`);
        // The value was rounded at the second digit of u: at most half of 0.1 u off. 1e-14: the 15 digits that are written.
        expect(Math.abs(read - value)).toBeLessThanOrEqual(0.0501 * u + 1e-14 * Math.abs(value));
      }),
      { seed: 73, numRuns: 2000 },
    );
  });

  test('refuses', () => {
    for (const u of [0, -1, NaN, Infinity]) expectRefusal(() => pairText(1, u), 'domain', `pairText needs an uncertainty > 0, got ${u}`);
    for (const k of [0, -2, NaN, Infinity]) expectRefusal(() => pairText(1, 1, { k }), 'domain', `coverage factor > 0, got ${k}`);
    expectRefusal(() => pairText(1, 1e308, { k: 2 }), 'notFinite', '2 times the uncertainty 1e+308');
    expectRefusal(() => pairText(1e-320, 1, { style: 'percent' }), 'notFinite', 'too large for a number');
    expectRefusal(() => pairText(NaN, 1), 'domain', 'finite value, got NaN');
    expectRefusal(() => pairText(1, 1, { style: 'plain' as PairStyle }), 'choice', 'plusminus, brackets, scientific, percent, got "plain"');
    expectRefusal(() => pairText(1, 1, { decimalSeparator: ';' as '.' }), 'choice', 'a point or a comma as decimal separator, got ";"');
    expectRefusal(() => pairText(1, 1, { digits: 0 }), 'domain', 'digits from 1 to 15, got 0');
  });
});
