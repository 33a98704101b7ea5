import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import { excel } from './excel';
import type { Given, Shown } from './excel';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});
const seed = { seed: 5, numRuns: 300 };
const positive = fc.tuple(fc.integer({ min: 1, max: 99999 }), fc.integer({ min: -8, max: 8 })).map(([m, e]) => Number(`${m}e${e}`));
const value = fc.tuple(fc.integer({ min: -9999999, max: 9999999 }), fc.integer({ min: -8, max: 4 })).map(([m, e]) => Number(`${m}e${e}`));
const column = (list: number[]): Given => list;
const numbers = async (id: string, ...args: Given[]): Promise<number[][]> => (await call(id, ...args)) as number[][];
const close = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-12 * Math.max(Math.abs(a), Math.abs(b)) || a === b;

describe('laws', () => {
  it('rounding is idempotent', () => fc.assert(fc.asyncProperty(value, positive, fc.constantFrom('half-even', 'up', 'up5', 'pdg'), async (x, u, rule) => {
    const given = rule === 'half-even' ? undefined : rule;
    const once = (await numbers('UNC_ROUND', x, u, undefined, given))[0];
    const [first] = await call('UNC_ROUND', x, u, undefined, given);
    fc.pre(typeof first[0] === 'number');
    const twice = (await numbers('UNC_ROUND', once[0], once[1], undefined, given))[0];
    // a rule that drops the second digit may look again at the digits that are left
    if (rule === 'half-even' || rule === 'up') expect(twice).toEqual(once);
    else expect(Math.abs(twice[0] - once[0])).toBeLessThanOrEqual(once[1]);
  }), seed));

  it('what is written in brackets is read back as it was rounded', () => fc.assert(fc.asyncProperty(value, positive, async (x, u) => {
    const [[text]] = await call('UNC_TEXT', x, u, 'brackets');
    fc.pre(typeof text === 'string' && !text.startsWith('#'));
    const [[rx, ru]] = await numbers('UNC_ROUND', x, u);
    const [[found, , , back]] = await numbers('UNC_READ', text);
    expect([close(found, rx), close(back, ru)], text as string).toEqual([true, true]);
  }), seed));

  it('u from a tolerance grows with it in proportion, and lies between triangular and arcsine', () => fc.assert(fc.asyncProperty(
    fc.array(positive, { minLength: 1, maxLength: 6 }), positive, fc.double({ min: 0, max: 1, noNaN: true }), async (list, scale, beta) => {
      for (const shape of ['rectangular', 'triangular', 'arcsine', `trapezoidal ${beta.toFixed(6)}`]) {
        const [u, scaled, least, most] = await Promise.all([
          numbers('STDU_FROM_TOL', column(list), shape), numbers('STDU_FROM_TOL', column(list.map((x) => x * scale)), shape),
          numbers('STDU_FROM_TOL', column(list), 'triangular'), numbers('STDU_FROM_TOL', column(list), 'arcsine'),
        ]);
        list.forEach((_, i) => {
          expect(close(scaled[i][0], u[i][0] * scale)).toBe(true);
          expect(u[i][0] >= least[i][0] * (1 - 1e-14) && u[i][0] <= most[i][0]).toBe(true);
        });
      }
    }), { ...seed, numRuns: 60 }));

  it('a column and its cells one by one agree', () => fc.assert(fc.asyncProperty(
    fc.array(fc.tuple(value, positive, positive), { minLength: 1, maxLength: 5 }), async (rows) => {
      const [xs, us, ls] = [0, 1, 2].map((i) => rows.map((r) => r[i]));
      const calls: [string, Given[], (i: number) => Given[]][] = [
        ['STDU_FROM_RES', [us], (i) => [us[i]]], ['STDU_FROM_CERT', [us, 0.95, 9], (i) => [us[i], 0.95, 9]], ['UNC_ROUND', [xs, us], (i) => [xs[i], us[i]]],
        ['UNC_TEXT', [xs, us, 'plusminus'], (i) => [xs[i], us[i], 'plusminus']], ['UNC_EXPAND', [us, 0.95, ls], (i) => [us[i], 0.95, ls[i]]],
        ['UNC_CONFORM', [xs, us, undefined, ls], (i) => [xs[i], us[i], undefined, ls[i]]], ['UNC_DECIDE', [xs, us, undefined, ls], (i) => [xs[i], us[i], undefined, ls[i]]],
        ['SCORE_ZETA', [xs, us, 1, ls], (i) => [xs[i], us[i], 1, ls[i]]], ['SIG_ROUND', [xs, 3], (i) => [xs[i], 3]],
      ];
      for (const [id, whole, single] of calls) {
        const together = await call(id, ...whole);
        // an error of a column names its row
        const unplaced = (cells: Shown[]): Shown[] => cells.map((c) => (typeof c === 'string' ? c.replace(/ in row \d+$/, '') : c));
        for (const i of rows.keys()) expect([id, (await call(id, ...single(i)))[0]]).toEqual([id, unplaced(together[i])]);
      }
    }), { ...seed, numRuns: 40 }));

  it('a probability of conformity is monotone in its limit and between 0 and 1', () => fc.assert(fc.asyncProperty(value, positive, value, positive, async (x, u, limit, more) => {
    const [[p], [q]] = await numbers('UNC_CONFORM', column([x, x]), column([u, u]), undefined, column([limit, limit + more]));
    expect(p >= 0 && p <= q && q <= 1).toBe(true);
  }), seed));

  it('root sum of squares does not care for the order', () => fc.assert(fc.asyncProperty(fc.array(positive, { minLength: 2, maxLength: 6 }), async (list) => {
    const [[a]] = await numbers('UNC_COMBINE', column(list));
    const [[b]] = await numbers('UNC_COMBINE', column([...list].reverse()));
    expect(close(a, b)).toBe(true);
    expect(a).toBeGreaterThanOrEqual(Math.max(...list) * (1 - 1e-14));
  }), seed));
});
