import type { Area } from './area';
import type { CellValue } from './BookCell';

/** What happens to one cell of a sheet part. */
export interface CellChange {
  content?:
    | { kind: 'formula'; formula: string; value?: CellValue; spill?: Area }
    | { kind: 'constant'; value: CellValue }
    | { kind: 'result'; value: CellValue | null }
    | { kind: 'clear' };
  /** Index into `cellXfs`; undefined: as it is. */
  style?: number;
  /** The formula written out where it only pointed to its owner; with `si` and `ref` the cell becomes the owner. */
  shared?: { formula: string; owner?: { si: string; ref: Area } };
}

/** Changes by row, then column. */
export type SheetChanges = Map<number, Map<number, CellChange>>;

/** The change of a cell, made where there is none yet. */
export function changeAt(changes: SheetChanges, row: number, col: number): CellChange {
  let cells = changes.get(row);
  if (!cells) changes.set(row, (cells = new Map()));
  let change = cells.get(col);
  if (!change) cells.set(col, (change = {}));
  return change;
}
