import { parseCell } from '../../../addin/desk/book/area';
import { openBook } from '../../../addin/desk/book/openBook';
import { Desk } from '../../../addin/desk/sheet/Desk';
import type { Recalculation } from '../../../addin/desk/sheet/recalculate';
import { builtFunctions } from './bundle';
import { smallBook } from './smallBook';
import type { SmallCell } from './smallBook';

/** A desk over a book of one sheet named S. */
export const deskOn = (cells: Readonly<Record<string, SmallCell>>, names?: Readonly<Record<string, string>>): Desk =>
  new Desk(openBook(smallBook({ S: cells }, names)), builtFunctions());

/** What a cell of the first sheet shows: an error as its code, a blank or uncomputed one as null. */
export function shown(desk: Desk, address: string): number | string | boolean | null {
  const { row, col } = parseCell(address)!;
  return plain(desk.working.cell(0, row, col)?.value);
}

/** What a cell of the first sheet shows in the file that the desk writes. */
export function written(desk: Desk, address: string): number | string | boolean | null {
  const { row, col } = parseCell(address)!;
  return plain(openBook(desk.write()).cell(0, row, col)?.value);
}

/** Refusals as `S!B1: #VALUE!: words`. */
export const refusals = ({ refused }: Recalculation): string[] => refused.map(({ cell, error, message }) => `${cell}: ${error ?? 'no result'}: ${message}`);

const plain = (value: unknown): number | string | boolean | null =>
  value == null ? null : typeof value === 'object' ? (value as { error: string }).error : (value as number | string | boolean);
