import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type Line, cellAt, exactPlace, fallingAtOrAbove, fallingAtOrBelow, firstAtOrAbove, firstColumn, firstRow, lastAtOrBelow, lineOf,
  nearestPlace, order, wildcardPlace,
} from '../../../../functions/engine/formula/natives/line';
import { type Scalar, BLANK, bool, err, num, text } from '../../../../functions/engine/formula/scalar';
import { matrix } from '../../../../functions/engine/formula/value';

const SEED = { seed: 20260107, numRuns: 400 };

const scalar: fc.Arbitrary<Scalar> = fc.oneof(
  { weight: 4, arbitrary: fc.integer({ min: -5, max: 5 }).map((v) => num(v)) },
  { weight: 2, arbitrary: fc.constantFrom('a', 'A', 'b', 'bb', 'C').map((v) => text(v)) },
  fc.boolean().map((v) => bool(v)),
  fc.constantFrom<Scalar>(BLANK, err('#N/A')),
);
const key = scalar.filter((s) => s.k !== 'blank' && s.k !== 'error');
const column = (cells: Scalar[]): Line => firstColumn(matrix(cells.length, 1, cells));
const places = (line: Line): number[] => Array.from({ length: line.length }, (_, i) => i);
const alike = (line: Line, k: Scalar): number[] => places(line).filter((i) => cellAt(line, i).k === k.k);

describe('a search by index, bisection or scan finds what looking at every cell finds', () => {
  it('exactPlace, asked again and again', () => {
    fc.assert(fc.property(fc.array(scalar, { maxLength: 20 }), fc.array(key, { minLength: 3, maxLength: 6 }), (cells, keys) => {
      const line = column(cells);
      for (const k of keys) {
        const equal = alike(line, k).filter((i) => order(cellAt(line, i), k) === 0);
        expect(exactPlace(line, k)).toBe(equal[0] ?? -1);
        expect(exactPlace(line, k, true)).toBe(equal.at(-1) ?? -1);
        expect(wildcardPlace(line, k)).toBe(equal[0] ?? -1);
      }
    }), SEED);
  });

  it('bisection in a line sorted upwards and downwards, other kinds of cell between', () => {
    fc.assert(fc.property(fc.array(scalar, { maxLength: 20 }), key, (mixed, k) => {
      const sorted = mixed.filter((s) => s.k === k.k).sort(order);
      const rising = column(mixed.map((s) => (s.k === k.k ? sorted.shift()! : s)));
      const below = alike(rising, k).filter((i) => order(cellAt(rising, i), k) <= 0);
      const notBelow = alike(rising, k).filter((i) => order(cellAt(rising, i), k) >= 0);
      expect(lastAtOrBelow(rising, k).place).toBe(below.at(-1) ?? -1);
      expect(firstAtOrAbove(rising, k).place).toBe(notBelow[0] ?? -1);

      const fallen = mixed.filter((s) => s.k === k.k).sort((a, b) => order(b, a));
      const falling = column(mixed.map((s) => (s.k === k.k ? fallen.shift()! : s)));
      const equal = alike(falling, k).filter((i) => order(cellAt(falling, i), k) === 0);
      const above = alike(falling, k).filter((i) => order(cellAt(falling, i), k) > 0);
      const under = alike(falling, k).filter((i) => order(cellAt(falling, i), k) <= 0);
      expect(fallingAtOrAbove(falling, k).place).toBe(equal[0] ?? above.at(-1) ?? -1);
      expect(fallingAtOrBelow(falling, k).place).toBe(under[0] ?? -1);
    }), SEED);
  });

  it('nearestPlace in any order, with the nearest on the other side as its neighbour', () => {
    fc.assert(fc.property(fc.array(scalar, { maxLength: 20 }), key, fc.boolean(), fc.boolean(), (cells, k, below, fromEnd) => {
      const line = column(cells);
      const side = below ? 1 : -1;
      const near = alike(line, k).filter((i) => side * order(cellAt(line, i), k) <= 0);
      const best = near.filter((i) => near.every((j) => side * order(cellAt(line, i), cellAt(line, j)) >= 0));
      const found = nearestPlace(line, k, below, fromEnd);
      expect(found.place).toBe((fromEnd ? best.at(-1) : best[0]) ?? -1);
      const far = alike(line, k).filter((i) => side * order(cellAt(line, i), k) > 0);
      if (far.length === 0) expect(found.neighbour).toBe(-1);
      else expect(far.every((i) => side * order(cellAt(line, found.neighbour), cellAt(line, i)) <= 0)).toBe(true);
    }), SEED);
  });
});

describe('a line', () => {
  it('is a single column or row', () => {
    expect(lineOf(matrix(2, 2, [BLANK, BLANK, BLANK, BLANK]))).toBeUndefined();
    expect(lineOf(matrix(1, 3, [num(1), num(2), num(3)]))).toMatchObject({ down: false, length: 3 });
    const table = matrix(2, 2, [num(1), num(2), num(3), num(4)]);
    expect([exactPlace(firstColumn(table), num(3)), exactPlace(firstRow(table), num(2)), exactPlace(firstRow(table), num(3))]).toEqual([1, 1, -1]);
  });

  it('finds blank cells also beyond what is stored', () => {
    const line: Line = firstColumn({ k: 'matrix', rows: 10, cols: 1, height: 2, width: 1, cells: [num(1), num(2)], fill: BLANK });
    expect([exactPlace(line, BLANK), exactPlace(line, BLANK, true)]).toEqual([2, 9]);
    expect([exactPlace(column([num(1), BLANK, num(2), BLANK]), BLANK), exactPlace(column([num(1)]), BLANK)]).toEqual([1, -1]);
  });

  it('answers 20,000 exact and as many approximate lookups over 20,000 keys without looking at all of them each time', () => {
    const n = 20000;
    let looks = 0;
    const counted = new Proxy(Array.from({ length: n }, (_, i) => num(i)), {
      get: (cells, name) => {
        looks++;
        return Reflect.get(cells, name) as unknown;
      },
    });
    const line = column(counted as Scalar[]);
    for (let i = 0; i < n; i++) {
      expect(exactPlace(line, num(i))).toBe(i);
      expect(lastAtOrBelow(line, num(i + 0.5)).place).toBe(i);
    }
    expect(looks).toBeLessThan(n * 40); // 15 steps of bisection each, and a few passes; a scan each would be 400 million
  });
});
