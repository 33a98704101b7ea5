import { describe, expect, it } from 'vitest';
import { pairText } from '../../../functions/engine/report/pairText';
import { readPair } from '../../../functions/engine/report/readPair';
import { seeded } from '../formula/crosscheck/seeded';

/** Concise values of CODATA 2018 and 2022 as printed. */
const codata: [text: string, value: number, u: number][] = [
  ['6.674 30(15)e-11', 6.6743e-11, 1.5e-15], ['9.109 383 7015(28)e-31', 9.1093837015e-31, 2.8e-40], ['9.109 383 7139(28)e-31', 9.1093837139e-31, 2.8e-40],
  ['1.672 621 923 69(51)e-27', 1.67262192369e-27, 5.1e-37], ['1.672 621 925 95(52)e-27', 1.67262192595e-27, 5.2e-37], ['1.660 539 066 60(50)e-27', 1.6605390666e-27, 5e-37],
  ['10 973 731.568 160(21)', 10973731.56816, 2.1e-5], ['10 973 731.568 157(12)', 10973731.568157, 1.2e-5], ['7.297 352 5693(11)e-3', 7.2973525693e-3, 1.1e-12],
  ['137.035 999 084(21)', 137.035999084, 2.1e-8], ['137.035 999 177(21)', 137.035999177, 2.1e-8], ['5.291 772 109 03(80)e-11', 5.29177210903e-11, 8e-21],
  ['8.854 187 8128(13)e-12', 8.8541878128e-12, 1.3e-21], ['1.256 637 062 12(19)e-6', 1.25663706212e-6, 1.9e-16], ['0.999 999 999 65(30)e-3', 0.99999999965e-3, 3e-13],
  ['1836.152 673 43(11)', 1836.15267343, 1.1e-7], ['1836.152 673 426(32)', 1836.152673426, 3.2e-8], ['5.485 799 090 65(16)e-4', 5.48579909065e-4, 1.6e-14],
  ['-2.002 319 304 362 56(35)', -2.00231930436256, 3.5e-13], ['9.274 010 0783(28)e-24', 9.2740100783e-24, 2.8e-33], ['8.414(19)e-16', 8.414e-16, 1.9e-18], ['8.4075(64)e-16', 8.4075e-16, 6.4e-19],
];

describe('readPair', () => {
  it.each([
    ['12.10 ± 0.05', 12.1, 0.05, undefined, ''], ['12,10±0,05 mg/L', 12.1, 0.05, undefined, 'mg/L'], ['12.10 +/- 0.05', 12.1, 0.05, undefined, ''],
    ['(12.10 ± 0.12) mg/L, k = 2', 12.1, 0.12, 2, 'mg/L'], ['12.10 ± 0.12 (k=2)', 12.1, 0.12, 2, ''], ['12.10(5)', 12.1, 0.05, 1, ''],
    ['12.10(5)e-3', 0.0121, 0.00005, 1, ''], ['1230(120)', 1230, 120, 1, ''], ['12.1(1.5) mm', 12.1, 1.5, 1, 'mm'], ['(1.210 ± 0.005) × 10³ Pa', 1210, 5, undefined, 'Pa'],
    ['200 ± 2 %', 200, 4, undefined, ''], ['−5.0 ± 0.1 °C', -5, 0.1, undefined, '°C'], ['1.5e3 ± 2e1', 1500, 20, undefined, ''], ['9.806 65 (exact)', 9.80665, 0, 1, ''],
    ['0,250(12) g', 0.25, 0.012, 1, 'g'], ['(1.2 ± 0.1) × 10^-5, k = 2,05', 1.2e-5, 1e-6, 2.05, ''],
  ])('%s', (text, value, half, k, unit) => {
    const found = readPair(text);
    expect(Math.abs(found.value - value)).toBeLessThanOrEqual(1e-15 * Math.abs(value));
    expect(Math.abs(found.half - half)).toBeLessThanOrEqual(1e-15 * half);
    expect([found.k, found.unit]).toEqual([k, unit]);
  });

  it.each(codata)('%s (CODATA)', (text, value, u) => {
    const found = readPair(text);
    expect(Math.abs(found.value / value - 1)).toBeLessThanOrEqual(4e-16);
    expect(Math.abs(found.half / u - 1)).toBeLessThanOrEqual(4e-16);
  });

  it.each(codata)('%s is written back digit by digit', (text) => {
    const [, mantissa, digits, power] = /^([-\d .]+)\((\d+)\)(.*)$/.exec(text)!;
    const plain = mantissa.replace(/ /g, '');
    const places = plain.split('.')[1].length;
    const { value, half } = readPair(`${plain}(${digits})`);
    expect(`${pairText(value, half, { style: 'brackets', digits: digits.length })}${power}`).toBe(`${plain}(${digits})${power}`);
    expect(half).toBeCloseTo(Number(digits) * 10 ** -places, places + 3);
  });

  it('gives back what pairText wrote, in every style that states u, with point and comma (seeded)', () => {
    const draws = seeded(17);
    for (let i = 0; i < 1000; i++) {
      const value = draws.between(-1, 1) * 10 ** Math.floor(draws.between(-6, 7));
      const u = Math.abs(value) * 10 ** draws.between(-6, 0.5);
      for (const style of ['plusminus', 'brackets', 'scientific'] as const) {
        for (const decimalSeparator of ['.', ','] as const) {
          const text = pairText(value, u, { style, decimalSeparator, unit: i % 2 ? 'mg/L' : '', k: style !== 'brackets' && i % 3 === 0 ? 2 : undefined });
          const { value: v, half, k, unit } = readPair(text, decimalSeparator);
          const again = style === 'brackets' ? half : half / (k ?? 1);
          expect(Math.abs(again / u - 1), text).toBeLessThan(0.06);
          expect(Math.abs(v - value), text).toBeLessThanOrEqual(u);
          expect([k, unit]).toEqual([style === 'brackets' ? 1 : i % 3 === 0 ? 2 : undefined, i % 2 ? 'mg/L' : '']);
        }
      }
    }
  });

  it('refuses a comma that may separate thousands, unless another comma or the user\'s settings decide', () => {
    expect(() => readPair('1,234 ± 5')).toThrow('needs a value whose comma is surely a decimal comma, got "1,234 ± 5"');
    expect(() => readPair('1,234(5)')).toThrow('surely a decimal comma');
    expect(readPair('1,234 ± 0,005').value).toBe(1.234);
    expect(readPair('1,234(5)', ',').value).toBe(1.234);
    expect(readPair('12,34 ± 5').value).toBe(12.34);
  });

  it.each(['', '12.10', 'abc', '± 0.05', '12 ± -1', '12.10()', '12.10(0)', '12(5) ± 1', '12.10(5), k = 2'])('"%s" is refused', (text) => {
    expect(() => readPair(text)).toThrow(/^readPair needs a value with its uncertainty/);
  });
});
