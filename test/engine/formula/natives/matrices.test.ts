import { describe, expect, it } from 'vitest';
import { inverse } from '../../../../functions/engine/formula/natives/gauss';
import { type Plain, formulaOn } from '../formulaOn';

const cells = { A1: 4, B1: -1, A2: 2, B2: 1, C1: 'x', D1: 3 };

describe('TRANSPOSE, MMULT, MDETERM, MINVERSE, MUNIT', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=TRANSPOSE({1,2,3;4,5,6})', [[1, 4], [2, 5], [3, 6]]],
    ['=TRANSPOSE(C1:D2)', [['x', null], [3, null]]],
    ['=TRANSPOSE(7)', [[7]]],
    ['=ROWS(TRANSPOSE(1:1))', 16384],
    ['=SUM(TRANSPOSE(A:A))', 6],
    // as in the documentation of MMULT
    ['=MMULT({1,3;7,2},{2,0;0,2})', [[2, 6], [14, 4]]],
    ['=MMULT({1,2,3},{4;5;6})', [[32]]],
    ['=MMULT({1,2},{1,2})', '#VALUE!'],
    ['=MMULT({1,2},C1:C2)', '#VALUE!'],
    ['=MMULT({1,TRUE},{1;2})', '#VALUE!'],
    ['=MMULT({1,#N/A},{1;2})', '#N/A'],
    ['=MMULT(A:A,{1})', '#VALUE!'],
    // as in the documentation of MDETERM
    ['=MDETERM({3,6,1;1,1,0;3,10,2})', 1],
    ['=MDETERM({3,6;1,1})', -3],
    ['=MDETERM({1,3,8,5;1,3,6,1})', '#VALUE!'],
    ['=MDETERM({1,2;2,4})', 0],
    ['=MDETERM({0,1;1,0})', -1],
    ['=MDETERM(5)', 5],
    ['=MDETERM(C1:D2)', '#VALUE!'],
    // as in the documentation of MINVERSE
    ['=MINVERSE({4,-1;2,0})', [[0, 0.5], [-1, 2]]],
    ['=MINVERSE({1,2;2,4})', '#NUM!'],
    ['=MINVERSE({1,2,3})', '#VALUE!'],
    ['=MINVERSE({0,2;4,0})', [[0, 0.25], [0.5, 0]]],
    ['=MUNIT(2)', [[1, 0], [0, 1]]],
    ['=MUNIT(2.9)', [[1, 0], [0, 1]]],
    ['=MUNIT(0)', '#VALUE!'],
  ])('%s is %s', (formula, value) => {
    const found = formulaOn(cells, formula).value;
    const near = (v: Plain): unknown => (typeof v === 'number' ? expect.closeTo(v, 13) : v); // elimination rounds
    expect(found).toEqual(Array.isArray(value) ? value.map((row) => row.map(near)) : near(value));
  });

  it('have the slopes of their closed forms', () => {
    expect(formulaOn(cells, '=INDEX(TRANSPOSE(A1:B2),2,1)*3').slopes).toEqual({ B1: 3 });
    expect(formulaOn(cells, '=INDEX(MMULT(A1:B2,A1:B2),1,2)').slopes).toEqual({ A1: -1, B1: 5, B2: -1 });
    expect(formulaOn(cells, '=MDETERM(A1:B2)')).toMatchObject({ value: 6, slopes: { A1: 1, B1: -2, A2: 1, B2: 4 } });
    // d(1/det · b22) and so on, with det = 6
    const { slopes } = formulaOn(cells, '=INDEX(MINVERSE(A1:B2),1,1)');
    expect(slopes.A1).toBeCloseTo(-1 / 36, 14);
    expect(slopes.B1).toBeCloseTo(2 / 36, 14);
    expect(slopes.A2).toBeCloseTo(-1 / 36, 14);
    expect(slopes.B2).toBeCloseTo(2 / 36, 14); // 1/6 - 4/36
    expect(formulaOn({ A1: 4 }, '=SUM(MINVERSE(A1))').slopes).toEqual({ A1: -1 / 16 });
  });

  it('a singular determinant still has its cofactors as slopes', () => {
    expect(formulaOn({ A1: 1, B1: 2, A2: 2, B2: 4 }, '=MDETERM(A1:B2)')).toMatchObject({ value: 0, slopes: { A1: 4, B1: -2, A2: -2, B2: 1 } });
    const rows = { A1: 1, B1: 2, C1: 3, A2: 2, B2: 4, C2: 6, A3: 0, B3: 1, C3: 5 };
    expect(formulaOn(rows, '=MDETERM(A1:C3)')).toMatchObject({ value: 0, slopes: { A1: 14, A2: -7, A3: 0 } });
  });

  it('link errors and sizes to what made them', () => {
    expect(formulaOn({ A1: 1, B1: 2, A2: 2, B2: 4 }, '=MINVERSE(A1:B2)')).toMatchObject({ value: '#NUM!', slopes: { A1: 0, B2: 0 } });
    expect(formulaOn(cells, '=SUM(MUNIT(D1))')).toMatchObject({ value: 3, slopes: { D1: 0 } });
    expect(formulaOn(cells, '=MMULT(C1,D1)')).toMatchObject({ value: '#VALUE!', slopes: { C1: 0 } });
  });

  it('the inverse of a Hilbert matrix of order 5 is the known one of whole numbers', () => {
    // D. E. Knuth, The Art of Computer Programming, volume 1, section 1.2.3, exercise 45: elements by binomials (from memory)
    const hilbert = Array.from({ length: 5 }, (_, i) => Array.from({ length: 5 }, (_x, j) => 1 / (i + j + 1)));
    const found = inverse(hilbert)!;
    const exact = [[25, -300, 1050, -1400, 630], [-300, 4800, -18900, 26880, -12600]];
    // the condition number is 5e5: relative 1e-10
    exact.forEach((row, i) => row.forEach((x, j) => expect(Math.abs(found[i][j] / x - 1)).toBeLessThan(1e-10)));
  });

  it('arrays whose cells depend on too many are refused, and determinants of that size have no slopes', () => {
    const many = Object.fromEntries(Array.from({ length: 60 * 60 }, (_, k) => [`${letters(k % 60)}${21 + Math.floor(k / 60)}`, k % 61 === 0 ? 2 : 0]));
    expect(() => formulaOn(many, '=SUM(MINVERSE(A21:BH80))')).toThrow(/depend on more cells than can be followed/);
    const { value, slopes } = formulaOn(many, '=MDETERM(A21:BH80)');
    expect(value).toBe(2 ** 60);
    expect(slopes.A21).toBeNaN();
  });
});

const letters = (i: number): string => (i < 26 ? '' : String.fromCharCode(64 + Math.floor(i / 26))) + String.fromCharCode(65 + (i % 26));
