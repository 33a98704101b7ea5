import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

const cells = { A1: 3, B1: 'c', A2: 1, B2: 'C', A3: 2, B3: 'a', A4: 1, B4: 'd', D1: 1, E1: '#N/A' };

describe('FILTER', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=FILTER(A1:B4,A1:A4=1)', [[1, 'C'], [1, 'd']]],
    ['=FILTER(A1:A4,A1:A4>1)', [[3], [2]]],
    ['=FILTER({1,2,3;4,5,6},{1,0,2})', [[1, 3], [4, 6]]],
    ['=FILTER(A1:B4,(A1:A4=1)*(B1:B4="d"))', [[1, 'd']]],
    ['=FILTER(A1:A4,A1:A4>9)', '#CALC!'],
    ['=FILTER(A1:A4,A1:A4>9,"none")', 'none'],
    ['=FILTER(A1:A4,A1:A4>9,{1,2})', [[1, 2]]],
    ['=FILTER(A1:A4,A1:A3>1)', '#VALUE!'],
    ['=FILTER(A1:A4,B1:B4)', '#VALUE!'],
    ['=FILTER(A1:A4,{1;#N/A;0;1})', '#N/A'],
    ['=FILTER(A1:A4,1/0)', '#DIV/0!'],
    ['=FILTER(5,TRUE)', [[5]]],
    ['=FILTER({1,2,3},TRUE)', [[1, 2, 3]]],
    ['=FILTER(A1:A4,A11:A14)', '#CALC!'],
    ['=FILTER(A:A,A:A>1)', [[3], [2]]],
    ['=FILTER(A1:A6,A1:A6<>"")', [[3], [1], [2], [1]]],
    ['=FILTER(A3:A6,A3:A6="")', [[null], [null]]],
    ['=ROWS(FILTER(A:A,A:A=""))', 1048572],
    ['=ROWS(FILTER(A:A,B:B<>"a"))', 1048575],
    ['=SUM(FILTER(A:A,B:B<>"a"))', 5],
    ['=COLUMNS(FILTER(2:2,2:2<>""))', 2],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it('keeps slopes, and links the conditions', () => {
    expect(formulaOn({ A1: 3, A2: 5, B1: 7, B2: 8 }, '=SUM(FILTER(A1:A2,B1:B2>7))').slopes).toEqual({ A2: 1, B1: 0, B2: 0 });
    expect(formulaOn({ A1: 3, A2: 5, B1: 7, B2: 8 }, '=FILTER(A1:A2,B1:B2>9)')).toMatchObject({ value: '#CALC!', slopes: { B1: 0, B2: 0 } });
    expect(formulaOn({ A1: 3, A2: 5, B1: 7, B2: 8 }, '=SUM(FILTER(A1:A2,B1:B2>9,A1))')).toMatchObject({ value: 3, slopes: { A1: 1, B1: 0, B2: 0 } });
  });
});

describe('UNIQUE', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=UNIQUE({1;2;1;3})', [[1], [2], [3]]],
    ['=UNIQUE({1;2;1;3},FALSE,TRUE)', [[2], [3]]],
    ['=UNIQUE({1;2;1;3},,TRUE)', [[2], [3]]],
    ['=UNIQUE({1,2,1;4,5,4},TRUE)', [[1, 2], [4, 5]]],
    ['=UNIQUE(B1:B4)', [['c'], ['a'], ['d']]],
    ['=UNIQUE({1,2;1,3;1,2})', [[1, 2], [1, 3]]],
    ['=UNIQUE({1;1},FALSE,TRUE)', '#CALC!'],
    ['=UNIQUE({1;"1";TRUE;#N/A;#N/A})', [[1], ['1'], [true], ['#N/A']]],
    ['=UNIQUE(A:A)', [[3], [1], [2], [null]]],
    ['=UNIQUE(A:A,FALSE,TRUE)', [[3], [2]]],
    ['=UNIQUE({1;2},1/0)', '#DIV/0!'],
    ['=ROWS(UNIQUE(A1:A5))', 4],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it('keeps slopes, and links all that was compared', () => {
    expect(formulaOn(cells, '=INDEX(UNIQUE(A1:A3),3)').slopes).toEqual({ A1: 0, A2: 0, A3: 1 });
    expect(formulaOn({ A1: 1, A2: 1 }, '=UNIQUE(A1:A2,,TRUE)')).toMatchObject({ value: '#CALC!', slopes: { A1: 0, A2: 0 } });
  });
});
