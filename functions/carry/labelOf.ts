import type { CellPlace } from '../engine/graph/cellGraph';
import { cellName } from '../engine/graph/address';
import type { Snapshot } from './Snapshot';

/** How far to look for a label: to the left, and upwards. */
const LEFT = 8;
const UP = 5000;

/** A text to the left that is no longer than this is a symbol or a unit; the name stands before it. */
const LONGEST_SYMBOL = 3;

/**
 * What a person calls a cell: the text beside it, or above it. In a column of numbers the heading above is the name, unless it
 * says no more than "Value"; in a form the text to the left. Falls back on the address.
 */
export async function labelOf(snapshot: Snapshot, place: CellPlace): Promise<string> {
  const { sheet, row, col } = place;
  snapshot.want({ k: 'area', sheet, r1: row, c1: Math.max(1, col - LEFT), r2: row, c2: col });
  snapshot.want({ k: 'area', sheet, r1: Math.max(1, row - UP), c1: col, r2: row + 1, c2: col });
  await snapshot.fetch();
  const besides = texts(snapshot, sheet, Array.from({ length: Math.min(LEFT, col - 1) }, (_, i) => [row, col - 1 - i]));
  const left = besides.find((t) => t.length > LONGEST_SYMBOL) ?? besides[0];
  const [above] = texts(snapshot, sheet, Array.from({ length: Math.min(UP, row - 1) }, (_, i) => [row - 1 - i, col]), 1);
  const inColumn = isNumber(snapshot, sheet, row - 1, col) || isNumber(snapshot, sheet, row + 1, col);
  const named = above !== undefined && !PLAIN_HEADING.test(above);
  return (inColumn && named ? above : (left ?? above)) ?? cellName(row, col);
}

/** Headings that say no more than that numbers stand below. */
const PLAIN_HEADING = /^(values?|numbers?|figures?|entry|entries|input|data|amounts?)$/i;

/** The texts at these places, in order, at most so many. */
function texts(snapshot: Snapshot, sheet: number, places: number[][], most = Infinity): string[] {
  const found: string[] = [];
  for (const [row, col] of places) {
    const value = snapshot.cell(sheet, row, col)?.value;
    if (typeof value === 'string' && value.trim() !== '') found.push(value.trim().replace(/\s+/g, ' '));
    if (found.length >= most) break;
  }
  return found;
}

const isNumber = (snapshot: Snapshot, sheet: number, row: number, col: number): boolean =>
  row >= 1 && typeof snapshot.cell(sheet, row, col)?.value === 'number';
