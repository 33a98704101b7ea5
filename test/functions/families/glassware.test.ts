import { beforeAll, describe, expect, test } from 'vitest';
import { glasswareTables } from '../../../functions/engine/evidence/glasswareTables';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

describe('GLASS_TOL', () => {
  test('gives class A flasks as the German verification ordinance, annex 12, has them', async () => {
    const published = { 10: 0.025, 20: 0.04, 25: 0.04, 50: 0.06, 100: 0.1, 200: 0.15, 250: 0.15, 500: 0.25, 1000: 0.4, 2000: 0.6, 5000: 1.2 };
    const rows = await call('GLASS_TOL', 'flask', Object.keys(published).map(Number), 'A', 'ISO');
    expect(rows.flat()).toEqual(Object.values(published));
  });
  test('says where each figure is from', async () => {
    expect(await call('GLASS_TOL', 'flask', [100, 5], undefined, undefined, undefined, true)).toEqual([
      [0.1, 'ISO 1042:1998, class A', 'as in the German verification ordinance, annex 12'],
      [0.025, 'ISO 1042:1998, class A', 'from memory, check against your standard or certificate'],
    ]);
  });
  test('doubles class A for class B by ASTM (scope of ASTM E288)', async () => {
    expect(await call('GLASS_TOL', 'flask', 250, 'B', 'ASTM')).toEqual([[0.24]]);
    expect(await call('GLASS_TOL', 'pipette', 10, 'B', 'ASTM')).toEqual([[0.04]]);
  });
  test('asks for the division of a burette of which there are two, and takes no other', async () => {
    expect(await call('GLASS_TOL', 'burette', 25, 'A', 'ISO', 0.05)).toEqual([[0.03]]);
    expect(await call('GLASS_TOL', 'burette', 50)).toEqual([[0.05]]);
    expect((await call('GLASS_TOL', 'burette', 25))[0][0]).toContain('needs the division of a burette of 25 mL: 0.05, 0.1 mL, got none');
    expect((await call('GLASS_TOL', 'burette', 50, 'A', 'ISO', 0.05))[0][0]).toContain('50 mL: 0.1 mL, got 0.05');
  });
  test('knows cylinders, and the two errors of piston pipettes, which have no class', async () => {
    // figures from memory, as the result says
    expect(await call('GLASS_TOL', 'cylinder', [50, 100], 'B')).toEqual([[1], [1]]);
    expect(await call('GLASS_TOL', 'cylinder', 25, 'A', 'ASTM')).toEqual([[0.17]]);
    expect(await call('GLASS_TOL', 'Piston', 1, undefined, undefined, undefined, true)).toEqual([[0.008, 'ISO 8655-2:2002, systematic error', 'from memory, check against your standard or certificate']]);
    expect(await call('GLASS_TOL', 'piston random', [0.1, 1])).toEqual([[3e-4], [3e-3]]);
    expect((await call('GLASS_TOL', 'piston', 1, 'B'))[0][0]).toContain('needs no class for a piston: ISO 8655-2:2002, systematic error knows none, got B');
    expect((await call('GLASS_TOL', 'piston', 1, 'A', 'ASTM'))[0][0]).toContain('needs a table for piston by ASTM, got none');
  });
  test('has a random error below the systematic one for every piston pipette', () => {
    const [systematic, random] = ['piston', 'piston random'].map((ware) => glasswareTables.find((t) => t.ware === ware)!.A);
    expect(Object.keys(random)).toEqual(Object.keys(systematic));
    for (const [size, limit] of Object.entries(systematic)) expect(random[size]).toBeLessThan(limit);
  });
  test('lists the capacities it knows, and interpolates nothing', async () => {
    expect((await call('GLASS_TOL', 'pipette', 3))[0][0]).toContain('ISO 648:2008, class A: 0.5, 1, 2, 5, 10, 20, 25, 50, 100, 200 mL, got 3');
    expect((await call('GLASS_TOL', 'pipette', 1, 'B'))[0][0]).toContain('ISO 648:2008, class B: 0.5, 2, 5, 10');
  });
  test('has tables in which tolerances do not fall as capacities grow, and class B is at least class A', () => {
    for (const { A, B } of glasswareTables) {
      const sizes = Object.keys(A).filter((size) => !size.includes('('));
      const byVolume = sizes.sort((a, b) => Number(a) - Number(b)).map((size) => A[size]);
      expect(byVolume).toEqual([...byVolume].sort((a, b) => a - b));
      for (const [size, b] of Object.entries(B)) expect(b).toBeGreaterThan(A[size]);
    }
  });
});
