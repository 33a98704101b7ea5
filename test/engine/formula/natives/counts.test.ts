import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const cells = { A1: 3, A2: 'x', A3: '', A4: true, A5: '#N/A', A7: 7 };

describe('counts', () => {
  it.each([
    ['=COUNT(A1:A8)', 2], ['=COUNT(A:A)', 2], ['=COUNT(A1:A8,"5",TRUE,"y",)', 5], ['=COUNT(1/0,2)', 1], ['=COUNT({1,2,"a"})', 2],
    ['=COUNTA(A1:A8)', 6], ['=COUNTA(A1:A8,)', 7], ['=COUNTA((A1:A2,A7))', 3], ['=COUNTA("")', 1],
    ['=COUNTBLANK(A1:A8)', 3], ['=COUNTBLANK(A:A)', 1048571], ['=COUNTBLANK({1,2})', '#VALUE!'],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toBe(value));

  it('depend on every cell looked at, with slope 0', () => {
    for (const name of ['COUNT', 'COUNTA', 'COUNTBLANK']) {
      expect(formulaOn(cells, `=${name}(A1:A8)`).slopes).toEqual({ A1: 0, A2: 0, A3: 0, A4: 0, A5: 0, A7: 0 });
    }
  });

  it('look at more cells than a call may have arguments', () => {
    expect(formulaOn({ A1: 1 }, '=COUNT(A1:A200000*1)').value).toBe(200000);
  });
});
