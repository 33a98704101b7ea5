import { describe, expect, it } from 'vitest';
import { figuresOf } from '../../../functions/engine/figures/Entry';
import { antilogFigures, logFigures } from '../../../functions/engine/figures/logFigures';
import { productFigures } from '../../../functions/engine/figures/productFigures';
import { readEntry } from '../../../functions/engine/figures/readEntry';
import { sumFigures } from '../../../functions/engine/figures/sumFigures';
import { seeded } from '../formula/crosscheck/seeded';

const read = (...entries: (number | string)[]) => entries.map((e) => readEntry(e));

// All rules here are common practice.
describe('figures of an entry', () => {
  it.each([
    ['12.10', 4], ['0.0120', 3], ['1.200e3', 4], ['1200', 2], ['1200.', 4], ['1.2E-5', 2], ['-7', 1], ['12,10', 4], ['0,50', 2], ['10 000.0', 6], ['−3.00', 3],
    [12.1, 3], [1200, 2], [0.1 + 0.2, 1], ['100.0', 4], ['3 exact', Infinity], ['.50', 2], ['0', 0], ['0.00', 0], ['1234,5', 5], ['0,125', 3],
  ])('%s: %d', (entry, count) => expect(figuresOf(readEntry(entry))).toBe(count));

  it('takes a count that came with an unrounded value', () => {
    expect(figuresOf(readEntry(31.123, 3))).toBe(3);
    expect(figuresOf(readEntry(2, Infinity))).toBe(Infinity);
    expect(() => readEntry(2, 1.5)).toThrow('needs a whole number of figures, at least 1, got 1.5');
    expect(() => readEntry(0, 1)).toThrow('got 0');
  });

  it.each(['1,200', 'abc', '1.2.3', '', '12 mg', '<0.5', '1e', '1,200.5'])('"%s" is refused', (text) => expect(() => readEntry(text)).toThrow(/^readEntry needs .* got "/));
});

describe('sums keep the coarsest decimal place', () => {
  it.each([
    [['12.11', '18.0', '1.013'], '31.1'], [['1200', '35'], '1.2e3'], [['100.0', '-99.9'], '0.1'], [['2.5', '0.05'], '2.6'], [['2.45', '0.0', '0.00'], '2.4'],
    [['2.5', '3 exact'], '5.5'], [['3 exact', '4 exact'], '7'], [['9.96', '0.1'], '10.1'], [['1.005', '1.00'], '2.00'], [['5', '5'], '1.0e1'], [['1.50', '-1.5'], '0.0'],
  ] as const)('%j: %s', (entries, text) => expect(sumFigures(read(...entries)).text).toBe(text));

  it('keep the unrounded value and its figures for the next step', () => {
    const first = sumFigures(read('12.11', '18.0', '1.013'));
    expect(first).toEqual({ text: '31.1', unrounded: 31.123, figures: 3 });
    // 31.123 × 2.000 = 62.246: three figures; rounding in between would give 62.2 as well, 31.15 × … would not
    expect(productFigures([readEntry(first.unrounded, first.figures), readEntry('2.000')], []).text).toBe('62.2');
    const second = sumFigures(read('1.04', '0.409')); // 1.449, so 1.45
    expect(second).toMatchObject({ text: '1.45', unrounded: 1.449, figures: 3 });
    expect(productFigures([readEntry(second.unrounded, second.figures)], [readEntry('1 exact')]).text).toBe('1.45');
  });
});

describe('products keep the fewest figures', () => {
  it.each([
    [['4.56', '1.4'], [], '6.4'], [['2.0'], ['3.00'], '0.67'], [['1.00'], ['3 exact'], '0.333'], [['2.5', '2 exact'], [], '5.0'], [['9.96'], ['1.0'], '1.0e1'],
    [['1.5', '1.5'], [], '2.2'], [['-4.50'], ['1.5'], '-3.0'], [['6.0e23', '2.00'], [], '1.2e24'], [['2.5'], ['1e6'], '2e-6'], [['1.0'], ['8.0'], '0.12'],
    [['2 exact'], ['4 exact'], '0.5'], [['350'], ['2.000'], '1.8e2'],
  ] as const)('%j over %j: %s', (entries, divisors, text) => expect(productFigures(read(...entries), read(...divisors)).text).toBe(text));

  it('refuse zeros', () => expect(() => productFigures(read('1.0', '0.0'), [])).toThrow('needs numbers other than 0'));

  it('are what plain arithmetic gives, to half a unit of the last figure (seeded)', () => {
    const draws = seeded(77);
    for (let i = 0; i < 500; i++) {
      const [a, b, c] = [1, 2, 3].map(() => draws.between(1, 10).toFixed(Math.floor(draws.between(1, 5))));
      const { text, unrounded, figures } = productFigures(read(a, b), read(c));
      const plain = (Number(a) * Number(b)) / Number(c);
      expect(Math.abs(unrounded / plain - 1)).toBeLessThan(1e-15);
      expect(figures).toBe(Math.min(...[a, b, c].map((x) => x.replace('.', '').length)));
      expect(figuresOf(readEntry(text))).toBe(figures);
      expect(Math.abs(Number(text) / plain - 1)).toBeLessThanOrEqual(0.5001 * 10 ** (1 - figures));
    }
  });
});

describe('logarithms', () => {
  it('have as many decimal places as the entry has figures, and back', () => {
    expect(logFigures(readEntry('3.2e-4')).text).toBe('-3.49');
    expect(logFigures(readEntry('1.000')).text).toBe('0.0000');
    expect(logFigures(readEntry('100 exact')).text).toBe('2');
    expect(antilogFigures(readEntry('-3.49')).text).toBe('0.00032');
    expect(antilogFigures(readEntry('-7.00')).text).toBe('1.0e-7');
    expect(antilogFigures(readEntry('2.301')).text).toBe('2.00e2');
    expect(() => antilogFigures(readEntry('7'))).toThrow('needs an entry with decimal places');
    expect(() => logFigures(readEntry('-1.0'))).toThrow('needs a number above 0');
  });
});
