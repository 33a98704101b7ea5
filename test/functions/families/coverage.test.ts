import { beforeAll, describe, expect, test } from 'vitest';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';
import { expectPrinted, expectRelative } from '../published';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

describe('UNC_FACTOR', () => {
  test('gives the t factors of JCGM 100:2008, Table G.2', async () => {
    const table: [number | string, string, string, string][] = [
      [1, '6.31', '12.71', '63.66'],
      [2, '2.92', '4.30', '9.92'],
      [5, '2.02', '2.57', '4.03'],
      [9, '1.83', '2.26', '3.25'],
      [16, '1.75', '2.12', '2.92'],
      [50, '1.68', '2.01', '2.68'],
      [100, '1.660', '1.984', '2.626'],
      ['inf', '1.645', '1.960', '2.576'],
    ];
    for (const [column, p] of [0.9, 0.95, 0.99].entries()) {
      const rows = await call('UNC_FACTOR', p, table.map(([dof]) => dof));
      table.forEach((row, i) => expectPrinted(rows[i][0], row[column + 1] as string));
    }
  });
  test('truncates degrees of freedom (JCGM 100:2008, G.6.4, step 3): 16.7 counts as 16', async () => {
    expect(await call('UNC_FACTOR', 0.99, 16.7)).toEqual(await call('UNC_FACTOR', 0.99, 16));
  });
  test('gives k of a rectangular distribution: √3 p (closed form), 1.65 at 95 % (JCGM 100:2008, G.1.3)', async () => {
    const [[k]] = await call('UNC_FACTOR', 0.95, undefined, 'rectangular');
    expectRelative(k, 0.95 * Math.sqrt(3), 4e-16);
    expectPrinted(k, '1.65');
  });
  test('refuses what is no probability', async () => {
    expect(await call('UNC_FACTOR', [95, 1, 0.95])).toEqual([
      ['#VALUE! UNC_FACTOR: probability must be a number > 0 and < 1, got 95 in row 1'],
      ['#VALUE! UNC_FACTOR: probability must be a number > 0 and < 1, got 1 in row 2'],
      [expect.closeTo(1.959963984540054, 14)],
    ]);
  });
});

describe('UNC_EXPAND', () => {
  test('expands the mass standard of JCGM 100:2008, 7.2.4: 0.79 mg from 0.35 mg with 9 degrees of freedom', async () => {
    expectPrinted((await call('UNC_EXPAND', 0.35, 0.95, 9))[0][0], '0.79');
    expectPrinted((await call('UNC_FACTOR', 0.95, 9))[0][0], '2.26');
  });
  test('takes coverage from 1 on as k', async () => {
    expect(await call('UNC_EXPAND', 0.5, [2, 3, 1])).toEqual([[1], [1.5], [0.5]]);
  });
  test('takes k = 2 by default, and t at 95.45 % below 50 degrees of freedom (JCGM 100:2008, Table G.2)', async () => {
    expect(await call('UNC_EXPAND', 1)).toEqual([[2]]);
    expect(await call('UNC_EXPAND', 1, undefined, 50)).toEqual([[2]]);
    expectPrinted((await call('UNC_EXPAND', 1, undefined, 10))[0][0], '2.28');
    expectPrinted((await call('UNC_EXPAND', 1, undefined, 45))[0][0], '2.06');
  });
  test('refuses a coverage that may be 0 or blank where it cannot look', async () => {
    const zero = await excel({ blanks: 'zero', parameterAddresses: false });
    expect(await zero('UNC_EXPAND', 1, null)).toEqual([
      ['#VALUE! UNC_EXPAND: coverage is 0 or a blank cell, which cannot be told apart here; leave the argument out'],
    ]);
  });
});
