import { translateFormulaToR1C1 } from '@borgar/fx';
import { cellName, contains, intersects, MAX_COLS, MAX_ROWS } from '../book/area';
import type { Area } from '../book/area';
import type { Book } from '../book/Book';
import type { BookCell, CellValue } from '../book/BookCell';
import type { StyleRequest } from '../book/Edit';
import { isOccupied } from '../book/SheetData';
import type { BookTable } from '../book/tables';
import type { HiddenRows } from '../../../functions/engine/formula/rowState';
import type { TableShape } from '../../../functions/engine/formula/evaluate';
import type { CellPlace } from '../../../functions/engine/graph/cellGraph';
import { typedFormula } from './functionNames';
import type { FunctionNames } from './functionNames';
import { placeKey, placeOf } from './places';

/** A cell as it stands now. */
export interface WorkingCell {
  /** undefined: a formula that is not computed yet, or cannot be. */
  readonly value: CellValue | undefined;
  /** A1 text without "=", as stored. */
  readonly formula?: string;
  /** On the anchor of a spill or a legacy array formula: the size it has now. */
  readonly array?: { readonly rows: number; readonly cols: number; readonly dynamic: boolean };
  /** On its other cells. */
  readonly partOf?: { readonly row: number; readonly col: number; readonly dynamic: boolean };
  readonly hidden?: boolean;
}

/** A book with changes on top of what is stored. The book itself is never changed. */
export class WorkingBook {
  /** Changes whenever the value of a cell did. */
  revision = 0;
  /** Cells edited since the last recalculation. */
  readonly edited = new Set<number>();
  /** Styles asked for. */
  readonly styles = new Map<number, StyleRequest>();
  /** Columns that tables gained, in order. */
  readonly tableColumns: { readonly table: string; readonly name: string; readonly formula?: string; readonly sheet: number; readonly row: number; readonly col: number }[] = [];
  private readonly changes = new Map<number, WorkingCell | null>();
  private readonly extents: { rows: number; cols: number }[];
  private readonly r1c1 = new Map<number, { stored: string; relative: string }>();
  private readonly sheetPlaces = new Map<string, number>();
  private readonly nameFormulas: { key: string; sheet?: number; formula: string }[];

  constructor(
    readonly book: Book,
    readonly names: FunctionNames,
  ) {
    this.extents = book.sheets.map(({ index }) => ({ ...book.used(index) }));
    book.sheets.forEach(({ name, index }) => this.sheetPlaces.set(name.toLowerCase(), index));
    // An array formula may show cells of which the file holds no record.
    for (const [key, { array }] of this.formulaCells()) if (array) this.reach(placeOf(key), array.rows, array.cols);
    this.nameFormulas = book.names.map(({ name, sheet, formula }) => ({ key: name.toLowerCase(), sheet, formula: this.relative(formula, 1, 1) }));
  }

  /** null for a blank cell. */
  cell(sheet: number, row: number, col: number): WorkingCell | null {
    const own = this.changes.get(placeKey(sheet, row, col));
    return own === undefined ? this.stored(sheet, row, col) : own;
  }

  /** The cell as the file holds it; null for a blank one. */
  stored(sheet: number, row: number, col: number): WorkingCell | null {
    const used = this.book.sheets[sheet].kind === 'worksheet' && row <= MAX_ROWS && col <= MAX_COLS;
    const cell = used ? this.book.cell(sheet, row, col) : undefined;
    return cell && isOccupied(cell) ? fromBook(cell) : null;
  }

  /** The last row and column that may hold something. */
  used(sheet: number): { readonly rows: number; readonly cols: number } {
    return this.extents[sheet];
  }

  /** One number for a cell, by which `styles` knows it. */
  keyOf(sheet: number, row: number, col: number): number {
    return placeKey(sheet, row, col);
  }

  sheetIndex(name: string): number | undefined {
    return this.sheetPlaces.get(name.toLowerCase());
  }

  sheetName(sheet: number): string {
    return this.book.sheets[sheet].name;
  }

  /** The cells that differ from the file, by place. */
  get changed(): ReadonlyMap<number, WorkingCell | null> {
    return this.changes;
  }

