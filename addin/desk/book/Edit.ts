import type { Area, CellAddress } from './area';
import type { CellValue } from './BookCell';

/** The style of another cell of the same sheet (by default the edited cell's own), with another number format if one is given. */
export interface StyleRequest {
  like?: CellAddress;
  numberFormat?: string;
}

interface CellEdit {
  /** Index into `Book.sheets`. */
  sheet: number;
  row: number;
  col: number;
  style?: StyleRequest;
}

/**
 * A formula, A1 text without "=", function names as they are stored (`_xlfn.` …). Without `array` it is an ordinary formula,
 * to which a reader may add implicit intersection; with it a spill, whose cells other than the anchor take `result` edits.
 * Without `value` the file holds no result until it is calculated.
 */
export interface FormulaEdit extends CellEdit {
  set: 'formula';
  formula: string;
  value?: CellValue;
  array?: { ref: Area; dynamic: true };
}

/** A number, text, truth value or error in place of whatever the cell holds. */
export interface ConstantEdit extends CellEdit {
  set: 'constant';
  value: CellValue;
}

/** A new stored result for a formula cell or a cell of an array formula; null removes it. The formula stays. */
export interface ResultEdit extends CellEdit {
  set: 'result';
  value: CellValue | null;
}

/** Removes the content. The style stays. */
export interface ClearEdit extends CellEdit {
  set: 'clear';
}

/** Only the style. */
export interface StyleEdit extends CellEdit {
  set: 'style';
  style: StyleRequest;
}

/**
 * A new last column of a table: its header cell is written, its other cells are for further edits of the same call.
 * `formula` is what the table offers to rows that are added later.
 */
export interface TableColumnEdit {
  set: 'tableColumn';
  table: string;
  name: string;
  formula?: string;
}

export type ContentEdit = FormulaEdit | ConstantEdit | ResultEdit | ClearEdit | StyleEdit;
export type Edit = ContentEdit | TableColumnEdit;
