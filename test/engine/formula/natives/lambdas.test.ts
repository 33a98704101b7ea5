import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

const cells = { A1: 1, B1: 2, A2: 3, B2: 4, A3: 5, B3: 6, D1: 10 };

describe('MAP, REDUCE, SCAN, BYROW, BYCOL, MAKEARRAY', () => {
  it.each<[string, Plain | Plain[][]]>([
    // as in the documentation, with other numbers
    ['=MAP({1,2;3,4},LAMBDA(a,IF(a>2,a*a,a)))', [[1, 2], [9, 16]]],
    ['=MAP(A1:A3,B1:B3,LAMBDA(a,b,a*b))', [[2], [12], [30]]],
    ['=MAP(A1:A3,LAMBDA(cell,SUM(A1:cell)))', [[1], [4], [9]]],
    ['=MAP(A1:A2,LAMBDA(a,ROW(a)))', [[1], [2]]],
    ['=MAP({1,2},LAMBDA(a,{1,2}))', [['#CALC!', '#CALC!']]],
    ['=MAP({1,#N/A},LAMBDA(a,IFERROR(a,0)))', [[1, 0]]],
    ['=MAP({1,2},LAMBDA(a,b,a))', '#VALUE!'],
    ['=MAP({1,2},3)', '#VALUE!'],
    ['=MAP((A1,A2),LAMBDA(a,a))', '#VALUE!'],
    ['=LET(f,LAMBDA(x,x+1),MAP({1,2},f))', [[2, 3]]],
    ['=LET(k,5,MAP({1,2},LAMBDA(x,x*k)))', [[5, 10]]],
    ['=REDUCE(0,A1:B3,LAMBDA(a,b,a+b^2))', 91],
    ['=REDUCE(1,A1:A3,LAMBDA(a,b,IF(b>2,a*b,a)))', 15],
    ['=REDUCE("",{"a","b";"c","d"},LAMBDA(a,b,a&b))', 'abcd'],
    ['=REDUCE(0,{1,2},LAMBDA(a,b,VSTACK(a,b)))', [[0], [1], [2]]],
    ['=REDUCE(0,{1,2},LAMBDA(a,a))', '#VALUE!'],
    ['=SCAN(1,{1,2,3;4,5,6},LAMBDA(a,b,a*b))', [[1, 2, 6], [24, 120, 720]]],
    ['=SCAN("",{"a","b"},LAMBDA(a,b,a&b))', [['a', 'ab']]],
    ['=BYROW(A1:B3,LAMBDA(row,MAX(row)))', [[2], [4], [6]]],
    ['=BYROW({1,2;3,4},LAMBDA(row,SUM(row)))', [[3], [7]]],
    ['=BYCOL(A1:B3,LAMBDA(col,SUM(col)))', [[9, 12]]],
    ['=BYCOL({1,2;3,4},LAMBDA(col,col))', [['#CALC!', '#CALC!']]],
    ['=BYROW(A1:A2,LAMBDA(row,row))', [[1], [3]]],
    ['=BYROW(A1:A2,LAMBDA(row,LAMBDA(x,x)))', [['#CALC!'], ['#CALC!']]],
    ['=MAKEARRAY(2,3,LAMBDA(i,j,i*j))', [[1, 2, 3], [2, 4, 6]]],
    ['=MAKEARRAY(0,3,LAMBDA(i,j,i*j))', '#VALUE!'],
    ['=MAKEARRAY(1/0,3,LAMBDA(i,j,i*j))', '#DIV/0!'],
    ['=MAKEARRAY(2,2,LAMBDA(row,row))', '#VALUE!'],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it.each<[string, Record<string, number>]>([
    ['=SUM(MAP(A1:A2,LAMBDA(a,a^2*D1)))', { A1: 20, A2: 60, D1: 10 }],
    ['=REDUCE(D1,A1:A3,LAMBDA(a,b,a*b))', { A1: 150, A2: 50, A3: 30, D1: 15 }],
    ['=INDEX(SCAN(0,A1:A3,LAMBDA(a,b,a+b*D1)),2)', { A1: 10, A2: 10, D1: 4 }],
    ['=INDEX(BYROW(A1:B2,LAMBDA(row,PRODUCT(row))),2)', { A2: 4, B2: 3 }],
    ['=INDEX(BYCOL(A1:B2,LAMBDA(col,SUM(col))),2)', { B1: 1, B2: 1 }],
    ['=SUM(MAKEARRAY(A2,2,LAMBDA(i,j,i*j*D1)))', { A2: 0, D1: 18 }],
  ])('%s has the slopes %s', (formula, slopes) => expect(formulaOn(cells, formula).slopes).toEqual(slopes));

  it('what cannot be followed is refused', () => {
    expect(() => formulaOn(cells, '=BYROW(A1:B2,SUM)')).toThrow(/hands BYROW a function that is no LAMBDA/);
    expect(() => formulaOn(cells, '=SCAN(,A1:A3,LAMBDA(a,b,a+b))')).toThrow(/gives SCAN no value to start from/);
    expect(() => formulaOn(cells, '=MAP(A1:A3,B1:B2,LAMBDA(a,b,a+b))')).toThrow(/arrays of different sizes/);
    expect(() => formulaOn(cells, '=SUM(MAP(A:E,LAMBDA(a,a)))')).toThrow(/which is more than can be followed/);
  });
});
