import { cellName, intersects } from '../book/area';
import type { BookTable } from '../book/tables';
import type { Desk } from './Desk';
import { storedFormula } from './functionNames';
import { headersOf } from './Plan';
import type { Plan, PlanColumn } from './Plan';
import { PlanRefusal, planTarget } from './planTarget';
import type { PlanTarget } from './planTarget';
import type { Progress, Recalculation } from './recalculate';
import { sharedFormula } from '../book/sharedFormula';
import { showValue } from './values';

/** What became of one entry of a plan. */
export interface EntryOutcome {
  readonly entry: PlanColumn;
  /** Place in the plan, from 1. */
  readonly number: number;
  readonly state: 'added' | 'already there' | 'refused';
  /** Why it was refused. */
  readonly message?: string;
  readonly target?: PlanTarget;
}

export interface PlanOutcome {
  readonly entries: readonly EntryOutcome[];
  readonly recalculation: Recalculation;
}

/**
 * Adds the columns of a plan to an open workbook and recalculates it. An entry whose place is taken is refused; one that is there already,
 * formula by formula, is left as it is.
 */
export async function applyPlan(desk: Desk, plan: Plan, progress?: Progress): Promise<PlanOutcome> {
  const entries: EntryOutcome[] = [];
  for (const [i, entry] of plan.columns.entries()) entries.push({ entry, number: i + 1, ...(await applyEntry(desk, entry)) });
  return { entries, recalculation: await desk.recalculate(progress) };
}

async function applyEntry(desk: Desk, entry: PlanColumn): Promise<Pick<EntryOutcome, 'state' | 'message' | 'target'>> {
  try {
    const formula = storedOf(desk, entry);
    const target = await planTarget(desk, entry);
    const spills = entry.mode === 'spill' || headersOf(entry).length > 1 || desk.needsArray(formula);
    if (isThere(desk, entry, target, formula, spills)) return { state: 'already there', target };
    checkFree(desk, entry, target);
    write(desk, entry, target, formula, spills);
    return { state: 'added', target };
  } catch (problem) {
    if (problem instanceof PlanRefusal) return { state: 'refused', message: problem.message };
    throw problem;
  }
}

function storedOf(desk: Desk, entry: PlanColumn): string {
  try {
    return storedFormula(entry.formula, desk.names);
  } catch (problem) {
    throw new PlanRefusal(`the formula ${(problem as Error).message}`);
  }
}

/** The formula of each row that has one. */
function* formulasOf(entry: PlanColumn, { first, last, left }: PlanTarget, formula: string): Generator<[row: number, formula: string]> {
  if (entry.mode === 'spill') return yield [first, formula];
  const moved = sharedFormula(formula, first, left);
  for (let row = first; row <= last; row++) yield [row, moved(row, left)];
}

function isThere({ working }: Desk, entry: PlanColumn, target: PlanTarget, formula: string, spills: boolean): boolean {
  const { sheet, headerRow, left } = target;
  if (!headersOf(entry).every((header, i) => working.cell(sheet, headerRow, left + i)?.value === header)) return false;
  for (const [row, wanted] of formulasOf(entry, target, formula)) {
    const cell = working.cell(sheet, row, left);
    if (cell?.formula !== wanted || (cell.array !== undefined) !== spills) return false;
  }
  return true;
}

function checkFree({ working }: Desk, entry: PlanColumn, { sheet, headerRow, left, first, last }: PlanTarget): void {
  const right = left + headersOf(entry).length - 1;
  const rows = [headerRow, ...Array.from({ length: last - first + 1 }, (_, i) => first + i)];
  for (const row of rows) {
    for (let col = left; col <= right; col++) {
      const cell = working.cell(sheet, row, col);
      if (cell) throw new PlanRefusal(`${cellName(row, col)} is occupied (it holds ${cell.formula === undefined ? showValue(cell.value) : `=${cell.formula.slice(0, 60)}`})`);
    }
  }
  const merge = working.book.source.data[sheet]?.merges.find((area) => area.top <= last && area.bottom >= headerRow && area.left <= right && area.right >= left);
  if (merge) throw new PlanRefusal(`${cellName(merge.top, merge.left)} is a merged cell`);
}

function write({ working }: Desk, entry: PlanColumn, target: PlanTarget, formula: string, spills: boolean): void {
  const { sheet, headerRow, left, first, last } = target;
  const headers = headersOf(entry);
  const neighbour = headingBeside(working, target);
  const table = spills ? undefined : tableThatGrows(working, target, headers);
  if (table) working.addTableColumn(table, headers[0], isSameEverywhere(formula, first, left) ? formula : undefined);
  else headers.forEach((header, i) => working.setConstant(sheet, headerRow, left + i, header, neighbour));
  const rows = entry.mode === 'spill' ? last - first + 1 : 1;
  for (const [row, text] of formulasOf(entry, target, formula)) {
    working.setFormula(sheet, row, left, text, spills ? { spill: { rows, cols: headers.length } } : {});
  }
  setFormats(entry, target, working);
}

/** A table that the column stands right beside, row by row: then it becomes the table's own. Spills are not allowed in tables. */
function tableThatGrows(working: Desk['working'], { sheet, headerRow, left, first, last }: PlanTarget, headers: readonly string[]): BookTable | undefined {
  const { tables, book } = working;
  if (headers.length > 1) return undefined;
  const found = tables.find((t) =>
    t.sheet === sheet && t.headerRows === 1 && t.ref.right + 1 === left && t.ref.top === headerRow && first === headerRow + 1 && last === t.ref.bottom - t.totalsRows);
  if (!found || book.source.tables.find(({ name }) => name === found.name)?.kind !== 'worksheet') return undefined;
  if (found.columns.some((c) => c.toLowerCase() === headers[0].toLowerCase())) return undefined;
  const area = { top: headerRow, bottom: found.ref.bottom, left, right: left };
  const taken = tables.some((t) => t.sheet === sheet && intersects(t.ref, area)) || book.source.data[sheet]!.merges.some((m) => intersects(m, area));
  for (let row = last + 1; row <= found.ref.bottom; row++) if (working.cell(sheet, row, left)) return undefined;
  return taken ? undefined : found;
}

/** A formula without relative addresses is what a table may offer to rows that are added later. */
const isSameEverywhere = (formula: string, row: number, col: number): boolean => sharedFormula(formula, row, col)(row + 1, col) === formula;

/** The style of the nearest heading to the left: of the table beside which the column stands, columns of this plan between them or not. */
function headingBeside(working: Desk['working'], { sheet, headerRow, left }: PlanTarget): { like: { row: number; col: number } } | undefined {
  for (let col = left - 1; col >= Math.max(1, left - 16); col--) {
    if (typeof working.stored(sheet, headerRow, col)?.value === 'string') return { like: { row: headerRow, col } };
  }
  return undefined;
}

function setFormats(entry: PlanColumn, { sheet, left, first, last }: PlanTarget, working: Desk['working']): void {
  const { numberFormat } = entry;
  if (numberFormat === undefined) return;
  const columns = typeof numberFormat === 'string' ? headersOf(entry).map(() => numberFormat) : numberFormat;
  columns.forEach((format, i) => {
    for (let row = first; format !== undefined && row <= last; row++) {
      if (working.book.numberFormat(working.book.styleAt(sheet, row, left + i)) !== format) working.setStyle(sheet, row, left + i, { numberFormat: format });
    }
  });
}
