import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { differencesFromHyperFormula } from './againstHyperFormula';

describe('multiples', () => {
  it.each([
    // Excel's documentation of each function
    ['=CEILING(2.5,1)', 3], ['=CEILING(-2.5,-2)', -4], ['=CEILING(-2.5,2)', -2], ['=CEILING(1.5,0.1)', 1.5], ['=CEILING(0.234,0.01)', 0.24],
    ['=CEILING(2.5,-1)', '#NUM!'], ['=CEILING(2.5,0)', 0], ['=FLOOR(3.7,2)', 2], ['=FLOOR(-2.5,-2)', -2], ['=FLOOR(2.5,-2)', '#NUM!'],
    ['=FLOOR(1.58,0.1)', 1.5], ['=FLOOR(0.234,0.01)', 0.23], ['=FLOOR(-2.5,2)', -4], ['=FLOOR(2.5,0)', '#DIV/0!'],
    ['=CEILING.MATH(24.3,5)', 25], ['=CEILING.MATH(6.7)', 7], ['=CEILING.MATH(-8.1,2)', -8], ['=CEILING.MATH(-5.5,2,-1)', -6],
    ['=FLOOR.MATH(24.3,5)', 20], ['=FLOOR.MATH(6.7)', 6], ['=FLOOR.MATH(-8.1,2)', -10], ['=FLOOR.MATH(-5.5,2,-1)', -4],
    ['=CEILING.PRECISE(4.3)', 5], ['=CEILING.PRECISE(-4.3)', -4], ['=CEILING.PRECISE(4.3,-2)', 6], ['=ISO.CEILING(-4.3,-2)', -4],
    ['=FLOOR.PRECISE(-3.2,-1)', -4], ['=FLOOR.PRECISE(3.2,-1)', 3], ['=FLOOR.PRECISE(3.2)', 3], ['=ISO.CEILING(4.3,0)', 0],
    ['=EVEN(1.5)', 2], ['=EVEN(3)', 4], ['=EVEN(2)', 2], ['=EVEN(-1)', -2], ['=EVEN(0)', 0],
    ['=ODD(1.5)', 3], ['=ODD(3)', 3], ['=ODD(2)', 3], ['=ODD(-1)', -1], ['=ODD(-2)', -3], ['=ODD(0)', 1],
    ['=QUOTIENT(5,2)', 2], ['=QUOTIENT(4.5,3.1)', 1], ['=QUOTIENT(-10,3)', -3], ['=QUOTIENT(1,0)', '#DIV/0!'],
    ['=GCD(5,2)', 1], ['=GCD(24,36)', 12], ['=GCD(7,1)', 1], ['=GCD(5,0)', 5], ['=GCD(-1,2)', '#NUM!'], ['=GCD(A1:A2,16)', 4],
    ['=LCM(5,2)', 10], ['=LCM(24,36)', 72], ['=LCM(3,0)', 0], ['=LCM(-1,2)', '#NUM!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({ A1: 24, A2: 36 }, formula).value).toBe(value));

  it.each(['=CEILING(A1,B1)', '=FLOOR(A1,B1)', '=CEILING.MATH(-A1,B1)', '=FLOOR.MATH(-A1,B1)', '=EVEN(A1)', '=ODD(A1)', '=QUOTIENT(A1,B1)'])(
    '%s agrees with HyperFormula', (formula) =>
      expect(differencesFromHyperFormula(formula, (from) => ({ A1: from.between(0, 100), B1: from.between(0.5, 7) }))).toEqual([]));

  it('have no slope where they cut off, and slope 0 where they go in steps', () => {
    expect(formulaOn({ A1: 2.5 }, '=CEILING(A1,1)').slopes.A1).toBeNaN();
    expect(formulaOn({ A1: 2.5 }, '=EVEN(A1)').slopes.A1).toBe(0);
  });

  it('are refused where the rounding of the sheet decides', () => expect(() => formulaOn({}, '=FLOOR(0.7,0.1)')).toThrow(/up to rounding/));
});
