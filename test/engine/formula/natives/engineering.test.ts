import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

describe('DELTA, GESTEP, SERIESSUM', () => {
  it.each([
    // Excel's documentation of each function
    ['=DELTA(5,4)', 0], ['=DELTA(5,5)', 1], ['=DELTA(0.5,0)', 0], ['=DELTA(0)', 1], ['=GESTEP(5,4)', 1], ['=GESTEP(5,5)', 1], ['=GESTEP(-4,-5)', 1],
    ['=GESTEP(-1)', 0], ['=DELTA(TRUE,1)', '#VALUE!'], ['=DELTA("x")', '#VALUE!'],
    ['=SERIESSUM(2,1,2,A1:A3)', 2 + 3 * 8 + 5 * 32], // closed form: x + 3x^3 + 5x^5
  ])('%s is %s', (formula, value) => expect(formulaOn({ A1: 1, A2: 3, A3: 5 }, formula).value).toBe(value));

  it('SERIESSUM gives the cosine of π/4 of the documentation, six places', () =>
    expect(formulaOn({ A1: 1, A2: -1 / 2, A3: 1 / 24, A4: -1 / 720 }, '=SERIESSUM(PI()/4,0,2,A1:A4)').value).toBeCloseTo(0.707103, 6));

  it('SERIESSUM has the slopes of its polynomial', () => {
    const { slopes } = formulaOn({ A1: 1, A2: 3, A3: 5, B1: -2 }, '=SERIESSUM(B1,1,2,A1:A3)');
    expect(slopes).toMatchObject({ A1: -2, A2: -8, A3: -32, B1: 1 + 9 * 4 + 25 * 16 });
  });

  it.each([['=DELTA(0.1+0.2,0.3)', /15th digit/], ['=SERIESSUM(0,0,1,A1:A2)', /0 is raised/], ['=SERIESSUM(1,1,1,A1:A4)', /no number/]])('%s is refused', (formula, words) =>
    expect(() => formulaOn({ A1: 1, A2: 2 }, formula)).toThrow(words));
});
