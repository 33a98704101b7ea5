import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

describe('AND, OR, XOR, NOT', () => {
  it.each<[string, Plain]>([
    ['=AND(TRUE,1,"true")', true],
    ['=AND(TRUE,0)', false],
    ['=AND(TRUE,)', false],
    ['=AND(TRUE,"x")', '#VALUE!'],
    ['=AND(FALSE,1/0)', '#DIV/0!'],
    ['=OR(FALSE,2)', true],
    ['=XOR(TRUE,TRUE,TRUE)', true],
    ['=XOR({1,1,0})', false],
    ['=NOT(0)', true],
    ['=NOT("x")', '#VALUE!'],
    ['=TRUE()', true],
    ['=FALSE()', false],
    ['=AND(A1:A4)', true],
    ['=AND(A2:A3)', '#VALUE!'],
    ['=OR(A1:A5)', '#N/A'],
    ['=AND(A:A)', '#N/A'],
  ])('%s is %s', (formula, value) => expect(formulaOn({ A1: 1, A2: 'x', A3: null, A4: true, A5: '#N/A' }, formula).value).toBe(value));

  it('link all that took part', () => {
    expect(formulaOn({ A1: 1, A2: 'x', A3: 0 }, '=IF(OR(A1:A3),1,2)').slopes).toEqual({ A1: 0, A3: 0 });
  });

  it('take two hundred thousand numbers', () => {
    expect(formulaOn({ A1: 1 }, '=AND(A1+ROW(1:200000)>0)').value).toBe(true);
  });
});