  /** Every formula cell, each once, in no promised order. */
  *formulaCells(): Generator<[key: number, cell: WorkingCell]> {
    for (const { index, kind } of this.book.sheets) {
      if (kind !== 'worksheet') continue;
      for (const [row, cells] of this.book.rows(index)) {
        for (const [col, cell] of cells) {
          const key = placeKey(index, row, col);
          if (cell.formula !== undefined && !this.changes.has(key)) yield [key, fromBook(cell)];
        }
      }
    }
    for (const [key, cell] of this.changes) if (cell?.formula !== undefined) yield [key, cell];
  }

  /** The formula of a cell in relative (R1C1) form with its "=", names as a user types them. */
  relativeFormula(key: number, cell: WorkingCell): string {
    const known = this.r1c1.get(key);
    if (known && known.stored === cell.formula) return known.relative;
    const { row, col } = placeOf(key);
    const relative = this.relative(cell.formula!, row, col);
    this.r1c1.set(key, { stored: cell.formula!, relative });
    return relative;
  }

  /** The relative formula that stands in a cell, if one does. */
  formulaAt(sheet: number, row: number, col: number): string | undefined {
    const cell = this.cell(sheet, row, col);
    return cell?.formula === undefined ? undefined : this.relativeFormula(placeKey(sheet, row, col), cell);
  }

  /** The rows of a sheet that do not show. */
  hiddenRows(sheet: number): HiddenRows {
    return this.book.hiddenRows(sheet);
  }

  /** The formula (R1C1, relative to A1) of a name seen from a sheet. */
  name(name: string, sheet: number): string | undefined {
    const key = name.toLowerCase();
    const local = this.nameFormulas.find((n) => n.sheet === sheet && n.key === key);
    return (local ?? this.nameFormulas.find((n) => n.sheet === undefined && n.key === key))?.formula;
  }

  /** The tables as they stand now. */
  get tables(): readonly BookTable[] {
    if (this.tableColumns.length === 0) return this.book.tables;
    return this.book.tables.map((table) => {
      const gained = this.tableColumns.filter((c) => c.table === table.name).map((c) => c.name);
      return { ...table, ref: { ...table.ref, right: table.ref.right + gained.length }, columns: [...table.columns, ...gained] };
    });
  }

  /** Gives a table a new last column with its heading; the cells below are for `setFormula`. */
  addTableColumn({ name: table, sheet, ref }: BookTable, name: string, formula?: string): void {
    this.tableColumns.push({ table, name, sheet, row: ref.top, col: ref.right + 1, ...(formula !== undefined && { formula }) });
    this.setConstant(sheet, ref.top, ref.right + 1, name);
  }

  /** A table by name, or with an empty name the table around a cell. */
  table(name: string, sheet: number, row: number, col: number): TableShape | undefined {
    const found = name === ''
      ? this.tables.find((t) => t.sheet === sheet && contains(t.ref, row, col))
      : this.tables.find((t) => t.name.toLowerCase() === name.toLowerCase());
    if (!found) return undefined;
    const { ref, columns, headerRows, totalsRows } = found;
    return { area: { k: 'area', sheet: found.sheet, r1: ref.top, c1: ref.left, r2: ref.bottom, c2: ref.right }, columns, headerRows, totalsRows };
  }

  /** The names of the workbook, each with its formula in relative form. */
  allNames(): readonly { name: string; sheet?: number; formula: string }[] {
    return this.book.names.map(({ name, sheet }, i) => ({ name, sheet, formula: this.nameFormulas[i].formula }));
  }

  setConstant(sheet: number, row: number, col: number, value: CellValue, style?: StyleRequest): void {
    this.edit(sheet, row, col, { value }, style);
  }

  setBlank(sheet: number, row: number, col: number): void {
    this.edit(sheet, row, col, null, undefined);
  }

  /**
   * Puts an ordinary formula into a cell, or with `spill` a dynamic-array formula and the size that its result is expected to have:
   * the expectation may be wrong, it only saves a round where it is right. A1 text without "=", as stored.
   */
  setFormula(sheet: number, row: number, col: number, formula: string, options: { spill?: { rows: number; cols: number }; style?: StyleRequest } = {}): void {
    const { spill, style } = options;
    if (!spill) return this.edit(sheet, row, col, { value: undefined, formula }, style);
    this.edit(sheet, row, col, { value: undefined, formula, array: { rows: 1, cols: 1, dynamic: true } }, style);
    if (this.obstacle(sheet, row, col, spill.rows, spill.cols) === undefined) this.resize(sheet, row, col, spill.rows, spill.cols, () => undefined);
  }

