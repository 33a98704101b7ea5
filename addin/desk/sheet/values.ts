import type { CellValue } from '../book/BookCell';

/** Whether two values show the same. */
export function sameValue(a: CellValue | undefined, b: CellValue | undefined): boolean {
  return typeof a === 'object' && typeof b === 'object' ? a.error === b.error : a === b;
}

export const isSpillError = (value: CellValue | undefined): boolean => typeof value === 'object' && value.error === '#SPILL!';

/** The errors that the file format knows; a newer one is stored as #VALUE!, as Excel does. */
const STORED_ERRORS = new Set(['#NULL!', '#DIV/0!', '#VALUE!', '#REF!', '#NAME?', '#NUM!', '#N/A', '#GETTING_DATA']);

/** A value as the file can hold it. */
export const storedValue = (value: CellValue): CellValue =>
  typeof value === 'object' && !STORED_ERRORS.has(value.error) ? { error: '#VALUE!' } : value;

/** A value in words, for a message. */
export function showValue(value: CellValue | undefined): string {
  if (value === undefined) return 'a formula without a result';
  if (typeof value === 'object') return value.error;
  if (typeof value === 'string') return `"${value.length > 40 ? `${value.slice(0, 40)}…` : value}"`;
  return typeof value === 'boolean' ? String(value).toUpperCase() : String(value);
}
