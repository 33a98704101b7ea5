import { areaName, cellKey, cellName, contains, intersects, isOneCell, MAX_COLS, MAX_ROWS } from './area';
import type { Area } from './area';
import type { Book } from './Book';
import type { BookCell, CellValue } from './BookCell';
import { BookError } from './BookError';
import { changeAt } from './CellChange';
import type { SheetChanges } from './CellChange';
import type { ContentEdit, Edit, FormulaEdit, StyleRequest, TableColumnEdit } from './Edit';
import type { NewColumn } from './extendTable';
import { addSharedChanges } from './sharedChanges';
import { cellAt, isOccupied, storedIn } from './SheetData';
import type { SheetData } from './SheetData';
import type { StoredTable } from './tables';

/** What a list of edits means for each part. */
export interface EditPlan {
  sheets: Map<number, SheetChanges>;
  tables: Map<StoredTable, NewColumn[]>;
  /** A formula comes, goes or changes: the stored order of calculation is void. */
  formulasChanged: boolean;
  spills: boolean;
}

/** The most characters of a text and of a formula in a cell, and the most cells of a spill. */
const MAX_TEXT = 32_767;
const MAX_FORMULA = 8_192;
const MAX_SPILL = 1_048_576;

/**
 * Checks edits against the book and against each other, and turns them into changes of cells.
 *
 * @param styleIndex  Gives the cell style for a request, adding it to the workbook where it is new.
 * @throws BookError that names the sheet and cell, before anything is written.
 */
export function planEdits(book: Book, edits: readonly Edit[], styleIndex: (base: number, numberFormat: string) => number): EditPlan {
  const tables = book.source.tables.map((table) => ({ stored: table, ref: { ...table.ref }, columns: [...table.columns] }));
  const plan: EditPlan = { sheets: new Map(), tables: new Map(), formulasChanged: false, spills: false };
  const cellEdits: ContentEdit[] = [];
  const newAreas: { sheet: number; area: Area; table: string }[] = [];
  for (const edit of edits) {
    const cellEdit = edit.set === 'tableColumn' ? addColumn(tables, newAreas, plan, edit) : edit;
    if (cellEdit) cellEdits.push(cellEdit);
  }
  const bySheet = new Map<number, Map<number, ContentEdit>>();
  for (const edit of cellEdits) {
    checkPlace(book, edit);
    const own = bySheet.get(edit.sheet) ?? new Map<number, ContentEdit>();
    bySheet.set(edit.sheet, own);
    const key = cellKey(edit.row, edit.col);
    if (own.has(key)) throw refusal(book, edit, 'is edited twice');
    own.set(key, edit);
  }
  for (const [sheet, own] of bySheet) {
    const headers = tables.filter(({ stored }) => stored.sheet === sheet);
    const planner = new SheetPlanner(book, book.source.data[sheet]!, own, headers, styleIndex);
    plan.sheets.set(sheet, planner.changes());
    plan.formulasChanged ||= planner.formulasChanged;
    plan.spills ||= planner.spills;
  }
  for (const { sheet, area, table } of newAreas) checkFree(book, sheet, area, table);
  return plan;
}

interface GrowingTable {
  stored: StoredTable;
  ref: Area;
  columns: string[];
}

class SheetPlanner {
  formulasChanged = false;
  spills = false;
  private readonly claimed = new Set<number>();
  private readonly wholeArrays = new Map<number, boolean>();

  constructor(
    private readonly book: Book,
    private readonly data: SheetData,
    private readonly edits: ReadonlyMap<number, ContentEdit>,
    private readonly tables: readonly GrowingTable[],
    private readonly styleIndex: (base: number, numberFormat: string) => number,
  ) {}

  changes(): SheetChanges {
    for (const edit of this.edits.values()) {
      if (edit.set === 'formula') this.checkFormula(edit);
      else if ('value' in edit && edit.value !== null) this.checkValue(edit, edit.value);
    }
    const changes: SheetChanges = new Map();
    for (const edit of this.edits.values()) {
      const cell = cellAt(this.data, edit.row, edit.col);
      if (edit.set === 'result') this.checkResult(edit, cell);
      else if (edit.set !== 'style') {
        this.checkOverwrite(edit, cell);
        if (edit.set === 'formula' || cell?.formula !== undefined) this.formulasChanged = true;
        if (cell?.array?.dynamic) this.clearSpill(cell.array.ref, changes);
      }
      const change = changeAt(changes, edit.row, edit.col);
      if (edit.style) change.style = this.style(edit, edit.style);
      if (edit.set === 'formula') change.content = { kind: 'formula', formula: edit.formula, value: edit.value, spill: edit.array?.ref };
      else if (edit.set === 'constant') change.content = { kind: 'constant', value: edit.value };
      else if (edit.set === 'result') change.content = { kind: 'result', value: edit.value };
      else if (edit.set === 'clear') change.content = { kind: 'clear' };
    }
    addSharedChanges(this.data, changes, (key) => this.isOverwritten(key));
    return changes;
  }

