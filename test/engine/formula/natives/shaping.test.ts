import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

const cells = { A1: 1, B1: 2, C1: 3, A2: 4, B2: 5, C2: 6, A3: 7, B3: 8, C3: 9, E1: 2, F1: '#N/A', G1: 'x' };

const table: [string, Plain | Plain[][]][] = [
  // as in the documentation of SEQUENCE
  ['=SEQUENCE(4,5)', [[1, 2, 3, 4, 5], [6, 7, 8, 9, 10], [11, 12, 13, 14, 15], [16, 17, 18, 19, 20]]],
  ['=SEQUENCE(3)', [[1], [2], [3]]],
  ['=SEQUENCE(2,2,10,-5)', [[10, 5], [0, -5]]],
  ['=SEQUENCE(,3)', [[1, 2, 3]]],
  ['=SEQUENCE(2,,,3)', [[1], [4]]],
  ['=SEQUENCE(0)', '#CALC!'],
  ['=SEQUENCE(-1)', '#VALUE!'],
  ['=SEQUENCE(1/0)', '#DIV/0!'],
  ['=SEQUENCE("x")', '#VALUE!'],

  ['=TAKE(A1:C3,2)', [[1, 2, 3], [4, 5, 6]]],
  ['=TAKE(A1:C3,,2)', [[1, 2], [4, 5], [7, 8]]],
  ['=TAKE(A1:C3,-2)', [[4, 5, 6], [7, 8, 9]]],
  ['=TAKE(A1:C3,2,-1)', [[3], [6]]],
  ['=TAKE({1,2;3,4},1)', [[1, 2]]],
  ['=TAKE(A1:C3,9)', [[1, 2, 3], [4, 5, 6], [7, 8, 9]]],
  ['=TAKE(A1:C3,0)', '#CALC!'],
  ['=SUM(A1:TAKE(B1:B3,-1))', 27],
  ['=ROW(TAKE(A1:A3,-1))', 3],
  ['=DROP(A1:C3,2)', [[7, 8, 9]]],
  ['=DROP(A1:C3,,2)', [[3], [6], [9]]],
  ['=DROP(A1:C3,-2)', [[1, 2, 3]]],
  ['=DROP(A1:C3,2,-2)', 7],
  ['=DROP(A1:C3,0)', [[1, 2, 3], [4, 5, 6], [7, 8, 9]]],
  ['=DROP(A1:C3,3)', '#CALC!'],
  ['=DROP(A1:C3,-4)', '#CALC!'],
  ['=SUM(DROP(A:A,1))', 11],

  ['=EXPAND({1,2;3,4},3,3)', [[1, 2, '#N/A'], [3, 4, '#N/A'], ['#N/A', '#N/A', '#N/A']]],
  ['=EXPAND({1},2,2,"-")', [[1, '-'], ['-', '-']]],
  ['=EXPAND({1,2},2)', [[1, 2], ['#N/A', '#N/A']]],
  ['=EXPAND({1;2},,2,0)', [[1, 0], [2, 0]]],
  ['=EXPAND({1,2;3,4},1)', '#VALUE!'],

  ['=CHOOSECOLS(A1:C3,3,1)', [[3, 1], [6, 4], [9, 7]]],
  ['=CHOOSECOLS(A1:C3,-1)', [[3], [6], [9]]],
  ['=CHOOSECOLS(A1:C3,{1,3})', [[1, 3], [4, 6], [7, 9]]],
  ['=CHOOSECOLS(A1:C3,4)', '#VALUE!'],
  ['=CHOOSECOLS(A1:C3,0)', '#VALUE!'],
  ['=SUM(CHOOSECOLS(A:C,2))', 15],
  ['=CHOOSEROWS(A1:C3,3,1,1)', [[7, 8, 9], [1, 2, 3], [1, 2, 3]]],
  ['=CHOOSEROWS(A1:C3,-2)', [[4, 5, 6]]],
  ['=CHOOSEROWS(A1:C3,"x")', '#VALUE!'],
  ['=CHOOSEROWS(A1:C3,-4)', '#VALUE!'],

  ['=VSTACK({1,2},{3,4})', [[1, 2], [3, 4]]],
  ['=VSTACK({1,2,3},4)', [[1, 2, 3], [4, '#N/A', '#N/A']]],
  ['=VSTACK(A1,(A2:B2,C3))', [[1, '#N/A'], [4, 5], [9, '#N/A']]],
  ['=HSTACK({1;2},{3;4})', [[1, 3], [2, 4]]],
  ['=HSTACK({1;2},"x")', [[1, 'x'], [2, '#N/A']]],

  ['=TOCOL({1,2;3,4})', [[1], [2], [3], [4]]],
  ['=TOCOL({1,2;3,4},0,TRUE)', [[1], [3], [2], [4]]],
  ['=TOROW({1,2;3,4})', [[1, 2, 3, 4]]],
  ['=TOROW({1,2;3,4},,TRUE)', [[1, 3, 2, 4]]],
  ['=TOCOL(E1:H1)', [[2], ['#N/A'], ['x'], [null]]],
  ['=TOCOL(E1:H1,1)', [[2], ['#N/A'], ['x']]],
  ['=TOCOL(E1:H1,2)', [[2], ['x'], [null]]],
  ['=TOROW(E1:H1,3)', [[2, 'x']]],
  ['=TOCOL(H1:H2,1)', '#CALC!'],
  ['=TOCOL({1,2},4)', '#VALUE!'],
  ['=TOCOL(A:A,1)', [[1], [4], [7]]],

  ['=WRAPROWS({1,2,3,4,5},2)', [[1, 2], [3, 4], [5, '#N/A']]],
  ['=WRAPROWS({1;2;3},2,0)', [[1, 2], [3, 0]]],
  ['=WRAPCOLS({1,2,3,4,5},2,"x")', [[1, 3, 5], [2, 4, 'x']]],
  ['=WRAPROWS(A1:C1,9)', [[1, 2, 3, '#N/A', '#N/A', '#N/A', '#N/A', '#N/A', '#N/A']]],
  ['=WRAPROWS(A1:C2,2)', '#VALUE!'],
  ['=WRAPROWS(A1:C1,0)', '#NUM!'],
];

