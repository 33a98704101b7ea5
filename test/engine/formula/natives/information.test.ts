import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

describe('IS functions', () => {
  const cells = { A1: 1, A2: 'x', A3: true, A4: '#N/A', A5: '#REF!', A6: null };
  it.each<[string, Plain[]]>([
    ['ISNUMBER', [true, false, false, false, false, false]],
    ['ISTEXT', [false, true, false, false, false, false]],
    ['ISNONTEXT', [true, false, true, true, true, true]],
    ['ISLOGICAL', [false, false, true, false, false, false]],
    ['ISERROR', [false, false, false, true, true, false]],
    ['ISERR', [false, false, false, false, true, false]],
    ['ISNA', [false, false, false, true, false, false]],
    ['ISBLANK', [false, false, false, false, false, true]],
  ])('%s of a number, text, boolean, #N/A, #REF!, blank', (name, values) => {
    expect(formulaOn(cells, `=${name}(A1:A6)`).value).toEqual(values.map((v) => [v]));
  });

  it.each<[string, Plain]>([
    ['=ISBLANK("")', false],
    ['=ISREF(A1)', true],
    ['=ISREF(A1:B2)', true],
    ['=ISREF(1)', false],
    ['=ISEVEN(-1)', false],
    ['=ISEVEN(2.5)', true],
    ['=ISEVEN(0)', true],
    ['=ISEVEN(A6)', true],
    ['=ISODD(5)', true],
    ['=ISODD(-3.2)', true],
    ['=ISODD(TRUE)', '#VALUE!'],
    ['=ISODD("x")', '#VALUE!'],
    ['=NA()', '#N/A'],
    ['=ERROR.TYPE(#NULL!)', 1],
    ['=ERROR.TYPE(1/0)', 2],
    ['=ERROR.TYPE(A4)', 7],
    ['=ERROR.TYPE(1)', '#N/A'],
    ['=TYPE("Smith")', 2],
    ['=TYPE(2+"Smith")', 16],
    ['=TYPE({1,2;3,4})', 64],
    ['=TYPE(A1)', 1],
    ['=TYPE(A3)', 4],
    ['=TYPE(A6)', 1],
    ['=TYPE(A1:A2)', 64],
    ['=TYPE(LAMBDA(x,x))', 128],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toBe(value));

  it('depend on what they look at with slope 0', () => {
    expect(formulaOn({ A1: 1 }, '=IF(ISNUMBER(A1),2,3)').slopes).toEqual({ A1: 0 });
    expect(formulaOn({ A1: 1 }, '=IF(ISREF(A1),2,3)').slopes).toEqual({});
  });
});
