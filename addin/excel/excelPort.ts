/// <reference types="office-js" />
import { translateFormulaToR1C1 } from '@borgar/fx';
import { parseAddress } from '../../functions/address';
import { PortRefusal } from '../../functions/workbook';
import type { PortArea, PortCell, PortHiddenRow, PortName, PortSheet, PortTable, PortTile, WorkbookPort } from '../../functions/workbook';

/** Runs a batch against the workbook: `Excel.run`, or a test's own. */
export type Run = <T>(batch: (context: Excel.RequestContext) => Promise<T>) => Promise<T>;

/** The most cells of one reading; what a workbook of ordinary size needs lies far below. */
const MOST_CELLS = 5_000_000;

/** A port that is told when the workbook may have changed. */
export interface ExcelPort extends WorkbookPort {
  changed(): void;
}

/**
 * The workbook behind Office.js, for reading. One call is one batch with two or three round trips, however many cells it asks for. Calls
 * in one turn of the event loop see one revision; a later turn never trusts what was read before, for a change may not have been told.
 *
 * @throws PortRefusal where an area is too large to be read; what the host throws goes through.
 */
export function excelPort(run: Run = Excel.run): ExcelPort {
  let revision = 0;
  let sameTurn = false;
  return {
    changed: () => void revision++,
    revision: () => {
      if (!sameTurn) {
        sameTurn = true;
        revision++;
        setTimeout(() => { sameTurn = false; });
      }
      return revision;
    },
    sheets: () => run(readSheets),
    date1904: () => run(readDateSystem),
    names: () => run(readNames),
    tables: () => run(readTables),
    hiddenRows: (sheet) => run((context) => readHiddenRows(context, sheet)),
    read: (areas) => run((context) => readTiles(context, areas)),
  };
}

async function readSheets(context: Excel.RequestContext): Promise<PortSheet[]> {
  const { worksheets } = context.workbook;
  worksheets.load('items/name');
  await context.sync();
  const used = worksheets.items.map((sheet) => {
    const range = sheet.getUsedRangeOrNullObject(true);
    range.load('rowIndex, rowCount, columnIndex, columnCount');
    return range;
  });
  await context.sync();
  return worksheets.items.map(({ name }, i) => (used[i].isNullObject ? { name, rows: 0, cols: 0 }
    : { name, rows: used[i].rowIndex + used[i].rowCount, cols: used[i].columnIndex + used[i].columnCount }));
}

async function readDateSystem(context: Excel.RequestContext): Promise<boolean> {
  const workbook = context.workbook as Excel.Workbook & { readonly use1904DateSystem?: boolean }; // younger than the types
  try {
    workbook.load('use1904DateSystem');
    await context.sync();
    return workbook.use1904DateSystem === true;
  } catch {
    return false; // hosts that do not know the property; dates that are wrong then do not agree with the sheet and are refused
  }
}

async function readNames(context: Excel.RequestContext): Promise<PortName[]> {
  const { names, worksheets } = context.workbook;
  const wanted = 'items/name, items/formula';
  names.load(wanted);
  worksheets.load('items/name');
  await context.sync();
  const local = worksheets.items.map((sheet) => {
    sheet.names.load(wanted);
    return sheet;
  });
  await context.sync();
  return [
    ...names.items.flatMap((item) => nameOf(item)),
    ...local.flatMap((sheet) => sheet.names.items.flatMap((item) => nameOf(item, sheet.name))),
  ];
}

/** A name whose formula cannot be read is left out: a formula that uses it is then refused as #NAME? that does not agree. */
function nameOf({ name, formula }: Excel.NamedItem, sheet?: string): PortName[] {
  try {
    const text = String(formula);
    return [{ name, formula: translateFormulaToR1C1(text.startsWith('=') ? text : `=${text}`, 'A1'), ...(sheet !== undefined && { sheet }) }];
  } catch {
    return [];
  }
}

async function readTables(context: Excel.RequestContext): Promise<PortTable[]> {
  const { tables } = context.workbook;
  tables.load('items/name, items/showHeaders, items/showTotals');
  await context.sync();
  const parts = tables.items.map((table) => {
    const range = table.getRange();
    range.load('address');
    table.columns.load('items/name');
    return { table, range };
  });
  await context.sync();
  return parts.flatMap(({ table, range }) => {
    const area = parseAddress(range.address);
    return area ? [{ name: table.name, area, columns: table.columns.items.map((c) => c.name), headerRows: table.showHeaders ? 1 : 0, totalsRows: table.showTotals ? 1 : 0 }] : [];
  });
}

async function readHiddenRows(context: Excel.RequestContext, name: string): Promise<PortHiddenRow[]> {
  const sheet = context.workbook.worksheets.getItem(name);
  const used = sheet.getUsedRangeOrNullObject(false);
  used.load('rowIndex, rowCount');
  sheet.autoFilter.load('isDataFiltered');
  const filtered = sheet.autoFilter.getRangeOrNullObject();
  filtered.load('rowIndex, rowCount');
  sheet.tables.load('items/name');
  await context.sync();
  if (used.isNullObject) return [];
  const rows = used.getRowProperties({ rowHidden: true });
  const tables = sheet.tables.items.map((table) => {
    table.autoFilter.load('isDataFiltered');
    const range = table.getRange();
    range.load('rowIndex, rowCount');
    return { filter: table.autoFilter, range };
  });
  await context.sync();
  const inForce = [
    ...(sheet.autoFilter.isDataFiltered && !filtered.isNullObject ? [filtered] : []),
    ...tables.filter(({ filter }) => filter.isDataFiltered).map(({ range }) => range),
  ];
  return rows.value.flatMap(({ rowHidden }, i) => {
    const index = used.rowIndex + i;
    return rowHidden ? [{ row: index + 1, filtered: inForce.some((r) => index > r.rowIndex && index < r.rowIndex + r.rowCount) }] : [];
  });
}

