import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { mavro } from './strd';

const relative = (a: unknown, b: number): number => Math.abs((a as number) / b - 1);

describe('variances and standard deviations', () => {
  // deviations −2, 0, 2: the sum of squares is 8
  it.each([
    ['DEVSQ', 8, [-4, 0, 4]], ['VAR', 4, [-2, 0, 2]], ['VAR.S', 4, [-2, 0, 2]], ['VARP', 8 / 3, [-4 / 3, 0, 4 / 3]],
    ['VAR.P', 8 / 3, [-4 / 3, 0, 4 / 3]],
    ['STDEV', 2, [-0.5, 0, 0.5]], ['STDEV.S', 2, [-0.5, 0, 0.5]],
    ['STDEVP', Math.sqrt(8 / 3), [-2, 0, 2].map((d) => d / Math.sqrt(24))],
    ['STDEV.P', Math.sqrt(8 / 3), [-2, 0, 2].map((d) => d / Math.sqrt(24))],
  ] as const)('%s of 3, 5, 7', (name, value, slopes) => {
    const result = formulaOn({ A1: 3, A2: 5, A3: 7 }, `=${name}(A1:A3)`);
    expect(result.value).toBeCloseTo(value, 14);
    expect(Object.keys(result.slopes)).toEqual(['A1', 'A2', 'A3']);
    slopes.forEach((s, i) => expect(result.slopes[`A${i + 1}`]).toBeCloseTo(s, 14));
  });

  // Mavro, certified; the readings agree in three digits, so 13 − 3 digits of their spread at worst: what a double holds of them
  it('keep their digits where readings agree in most of theirs', () => {
    expect(relative(formulaOn(mavro, '=STDEV.S(A1:A50)').value, 0.0004291234540030528)).toBeLessThan(1e-12);
  });

  it('do not change with a large common part', () => {
    const far = Object.fromEntries([3, 5, 7].map((x, i) => [`A${i + 1}`, 1e12 + x]));
    expect(formulaOn(far, '=VAR.S(A1:A3)')).toEqual({ value: 4, slopes: { A1: -2, A2: 0, A3: 2 }, tainted: [] });
  });

  it.each([
    ['=STDEV.S(A1)', '#DIV/0!'], ['=VAR.S(A1)', '#DIV/0!'], ['=STDEV.P(A9)', '#DIV/0!'], ['=VAR.P(A9)', '#DIV/0!'],
    ['=DEVSQ(A9)', '#NUM!'],
    ['=STDEV.P(A1)', 0], ['=STDEV.S(A1,"x")', '#VALUE!'], ['=STDEV.S(A1:A2,NA())', '#N/A'],
  ])('%s is %s', (formula, value) => expect(formulaOn({ A1: 3, A2: 4 }, formula).value).toBe(value));

  it('have no finite slope where all readings are equal, though the variance has', () => {
    const equal = { A1: 0.1, A2: 0.1, A3: 0.1 };
    const none = { A1: Infinity, A2: Infinity, A3: Infinity };
    expect(formulaOn(equal, '=STDEV.S(A1:A3)')).toEqual({ value: 0, slopes: none, tainted: [] });
    expect(formulaOn(equal, '=VAR.S(A1:A3)').slopes).toEqual({ A1: 0, A2: 0, A3: 0 });
    expect(formulaOn({ A1: 0.1 }, '=STDEV.P(A1)').slopes).toEqual({ A1: 0 });
  });

  it('depend on a text that was passed over', () => {
    expect(formulaOn({ A1: 3, A2: 5, A3: '<LOD' }, '=STDEV.S(A1:A3)').slopes).toHaveProperty('A3', 0);
    expect(formulaOn({ A1: 3, A3: '<LOD' }, '=STDEV.S(A1:A3)')).toMatchObject({ value: '#DIV/0!', slopes: { A1: 0, A3: 0 } });
  });
});
