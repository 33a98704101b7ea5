import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const five = { A1: 3, A2: 5, A3: 2, A4: 8, A5: 4 };

describe('functions that pick by rank', () => {
  it.each([
    ['=MIN(A1:A5)', 2, { A3: 1 }], ['=MAX(A1:A5)', 8, { A4: 1 }], ['=MEDIAN(A1:A5)', 4, { A5: 1 }],
    ['=MEDIAN(A1:A4)', 4, { A1: 0.5, A2: 0.5 }],
    ['=SMALL(A1:A5,2)', 3, { A1: 1 }], ['=LARGE(A1:A5,2)', 5, { A2: 1 }], ['=LARGE(A1:A5,5)', 2, { A3: 1 }],
    ['=SMALL(A:A,1)', 2, { A3: 1 }],
  ])('%s is %s with slope 0 to all that decided', (formula, value, picked) => {
    const seen = formula === '=MEDIAN(A1:A4)' ? { A1: 0, A2: 0, A3: 0, A4: 0 } : { A1: 0, A2: 0, A3: 0, A4: 0, A5: 0 };
    expect(formulaOn(five, formula)).toEqual({ value, slopes: { ...seen, ...picked }, tainted: [] });
  });

  it('give one call an element for an array of ranks', () => {
    expect(formulaOn(five, '=LARGE(A1:A5,{1,2,3})').value).toEqual([[8, 5, 4]]);
    expect(formulaOn(five, '=SUM(LARGE(A1:A5,{1,2}))')).toMatchObject({ value: 13, slopes: { A4: 1, A2: 1, A1: 0 } });
  });

  it('pass over text and blanks in ranges, and read text that is written as an argument', () => {
    expect(formulaOn({ A1: 3, A2: '9', A3: true }, '=MAX(A1:A4)').value).toBe(3);
    expect(formulaOn({ A1: 3 }, '=MAX(A1,"9",TRUE)').value).toBe(9);
    expect(formulaOn({ A1: -3 }, '=MAX(A1,)').value).toBe(0);
  });

  it('depend on a text that was passed over', () => {
    expect(formulaOn({ A1: 3, A2: '<LOD' }, '=MAX(A1:A2)').slopes).toEqual({ A1: 1, A2: 0 });
    expect(formulaOn({ A2: '<LOD' }, '=MIN(A1:A2)')).toMatchObject({ value: 0, slopes: { A2: 0 } });
  });

  it('depend on the rank', () => {
    expect(formulaOn({ A1: 3, A2: 5, B1: 1 }, '=LARGE(A1:A2,B1)').slopes).toEqual({ A1: 0, A2: 1, B1: 0 });
  });

  it.each([
    ['=MAX(C1:C3)', 0], ['=MIN(C1:C3)', 0], ['=MEDIAN(C1:C3)', '#NUM!'], ['=LARGE(C1:C3,1)', '#NUM!'],
    ['=LARGE(A1:A5,0)', '#NUM!'],
    ['=SMALL(A1:A5,6)', '#NUM!'], ['=LARGE(A1:A5,1/0)', '#DIV/0!'], ['=LARGE(A1:A5,"x")', '#VALUE!'], ['=MAX(A1:A5,NA())', '#N/A'],
  ])('%s is %s', (formula, value) => expect(formulaOn(five, formula).value).toBe(value));
});
