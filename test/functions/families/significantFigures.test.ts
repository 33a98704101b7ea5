import { beforeAll, describe, expect, test } from 'vitest';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

// Common practice.
describe('significant figures', () => {
  test('are counted a cell', async () => {
    expect(await call('SIG_COUNT', ['12.10', 1200, null, '3 exact'])).toEqual([[4], [2], [''], ['exact']]);
  });
  test('round a column, ties to the even digit, in decimal (ISO 80000-1:2009, annex B, rule A)', async () => {
    expect(await call('SIG_ROUND', [12.25, 12.35, 1235, 0.0996], 3)).toEqual([[12.2], [12.4], [1240], [0.0996]]);
  });
  test('go from step to step with the unrounded value', async () => {
    const [[text, unrounded, figures]] = await call('SIG_SUM', ['12.11', '18.0', null, '1.013'], undefined, true);
    expect([text, unrounded, figures]).toEqual(['31.1', 31.123, 3]);
    expect(await call('SIG_PRODUCT', [unrounded as number, '2.000'], undefined, [figures as number, null])).toEqual([['62.2']]);
    expect(await call('SIG_PRODUCT', '4.50', ['1.5', '2 exact'])).toEqual([['1.5']]);
    expect(await call('SIG_LOG', ['3.2e-4', '1.000'], true)).toEqual([['-3.49', expect.closeTo(-3.494850021680094, 12), 3], ['0.0000', 0, 0]]);
    expect(await call('SIG_ANTILOG', '-3.49')).toEqual([['0.00032']]);
  });
  test('say what is wrong and where', async () => {
    expect(await call('SIG_SUM', ['1.0', '<0.5'])).toEqual([[expect.stringContaining('got "<0.5" in row 2')]]);
    expect(await call('SIG_SUM', ['1.0', '2.0'], [[1, 2]])).toEqual([[expect.stringContaining('figures must have the shape of entries')]]);
    expect(await call('SIG_SUM', [null, null])).toEqual([[expect.stringContaining('entries must hold at least one entry')]]);
  });
});
