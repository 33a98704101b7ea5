/// <reference types="office-js" />
import type { PortHiddenRow } from '../../functions/workbook';

/**
 * The rows of a sheet that do not show. Below the heading of a filter in force every row that does not show counts as left out by it, as
 * Excel counts it too: while a filter is in force it does not tell the two apart.
 */
export async function readHiddenRows(context: Excel.RequestContext, name: string): Promise<PortHiddenRow[]> {
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
    const body = table.getDataBodyRange(); // neither heading nor totals: a filter does not touch them
    body.load('rowIndex, rowCount');
    return { filter: table.autoFilter, body };
  });
  await context.sync();
  const inForce = [
    ...(sheet.autoFilter.isDataFiltered && !filtered.isNullObject ? [{ first: filtered.rowIndex + 1, end: filtered.rowIndex + filtered.rowCount }] : []),
    ...tables.filter(({ filter }) => filter.isDataFiltered).map(({ body }) => ({ first: body.rowIndex, end: body.rowIndex + body.rowCount })),
  ];
  return rows.value.flatMap(({ rowHidden }, i) => {
    const index = used.rowIndex + i;
    return rowHidden ? [{ row: index + 1, filtered: inForce.some(({ first, end }) => index >= first && index < end) }] : [];
  });
}
