import { describe, expect, it } from 'vitest';
import { openBook } from '../../../addin/desk/book/openBook';
import { applyPlan } from '../../../addin/desk/sheet/applyPlan';
import type { PlanOutcome } from '../../../addin/desk/sheet/applyPlan';
import { bookEdits } from '../../../addin/desk/sheet/bookEdits';
import { Desk } from '../../../addin/desk/sheet/Desk';
import type { PlanColumn } from '../../../addin/desk/sheet/Plan';
import { builtFunctions } from './bundle';
import { deskOn, refusals, shown } from './onDesk';
import type { SmallCell } from './smallBook';

// u of a rectangular half-width a is a/√3 (JCGM 100:2008, 4.3.7).
const ROOT3 = Math.sqrt(3);
const near = (x: number): unknown => expect.closeTo(x, 12);

/** Three readings and a last row that is text, headings in row 2. */
const sheet: Record<string, SmallCell> = {
  A2: 'Sample', B2: 'Tolerance', A3: 'one', A4: 'two', A5: 'three', B3: 3, B4: 6, B5: { f: 'B3*3', v: 9 }, B6: 'end', D9: 'note',
};
const column = (change: Partial<PlanColumn> = {}): PlanColumn => ({
  sheet: 'S', anchor: 'C2', header: 'u', formula: '=ROOTSUM.STDU_FROM_TOL(B3:B5)', mode: 'spill', rows: '3:5', ...change,
});
const states = ({ entries }: PlanOutcome): string[] => entries.map(({ state, message }) => (message === undefined ? state : `${state}: ${message}`));

