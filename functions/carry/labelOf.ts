import type { CellPlace } from '../engine/graph/cellGraph';
import { cellName } from '../engine/graph/address';
import type { Snapshot } from './Snapshot';

/** How far to look for a label: to the left, and upwards. */
const LEFT = 8;
const UP = 5000;

/**
 * What a person calls a cell: the text beside it, or above it. In a column of numbers the heading above is the name, in a form
 * the text to the left. Falls back on the address.
 */
export async function labelOf(snapshot: Snapshot, place: CellPlace): Promise<string> {
  const { sheet, row, col } = place;
  snapshot.want({ k: 'area', sheet, r1: row, c1: Math.max(1, col - LEFT), r2: row, c2: col });
  snapshot.want({ k: 'area', sheet, r1: Math.max(1, row - UP), c1: col, r2: row + 1, c2: col });
  await snapshot.fetch();
  const left = firstText(snapshot, sheet, Array.from({ length: Math.min(LEFT, col - 1) }, (_, i) => [row, col - 1 - i]));
  const above = firstText(snapshot, sheet, Array.from({ length: Math.min(UP, row - 1) }, (_, i) => [row - 1 - i, col]));
  const inColumn = isNumber(snapshot, sheet, row - 1, col) || isNumber(snapshot, sheet, row + 1, col);
  return (inColumn ? (above ?? left) : (left ?? above)) ?? cellName(row, col);
}

function firstText(snapshot: Snapshot, sheet: number, places: number[][]): string | undefined {
  for (const [row, col] of places) {
    const value = snapshot.cell(sheet, row, col)?.value;
    if (typeof value === 'string' && value.trim() !== '') return value.trim().replace(/\s+/g, ' ');
  }
  return undefined;
}

const isNumber = (snapshot: Snapshot, sheet: number, row: number, col: number): boolean =>
  row >= 1 && typeof snapshot.cell(sheet, row, col)?.value === 'number';
