import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const value = (formula: string) => formulaOn({}, formula).value as number;

describe('circular and hyperbolic functions', () => {
  // closed forms
  it.each([
    ['=SIN(PI()/6)', 0.5], ['=COS(PI()/3)', 0.5], ['=TAN(PI()/4)', 1], ['=SEC(PI()/3)', 2], ['=CSC(PI()/6)', 2],
    ['=COT(PI()/4)', 1],
    ['=ASIN(0.5)', Math.PI / 6], ['=ACOS(-0.5)', (2 * Math.PI) / 3], ['=ATAN(1)', Math.PI / 4],
    ['=SINH(LN(2))', 0.75], ['=COSH(LN(2))', 1.25], ['=TANH(LN(2))', 0.6], ['=SECH(LN(2))', 0.8], ['=CSCH(LN(2))', 4 / 3],
    ['=COTH(LN(2))', 5 / 3],
    ['=ASINH(0.75)', Math.LN2], ['=ACOSH(1.25)', Math.LN2], ['=ATANH(0.6)', Math.LN2], ['=ACOTH(5/3)', Math.LN2],
    ['=ACOTH(-5/3)', -Math.LN2], ['=ACOT(0)', Math.PI / 2],
  ])('%s is %s', (formula, expected) => expect(Math.abs(value(formula) / expected - 1)).toBeLessThan(1e-15 * 4)); // a few roundings

  it('ACOT lies between 0 and π (Microsoft, function reference)', () => {
    expect(value('=ACOT(-1)')).toBe((3 * Math.PI) / 4);
    expect(value('=ACOT(1E+300)')).toBe(1e-300);
  });

  it('ATAN2 takes x first (Microsoft, function reference)', () => {
    expect(value('=ATAN2(1,1)')).toBe(Math.PI / 4);
    expect(value('=ATAN2(-1,-1)')).toBe((-3 * Math.PI) / 4);
    expect(value('=ATAN2(-1,0)')).toBe(Math.PI);
    // the angle turns by dy/r along the circle, and by nothing along the ray
    expect(formulaOn({ A1: 2, B1: 0 }, '=ATAN2(A1,B1)').slopes).toEqual({ A1: 0, B1: 0.5 });
    expect(formulaOn({ A1: 3e200, B1: 4e200 }, '=ATAN2(A1,B1)').slopes.A1 * 1e200).toBeCloseTo(-0.16, 14);
  });

  it.each([
    ['=ATAN2(0,0)', '#DIV/0!'], ['=CSC(0)', '#DIV/0!'], ['=COT(0)', '#DIV/0!'], ['=CSCH(0)', '#DIV/0!'], ['=COTH(0)', '#DIV/0!'],
    ['=ASIN(1.1)', '#NUM!'], ['=ACOS(-1.1)', '#NUM!'], ['=ACOSH(0.9)', '#NUM!'], ['=ATANH(1)', '#NUM!'], ['=ATANH(-1)', '#NUM!'],
    ['=ACOTH(1)', '#NUM!'], ['=ACOTH(0.5)', '#NUM!'], ['=ACOTH(0)', '#NUM!'], ['=SINH(711)', '#NUM!'],
  ])('%s is %s', (formula, expected) => expect(value(formula)).toBe(expected));

  it('have no finite slope at the ends of their range', () => {
    expect(formulaOn({ A1: 1 }, '=ASIN(A1)').slopes.A1).toBe(Infinity);
    expect(formulaOn({ A1: 1 }, '=ACOS(A1)').slopes.A1).toBe(-Infinity);
    expect(formulaOn({ A1: 1 }, '=ACOSH(A1)').slopes.A1).toBe(Infinity);
  });

  it('keep their slopes where they are nearly flat', () => {
    // 1/cosh²(x) = 4 e^(-2x) (1 + e^(-2x))^-2; 1 − tanh² would be 0
    expect(formulaOn({ A1: 20 }, '=TANH(A1)').slopes.A1 / (4 * Math.exp(-40))).toBeCloseTo(1, 13);
    expect(formulaOn({ A1: 800 }, '=TANH(A1)').slopes.A1).toBe(0);
    expect(formulaOn({ A1: 800 }, '=SECH(A1)')).toMatchObject({ value: 0, slopes: { A1: 0 } });
  });
});
