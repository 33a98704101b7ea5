import { MAX_COLS, MAX_ROWS } from './area';
import type { BookCell } from './BookCell';
import type { Parts } from './parts';
import type { BookName, SheetKind, SheetState, Workbook } from './readWorkbook';
import { cellAt, defaultStyle, isOccupied } from './SheetData';
import type { SheetData } from './SheetData';
import type { CellStyles } from './styles';
import type { BookTable, StoredTable } from './tables';

export interface SheetInfo {
  /** Place among the tabs, from 0; every `sheet` argument is this. */
  index: number;
  name: string;
  part: string;
  /** Only a worksheet has cells. */
  kind: SheetKind;
  state: SheetState;
  protected: boolean;
}

/** What a book is made of; for `writeBook` and nobody else. */
export interface BookSource {
  parts: Parts;
  workbookPart: string;
  workbook: Workbook;
  /** Undefined for a sheet that is no worksheet. */
  data: (SheetData | undefined)[];
  styles: CellStyles;
  stylesPart: string | undefined;
  metadataPart: string | undefined;
  calcChainPart: string | undefined;
  tables: StoredTable[];
  macros: boolean;
}

/** A workbook as stored: nothing is calculated, nothing changes. Rows and columns are 1-based, sheets 0-based. */
export class Book {
  readonly sheets: readonly SheetInfo[];
  readonly names: readonly BookName[];
  readonly tables: readonly BookTable[];
  readonly date1904: boolean;
  /** The file holds a VBA project. */
  readonly macros: boolean;
  readonly calcMode: Workbook['calcMode'];
  /** Circular references are iterated. */
  readonly iterate: boolean;
  /** False: "precision as displayed", so that stored values are rounded ones. */
  readonly fullPrecision: boolean;

  private readonly hidden = new Map<number, ReadonlyMap<number, 'hidden' | 'filtered'>>();

  constructor(readonly source: BookSource) {
    const { workbook } = source;
    this.sheets = workbook.sheets.map(({ name, part, kind, state }, index) =>
      ({ index, name, part, kind, state, protected: source.data[index]?.protected ?? false }));
    this.names = workbook.names;
    this.tables = source.tables;
    this.date1904 = workbook.date1904;
    this.macros = source.macros;
    this.calcMode = workbook.calcMode;
    this.iterate = workbook.iterate;
    this.fullPrecision = workbook.fullPrecision;
  }

  /** Undefined where there is neither content nor a style of its own. */
  cell(sheet: number, row: number, col: number): BookCell | undefined {
    const data = this.data(sheet);
    if (!(row >= 1 && row <= MAX_ROWS && col >= 1 && col <= MAX_COLS)) throw new RangeError(`no cell at row ${row}, column ${col}`);
    return data && cellAt(data, row, col);
  }

  /** The last row and column that hold something; cells with only a style do not count. */
  used(sheet: number): { rows: number; cols: number } {
    const used = { rows: 0, cols: 0 };
    for (const { row, cols, cells } of this.data(sheet)?.rows ?? []) {
      for (let i = cells.length - 1; i >= 0; i--) {
        if (!isOccupied(cells[i])) continue;
        used.rows = row;
        used.cols = Math.max(used.cols, cols[i]);
        break;
      }
    }
    return used;
  }

  /** The stored rows from the top, each with its stored cells from the left. */
  *rows(sheet: number): Generator<[row: number, cells: [col: number, cell: BookCell][]]> {
    for (const { row, cols, cells } of this.data(sheet)?.rows ?? []) yield [row, cells.map((cell, i) => [cols[i], cell])];
  }

  /** The style of a cell, stored or not: an empty one takes its row's or column's. */
  styleAt(sheet: number, row: number, col: number): number {
    const data = this.data(sheet);
    return data ? cellAt(data, row, col)?.style ?? defaultStyle(data, row, col) : 0;
  }

  /** Number format code of a cell style, en-US for those that follow the locale. */
  numberFormat(style: number): string {
    return this.source.styles.formats[style] ?? 'General';
  }

  isBold(style: number): boolean {
    return this.source.styles.bold[style] ?? false;
  }

  /** Whether cells of this style hide their formula once their sheet is protected. */
  isHiddenStyle(style: number): boolean {
    return this.source.styles.hidden[style] ?? false;
  }

  /** The rows that do not show. Inside the area of a filter that is in force every hidden row counts as left out by it. */
  hiddenRows(sheet: number): ReadonlyMap<number, 'hidden' | 'filtered'> {
    const known = this.hidden.get(sheet);
    if (known) return known;
    const data = this.data(sheet);
    const filters = [...(data?.filters ?? []), ...this.tables.flatMap((t) => (t.sheet === sheet && t.filter ? [t.filter] : []))];
    const rows = new Map<number, 'hidden' | 'filtered'>();
    for (const { row, hidden } of data?.rows ?? []) {
      if (hidden) rows.set(row, filters.some(({ top, bottom }) => row > top && row <= bottom) ? 'filtered' : 'hidden');
    }
    this.hidden.set(sheet, rows);
    return rows;
  }

  private data(sheet: number): SheetData | undefined {
    if (!(sheet in this.sheets)) throw new RangeError(`the workbook has no sheet ${sheet}`);
    return this.source.data[sheet];
  }
}
