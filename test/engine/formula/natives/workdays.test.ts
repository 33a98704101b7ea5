import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { differencesFromHyperFormula, someDay } from './againstHyperFormula';

// Excel's documentation of NETWORKDAYS (2012-10-01 to 2013-03-01) and WORKDAY (from 2008-10-01), with its holidays
const cells = { A1: 41183, A2: 41334, B1: 41235, B2: 41247, B3: 41295, C1: 39722, D1: 39778, D2: 39786, D3: 39834 };

describe('working days', () => {
  it.each([
    ['=NETWORKDAYS(A1,A2)', 110], ['=NETWORKDAYS(A1,A2,B1)', 109], ['=NETWORKDAYS(A1,A2,B1:B3)', 107], ['=NETWORKDAYS(A2,A1,B1:B3)', -107],
    ['=NETWORKDAYS(A1,A2,Z1:Z3)', 110], ['=WORKDAY(C1,151)', 39933], ['=WORKDAY(C1,151,D1:D3)', 39938], ['=WORKDAY(C1,0)', 39722],
    ['=WORKDAY(1,-10)', '#NUM!'],
    // Excel's documentation of NETWORKDAYS.INTL and WORKDAY.INTL
    ['=NETWORKDAYS.INTL(DATE(2006,1,1),DATE(2006,1,31))', 22], ['=NETWORKDAYS.INTL(DATE(2006,2,28),DATE(2006,1,31))', -21],
    ['=NETWORKDAYS.INTL(DATE(2006,1,1),DATE(2006,2,1),7,E1:E2)', 22], ['=NETWORKDAYS.INTL(DATE(2006,1,1),DATE(2006,2,1),"0010001",E1:E2)', 20],
    ['=NETWORKDAYS.INTL(A1,A2,"1111111")', 0], ['=WORKDAY.INTL(A1,5,"1111111")', '#VALUE!'], ['=NETWORKDAYS.INTL(A1,A2,"000")', '#VALUE!'],
    ['=WORKDAY.INTL(DATE(2012,1,1),30,0)', '#NUM!'], ['=WORKDAY.INTL(DATE(2012,1,1),90,11)', 41013], ['=WORKDAY.INTL(DATE(2012,1,1),30,17)', 40944],
  ])('%s is %s', (formula, value) => expect(formulaOn({ ...cells, E1: 38719, E2: 38733 }, formula).value).toBe(value));

  it.each([
    '=NETWORKDAYS(A1,A2)', '=NETWORKDAYS(A1,A2,A3:A4)', '=WORKDAY(A1,B1)', '=WORKDAY(A1,B1,A3:A4)',
    '=NETWORKDAYS.INTL(A1,A2,3,A3:A4)', '=NETWORKDAYS.INTL(A1,A2,14)', '=WORKDAY.INTL(A1,B1,5)', '=WORKDAY.INTL(A1,B1,"1000001",A3:A4)',
  ])('%s agrees with HyperFormula', (formula) => expect(differencesFromHyperFormula(formula, (from) => {
    const A1 = someDay(from);
    const near = (): number => A1 + Math.floor(from.between(0, 60));
    return { A1, A2: A1 + Math.floor(from.between(0, 90)), A3: near(), A4: near(), B1: Math.floor(from.between(1, 60)) };
  })).toEqual([]));

  it('refuse holidays that are no numbers', () => expect(() => formulaOn({ A1: 40000, A2: 'x' }, '=WORKDAY(A1,1,A1:A2)')).toThrow(/no number/));
});
