import { readFileSync, readdirSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { openBook } from '../../addin/desk/book/openBook';
import { audit } from '../../addin/desk/sheet/audit';
import { Desk } from '../../addin/desk/sheet/Desk';
import { builtFunctions } from '../desk/sheet/bundle';

const folder = new URL('books/', import.meta.url);
const read = (file: string) => openBook(readFileSync(new URL(file, folder)));
const names = readdirSync(folder).filter((f) => f.endsWith('-xlsxwriter.xlsx')).map((f) => f.replace('-xlsxwriter.xlsx', ''));

const BOOLEAN = 'LibreOffice 7.4, which computed the stored results, takes the TRUE that the library wrote for the number 1';
const PART_OF_YEAR = '"3/4" is a date of the year in which it is read, so no result can be right for good';

const BARE_NAME = 'LibreOffice takes the bare name of a table for all of it with its headings; the vendor\'s documentation, for its data';

/** Cells that are not as stored, or not followed, with the reason. */
const listed: Readonly<Record<string, Readonly<Record<string, string>>>> = {
  store: { 'Later!F3': BARE_NAME },
  solutions: {
    'Mixed!B5': BOOLEAN, 'Mixed!C5': BOOLEAN, 'Mixed!D5': BOOLEAN, 'Mixed!E5': BOOLEAN, 'Mixed!F5': BOOLEAN, 'Mixed!A17': BOOLEAN, 'Mixed!A22': BOOLEAN,
    'Mixed!C11': PART_OF_YEAR,
  },
};

describe('ordinary workbooks, written by XlsxWriter with results of LibreOffice', () => {
  it('are six, of a size that says something', () => {
    expect(names.sort()).toEqual(['calibration', 'control', 'gradebook', 'loan', 'solutions', 'store']);
    expect(names.reduce((n, name) => n + audit(read(`${name}-xlsxwriter.xlsx`)).formulas, 0)).toBeGreaterThan(2000);
  });

  it.each(names)('%s agrees in all but the listed cells', (name) => {
    const found = audit(read(`${name}-xlsxwriter.xlsx`));
    expect([...found.differ, ...found.refused].map((d) => d.cell).sort()).toEqual(Object.keys(listed[name] ?? {}).sort());
    expect(found.unsupported).toEqual([]);
    const compared = found.formulas - found.unstored;
    expect(found.agree / compared).toBeGreaterThan(name === 'solutions' ? 0.97 : 0.99);
  });
});

describe('the same workbooks, written by openpyxl without results', () => {
  it.each(names)('%s: a recalculation gives what LibreOffice gave', async (name) => {
    const desk = new Desk(read(`${name}-openpyxl.xlsx`), builtFunctions());
    const outcome = await desk.recalculate();
    const expected = read(`${name}-xlsxwriter.xlsx`);
    const wrong: string[] = [];
    let compared = 0;
    for (const { index, name: sheet } of expected.sheets) {
      for (const [row, cells] of expected.rows(index)) for (const [col, { value }] of cells) {
        const now = desk.working.cell(index, row, col)?.value;
        const address = `${sheet}!${String.fromCharCode(64 + col)}${row}`;
        if (listed[name]?.[address]) continue;
        compared++;
        if (!same(now, value)) wrong.push(`${address}: ${JSON.stringify(now)} for ${JSON.stringify(value)}`);
      }
    }
    expect(wrong).toEqual([]);
    expect(compared).toBeGreaterThan(200);
    expect(outcome.refused.map((r) => r.cell)).toEqual(name === 'solutions' ? ['Mixed!C11'] : []);
  });
});

function same(now: unknown, stored: unknown): boolean {
  if (typeof now === 'number' && typeof stored === 'number') return Math.abs(now - stored) <= 1e-9 * Math.abs(stored) + 1e-12;
  return JSON.stringify(now ?? '') === JSON.stringify(stored ?? '');
}
