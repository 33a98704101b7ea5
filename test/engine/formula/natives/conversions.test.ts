import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

describe('N, T, VALUE', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=N(7)', 7],
    ['=N("Even")', 0],
    ['=N(TRUE)', 1],
    ['=N("7")', 0],
    ['=N(1/0)', '#DIV/0!'],
    ['=N(A1:A2)', 5],
    ['=N({2,"x"})', [[2, 0]]],
    ['=T("Rainfall")', 'Rainfall'],
    ['=T(19)', ''],
    ['=T(TRUE)', ''],
    ['=T(NA())', '#N/A'],
    ['=VALUE("$1,000")', 1000],
    ['=VALUE("12.5%")', 0.125],
    ['=VALUE("x")', '#VALUE!'],
    ['=VALUE("")', '#VALUE!'],
    ['=VALUE(TRUE)', '#VALUE!'],
    ['=VALUE(Z1)', 0],
    ['=VALUE(3)', 3],
  ])('%s is %s', (formula, value) => expect(formulaOn({ A1: 5, A2: 6 }, formula).value).toEqual(value));

  it('N passes a number on; a number written as text and read back is tainted', () => {
    expect(formulaOn({ A1: 5 }, '=2*N(A1)').slopes).toEqual({ A1: 2 });
    expect(formulaOn({ A1: 5 }, '=VALUE(A1)').slopes).toEqual({ A1: 1 });
    expect(formulaOn({ A1: 5 }, '=VALUE(TEXT(A1,"0.0"))')).toEqual({ value: 5, slopes: { A1: 0 }, tainted: ['A1'] });
    expect(formulaOn({ A1: '5' }, '=VALUE(A1)')).toEqual({ value: 5, slopes: { A1: 1 }, tainted: [] });
  });
});

describe('TEXT', () => {
  it.each<[string, Plain]>([
    // the examples of the documentation of TEXT
    ['=TEXT(1234.567,"$#,##0.00")', '$1,234.57'],
    ['=TEXT(0.285,"0.0%")', '28.5%'],
    ['=TEXT(4.34,"# ?/?")', '4 1/3'],
    ['=TEXT(12200000,"0.00E+00")', '1.22E+07'],
    ['=TEXT(1234567898,"[<=9999999]###-####;(###) ###-####")', '(123) 456-7898'],
    ['=TEXT(1234,"0000000")', '0001234'],
    // rounding of the decimal number, not of its binary neighbour
    ['=TEXT(1.005,"0.00")', '1.01'],
    ['=TEXT(4.35,"0.0")', '4.4'],
    ['=TEXT(-2.5,"0")', '-3'],
    ['=TEXT(41000,"yyyy-mm-dd")', '2012-04-01'],
    ['=TEXT(-1,"yyyy")', '#VALUE!'],
    ['=TEXT("12","0.0")', '12.0'],
    ['=TEXT("x","0.0")', 'x'],
    ['=TEXT("x","0;0;0;[@]")', '#VALUE!'],
    ['=TEXT(TRUE,"0.0")', 'TRUE'],
    ['=TEXT(Z1,"0.0")', '0.0'],
    ['=TEXT(5,"")', ''],
    ['=TEXT(5,"[red")', '#VALUE!'],
    ['=TEXT(1/0,"0")', '#DIV/0!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toBe(value));
});
