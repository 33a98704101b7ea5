/**
 * What a function may ask of the workbook it stands in. Adapters live in `addin`: one over Office.js, one over the desk's book.
 * Rows and columns are 1-based. Reading is all there is: nothing here writes.
 */
export interface WorkbookPort {
  /** Changes whenever a cell may have changed: calls that see the same revision share what they read. */
  revision(): number;
  /** Sheets in tab order. */
  sheets(): Promise<readonly PortSheet[]>;
  /** Whether the workbook counts its days from 1904. */
  date1904(): Promise<boolean>;
  names(): Promise<readonly PortName[]>;
  tables(): Promise<readonly PortTable[]>;
  /** The rows of a sheet that do not show. */
  hiddenRows(sheet: string): Promise<readonly PortHiddenRow[]>;
  /** The cells of rectangles, each as asked for; what lies outside the used part is blank. */
  read(areas: readonly PortArea[]): Promise<readonly PortTile[]>;
}

export interface PortSheet {
  readonly name: string;
  /** Last row and column that may hold something; 0 on an empty sheet. */
  readonly rows: number;
  readonly cols: number;
}

export interface PortHiddenRow {
  readonly row: number;
  /** True where a filter in force leaves the row out; false where it was hidden by hand. */
  readonly filtered: boolean;
}

/** A defined name; `sheet` where it is local to one. */
export interface PortName {
  readonly name: string;
  readonly sheet?: string;
  /** Formula in R1C1 form relative to cell A1, with its `=`. */
  readonly formula: string;
}

export interface PortTable {
  readonly name: string;
  /** Header and totals rows included. */
  readonly area: PortArea;
  readonly columns: readonly string[];
  readonly headerRows: number;
  readonly totalsRows: number;
}

export interface PortArea {
  readonly sheet: string;
  readonly row: number;
  readonly col: number;
  readonly rows: number;
  readonly cols: number;
}

export interface PortTile {
  readonly area: PortArea;
  /** Row by row; null for a blank cell. */
  readonly cells: readonly (PortCell | null)[];
}

export interface PortCell {
  /** What the cell shows; undefined for a formula that has not been computed. Errors as `{error: '#N/A'}`. */
  readonly value: number | string | boolean | { readonly error: string } | undefined;
  /** en-US formula in R1C1 form with its `=`; absent for a constant. */
  readonly formula?: string;
  /** True where a range in a scalar's place means the cell of the same row or column. */
  readonly implicit?: boolean;
  /** On the anchor of a spill or an array formula: its size. */
  readonly array?: { readonly rows: number; readonly cols: number };
  /** On every other cell of it: where the anchor stands. */
  readonly partOf?: { readonly row: number; readonly col: number };
  /** True where the formula may be hidden from the reader (a protected sheet). */
  readonly hidden?: boolean;
}

/**
 * What a port throws where it cannot read what it is asked for: the words stand in the cell. Known by its name, for a port may come from
 * another bundle.
 */
export class PortRefusal extends Error {
  override name = 'PortRefusal';
}
