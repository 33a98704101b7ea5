import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { openBook } from '../../addin/desk/book/openBook';
import { buildDemoBook } from '../../addin/desk/demo/buildDemoBook';
import { audit } from '../../addin/desk/sheet/audit';
import { nativeNames } from '../../functions/engine/formula/natives';
import { libreOfficeVersion } from '../tools/libreOffice';
import { libreOfficeBook } from '../tools/libreOfficeBook';
import { goldenCalls } from './calls';
import { disagreements } from './disagreements';
import { withoutGolden } from './withoutGolden';

const books = [...goldenCalls].map(([family, calls]) => {
  const found = audit(openBook(readFileSync(join(import.meta.dirname, 'books', `${family}.xlsx`))));
  const formulaOf = (cell: string): string => {
    const [sheet, place] = cell.replace(/'/g, '').split('!');
    return calls.find((c) => c.name === sheet)?.formulas[Number(place.slice(1)) - 1] ?? cell;
  };
  return { family, calls, found, formulaOf };
});

const natives = new Set(nativeNames());

/** A formula differs, or is refused, only where the list says why. */
describe.each(books)('the golden workbook $family', ({ calls, found, formulaOf }) => {
  it('agrees in all but the listed cells', () => {
    const off = found.differ.map((d) => ({ formula: formulaOf(d.cell), theirs: d.stored, ours: d.computed }));
    expect(off.filter(({ formula }) => !disagreements.has(formula))).toEqual([]);
    expect(found.refused.map((r) => ({ ...r, formula: formulaOf(r.cell) })).filter(({ formula }) => !disagreements.has(formula))).toEqual([]);
  });

  it('has a result for every call, and every function that cannot be followed is named with its cells', () => {
    const unread = calls.filter((c) => !natives.has(c.name));
    expect(found.unstored).toBe(0);
    expect(found.unsupported.map((u) => u.function).sort()).toEqual(unread.map((c) => c.name).sort());
    const cells = calls.filter((c) => natives.has(c.name)).reduce((n, c) => n + c.formulas.length, 0);
    expect(found.agree).toBeGreaterThanOrEqual(cells - found.differ.length - found.refused.length);
  });
});

describe('the golden workbooks together', () => {
  const called = new Set(books.flatMap((b) => b.calls.map((c) => c.name)));

  it('call every native function that the other program has', () => {
    expect(nativeNames().filter((name) => !called.has(name) && !withoutGolden.has(name))).toEqual([]);
    expect([...withoutGolden].filter((name) => called.has(name))).toEqual([]);
  });

  it('have no disagreement listed that is none', () => {
    const off = new Set(books.flatMap((b) => [...b.found.differ, ...b.found.refused].map(({ cell }) => b.formulaOf(cell))));
    expect([...disagreements.keys()].filter((formula) => !off.has(formula))).toEqual([]);
  });
});

const version = libreOfficeVersion();

if (version === undefined) {
  console.log('the demo workbook was not saved by LibreOffice and audited, for soffice is not on this machine');
} else {
  describe(`the demo workbook as ${version} saves it`, () => {
    it('reads right in every formula cell', () => {
      const { formulas, agree, differ, unsupported, refused } = audit(openBook(libreOfficeBook(buildDemoBook())));
      expect({ differ, unsupported, refused }).toEqual({ differ: [], unsupported: [], refused: [] });
      expect(agree).toBe(formulas);
      expect(formulas).toBeGreaterThan(500);
    });
  });
}
