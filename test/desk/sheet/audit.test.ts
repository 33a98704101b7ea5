import { describe, expect, it } from 'vitest';
import { openBook } from '../../../addin/desk/book/openBook';
import { buildDemoBook } from '../../../addin/desk/demo/buildDemoBook';
import { audit } from '../../../addin/desk/sheet/audit';
import { smallBook } from './smallBook';
import type { SmallCell } from './smallBook';

const auditOf = (cells: Readonly<Record<string, SmallCell>>) => audit(openBook(smallBook({ S: cells })));

describe('audit', () => {
  it('agrees with every formula of the demo laboratory', () => {
    const { formulas, agree, differ, unsupported, refused, volatile, unstored } = audit(openBook(buildDemoBook()));
    expect({ differ, unsupported, refused, volatile, unstored }).toEqual({ differ: [], unsupported: [], refused: [], volatile: 0, unstored: 0 });
    expect(agree).toBe(formulas);
    expect(formulas).toBeGreaterThan(500);
  });

  it('computes each formula from its stored inputs, so that one wrong result is named alone; the worst comes first', () => {
    const found = auditOf({ A1: 2, B1: { f: 'A1*2', v: 5 }, C1: { f: 'B1+1', v: 6 }, D1: { f: 'A1*3', v: 6.1 } });
    expect(found).toMatchObject({ formulas: 3, agree: 1 });
    expect(found.differ).toEqual([
      { cell: 'S!B1', formula: '=A1*2', stored: '5', computed: '4' },
      { cell: 'S!D1', formula: '=A1*3', stored: '6.1', computed: '6' },
    ]);
  });

  it('names functions that cannot be followed with their cells, the most frequent first, and links by cell', () => {
    const found = auditOf({
      A1: { f: 'CUBEVALUE("a")', v: 1 }, A2: { f: 'BAHTTEXT(1)', v: 'x' }, A3: { f: '1+BAHTTEXT(2)', v: 1 },
      A4: { f: 'IF(TRUE,3,CUBEVALUE("a"))', v: 3 },
    });
    expect(found.unsupported).toEqual([{ function: 'BAHTTEXT', cells: ['S!A2', 'S!A3'] }, { function: 'CUBEVALUE', cells: ['S!A1'] }]);
    expect(found.agree).toBe(1);
  });

  it('counts volatile formulas, formulas without a stored result, and the library\'s own', () => {
    const found = auditOf({
      A1: { f: 'TODAY()', v: 45000 }, A2: { f: '1+1', v: null }, A3: { f: '_xldudf_ROOTSUM_UNC_EXPAND(1,2)', v: 2 }, A4: { f: 'A1+1', v: 45001 },
    });
    expect(found).toMatchObject({ formulas: 3, agree: 1, volatile: 1, unstored: 1, library: 1, differ: [] });
  });

  it('allows 1e-9 of the result, or 1e-12 of the terms that made it', () => {
    const one = (value: number) => auditOf({ A1: 1e6, B1: 1e6 - 1e-7, C1: { f: '(A1-B1)*1', v: value } }).agree;
    expect([one(1e-7), one(1e-7 + 1.9e-6), one(1e-7 + 2.1e-6)]).toEqual([1, 1, 0]);
  });
});
