import { describe, expect, it } from 'vitest';
import { excelPort } from '../../../addin/excel/excelPort';
import { openBook } from '../../../addin/desk/book/openBook';
import { bookPort } from '../../../addin/desk/sheet/bookPort';
import { FunctionNames } from '../../../addin/desk/sheet/functionNames';
import { WorkingBook } from '../../../addin/desk/sheet/WorkingBook';
import { callOn } from '../../functions/carry/callOn';
import { smallBook } from '../../desk/sheet/smallBook';
import { fakeExcel } from './fakeExcel';
import type { FakeBook, FakeCell } from './fakeExcel';

const cells = {
  A1: 'Volume', B1: 'Factor', C1: 'Result', A2: 10, B2: 2, C2: { f: '=A2*B2*Twice', v: 40 }, A3: 20, B3: 3, C3: { f: '=A3*B3*Twice', v: 120 },
  E1: 0.1, E2: 0.2, F1: 2, G1: { f: '=1/0', v: { error: '#DIV/0!' } }, H1: '=A1', I1: true, D2: { f: '=A2:A3*2', v: 20 }, D3: { f: '=A2:A3*2', v: 40 },
};
const book: FakeBook = {
  sheets: { "Lab's": { cells: { ...cells }, spills: { D2: [2, 1] }, hiddenRows: [2, 3], filtered: { first: 2, rows: 2 } }, Empty: { cells: {} } },
  names: [{ name: 'Twice', formula: "='Lab''s'!$F$1" }, { name: 'Half', formula: '0.5', sheet: 'Empty' }],
  tables: [{ name: 'T', address: "'Lab''s'!A1:C3", columns: ['Volume', 'Factor', 'Result'] }],
};
const area = (row: number, col: number, rows: number, cols: number) => ({ sheet: "Lab's", row, col, rows, cols });