async function readTiles(context: Excel.RequestContext, areas: readonly PortArea[]): Promise<PortTile[]> {
  const cells = areas.reduce((n, a) => n + a.rows * a.cols, 0);
  if (cells > MOST_CELLS) throw new PortRefusal(`${cells} cells would have to be read at once, more than ${MOST_CELLS}: refer to smaller ranges`);
  const parts = areas.map((area) => {
    const sheet = context.workbook.worksheets.getItem(area.sheet);
    const range = sheet.getRangeByIndexes(area.row - 1, area.col - 1, area.rows, area.cols);
    range.load('formulasR1C1, values, valueTypes, hasSpill');
    sheet.protection.load('protected');
    const protection = range.format.protection;
    protection.load('formulaHidden');
    return { area, sheet, range, protection };
  });
  await context.sync();
  // Which cells belong to a spill is asked only where a tile has one (false is surely none, null is some), and there only in the columns
  // that have one: every cell that is asked costs two objects.
  const columns = parts.map(({ range, area }) => (range.hasSpill === false ? [] : Array.from({ length: area.cols }, (_, c) => {
    const column = range.getColumn(c);
    column.load('hasSpill');
    return column;
  })));
  if (columns.some((list) => list.length > 0)) await context.sync();
  const spills = parts.map(({ range, area }, i) => (columns[i].length === 0 ? undefined : askSpills(range, area, columns[i].map((column) => column.hasSpill !== false))));
  // Whether a formula is hidden is asked cell by cell only where a protected sheet has both kinds.
  const hidden = parts.map(({ sheet, protection, range, area }) =>
    (sheet.protection.protected && protection.formulaHidden === null ? range.getCellProperties({ format: { protection: true } }) : undefined) ?? area.rows);
  if (spills.some((s) => s !== undefined) || hidden.some((h) => typeof h !== 'number')) await context.sync();
  return parts.map((part, i) => tileOf(part, spills[i], hidden[i]));
}

type Part = { readonly area: PortArea; readonly sheet: Excel.Worksheet; readonly range: Excel.Range; readonly protection: Excel.FormatProtection };
type Spill = { readonly row: number; readonly col: number; readonly to: Excel.Range; readonly parent: Excel.Range };

/** Asks for the spill of every cell of some columns that is a formula or shows something; one round trip serves them all. */
function askSpills(range: Excel.Range, { rows, cols }: PortArea, inColumn: readonly boolean[]): Spill[] {
  const asked: Spill[] = [];
  for (let r = 0; r < rows; r++) {
    for (let c = 0; c < cols; c++) {
      if (!inColumn[c] || range.valueTypes[r][c] === Excel.RangeValueType.empty) continue;
      const cell = range.getCell(r, c);
      const to = cell.getSpillingToRangeOrNullObject();
      const parent = cell.getSpillParentOrNullObject();
      to.load('rowCount, columnCount');
      parent.load('rowIndex, columnIndex');
      asked.push({ row: r, col: c, to, parent });
    }
  }
  return asked;
}

function tileOf({ area, sheet, range, protection }: Part, spills: readonly Spill[] | undefined, hidden: number | OfficeExtension.ClientResult<Excel.CellProperties[][]>): PortTile {
  const spillAt = new Map((spills ?? []).map((s) => [s.row * area.cols + s.col, s]));
  const isHidden = (r: number, c: number): boolean => {
    if (!sheet.protection.protected) return false;
    if (typeof hidden !== 'number') return hidden.value[r][c].format?.protection?.formulaHidden !== false;
    return protection.formulaHidden !== false;
  };
  const cells: (PortCell | null)[] = [];
  for (let r = 0; r < area.rows; r++) {
    for (let c = 0; c < area.cols; c++) {
      const spill = spillAt.get(r * area.cols + c);
      const child = spill !== undefined && !spill.parent.isNullObject && spill.to.isNullObject;
      cells.push(cellOf(range.formulasR1C1[r][c], range.values[r][c], range.valueTypes[r][c], isHidden(r, c), {
        ...(child && { partOf: { row: spill.parent.rowIndex + 1, col: spill.parent.columnIndex + 1 } }),
        ...(spill !== undefined && !spill.to.isNullObject && { array: { rows: spill.to.rowCount, cols: spill.to.columnCount } }),
      }));
    }
  }
  return { area, cells };
}

/**
 * One cell. A constant is its own formula, so a cell holds a formula where its formula text begins with "=" and is not what it shows: the
 * text `'=A1` shows itself. A formula that shows its own text cannot be told from it, and such a text depends on nothing.
 */
function cellOf(formula: unknown, value: unknown, type: string, hidden: boolean, spill: Pick<PortCell, 'partOf' | 'array'>): PortCell | null {
  const isFormula = typeof formula === 'string' && formula.startsWith('=') && formula !== value;
  if (type === Excel.RangeValueType.empty && !isFormula) return null;
  const shown: PortCell['value'] = type === Excel.RangeValueType.error ? { error: String(value) }
    : typeof value === 'number' || typeof value === 'string' || typeof value === 'boolean' ? value : { error: '#VALUE!' };
  return {
    value: shown,
    ...(isFormula && !spill.partOf && { formula: String(formula) }),
    ...spill,
    // a hidden formula may show its value in place of itself [?], so any cell that may hide one counts as a formula that cannot be read
    ...(hidden && { hidden: true, formula: '=NA()' }),
  };
}
