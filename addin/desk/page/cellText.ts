import { format } from 'numfmt';
import type { CellValue } from '../book/BookCell';

/** What a cell shows: a number by its format, an error by its code. */
export function cellText(value: CellValue | undefined, numberFormat: string): string {
  if (value === undefined) return '';
  if (typeof value === 'object') return value.error;
  if (typeof value === 'boolean') return value ? 'TRUE' : 'FALSE';
  if (/^general$/i.test(numberFormat)) return typeof value === 'string' ? value : String(Number(value.toPrecision(10))); // as many digits as a cell of ordinary width shows
  try {
    return format(numberFormat, value);
  } catch {
    return String(value); // a format that cannot be read shows the plain value
  }
}

/** A constant as it is typed: a number with a point, TRUE or FALSE, else text; a leading apostrophe makes text of anything. */
export function typedConstant(text: string): CellValue {
  if (text.startsWith("'")) return text.slice(1);
  const plain = text.trim();
  if (/^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d+)?$/i.test(plain) && Number.isFinite(Number(plain))) return Number(plain);
  if (/^[+-]?(\d+(\.\d*)?|\.\d+)%$/.test(plain)) return Number(plain.slice(0, -1)) / 100;
  return /^(true|false)$/i.test(plain) ? plain.toLowerCase() === 'true' : text;
}
