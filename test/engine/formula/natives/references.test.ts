import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

const cells = { A1: 1, B1: 2, C1: 3, A2: 4, B2: 5, C2: 6, A3: 7, B3: 8, C3: 9, D1: 2 };

describe('INDEX', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=INDEX(A1:C3,2,3)', 6],
    ['=INDEX(A1:C1,2)', 2],
    ['=INDEX(A1:C1,1,3)', 3],
    ['=INDEX(A1:A3,2)', 4],
    ['=INDEX(A1:C3,0,2)', [[2], [5], [8]]],
    ['=INDEX(A1:C3,2,0)', [[4, 5, 6]]],
    ['=INDEX(A1:C3,2)', [[4, 5, 6]]],
    ['=SUM(INDEX(A1:C3,0,0))', 45],
    ['=INDEX({1,2;3,4},0,2)', [[2], [4]]], // as in the documentation of INDEX
    ['=INDEX({1,2;3,4},2,1)', 3],
    ['=INDEX(A1:C3,4,1)', '#REF!'],
    ['=INDEX(A1:C3,1,4)', '#REF!'],
    ['=INDEX(A1:C3,-1,1)', '#VALUE!'],
    ['=INDEX(A1:C3,1/0,1)', '#DIV/0!'],
    ['=INDEX((A1:A3,C1:C3),2,1,2)', 6],
    ['=INDEX((A1:A3,C1:C3),2,1,3)', '#REF!'],
    ['=INDEX(A1:C3,{1;3},{1,2})', [[1, 2], [7, 8]]],
    ['=SUM(A1:INDEX(A1:A3,2))', 5],
    ['=ROW(INDEX(A1:C3,2,1))', 2],
    ['=INDEX(7,1,1)', 7],
    ['=INDEX(A:A,3)', 7],
    ['=SUMIF(INDEX(A1:C3,0,D1),">4",A1)', 11],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it('has slope 1 in the cell chosen and 0 in what chose it', () => {
    expect(formulaOn(cells, '=INDEX(A1:C3,D1,D1)').slopes).toEqual({ B2: 1, D1: 0 });
    expect(formulaOn(cells, '=INDEX(A1:C3,9*D1,1)')).toMatchObject({ value: '#REF!', slopes: { D1: 0 } });
  });
});

describe('ROW, ROWS, COLUMN, COLUMNS', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=ROW()', 20],
    ['=COLUMN()', 10],
    ['=ROW(C4)', 4],
    ['=ROW(C4:D6)', [[4], [5], [6]]],
    ['=COLUMN(B1:D9)', [[2, 3, 4]]],
    ['=ROWS(A:A)', 1048576],
    ['=COLUMNS(3:5)', 16384],
    ['=ROWS({1,2;3,4;5,6})', 3],
    ['=COLUMNS(7)', 1],
    ['=ROW(7)', '#VALUE!'],
    ['=ROWS(1/0)', '#DIV/0!'],
    ['=SUMPRODUCT(ROW(1:3))', 6],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));
});
