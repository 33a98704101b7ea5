import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const value = (formula: string) => formulaOn({}, formula).value;

describe('elementary functions', () => {
  // examples of Microsoft's function reference, and powers that are exact
  it.each([
    ['=LOG(10)', 1], ['=LOG(8,2)', 3], ['=LOG(1000)', 3], ['=LOG(1024,2)', 10], ['=LOG10(10^5)', 5], ['=POWER(5,2)', 25],
    ['=SQRT(16)', 4], ['=ABS(-4)', 4], ['=SQRTPI(1)', Math.sqrt(Math.PI)], ['=DEGREES(PI())', 180], ['=POWER(,2)', 0],
    ['=POWER(2,)', 1],
  ])('%s is %s', (formula, expected) => expect(value(formula)).toBe(expected));

  it.each([
    ['=SQRT(-1)', '#NUM!'], ['=SQRTPI(-1)', '#NUM!'], ['=LN(0)', '#NUM!'], ['=LOG10(-1)', '#NUM!'], ['=EXP(710)', '#NUM!'],
    ['=LOG(0,10)', '#NUM!'], ['=LOG(10,0)', '#NUM!'], ['=LOG(10,-2)', '#NUM!'], ['=LOG(10,1)', '#DIV/0!'], ['=LOG(100,)', '#NUM!'],
    ['=SQRT("x")', '#VALUE!'], ['=SQRT(1/0)', '#DIV/0!'],
  ])('%s is %s', (formula, expected) => expect(value(formula)).toBe(expected));

  it('have no finite slope where the curve is upright', () => {
    expect(formulaOn({ A1: 0 }, '=SQRT(A1)').slopes.A1).toBe(Infinity);
    expect(formulaOn({ A1: 0 }, '=SQRTPI(A1)').slopes.A1).toBe(Infinity);
  });

  it('pass slope 0 at the corner of ABS', () => expect(formulaOn({ A1: 0 }, '=ABS(A1)').slopes).toEqual({ A1: 0 }));

  it('link the base of a logarithm', () => {
    // d/db ln x / ln b = -ln x / (b ln² b), at x = e, b = e
    const { slopes } = formulaOn({ A1: Math.E, B1: Math.E }, '=LOG(A1,B1)');
    expect(slopes.B1 * Math.E).toBeCloseTo(-1, 14);
    expect(slopes.A1 * Math.E).toBeCloseTo(1, 14);
  });
});
