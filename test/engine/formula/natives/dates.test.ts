import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { differencesFromHyperFormula, someDay } from './againstHyperFormula';

describe('days', () => {
  it.each([
    // Excel's documentation of each function (serial numbers from memory of ECMA-376-1, 18.17.4.1: 2008-01-01 is 39448)
    ['=DATE(2008,1,1)', 39448], ['=DATE(108,1,2)', 39449], ['=DATE(2008,14,2)', 39846], ['=DATE(2008,-3,2)', 39327],
    ['=DATE(2008,1,35)', 39482], ['=DATE(2008,1,-15)', 39432],
    ['=DATE(1900,1,1)', 1], ['=DATE(1900,2,29)', 60], ['=DATE(1900,3,1)', 61], ['=DATE(9999,12,31)', 2958465],
    ['=DATE(10000,1,1)', '#NUM!'], ['=DATE(-1,1,1)', '#NUM!'], ['=DATE(9999,12,32)', '#NUM!'],
    ['=YEAR(39448)', 2008], ['=MONTH(39846)', 2], ['=DAY(39482)', 4], ['=DAY(0)', 0], ['=MONTH(0)', 1], ['=YEAR(0)', 1900], ['=DAY(60)', 29],
    ['=YEAR(2958465.5)', 9999], ['=YEAR(2958466)', '#NUM!'], ['=YEAR(-1)', '#NUM!'], ['=YEAR("x")', '#VALUE!'], ['=DAY("15-Apr-11")', 15],
    ['=WEEKDAY("2/14/2008")', 5], ['=WEEKDAY("2/14/2008",2)', 4], ['=WEEKDAY("2/14/2008",3)', 3], ['=WEEKDAY("2/14/2008",17)', 5],
    ['=WEEKDAY("2/14/2008",11)', 4], ['=WEEKDAY(1)', 1], ['=WEEKDAY(39492,4)', '#NUM!'],
    ['=WEEKNUM("3/9/2012")', 10], ['=WEEKNUM("3/9/2012",2)', 11], ['=ISOWEEKNUM("3/9/2012")', 10], ['=WEEKNUM("3/9/2012",21)', 10],
    ['=EDATE("15-Jan-11",1)', 40589], ['=EDATE("15-Jan-11",-1)', 40527], ['=EDATE("15-Jan-11",2)', 40617],
    ['=EDATE("31-Jan-2012",1)', 40968], // 2012-02-29
    ['=EOMONTH("1-Jan-11",1)', 40602], ['=EOMONTH("1-Jan-11",-3)', 40482], ['=EOMONTH(TRUE,1)', '#VALUE!'],
    ['=DAYS("15-MAR-2021","1-FEB-2021")', 42], ['=DAYS(44561,44197)', 364],
    ['=DATEVALUE("8/22/2011")', 40777], ['=DATEVALUE("22-MAY-2011")', 40685], ['=DATEVALUE("2011/02/23")', 40597], ['=DATEVALUE("apple")', '#VALUE!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toBe(value));

  // ISO 8601: 2008-12-29 and 2010-01-03 lie in other years' weeks (closed form: the week of the Thursday)
  it.each([['2008-12-28', 52], ['2008-12-29', 1], ['2010-01-03', 53], ['2010-01-04', 1], ['2016-01-03', 53]])('%s lies in week %i', (day, week) =>
    expect(formulaOn({}, `=ISOWEEKNUM("${day}")`).value).toBe(week));

  it.each([
    ...['YEAR', 'MONTH', 'DAY', 'WEEKDAY', 'WEEKNUM', 'ISOWEEKNUM'].map((name) => `=${name}(A1)`),
    '=WEEKDAY(A1,2)', '=WEEKDAY(A1,3)', '=WEEKNUM(A1,2)', '=EDATE(A1,B1)', '=EOMONTH(A1,B1)', '=DATE(YEAR(A1),B1,DAY(A1))',
  ])('%s agrees with HyperFormula', (formula) =>
    expect(differencesFromHyperFormula(formula, (from) => ({ A1: someDay(from), B1: Math.floor(from.between(-30, 30)) }))).toEqual([]));

  it('have no slope', () => expect(formulaOn({ A1: 40000 }, '=YEAR(A1)').slopes.A1).toBeNaN());

  it.each([
    ['=DATEVALUE("5-JUL")', /may be a date/], ['=DATE(2025.9999999,1,1)', /very close to a whole number/], ['=DATE(1900,0,5)', /month lies before 1900/],
    ['=ISOWEEKNUM(30)', /before 1900-03-01/], ['=EDATE(40000,-1.5)', /negative number that is not whole/], ['=DATEVALUE("1/1/35")', /may be a date/],
  ])('%s is refused', (formula, words) => expect(() => formulaOn({}, formula)).toThrow(words));
});
