import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

const upTo = (n: number) => Object.fromEntries(Array.from({ length: n }, (_, i) => [`A${i + 1}`, i + 1]));
const value = (formula: string, n: number) => formulaOn(upTo(n), formula).value;

describe('percentiles', () => {
  it('as in the documentation', () => {
    const cells = { A1: 1, A2: 2, A3: 4, A4: 7, A5: 8, A6: 9, A7: 10, A8: 12 };
    expect(formulaOn(cells, 'QUARTILE(A1:A8,1)').value).toBe(3.5);
    expect(formulaOn({ A1: 1, A2: 3, A3: 2, A4: 4 }, 'PERCENTILE(A1:A4,0.3)').value).toBeCloseTo(1.9, 12);
    const nine = Object.fromEntries([6, 7, 15, 36, 39, 40, 41, 42, 43, 47, 49].map((v, i) => [`A${i + 1}`, v]));
    expect([1, 3].map((q) => formulaOn(nine, `QUARTILE.EXC(A1:A11,${q})`).value)).toEqual([15, 43]);
  });

  it('PERCENTILE.EXC reaches the least and the greatest number at 1/(n+1) and n/(n+1), whatever n', () => {
    for (let n = 1; n <= 200; n++) {
      expect(value(`PERCENTILE.EXC(A1:A${n},1/${n + 1})`, n)).toBe(1);
      expect(value(`PERCENTILE.EXC(A1:A${n},${n}/${n + 1})`, n)).toBe(n);
    }
  });

  it('outside it is #NUM!', () => {
    expect(value('PERCENTILE.EXC(A1:A4,0.19)', 4)).toBe('#NUM!');
    expect(value('PERCENTILE.EXC(A1:A4,0.81)', 4)).toBe('#NUM!');
    expect(value('PERCENTILE(A1:A4,1.01)', 4)).toBe('#NUM!');
  });

  it('has slopes on both neighbours and on the fraction', () => {
    const { slopes } = formulaOn({ A1: 1, A2: 3, A3: 7, B1: 0.25 }, 'PERCENTILE(A1:A3,B1)');
    expect(slopes).toEqual({ A1: 0.5, A2: 0.5, A3: 0, B1: 4 });
  });
});
