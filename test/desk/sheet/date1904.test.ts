import { describe, expect, it } from 'vitest';
import { openBook } from '../../../addin/desk/book/openBook';
import { audit } from '../../../addin/desk/sheet/audit';
import { Desk } from '../../../addin/desk/sheet/Desk';
import { builtFunctions } from './bundle';
import { smallBook } from './smallBook';

const cells = {
  A1: 43831, B1: { f: 'YEAR(A1)', v: 2024 }, B2: { f: 'TEXT(A1,"yyyy-mm-dd")', v: '2024-01-02' }, B3: { f: 'TEXT(A1,"0.0 \\d")', v: '43831.0 d' },
  B4: { f: 'A1+1', v: 43832 }, B5: { f: 'IF(A1>0,1,DATE(2024,1,2))', v: 1 },
};
const book = () => openBook(smallBook({ S: cells }));
const in1904 = () => openBook(smallBook({ S: cells }, {}, '<workbookPr date1904="1"/>'));

describe('a workbook that counts its days from 1904', () => {
  it('has functions of the calendar refused, all others followed', () => {
    const found = audit(in1904());
    expect(found.refused).toEqual([
      { cell: 'S!B1', why: 'uses YEAR in a way that cannot be followed: the workbook counts its days from 1904' },
      { cell: 'S!B2', why: 'uses TEXT in a way that cannot be followed: the workbook counts its days from 1904' },
    ]);
    expect([found.agree, found.differ]).toEqual([3, []]);
  });

  it('is recalculated without a wrong date', async () => {
    const desk = new Desk(in1904(), builtFunctions());
    desk.working.setConstant(0, 1, 1, 43832);
    const { refused } = await desk.recalculate();
    expect(refused.map((r) => r.cell)).toEqual(['S!B1', 'S!B2']);
    expect([desk.working.cell(0, 1, 2)?.value, desk.working.cell(0, 4, 2)?.value]).toEqual([undefined, 43833]);
  });

  it('the same workbook counted from 1900 differs in its dates', () => expect(audit(book()).differ.map((d) => d.cell)).toEqual(['S!B2', 'S!B1']));
});
