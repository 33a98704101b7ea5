import type { CellValue } from '../book/BookCell';
import { placeKey, placeOf } from './places';
import { isSpillError, sameValue } from './values';
import type { WorkingBook } from './WorkingBook';

/** The whole result of a spilling formula. */
export interface SpillResult {
  readonly rows: number;
  readonly cols: number;
  valueAt(r: number, c: number): CellValue;
}

export interface MovedSpills {
  /** Cells whose content came, went or changed. */
  readonly changed: readonly number[];
  readonly blocked: readonly { readonly key: number; readonly words: string }[];
  /** Places of which nothing that was said before holds: cells of blocked results, anchors that are blocked no longer. */
  readonly gone: readonly number[];
}

/** Where the results of spilling formulas go. In order of their anchors; who comes first has the place. */
export class SpillPlaces {
  private readonly results = new Map<number, SpillResult>();
  private readonly blocked = new Set<number>();

  constructor(private readonly working: WorkingBook) {}

  /** Another recalculation: what was found in the last one has its place. */
  begin(): void {
    for (const key of this.results.keys()) if (!this.blocked.has(key)) this.results.delete(key);
  }

  /** A formula is about to be computed anew. */
  forget(key: number): void {
    this.results.delete(key);
  }

  found(key: number, result: SpillResult): void {
    this.results.set(key, result);
  }

  /** Gives every result found so far its place. */
  place(): MovedSpills {
    const changed: number[] = [];
    const blocked: { key: number; words: string }[] = [];
    const gone: number[] = [];
    const due = [...this.results.keys()].sort((a, b) => a - b).filter((key) => !this.stands(key));
    const before = new Map(due.flatMap((key) => this.clear(key)));
    for (const key of due) {
      const { sheet, row, col } = placeOf(key);
      const { rows, cols, valueAt } = this.results.get(key)!;
      const parts = cellsOf(key, rows, cols);
      const obstacle = this.obstacle(key);
      changed.push(key);
      if (obstacle === undefined) {
        this.working.resize(sheet, row, col, rows, cols, valueAt);
        if (this.blocked.delete(key)) gone.push(key);
        for (const [part, r, c] of parts) {
          if (!before.has(part) || !sameValue(before.get(part), valueAt(r, c))) changed.push(part);
          before.delete(part);
        }
      } else {
        blocked.push({ key, words: `its result of ${rows} × ${cols} cells ${obstacle}` });
        gone.push(...parts.map(([part]) => part));
        if (isSpillError(this.working.cell(sheet, row, col)?.value)) changed.pop();
        this.blocked.add(key);
        this.working.setValue(sheet, row, col, { error: '#SPILL!' });
      }
    }
    return { changed: [...changed, ...before.keys()], blocked, gone };
  }

  private obstacle(key: number): string | undefined {
    const { sheet, row, col } = placeOf(key);
    const { rows, cols } = this.results.get(key)!;
    if (rows * cols > MOST_CELLS) return `would have more than ${MOST_CELLS} cells`;
    return this.working.obstacle(sheet, row, col, rows, cols);
  }

  /** Whether the spill has its size and its values already. */
  private stands(key: number): boolean {
    const { sheet, row, col } = placeOf(key);
    const now = this.working.cell(sheet, row, col)?.array;
    const { rows, cols } = this.results.get(key)!;
    return now !== undefined && now.rows === rows && now.cols === cols && !this.blocked.has(key);
  }

  /** Takes the cells of a spill away but for its anchor; gives them with what they showed. */
  private clear(key: number): [key: number, value: CellValue | undefined][] {
    const { sheet, row, col } = placeOf(key);
    const anchor = this.working.cell(sheet, row, col)!;
    const { rows, cols } = anchor.array!;
    const parts = cellsOf(key, rows, cols).map(([part, r, c]): [number, CellValue | undefined] => [part, this.working.cell(sheet, row + r, col + c)?.value]);
    if (parts.length > 0) this.working.resize(sheet, row, col, 1, 1, () => anchor.value);
    return parts;
  }
}

/** As many as a column has: what a file takes as one spill. */
const MOST_CELLS = 1_048_576;

/** The cells of a spill but for its anchor, with their row and column counted from it. */
function cellsOf(anchor: number, rows: number, cols: number): [key: number, r: number, c: number][] {
  const { sheet, row, col } = placeOf(anchor);
  const cells: [number, number, number][] = [];
  for (let r = 0; r < rows; r++) for (let c = 0; c < cols; c++) if (r > 0 || c > 0) cells.push([placeKey(sheet, row + r, col + c), r, c]);
  return cells;
}
