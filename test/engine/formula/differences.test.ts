import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { differencesPage } from '../../tools/differencesText';
import { differences } from './differences';
import { formulaOn } from './formulaOn';

describe('known differences from Excel', () => {
  it.each(differences.flatMap((d) => (d.shown ? [[d.about, d.shown] as const] : [])))('%s', (_about, { cells = {}, formula, gives }) => {
    if (gives instanceof RegExp) expect(() => formulaOn(cells, formula)).toThrow(gives);
    else expect(formulaOn(cells, formula).value).toBe(gives);
  });

  it('stand on the page, which is up to date', () => {
    expect(readFileSync(join(import.meta.dirname, '..', '..', '..', 'DIFFERENCES.md'), 'utf8')).toBe(differencesPage());
  });
});
