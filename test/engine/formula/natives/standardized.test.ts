import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const scores = Object.fromEntries([79, 85, 78, 85, 50, 81, 95, 88, 97].map((v, i) => [`A${i + 1}`, v]));

describe('FREQUENCY', () => {
  it('counts by bins and above, as in the documentation', () => expect(formulaOn(scores, 'FREQUENCY(A1:A9,{70;79;89})').value).toEqual([[1], [2], [4], [2]]));
  it('without bins counts all', () => expect(formulaOn(scores, 'SUM(FREQUENCY(A1:A9,C1:C3))').value).toBe(9));
  it('depends on text that was passed over', () => expect(formulaOn({ ...scores, A3: '<LOD' }, 'SUM(FREQUENCY(A1:A9,{80}))')).toMatchObject({ value: 8, slopes: { A3: 0, A1: 0 } }));
  it('refuses bins that fall', () => expect(() => formulaOn(scores, 'FREQUENCY(A1:A9,{80;70})')).toThrow('its bins do not rise'));
});

describe('STANDARDIZE, FISHER, PROB', () => {
  it.each<[string, number | string]>([
    // as in the documentation
    ['STANDARDIZE(42,40,1.5)', 1.33333333333333], ['FISHER(0.75)', 0.972955074527657], ['FISHERINV(0.972955)', 0.749999967], ['PROB({0;1;2;3},{0.2;0.3;0.1;0.4},2)', 0.1],
    ['PROB({0;1;2;3},{0.2;0.3;0.1;0.4},1,3)', 0.8],
  ])('%s', (formula, expected) => expect(formulaOn({}, formula).value).toBeCloseTo(expected as number, 8));
  it.each(['STANDARDIZE(1,2,0)', 'FISHER(1)', 'PROB({0;1},{0.2;0.3},1)', 'PROB({0;1},{1.2;-0.2},1)'])('%s is #NUM!', (formula) =>
    expect(formulaOn({}, formula).value).toBe('#NUM!'));
});
