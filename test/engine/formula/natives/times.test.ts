import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { differencesFromHyperFormula } from './againstHyperFormula';

describe('times of day', () => {
  it.each([
    // Excel's documentation of each function
    ['=TIME(12,0,0)', 0.5], ['=TIME(27,0,0)', 0.125], ['=TIME(0,750,0)', 750 / 1440], ['=TIME(0,0,2000)', 2000 / 86400], ['=TIME(-1,0,0)', '#NUM!'],
    ['=TIME(32768,0,0)', '#NUM!'], ['=HOUR(0.75)', 18], ['=HOUR("7/18/2011 7:45")', 7], ['=HOUR("4/21/2012")', 0], ['=MINUTE("12:45:00 PM")', 45],
    ['=SECOND("4:48:18 PM")', 18], ['=SECOND("4:48 PM")', 0], ['=TIMEVALUE("2:24 AM")', 0.1], ['=TIMEVALUE("22-Aug-2011 6:35 AM")', 395 / 1440],
    ['=TIMEVALUE("noon")', '#VALUE!'], ['=HOUR(-0.1)', '#NUM!'], ['=HOUR("12:00 AM")', 0], ['=HOUR("12:00 PM")', 12],
    ['=SECOND(TIME(1,2,3))', 3], ['=MINUTE(TIME(1,2,3))', 2], ['=HOUR(TIME(1,2,3))', 1],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toBe(value));

  it('follow the documented four digits of TIME(16,48,10)', () => expect(formulaOn({}, '=TIME(16,48,10)').value).toBeCloseTo(0.7001157, 7));

  it.each(['=HOUR(A1+B1/86400)', '=MINUTE(A1+B1/86400)', '=SECOND(A1+B1/86400)', '=TIME(0,0,B1/3)'])('%s agrees with HyperFormula', (formula) =>
    expect(differencesFromHyperFormula(formula, (from) => ({ A1: Math.floor(from.between(1000, 50000)), B1: 3 * Math.floor(from.between(0, 28800)) }))).toEqual([]));

  it('refuse half a second, which may be rounded either way', () => expect(() => formulaOn({}, '=SECOND(10.5/86400)')).toThrow(/half a second/));
});
