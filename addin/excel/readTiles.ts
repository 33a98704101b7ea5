/// <reference types="office-js" />
import { sheetCols, sheetRows } from '../../functions/address';
import { PortRefusal } from '../../functions/workbook';
import type { PortArea, PortCell, PortTile } from '../../functions/workbook';
import { legacyArrays } from './legacyArrays';
import type { Grown, Part } from './legacyArrays';
import { isTooLarge } from './run';

/** The most cells of one reading; what a workbook of ordinary size needs lies far below. */
const MOST_CELLS = 5_000_000;

/** Cells of one round trip: at some 150 bytes a cell well below the 5 MB that Excel on the web sends at once. */
const CELLS_A_TRIP = 25_000;

/** Questions about single cells in one round trip; each is a request of its own in the message. */
const QUESTIONS_A_TRIP = 1_500;

type Cells = (PortCell | null)[];

/** Reads areas in one batch: one round trip where all cells are constants and formulas of their own, two more where one holds arrays. */
export async function readTiles(context: Excel.RequestContext, areas: readonly PortArea[]): Promise<PortTile[]> {
  const count = areas.reduce((n, a) => n + a.rows * a.cols, 0);
  if (count > MOST_CELLS) throw new PortRefusal(`${count} cells would have to be read at once, more than ${MOST_CELLS}: refer to smaller ranges`);
  const slices = areas.map(sliced);
  const cells = new Map<PortArea, Cells>();
  for (const batch of batches(slices.flat())) (await readBatch(context, batch)).forEach((found, i) => cells.set(batch[i], found));
  return areas.map((area, i) => ({ area, cells: slices[i].flatMap((slice) => cells.get(slice)!) }));
}

/** An area in slices of whole rows, none larger than a round trip where a row is not. */
function sliced(area: PortArea): PortArea[] {
  const height = Math.max(1, Math.floor(CELLS_A_TRIP / area.cols));
  if (area.rows <= height) return [area];
  return Array.from({ length: Math.ceil(area.rows / height) }, (_, i) => ({ ...area, row: area.row + i * height, rows: Math.min(height, area.rows - i * height) }));
}

function batches(slices: readonly PortArea[]): PortArea[][] {
  const all: PortArea[][] = [];
  let room = 0;
  for (const slice of slices) {
    const size = slice.rows * slice.cols;
    if (size > room || all.length === 0) {
      all.push([]);
      room = CELLS_A_TRIP;
    }
    all[all.length - 1].push(slice);
    room -= size;
  }
  return all;
}

/** The cells of each slice. An answer that is too large, for its texts are long, is asked for again in halves. */
async function readBatch(context: Excel.RequestContext, slices: readonly PortArea[]): Promise<Cells[]> {
  try {
    return await readSlices(context, slices);
  } catch (thrown) {
    const [only] = slices;
    if (!isTooLarge(thrown) || (slices.length === 1 && only.rows === 1)) throw thrown;
    if (slices.length === 1) {
      const rows = Math.ceil(only.rows / 2);
      const halves = [{ ...only, rows }, { ...only, row: only.row + rows, rows: only.rows - rows }];
      return [[...(await readBatch(context, halves.slice(0, 1))), ...(await readBatch(context, halves.slice(1)))].flat()];
    }
    const middle = Math.ceil(slices.length / 2);
    return [...(await readBatch(context, slices.slice(0, middle))), ...(await readBatch(context, slices.slice(middle)))];
  }
}

async function readSlices(context: Excel.RequestContext, slices: readonly PortArea[]): Promise<Cells[]> {
  const parts = slices.map((area): Part => {
    const sheet = context.workbook.worksheets.getItem(area.sheet);
    const range = sheet.getRangeByIndexes(area.row - 1, area.col - 1, area.rows, area.cols);
    range.load('formulasR1C1, values, valueTypes, hasSpill, savedAsArray');
    sheet.protection.load('protected');
    range.format.protection.load('formulaHidden');
    return { area, sheet, range };
  });
  await context.sync();

  // Where a slice has spills, array formulas, or cells with hidden formulas beside others: in which columns, and what formulas. Of these
  // properties false is surely none, null is some.
  const more = parts.map((part) => ({ columns: askColumns(part), grown: askGrown(part), hidden: askHidden(part) }));
  if (more.some(({ columns, grown, hidden }) => columns || grown || hidden)) await context.sync();

  const trips = new Trips(context);
  const answers: { spills: Map<number, Spill>; arrays: Awaited<ReturnType<typeof legacyArrays>> }[] = [];
  for (const [i, part] of parts.entries()) {
    const { columns, grown } = more[i];
    answers.push({ spills: columns ? await askSpills(part, columns, trips) : new Map(), arrays: grown ? await legacyArrays(part, grown, trips) : () => undefined });
  }
  await trips.end();
  return parts.map((part, i) => cellsOf(part, answers[i].spills, answers[i].arrays, more[i].hidden));
}

/** Sends questions before they are too many for one message. */
class Trips {
  private waiting = 0;

