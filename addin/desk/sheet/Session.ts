import type { Book } from '../book/Book';
import type { CellValue } from '../book/BookCell';
import type { StyleRequest } from '../book/Edit';
import { Desk } from './Desk';
import type { FunctionBundle } from './Desk';
import { storedFormula, typedFormula } from './functionNames';
import { placeKey } from './places';
import type { Recalculation } from './recalculate';
import type { WorkingCell } from './WorkingBook';

/** A cell as a person changes it: a formula with its "=", a constant, or null for nothing. */
export interface CellEdit {
  readonly sheet: number;
  readonly row: number;
  readonly col: number;
  readonly content: { readonly formula: string; readonly spill?: { readonly rows: number; readonly cols: number } } | { readonly value: CellValue } | null;
  readonly numberFormat?: string;
  /** A cell of the sheet whose style a constant takes. */
  readonly like?: { readonly row: number; readonly col: number };
}

/** A cell that is part of an array formula, or another that may not be changed; the message names it. */
export class EditRefusal extends Error {
  override name = 'EditRefusal';
}

interface Step {
  readonly cells: readonly { readonly sheet: number; readonly row: number; readonly col: number; readonly before: WorkingCell | null }[];
  /** What was asked for the style of a cell before. */
  readonly styles: ReadonlyMap<number, StyleRequest | undefined>;
}

/** An open workbook that is edited step by step: each step is computed, can be taken back, and is told to whoever listens. */
export class Session {
  readonly desk: Desk;
  private readonly steps: Step[] = [];
  private readonly listeners = new Set<() => void>();
  private messages = new Map<number, string>();
  private last: Promise<unknown> = Promise.resolve();

  private constructor(readonly book: Book, bundle: FunctionBundle) {
    this.desk = new Desk(book, bundle);
  }

  /** Opens a book and computes what it left open. */
  static async open(book: Book, bundle: FunctionBundle, progress?: (done: number, of: number) => void): Promise<Session> {
    const session = new Session(book, bundle);
    session.take(await session.desk.recalculate(progress));
    return session;
  }

  /** The last step that was not taken back: the same object as long as the workbook is in this state. */
  get lastStep(): object | undefined {
    return this.steps.at(-1);
  }

  /** Whether a step has not been taken back. */
  stands(step: object): boolean {
    return this.steps.some((own) => own === step);
  }

  /** Calls back after every step, until the returned function is called. */
  onChange(listener: () => void): () => void {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  }

  /** Why a cell has no result, or shows an error; undefined where all is well. */
  messageOf(sheet: number, row: number, col: number): string | undefined {
    return this.messages.get(placeKey(sheet, row, col));
  }

  /** What the formula bar shows: the formula as it is typed, or the constant. */
  textOf(sheet: number, row: number, col: number): string {
    const here = this.desk.working.cell(sheet, row, col);
    // a cell of a spill shows the formula it comes from, as the sheet does
    const cell = here?.partOf ? this.desk.working.cell(sheet, here.partOf.row, here.partOf.col) : here;
    if (!cell) return '';
    if (cell.hidden) return '';
    if (cell.formula !== undefined) return `=${typedFormula(cell.formula, this.desk.names)}`;
    return cell.value === undefined ? '' : typeof cell.value === 'object' ? cell.value.error : typeof cell.value === 'boolean' ? String(cell.value).toUpperCase() : String(cell.value);
  }

  /**
   * Changes cells as one step, after the steps before it are computed.
   *
   * @throws EditRefusal, and nothing is changed, where a formula cannot be read or a cell is part of an array formula.
   */
  edit(edits: readonly CellEdit[]): Promise<void> {
    return this.inTurn(async () => {
      const ready = edits.map((edit) => ({ edit, stored: this.checked(edit) }));
      const { working } = this.desk;
      const cells = edits.map(({ sheet, row, col }) => ({ sheet, row, col, before: working.cell(sheet, row, col) }));
      const styles = new Map(edits.flatMap(styledCells).map((key) => [key, working.styles.get(key)]));
      for (const { edit, stored } of ready) this.apply(edit, stored);
      this.steps.push({ cells, styles });
      await this.compute();
    });
  }

  /** Takes back the last step. @returns false where there is none. */
  undo(): Promise<boolean> {
    return this.inTurn(async () => {
      const step = this.steps.pop();
      if (!step) return false;
      for (const { sheet, row, col, before } of step.cells) this.restore(sheet, row, col, before);
      for (const [key, style] of step.styles) {
        if (style) this.desk.working.styles.set(key, style);
        else this.desk.working.styles.delete(key);
      }
      await this.compute();
      return true;
    });
  }

  /** The file, after all steps are computed. */
  write(values = false): Promise<Uint8Array> {
    return this.inTurn(async () => this.desk.write(values));
  }

  private checked({ sheet, row, col, content }: CellEdit): string | undefined {
    const { working, names } = this.desk;
    const cell = working.cell(sheet, row, col);
    if (cell?.partOf) throw new EditRefusal('this cell shows part of an array: change the formula where the array begins');
    if (cell?.array && !cell.array.dynamic && cell.array.rows * cell.array.cols > 1) throw new EditRefusal('part of an array formula cannot be changed');
    if (content === null || !('formula' in content)) return undefined;
    try {
      return storedFormula(content.formula, names);
    } catch (problem) {
      throw new EditRefusal(`the formula ${(problem as Error).message}`);
    }
  }

  private apply({ sheet, row, col, content, numberFormat, like }: CellEdit, stored: string | undefined): void {
    const { working } = this.desk;
    if (content === null) working.setBlank(sheet, row, col);
    else if ('value' in content) working.setConstant(sheet, row, col, content.value, like && { like });
    else working.setFormula(sheet, row, col, stored!, this.isArray(stored!) || content.spill ? { spill: content.spill ?? { rows: 1, cols: 1 } } : {});
    if (numberFormat !== undefined) for (const key of styledCells({ sheet, row, col, content, numberFormat })) working.styles.set(key, { numberFormat });
  }

  /** Whether a formula may fill more than its cell: each of the library's functions may. */
  private isArray(stored: string): boolean {
    return /_xldudf_/i.test(stored) || this.desk.needsArray(stored);
  }

  private restore(sheet: number, row: number, col: number, before: WorkingCell | null): void {
    const { working } = this.desk;
    if (!before || before.partOf) working.setBlank(sheet, row, col);
    else if (before.formula !== undefined) {
      working.setFormula(sheet, row, col, before.formula, before.array ? { spill: { rows: before.array.rows, cols: before.array.cols } } : {});
    } else if (before.value === undefined) working.setBlank(sheet, row, col);
    else working.setConstant(sheet, row, col, before.value);
  }

  private async compute(): Promise<void> {
    this.take(await this.desk.recalculate());
    for (const listener of [...this.listeners]) listener();
  }

  private take({ refused }: Recalculation): void {
    this.messages = new Map(refused.map(({ key, message }) => [key, message]));
  }

  private inTurn<T>(work: () => Promise<T>): Promise<T> {
    const result = this.last.then(work);
    this.last = result.catch(() => undefined);
    return result;
  }
}

/** Cells whose number format an edit changes: those of the first column of a spill. */
function styledCells({ sheet, row, col, content, numberFormat, like }: CellEdit): number[] {
  if (numberFormat === undefined) return like ? [placeKey(sheet, row, col)] : [];
  const rows = content && 'formula' in content ? (content.spill?.rows ?? 1) : 1;
  return Array.from({ length: rows }, (_, r) => placeKey(sheet, row + r, col));
}
