import { beforeAll, describe, expect, test } from 'vitest';
import { excel } from '../excel';
import type { Given, Shown } from '../excel';

let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
beforeAll(async () => {
  call = await excel();
});

describe('UNC_ROUND', () => {
  test('rounds the examples of JCGM 100:2008, 7.2.6', async () => {
    expect(await call('UNC_ROUND', 10.05762, 0.027)).toEqual([[10.058, 0.027]]); // Ω
    expect(await call('UNC_ROUND', 100, 10.47, undefined, 'up')).toEqual([[100, 11]]); // mΩ
    expect(await call('UNC_ROUND', 100, 28.05, undefined, 'up5')).toEqual([[100, 28]]); // kHz: 28, not 29
  });
  test('rounds by the rule of the Particle Data Group (Review of Particle Physics, Introduction, 5.3)', async () => {
    expect(await call('UNC_ROUND', [0.827, 0.827], [0.119, 0.367], undefined, 'PDG')).toEqual([[0.83, 0.12], [0.8, 0.4]]);
    expect(await call('UNC_ROUND', [12.2135, 12.2135], [0.03215, 0.06515], undefined, 'pdg')).toEqual([[12.214, 0.032], [12.21, 0.07]]);
  });
  test('rounds half to even in decimal (ISO 80000-1:2009, B.3, rule A: 12.25 to 12.2, 12.35 to 12.4)', async () => {
    expect(await call('UNC_ROUND', [12.25, 12.35], 0.1, 1)).toEqual([[12.2, 0.1], [12.4, 0.1]]);
  });
  test('gives blank cells for a blank value and an error for a blank u', async () => {
    expect(await call('UNC_ROUND', [null, 1], [0.1, null])).toEqual([['', ''], Array(2).fill('#VALUE! UNC_ROUND: stdu is blank in row 2')]);
  });
  test('takes a single 0 as a value even where it may be a blank cell, as every worksheet function does, but not in a range', async () => {
    const zero = await excel({ blanks: 'zero', parameterAddresses: false });
    expect(await zero('UNC_ROUND', 0, 0.1)).toEqual([[0, 0.1]]);
    expect(await zero('UNC_ROUND', [0, 1], 0.1)).toEqual([
      Array(2).fill('#VALUE! UNC_ROUND: value is 0 or a blank cell, which cannot be told apart here in row 1; give a range without blanks'),
      [1, 0.1],
    ]);
  });
  test('refuses digits and rules that do not exist', async () => {
    expect(await call('UNC_ROUND', 1, 0.1, 0)).toEqual([['#VALUE! UNC_ROUND: digits must be a whole number from 1 to 15, got 0']]);
    expect(await call('UNC_ROUND', 1, 0.1, 1.5)).toEqual([['#VALUE! UNC_ROUND: digits must be a whole number from 1 to 15, got 1.5']]);
    expect(await call('UNC_ROUND', 1, 0.1, undefined, 'down')).toEqual([['#VALUE! UNC_ROUND: rule must be one of even, up, up5, pdg, got the text "down"']]);
    expect(await call('UNC_ROUND', 1, 0.1, [1, 2])).toEqual([['#VALUE! UNC_ROUND: digits must be one cell, got 2 × 1']]);
  });
});

describe('UNC_TEXT', () => {
  test('writes a mass as JCGM 100:2008, 7.2.2 does, form 2: 100.02147(35) g', async () => {
    expect(await call('UNC_TEXT', 100.02147, 0.00035, 'brackets', undefined, 'g')).toEqual([['100.02147(35) g']]);
  });
  test('writes an expanded uncertainty with its k (JCGM 100:2008, 7.2.4: 100.02147 ± 0.00079 g, k = 2.26)', async () => {
    expect(await call('UNC_TEXT', 100.02147, 0.00035, undefined, undefined, 'g', 2.26)).toEqual([['(100.02147 ± 0.00079) g, k = 2.26']]);
  });
  test('keeps trailing zeros', async () => {
    expect(await call('UNC_TEXT', [12.1, 1200], [0.05, 100], undefined, 1)).toEqual([['12.10 ± 0.05'], ['1200 ± 100']]);
  });
  test('takes the decimal separator of the user', async () => {
    const comma = await excel({ settings: { decimalSeparator: ',' } });
    expect(await comma('UNC_TEXT', 100.02147, 0.00035, 'brackets')).toEqual([['100,02147(35)']]);
  });
  test('refuses k with brackets, and gives "" for a blank value', async () => {
    expect(await call('UNC_TEXT', 1, 0.1, 'brackets', undefined, undefined, 2)).toEqual([
      [expect.stringMatching(/^#VALUE! UNC_TEXT: needs the standard uncertainty alone for brackets, got a coverage factor 2$/)],
    ]);
    expect(await call('UNC_TEXT', [null, 0], 0.1)).toEqual([[''], ['0.00 ± 0.10']]);
  });
});
