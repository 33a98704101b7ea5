import { describe, expect, it } from 'vitest';
import { registry } from '../../functions/registry';
import { entries } from '../../reference/entries';
import { guide } from '../../reference/guide';
import { referenceFiles } from '../../reference/page';
import { runExample } from './runExample';

describe('the reference', () => {
  it('has an entry for every function, and none for others', () => expect(Object.keys(entries).sort()).toEqual(registry.map((d) => d.name).sort()));

  it.each(Object.entries(entries))('%s: the example shows what it says', async (_name, { example }) => {
    const { shown, refused } = await runExample(example);
    expect(refused).toEqual([]);
    const picked = example.columns ? shown.slice(0, example.shows.length).map((row) => example.columns!.map((c) => row[c - 1])) : shown;
    expect(picked.map((row) => row.length)).toEqual(example.shows.map((row) => row.length));
    example.shows.forEach((row, r) => row.forEach((written, c) => expect(agrees(picked[r][c], written), `${written} for ${String(picked[r][c])}`).toBe(true)));
  });

  it('gives each a purpose, a source and a caution', () => {
    for (const [name, { purpose, source, cautions, formula }] of Object.entries(entries)) {
      expect([purpose, source, formula, ...cautions].every((text) => text.length > 5), name).toBe(true);
      expect(cautions.length, name).toBeGreaterThan(0);
    }
  });

  it('is one page with every function, every argument and the tasks, that loads nothing from elsewhere', () => {
    const files = referenceFiles(registry, entries, '1.2.3');
    const html = files.get('reference.html')!;
    for (const { name, parameters } of registry) {
      expect(html).toContain(`id="${name}"`);
      for (const [key, { label }] of Object.entries(parameters)) expect(html).toContain(`<code>${label ?? key}</code>`);
    }
    for (const { title } of guide) expect(html).toContain(title);
    expect([...html.matchAll(/(?:src|href)="([^"]+)"/g)].map(([, target]) => target).sort()).toEqual(['reference.css', 'reference.js']);
    expect(html).not.toMatch(/undefined|NaN|\[object/);
  });

  it('names in its tasks only functions that exist', () => {
    const named = guide.flatMap((t) => t.steps).flatMap((s) => [...s.matchAll(/ROOTSUM\.([A-Z_]+)|\b((?:UNC|STDU|SD)_[A-Z_]+)/g)].map((m) => m[1] ?? m[2]));
    expect(named.length).toBeGreaterThan(8);
    expect(named.filter((n) => !registry.some((d) => d.name === n))).toEqual([]);
  });
});

/** Whether a value is what is written, to the last digit that is written. */
function agrees(value: unknown, written: string): boolean {
  if (typeof value !== 'number') return value === written;
  const [mantissa, exponent = '0'] = written.toLowerCase().split('e');
  const places = (mantissa.split('.')[1] ?? '').length;
  return Number.isFinite(Number(written)) && Math.abs(value - Number(written)) <= 0.5001 * 10 ** (Number(exponent) - places);
}
