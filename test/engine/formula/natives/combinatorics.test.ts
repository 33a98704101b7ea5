import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const of = (formula: string, cells = {}) => formulaOn(cells, formula).value;

describe('counts of arrangements', () => {
  it.each<[string, number | string]>([
    // as in the documentation
    ['COMBIN(8,2)', 28], ['COMBINA(4,3)', 20], ['COMBINA(10,3)', 220], ['FACT(5)', 120], ['FACT(1.9)', 1], ['FACTDOUBLE(6)', 48], ['FACTDOUBLE(7)', 105],
    ['MULTINOMIAL(2,3,4)', 1260], ['PERMUT(100,3)', 970200], ['PERMUTATIONA(3,2)', 9],
    ['FACT(-1)', '#NUM!'], ['FACT(171)', '#NUM!'], ['COMBIN(2,3)', '#NUM!'], ['FACTDOUBLE(-1)', 1], ['FACTDOUBLE(-2)', '#NUM!'],
  ])('%s', (formula, expected) => expect(of(formula)).toBe(expected));

  it('FACTDOUBLE and MULTINOMIAL take no truth values, unlike FACT', () =>
    expect(['FACTDOUBLE(TRUE)', 'MULTINOMIAL(TRUE,2)', 'FACT(TRUE)'].map((f) => of(f))).toEqual(['#VALUE!', '#VALUE!', 1]));

  it('a large COMBIN is right to the last digits although a product on the way is too large', () => {
    // by exact integers
    expect(of('COMBIN(1029,514)')).toBeCloseTo(1.429820686498904e308, -296);
    expect(of('COMBIN(1030,515)')).toBe('#NUM!');
    expect(of('COMBIN(52,5)')).toBe(2598960);
  });
});
