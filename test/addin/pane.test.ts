import { describe, expect, it } from 'vitest';
import { openBook } from '../../addin/desk/book/openBook';
import { bookPort } from '../../addin/desk/sheet/bookPort';
import { Session } from '../../addin/desk/sheet/Session';
import { callAt, suggestions } from '../../addin/desk/page/completion';
import { cellText, typedConstant } from '../../addin/desk/page/cellText';
import { auditPort } from '../../addin/pane/auditPort';
import { resultCallFor } from '../../addin/pane/budgetOf';
import { carryCalls } from '../../addin/pane/carryCalls';
import { formatOf } from '../../addin/pane/form';
import { inputsOf } from '../../addin/pane/inputsOf';
import type { PaneHost } from '../../addin/pane/PaneHost';
import { writeColumn } from '../../addin/pane/writeColumn';
import type { Written } from '../../addin/pane/writeColumn';
import { proposeKind } from '../../addin/pane/steps/evidence';
import { builtFunctions } from '../desk/sheet/bundle';
import { smallBook } from '../desk/sheet/smallBook';
import type { SmallCell } from '../desk/sheet/smallBook';

const cells: Record<string, SmallCell> = {
  A1: 'Volume', B1: 'Factor', C1: 'Result', D1: 'u', A2: 10, B2: 2, C2: { f: 'A2*B2*$F$1', v: 40 }, A3: 20, B3: 3, C3: { f: 'A3*B3*$F$1', v: 120 }, D2: 0.1, D3: 0.2, E1: 'Scale', F1: 2,
};
const open = (more: Record<string, SmallCell> = {}) => Session.open(openBook(smallBook({ S: { ...cells, ...more } })), builtFunctions());
const area = (row: number, col: number, rows = 1, cols = 1) => ({ sheet: 'S', row, col, rows, cols });
const value = (session: Session, row: number, col: number) => session.desk.working.cell(0, row, col)?.value;

describe('following results down to the typed numbers', () => {
  it('groups the cells that stand below one another and names them', async () => {
    const { groups, refusals } = await inputsOf(bookPort((await open()).desk.working), area(2, 3, 2));
    expect(groups.map((g) => [g.label, g.area.row, g.area.col, g.area.rows])).toEqual([['Volume', 2, 1, 2], ['Factor', 2, 2, 2], ['Scale', 1, 6, 1]]);
    expect(refusals).toEqual([]);
  });

  it('says why a result cannot be followed', async () => {
    const session = await open({ C3: { f: 'BESSELJ(A3,1)', v: 1 } });
    expect((await inputsOf(bookPort(session.desk.working), area(2, 3, 2))).refusals).toEqual(['cell C3 uses BESSELJ, which cannot be followed']);
  });
});

describe('calls in the sheet', () => {
  it('are found with their arguments, and give those of one result alone', async () => {
    const session = await open();
    await session.edit([{ sheet: 0, row: 2, col: 8, content: { formula: '=ROOTSUM.UNC_CARRY(C2:C3,A2:A3,D2:D3,F1,CHOOSE({1,2,3,4},D2,"inf","normal","each"))', spill: { rows: 2, cols: 1 } } }]);
    expect([value(session, 2, 8), value(session, 3, 8)]).toEqual([expect.closeTo(Math.hypot(4 * 0.1, 20 * 0.1), 12), expect.closeTo(Math.hypot(6 * 0.2, 60 * 0.1), 12)]);
    const [call] = await carryCalls(bookPort(session.desk.working), 'S');
    expect(call).toMatchObject({ name: 'UNC_CARRY', results: area(2, 3, 2), at: area(2, 8, 2) });
    expect(call.pairs).toEqual([area(2, 1, 2), area(2, 4, 2), area(1, 6), undefined]);
    expect(await resultCallFor(bookPort(session.desk.working), area(3, 8))).toMatch(/no plain reference/);
    await session.edit([{ sheet: 0, row: 2, col: 8, content: { formula: '=ROOTSUM.UNC_REPORT(C2:C3,,A2:A3,D2:D3)', spill: { rows: 2, cols: 9 } } }]);
    expect(await resultCallFor(bookPort(session.desk.working), area(3, 10))).toMatchObject({ result: area(3, 3), pairs: [area(3, 1), area(3, 4)] });
    expect(await resultCallFor(bookPort(session.desk.working), area(1, 1))).toMatch(/^Select a result/);
  });

  it('one row of evidence that serves several cells is independent in each, or one source for all, as was chosen', async () => {
    const session = await open({ G2: { f: 'A2+A3', v: 30 } });
    for (const [word, u] of [['each', Math.hypot(0.1, 0.1)], ['pipette', 0.2]] as const) {
      await session.edit([{ sheet: 0, row: 2, col: 9, content: { formula: `=ROOTSUM.UNC_CARRY(G2,A2:A3,CHOOSE({1,2,3,4},D2,"inf","normal","${word}"))` } }]);
      expect(value(session, 2, 9)).toBeCloseTo(u, 12);
    }
  });
});

