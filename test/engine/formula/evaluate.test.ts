import { describe, expect, it } from 'vitest';
import { formulaOn } from './formulaOn';

describe('operators', () => {
  it.each([
    ['=-2^2', 4],
    ['=2^3^2', 64],
    ['=50%*2', 1],
    ['=1+2*3', 7],
    ['="a"&1.5&TRUE', 'a1.5TRUE'],
    ['="5"*2', 10],
    ['=1/0', '#DIV/0!'],
    ['=0^0', '#NUM!'],
    ['=(-8)^(1/3)', '#NUM!'],
    ['=0.5-0.4-0.1', 0],
    ['=1*(0.5-0.4-0.1)', -2.7755575615628914e-17],
    ['=0.1+0.2=0.3', true],
    ['="a"<"B"', true],
    ['=1<"a"', true],
    ['="a"<TRUE', true],
    ['=SUM({1,2;3,4}*{1;10})', 73],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toEqual(value));

  it('give slopes against the cells read', () => {
    expect(formulaOn({ A1: 3, B1: 4 }, '=A1*B1/2').slopes).toEqual({ A1: 2, B1: 1.5 });
    expect(formulaOn({ A1: 3 }, '=A1-A1').slopes).toEqual({ A1: 0 });
    expect(formulaOn({ A1: 7 }, '=A1/A1').slopes).toEqual({ A1: 0 });
    expect(formulaOn({ A1: 3 }, '=A1*A1').slopes).toEqual({ A1: 6 });
  });

  it('zero times an infinite slope is zero', () => {
    expect(formulaOn({ A1: 0 }, '=SQRT(A1)').slopes).toEqual({ A1: Infinity });
    expect(formulaOn({ A1: 0 }, '=SQRT(A1)*0').slopes).toEqual({ A1: 0 });
  });

  it('take the cell of the same row where the sheet intersects', () => {
    expect(formulaOn({ A19: 1, A20: 5 }, '=A19:A21*2', { implicit: true }).value).toBe(10);
    expect(formulaOn({ A19: 1, A20: 5 }, '=A19:A20*2').value).toEqual([[2], [10]]);
    expect(formulaOn({ A1: 1, A2: 5, B1: 2, B2: 3 }, '=SUMPRODUCT(A1:A2^2,B1:B2)', { implicit: true })).toMatchObject({ value: 77, slopes: { A2: 30, B1: 1 } });
  });
});

describe('ranges', () => {
  it('SUM passes over text in a range and counts whole columns', () => {
    expect(formulaOn({ A1: 3, A2: 'x', A3: 4 }, '=SUM(A:A)')).toMatchObject({ value: 7, slopes: { A1: 1, A3: 1 } });
    expect(formulaOn({ A1: 3, A2: '#N/A' }, '=SUM(A1:A2)').value).toBe('#N/A');
    expect(formulaOn({ A1: 3, A2: 4, B1: 5, B2: 6 }, '=SUMPRODUCT(A1:A2,B1:B2)').slopes).toEqual({ A1: 5, A2: 6, B1: 3, B2: 4 });
  });
});

describe('LET', () => {
  it('binds names', () => expect(formulaOn({ A1: 3 }, '=LET(x,A1,y,x*x,y+x)')).toMatchObject({ value: 12, slopes: { A1: 7 } }));
});

describe('areas that were chosen', () => {
  const cells = { A1: 2, B1: 10, B2: 20, B3: 30 };

  it('stay references and carry the link to what chose them', () => {
    expect(formulaOn(cells, '=SUM(B1:INDEX(B1:B3,A1))')).toMatchObject({ value: 30, slopes: { A1: 0, B1: 1, B2: 1 } });
    expect(formulaOn(cells, '=SUM(IF(A1>1,B1:B2,B3))')).toMatchObject({ value: 30, slopes: { A1: 0, B1: 1, B2: 1 } });
    expect(formulaOn(cells, '=INDEX(B1:B3,A1)*2')).toMatchObject({ value: 40, slopes: { A1: 0, B2: 2 } });
  });

  it('arrays beyond four million cells are refused', () => {
    expect(() => formulaOn({ A1: 1, B1: 2 }, '=SUM(IF(B:B,2:2))')).toThrow(/makes an array of 1048576 × 16384 cells/);
  });
});
