import type { CellContent, WorkbookView } from '../../../functions/engine/graph/workbookView';
import type { HiddenRows } from '../../../functions/engine/formula/rowState';
import type { TableShape } from '../../../functions/engine/formula/evaluate';
import { placeKey } from './places';
import { isSpillError } from './values';
import type { WorkingBook } from './WorkingBook';

/** Marks, as functions that the host runs. Not of the namespace, so no formula of a user means them. */
export const SPILL_MARK = 'ROOTSUM_DESK.SPILL';
export const STORED_MARK = 'ROOTSUM_DESK.STORED';

/**
 * A working book as the cell graph reads it for a recalculation: a cell that has a value is a constant, one without has its formula.
 * The formula of a spill is wrapped in a call, so that its whole result can be seen; a spill that has its values stands for a call that
 * gives them, so that `A1#` finds its size.
 */
export class GraphView implements WorkbookView {
  readonly sheets: readonly { readonly name: string; readonly rows: number; readonly cols: number }[];

  readonly date1904: boolean;

  constructor(private readonly working: WorkingBook) {
    this.date1904 = working.book.date1904;
    this.sheets = working.book.sheets.map(({ name, index }) => ({ name, ...working.used(index) }));
  }

  cell(sheet: number, row: number, col: number): CellContent | null {
    const cell = this.working.cell(sheet, row, col);
    if (!cell) return null;
    const { value, formula, array, partOf } = cell;
    if (value !== undefined) {
      return formula !== undefined && array?.dynamic && !isSpillError(value) ? { value, formula: `=${STORED_MARK}()`, array } : { value };
    }
    if (formula === undefined) return { value, partOf };
    const relative = this.working.relativeFormula(placeKey(sheet, row, col), cell);
    if (!array) return { value, formula: relative, implicit: true };
    return { value, formula: array.dynamic ? `=${SPILL_MARK}(${relative.slice(1)})` : relative, array };
  }

  formula(sheet: number, row: number, col: number): string | null {
    return this.working.formulaAt(sheet, row, col) ?? null;
  }

  hiddenRows(sheet: number): HiddenRows {
    return this.working.hiddenRows(sheet);
  }

  /** Everything is there: nothing is ever asked for. */
  want(): void {}

  name(name: string, sheet: number): string | undefined {
    return this.working.name(name, sheet);
  }

  table(name: string, sheet: number, row: number, col: number): TableShape | undefined {
    return this.working.table(name, sheet, row, col);
  }
}
