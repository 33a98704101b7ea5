import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

describe('sums', () => {
  it.each([
    ['=SUM(A1:B2)', 10], ['=SUM(A1,"5",TRUE)', 7], ['=SUM(A1:B2,)', 10], ['=AVERAGE(A1:B2)', 2.5], ['=AVERAGE(A1:B2,)', 2],
    ['=AVERAGE(D1:D2)', '#DIV/0!'], ['=SUMSQ(A1:B2)', 30], ['=PRODUCT(A1:B2)', 24], ['=PRODUCT(D1:D2)', 0],
    ['=PRODUCT(A1:B2,)', 24],
    ['=SUMPRODUCT(A1:A2,B1:B2)', 14], ['=SUMPRODUCT(A1:A2,B1:B1)', '#VALUE!'], ['=SUM((A1:A2,B2))', 8],
    ['=SUMPRODUCT(--(A1:A2>1),B1:B2)', 4], ['=SUM("x")', '#VALUE!'], ['=PRODUCT(1E200,1E200)', '#NUM!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({ A1: 1, B1: 2, A2: 3, B2: 4 }, formula).value).toBe(value));

  it('add from left to right, as the sheet does', () => {
    expect(formulaOn({ A1: 1e16, A2: 1, A3: 1, A4: -1e16 }, '=SUM(A1:A4)').value).toBe(0);
  });

  it('give every factor of a product its slope, also where another is 0', () => {
    expect(formulaOn({ A1: 0, A2: 3, A3: 5 }, '=PRODUCT(A1:A3)').slopes).toEqual({ A1: 15, A2: 0, A3: 0 });
    expect(formulaOn({ A1: 0, A2: 3, A3: 5 }, '=SUMPRODUCT(A1:A1,A2:A2,A3:A3)').slopes).toEqual({ A1: 15, A2: 0, A3: 0 });
  });

  it.each(['SUM', 'AVERAGE', 'SUMSQ', 'PRODUCT'])('%s depends on a text that was passed over, with slope 0', (name) => {
    expect(formulaOn({ A1: 3, A2: '<LOD' }, `=${name}(A1:A2)`).slopes).toHaveProperty('A2', 0);
  });

  it('an error for want of numbers depends on what was passed over', () => {
    expect(formulaOn({ A2: '<LOD' }, '=AVERAGE(A1:A2)')).toMatchObject({ value: '#DIV/0!', slopes: { A2: 0 } });
  });
});
