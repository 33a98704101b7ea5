import { describe, expect, it } from 'vitest';
import { openBook } from '../../addin/desk/book/openBook';
import { bookPort } from '../../addin/desk/sheet/bookPort';
import { Session } from '../../addin/desk/sheet/Session';
import { deskPaneHost } from '../../addin/desk/page/deskPaneHost';
import type { GridAccess } from '../../addin/desk/page/deskPaneHost';
import { callAt, suggestions } from '../../addin/desk/page/completion';
import { cellText, typedConstant } from '../../addin/desk/page/cellText';
import { auditPort } from '../../addin/pane/auditPort';
import { resultCallFor } from '../../addin/pane/budgetOf';
import { carryCalls } from '../../addin/pane/carryCalls';
import { formatOf } from '../../addin/pane/form';
import { inputsOf } from '../../addin/pane/inputsOf';
import type { PaneHost } from '../../addin/pane/PaneHost';
import type { StepContext } from '../../addin/pane/Steps';
import { writeColumns } from '../../addin/pane/writeColumns';
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
    expect(await resultCallFor(bookPort(session.desk.working), area(3, 8))).toMatch(/^The call in S!H2 cannot be repeated for one result here/);
    await session.edit([{ sheet: 0, row: 2, col: 8, content: { formula: '=ROOTSUM.UNC_REPORT(C2:C3,,A2:A3,D2:D3)', spill: { rows: 2, cols: 9 } } }]);
    expect(await resultCallFor(bookPort(session.desk.working), area(3, 10))).toMatchObject({ result: area(3, 3), u: area(3, 9), pairs: [area(3, 1), area(3, 4)] });
    expect(await resultCallFor(bookPort(session.desk.working), area(1, 1))).toMatch(/^Select a result/);
  });

  it('give a result the inputs that reach it, wherever they stand', async () => {
    const session = await open({ C2: { f: 'A3*B2*$F$1', v: 80 }, C3: { f: 'A2*B3*$F$1', v: 60 } });
    await session.edit([{ sheet: 0, row: 2, col: 8, content: { formula: '=ROOTSUM.UNC_CARRY(C2:C3,A2:A3,D2:D3)', spill: { rows: 2, cols: 1 } } }]);
    expect(await resultCallFor(bookPort(session.desk.working), area(2, 3))).toMatchObject({ result: area(2, 3), u: area(2, 8), pairs: [area(3, 1), area(3, 4)] });
    expect(await resultCallFor(bookPort(session.desk.working), area(3, 8))).toMatchObject({ result: area(3, 3), u: area(3, 8), pairs: [area(2, 1), area(2, 4)] });
  });

  it('one row of evidence that serves several cells is independent in each, or one source for all, as was chosen', async () => {
    const session = await open({ G2: { f: 'A2+A3', v: 30 } });
    for (const [word, u] of [['each', Math.hypot(0.1, 0.1)], ['pipette', 0.2]] as const) {
      await session.edit([{ sheet: 0, row: 2, col: 9, content: { formula: `=ROOTSUM.UNC_CARRY(G2,A2:A3,CHOOSE({1,2,3,4},D2,"inf","normal","${word}"))` } }]);
      expect(value(session, 2, 9)).toBeCloseTo(u, 12);
    }
  });
});

