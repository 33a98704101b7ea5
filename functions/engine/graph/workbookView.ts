import type { Area } from '../formula/value';
import type { HiddenRows } from '../formula/rowState';
import type { TableShape } from '../formula/evaluate';

/** What a cell holds, as the sheet tells it. */
export interface CellContent {
  /** What the cell shows; undefined for a formula that has not been computed. */
  readonly value: number | string | boolean | { readonly error: string } | undefined;
  /** Formula in R1C1 form with its `=`; absent for a constant. */
  readonly formula?: string;
  /** True where a range in a scalar's place means the cell of the same row or column. */
  readonly implicit?: boolean;
  /** On the anchor of a spill or an array formula: its size. */
  readonly array?: { readonly rows: number; readonly cols: number };
  /** On every other cell of it: where the anchor stands. */
  readonly partOf?: { readonly row: number; readonly col: number };
  /** True where the formula may be hidden from the reader. */
  readonly hidden?: boolean;
}

/** A workbook as far as it has been read. Sheets are counted from 0, rows and columns from 1. */
export interface WorkbookView {
  readonly sheets: readonly { readonly name: string; readonly rows: number; readonly cols: number }[];
  /** True where the workbook counts its days from 1904. */
  readonly date1904?: boolean;
  /** The content of a cell: null if blank, undefined if it has not been read. */
  cell(sheet: number, row: number, col: number): CellContent | null | undefined;
  /** The formula that stands in a cell, even where its value is taken as given: null if none, undefined if it has not been read. */
  formula(sheet: number, row: number, col: number): string | null | undefined;
  /** The rows of a sheet that do not show; undefined if that has not been read, and then it is asked for. */
  hiddenRows(sheet: number): HiddenRows | undefined;
  /** Asks for an area to be read before the next round. */
  want(area: Area): void;
  /** The formula (R1C1, relative to A1) of a name seen from a sheet. */
  name(name: string, sheet: number): string | undefined;
  table(name: string, sheet: number, row: number, col: number): TableShape | undefined;
}
