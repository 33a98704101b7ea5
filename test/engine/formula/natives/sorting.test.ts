import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

const cells = {
  A1: 3, B1: 'c', C1: 30, A2: 1, B2: 'B', C2: 10, A3: 2, B3: 'a', C3: 20, A4: 1, B4: 'd', C4: 11,
  E1: true, E2: 'x', E3: 5, E4: '#N/A', E6: -1, G1: -1, H1: 2,
};

describe('SORT', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=SORT({3;1;2})', [[1], [2], [3]]],
    ['=SORT({3;1;2},1,-1)', [[3], [2], [1]]],
    ['=SORT({3;1;2},,-1)', [[3], [2], [1]]],
    ['=SORT({3,1,2},1,1,TRUE)', [[1, 2, 3]]],
    ['=SORT({3,1,2})', [[3, 1, 2]]],
    ['=SORT(A1:C4)', [[1, 'B', 10], [1, 'd', 11], [2, 'a', 20], [3, 'c', 30]]],
    ['=SORT(A1:C4,2)', [[2, 'a', 20], [1, 'B', 10], [3, 'c', 30], [1, 'd', 11]]],
    ['=SORT(A1:C4,1,-1)', [[3, 'c', 30], [2, 'a', 20], [1, 'B', 10], [1, 'd', 11]]],
    ['=SORT(A1:C4,{1,3},{1,-1})', [[1, 'd', 11], [1, 'B', 10], [2, 'a', 20], [3, 'c', 30]]],
    ['=SORT(A1:C4,{1,3},-1)', [[3, 'c', 30], [2, 'a', 20], [1, 'd', 11], [1, 'B', 10]]],
    ['=SORT(E1:E6)', [[-1], [5], ['x'], [true], ['#N/A'], [null]]], // the order of kinds from memory
    ['=SORT(E1:E6,1,-1)', [['#N/A'], [true], ['x'], [5], [-1], [null]]],
    ['=SORT(A1:C4,4)', '#VALUE!'],
    ['=SORT(A1:C4,0)', '#VALUE!'],
    ['=SORT(A1:C4,1,2)', '#VALUE!'],
    ['=SORT(A1:C4,{1,2},{1,1,1})', '#VALUE!'],
    ['=SORT(A1:C4,1/0)', '#DIV/0!'],
    ['=SORT(A1:C4,1,1,1/0)', '#DIV/0!'],
    ['=INDEX(SORT(A:A),2)', 1],
    ['=ROWS(SORT(A:A))', 1048576],
    ['=SUM(SORT(A:C))', 78],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it('numbers that differ in their last digit only are put in order', () => {
    expect(formulaOn({ A1: 0.30000000000000004, A2: 0.3 }, '=SORT(A1:A2)').value).toEqual([[0.3], [0.30000000000000004]]);
  });

  it('keeps slopes, and links what decided the order', () => {
    expect(formulaOn(cells, '=INDEX(SORT(A1:A3),1)').slopes).toEqual({ A1: 0, A2: 1, A3: 0 });
    expect(formulaOn(cells, '=INDEX(SORT(A1:C3,1,G1),2,3)').slopes).toEqual({ A1: 0, A2: 0, A3: 0, G1: 0, C3: 1 });
    expect(formulaOn(cells, '=SUM(SORT(A1:A4))').slopes).toEqual({ A1: 1, A2: 1, A3: 1, A4: 1 });
    expect(formulaOn(cells, '=SORT(A1:A4,G1)')).toMatchObject({ value: '#VALUE!', slopes: { G1: 0 } });
  });

  it('an order of more cells than can be followed is refused', () => {
    const many = Object.fromEntries(Array.from({ length: 4000 }, (_, i) => [`A${i + 21}`, 4000 - i]));
    expect(() => formulaOn(many, '=INDEX(SORT(A21:A4020),1)')).toThrow(/depend on more cells than can be followed/);
    expect(() => formulaOn({ A1: 1 }, '=SORT(A1:A3,1,1,{TRUE,FALSE})')).toThrow(/gives SORT an array where it takes one value/);
  });
});

describe('SORTBY', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=SORTBY(B1:B4,A1:A4)', [['B'], ['d'], ['a'], ['c']]],
    ['=SORTBY(B1:B4,A1:A4,-1)', [['c'], ['a'], ['B'], ['d']]],
    ['=SORTBY(B1:B4,A1:A4,1,C1:C4,-1)', [['d'], ['B'], ['a'], ['c']]],
    ['=SORTBY({1,2,3},{3,1,2})', [[2, 3, 1]]],
    ['=SORTBY({1;2},{1;2;3})', '#VALUE!'],
    ['=SORTBY({1;2},{1,2})', '#VALUE!'],
    ['=SORTBY({1;2},{2;1},0)', '#VALUE!'],
    ['=SORTBY({1;2},1/0)', '#DIV/0!'],
    ['=INDEX(SORTBY(B:B,A:A*1),1)', null], // beyond the cells that hold something the keys are 0
    ['=INDEX(SORTBY(B:B,A:A),1)', 'B'],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it('keeps slopes, and links the keys', () => {
    expect(formulaOn(cells, '=INDEX(SORTBY(C1:C3,A1:A3),2)').slopes).toEqual({ A1: 0, A2: 0, A3: 0, C3: 1 });
  });
});
