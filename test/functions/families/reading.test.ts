import { beforeAll, describe, expect, test } from 'vitest';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

describe('UNC_READ', () => {
  test('spills value, ± as written, k and u, a row a text (JCGM 100:2008, 7.2.2 and 7.2.4, for the notations)', async () => {
    expect(await call('UNC_READ', ['(12.10 ± 0.12) mg/L, k = 2', '12.10(5)', null, '9.806 65 (exact)'])).toEqual([
      [12.1, 0.12, 2, 0.06], [12.1, expect.closeTo(0.05, 15), 1, expect.closeTo(0.05, 15)], ['', '', '', ''], [9.80665, 0, 1, 'exact'],
    ]);
  });
  test('leaves u open where a ± states no k, with words', async () => {
    const [[value, half, k, u]] = await call('UNC_READ', '12.10 ± 0.05');
    expect([value, half, k]).toEqual([12.1, 0.05, '']);
    expect(u).toContain('UNC_READ: the text states no k');
  });
  test('says what it could not read', async () => {
    expect((await call('UNC_READ', 'about 12'))[0][0]).toContain('got "about 12"');
  });
});
