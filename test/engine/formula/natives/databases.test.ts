import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

// A list of fruit trees of our own; the rules are those of the documentation of DSUM and DGET.
const cells = {
  A1: 'tree', B1: 'age', C1: 'size', A2: 'apple', B2: 20, C2: 18, A3: 'pear', B3: 12, C3: 12, A4: 'Apple pie', B4: 14, C4: 13, A5: 'cherry', B5: 13, C5: 13,
  E1: 'TREE', F1: 'size', E2: 'apple', F2: '>13', E3: '=pear', G1: 'tree', G2: 'app', H1: 'none', H2: 3,
};

describe('functions over a list with headings', () => {
  it.each([
    ['=DSUM(A1:C5,"size",E1:F2)', 18], ['=DSUM(A1:C5,3,E1:F3)', 30], ['=DSUM(A1:C5,"AGE",G1:G2)', 34], ['=DCOUNT(A1:C5,"size",G1:G2)', 2],
    ['=DCOUNTA(A1:C5,"tree",E1:E3)', 3], ['=DGET(A1:C5,"age",E1:F2)', 20], ['=DGET(A1:C5,"age",G1:G2)', '#NUM!'], ['=DMAX(A1:C5,2,E1:E3)', 20],
    ['=DMIN(A1:C5,2,E1:E3)', 12], ['=DAVERAGE(A1:C5,2,G1:G2)', 17], ['=DSUM(A1:C5,"weight",G1:G2)', '#VALUE!'], ['=DSUM(A1:C5,4,G1:G2)', '#VALUE!'],
    ['=DPRODUCT(A1:C5,3,G1:G2)', 234], ['=DVARP(A1:C5,3,G1:G2)', 6.25],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toBe(value));

  it('keep slopes, and are linked to all that decided', () => {
    const { slopes } = formulaOn(cells, '=DSUM(A1:C5,"age",E1:F2)');
    expect(slopes).toMatchObject({ B2: 1, C2: 0, C3: 0, F2: 0 });
    expect(slopes.B3 ?? 0).toBe(0);
  });

  it('refuse a condition under no heading', () => expect(() => formulaOn(cells, '=DSUM(A1:C5,3,H1:H2)')).toThrow(/a condition stands under no heading/));
});
