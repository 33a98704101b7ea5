/// <reference types="office-js" />
import { translateFormulaToR1C1 } from '@borgar/fx';
import { parseAddress } from '../../functions/address';
import type { PortName, PortSheet, PortTable } from '../../functions/workbook';

export async function readSheets(context: Excel.RequestContext): Promise<PortSheet[]> {
  const { worksheets } = context.workbook;
  worksheets.load('items/name');
  await context.sync();
  const used = worksheets.items.map((sheet) => {
    // Formatted cells count too: whether "only values" leaves out a formula that shows "" is not documented [?], and a formula that is not
    // read would cut the chain.
    const range = sheet.getUsedRangeOrNullObject(false);
    range.load('rowIndex, rowCount, columnIndex, columnCount');
    return range;
  });
  await context.sync();
  return worksheets.items.map(({ name }, i) => (used[i].isNullObject ? { name, rows: 0, cols: 0 }
    : { name, rows: used[i].rowIndex + used[i].rowCount, cols: used[i].columnIndex + used[i].columnCount }));
}

export async function readDateSystem(context: Excel.RequestContext): Promise<boolean> {
  const workbook = context.workbook as Excel.Workbook & { readonly use1904DateSystem?: boolean }; // not among the types
  try {
    workbook.load('use1904DateSystem');
    await context.sync();
    return workbook.use1904DateSystem === true;
  } catch {
    return false; // hosts that do not know the property; dates that are wrong then do not agree with the sheet and are refused
  }
}

export async function readNames(context: Excel.RequestContext): Promise<PortName[]> {
  const { names, worksheets } = context.workbook;
  const wanted = 'items/name, items/formula';
  names.load(wanted);
  worksheets.load('items/name');
  await context.sync();
  for (const sheet of worksheets.items) sheet.names.load(wanted);
  await context.sync();
  return [
    ...names.items.flatMap((item) => nameOf(item)),
    ...worksheets.items.flatMap((sheet) => sheet.names.items.flatMap((item) => nameOf(item, sheet.name))),
  ];
}

/**
 * A name whose formula cannot be read is left out: a formula that uses it is then refused. So is a name with relative references: it is
 * not documented which cell their text stands for [?] (in the name manager it is the selected one), and a guess could follow a cell
 * that shows the same value by chance.
 */
function nameOf({ name, formula }: Excel.NamedItem, sheet?: string): PortName[] {
  try {
    const text = String(formula);
    const [fromA1, fromB2] = ['A1', 'B2'].map((anchor) => translateFormulaToR1C1(text.startsWith('=') ? text : `=${text}`, anchor));
    return fromA1 === fromB2 ? [{ name, formula: fromA1, ...(sheet !== undefined && { sheet }) }] : [];
  } catch {
    return [];
  }
}

export async function readTables(context: Excel.RequestContext): Promise<PortTable[]> {
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
