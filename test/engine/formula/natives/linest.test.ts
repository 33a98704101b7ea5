import { describe, expect, it } from 'vitest';
import { EngineError } from '../../../../functions/engine/EngineError';
import { formulaOn } from '../formulaOn';
import { noInt1, norris, pontius } from './strd';

/** The largest relative difference between a block and the expected one, which must have the same shape and the same errors. */
function relative(block: unknown, expected: readonly (readonly (number | string)[])[]): number {
  const rows = block as (number | string)[][];
  const errors = (of: readonly (readonly (number | string)[])[]) => of.map((r) => r.map((v) => (typeof v === 'number' ? 'number' : v)));
  expect(errors(rows)).toEqual(errors(expected));
  const off = (v: number | string, i: number, j: number): number => (typeof v === 'number' ? Math.abs((rows[i][j] as number) / v - 1) : 0);
  return Math.max(...expected.flatMap((r, i) => r.map((v, j) => off(v, i, j))));
}

describe('LINEST', () => {
  // the intercept of Norris is 1/1600 of the y it is left of, which costs three of 16 digits
  it('gives the certified line and statistics of Norris', () => {
    expect(relative(formulaOn(norris, '=LINEST(A1:A36,B1:B36,TRUE,TRUE)').value, [
      [1.00211681802045, -0.262323073774029],
      [0.000429796848199937, 0.232818234301152],
      [0.999993745883712, 0.884796396144373],
      [5436385.54079785, 34],
      [4255954.13232369, 26.6173985294224],
    ])).toBeLessThan(1e-12);
  });

  // x² is nearly a line over this range (what is left of it is 1/9), and the constant is 1/1600 of y
  it('gives the certified parabola of Pontius', () => {
    expect(relative(formulaOn(pontius, '=LINEST(A1:A40,B1:B40^{1,2},TRUE,TRUE)').value, [
      [-0.316081871345029e-14, 0.732059160401003e-6, 0.673565789473684e-3],
      [0.486652849992036e-16, 0.157817399981659e-9, 0.107938612033077e-3],
      [0.999999900178537, 0.205177424076185e-3, '#N/A'],
      [185330865.9957516, 37, '#N/A'],
      [15.60403432441981, 1.557617687969925e-6, '#N/A'],
    ])).toBeLessThan(1e-11);
  });

  it('gives the certified line through the origin of NoInt1', () => {
    const block = formulaOn(noInt1, '=LINEST(A1:A11,B1:B11,FALSE,TRUE)').value as unknown[];
    expect(relative(block.slice(1), [
      [0.01652892561983471, '#N/A'],
      [0.9993654922986628, 3.567530340063379],
      [15750.25, 10],
      [200457.7272727273, 127.2727272727273],
    ])).toBeLessThan(1e-13);
    expect(formulaOn(noInt1, '=LINEST(A1:A11,B1:B11,FALSE)').value).toEqual([[expect.closeTo(2.074380165289256, 14), 0]]);
  });

  it('counts from 1 where x is left out, and has a constant where that is not said', () => {
    const line = { A1: 3, A2: 5, A3: 7 };
    for (const formula of ['=LINEST(A1:A3)', '=LINEST(A1:A3,)', '=LINEST(A1:A3,,,)', '=LINEST(A1:A3,{1;2;3},TRUE,FALSE)']) {
      expect(formulaOn(line, formula).value).toEqual([[expect.closeTo(2, 14), expect.closeTo(1, 14)]]);
    }
  });

  it('takes each row as a variable where y lies in a row, and all cells as one where the shapes agree', () => {
    // y = 2 x1 − x2 + 3
    const plane = { A1: 4, B1: 7, C1: 6, D1: 11, A2: 1, B2: 3, C2: 2, D2: 5, A3: 1, B3: 2, C3: 1, D3: 2 };
    expect(formulaOn(plane, '=LINEST(A1:D1,A2:D3)').value)
      .toEqual([[expect.closeTo(-1, 13), expect.closeTo(2, 13), expect.closeTo(3, 13)]]);
    expect(formulaOn({ A1: 3, B1: 5, A2: 7, B2: 9, C1: 1, D1: 2, C2: 3, D2: 4 }, '=LINEST(A1:B2,C1:D2)').value)
      .toEqual([[expect.closeTo(2, 14), expect.closeTo(1, 14)]]);
    expect(formulaOn(plane, '=LINEST(A1:D1,A2:C3)').value).toBe('#REF!');
  });

  it('has standard errors 0 and no F where no degrees of freedom are left (from memory)', () => {
    expect(formulaOn({ A1: 3, A2: 5, B1: 1, B2: 2 }, '=LINEST(A1:A2,B1:B2,TRUE,TRUE)').value)
      .toEqual([[2, 1], [0, 0], [1, 0], ['#NUM!', 0], [2, expect.closeTo(0, 20)]]);
  });

  it.each([
    ['=LINEST(A1:A3,B1:B3)', '#VALUE!'], ['=LINEST(A1:A4,B1:B4)', '#VALUE!'], ['=LINEST(A1:A2,C1:C2)', '#N/A'],
    ['=LINEST(A1:A2,B1:B2,"x")', '#VALUE!'],
  ])('%s is %s', (formula, value) => {
    expect(formulaOn({ A1: 3, A2: 5, A3: 7, B1: 1, B2: 2, B3: 'x', C2: '#N/A', C1: 1 }, formula).value).toBe(value);
  });

  it('refuses columns that follow from one another', () => {
    const cells = { A1: 3, A2: 5, A3: 8, A4: 8, B1: 1, B2: 2, B3: 3, B4: 4, C1: 2, C2: 4, C3: 6, C4: 8, D1: 5, D2: 5, D3: 5, D4: 5 };
    for (const formula of ['=LINEST(A1:A4,B1:C4)', '=LINEST(A1:A4,D1:D4)', '=LINEST(A1,B1)']) {
      expect(() => formulaOn(cells, formula)).toThrow(EngineError);
    }
  });

  it('depends on its options', () => {
    const cells = { A1: 3, A2: 5, A3: 8, B1: 1, B2: 2, B3: 3, C1: true, C2: true };
    expect(formulaOn(cells, '=SUM(LINEST(A1:A3,B1:B3,C1,FALSE))').slopes).toMatchObject({ C1: 0 });
  });
});