describe('columns that the pane writes', () => {
  const table = { name: 'T', area: area(1, 1, 3, 4), columns: [], headerRows: 1, totalsRows: 0 };
  const u = { headings: ['u'], formula: '=ROOTSUM.STDU_FROM_TOL(D2:D3)' };
  async function pane(tables = [] as (typeof table)[]) {
    const session = await open();
    const told: string[] = [];
    const steps: number[] = [];
    const host = { port: { ...bookPort(session.desk.working), tables: async () => tables }, write: async (e: readonly unknown[]) => ({ step: steps.push(e.length) }), show: async () => undefined } as unknown as PaneHost;
    const context: StepContext = { host, say: (text) => told.push(text), written: [], asked: {} };
    const press = async (where: ReturnType<typeof area>, columns = [u]) => [await writeColumns(context, where, columns), told.at(-1)];
    return { context, steps, press };
  }
  const occupied = 'D1, D2, D3 are occupied. Press again to write over, or choose another place.';

  it('go to a free place as one step, and into the plan', async () => {
    const { context, steps, press } = await pane();
    expect(await press(area(2, 8, 2), [u, { headings: ['a', 'b'], formula: '=D2:E3' }])).toEqual([true, 'u, a, b written into S!H2:J3']);
    expect(steps).toEqual([5]);
    expect(context.written.map((w) => w.columns)).toEqual([[
      { sheet: 'S', anchor: 'H1', header: 'u', formula: u.formula, mode: 'spill', rows: '2:3' },
      { sheet: 'S', anchor: 'I1', header: ['a', 'b'], formula: '=D2:E3', mode: 'spill', rows: '2:3' },
    ]]);
  });
  it('ask before they cover anything, and then do', async () => {
    const { steps, press } = await pane();
    expect(await press(area(2, 4, 2))).toEqual([false, occupied]);
    expect(await press(area(2, 4, 2))).toEqual([true, 'u written into S!D2:D3']);
    expect(await press(area(2, 4, 2))).toEqual([false, occupied]);
    expect(steps).toEqual([2]);
  });
  it('ask again where the second press is for another place', async () => {
    const { steps, press } = await pane();
    await press(area(2, 4, 2));
    expect(await press(area(2, 3, 2))).toEqual([false, occupied.replaceAll('D', 'C')]);
    expect(steps).toEqual([]);
  });
  it('do not spill into a table, nor where there is no row for a heading', async () => {
    const { press } = await pane([table]);
    expect(await press(area(2, 4, 2))).toEqual([false, 'A formula cannot spill inside table T: choose a column outside it']);
    expect(await press(area(2, 8, 2))).toEqual([true, 'u written into S!H2:H3']);
    expect(await press(area(1, 8, 2))).toEqual([false, 'There is no row above the results for headings: insert one first']);
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
    expect([value(session, 2, 3), value(session, 3, 8)]).toEqual([44, expect.closeTo(0.2 / Math.sqrt(3), 12)]);
    await session.undo();
    expect(value(session, 2, 3)).toBe(40);
    await session.undo();
    expect([value(session, 2, 8), value(session, 3, 8), session.desk.working.styles.size, await session.undo()]).toEqual([undefined, undefined, 0, false]);
  });

  it('refuses to change part of an array, and a formula that cannot be read, and changes nothing then', async () => {
    const session = await open();
    await session.edit([{ sheet: 0, row: 2, col: 8, content: { formula: '=ROOTSUM.STDU_FROM_TOL(D2:D3)' } }]);
    const before = session.lastStep;
    await expect(session.edit([{ sheet: 0, row: 9, col: 9, content: { value: 1 } }, { sheet: 0, row: 3, col: 8, content: { value: 1 } }])).rejects.toThrow('this cell shows part of an array');
    await expect(session.edit([{ sheet: 0, row: 9, col: 9, content: { formula: '=ROOTSUM.NO_SUCH(1)' } }])).rejects.toThrow('calls ROOTSUM.NO_SUCH, which is no function of this version');
    expect([value(session, 9, 9), session.lastStep]).toEqual([undefined, before]);
    expect(session.textOf(0, 3, 8)).toBe('=ROOTSUM.STDU_FROM_TOL(D2:D3)');
  });
});

describe('the desk as the host of the pane', () => {
  it('takes back its own last step, and never what the user typed after it', async () => {
    const session = await open();
    const host = deskPaneHost(session, {} as GridAccess);
    expect(await host.undo()).toBe(false);
    const step = await host.write([{ sheet: 'S', row: 2, col: 8, value: 'x' }]);
    await session.edit([{ sheet: 0, row: 2, col: 1, content: { value: 11 } }]);
    await expect(host.undo()).rejects.toThrow('the sheet was changed since');
    expect([value(session, 2, 1), host.stands(step)]).toEqual([11, true]);
    await session.undo();
    expect([await host.undo(), value(session, 2, 8), host.stands(step), await host.undo()]).toEqual([true, undefined, false, false]);
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
