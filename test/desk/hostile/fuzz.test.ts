import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { Book } from '../../../addin/desk/book/Book';
import { BookError } from '../../../addin/desk/book/BookError';
import { openBook } from '../../../addin/desk/book/openBook';
import { writeBook } from '../../../addin/desk/book/writeBook';
import { seededDraws } from '../../../addin/desk/demo/seededDraws';
import { audit } from '../../../addin/desk/sheet/audit';
import { Desk } from '../../../addin/desk/sheet/Desk';
import { builtFunctions } from '../sheet/bundle';
import { mutateBytes, mutateXml } from './mutate';
import { victim } from './victim';

const ordinary = Uint8Array.from(readFileSync(new URL('../../corpus/books/store-xlsxwriter.xlsx', import.meta.url)));

/** The book, or undefined where it is refused in one line of words. Any other exception is a bug and passes. */
function opened(bytes: Uint8Array): Book | undefined {
  try {
    return openBook(bytes);
  } catch (problem) {
    if (!(problem instanceof BookError)) throw problem;
    expect(problem.message).toMatch(/^.{5,600}$/u);
    return undefined;
  }
}

function cellsOf(book: Book): Map<string, string> {
  const cells = new Map<string, string>();
  for (const { index, name, kind } of book.sheets) {
    if (kind !== 'worksheet') continue;
    for (const [row, list] of book.rows(index)) for (const [col, { value, formula }] of list) if (value != null || formula !== undefined) cells.set(`${name}!${row},${col}`, JSON.stringify([value, formula]));
  }
  return cells;
}

/** A number written into a free cell: nothing else may change. */
function writes(book: Book): void {
  const sheet = book.sheets.findIndex((s) => s.kind === 'worksheet');
  if (sheet < 0) return;
  const before = cellsOf(book);
  let bytes: Uint8Array;
  try {
    bytes = writeBook(book, [{ set: 'constant', sheet, row: 900, col: 30, value: 0.1 }]);
  } catch (problem) {
    if (!(problem instanceof BookError)) throw problem;
    return;
  }
  before.set(`${book.sheets[sheet].name}!900,30`, '[0.1,null]');
  expect(cellsOf(openBook(bytes))).toEqual(before);
}

/** Results that are left open are computed, written, and agree with their formulas when the file is read again. */
async function recalculates(book: Book): Promise<void> {
  let desk: Desk;
  let bytes: Uint8Array;
  try {
    desk = new Desk(book, builtFunctions());
    await desk.recalculate();
    bytes = desk.write();
  } catch (problem) {
    if (!(problem instanceof BookError)) throw problem;
    return;
  }
  const wrongBefore = new Set(audit(book).differ.map((d) => d.cell));
  const wrong = audit(openBook(bytes)).differ.filter((d) => !wrongBefore.has(d.cell));
  expect(wrong).toEqual([]);
}

describe('10,000 mutations end in a refusal or in a book that is read, audited and written right', () => {
  it('4,000 of the bytes of an archive: never another content than the one that was packed', () => {
    const draws = seededDraws(1);
    const content = cellsOf(openBook(victim));
    let refused = 0;
    for (let i = 0; i < 4000; i++) {
      const book = opened(mutateBytes(victim, draws));
      if (book) expect(cellsOf(book)).toEqual(content);
      else refused++;
    }
    expect(refused).toBeGreaterThan(2000);
    expect(refused).toBeLessThan(4000);
  });

  it('5,500 of the XML of a small book with a bit of everything', async () => {
    const draws = seededDraws(2);
    let refused = 0;
    for (let i = 0; i < 5500; i++) {
      const book = opened(mutateXml(victim, draws));
      if (!book) refused++;
      else {
        audit(book);
        writes(book);
        if (i % 20 === 0) await recalculates(book);
      }
    }
    expect(refused).toBeGreaterThan(500);
    expect(refused).toBeLessThan(5000);
  });

  it('500 of an ordinary workbook', async () => {
    const draws = seededDraws(3);
    let read = 0;
    for (let i = 0; i < 500; i++) {
      const book = opened(i % 2 ? mutateXml(ordinary, draws) : mutateBytes(ordinary, draws));
      if (!book) continue;
      read++;
      const { agree, formulas } = audit(book);
      expect(agree).toBeLessThanOrEqual(formulas);
      writes(book);
      if (i % 25 === 1) await recalculates(book);
    }
    expect(read).toBeGreaterThan(50);
  });
});