  constructor(private readonly context: Excel.RequestContext) {}

  async asked(): Promise<void> {
    if (++this.waiting >= QUESTIONS_A_TRIP) await this.end();
  }

  async end(): Promise<void> {
    if (this.waiting > 0) await this.context.sync();
    this.waiting = 0;
  }
}

/** Asks of each column whether it has a spill. */
function askColumns({ range, area }: Part): Excel.Range[] | undefined {
  if (range.hasSpill === false) return undefined;
  return Array.from({ length: area.cols }, (_, c) => {
    const column = range.getColumn(c);
    column.load('hasSpill');
    return column;
  });
}

/** The formulas (A1) of a slice with array formulas and of the cells around it, which tell whether an array goes on there. */
function askGrown({ sheet, range, area }: Part): Grown | undefined {
  if (range.savedAsArray === false) return undefined;
  const top = Math.max(1, area.row - 1);
  const left = Math.max(1, area.col - 1);
  const bottom = Math.min(sheetRows, area.row + area.rows);
  const right = Math.min(sheetCols, area.col + area.cols);
  const around = sheet.getRangeByIndexes(top - 1, left - 1, bottom - top + 1, right - left + 1);
  around.load('formulas');
  return { range: around, top, left };
}

type Hidden = OfficeExtension.ClientResult<Excel.CellProperties[][]>;

function askHidden({ sheet, range }: Part): Hidden | undefined {
  return sheet.protection.protected && range.format.protection.formulaHidden === null ? range.getCellProperties({ format: { protection: true } }) : undefined;
}

interface Spill {
  readonly to: Excel.Range;
  readonly parent: Excel.Range;
}

/** Asks for the spill of every cell of the columns that have one, by the cells' places in the slice. */
async function askSpills({ range, area }: Part, columns: readonly Excel.Range[], trips: Trips): Promise<Map<number, Spill>> {
  const asked = new Map<number, Spill>();
  for (let c = 0; c < area.cols; c++) {
    if (columns[c].hasSpill === false) continue;
    for (let r = 0; r < area.rows; r++) {
      const cell = range.getCell(r, c);
      const spill = { to: cell.getSpillingToRangeOrNullObject(), parent: cell.getSpillParentOrNullObject() };
      spill.to.load('rowCount, columnCount');
      spill.parent.load('rowIndex, columnIndex');
      asked.set(r * area.cols + c, spill);
      await trips.asked();
    }
  }
  return asked;
}

type InArray = Pick<PortCell, 'array' | 'partOf' | 'formula'>;

function cellsOf({ area, sheet, range }: Part, spills: ReadonlyMap<number, Spill>, arrays: (place: number) => InArray | undefined, hidden: Hidden | undefined): Cells {
  const isHidden = (r: number, c: number): boolean =>
    sheet.protection.protected && (hidden ? hidden.value[r][c].format?.protection?.formulaHidden : range.format.protection.formulaHidden) !== false;
  const cells: Cells = [];
  for (let r = 0; r < area.rows; r++) {
    for (let c = 0; c < area.cols; c++) {
      const place = r * area.cols + c;
      const array = spilled(spills.get(place)) ?? arrays(place) ?? {};
      cells.push(cellOf(range.formulasR1C1[r][c], range.values[r][c], range.valueTypes[r][c], isHidden(r, c), array));
    }
  }
  return cells;
}

/** Whether an anchor is its own parent is not documented [?]: what spills is an anchor, whatever its parent. */
function spilled(spill: Spill | undefined): InArray | undefined {
  if (!spill) return undefined;
  if (!spill.to.isNullObject) return { array: { rows: spill.to.rowCount, cols: spill.to.columnCount } };
  return spill.parent.isNullObject ? undefined : { partOf: { row: spill.parent.rowIndex + 1, col: spill.parent.columnIndex + 1 } };
}

/**
 * One cell. A constant is its own formula, so a cell holds a formula where its formula text begins with "=" and is not what it shows: the
 * text `'=A1` shows itself. A formula that shows its own text cannot be told from it, and such a text depends on nothing.
 *
 * `implicit` is never set: an Excel with dynamic arrays writes `@` where it means the cell of the same row.
 */
function cellOf(formula: unknown, value: unknown, type: string, hidden: boolean, array: InArray): PortCell | null {
  const isFormula = isFormulaText(formula, value);
  if (type === 'Empty' && !isFormula && !array.partOf) return null;
  const shown: PortCell['value'] = type === 'Error' ? { error: String(value) }
    : typeof value === 'number' || typeof value === 'string' || typeof value === 'boolean' ? value : { error: '#VALUE!' };
  return {
    value: shown,
    ...(isFormula && !array.partOf && { formula: String(formula) }),
    ...array,
    // a hidden formula may show its value in place of itself [?], so any cell that may hide one counts as a formula that cannot be read
    ...(hidden && { hidden: true, formula: '=NA()' }),
  };
}

const isFormulaText = (formula: unknown, value: unknown): formula is string => typeof formula === 'string' && formula.startsWith('=') && formula !== value;
