import { describe, expect, it } from 'vitest';
import { openBook } from '../../../addin/desk/book/openBook';
import { applyPlan } from '../../../addin/desk/sheet/applyPlan';
import { Desk } from '../../../addin/desk/sheet/Desk';
import type { PlanColumn } from '../../../addin/desk/sheet/Plan';
import { buildBook, MAIN } from '../book/buildBook';
import { builtFunctions } from './bundle';

const table = (name: string, ref: string, more = ''): string => `<table xmlns="${MAIN}" id="1" name="${name}" displayName="${name}" ref="${ref}" totalsRowCount="1"${more}>`
  + '<tableColumns count="2"><tableColumn id="1" name="m"/><tableColumn id="2" name="V"/></tableColumns></table>';
const DATA = '<sheetData><row r="1"><c r="A1" t="str"><v>m</v></c><c r="B1" t="str"><v>V</v></c></row>'
  + '<row r="2"><c r="A2"><v>1</v></c><c r="B2"><v>10</v></c></row><row r="3"><c r="A3"><v>2</v></c><c r="B3"><v>20</v></c></row>'
  + '<row r="4"><c r="B4"><f>SUBTOTAL(109,T[V])</f><v>30</v></c>@beside</row><row r="5"><c r="F5"><f>SUM(T)</f><v>33</v></c></row></sheetData>';
const bytes = (total = '', tables = [table('T', 'A1:B4')]): Uint8Array => buildBook({ sheets: [{ name: 'S', xml: DATA.replace('@beside', total), tables }] });
const column = (change: Partial<PlanColumn> = {}): PlanColumn => ({ sheet: 'S', anchor: 'C1', header: 'u', formula: '=ROOTSUM.STDU_FROM_TOL(A2)', mode: 'perRow', rows: '2:3', ...change });

async function applied(columns: PlanColumn[], book = bytes()) {
  const desk = new Desk(openBook(book), builtFunctions());
  const outcome = await applyPlan(desk, { columns });
  expect(outcome.entries.map((e) => e.state)).toEqual(columns.map(() => 'added'));
  return { desk, after: openBook(desk.write()) };
}

describe('a column that a plan puts right beside a table', () => {
  it('becomes the last column of the table, and the next one after it', async () => {
    const { after } = await applied([column(), column({ anchor: 'V', header: 'twice', formula: '=T[[#This Row],[u]]*2' })]);
    expect(after.tables[0]).toMatchObject({ ref: { left: 1, right: 4, bottom: 4 }, columns: ['m', 'V', 'u', 'twice'] });
    expect([1, 2, 3].map((row) => after.cell(0, row, 3)?.value)).toEqual(['u', expect.closeTo(1 / Math.sqrt(3), 12), expect.closeTo(2 / Math.sqrt(3), 12)]);
    expect(after.cell(0, 3, 4)?.value).toBeCloseTo(4 / Math.sqrt(3), 12);
  });

  it('offers its formula to later rows only where that is the same in each', async () => {
    const { desk } = await applied([column(), column({ anchor: 'D1', header: 'twice', formula: '=T[[#This Row],[u]]*2' })]);
    expect(desk.working.tableColumns.map((c) => c.formula)).toEqual([undefined, 'T[[#This Row],[u]]*2']);
  });

  it('counts in what reads the whole table', async () => {
    const { after } = await applied([column({ formula: '=A2*100' })]);
    expect(after.cell(0, 5, 6)?.value).toBe(333);
  });

  it('applied a second time is there already', async () => {
    const { desk } = await applied([column()]);
    const again = new Desk(openBook(desk.write()), builtFunctions());
    expect((await applyPlan(again, { columns: [column()] })).entries.map((e) => e.state)).toEqual(['already there']);
  });

  it('keeps a column of the table in a copy with plain values', async () => {
    const { desk } = await applied([column()]);
    const copy = openBook(desk.write(true));
    expect(copy.tables[0].columns).toEqual(['m', 'V', 'u']);
    expect(copy.cell(0, 2, 3)).toMatchObject({ value: expect.closeTo(1 / Math.sqrt(3), 12) });
    expect(copy.cell(0, 2, 3)?.formula).toBeUndefined();
  });

  it.each<[string, Partial<PlanColumn>, Uint8Array]>([
    ['that spills', { mode: 'spill', formula: '=ROOTSUM.STDU_FROM_TOL(A2:A3)' }, bytes()],
    ['that does not fill its rows', { rows: '2:2' }, bytes()],
    ['with a place between', { anchor: 'D1' }, bytes()],
    ['whose name the table has', { header: 'M' }, bytes()],
    ['of two headings', { header: ['u', 'v'], formula: '=A2:B2' }, bytes()],
    ['over something beside the totals', {}, bytes('<c r="C4"><v>9</v></c>')],
    ['beside a table that is bound to a query', {}, bytes('', [table('T', 'A1:B4', ' tableType="queryTable"')])],
  ])('%s stands beside it', async (_what, change, book) => {
    const { after } = await applied([column(change)], book);
    expect(after.tables[0].columns).toEqual(['m', 'V']);
  });
});
