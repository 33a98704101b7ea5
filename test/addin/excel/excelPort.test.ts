import { beforeAll, describe, expect, it } from 'vitest';
import { excelPort } from '../../../addin/excel/excelPort';
import { openBook } from '../../../addin/desk/book/openBook';
import { bookPort } from '../../../addin/desk/sheet/bookPort';
import { FunctionNames } from '../../../addin/desk/sheet/functionNames';
import { WorkingBook } from '../../../addin/desk/sheet/WorkingBook';
import { callOn } from '../../functions/carry/callOn';
import { smallBook } from '../../desk/sheet/smallBook';
import { fakeExcel } from './fakeExcel';
import type { FakeBook } from './fakeExcel';

beforeAll(() => {
  Object.assign(globalThis, { Excel: { RangeValueType: { empty: 'Empty', error: 'Error' } } });
});

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

  it('tells which rows do not show, and which of them a filter leaves out', async () =>
    expect(await excelPort(fakeExcel(book).run).hiddenRows("Lab's")).toEqual([{ row: 2, filtered: false }, { row: 3, filtered: true }]));

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

  it('a property that was not loaded throws in the fake, as in Excel', async () => {
    await expect(fakeExcel(book).run(async (context) => context.workbook.getSelectedRange().address)).rejects.toThrow("The property 'address' is not available");
  });
});