  private isOverwritten(key: number): boolean {
    const set = this.edits.get(key)?.set;
    return set === 'formula' || set === 'constant' || set === 'clear';
  }

  private checkFormula(edit: FormulaEdit): void {
    const { formula } = edit;
    if (formula.trim() === '' || formula.startsWith('=')) throw this.refusal(edit, `needs a formula without "=", got ${JSON.stringify(formula.slice(0, 40))}`);
    if (formula.length > MAX_FORMULA) throw this.refusal(edit, `needs a formula of at most ${MAX_FORMULA} characters, got ${formula.length}`);
    if (edit.value !== undefined) this.checkValue(edit, edit.value);
    if (edit.array) this.checkSpill(edit, edit.array.ref);
  }

  private checkValue(edit: ContentEdit, value: CellValue): void {
    if (typeof value === 'number' && !Number.isFinite(value)) throw this.refusal(edit, `needs a finite number, got ${value}`);
    if (typeof value === 'string' && value.length > MAX_TEXT) throw this.refusal(edit, `needs text of at most ${MAX_TEXT} characters, got ${value.length}`);
  }

  /** The cells of a spill must be free, or part of the spill that it replaces. */
  private checkSpill(edit: FormulaEdit, ref: Area): void {
    this.spills = true;
    const { row, col } = edit;
    if (ref.top !== row || ref.left !== col || ref.bottom < row || ref.right < col || ref.bottom > MAX_ROWS || ref.right > MAX_COLS) {
      throw this.refusal(edit, 'needs a spill that begins in the cell and stays on the sheet');
    }
    if (isOneCell(ref)) return;
    const count = (ref.bottom - row + 1) * (ref.right - col + 1);
    if (count > MAX_SPILL) throw this.refusal(edit, `needs a spill of at most ${MAX_SPILL} cells, got ${count}`);
    const name = areaName(ref);
    const table = this.tables.find((item) => intersects(item.ref, ref));
    if (table) throw this.refusal(edit, `cannot spill over ${name}: spills are not allowed in table ${table.stored.name}`);
    if (this.data.merges.some((merge) => intersects(merge, ref))) throw this.refusal(edit, `cannot spill over ${name}: it meets merged cells`);
    const other = this.data.arrays.find((array) => intersects(array.ref, ref) && !this.isOverwritten(cellKey(array.row, array.col)));
    if (other) throw this.refusal(edit, `cannot spill over ${name}: it meets the array formula in ${cellName(other.row, other.col)}`);
    for (const [r, c, cell] of storedIn(this.data, ref)) {
      const key = cellKey(r, c);
      const released = cell.partOfArray?.dynamic && this.isOverwritten(cellKey(cell.partOfArray.row, cell.partOfArray.col));
      if ((r === row && c === col) || !isOccupied(cell) || released || this.edits.get(key)?.set === 'clear') continue;
      throw this.refusal(edit, `cannot spill over ${name}: ${cellName(r, c)} is occupied`);
    }
    for (let r = row; r <= ref.bottom; r++) {
      for (let c = col; c <= ref.right; c++) {
        const key = cellKey(r, c);
        const set = this.edits.get(key)?.set;
        const taken = (r !== row || c !== col) && (set === 'formula' || set === 'constant');
        if (taken || this.claimed.has(key)) throw this.refusal(edit, `cannot spill over ${name}: another edit writes ${cellName(r, c)}`);
        this.claimed.add(key);
      }
    }
  }

  private checkResult(edit: ContentEdit, cell: BookCell | undefined): void {
    if (this.claimed.has(cellKey(edit.row, edit.col))) return;
    const anchor = cell?.partOfArray;
    if (anchor && this.isOverwritten(cellKey(anchor.row, anchor.col))) throw this.refusal(edit, 'takes no result: the array formula it belonged to is replaced');
    if (cell?.formula === undefined && !anchor && !cell?.dataTable) throw this.refusal(edit, 'takes no result: it holds no formula');
  }

  private checkOverwrite(edit: ContentEdit, cell: BookCell | undefined): void {
    const { row, col } = edit;
    if (cell?.dataTable) throw this.refusal(edit, 'belongs to a data table, which can only be changed in a spreadsheet program');
    const part = cell?.partOfArray;
    if (part?.dynamic && !this.isOverwritten(cellKey(part.row, part.col))) {
      throw this.refusal(edit, `belongs to the spill of ${cellName(part.row, part.col)} and cannot be changed by itself`);
    }
    const legacy = part && !part.dynamic ? this.data.arrays.find((array) => array.row === part.row && array.col === part.col)?.ref
      : cell?.array && !cell.array.dynamic ? cell.array.ref : undefined;
    if (legacy && !this.isWholeOverwritten(legacy)) {
      throw this.refusal(edit, `belongs to the array formula in ${areaName(legacy)}, which can only be changed as a whole`);
    }
    if (edit.set === 'clear') return this.checkHeader(edit, undefined);
    const merge = this.data.merges.find((area) => contains(area, row, col));
    if (merge && (merge.top !== row || merge.left !== col)) throw this.refusal(edit, `is hidden in the merged cells ${areaName(merge)}`);
    this.checkHeader(edit, edit.set === 'constant' ? edit.value : undefined);
  }

