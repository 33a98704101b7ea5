import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { differencesFromHyperFormula } from './againstHyperFormula';

describe('numbers written and read', () => {
  it.each([
    // Excel's documentation of each function
    ['=FIXED(1234.567,1)', '1,234.6'], ['=FIXED(1234.567,-1)', '1,230'], ['=FIXED(-1234.567,-1,TRUE)', '-1230'], ['=FIXED(44.332)', '44.33'],
    ['=FIXED(1234567.5,0)', '1,234,568'], ['=FIXED(0.5,0)', '1'], ['=FIXED(1,128)', '#VALUE!'],
    ['=DOLLAR(1234.567,2)', '$1,234.57'], ['=DOLLAR(1234.567,-2)', '$1,200'], ['=DOLLAR(-1234.567,-2)', '($1,200)'], ['=DOLLAR(-0.123,4)', '($0.1230)'],
    ['=DOLLAR(99.888)', '$99.89'],
    ['=NUMBERVALUE("2.500,27",",",".")', 2500.27], ['=NUMBERVALUE("3.5%")', 0.035], ['=NUMBERVALUE("9%%")', 0.0009], ['=NUMBERVALUE(" 3 000 ")', 3000],
    ['=NUMBERVALUE("")', 0], ['=NUMBERVALUE("1.2.3")', '#VALUE!'], ['=NUMBERVALUE("1.2,3")', '#VALUE!'], ['=NUMBERVALUE("abc")', '#VALUE!'],
    ['=DEC2BIN(9,4)', '1001'], ['=DEC2BIN(-100)', '1110011100'], ['=DEC2BIN(511)', '111111111'], ['=DEC2BIN(512)', '#NUM!'], ['=DEC2BIN(-513)', '#NUM!'],
    ['=DEC2BIN(9,3)', '#NUM!'], ['=DEC2HEX(100,4)', '0064'], ['=DEC2HEX(-54)', 'FFFFFFFFCA'], ['=DEC2HEX(28)', '1C'], ['=DEC2HEX(64,1)', '#NUM!'],
    ['=DEC2OCT(58,3)', '072'], ['=DEC2OCT(-100)', '7777777634'], ['=BIN2DEC(1100100)', 100], ['=BIN2DEC(1111111111)', -1], ['=BIN2DEC(2)', '#NUM!'],
    ['=HEX2DEC("A5")', 165], ['=HEX2DEC("FFFFFFFF5B")', -165], ['=HEX2DEC("3DA408B9")', 1034160313], ['=OCT2DEC(54)', 44], ['=OCT2DEC(7777777533)', -165],
    ['=DEC2BIN(TRUE)', '#VALUE!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toBe(value));

  it.each(['DEC2BIN', 'DEC2OCT', 'DEC2HEX'])('%s agrees with HyperFormula', (name) =>
    expect(differencesFromHyperFormula(`=${name}(A1)`, (from) => ({ A1: Math.floor(from.between(-512, 512)) }))).toEqual([]));

  it('taint what is made from a number and read again', () => expect(formulaOn({ A1: 12 }, '=HEX2DEC(DEC2HEX(A1))')).toEqual({ value: 12, slopes: { A1: 0 }, tainted: ['A1'] }));

  it.each([['=NUMBERVALUE("1,5",",",",")', /both are the same/], ['=FIXED(1,)', /left empty/], ['=FIXED(-0.001)', /uses FIXED .* rounded to 0/],
    ['=DOLLAR(-0.001)', /uses DOLLAR .* rounded to 0/], ['=DEC2BIN(-1.5)', /not whole/]])('%s is refused', (formula, words) =>
    expect(() => formulaOn({}, formula)).toThrow(words));
});
