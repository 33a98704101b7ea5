import { describe, expect, it } from 'vitest';
import { FunctionNames, storedFormula, typedFormula } from '../../../addin/desk/sheet/functionNames';

const names = new FunctionNames(['UNC_CARRY']);

// [typed, stored]; the prefixes are those of [MS-XLSX], 2.2.2.
const forms: [typed: string, stored: string][] = [
  ['=ROOTSUM.UNC_CARRY(A1, B1)', '_xldudf_ROOTSUM_UNC_CARRY(A1, B1)'],
  ['=SUM(A1)', 'SUM(A1)'],
  ['=STDEV.S(A1:A3)', '_xlfn.STDEV.S(A1:A3)'],
  ['=SORT(A1:A3)', '_xlfn._xlws.SORT(A1:A3)'],
  ['="ROOTSUM.UNC_CARRY(1)"&\'SORT(1)\'!A1', '"ROOTSUM.UNC_CARRY(1)"&\'SORT(1)\'!A1'],
  ['=LET(x,A1,x*2)', '_xlfn.LET(_xlpm.x,A1,_xlpm.x*2)'],
  ['=MAP(A1:A3,LAMBDA(v,v+Rate))', '_xlfn.MAP(A1:A3,_xlfn.LAMBDA(_xlpm.v,_xlpm.v+Rate))'],
];

describe('storedFormula', () => {
  it.each(forms)('%s is stored as %s, and shown again as typed', (typed, stored) => {
    expect(storedFormula(typed, names)).toBe(stored);
    expect(`=${typedFormula(stored, names)}`).toBe(typed);
  });

  it.each([
    ['=SUM(A1#)', 'SUM(_xlfn.ANCHORARRAY(A1))'],
    ['=@A1:A3*2', '_xlfn.SINGLE(A1:A3)*2'],
    ['=@A1#', '_xlfn.SINGLE(_xlfn.ANCHORARRAY(A1))'],
    ['=1+@rootsum.unc_carry((A1),B1)', '1+_xlfn.SINGLE(_xldudf_ROOTSUM_UNC_CARRY((A1),B1))'],
  ])('%s is stored as %s', (typed, stored) => expect(storedFormula(typed, names)).toBe(stored));

  it('refuses a function of the namespace that is not known', () => {
    expect(() => storedFormula('=ROOTSUM.NO_SUCH(1)', names)).toThrow('calls ROOTSUM.NO_SUCH, which is no function of this version');
  });

  it('refuses a text that ends within quotes', () => {
    expect(() => storedFormula('="abc', names)).toThrow('cannot be read');
  });
});
