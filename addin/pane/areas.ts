import { parseAddress } from '../../functions/address';
import { columnLetters, sheetPrefix } from '../../functions/engine/graph/address';
import type { PortArea } from '../../functions/workbook';

/** `B2:B61`, with its sheet where it is not `home`. */
export function addressOf({ sheet, row, col, rows, cols }: PortArea, home?: string): string {
  const first = `${columnLetters(col)}${row}`;
  const last = `${columnLetters(col + cols - 1)}${row + rows - 1}`;
  return `${sheet === home ? '' : sheetPrefix(sheet)}${first}${first === last ? '' : `:${last}`}`;
}

/** Reads an address as a person types it; without a sheet it is on `home`. */
export const areaOf = (text: string, home: string): PortArea | undefined => {
  const typed = text.trim();
  return typed === '' ? undefined : parseAddress(typed.includes('!') ? typed : `${sheetPrefix(home)}${typed}`);
};

/** The part of an area that belongs to some of its rows. */
export const rowsOf = (area: PortArea, first: number, rows: number): PortArea => ({ ...area, row: area.row + first, rows });