describe('SEQUENCE, TAKE, DROP, EXPAND, CHOOSECOLS, CHOOSEROWS, VSTACK, HSTACK, TOCOL, TOROW, WRAPROWS, WRAPCOLS', () => {
  it.each(table)('%s is %s', (formula, value) =>
    expect(formulaOn(cells, formula).value).toEqual(value));

  it.each<[string, Record<string, number>]>([
    ['=INDEX(SEQUENCE(3,2,A1,B1),3,1)', { A1: 1, B1: 4 }],
    ['=INDEX(SEQUENCE(E1,1,A1),2)', { A1: 1, E1: 0 }],
    ['=SUM(TAKE(A1:A3,E1))', { A1: 1, A2: 1, E1: 0 }],
    ['=SUM(TAKE({1;2},E1))', { E1: 0 }],
    ['=SUM(DROP(A1:C1,,E1))', { C1: 1, E1: 0 }],
    ['=SUM(EXPAND(A1,E1,1,B1))', { A1: 1, B1: 1, E1: 0 }],
    ['=SUM(CHOOSEROWS(A1:B3,E1))', { A2: 1, B2: 1, E1: 0 }],
    ['=INDEX(CHOOSECOLS(A1:C1,A1,E1),1,1)', { A1: 1 }],
    ['=INDEX(VSTACK(A1:A2,B1:B2),3)', { B1: 1 }],
    ['=INDEX(HSTACK(A1:A2,B1:B2),2,2)', { B2: 1 }],
    ['=INDEX(TOCOL(A1:B2),3)', { A2: 1 }],
    ['=INDEX(TOROW(E1:G1,2),2)', { G1: 1, F1: 0 }],
    ['=INDEX(WRAPROWS(A1:C1,E1),2,1)', { C1: 1, E1: 0 }],
    ['=INDEX(WRAPCOLS(A1:C1,E1,A2),2,2)', { A2: 1, E1: 0 }],
  ])('%s has the slopes %s', (formula, slopes) => expect(formulaOn(cells, formula).slopes).toEqual(slopes));

  it('errors are linked to what made them', () => {
    expect(formulaOn(cells, '=TAKE(A1:A3,E1-2)')).toMatchObject({ value: '#CALC!', slopes: { E1: 0 } });
    expect(formulaOn(cells, '=SEQUENCE(E1-3)')).toMatchObject({ value: '#VALUE!', slopes: { E1: 0 } });
    expect(formulaOn(cells, '=CHOOSEROWS(A1:A3,2*E1)')).toMatchObject({ value: '#VALUE!', slopes: { E1: 0 } });
  });

  it.each(['=SEQUENCE(1048577)', '=SEQUENCE(3000,3000)', '=VSTACK(A:A,5)', '=EXPAND(1,9E9,9E9)', '=WRAPROWS(A1:C1,1E9)'])('%s is refused', (formula) =>
    expect(() => formulaOn(cells, formula)).toThrow(/which is more than can be followed/));

  it('an array where one number is taken is refused', () => {
    expect(() => formulaOn(cells, '=TAKE(A1:A3,{1,2})')).toThrow(/gives TAKE an array where it takes one value/);
  });
});
