import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const of = (formula: string): number => formulaOn({}, formula).value as number;

describe('the error function', () => {
  // Abramowitz and Stegun, Handbook of Mathematical Functions (1964), table 7.1, ten places
  it.each([[0.5, 0.5204998778], [1, 0.8427007929], [1.5, 0.9661051465], [2, 0.995322265]])('ERF(%d)', (x, value) => {
    expect(of(`=ERF(${x})`)).toBeCloseTo(value, 10);
    expect(of(`=ERF(-${x})`)).toBeCloseTo(-value, 10);
    expect(of(`=ERFC(${x})`)).toBeCloseTo(1 - value, 10);
  });

  // Excel's documentation, eight places
  it.each([['=ERF(0.745)', 0.70792892], ['=ERF(1)', 0.84270079], ['=ERFC(1)', 0.15729921]])('%s', (formula, value) => expect(of(formula)).toBeCloseTo(value, 8));

  it('is 0 at 0, and 1 less its complement', () => {
    expect(of('=ERF(0)')).toBe(0);
    expect(of('=ERFC(0)')).toBe(1);
    for (let x = -3; x <= 3; x += 0.25) expect(of(`=ERF(${x})+ERFC(${x})`)).toBeCloseTo(1, 14);
  });

  it('is its difference between two limits, also where both lie in one tail', () => {
    expect(of('=ERF(0.2,1)')).toBeCloseTo(of('=ERF(1)-ERF(0.2)'), 15);
    expect(of('=ERF(4,5)') / of('=ERFC(4)-ERFC(5)')).toBeCloseTo(1, 14);
    expect(of('=ERF(-5,-4)')).toBe(of('=ERF(4,5)'));
  });

  it('has the slope 2/√π·exp(−x²)', () => {
    const { slopes } = formulaOn({ A1: 0.3, B1: 1.2 }, '=ERF(A1,B1)');
    expect(slopes.A1).toBeCloseTo((-2 / Math.sqrt(Math.PI)) * Math.exp(-0.09), 15);
    expect(slopes.B1).toBeCloseTo((2 / Math.sqrt(Math.PI)) * Math.exp(-1.44), 15);
  });
});
