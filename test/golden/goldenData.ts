import type { SmallCell } from '../desk/sheet/smallBook';

const columns: Readonly<Record<string, readonly SmallCell[]>> = {
  A: [3, 1.5, -2, 7, 7, 0.25, 12, 5],
  B: [2, 4, 6, 8.5, 1, 3, 9, 5.5],
  C: [4, 'apple', { f: 'TRUE()' }, { f: '""' }, '7', 2, '', -1],
  D: ['pear', 'Apple', 'fig', 'apple pie', 'Fig', 'plum*', 'peach', 'a'],
  E: [1, 2, 4, 8, 16, 32],
  F: [45292, 45306, 45350, 45657, 36526],
  G: [10, 20, 30, 25, 10, 5],
  H: [2, 1, 0],
  I: [1, 3, -1],
  J: [0, -1, 4],
  K: [{ f: '1/0' }],
  M: ['tree', 'apple', 'pear', 'apple', 'cherry'],
  N: ['age', 20, 12, 14, 13],
  O: ['size', 18, 12, 13, 13],
  Q: ['tree', 'apple'],
  R: ['size', '>13'],
};

/** The cells of the sheet Data. */
export const goldenData: Readonly<Record<string, SmallCell>> = Object.fromEntries(
  Object.entries(columns).flatMap(([letter, cells]) => cells.map((cell, i) => [`${letter}${i + 1}`, cell])),
);

/** The names by which calls speak of its ranges. */
export const goldenNames: Readonly<Record<string, string>> = Object.fromEntries(Object.entries({
  nums: 'A1:A8', other: 'B1:B8', mixed: 'C1:C8', words: 'D1:D8', sorted: 'E1:E6', days: 'F1:F5', counts: 'G1:G6', square: 'H1:J3', bad: 'K1',
  table: 'M1:O5', wanted: 'Q1:R2',
}).map(([name, range]) => [name, `Data!${range.replace(/([A-Z])(\d)/g, '$$$1$$$2')}`]));
