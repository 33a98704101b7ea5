import { assert, integer, property, array, tuple } from 'fast-check';
import { describe, it, expect } from 'vitest';
import { RowIntervals } from '../../../addin/desk/sheet/RowIntervals';

const row = integer({ min: 1, max: 40 });

describe('RowIntervals', () => {
  it('hands out exactly the intervals that cover a row and were not handed out before', () => {
    assert(property(array(tuple(row, row)), array(row), (pairs, asked) => {
      const intervals = pairs.map(([a, b]) => [Math.min(a, b), Math.max(a, b)] as const);
      const index = new RowIntervals<number>();
      intervals.forEach(([first, last], i) => index.add(first, last, i));
      const seen = new Set<number>();
      for (const at of asked) {
        for (const i of index.take(at)) {
          expect(intervals[i][0] <= at && at <= intervals[i][1]).toBe(true);
          seen.add(i);
        }
        intervals.forEach(([first, last], i) => {
          if (first <= at && at <= last) expect(seen.has(i)).toBe(true);
        });
      }
    }), { seed: 20250301 });
  });

  it('reaches the last row of a sheet', () => {
    const index = new RowIntervals<string>();
    index.add(1, 1_048_576, 'all');
    expect([...index.take(1_048_576)]).toEqual(['all']);
  });
});