describe('a column that the pane writes', () => {
  const table = { name: 'T', area: area(1, 1, 3, 4), columns: [], headerRows: 1, totalsRows: 0 };
  async function write(where: ReturnType<typeof area>, again = false, tables = [] as (typeof table)[]) {
    const session = await open();
    const port = { ...bookPort(session.desk.working), tables: async () => tables };
    const told: string[] = [];
    const edits: unknown[] = [];
    const host = { port, write: async (e: readonly unknown[]) => void edits.push(...e), show: async () => undefined } as unknown as PaneHost;
    const written: Written[] = [];
    const done = await writeColumn({ host, say: (text) => told.push(text), written }, where, ['u'], '=ROOTSUM.STDU_FROM_TOL(D2:D3)', again);
    return { done, told: told.at(-1), edits: edits.length, written };
  }

  it('goes to a free place, and into the plan', async () => {
    const { done, told, edits, written } = await write(area(2, 8, 2));
    expect([done, told, edits]).toEqual(['written', 'u written into S!H2:H3', 2]);
    expect(written).toEqual([{ sheet: 'S', anchor: 'H1', header: 'u', formula: '=ROOTSUM.STDU_FROM_TOL(D2:D3)', mode: 'spill', rows: '2:3' }]);
  });
  it('asks before it covers anything, and then does', async () => {
    expect(await write(area(2, 4, 2))).toMatchObject({ done: 'asked', told: 'D1, D2, D3 are occupied. Press again to write over, or choose another place.', edits: 0 });
    expect(await write(area(2, 4, 2), true)).toMatchObject({ done: 'written', edits: 2 });
  });
  it('does not spill into a table, nor where there is no row for a heading', async () => {
    expect(await write(area(2, 4, 2), true, [table])).toMatchObject({ done: 'failed', told: 'A formula cannot spill inside table T: choose a column outside it', edits: 0 });
    expect(await write(area(2, 5, 2), true, [table])).toMatchObject({ done: 'written' });
    expect(await write(area(1, 8, 2))).toMatchObject({ done: 'failed', edits: 0 });
  });
});

describe('the audit behind the pane', () => {
  it('counts what agrees and names what does not', async () => {
    const session = await open({ C3: { f: 'A3*B3*$F$1', v: 121 } });
    expect(await auditPort(bookPort(session.desk.working))).toEqual({
      formulas: 2, agree: 1, library: 0, refused: [{ sheet: 'S', row: 3, col: 3, why: 'cell C3 shows 121, but its formula gives 120: typed over, or not recalculated' }],
    });
  });
});

describe('a session', () => {
  it('takes back steps one by one, spills and formats with them', async () => {
    const session = await open();
    await session.edit([{ sheet: 0, row: 2, col: 8, content: { formula: '=ROOTSUM.STDU_FROM_TOL(D2:D3)', spill: { rows: 2, cols: 1 } }, numberFormat: '0.00' }]);
    await session.edit([{ sheet: 0, row: 2, col: 1, content: { value: 11 } }]);
    expect([value(session, 2, 3), value(session, 3, 8), session.undoable]).toEqual([44, expect.closeTo(0.2 / Math.sqrt(3), 12), 2]);
    await session.undo();
    expect(value(session, 2, 3)).toBe(40);
    await session.undo();
    expect([value(session, 2, 8), value(session, 3, 8), session.desk.working.styles.size, await session.undo()]).toEqual([undefined, undefined, 0, false]);
  });

  it('refuses to change part of an array, and a formula that cannot be read, and changes nothing then', async () => {
    const session = await open();
    await session.edit([{ sheet: 0, row: 2, col: 8, content: { formula: '=ROOTSUM.STDU_FROM_TOL(D2:D3)' } }]);
    await expect(session.edit([{ sheet: 0, row: 9, col: 9, content: { value: 1 } }, { sheet: 0, row: 3, col: 8, content: { value: 1 } }])).rejects.toThrow('this cell shows part of an array');
    await expect(session.edit([{ sheet: 0, row: 9, col: 9, content: { formula: '=ROOTSUM.NO_SUCH(1)' } }])).rejects.toThrow('calls ROOTSUM.NO_SUCH, which is no function of this version');
    expect([value(session, 9, 9), session.undoable]).toEqual([undefined, 1]);
    expect(session.textOf(0, 3, 8)).toBe('=ROOTSUM.STDU_FROM_TOL(D2:D3)');
  });
});

describe('small parts', () => {
  it.each([['Tolerance ±', 1, 'tolerance'], ['U from certificate, k = 2', 1, 'certificate'], ['Resolution', 1, 'resolution'], ['Reading', 4, 'repeats'], ['', 1, 'tolerance']] as const)('a column "%s" of %d is read as %s', (heading, cols, kind) =>
    expect(proposeKind(heading, cols)).toBe(kind));
  it('shows three digits of the least u', () => expect([[0.01234, 0.5], [123], [0.00000012], []].map(formatOf)).toEqual(['0.0000', '0', '0.000000000', undefined]));
  it('reads constants as they are typed', () => expect(['1.5', ' -2e3', '5%', 'TRUE', "'12", '12 mL', '<0.1', '1,5'].map(typedConstant)).toEqual([1.5, -2000, 0.05, true, '12', '12 mL', '<0.1', '1,5']));
  it('shows values by their format', () => expect([[0.5, '0.00'], [0.1 + 0.2, 'General'], ['a', 'General'], [{ error: '#N/A' }, '0'], [true, 'General'], [45292, 'yyyy-mm-dd']].map(([v, f]) => cellText(v as never, f as string))).toEqual(['0.50', '0.3', 'a', '#N/A', 'TRUE', '2024-01-01']));
  it('finds the function that is being typed and the argument at hand', () => {
    const functions = JSON.parse(builtFunctions().metadata).functions;
    expect(suggestions('=1+tol', 6, functions, ['SUM']).map((s) => s.name)).toEqual(['ROOTSUM.STDU_FROM_TOL', 'ROOTSUM.SPEC_TOL', 'ROOTSUM.GLASS_TOL']);
    expect(suggestions('="tol', 5, functions, [])).toEqual([]);
    expect(suggestions('tol', 3, functions, [])).toEqual([]);
    expect(callAt('=SUM(1,ROOTSUM.UNC_EXPAND(A1,{1,2},', 35)).toEqual({ name: 'ROOTSUM.UNC_EXPAND', argument: 2 });
    expect(callAt('=SUM(1)', 7)).toBeUndefined();
  });
});
