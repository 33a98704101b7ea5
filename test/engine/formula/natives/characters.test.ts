import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

describe('characters and their numbers', () => {
  it.each([
    // Excel's documentation of each function; places of Windows code page 1252 by its published table
    ['=CHAR(65)', 'A'], ['=CHAR(33)', '!'], ['=CHAR(128)', '€'], ['=CHAR(150)', '–'], ['=CHAR(176)', '°'], ['=CHAR(255)', 'ÿ'],
    ['=CHAR(0)', '#VALUE!'], ['=CHAR(256)', '#VALUE!'], ['=CODE("A")', 65], ['=CODE("!")', 33], ['=CODE("€uro")', 128], ['=CODE("±")', 177],
    ['=CODE("Ÿ")', 159], ['=CODE("")', '#VALUE!'], ['=UNICHAR(66)', 'B'], ['=UNICHAR(32)', ' '], ['=UNICHAR(0)', '#VALUE!'], ['=UNICHAR(963)', 'σ'],
    ['=UNICHAR(128202)', '\u{1F4CA}'], ['=UNICHAR(55296)', '#N/A'], ['=UNICODE(" ")', 32], ['=UNICODE("B")', 66], ['=UNICODE(UNICHAR(128202))', 128202],
    ['=UNICODE("")', '#VALUE!'], ['=CLEAN(CHAR(9)&"Monthly report"&CHAR(10))', 'Monthly report'], ['=CHAR("x")', '#VALUE!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toBe(value));

  it('lead from number to character and back', () => {
    for (let n = 1; n <= 255; n++) if (![129, 141, 143, 144, 157].includes(n)) expect(formulaOn({ A1: n }, '=CODE(CHAR(A1))').value).toBe(n);
  });

  it('taint a number that is read out of a character made from a number', () =>
    expect(formulaOn({ A1: 53 }, '=VALUE(CHAR(A1))')).toEqual({ value: 5, slopes: { A1: 0 }, tainted: ['A1'] }));

  it.each([['=CODE("σ")', /not in the code page/], ['=CHAR(129)', /is no character/], ['=UNICHAR(65535)', /is no character/]])('%s is refused', (formula, words) =>
    expect(() => formulaOn({}, formula)).toThrow(words));
});
