import { describe, expect, it } from 'vitest';
import { openBook } from '../../../addin/desk/book/openBook';
import { bookEdits } from '../../../addin/desk/sheet/bookEdits';
import { Desk } from '../../../addin/desk/sheet/Desk';
import { builtFunctions } from './bundle';
import { deskOn, refusals, shown, written } from './onDesk';
import { smallBook } from './smallBook';

// u of a rectangular half-width a is a/√3 (JCGM 100:2008, 4.3.7): 3 gives √3, 6 gives 2√3.
const ROOT3 = Math.sqrt(3);
const near = (x: number): unknown => expect.closeTo(x, 12);

describe('native formulas', () => {
  it('are computed where the file holds no value, and keep a stored one', async () => {
    const desk = deskOn({ A1: 2, B1: { f: 'A1*3' }, B2: { f: 'A1*3', v: 99 }, B3: { f: 'B1+B2' } });
    await desk.recalculate();
    expect(['B1', 'B2', 'B3'].map((a) => shown(desk, a))).toEqual([6, 99, 105]);
    expect(bookEdits(desk.working).map((edit) => 'row' in edit && [edit.set, edit.row, edit.col])).toEqual([['result', 1, 2], ['result', 3, 2]]);
    expect(['B1', 'B2', 'B3'].map((a) => written(desk, a))).toEqual([6, 99, 105]);
  });

  it('are computed although stored where something above them changed, through names, wide ranges and chains', async () => {
    const desk = deskOn(
      { A1: 2, B1: { f: 'A1*3', v: 99 }, B2: { f: 'B1+1', v: 99 }, C1: { f: 'SUM(A:A)', v: 99 }, C2: { f: 'Twice+1', v: 99 }, D1: { f: 'C9*2', v: 99 }, E2: { f: 'SUM($A$1:$BZ$1)', v: 7 } },
      { Twice: 'S!$B$2*2' },
    );
    desk.working.setConstant(0, 1, 1, 10);
    await desk.recalculate();
    // E2: 10 + 30 + 10 + 99
    expect(['B1', 'B2', 'C1', 'C2', 'D1', 'E2'].map((a) => shown(desk, a))).toEqual([30, 31, 10, 63, 99, 149]);
  });

  it('take implicit intersection in an ordinary formula and whole ranges in an array', async () => {
    const desk = deskOn({ A1: 1, A2: 2, A3: 3, B2: { f: 'A1:A3*10' }, D1: { f: 'SUM(A1:A3*A1:A3)', legacy: 'D1' } });
    await desk.recalculate();
    expect(['B2', 'D1'].map((a) => shown(desk, a))).toEqual([20, 14]);
  });

  it('that cannot be followed are named with those that need them, and an old result goes', async () => {
    const desk = deskOn({ A1: 1, B1: { f: 'BESSELJ(A1,2)' }, B2: { f: 'B1+1', v: 5 }, B3: { f: 'A1+1' } });
    const outcome = await desk.recalculate();
    expect(refusals(outcome)).toEqual([
      'S!B1: no result: cell B1 uses BESSELJ, which cannot be followed',
      'S!B2: no result: cell B1 uses BESSELJ, which cannot be followed',
    ]);
    expect(outcome.leftOpen).toBe(true);
    expect(['B1', 'B2', 'B3'].map((a) => written(desk, a))).toEqual([null, null, 2]);
  });

  it('that make a circle are named', async () => {
    const outcome = await deskOn({ A1: { f: 'B1+1' }, B1: { f: 'A1+1' } }).recalculate();
    expect(refusals(outcome)).toEqual(['S!A1: no result: cells A1 → B1 → A1 form a circle', 'S!B1: no result: cells A1 → B1 → A1 form a circle']);
  });

  it('with references that only an evaluation can tell keep their result, until a stored value changes', async () => {
    const cells = { A1: 1, A2: { f: 'A1*2', v: 2 }, B1: { f: 'INDIRECT("A2")', v: 2 }, C1: { f: 'SUM(A1:INDEX(A1:A2,2))', v: 3 } };
    const quiet = deskOn(cells);
    expect(refusals(await quiet.recalculate())).toEqual([]);
    expect(bookEdits(quiet.working)).toEqual([]);
    const desk = deskOn(cells);
    desk.working.setConstant(0, 1, 1, 5);
    expect(refusals(await desk.recalculate())).toEqual([]);
    expect([shown(desk, 'B1'), shown(desk, 'C1')]).toEqual([10, 15]);
  });

  it('are computed when a cell changed that only OFFSET or the stretched range of SUMIF reaches', async () => {
    const desk = deskOn({
      A1: 1, A2: 1, B1: 1, B2: { f: 'A2*10', v: 10 }, C1: { f: 'OFFSET(A1,1,1)', v: 10 }, C2: { f: 'SUMIF(A1:A2,">0",B1)', v: 11 }, D1: { f: 'C1+C2', v: 21 },
    });
    desk.working.setConstant(0, 2, 1, 3);
    expect(refusals(await desk.recalculate())).toEqual([]);
    expect(['C1', 'C2', 'D1'].map((cell) => shown(desk, cell))).toEqual([30, 31, 61]);
  });
});

