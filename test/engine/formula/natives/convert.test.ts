import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

/** Equal up to a rounding in each of two multiplications. */
const almost = (value: number): [number, number] => [value - Math.abs(value) * 5e-16, value + Math.abs(value) * 5e-16];

describe('CONVERT', () => {
  // exact by definition: see the sources in `units`
  it.each<[string, number]>([
    ['=CONVERT(1,"lbm","kg")', 0.45359237], ['=CONVERT(68,"F","C")', 20], ['=CONVERT(1,"ft","m")', 0.3048], ['=CONVERT(1,"mi","km")', 1.609344],
    ['=CONVERT(1,"Nmi","m")', 1852], ['=CONVERT(1,"gal","l")', 3.785411784], ['=CONVERT(1,"uk_gal","l")', 4.54609], ['=CONVERT(1,"l","m3")', 0.001],
    ['=CONVERT(2,"ml","cm3")', 2], ['=CONVERT(1,"atm","kPa")', 101.325], ['=CONVERT(760,"Torr","Pa")', 101325], ['=CONVERT(1,"kWh","J")', 3.6e6],
    ['=CONVERT(1,"hr","mn")', 60], ['=CONVERT(1,"yr","day")', 365.25], ['=CONVERT(5,"mg","ug")', 5000], ['=CONVERT(25,"C","K")', 298.15],
    ['=CONVERT(491.67,"Rank","F")', 32], ['=CONVERT(80,"Reau","C")', 100], ['=CONVERT(1,"c","J")', 4.184], ['=CONVERT(1,"cal","J")', 4.1868],
    ['=CONVERT(1,"tsp","tbs")', 1 / 3], ['=CONVERT(1,"in","Picapt")', 72], ['=CONVERT(1,"in","pica")', 6], ['=CONVERT(3,"dag","eg")', 3],
    ['=CONVERT(1,"ang","nm")', 0.1], ['=CONVERT(1,"stone","lbm")', 14], ['=CONVERT(1,"uk_ton","cwt")', 22.4], ['=CONVERT(1,"J","e")', 1e7],
  ])('%s is %d', (formula, value) => {
    const [low, high] = almost(value);
    const found = formulaOn({}, formula).value;
    expect(found).toBeGreaterThanOrEqual(low);
    expect(found).toBeLessThanOrEqual(high);
  });

  it('follows the documented CONVERT(CONVERT(100,"ft","m"),"ft","m"), six places', () =>
    expect(formulaOn({}, '=CONVERT(CONVERT(100,"ft","m"),"ft","m")').value).toBeCloseTo(9.290304, 6));

  it('gives #N/A between different quantities', () => expect(formulaOn({}, '=CONVERT(2.5,"ft","sec")').value).toBe('#N/A'));

  it('has the ratio of the units as its slope', () => {
    expect(formulaOn({ A1: 68 }, '=CONVERT(A1,"F","C")').slopes.A1).toBeCloseTo(5 / 9, 15);
    expect(formulaOn({ A1: 3 }, '=CONVERT(A1,"ml","l")').slopes.A1).toBe(0.001);
  });

  it.each(['=CONVERT(1,"FT","m")', '=CONVERT(1,"eV","J")', '=CONVERT(1,"mmHg","Pa")'])('%s is refused', (formula) =>
    expect(() => formulaOn({}, formula)).toThrow(/is not known here/));
});
