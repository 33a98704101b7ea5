import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

// The rules of the documentation of TEXTSPLIT, on texts of our own.
describe('TEXTSPLIT', () => {
  it.each([
    ['=TEXTSPLIT("a,b,c",",")', [['a', 'b', 'c']]],
    ['=TEXTSPLIT("a=1;b=2","=",";")', [['a', '1'], ['b', '2']]],
    ['=TEXTSPLIT("a;b",,";")', [['a'], ['b']]],
    ['=TEXTSPLIT("a,,b",",")', [['a', '', 'b']]],
    ['=TEXTSPLIT("a,,b",",",,TRUE)', [['a', 'b']]],
    ['=TEXTSPLIT("aXbxc","x",,,1)', [['a', 'b', 'c']]],
    ['=TEXTSPLIT("a,b;c",",",";")', [['a', 'b'], ['c', '#N/A']]],
    ['=TEXTSPLIT("a,b;c",",",";",,,"-")', [['a', 'b'], ['c', '-']]],
    ['=INDEX(TEXTSPLIT(A1,"-"),2)*2', 34],
  ])('%s', (formula, value) => expect(formulaOn({ A1: 'W-17' }, formula).value).toEqual(value));

  it('is refused for several delimiters, or an empty one', () => {
    expect(() => formulaOn({}, '=TEXTSPLIT("a,b;c",{",",";"})')).toThrow(/gives TEXTSPLIT an array/);
    expect(() => formulaOn({}, '=TEXTSPLIT("a","")')).toThrow(/its delimiter is empty/);
  });
});
