import type { CellValue } from '../book/BookCell';
import type { ContentEdit, Edit, StyleRequest } from '../book/Edit';
import { placeKey, placeOf } from './places';
import { sameValue, storedValue } from './values';
import type { WorkingBook, WorkingCell } from './WorkingBook';

/** The edits that bring the file up to the working book: only cells that differ from what is stored. */
export function bookEdits(working: WorkingBook): Edit[] {
  const { tableColumns } = working;
  const edits: Edit[] = tableColumns.map(({ table, name, formula }) => ({ set: 'tableColumn', table, name, ...(formula !== undefined && { formula }) }));
  const headings = new Set(tableColumns.map(({ sheet, row, col }) => placeKey(sheet, row, col)));
  const keys = new Set([...working.changed.keys(), ...working.styles.keys()]);
  for (const key of [...keys].sort((a, b) => a - b)) {
    if (headings.has(key)) continue; // the edit of the table writes it
    const { sheet, row, col } = placeOf(key);
    const style = working.styles.get(key);
    const edit = editOf(working, sheet, row, col, style);
    if (edit) edits.push(edit);
    else if (style) edits.push({ set: 'style', sheet, row, col, style });
  }
  return edits;
}

function editOf(working: WorkingBook, sheet: number, row: number, col: number, style: StyleRequest | undefined): ContentEdit | undefined {
  const before = working.stored(sheet, row, col);
  const now = working.cell(sheet, row, col);
  const place = { sheet, row, col, ...(style && { style }) };
  if (!now) return before ? { set: 'clear', ...place } : undefined;
  const value = now.value === undefined ? undefined : storedValue(now.value);
  if (now.partOf) {
    const replaced = isReplaced(working, sheet, now.partOf.row, now.partOf.col);
    return replaced || !sameValue(before?.value, value) ? { set: 'result', ...place, value: value ?? null } : undefined;
  }
  if (now.formula === undefined) {
    const kept = before && before.formula === undefined && !before.partOf && sameValue(before.value, value);
    return kept || value === undefined ? undefined : { set: 'constant', ...place, value };
  }
  if (isReplaced(working, sheet, row, col)) return { set: 'formula', ...place, formula: now.formula, ...newResult(now, row, col, value) };
  return sameValue(before?.value, value) ? undefined : { set: 'result', ...place, value: value ?? null };
}

/** Whether the formula of a cell, or the size of its spill, is not what is stored. */
function isReplaced(working: WorkingBook, sheet: number, row: number, col: number): boolean {
  const now = working.changed.get(placeKey(sheet, row, col));
  if (!now) return false;
  const before = working.stored(sheet, row, col);
  return before?.formula !== now.formula || before?.array?.rows !== now.array?.rows || before?.array?.cols !== now.array?.cols;
}

function newResult({ array }: WorkingCell, row: number, col: number, value: CellValue | undefined): object {
  return {
    ...(value !== undefined && { value }),
    ...(array && { array: { ref: { top: row, left: col, bottom: row + array.rows - 1, right: col + array.cols - 1 }, dynamic: true as const } }),
  };
}
