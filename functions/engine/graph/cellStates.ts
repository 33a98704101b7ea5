/** What is known of a cell: nothing, begun, waiting for something outside, blank, or its node. */
export const UNSEEN = 0;
export const BEGUN = 1;
export const WAITING = 2;
export const EMPTY = 3;
const FIRST_NODE = 4;

/** The states of all cells of a workbook, in one typed array a column. */
export class CellStates {
  private readonly columns: Map<number, Int32Array>[];
  private asleep = false;

  constructor(private readonly sheets: readonly { rows: number }[]) {
    this.columns = sheets.map(() => new Map());
  }

  get(sheet: number, row: number, col: number): number {
    return this.columns[sheet].get(col)?.[row] ?? UNSEEN;
  }

  set(sheet: number, row: number, col: number, state: number): void {
    this.column(sheet, col)[row] = state;
    if (state === WAITING) this.asleep = true;
  }

  node(sheet: number, row: number, col: number): number {
    return this.get(sheet, row, col) - FIRST_NODE;
  }

  setNode(sheet: number, row: number, col: number, node: number): void {
    this.column(sheet, col)[row] = node + FIRST_NODE;
  }

  /** The states of one column, indexed by row. */
  column(sheet: number, col: number): Int32Array {
    let column = this.columns[sheet].get(col);
    if (!column) {
      column = new Int32Array(this.sheets[sheet].rows + 1);
      this.columns[sheet].set(col, column);
    }
    return column;
  }

  /** Turns every waiting cell back into an unseen one. */
  wake(): void {
    if (!this.asleep) return;
    this.asleep = false;
    for (const sheet of this.columns) {
      for (const column of sheet.values()) {
        for (let i = 0; i < column.length; i++) if (column[i] === WAITING || column[i] === BEGUN) column[i] = UNSEEN;
      }
    }
  }
}

export const isNode = (state: number): boolean => state >= FIRST_NODE;
export const nodeOf = (state: number): number => state - FIRST_NODE;
export const isDone = (state: number): boolean => state >= EMPTY;
