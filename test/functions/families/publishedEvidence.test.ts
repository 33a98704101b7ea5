import { beforeAll, expect, test } from 'vitest';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});
const one = async (id: string, ...args: Given[]): Promise<number> => (await call(id, ...args))[0][0] as number;

// JCGM 100:2008; the figures of 4.3.3, 4.3.6, 4.3.8, 4.4.5 and 4.4.6 from memory.
test('4.3.3: a mass standard of 1000.000325 g with 240 µg at three standard deviations has 80 µg', async () => expect(await one('STDU_FROM_CERT', 240, 3)).toBe(80));
test('4.3.6: two chances in three for a normal quantity within ±a: u is a, to 4 %', async () => expect(await one('STDU_FROM_CERT', 1, 2 / 3, undefined, 'normal')).toBeCloseTo(1.03, 2));
test('4.3.8: an expansion coefficient between 16.40e-6 and 16.92e-6 per °C has 0.15e-6', async () => {
  const [[middle, u]] = (await call('STDU_FROM_RANGE', 16.4, 16.92)) as number[][];
  expect([middle, u]).toEqual([expect.closeTo(16.66, 12), expect.closeTo(0.15, 3)]);
});
test('4.3.9: the trapezoid runs from the rectangle (1/√3) to the triangle (1/√6): √((1 + β²)/6)', async () => {
  for (const beta of [0, 0.2, 0.5, 0.71, 1]) expect(await one('STDU_FROM_TOL', 1, `trapezoidal ${beta}`)).toBeCloseTo(Math.sqrt((1 + beta * beta) / 6), 14);
});
test('JCGM 101:2008, 6.4.6: arcsine is 1/√2', async () => expect(await one('STDU_FROM_TOL', 1, 'arcsine')).toBeCloseTo(Math.SQRT1_2, 14));
test('4.4.5: 96 °C to 104 °C, rectangular, has 2.3 °C', async () => expect(((await call('STDU_FROM_RANGE', 96, 104)) as number[][])[0]).toEqual([100, expect.closeTo(2.3, 1)]));
test('4.4.6: the same, triangular, has 1.6 °C', async () => expect(((await call('STDU_FROM_RANGE', 96, 104, 'triangular')) as number[][])[0]).toEqual([100, expect.closeTo(1.6, 1)]));

// ASTM E29, rounding method (from memory).
test.each([[59940, 3, 59900], [59950, 3, 60000], [59960, 3, 60000], [56.4, 2, 56], [56.5, 2, 56], [56.6, 2, 57], [40.4, 2, 40], [40.5, 2, 40], [40.6, 2, 41], [0.54, 1, 0.5], [0.55, 1, 0.6], [0.56, 1, 0.6]])(
  'ASTM E29: %d to %d figures is %d', async (value, figures, rounded) => expect(await one('SIG_ROUND', value, figures)).toBe(rounded));

// ISO 80000-1:2009, annex B (from memory).
test.each([[12.223, 3, 12.2], [12.251, 3, 12.3], [12.275, 3, 12.3], [1222.3, 3, 1220], [1225.1, 3, 1230], [1227.5, 3, 1230], [12.25, 3, 12.2], [12.35, 3, 12.4], [1225, 3, 1220], [1235, 3, 1240], [12.254, 3, 12.3]])(
  'ISO 80000-1, annex B, rule A: %d to %d figures is %d', async (value, figures, rounded) => expect(await one('SIG_ROUND', value, figures)).toBe(rounded));
