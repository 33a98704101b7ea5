import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { differencesFromHyperFormula, someDay } from './againstHyperFormula';

describe('spans between days', () => {
  it.each([
    // Excel's documentation of DATEDIF and DAYS360
    ['=DATEDIF("1/1/2001","1/1/2003","Y")', 2], ['=DATEDIF("6/1/2001","8/15/2002","D")', 440], ['=DATEDIF("6/1/2001","8/15/2002","YD")', 75],
    ['=DATEDIF("6/1/2001","8/15/2002","ym")', 2], ['=DATEDIF("6/1/2001","8/15/2002","m")', 14], ['=DATEDIF("6/1/2001","8/15/2002","MD")', 14],
    ['=DATEDIF("8/15/2002","6/1/2001","D")', '#NUM!'], ['=DATEDIF(1,2,"W")', '#NUM!'],
    ['=DATEDIF("1/31/2001","2/28/2001","M")', 0], ['=DATEDIF("2/29/2008","2/28/2009","Y")', 0],
    ['=DAYS360("1/30/2011","2/1/2011")', 1], ['=DAYS360("1/1/2011","12/31/2011")', 360], ['=DAYS360("1/1/2011","2/1/2011")', 30],
    ['=DAYS360("1/1/2011","12/31/2011",TRUE)', 359], ['=DAYS360("1/30/2011","3/31/2011")', 60],
    ['=YEARFRAC(40000,40000)', 0], ['=YEARFRAC(40000,41000,5)', '#NUM!'], ['=YEARFRAC(-1,41000)', '#NUM!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toBe(value));

  // Excel's documentation of YEARFRAC, eight places
  it.each([['0', 0.58055556], ['1', 0.57650273], ['3', 0.57808219]])('YEARFRAC from 2012-01-01 to 2012-07-30 by basis %s', (basis, value) =>
    expect(formulaOn({}, `=YEARFRAC("1/1/2012","7/30/2012",${basis})`).value).toBeCloseTo(value, 8));

  it('count ends of February as day 30 in YEARFRAC, the way of the United States', () => {
    // closed form: 30 February to 31 March, and to 30 February of the next year
    expect(formulaOn({}, '=YEARFRAC("2/28/2011","3/31/2011")').value).toBeCloseTo(31 / 360, 15);
    expect(formulaOn({}, '=YEARFRAC("2/28/2011","2/29/2012")').value).toBe(1);
  });

  it.each(['=DATEDIF(A1,A2,"D")', '=DATEDIF(A1,A2,"M")', '=DATEDIF(A1,A2,"Y")', '=DATEDIF(A1,A2,"YM")', '=YEARFRAC(A1,A2,2)', '=YEARFRAC(A1,A2,3)'])(
    '%s agrees with HyperFormula', (formula) => expect(differencesFromHyperFormula(formula, (from) => {
      const A1 = someDay(from);
      return { A1, A2: A1 + Math.floor(from.between(0, 3000)) };
    })).toEqual([]));

  it.each([
    ['=DATEDIF("1/31/2011","3/1/2011","MD")', /unreliable/], ['=DATEDIF("1/1/2011","3/1/2012","YD")', /differ from year to year/],
    ['=DAYS360("2/28/2011","5/1/2011")', /end of February/], ['=YEARFRAC(30,40000)', /before 1900-03-01/],
  ])('%s is refused', (formula, words) => expect(() => formulaOn({}, formula)).toThrow(words));
});
