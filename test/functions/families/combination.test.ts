import { beforeAll, describe, expect, test } from 'vitest';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';
import { expectPrinted, expectRelative } from '../published';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

// A sum of a few squares and a root: some units of 2^-53.
const binary = 1e-15;
const ten = Array.from({ length: 10 }, (_, i) => i);

describe('UNC_COMBINE', () => {
  test('combines three contributions to a length difference (JCGM 100:2008, H.1.3.2): 9.7 nm with 25.6 degrees of freedom', async () => {
    const certificate = (await call('STDU_FROM_CERT', 10, 0.95, 5))[0][0] as number;
    const [[u, dof, shape]] = await call('UNC_COMBINE', [[13 / Math.sqrt(5), 24], [certificate, 5], [20 / 3, 8]], undefined, undefined, true);
    expectPrinted(u, '9.7');
    expectPrinted(dof, '25.6');
    expect(shape).toBe('t');
  });
  test('combines the components of an end gauge (JCGM 100:2008, Table H.1 and H.1.7): 32 nm with 16.7 degrees of freedom', async () => {
    // u(x), degrees of freedom, sensitivity, from H.1.3: unrounded components, as G.4 wants them.
    const length = 50.000623e6; // nm
    const difference = Math.sqrt((13 ** 2 / 5) + (10 / 2.5705818356363) ** 2 + (20 / 3) ** 2);
    const rows: [number, number | string][] = [
      [25, 18],
      [difference, 25.6213],
      [1e-6 / Math.sqrt(3), 50],
      [0.05 / Math.sqrt(3), 2],
    ];
    const sensitivities = [1, 1, -length * -0.1, -length * 11.5e-6];
    const [[u, dof]] = await call('UNC_COMBINE', rows, sensitivities, undefined, true);
    expectPrinted(u, '32');
    expectPrinted(dof, '16.7');
  });
  test('adds ten resistors compared with one standard linearly, 1 Ω, or in quadrature, 0.32 Ω (JCGM 100:2008, 5.2.2, example)', async () => {
    const matrix = (r: number) => ten.map((i) => ten.map((j) => (i === j ? 1 : r)));
    expectRelative((await call('UNC_COMBINE', ten.map(() => 0.1), undefined, matrix(1)))[0][0], 1, binary);
    expectRelative((await call('UNC_COMBINE', ten.map(() => [0.1, null, null, 'standard'])))[0][0], 1, binary);
    expectPrinted((await call('UNC_COMBINE', ten.map(() => 0.1), undefined, matrix(0)))[0][0], '0.32');
    expectPrinted((await call('UNC_COMBINE', ten.map(() => 0.1)))[0][0], '0.32');
  });
  test('gives the effective degrees of freedom of a product (JCGM 100:2008, G.4.1, example): 1.03 % with 19.0', async () => {
    const [[u, dof]] = await call('UNC_COMBINE', [[0.25, 9], [0.57, 4], [0.82, 14]], undefined, undefined, true);
    expectPrinted(u, '1.03');
    expectPrinted(dof, '19.0');
  });
  test('adds effects of one tag with their signs (closed form)', async () => {
    // |3·2 − 1·2| = 4 beside 3: 5.
    expectRelative((await call('UNC_COMBINE', [[2, 9, null, ' T '], [2, 9, null, 't'], [3, 9]], [3, -1, 1]))[0][0], 5, binary);
    expect(await call('UNC_COMBINE', [[2, null, null, 'T'], [2, null, null, 'T']], [1, -1])).toEqual([[0]]);
  });
  test('counts one tag and one group as one evaluation (closed form)', async () => {
    // Two effects of 1 and 1: shared 2 with 9 degrees of freedom; grouped √2 with 9; separate √2 with 18.
    const dofOf = async (...labels: (string | null)[][]) =>
      (await call('UNC_COMBINE', labels.map((label) => [1, 9, null, ...label]), undefined, undefined, true))[0];
    expect(await dofOf(['T', null], ['T', null])).toEqual([2, 9, 't']);
    expect(await dofOf([null, 'A'], [null, 'a '])).toEqual([expect.closeTo(Math.SQRT2, 14), 9, 't']);
    expect(await dofOf([null, null], ['each', null])).toEqual([expect.closeTo(Math.SQRT2, 14), 18, 't']);
  });
  test('makes a correlation of weighted tags (closed form)', async () => {
    // r = 0.8 · 0.6: u² = 1 + 1 + 2 · 0.48.
    expectRelative((await call('UNC_COMBINE', [[1, null, null, 'a:0.8'], [1, null, null, 'A:0.6; b:0.8']]))[0][0], Math.sqrt(2.96), binary);
  });
  test('gives no effective degrees of freedom where correlated components have finite ones', async () => {
    const [[u, ...rest]] = await call('UNC_COMBINE', [[1, 5], [1, 5]], undefined, [[1, 0.48], [0.48, 1]], true);
    expectRelative(u, Math.sqrt(2.96), binary);
    for (const cell of rest) expect(cell).toMatch(/^#VALUE! UNC_COMBINE: correlations: correlated components of finite degrees of freedom/);
  });
  test('passes blank rows over with their sensitivity, and takes exact as no doubt', async () => {
    expect(await call('UNC_COMBINE', [3, null, 4], [1, null, 1])).toEqual([[5]]);
    expect(await call('UNC_COMBINE', [3, 'exact', 4], [[1, 7, 1]])).toEqual([[5]]);
    expect(await call('UNC_COMBINE', [['exact', null, null, 'T'], [3, 9, null, 'T']])).toEqual([[3]]);
    expect(await call('UNC_COMBINE', [null, null])).toEqual([['']]);
  });
  test('refuses what is no evidence, naming the row', async () => {
    const refused = async (...args: Given[]) => (await call('UNC_COMBINE', ...args))[0][0];
    expect(await refused([3, 'x'])).toBe('#VALUE! UNC_COMBINE: evidence: u must be a number > 0 or exact, got the text "x" in row 2');
    expect(await refused([3, 0])).toBe('#VALUE! UNC_COMBINE: evidence: u is 0; write exact where there is no doubt in row 2');
    expect(await refused([[3, 9], [null, 9]])).toMatch(/evidence: u is blank; write exact/);
    expect(await refused([[1, 9, null, 'T'], [1, 8, null, 'T']])).toBe(
      '#VALUE! UNC_COMBINE: evidence: tag "T" is used with 9 and with 8 degrees of freedom in row 2, column 1',
    );
    expect(await refused([[1, null, null, 'T'], [2, null, null, null]], undefined, [[1, 0], [0, 1]])).toMatch(/correlations cannot be given together with tags/);
    expect(await refused([[1, 1, 1, 1, 1, 1]])).toBe('#VALUE! UNC_COMBINE: evidence must have 1 to 5 columns, got 1 × 6');
    expect(await refused([1, 2], [1])).toBe('#VALUE! UNC_COMBINE: sensitivities must be 2 × 1 as evidence has 2 rows, got 1 × 1');
    expect(await refused([1, 2], undefined, [[1, 0], [0.5, 1]])).toMatch(/^#VALUE! UNC_COMBINE: needs symmetric correlations, /);
    expect(await refused([1, 2], undefined, [1, 0])).toBe('#VALUE! UNC_COMBINE: correlations must be 2 × 2 as evidence has 2 rows, got 2 × 1');
  });
});
