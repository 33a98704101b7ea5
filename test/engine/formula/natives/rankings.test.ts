import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

describe('BINOM.DIST.RANGE', () => {
  it.each<[string, number | string]>([
    // as in the documentation
    ['BINOM.DIST.RANGE(60,0.75,48)', 0.084], ['BINOM.DIST.RANGE(60,0.75,45,50)', 0.524],
  ])('%s', (formula, expected) => expect(formulaOn({}, formula).value).toBeCloseTo(expected as number, 3));
  it('certain events and wrong limits', () => {
    expect(formulaOn({}, 'BINOM.DIST.RANGE(10,0.3,0,10)').value).toBeCloseTo(1, 14);
    for (const call of ['10,0.5,11', '10,0.5,4,3', '10,1.1,4', '-1,0.5,0']) expect(formulaOn({}, `BINOM.DIST.RANGE(${call})`).value).toBe('#NUM!');
    expect(formulaOn({}, 'BINOM.DIST.RANGE(10,1,3,10)').value).toBe(1);
    expect(formulaOn({}, 'BINOM.DIST.RANGE(10,0,1,10)').value).toBe(0);
  });
});

describe('MODE.MULT', () => {
  const cells = Object.fromEntries([1, 2, 3, 4, 3, 2, 1, 2, 3, 5, 6, 1].map((v, i) => [`A${i + 1}`, v]));
  it('gives all of the most frequent numbers, as in the documentation', () => expect(formulaOn(cells, 'MODE.MULT(A1:A12)').value).toEqual([[1], [2], [3]]));
  it('is #N/A where none stands twice', () => expect(formulaOn(cells, 'MODE.MULT(A1:A3)').value).toBe('#N/A'));
});
