import type { Area } from './area';

export interface CellError {
  error: string;
}

/** What a cell holds or shows. */
export type CellValue = number | string | boolean | CellError;

export interface BookCell {
  /** null: an empty cell that has only a style. undefined: a formula without a stored result. */
  value: CellValue | null | undefined;
  /** Index into the cell styles; `Book.numberFormat` reads it. */
  style: number;
  /** A1 text without "=", prefixes as stored (`_xlfn.` …), shared formulas written out. */
  formula?: string;
  /** The anchor of a legacy array formula, or of a spill. */
  array?: { ref: Area; dynamic: boolean };
  /** A cell that shows part of an array formula; `row` and `col` are the anchor's. */
  partOfArray?: { row: number; col: number; dynamic: boolean };
  /** A result of a what-if data table, which has no formula of its own. */
  dataTable?: true;
  /** The formula is hidden from the user: style says hidden, and the sheet is protected. */
  hiddenFormula?: true;
}
