import type { ContentEdit, Edit } from '../book/Edit';
import { tokenize } from '@borgar/fx';
import { bookEdits } from './bookEdits';
import { placeKey, placeOf } from './places';
import { storedValue } from './values';
import type { WorkingBook } from './WorkingBook';

/**
 * The edits of a copy for readers without the add-in: what the library's functions gave stands there as plain values, spills
 * included; everything else is as `bookEdits` has it.
 */
export function valueEdits(working: WorkingBook): Edit[] {
  const library = libraryCells(working);
  const others = bookEdits(working)
    .filter((edit) => edit.set === 'tableColumn' || !library.has(placeKey(edit.sheet, edit.row, edit.col)))
    .map((edit): Edit => (edit.set === 'tableColumn' ? { set: 'tableColumn', table: edit.table, name: edit.name } : edit));
  const plain = [...library].sort((a, b) => a - b).map((key): ContentEdit => {
    const { sheet, row, col } = placeOf(key);
    const style = working.styles.get(key);
    const place = { sheet, row, col, ...(style && { style }) };
    const value = working.cell(sheet, row, col)?.value;
    return value === undefined || value === null ? { set: 'clear', ...place } : { set: 'constant', ...place, value: storedValue(value) };
  });
  return [...others, ...plain];
}

/** Cells whose formula calls a function of the library, and the cells they spill over. */
function libraryCells(working: WorkingBook): Set<number> {
  const found = new Set<number>();
  for (const [key, { formula, array }] of working.formulaCells()) {
    if (!tokenize(`=${formula}`).some(({ type, value }) => type === 'func' && working.names.isOurs(value))) continue;
    const { sheet, row, col } = placeOf(key);
    for (let i = 0; i < (array?.rows ?? 1); i++) for (let j = 0; j < (array?.cols ?? 1); j++) found.add(placeKey(sheet, row + i, col + j));
  }
  return found;
}