describe('the port over Office.js', () => {
  it('knows sheets, names and tables', async () => {
    const port = excelPort(fakeExcel(book).run);
    expect(await port.sheets()).toEqual([{ name: "Lab's", rows: 3, cols: 9 }, { name: 'Empty', rows: 0, cols: 0 }]);
    expect(await port.names()).toEqual([{ name: 'Twice', formula: "='Lab''s'!R1C6" }, { name: 'Half', formula: '=0.5', sheet: 'Empty' }]);
    expect(await port.tables()).toEqual([{ name: 'T', area: area(1, 1, 3, 3), columns: ['Volume', 'Factor', 'Result'], headerRows: 1, totalsRows: 0 }]);
    expect(await port.date1904()).toBe(false);
  });

  it('tells formulas, constants, errors and blanks apart; a text that begins with = is no formula', async () => {
    const [{ cells: found }] = await excelPort(fakeExcel(book).run).read([area(1, 1, 2, 9)]);
    expect(found.slice(0, 9)).toEqual([{ value: 'Volume' }, { value: 'Factor' }, { value: 'Result' }, null, { value: 0.1 }, { value: 2 }, { value: { error: '#DIV/0!' }, formula: '=1/0' }, { value: '=A1' }, { value: true }]);
    expect(found[11]).toEqual({ value: 40, formula: '=RC[-2]*RC[-1]*Twice' });
  });

  it('tells the anchor of a spill from its other cells, which are no constants', async () => {
    const [{ cells: found }] = await excelPort(fakeExcel(book).run).read([area(2, 4, 2, 1)]);
    expect(found).toEqual([{ value: 20, formula: '=RC[-3]:R[1]C[-3]*2', array: { rows: 2, cols: 1 } }, { value: 40, partOf: { row: 2, col: 4 } }]);
  });

  it('counts a formatted cell as used, for a formula that shows nothing may stand there', async () =>
    expect(await excelPort(fakeExcel({ sheets: { S: { cells: { B2: 1 }, formats: { D9: '0.0' } } } }).run).sheets()).toEqual([{ name: 'S', rows: 9, cols: 4 }]));

  it('leaves out names whose references are relative or cannot be read: a formula that uses one is refused', async () => {
    const relative = fakeExcel({
      sheets: { S: { cells: { A1: 2, B1: 3, C1: { f: '=B1*Left', v: 6 } } } },
      names: [{ name: 'Left', formula: '=S!A1' }, { name: 'Half', formula: '=S!$A1' }, { name: 'Torn', formula: '=S!$A$1+' }, { name: 'Fixed', formula: '=S!$A$1' }],
    });
    const port = excelPort(relative.run);
    expect((await port.names()).map((n) => n.name)).not.toContain('Left');
    expect((await port.names()).map((n) => n.name)).toContain('Fixed');
    expect((await port.names()).map((n) => n.name)).not.toContain('Half');
    const [[shown]] = await callOn(port, 'UNC_CARRY', ['S!C1'], ['S!B1', { literal: 0.1 }]);
    expect(shown).toMatch(/^#VALUE! UNC_CARRY: cell C1 .*Left|^#VALUE! UNC_CARRY: cell C1 .*#NAME\?/);
  });

  it('tells which rows do not show, and which of them a filter leaves out', async () =>
    expect(await excelPort(fakeExcel(book).run).hiddenRows("Lab's")).toEqual([{ row: 2, filtered: false }, { row: 3, filtered: true }]));

  it('a filter of a table leaves out rows of its body alone, wherever the used range begins', async () => {
    const filtered = fakeExcel({
      sheets: { S: { cells: Object.fromEntries([3, 4, 5, 6, 7, 8].map((r) => [`B${r}`, r])), hiddenRows: [5, 7, 8] } },
      tables: [{ name: 'T', address: 'S!B3:B7', columns: ['x'], showTotals: true, isFiltered: true }],
    });
    expect(await excelPort(filtered.run).hiddenRows('S')).toEqual([{ row: 5, filtered: true }, { row: 7, filtered: false }, { row: 8, filtered: false }]);
  });

  it('takes a cell of a protected sheet for hidden where its formula may be', async () => {
    const locked = fakeExcel({ sheets: { S: { cells: { A1: 1, B1: { f: '=A1*2', v: 2 }, C1: { f: '=A1*3', v: 3 } }, isProtected: true, hiddenFormulas: ['B1'] } } });
    const [{ cells: found }] = await excelPort(locked.run).read([{ sheet: 'S', row: 1, col: 1, rows: 1, cols: 3 }]);
    expect(found.map((c) => c?.hidden ?? false)).toEqual([false, true, false]);
    expect(await callOn(excelPort(locked.run), 'UNC_CARRY', ['S!B1'], ['S!A1', { literal: 0.1 }])).toEqual([['#VALUE! UNC_CARRY: cell B1 may hide its formula (the sheet is protected), so it cannot be followed']]);
  });

  it('makes no more round trips for more cells, and one batch for many areas', async () => {
    const many = Object.fromEntries(Array.from({ length: 400 }, (_, i) => [`A${i + 1}`, i]));
    const small = fakeExcel({ sheets: { S: { cells: { A1: 1 } } } });
    const large = fakeExcel({ sheets: { S: { cells: many } } });
    await excelPort(small.run).read([{ sheet: 'S', row: 1, col: 1, rows: 1, cols: 1 }]);
    await excelPort(large.run).read(Array.from({ length: 20 }, (_, i) => ({ sheet: 'S', row: 1 + i * 20, col: 1, rows: 20, cols: 2 })));
    expect([large.count, small.count]).toEqual([{ syncs: 1, runs: 1 }, { syncs: 1, runs: 1 }]);
    const spilled = fakeExcel(book);
    await excelPort(spilled.run).read([area(1, 1, 3, 9)]);
    expect(spilled.count.syncs).toBe(3);
    const longSpill = fakeExcel({ sheets: { S: { cells: Object.fromEntries(Array.from({ length: 200 }, (_, i) => [`A${i + 1}`, { f: '=SEQUENCE(200)', v: i + 1 }])), spills: { A1: [200, 1] } } } });
    await excelPort(longSpill.run).read([{ sheet: 'S', row: 1, col: 1, rows: 200, cols: 5 }]);
    expect(longSpill.count.syncs).toBe(3);
  });

  it('refuses to read what is too large, in words', () =>
    expect(excelPort(fakeExcel(book).run).read([area(1, 1, 1048576, 16384)])).rejects.toThrow('17179869184 cells would have to be read at once'));

  it('reads in several trips what one does not carry, and cuts in halves what is still too large', async () => {
    const column = Object.fromEntries(Array.from({ length: 3000 }, (_, i) => [`A${i + 1}`, i]));
    const wide = fakeExcel({ sheets: { S: { cells: column } } });
    const whole = { sheet: 'S', row: 1, col: 1, rows: 3000, cols: 16 };
    const [{ cells: found }] = await excelPort(wide.run).read([whole]);
    expect(wide.count).toEqual({ runs: 1, syncs: 2 }); // 48,000 cells, 25,000 a trip
    expect(found.length).toBe(48_000);
    expect([found[0], found[1], found[16], found[2999 * 16]]).toEqual([{ value: 0 }, null, { value: 1 }, { value: 2999 }]);
    const narrow = fakeExcel({ sheets: { S: { cells: column } }, mostCells: 7000 });
    expect((await excelPort(narrow.run).read([whole]))[0].cells).toEqual(found);
    await expect(excelPort(fakeExcel({ sheets: { S: { cells: column } }, mostCells: 15 }).run).read([whole])).rejects.toThrow('Excel does not send so much at once: refer to smaller ranges');
  });

  it('says in words what Excel refuses', () =>
    expect(excelPort(fakeExcel(book).run).read([{ ...area(1, 1, 1, 1), sheet: 'Gone' }])).rejects.toThrow('Excel does not find a sheet any more'));

  it('has a new revision in every turn, and one within a turn', async () => {
    const port = excelPort(fakeExcel(book).run);
    const first = port.revision();
    expect(port.revision()).toBe(first);
    port.changed();
    expect(port.revision()).toBe(first + 1);
    await new Promise((later) => setTimeout(later, 5));
    expect(port.revision()).toBe(first + 2);
  });

  it('gives the same u as the desk, bit for bit', async () => {
    const desk = bookPort(new WorkingBook(openBook(smallBook({ S: { A2: 10.1, B2: 2.3, C2: { f: 'A2*B2^0.5', v: 10.1 * 2.3 ** 0.5 }, A3: 20.7, B3: 3.1, C3: { f: 'A3*B3^0.5', v: 20.7 * 3.1 ** 0.5 }, D2: 0.1, D3: 0.3, E2: 0.07, E3: 0.02 } })), new FunctionNames([])));
    const excel = fakeExcel({ sheets: { S: { cells: { A2: 10.1, B2: 2.3, C2: { f: '=A2*B2^0.5', v: 10.1 * 2.3 ** 0.5 }, A3: 20.7, B3: 3.1, C3: { f: '=A3*B3^0.5', v: 20.7 * 3.1 ** 0.5 }, D2: 0.1, D3: 0.3, E2: 0.07, E3: 0.02 } } } });
    const args = ['S!A2:A3', 'S!D2:D3', 'S!B2:B3', 'S!E2:E3'];
    const [a, b] = [await callOn(desk, 'UNC_CARRY', ['S!C2:C3'], args), await callOn(excelPort(excel.run), 'UNC_CARRY', ['S!C2:C3'], args)];
    expect(b).toEqual(a);
    // c(A) = √B, c(B) = A/(2√B)
    expect(a[0][0]).toBeCloseTo(Math.hypot(Math.sqrt(2.3) * 0.1, (10.1 / (2 * Math.sqrt(2.3))) * 0.07), 12);
  });

  describe('array formulas of before spills', () => {
    // C1:C3 {=A1:A3*2}: every cell shows the same formula
    const doubled = { C1: { f: '=A1:A3*2', v: 10 }, C2: { f: '=A1:A3*2', v: 10 }, C3: { f: '=A1:A3*2', v: 14 } };
    const legacyBook = (more: Record<string, FakeCell> = {}): FakeBook => ({ sheets: { S: { cells: { A1: 5, A2: 5, A3: 7, B1: 0.1, B2: 0.2, B3: 0.3, ...doubled, ...more }, legacy: { C1: [3, 1] } } } });

    it('are told from formulas of their own', async () => {
      const [{ cells: found }] = await excelPort(fakeExcel(legacyBook()).run).read([{ sheet: 'S', row: 1, col: 3, rows: 3, cols: 1 }]);
      expect(found).toEqual([{ value: 10, formula: '=RC[-2]:R[2]C[-2]*2', array: { rows: 3, cols: 1 } }, { value: 10, partOf: { row: 1, col: 3 } }, { value: 14, partOf: { row: 1, col: 3 } }]);
    });

    it('give the u of the right row where two rows show the same, as on the desk', async () => {
      const args = ['S!A1:A3', 'S!B1:B3'];
      const desk = bookPort(new WorkingBook(openBook(smallBook({ S: { A1: 5, A2: 5, A3: 7, B1: 0.1, B2: 0.2, B3: 0.3, C1: { f: 'A1:A3*2', v: 10, legacy: 'C1:C3' }, C2: 10, C3: 14 } })), new FunctionNames([])));
      const there = await callOn(excelPort(fakeExcel(legacyBook()).run), 'UNC_CARRY', ['S!C1:C3'], args);
      expect(there).toEqual([[0.2], [0.4], [0.6]]); // 2 u(A)
      expect(there).toEqual(await callOn(desk, 'UNC_CARRY', ['S!C1:C3'], args));
    });

    it('are refused where their range cannot be told', async () => {
      const port = excelPort(fakeExcel(legacyBook()).run);
      for (const rows of [1, 2]) {
        const [{ cells: found }] = await port.read([{ sheet: 'S', row: 1, col: 3, rows, cols: 1 }]);
        expect(found.map((c) => c?.formula)).toEqual(Array(rows).fill('=LEGACY.ARRAY()'));
      }
      const corner = fakeExcel({ sheets: { S: { cells: { A1: 1, C1: { f: '=$A$1', v: 1 }, C2: { f: '=$A$1', v: 1 }, D1: { f: '=$A$1', v: 1 } }, saved: ['C1', 'C2', 'D1'] } } });
      expect((await callOn(excelPort(corner.run), 'UNC_CARRY', ['S!C2'], ['S!A1', { literal: 0.1 }]))[0][0]).toContain('cell C2 uses LEGACY.ARRAY');
    });

    it('are not seen in formulas that are merely alike', async () => {
      // filled down: each saved as an array formula for itself; and the same text in two cells that are no arrays
      const alike = fakeExcel({ sheets: { S: { cells: { A1: 1, A2: 2, B1: { f: '=SUM(A1:A1*2)', v: 2 }, B2: { f: '=SUM(A2:A2*2)', v: 4 }, D1: { f: '=$A$1', v: 1 }, D2: { f: '=$A$1', v: 1 } }, saved: ['B1', 'B2'] } } });
      const [{ cells: found }] = await excelPort(alike.run).read([{ sheet: 'S', row: 1, col: 1, rows: 2, cols: 4 }]);
      expect(found.map((c) => c?.formula)).toEqual([undefined, '=SUM(RC[-1]:RC[-1]*2)', undefined, '=R1C1', undefined, '=SUM(RC[-1]:RC[-1]*2)', undefined, '=R1C1']);
      expect(found.some((c) => c?.array || c?.partOf)).toBe(false);
    });
  });

  it('takes a blank-looking cell of a spill for a part of it', async () => {
    const spilled = fakeExcel({ sheets: { S: { cells: { A1: 1, B1: { f: '=IF(A1:A2>0,A1:A2,"")', v: 1 } }, spills: { B1: [2, 1] } } } });
    const [{ cells: found }] = await excelPort(spilled.run).read([{ sheet: 'S', row: 2, col: 2, rows: 1, cols: 1 }]);
    expect(found[0]).toMatchObject({ partOf: { row: 1, col: 2 } });
  });

  it('a property that was not loaded throws in the fake, as in Excel', async () => {
    await expect(fakeExcel(book).run(async (context) => context.workbook.getSelectedRange().address)).rejects.toThrow("The property 'address' is not available");
  });
});
