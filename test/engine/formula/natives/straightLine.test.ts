import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { norris } from './strd';

const relative = (a: unknown, b: number): number => Math.abs((a as number) / b - 1);
const square = { A1: 1, A2: 3, A3: 2, B1: 1, B2: 2, B3: 3 };

describe('the least-squares line', () => {
  // Norris: Sxx and Syy are sums of a few dozen squares; the intercept is 1/1600 of the y it is left of
  it.each([
    ['=SLOPE(A1:A36,B1:B36)', 1.00211681802045, 1e-14], ['=INTERCEPT(A1:A36,B1:B36)', -0.262323073774029, 1e-12],
    ['=STEYX(A1:A36,B1:B36)', 0.884796396144373, 1e-13], ['=RSQ(A1:A36,B1:B36)', 0.999993745883712, 1e-14],
    ['=CORREL(A1:A36,B1:B36)^2', 0.999993745883712, 1e-14], ['=PEARSON(A1:A36,B1:B36)^2', 0.999993745883712, 1e-14],
    ['=FORECAST(0,A1:A36,B1:B36)', -0.262323073774029, 1e-12], ['=FORECAST.LINEAR(0,A1:A36,B1:B36)', -0.262323073774029, 1e-12],
  ])('%s is the certified value', (formula, value, tolerance) => {
    expect(relative(formulaOn(norris, formula).value, value)).toBeLessThan(tolerance);
  });

  it('has slopes that follow from the definition', () => {
    // x = 1, 2, 3: b = (y3 − y1) / 2, and moving x2 turns the line by (dy2 − 2 b dx2) / 2 = 1/2
    const { value, slopes } = formulaOn(square, '=SLOPE(A1:A3,B1:B3)');
    expect(value).toBe(0.5);
    expect(slopes).toEqual({ A1: -0.5, A2: 0, A3: 0.5, B1: 0, B2: 0.5, B3: -0.5 });
    // at the mean of x the line passes through the mean of y, whatever the slope
    const middle = formulaOn({ ...square, C1: 2 }, '=FORECAST(C1,A1:A3,B1:B3)');
    expect(middle.slopes).toMatchObject({ A1: 1 / 3, A2: 1 / 3, A3: 1 / 3, C1: 0.5 });
  });

  it.each([
    ['=SLOPE(A1:A3,B1:B2)', '#N/A'], ['=SLOPE(A1,B1)', '#DIV/0!'], ['=SLOPE(C1:C3,B1:B3)', '#DIV/0!'],
    ['=STEYX(A1:A2,B1:B2)', '#DIV/0!'],
    ['=SLOPE(A1:A3,D1:D3)', '#DIV/0!'], ['=CORREL(D1:D3,A1:A3)', '#DIV/0!'], ['=RSQ(A1:A3,D1:D3)', '#DIV/0!'],
    ['=FORECAST("x",A1:A3,B1:B3)', '#VALUE!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({ ...square, D1: 0.1, D2: 0.1, D3: 0.1 }, formula).value).toBe(value));

  it('passes over pairs with text, which is still linked', () => {
    const { value, slopes } = formulaOn({ ...square, A4: '<LOD', B4: 9 }, '=SLOPE(A1:A4,B1:B4)');
    expect(value).toBe(0.5);
    expect(slopes).toMatchObject({ A1: -0.5, A4: 0 });
    expect(slopes).not.toHaveProperty('B4');
  });

  it('has no finite slope of its residual deviation where all points lie on it', () => {
    const { value, slopes } = formulaOn({ A1: 1, A2: 2, A3: 3, B1: 1, B2: 2, B3: 3 }, '=STEYX(A1:A3,B1:B3)');
    expect(value).toBe(0);
    expect(slopes.A1).toBe(Infinity);
    expect(slopes.B1).toBe(-Infinity);
  });
});