  /** The value of a formula cell, or of a part of an array formula. */
  setValue(sheet: number, row: number, col: number, value: CellValue | undefined): void {
    const now = this.cell(sheet, row, col);
    if (!now || now.value === value) return;
    this.put(sheet, row, col, { ...now, value });
    this.revision++;
  }

  setStyle(sheet: number, row: number, col: number, style: StyleRequest): void {
    this.styles.set(placeKey(sheet, row, col), style);
  }

  /** Gives the spill of an anchor another size; `valueAt` tells the values of its cells, counted from 0. The place must be free. */
  resize(sheet: number, row: number, col: number, rows: number, cols: number, valueAt: (r: number, c: number) => CellValue | undefined): void {
    const anchor = this.cell(sheet, row, col)!;
    const old = anchor.array!;
    for (let r = 0; r < old.rows; r++) {
      for (let c = 0; c < old.cols; c++) if ((r > 0 || c > 0) && (r >= rows || c >= cols)) this.put(sheet, row + r, col + c, null);
    }
    this.put(sheet, row, col, { ...anchor, value: valueAt(0, 0), array: { ...old, rows, cols } });
    for (let r = 0; r < rows; r++) {
      for (let c = 0; c < cols; c++) {
        if (r > 0 || c > 0) this.put(sheet, row + r, col + c, { value: valueAt(r, c), partOf: { row, col, dynamic: old.dynamic } });
      }
    }
    this.revision++;
  }

  /** What stands in the way of a spill, in words that follow "its result"; undefined if nothing does. Its own cells do not count. */
  obstacle(sheet: number, row: number, col: number, rows: number, cols: number): string | undefined {
    if (rows === 1 && cols === 1) return undefined;
    const area: Area = { top: row, left: col, bottom: row + rows - 1, right: col + cols - 1 };
    if (area.bottom > MAX_ROWS || area.right > MAX_COLS) return 'would reach beyond the edge of the sheet';
    const table = this.tables.find((t) => t.sheet === sheet && intersects(t.ref, area));
    if (table) return `would stand in table ${table.name}, where spills are not allowed`;
    if (this.book.source.data[sheet]?.merges.some((merge) => intersects(merge, area))) return 'would stand in merged cells';
    for (let r = row; r <= area.bottom; r++) {
      for (let c = col; c <= area.right; c++) {
        if (r === row && c === col) continue;
        const cell = this.cell(sheet, r, c);
        if (cell && !(cell.partOf?.row === row && cell.partOf.col === col)) return `would cover ${cellName(r, c)}, which is occupied`;
      }
    }
    return undefined;
  }

  private edit(sheet: number, row: number, col: number, cell: WorkingCell | null, style: StyleRequest | undefined): void {
    const now = this.cell(sheet, row, col);
    if (now?.array) this.resize(sheet, row, col, 1, 1, () => undefined);
    this.put(sheet, row, col, cell);
    this.edited.add(placeKey(sheet, row, col));
    if (style) this.setStyle(sheet, row, col, style);
    this.revision++;
  }

  private put(sheet: number, row: number, col: number, cell: WorkingCell | null): void {
    this.changes.set(placeKey(sheet, row, col), cell);
    if (cell) this.reach({ sheet, row, col }, 1, 1);
  }

  private reach({ sheet, row, col }: CellPlace, rows: number, cols: number): void {
    const extent = this.extents[sheet];
    extent.rows = Math.max(extent.rows, row + rows - 1);
    extent.cols = Math.max(extent.cols, col + cols - 1);
  }

  /** A stored formula in relative form. A text that cannot be translated stays as it is: compiling it then says why it cannot be read. */
  relative(stored: string, row: number, col: number): string {
    const typed = `=${typedFormula(stored, this.names)}`;
    try {
      return translateFormulaToR1C1(typed, cellName(row, col));
    } catch {
      return typed;
    }
  }
}

function fromBook({ value, formula, array, partOfArray, hiddenFormula }: BookCell): WorkingCell {
  return {
    value: value === null ? undefined : value,
    ...(formula !== undefined && { formula }),
    ...(array && { array: { rows: array.ref.bottom - array.ref.top + 1, cols: array.ref.right - array.ref.left + 1, dynamic: array.dynamic } }),
    ...(partOfArray && { partOf: partOfArray }),
    ...(hiddenFormula && { hidden: true }),
  };
}