describe('applyPlan', () => {
  it('adds a spilled column with its heading and number format', async () => {
    const desk = deskOn(sheet);
    const outcome = await applyPlan(desk, { columns: [column({ numberFormat: '0.000' })] });
    expect(states(outcome)).toEqual(['added']);
    expect(refusals(outcome.recalculation)).toEqual([]);
    const book = openBook(desk.write());
    expect(book.cell(0, 2, 3)!.value).toBe('u');
    expect(book.cell(0, 3, 3)).toMatchObject({ formula: '_xldudf_ROOTSUM_STDU_FROM_TOL(B3:B5)', array: { ref: { top: 3, left: 3, bottom: 5, right: 3 }, dynamic: true } });
    expect([3, 4, 5].map((row) => book.cell(0, row, 3)!.value)).toEqual([near(ROOT3), near(2 * ROOT3), near(3 * ROOT3)]);
    expect([3, 4, 5].map((row) => book.numberFormat(book.cell(0, row, 3)!.style))).toEqual(['0.000', '0.000', '0.000']);
  });

  it('fills a formula down row by row, relative references moving along', async () => {
    const desk = deskOn(sheet);
    const outcome = await applyPlan(desk, { columns: [column({ formula: '=ROOTSUM.STDU_FROM_TOL(B3)/$B$3', mode: 'perRow', rows: 'while B has numbers' })] });
    expect(states(outcome)).toEqual(['added']);
    const book = openBook(desk.write());
    expect([3, 4, 5, 6].map((row) => book.cell(0, row, 3)?.formula)).toEqual([
      '_xldudf_ROOTSUM_STDU_FROM_TOL(B3)/$B$3', '_xldudf_ROOTSUM_STDU_FROM_TOL(B4)/$B$3', '_xldudf_ROOTSUM_STDU_FROM_TOL(B5)/$B$3', undefined,
    ]);
    expect(['C3', 'C4', 'C5'].map((a) => shown(desk, a))).toEqual([near(ROOT3 / 3), near((2 * ROOT3) / 3), near(ROOT3)]);
  });

  it('lets a later column use an earlier one, and counts rows of numbers that are computed first', async () => {
    const desk = deskOn(sheet);
    const outcome = await applyPlan(desk, { columns: [
      column({ header: ['u', 'dof', 'shape'], formula: '=ROOTSUM.STDU_FROM_TOL(B3:B5,"triangular",TRUE)' }),
      column({ anchor: 'F2', header: 'twice', formula: '=C3*2', mode: 'perRow', rows: 'while C has numbers' }),
    ] });
    expect(states(outcome)).toEqual(['added', 'added']);
    // a/√6 for a triangular distribution (JCGM 100:2008, 4.3.9)
    expect(['C3', 'E3', 'F3', 'F5', 'F6'].map((a) => shown(desk, a))).toEqual([near(3 / Math.sqrt(6)), 'triangular', near(6 / Math.sqrt(6)), near(18 / Math.sqrt(6)), null]);
  });

  it('several headings of a row formula make one spill a row', async () => {
    const desk = deskOn(sheet);
    await applyPlan(desk, { columns: [column({ header: ['u', 'dof', 'shape'], formula: '=ROOTSUM.STDU_FROM_TOL(B3,"triangular",TRUE)', mode: 'perRow' })] });
    expect(['C4', 'E3', 'E5'].map((a) => shown(desk, a))).toEqual([near(6 / Math.sqrt(6)), 'triangular', 'triangular']);
  });

  it('stores a row formula that computes with whole ranges as a dynamic array, as Excel does when it is typed', async () => {
    const desk = deskOn(sheet);
    // 3² + 6² = 45
    await applyPlan(desk, { columns: [
      column({ formula: '=SUM(B3:B4^2)', mode: 'perRow', rows: '3:4' }), column({ anchor: 'D2', formula: '=SUM(B3:B4)^2', mode: 'perRow', rows: '3:4' }),
    ] });
    const book = openBook(desk.write());
    expect(book.cell(0, 3, 3)).toMatchObject({ value: 45, array: { ref: { top: 3, bottom: 3, left: 3, right: 3 }, dynamic: true } });
    expect(book.cell(0, 4, 3)).toMatchObject({ value: 117, formula: 'SUM(B4:B5^2)' });
    expect(book.cell(0, 3, 4)!.array).toBeUndefined();
  });

  it('finds a heading by its text and goes to the first free place right of it', async () => {
    const desk = deskOn({ ...sheet, C2: 'taken', C3: 1 });
    expect(states(await applyPlan(desk, { columns: [column({ anchor: 'tolerance' })] }))).toEqual(['added']);
    expect(['D2', 'D3'].map((a) => shown(desk, a))).toEqual(['u', near(ROOT3)]);
  });

  it('refuses a place that is taken, names it, and does the rest', async () => {
    const desk = deskOn({ ...sheet, C4: 'mine' });
    const outcome = await applyPlan(desk, { columns: [column(), column({ anchor: 'D2' })] });
    expect(states(outcome)).toEqual(['refused: C4 is occupied (it holds "mine")', 'added']);
    expect(['C2', 'C4', 'D3'].map((a) => shown(desk, a))).toEqual([null, 'mine', near(ROOT3)]);
  });

  it('changes nothing when it is applied a second time', async () => {
    const plan = { columns: [
      column({ numberFormat: '0.000' }), column({ anchor: 'D2', header: 'k', formula: '=C3*2', mode: 'perRow' as const }),
      column({ anchor: 'Tolerance', header: 'v', formula: '=B3', mode: 'perRow' as const }),
    ] };
    const first = deskOn(sheet);
    expect(states(await applyPlan(first, plan))).toEqual(['added', 'added', 'added']);
    const second = new Desk(openBook(first.write()), builtFunctions());
    expect(states(await applyPlan(second, plan))).toEqual(['already there', 'already there', 'already there']);
    expect(bookEdits(second.working)).toEqual([]);
  });

  it('is not there already where one formula differs', async () => {
    const plan = { columns: [column({ formula: '=B3*2', mode: 'perRow' as const })] };
    const first = deskOn(sheet);
    await applyPlan(first, plan);
    first.working.setFormula(0, 4, 3, 'B4*3');
    await first.recalculate();
    const second = new Desk(openBook(first.write()), builtFunctions());
    expect(states(await applyPlan(second, plan))).toEqual(['refused: C2 is occupied (it holds "u")']);
  });

  it('names a spill that turns out larger than its rows and meets something', async () => {
    const desk = deskOn({ ...sheet, C5: 'mine' });
    const outcome = await applyPlan(desk, { columns: [column({ rows: '3:4' })] });
    expect(states(outcome)).toEqual(['added']);
    expect(refusals(outcome.recalculation)).toEqual(['S!C3: #SPILL!: its result of 3 × 1 cells would cover C5, which is occupied']);
  });

  it.each([
    [{ sheet: 'T' }, 'the workbook has no sheet T'],
    [{ anchor: 'Missing text' }, 'sheet S has no cell with the text "Missing text"'],
    [{ rows: 'while A has numbers' }, 'column A of sheet S has no number in its first row: A3 holds "one"'],
    [{ rows: '2:5' }, 'rows 2:5 must lie below the heading in C2'],
    [{ rows: '5:3' }, 'rows 5:3 must be a first row, a colon and a last row that is not above it'],
    [{ formula: '=ROOTSUM.NO_SUCH(B3)' }, 'the formula calls ROOTSUM.NO_SUCH, which is no function of this version'],
    [{ formula: '="open' }, 'the formula cannot be read'],
  ])('refuses %j', async (change, message) => {
    const desk = deskOn(sheet);
    expect(states(await applyPlan(desk, { columns: [column(change)] }))).toEqual([`refused: ${message}`]);
    expect(bookEdits(desk.working)).toEqual([]);
  });

  it('refuses the text of a heading that stands twice', async () => {
    const desk = deskOn({ ...sheet, A8: 'tolerance' });
    expect(states(await applyPlan(desk, { columns: [column({ anchor: 'Tolerance' })] }))).toEqual([
      'refused: the text "Tolerance" stands in more than one cell of sheet S (B2, A8): give the address of the heading instead',
    ]);
  });
});
