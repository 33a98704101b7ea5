import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';
import { hyperFormula } from './hyperFormula';
import { judge, points } from './judge';

/** The comparison must be able to fail: what it finds when one figure of ours is slightly wrong. */
describe('the comparison with another engine', () => {
  const formula = '=A1^2*EXP(B1)/SUM(A1:C1)';
  const cells = { A1: 1.7, B1: 0.4, C1: 2.9 };
  const ours = formulaOn(cells, formula);
  const theirs = hyperFormula(points(cells).map((p) => ({ formula, cells: p })));

  it('finds nothing where all is right', () => expect(judge(ours, cells, theirs)).toEqual([]));

  it.each(['A1', 'B1', 'C1'])('finds the slope by %s wrong by 1e-5 of itself', (name) => {
    for (const factor of [1 + 1e-5, 1 - 1e-5]) {
      const wrong = { ...ours, slopes: { ...ours.slopes, [name]: ours.slopes[name] * factor } };
      expect(judge(wrong, cells, theirs)).toEqual([expect.stringContaining(`slope by ${name}`)]);
    }
  });

  it('finds a slope that is not linked', () => {
    const slopes = Object.fromEntries(Object.entries(ours.slopes).filter(([name]) => name !== 'C1'));
    expect(judge({ ...ours, slopes }, cells, theirs)).toEqual([expect.stringContaining('slope by C1 undefined')]);
  });

  it('finds a value wrong by 2e-12 of itself', () => {
    const value = (ours.value as number) * (1 + 2e-12);
    expect(judge({ ...ours, value }, cells, theirs)).toEqual([expect.stringContaining('value')]);
  });

  it('finds an error on either side', () => {
    expect(judge({ ...ours, value: '#NUM!' }, cells, theirs)).toHaveLength(1);
    expect(judge(ours, cells, [...theirs.slice(0, -1), '#NUM!'])).toEqual(['other engine gives #NUM!']);
  });
});
