import { describe, expect, it } from 'vitest';
import { seeded } from '../crosscheck/seeded';
import { formulaOn } from '../formulaOn';
import { differencesFromHyperFormula } from './againstHyperFormula';

describe('notations, numerals and bits', () => {
  it.each([
    // Excel's documentation of each function
    ['=BASE(7,2)', '111'], ['=BASE(100,16)', '64'], ['=BASE(15,2,10)', '0000001111'], ['=BASE(7,1)', '#NUM!'], ['=BASE(-1,2)', '#NUM!'],
    ['=DECIMAL("FF",16)', 255], ['=DECIMAL(111,2)', 7], ['=DECIMAL("zap",36)', 45745], ['=DECIMAL("2",2)', '#NUM!'],
    ['=BIN2HEX("11111011",4)', '00FB'], ['=BIN2HEX(1110)', 'E'], ['=BIN2HEX("1111111111")', 'FFFFFFFFFF'], ['=BIN2OCT(1001,3)', '011'],
    ['=BIN2OCT("1111111111")', '7777777777'], ['=OCT2BIN(3,3)', '011'], ['=OCT2BIN("7777777000")', '1000000000'], ['=OCT2HEX(100,4)', '0040'],
    ['=OCT2HEX("7777777533")', 'FFFFFFFF5B'], ['=HEX2BIN("F",8)', '00001111'], ['=HEX2BIN("B7")', '10110111'], ['=HEX2BIN("FFFFFFFFFF")', '1111111111'],
    ['=HEX2OCT("F",3)', '017'], ['=HEX2OCT("3B4E")', '35516'], ['=HEX2BIN("G")', '#NUM!'], ['=HEX2BIN("3FF")', '#NUM!'],
    ['=ROMAN(499,0)', 'CDXCIX'], ['=ROMAN(1999)', 'MCMXCIX'], ['=ROMAN(0)', ''], ['=ROMAN(4000)', '#VALUE!'], ['=ROMAN(-1)', '#VALUE!'],
    ['=ARABIC("LVII")', 57], ['=ARABIC("mcmxii")', 1912], ['=ARABIC("-LVII")', -57], ['=ARABIC("")', 0], ['=ARABIC("Q")', '#VALUE!'],
    ['=BITAND(1,5)', 1], ['=BITAND(13,25)', 9], ['=BITOR(23,10)', 31], ['=BITXOR(5,3)', 6], ['=BITLSHIFT(4,2)', 16], ['=BITRSHIFT(13,2)', 3],
    ['=BITLSHIFT(16,-2)', 4], ['=BITAND(-1,5)', '#NUM!'], ['=BITOR(1.5,1)', '#NUM!'], ['=BITXOR(2^48,1)', '#NUM!'], ['=BITOR(2^47,1)', 2 ** 47 + 1],
    ['=BITLSHIFT(2^47,1)', '#NUM!'], ['=BITLSHIFT(1,54)', '#NUM!'], ['=BITAND("x",1)', '#VALUE!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toBe(value));

  it('lead from number to numeral and back', () => {
    for (let n = 1; n < 4000; n += 7) expect(formulaOn({ A1: n }, '=ARABIC(ROMAN(A1))').value).toBe(n);
  });

  // HyperFormula takes the bits of numbers below 2^31 only
  it.each(['=BASE(A1,B1)', '=DECIMAL(BASE(A1,B1),B1)', '=BITAND(A1,C1)', '=BITOR(A1,C1)', '=BITXOR(A1,C1)', '=BITLSHIFT(C1,B1-20)', '=ROMAN(C1)'])(
    '%s agrees with HyperFormula', (formula) => expect(differencesFromHyperFormula(formula, (from) =>
      ({ A1: Math.floor(from.between(0, 2 ** 31)), B1: Math.floor(from.between(2, 37)), C1: Math.floor(from.between(1, 4000)) }))).toEqual([]));

  it('BITOR and BITAND have the sum of their numbers, BITXOR is their difference, up to 48 bits', () => {
    const from = seeded(48);
    for (let i = 0; i < 50; i++) {
      const [A1, B1] = [from.between(0, 2 ** 48), from.between(0, 2 ** 48)].map(Math.floor);
      expect(formulaOn({ A1, B1 }, '=BITOR(A1,B1)+BITAND(A1,B1)').value).toBe(A1 + B1);
      expect(formulaOn({ A1, B1 }, '=BITXOR(A1,B1)-BITOR(A1,B1)+BITAND(A1,B1)').value).toBe(0);
    }
  });

  it.each([['=ROMAN(499,4)', /not the classic one/], ['=ARABIC("IIII")', /no numeral in its classic form/]])('%s is refused', (formula, words) =>
    expect(() => formulaOn({}, formula)).toThrow(words));
});
