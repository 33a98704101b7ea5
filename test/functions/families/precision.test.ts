import { beforeAll, describe, expect, test } from 'vitest';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';
import { expectPrinted, expectRelative } from '../published';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

describe('SPEC_TOL', () => {
  test('of a voltmeter reading 0.928571 V: 14e-6 of the reading and 2e-6 of the 1 V range are 15 µV (JCGM 100:2008, 4.3.7, example 2)', async () => {
    const [[tolerance]] = await call('SPEC_TOL', 0.928571, 14e-6, 1, 2e-6);
    expectPrinted((tolerance as number) * 1e6, '15');
    expectRelative(tolerance, 14.999994e-6, 1e-14);
    expectPrinted(((await call('STDU_FROM_TOL', tolerance as number))[0][0] as number) * 1e6, '8.7');
  });
  test('adds counts, serves a column, and wants something above 0 (closed form)', async () => {
    expect(await call('SPEC_TOL', [-2, 4, null], 0.01, undefined, undefined, 0.5, 2)).toEqual([[1.02], [1.04], ['']]);
    expect((await call('SPEC_TOL', 5, 0))[0][0]).toContain('gives no half-width above 0');
  });
});

describe('SD_POOL', () => {
  test('of ten series of five: 85 µV with 40 degrees of freedom (JCGM 100:2008, H.5, Table H.9 and H.5.2.2)', async () => {
    const s = [60, 77, 111, 101, 67, 93, 80, 73, 88, 86];
    const [[pooled, dof]] = await call('SD_POOL', s, s.map(() => 4));
    expectPrinted(pooled, '85');
    expectRelative(pooled, 84.886983690081, 1e-13);
    expect(dof).toBe(40);
  });
  test('names a blank beside a number', async () => {
    expect((await call('SD_POOL', [1, 2], [4, null]))[0][0]).toMatch(/dof .*blank/);
    expect((await call('SD_POOL', [1, 2], [4, 5, 6]))[0][0]).toContain('dof must have the shape of deviations, got 3 × 1 for 2 × 1');
  });
});

describe('STDU_FROM_TEMP', () => {
  test('of a 100 mL flask within ±4 °C: 0.084 mL, so 0.05 mL (EURACHEM/CITAC CG 4, A1)', async () => {
    expectPrinted((await call('STDU_FROM_TEMP', 100, 4))[0][0], '0.05');
    expectRelative((await call('STDU_FROM_TEMP', 100, 4))[0][0], 0.084 / Math.sqrt(3), 1e-15);
    expect(await call('STDU_FROM_TEMP', 100, 4, undefined, undefined, true)).toEqual([[expect.closeTo(0.0485, 4), 'inf', 'rectangular']]);
  });
});

describe('STDU_FROM_DUPLICATES', () => {
  test('is √(Σd²/2n), absolute or relative to the means (closed form)', async () => {
    expect(await call('STDU_FROM_DUPLICATES', [1, 4, null], [3, 4, null], undefined, true)).toEqual([[1, 2, 't']]);
    expectRelative((await call('STDU_FROM_DUPLICATES', [9, 20], [11, 20], true))[0][0], 0.1, 1e-15);
  });
  test('refuses pairs that all agree, and halves of pairs', async () => {
    expect((await call('STDU_FROM_DUPLICATES', [1, 2], [1, 2]))[0][0]).toContain('needs at least one pair that differs');
    expect((await call('STDU_FROM_DUPLICATES', [1, 2], [1.1, null]))[0][0]).toContain('second is blank beside a number');
  });
});

describe('STDU_FROM_BIAS', () => {
  test('is the root of the mean square bias and the mean reference uncertainty squared (ISO 11352:2012, 8.3, from memory; closed form)', async () => {
    expect(await call('STDU_FROM_BIAS', [3, -3], [4, 4])).toEqual([[5]]);
    expect(await call('STDU_FROM_BIAS', 3, 4, true)).toEqual([[5, 'inf', 'normal']]);
  });
});
