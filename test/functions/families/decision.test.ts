import { beforeAll, describe, expect, test } from 'vitest';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';
import { expectPrinted } from '../published';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

describe('UNC_CONFORM', () => {
  test('takes open limits as blank, omitted or none (JCGM 106:2012, 7.3.3 and 7.4: 0.92, 0.99, 0.66)', async () => {
    expectPrinted((await call('UNC_CONFORM', -5.47, 0.05, null, -5.4))[0][0], '0.92');
    expectPrinted((await call('UNC_CONFORM', 509.7, 8.6, 490))[0][0], '0.99');
    expectPrinted((await call('UNC_CONFORM', 509.7, 8.6, 490, 'none'))[0][0], '0.99');
    expectPrinted((await call('UNC_CONFORM', 13.6, 1.8, 12.5, 16.3))[0][0], '0.66');
  });
  test('refuses a call without limits, for each cell', async () => {
    const cells = (await call('UNC_CONFORM', [1, 2], 0.1)).flat();
    for (const cell of cells) expect(cell).toContain('needs at least one limit');
  });
});

describe('UNC_GUARD', () => {
  test('gives the reading from which a speed is rejected (JCGM 106:2012, 8.3.3: 107 km/h)', async () => {
    expectPrinted((await call('UNC_GUARD', 100, 0.02, 'upper', 0.001, 'rejection', true))[0][0], '107');
  });
  test('serves a column of limits', async () => {
    expect((await call('UNC_GUARD', [10, 20, null], 0.1)).map(([cell]) => (typeof cell === 'number' ? cell.toFixed(3) : cell))).toEqual(['9.836', '19.836', '']);
  });
});

describe('UNC_DECIDE', () => {
  test('spills a decision and the rule for each value', async () => {
    const rows = await call('UNC_DECIDE', [5, 9.9, 10.5], 0.1, null, 10);
    expect(rows.map(([decision]) => decision)).toEqual(['pass', 'conditional', 'fail']);
    expect(rows[0][1]).toContain('risk of a wrong pass or fail at most 5 %');
  });
});

describe('scores', () => {
  test('spill with their verdicts', async () => {
    expect(await call('SCORE_Z', [10.5, 9.2], 10, 0.25, true)).toEqual([[2, 'satisfactory'], [expect.closeTo(-3.2, 12), 'unsatisfactory']]);
    expect(await call('SCORE_ZETA', 10.5, 0.3, 10, 0.4)).toEqual([[1]]);
    expect(await call('SCORE_EN', 9.5, 0.6, 10, 0.8, true)).toEqual([[-0.5, 'satisfactory']]);
  });
});

// The z values of JCGM 106:2012, 7.3 (from memory); exact by the normal distribution.
test.each([[0.8, 0.84], [0.9, 1.28], [0.95, 1.64], [0.99, 2.33], [0.999, 3.09]])('a conformance probability of %d takes z = %d', async (p, z) => {
  const [[found]] = (await call('UNC_CONFORM', 0, 1, undefined, z)) as number[][];
  expect(Math.abs(found - p)).toBeLessThan(0.002);
  const [[limit]] = (await call('UNC_GUARD', 0, 1, 'upper', 1 - p)) as number[][];
  expect(limit).toBeCloseTo(-z, 1.9);
});
