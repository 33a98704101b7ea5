import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const value = (formula: string) => formulaOn({}, formula).value;

describe('rounding', () => {
  // Microsoft's function reference
  it.each([
    ['=ROUND(2.15,1)', 2.2], ['=ROUND(2.149,1)', 2.1], ['=ROUND(-1.475,2)', -1.48], ['=ROUND(21.5,-1)', 20],
    ['=ROUND(626.3,-3)', 1000],
    ['=ROUND(1.98,-1)', 0], ['=ROUND(-50.55,-2)', -100], ['=ROUND(1.005,2)', 1.01], ['=ROUND(2.5,)', 3],
    ['=ROUNDUP(3.2,0)', 4], ['=ROUNDUP(3.14159,3)', 3.142], ['=ROUNDUP(-3.14159,1)', -3.2], ['=ROUNDUP(31415.92654,-2)', 31500],
    ['=ROUNDDOWN(76.9,0)', 76], ['=ROUNDDOWN(-3.14159,1)', -3.1], ['=ROUNDDOWN(31415.92654,-2)', 31400],
    ['=MROUND(10,3)', 9], ['=MROUND(-10,-3)', -9],
    ['=MROUND(5,-2)', '#NUM!'], ['=MROUND(5,0)', 0], ['=MROUND(0,-2)', 0],
    ['=INT(8.9)', 8], ['=INT(-8.9)', -9], ['=TRUNC(8.9)', 8], ['=TRUNC(-8.9)', -8], ['=TRUNC(0.45)', 0], ['=TRUNC(-8.96,1)', -8.9],
    ['=SIGN(10)', 1], ['=SIGN(4-4)', 0], ['=SIGN(-0.00001)', -1],
    ['=MOD(3,2)', 1], ['=MOD(-3,2)', 1], ['=MOD(3,-2)', -1], ['=MOD(-3,-2)', -1], ['=MOD(3,0)', '#DIV/0!'],
  ])('%s is %s', (formula, expected) => expect(value(formula)).toBe(expected));

  // Microsoft's function reference; a multiple of a decimal fraction is as near as a double comes
  it.each([['=MROUND(1.3,0.2)', 1.4], ['=MROUND(6.05,0.1)', 6], ['=MROUND(7.05,0.1)', 7.1]])('%s is %s', (formula, expected) => {
    expect(value(formula)).toBeCloseTo(expected, 14);
  });

  it('INT takes the 15 digits shown (observed by users of Excel)', () => {
    expect(value('=INT(123456789-0.0000004)')).toBe(123456789);
    expect(value('=INT(123456789-0.0000005)')).toBe(123456788);
  });

  it('that leaves the range of numbers is #NUM!', () => expect(value('=ROUNDUP(1,-400)')).toBe('#NUM!'));

  it.each(['ROUND', 'ROUNDUP', 'ROUNDDOWN'])('%s passes slope 1 in its first argument, 0 in the digits', (name) => {
    expect(formulaOn({ A1: 3.14159, B1: 2 }, `=${name}(A1,B1)`).slopes).toEqual({ A1: 1, B1: 0 });
  });

  it('MROUND passes slope 1 in its first argument, 0 in the multiple', () => {
    expect(formulaOn({ A1: 3.14159, B1: 0.05 }, '=MROUND(A1,B1)').slopes).toEqual({ A1: 1, B1: 0 });
  });

  it('INT, TRUNC and SIGN depend on their argument with slope 0', () => {
    expect(formulaOn({ A1: 3.7 }, '=INT(A1)+TRUNC(A1)+SIGN(A1)')).toMatchObject({ value: 7, slopes: { A1: 0 } });
    expect(formulaOn({ A1: 3.77, B1: 1 }, '=TRUNC(A1,B1)').slopes).toEqual({ A1: 0, B1: 0 });
  });

  it('MOD has slopes 1 and −INT(n/d)', () => {
    expect(formulaOn({ A1: -7.5, B1: 2 }, '=MOD(A1,B1)')).toMatchObject({ value: 0.5, slopes: { A1: 1, B1: 4 } });
  });
});