  /** A table's header cells must hold the names of its columns. */
  private checkHeader(edit: ContentEdit, value: CellValue | undefined): void {
    for (const { stored, ref, columns } of this.tables) {
      if (edit.row !== ref.top || stored.headerRows === 0 || !contains(ref, edit.row, edit.col)) continue;
      if (value !== columns[edit.col - ref.left]) throw this.refusal(edit, `is a header of table ${stored.name} and must hold the name of its column`);
    }
  }

  private isWholeOverwritten(area: Area): boolean {
    const anchor = cellKey(area.top, area.left);
    let whole = this.wholeArrays.get(anchor);
    if (whole === undefined) {
      whole = true;
      for (let row = area.top; row <= area.bottom && whole; row++) {
        for (let col = area.left; col <= area.right && whole; col++) whole = this.isOverwritten(cellKey(row, col));
      }
      this.wholeArrays.set(anchor, whole);
    }
    return whole;
  }

  /** Takes the old results from the cells of a spill whose formula goes. */
  private clearSpill(ref: Area, changes: SheetChanges): void {
    for (const [row, col, cell] of storedIn(this.data, ref)) {
      if (cell.partOfArray && !this.edits.has(cellKey(row, col))) changeAt(changes, row, col).content = { kind: 'clear' };
    }
  }

  private style({ sheet, row, col }: ContentEdit, { like, numberFormat }: StyleRequest): number {
    const base = this.book.styleAt(sheet, like?.row ?? row, like?.col ?? col);
    return numberFormat === undefined || numberFormat === this.book.numberFormat(base) ? base : this.styleIndex(base, numberFormat);
  }

  private refusal(edit: ContentEdit, what: string): BookError {
    return refusal(this.book, edit, what);
  }
}

function refusal(book: Book, { sheet, row, col }: ContentEdit, what: string): BookError {
  return new BookError(`sheet ${book.sheets[sheet].name} cell ${cellName(row, col)} ${what}`);
}

function checkPlace(book: Book, { sheet, row, col }: ContentEdit): void {
  const info = book.sheets[sheet];
  if (!info) throw new BookError(`the workbook has no sheet ${sheet}`);
  if (info.kind !== 'worksheet') throw new BookError(`sheet ${info.name} is a ${info.kind} and has no cells`);
  const good = Number.isInteger(row) && Number.isInteger(col) && row >= 1 && col >= 1 && row <= MAX_ROWS && col <= MAX_COLS;
  if (!good) throw new BookError(`sheet ${info.name} has no cell at row ${row}, column ${col}`);
}

/** Adds a column to the plan; returns the edit that writes its header, if the table has one. */
function addColumn(
  tables: GrowingTable[], newAreas: { sheet: number; area: Area; table: string }[], plan: EditPlan, edit: TableColumnEdit,
): ContentEdit | undefined {
  const table = tables.find(({ stored }) => stored.name.toLowerCase() === edit.table.toLowerCase());
  if (!table) throw new BookError(`the workbook has no table ${edit.table}`);
  const { stored, ref } = table;
  const { sheet, name } = stored;
  if (stored.kind !== 'worksheet') throw new BookError(`table ${name} is bound to a source of data and takes no new column`);
  const clash = table.columns.find((column) => column.toLowerCase() === edit.name.toLowerCase());
  if (clash !== undefined) throw new BookError(`table ${name} already has a column ${clash}`);
  if (edit.name === '' || edit.name.length > 255) throw new BookError(`table ${name} needs a column name of 1 to 255 characters, got ${edit.name.length}`);
  if (ref.right === MAX_COLS) throw new BookError(`table ${name} reaches the edge of the sheet`);
  ref.right++;
  table.columns.push(edit.name);
  const area = { ...ref, left: ref.right };
  newAreas.push({ sheet, area, table: name });
  const other = tables.find((item) => item !== table && item.stored.sheet === sheet && intersects(item.ref, area));
  if (other) throw new BookError(`table ${name} cannot grow to ${areaName(area)}: table ${other.stored.name} is there`);
  plan.tables.set(stored, [...(plan.tables.get(stored) ?? []), { name: edit.name, formula: edit.formula }]);
  const like = { row: ref.top, col: stored.ref.right };
  if (stored.headerRows === 0) return undefined;
  return { set: 'constant', sheet, row: ref.top, col: ref.right, value: edit.name, style: { like } };
}

/** The cells that a table grows over must have been free before the edits. */
function checkFree(book: Book, sheet: number, area: Area, table: string): void {
  const data = book.source.data[sheet]!;
  const refuse = (what: string): never => {
    throw new BookError(`table ${table} cannot grow to ${areaName(area)}: ${what}`);
  };
  if (data.merges.some((merge) => intersects(merge, area))) refuse('there are merged cells');
  if (data.arrays.some((array) => intersects(array.ref, area))) refuse('there is an array formula');
  for (const [row, col, cell] of storedIn(data, area)) if (isOccupied(cell)) refuse(`${cellName(row, col)} is occupied`);
}