it('a workbook with precision as displayed is refused', () => {
  const book = openBook(smallBook({ S: { A1: 1 } }, {}, '<calcPr fullPrecision="0"/>'));
  expect(() => new Desk(book, builtFunctions())).toThrow('precision as displayed');
});

describe('functions of the library', () => {
  it('are called with the stored values of cells, and with new ones where something above changed', async () => {
    const desk = deskOn({ A1: 2, B1: { f: 'A1*1.5', v: 6 }, C1: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL(B1)', v: 0 } });
    await desk.recalculate();
    expect(shown(desk, 'C1')).toEqual(near(2 * ROOT3));
    desk.working.setConstant(0, 1, 1, 2);
    await desk.recalculate();
    expect(shown(desk, 'C1')).toEqual(near(ROOT3));
    expect(written(desk, 'C1')).toEqual(near(ROOT3));
  });

  it('give their upper left cell in an ordinary formula, all cells in a legacy array', async () => {
    const f = '_xldudf_ROOTSUM_STDU_FROM_TOL(A1:A2)';
    const desk = deskOn({ A1: 3, A2: 6, B1: { f }, C1: { f, legacy: 'C1:C4' } });
    await desk.recalculate();
    expect(['B1', 'C1', 'C2', 'C3'].map((a) => shown(desk, a))).toEqual([near(ROOT3), near(ROOT3), near(2 * ROOT3), '#N/A']);
  });

  it('work inside other formulas and inside each other', async () => {
    const desk = deskOn({
      A1: { f: 'INDEX(_xldudf_ROOTSUM_STDU_FROM_TOL(3,"triangular",TRUE),1,3)' },
      A2: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL(_xldudf_ROOTSUM_STDU_FROM_TOL(9))+0' },
    });
    await desk.recalculate();
    expect(['A1', 'A2'].map((a) => shown(desk, a))).toEqual(['triangular', near(3)]);
  });

  it('say no in the words that Excel shows, and what depends on them is an error', async () => {
    const desk = deskOn({ A1: -1, B1: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL(A1)' }, C1: { f: 'B1*2', v: 4 } });
    const outcome = await desk.recalculate();
    expect(refusals(outcome)).toEqual(['S!B1: #VALUE!: STDU_FROM_TOL: tolerance must be a number > 0, got -1 in cell A1']);
    expect(['B1', 'C1'].map((a) => written(desk, a))).toEqual(['#VALUE!', '#VALUE!']);
  });

  it('name each bad row of a range by itself', async () => {
    const desk = deskOn({ A1: 3, A2: -1, A3: 6, B1: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL(A1:A3)', spill: 'B1' } });
    expect(refusals(await desk.recalculate())).toEqual(['S!B2: #VALUE!: STDU_FROM_TOL: tolerance must be a number > 0, got -1 in cell A2']);
    expect(['B1', 'B2', 'B3'].map((a) => shown(desk, a))).toEqual([near(ROOT3), '#VALUE!', near(2 * ROOT3)]);
  });

  it('are refused with words where Excel would not take the formula, or does not know the name', async () => {
    const outcome = await deskOn({ A1: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL()' }, A2: { f: '_xldudf_ROOTSUM_NO_SUCH(1)' } }).recalculate();
    expect(refusals(outcome)).toEqual([
      'S!A1: no result: cell A1 gives ROOTSUM.STDU_FROM_TOL 0 arguments, which takes 1 to 3',
      'S!A2: no result: cell A2 uses _XLDUDF_ROOTSUM_NO_SUCH, which cannot be followed',
    ]);
  });

  it('read the formulas of the workbook: UNC_CARRY follows cells down to the inputs', async () => {
    // c = V m with u(m) = 0.3: u = |V| u(m) = 4 × 0.3 (JCGM 100:2008, 5.1.3); V is taken as exact.
    const desk = deskOn({ A1: 4, B1: 2, D1: 0.3, C1: { f: 'A1*B1', v: 8 }, E1: { f: '_xldudf_ROOTSUM_UNC_CARRY(C1,B1,D1)' } });
    const outcome = await desk.recalculate();
    expect(refusals(outcome)).toEqual([]);
    expect(shown(desk, 'E1')).toEqual(near(1.2));
  });
});

describe('spills', () => {
  const tolerance = '_xldudf_ROOTSUM_STDU_FROM_TOL(A1:A3)';

  it('are written with their range, and read again there is nothing to change', async () => {
    const desk = deskOn({ A1: 3, A2: 6, A3: 3, B1: { f: tolerance, spill: 'B1' } });
    await desk.recalculate();
    const book = openBook(desk.write());
    expect(book.cell(0, 1, 2)!.array).toEqual({ ref: { top: 1, left: 2, bottom: 3, right: 2 }, dynamic: true });
    expect([1, 2, 3].map((row) => book.cell(0, row, 2)!.value)).toEqual([near(ROOT3), near(2 * ROOT3), near(ROOT3)]);
    const again = new Desk(book, builtFunctions());
    await again.recalculate();
    expect(bookEdits(again.working)).toEqual([]);
  });

  it('grow and shrink: old cells are cleared, and dependents see the new range, through A1# too', async () => {
    const desk = deskOn({
      A1: 3, A2: 3, A3: 3,
      C1: { f: '_xldudf_ROOTSUM_STDU_FROM_TOL(IF(D1=2,A1:A2,A1:A3))', spill: 'C1:C3', v: 9 }, C2: { part: 9 }, C3: { part: 9 }, D1: 2,
      E1: { f: 'SUM(_xlfn.ANCHORARRAY(C1))', v: 9 }, E2: { f: 'COUNT(C1:C9)', v: 9 }, E3: { f: 'C3', v: 9 }, F1: { f: '_xlfn.ANCHORARRAY(C1)*1', spill: 'F1:F3', v: 9 }, F2: { part: 9 }, F3: { part: 9 },
    });
    await desk.recalculate();
    expect(['C1', 'C2', 'C3', 'E1', 'E2', 'E3', 'F2', 'F3'].map((a) => shown(desk, a))).toEqual([near(ROOT3), near(ROOT3), null, near(2 * ROOT3), 2, 0, near(ROOT3), null]);
    expect(['C2', 'C3', 'F2', 'F3'].map((a) => written(desk, a))).toEqual([near(ROOT3), null, near(ROOT3), null]);
    desk.working.setConstant(0, 1, 4, 3);
    await desk.recalculate();
    expect(['C3', 'E1', 'E2', 'F3'].map((a) => shown(desk, a))).toEqual([near(ROOT3), near(3 * ROOT3), 3, near(ROOT3)]);
  });

  it('that are blocked are #SPILL!, named, stored as #VALUE!, and come back when the way is free', async () => {
    const desk = deskOn({ A1: 3, A2: 6, A3: 3, B1: { f: tolerance, spill: 'B1' }, B2: 'here', C1: { f: 'B1', v: 1 }, C2: { f: 'IF(ISERROR(B1),"no","yes")' } });
    const outcome = await desk.recalculate();
    expect(refusals(outcome)).toEqual(['S!B1: #SPILL!: its result of 3 × 1 cells would cover B2, which is occupied']);
    expect(['B1', 'B2', 'B3', 'C1'].map((a) => shown(desk, a))).toEqual(['#SPILL!', 'here', null, '#SPILL!']);
    expect(['B1', 'B2', 'C1'].map((a) => written(desk, a))).toEqual(['#VALUE!', 'here', '#VALUE!']);
    const again = new Desk(openBook(desk.write()), builtFunctions());
    expect(refusals(await again.recalculate())).toEqual(refusals(outcome));
    expect(bookEdits(again.working)).toEqual([]);
    desk.working.setBlank(0, 2, 2);
    expect(refusals(await desk.recalculate())).toEqual([]);
    expect(['B1', 'B2', 'B3', 'C1'].map((a) => shown(desk, a))).toEqual([near(ROOT3), near(2 * ROOT3), near(ROOT3), near(ROOT3)]);
  });

  it('that want the same cells: the upper left one has them', async () => {
    const desk = deskOn({ A1: 3, A2: 6, A3: 3, B1: { f: tolerance, spill: 'B1' }, B3: { f: tolerance, spill: 'B3' } });
    expect(refusals(await desk.recalculate())).toEqual(['S!B1: #SPILL!: its result of 3 × 1 cells would cover B3, which is occupied']);
    expect(['B3', 'B5'].map((a) => shown(desk, a))).toEqual([near(ROOT3), near(ROOT3)]);
  });

  it('do not go over merged cells', async () => {
    const bytes = smallBook({ S: { cells: { A1: 3, A2: 6, A3: 3, B1: { f: tolerance, spill: 'B1' } }, merges: ['B3:C3'] } });
    const desk = new Desk(openBook(bytes), builtFunctions());
    expect(refusals(await desk.recalculate())).toEqual(['S!B1: #SPILL!: its result of 3 × 1 cells would stand in merged cells']);
    expect(written(desk, 'B1')).toBe('#VALUE!');
  });
});
