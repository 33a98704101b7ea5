/// <reference types="office-js" />
import type { PortArea, PortCell } from '../../functions/workbook';

/** A slice that is being read. */
export interface Part {
  readonly area: PortArea;
  readonly sheet: Excel.Worksheet;
  readonly range: Excel.Range;
}

/** The cells of a slice and those around it, as far as the sheet goes; row and column of the first. */
export interface Grown {
  readonly range: Excel.Range;
  readonly top: number;
  readonly left: number;
}

/** Stands in place of a formula whose array cannot be told: a function that nobody knows, so that following it is refused by name. */
const UNKNOWN_ARRAY = '=LEGACY.ARRAY()';

/**
 * Array formulas over several cells from before spills, entered by Ctrl+Shift+Enter. Nothing in the interface tells their range. Every
 * cell of one shows the same formula in A1 form, and in R1C1 form as if it stood there for itself (seen in the vendor's issue list), which
 * would be followed to the wrong cells. So a rectangle of cells that are saved as array formulas and show the same formula counts as one
 * array. Where they are neighbours by chance, and each gives one value, that comes to the same.
 *
 * A group that goes on outside of the slice, or is no rectangle, becomes a formula that cannot be followed.
 *
 * @returns what the cell at a place of the slice is part of; to be called after the next round trip.
 */
export async function legacyArrays({ range, area }: Part, grown: Grown, trips: { asked(): Promise<void> }): Promise<(place: number) => Pick<PortCell, 'array' | 'partOf' | 'formula'> | undefined> {
  const { formulas } = grown.range;
  const text = (row: number, col: number): unknown => formulas[row - grown.top]?.[col - grown.left];
  const asked = new Map<number, Excel.Range>();
  const placeOf = (row: number, col: number): number => (row - area.row) * area.cols + (col - area.col);
  const isInside = (row: number, col: number): boolean => row >= area.row && row < area.row + area.rows && col >= area.col && col < area.col + area.cols;
  for (let r = 0; r < area.rows; r++) {
    for (let c = 0; c < area.cols; c++) {
      const own = text(area.row + r, area.col + c);
      if (typeof own !== 'string' || !own.startsWith('=') || own === range.values[r][c]) continue;
      if (!beside(area.row + r, area.col + c).some(([row, col]) => text(row, col) === own)) continue;
      const cell = range.getCell(r, c);
      cell.load('savedAsArray, hasSpill');
      asked.set(r * area.cols + c, cell);
      await trips.asked();
    }
  }

  /** Cells outside of the slice were not asked: they count as arrays, which at worst refuses. */
  const same = (row: number, col: number, own: unknown): boolean => {
    if (text(row, col) !== own) return false;
    if (!isInside(row, col)) return true;
    const cell = asked.get(placeOf(row, col));
    return cell !== undefined && cell.savedAsArray !== false && cell.hasSpill === false;
  };

  let found: Map<number, Pick<PortCell, 'array' | 'partOf' | 'formula'>> | undefined;
  const find = (): typeof found => {
    const groups = new Map<number, Pick<PortCell, 'array' | 'partOf' | 'formula'>>();
    for (const place of asked.keys()) {
      if (groups.has(place)) continue;
      const [row, col] = [area.row + Math.floor(place / area.cols), area.col + (place % area.cols)];
      const own = text(row, col);
      if (!same(row, col, own)) continue;
      const group = connected(row, col, (r, c) => isInside(r, c) && same(r, c, own));
      const rows = Math.max(...group.map(([r]) => r)) - row + 1;
      const cols = Math.max(...group.map(([, c]) => c)) - col + 1;
      const isWhole = group.length === rows * cols && group.every(([r, c]) => c >= col && beside(r, c).every(([nr, nc]) => isInside(nr, nc) || !same(nr, nc, own)));
      if (group.length === 1 && isWhole) continue;
      for (const [r, c] of group) {
        groups.set(placeOf(r, c), !isWhole ? { formula: UNKNOWN_ARRAY } : r === row && c === col ? { array: { rows, cols } } : { partOf: { row, col } });
      }
    }
    return groups;
  };
  return (place) => (found ??= find())!.get(place);
}

const beside = (row: number, col: number): [row: number, col: number][] => [[row - 1, col], [row + 1, col], [row, col - 1], [row, col + 1]];

/** The cells that hang together with one, itself included. */
function connected(row: number, col: number, belongs: (row: number, col: number) => boolean): [row: number, col: number][] {
  const group: [number, number][] = [[row, col]];
  const known = new Set([`${row} ${col}`]);
  for (const [r, c] of group) {
    for (const [nr, nc] of beside(r, c)) {
      if (known.has(`${nr} ${nc}`) || !belongs(nr, nc)) continue;
      known.add(`${nr} ${nc}`);
      group.push([nr, nc]);
    }
  }
  return group;
}
