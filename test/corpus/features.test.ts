import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Book } from '../../addin/desk/book/Book';
import { openBook } from '../../addin/desk/book/openBook';
import { applyPlan } from '../../addin/desk/sheet/applyPlan';
import { Desk } from '../../addin/desk/sheet/Desk';
import { builtFunctions } from '../desk/sheet/bundle';
import { libreOfficeVersion } from '../tools/libreOffice';
import { libreOfficeBooks } from '../tools/libreOfficeBooks';
import { cellLooks } from './cellLooks';
import { excelShape } from './excelShape';
import { changedParts, partsOf, withoutColumns } from './untouched';

const file = (name: string): Uint8Array => Uint8Array.from(readFileSync(new URL(`features/${name}.xlsx`, import.meta.url)));
const books: Record<string, Uint8Array> = { xlsxwriter: file('xlsxwriter'), openpyxl: file('openpyxl'), libreoffice: file('libreoffice'), excelShape };
const names = Object.keys(books);

/** Parts that a new column with a number format and a spill may touch, besides its sheet. */
const MAY_CHANGE = ['[Content_Types].xml', 'xl/_rels/workbook.xml.rels', 'xl/calcChain.xml', 'xl/metadata.xml', 'xl/styles.xml'];

const plan = {
  columns: [
    { sheet: 'Results', anchor: 'F3', header: 'u(Volume)', formula: '=ROOTSUM.STDU_FROM_TOL(D4:D15)', mode: 'spill', rows: '4:15', numberFormat: '0.0000' },
    { sheet: 'Results', anchor: 'G3', header: 'u(Result)', formula: '=ROOTSUM.UNC_CARRY(E4:E15,B4:B15,F4:F15)', mode: 'spill', rows: '4:15' },
  ],
} as const;

const after: Record<string, { applied: Uint8Array; values: Uint8Array; recalculated: Uint8Array }> = {};

beforeAll(async () => {
  for (const [name, bytes] of Object.entries(books)) {
    const recalculated = new Desk(openBook(bytes), builtFunctions());
    expect((await recalculated.recalculate()).refused).toEqual([]);
    const desk = new Desk(openBook(bytes), builtFunctions());
    const outcome = await applyPlan(desk, plan);
    expect(outcome.entries.map((e) => e.message ?? e.state)).toEqual(['added', 'added']);
    expect(outcome.recalculation.refused).toEqual([]);
    after[name] = { applied: desk.write(), values: desk.write(true), recalculated: recalculated.write() };
  }
});

const sheetPart = (bytes: Uint8Array): string => openBook(bytes).sheets.find((s) => s.name === 'Results')!.part;
const resultsOf = (book: Book): number => book.sheets.findIndex((s) => s.name === 'Results');

describe.each(names)('a workbook with much beside its cells, by %s', (name) => {
  it('gets u of its results, which are right', () => {
    const book = openBook(after[name].applied);
    const sheet = resultsOf(book);
    for (let row = 4; row <= 15; row++) {
      const [factor, tolerance, u] = [3, 4, 7].map((col) => book.cell(sheet, row, col)!.value as number);
      // E = B·C·1.5 and u(B) = D/√3, so u(E) = C·1.5·D/√3
      expect(u).toBeCloseTo((factor * 1.5 * tolerance) / Math.sqrt(3), 12);
    }
  });

  it('is not touched by a recalculation, but for results that it lacked', () => {
    const changed = changedParts(books[name], after[name].recalculated);
    expect(changed).toEqual(name === 'openpyxl' ? [sheetPart(books[name])] : []);
  });

  it('keeps every part that has nothing to do with the new columns, byte for byte', () => {
    const changed = changedParts(books[name], after[name].applied);
    expect(changed).toContain(sheetPart(books[name]));
    expect(changed.filter((part) => part !== sheetPart(books[name]) && !MAY_CHANGE.includes(part))).toEqual([]);
  });

  it('has its sheet changed in the new cells alone', () => {
    const part = sheetPart(books[name]);
    const [old, now] = [partsOf(books[name])[part], partsOf(after[name].applied)[part]].map((p) => withoutColumns(p, ['F', 'G']));
    const results = /(<c r="E\d+"[^>]*><f>[^<]*<\/f>)<v>[^<]*<\/v>/g; // openpyxl's book had none
    expect(name === 'openpyxl' ? now.replace(results, '$1<v></v>').replace(/<v><\/v>|<v \/>/g, '') : now).toBe(name === 'openpyxl' ? old.replace(/<v><\/v>|<v \/>/g, '') : old);
  });

  it('only gains styles at the end', () => {
    const [old, now] = [books[name], after[name].applied].map(cellLooks);
    expect(now.slice(0, old.length)).toEqual(old);
    expect(now.length).toBeGreaterThan(old.length);
  });

  it('applied to a second time it says so', async () => {
    const desk = new Desk(openBook(after[name].applied), builtFunctions());
    expect((await applyPlan(desk, plan)).entries.map((e) => e.state)).toEqual(['already there', 'already there']);
    expect(changedParts(after[name].applied, desk.write())).toEqual([]);
  });
});

it('macros are kept byte for byte', () => expect(changedParts(books.excelShape, after.excelShape.applied)).not.toContain('xl/vbaProject.bin'));

describe.runIf(libreOfficeVersion() !== undefined)('LibreOffice reads', () => {
  let before: Uint8Array[];
  let now: Uint8Array[];
  beforeAll(() => {
    const all = libreOfficeBooks([...names.map((n) => books[n]), ...names.map((n) => after[n].values)]);
    [before, now] = [all.slice(0, names.length), all.slice(names.length)];
  });

  it.each(names.map((n, i) => [n, i] as const))('%s with the values and looks it had before', (_name, i) => {
    const [old, changed] = [before[i], now[i]];
    const [a, b] = [openBook(old), openBook(changed)];
    const [looksA, looksB] = [cellLooks(old), cellLooks(changed)];
    expect(b.sheets.map((s) => s.name)).toEqual(a.sheets.map((s) => s.name));
    let compared = 0;
    for (const { index, kind } of a.sheets) {
      if (kind !== 'worksheet') continue;
      for (const [row, cells] of a.rows(index)) for (const [col, cell] of cells) {
        if (index === resultsOf(a) && (col === 6 || col === 7) && row >= 3 && row <= 15) continue;
        const other = b.cell(index, row, col);
        expect([row, col, other?.value, other?.formula, looksB[other?.style ?? 0]]).toEqual([row, col, cell.value, cell.formula, looksA[cell.style]]);
        compared++;
      }
    }
    expect(compared).toBeGreaterThan(60);
  });

  it.each(names.map((n, i) => [n, i] as const))('%s with the charts, pictures and comments it had before', (_name, i) => {
    const kept = /^xl\/(charts|media|comments|drawings\/drawing|tables)/;
    // LibreOffice counts parts and axes on from book to book
    const plain = (bytes: Uint8Array): string => Buffer.from(bytes).toString('latin1').replace(/(axId|crossAx) val="\d+"/g, '$1');
    const [old, changed] = [before[i], now[i]].map((bytes) => Object.entries(partsOf(bytes)).filter(([part]) => kept.test(part)).map(([part, content]) => [part.replace(/\d+/g, ''), plain(content)]));
    expect(old.length).toBeGreaterThan(1);
    expect(changed).toEqual(old);
  });
});
