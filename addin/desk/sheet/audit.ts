import { compile } from '../../../functions/engine/formula/compile';
import { Evaluator } from '../../../functions/engine/formula/evaluate';
import type { Program } from '../../../functions/engine/formula/expression';
import { nativeNamed } from '../../../functions/engine/formula/natives';
import { nativeIn1904 } from '../../../functions/engine/formula/natives/calendar1904';
import { type Scalar, num } from '../../../functions/engine/formula/scalar';
import { type Matrix, at } from '../../../functions/engine/formula/value';
import { EngineError } from '../../../functions/engine/EngineError';
import { cellName } from '../../../functions/engine/graph/address';
import { elementOf } from '../../../functions/engine/graph/cellGraph';
import { disagreement, shownText, valueText } from '../../../functions/engine/graph/disagreement';
import type { Book } from '../book/Book';
import { FunctionNames, typedFormula } from './functionNames';
import { placeOf } from './places';
import { StoredCells } from './StoredCells';
import { WorkingBook, type WorkingCell } from './WorkingBook';

/** What an audit found in one workbook. */
export interface Audit {
  /** Cells with a native formula, parts of array formulas included. */
  readonly formulas: number;
  /** Those whose recomputed value is the stored one. */
  readonly agree: number;
  /** The largest relative difference first. */
  readonly differ: readonly Difference[];
  /** Functions that cannot be followed, the most frequent first. */
  readonly unsupported: readonly { readonly function: string; readonly cells: readonly string[] }[];
  /** Cells that cannot be followed for another reason. */
  readonly refused: readonly { readonly cell: string; readonly why: string }[];
  /** Formulas with TODAY, NOW, RAND …: their stored value stands. */
  readonly volatile: number;
  /** Formulas without a stored result to compare with. */
  readonly unstored: number;
  /** Formulas that call this library: they are its own results, not inputs of the audit. */
  readonly library: number;
}

export interface Difference {
  readonly cell: string;
  readonly formula: string;
  readonly stored: string;
  readonly computed: string;
}

const VOLATILE = /\b(TODAY|NOW|RAND|RANDBETWEEN|RANDARRAY)\(/i;

/**
 * Computes every native formula of a book from its stored inputs and compares it with its stored result, within the tolerance
 * that carrying uses: max(1e-9 |y|, 1e-12 Σ|c x|).
 *
 * @param progress  Told from time to time how many formulas are done.
 */
export function audit(book: Book, progress: (done: number) => void = () => undefined): Audit {
  return new Auditor(book).run(progress);
}

class Auditor {
  private readonly names = new FunctionNames([]);
  private readonly working: WorkingBook;
  private readonly cells: StoredCells;
  private readonly evaluator: Evaluator;
  private readonly programs = new Map<string, Program>();
  private readonly count = { formulas: 0, agree: 0, volatile: 0, unstored: 0, library: 0 };
  private readonly differ: (Difference & { size: number })[] = [];
  private readonly unsupported = new Map<string, string[]>();
  private readonly refused: { cell: string; why: string }[] = [];

  constructor(book: Book) {
    this.working = new WorkingBook(book, this.names);
    this.cells = new StoredCells(this.working, (formula) => this.program(formula));
    this.evaluator = new Evaluator(this.cells);
    this.evaluator.steps.recording = false;
  }

  run(progress: (done: number) => void): Audit {
    let done = 0;
    for (const [key, cell] of this.working.formulaCells()) {
      this.one(key, cell);
      if (++done % 1000 === 0) progress(done);
    }
    const unsupported = [...this.unsupported].map(([name, cells]) => ({ function: name, cells })).sort((a, b) => b.cells.length - a.cells.length);
    const differ = this.differ.sort((a, b) => b.size - a.size).map(({ cell, formula, stored, computed }) => ({ cell, formula, stored, computed }));
    return { ...this.count, differ, unsupported, refused: this.refused };
  }

  private one(key: number, cell: WorkingCell): void {
    const { sheet, row, col } = placeOf(key);
    const formula = this.working.relativeFormula(key, cell);
    const { rows, cols } = cell.array ?? { rows: 1, cols: 1 };
    if (this.callsLibrary(formula)) {
      this.count.library++;
      return;
    }
    this.count.formulas += rows * cols;
    if (VOLATILE.test(formula)) {
      this.count.volatile += rows * cols;
      return;
    }
    const result = this.computed(formula, sheet, row, col, cell.array === undefined);
    if (typeof result === 'string') return this.notFollowed(result, sheet, row, col);
    for (let i = 0; i < rows; i++) for (let j = 0; j < cols; j++) this.compare(formula, cell, result, { sheet, row, col }, i, j);
  }

  private compare(formula: string, cell: WorkingCell, result: Scalar | Matrix, anchor: { sheet: number; row: number; col: number }, i: number, j: number): void {
    const { sheet, row, col } = anchor;
    const shown = i === 0 && j === 0 ? cell.value : this.working.cell(sheet, row + i, col + j)?.value;
    if (shown === undefined) {
      this.count.unstored++;
      return;
    }
    const value = cell.array ? part(result, i, j) : scalarOf(result);
    const words = disagreement(value, shown, () => this.turnover(formula, anchor, cell, i, j));
    if (words === undefined) {
      this.count.agree++;
      return;
    }
    this.differ.push({
      cell: this.nameOf(sheet, row + i, col + j), formula: `=${typedFormula(cell.formula!, this.names)}`, stored: shownText(shown), computed: valueText(value),
      size: value.k === 'number' && typeof shown === 'number' ? Math.abs(value.v - shown) / Math.max(Math.abs(shown), Number.MIN_VALUE) : Infinity,
    });
  }

  /** Σ|c x| of a formula, by computing it once more with its slopes. */
  private turnover(formula: string, { sheet, row, col }: { sheet: number; row: number; col: number }, cell: WorkingCell, i: number, j: number): number {
    const { steps } = this.evaluator;
    steps.reset();
    steps.recording = this.cells.tracking = true;
    try {
      const result = this.evaluator.run(this.program(formula), sheet, row, col, cell.array === undefined);
      const { nodes, partials } = steps.slopes((cell.array ? part(result, i, j) : scalarOf(result)).d);
      return nodes.reduce((sum, node, k) => sum + (Number.isFinite(partials[k]) ? Math.abs(partials[k] * this.cells.valueOf(node)) : 0), 0);
    } finally {
      steps.recording = this.cells.tracking = false;
      steps.reset();
    }
  }

  /** The value of a formula, or why it cannot be had. */
  private computed(formula: string, sheet: number, row: number, col: number, implicit: boolean): Scalar | Matrix | string {
    try {
      return this.evaluator.run(this.program(formula), sheet, row, col, implicit);
    } catch (reason) {
      if (reason instanceof EngineError) return reason.message;
      throw reason;
    }
  }

  private notFollowed(why: string, sheet: number, row: number, col: number): void {
    const cell = this.nameOf(sheet, row, col);
    const name = /^uses (\S+), which cannot be followed$/.exec(why)?.[1];
    if (name === undefined) {
      this.refused.push({ cell, why });
      return;
    }
    const cells = this.unsupported.get(name);
    if (cells) cells.push(cell);
    else this.unsupported.set(name, [cell]);
  }

  private callsLibrary(formula: string): boolean {
    return /\bROOTSUM\.|_xldudf_ROOTSUM_/i.test(formula);
  }

  private nameOf(sheet: number, row: number, col: number): string {
    return cellName(row, col, this.working.sheetName(sheet));
  }

  private program(formula: string): Program {
    let program = this.programs.get(formula);
    if (!program) {
      program = compile(formula, { native: this.working.book.date1904 ? nativeIn1904 : nativeNamed, isHost: () => false });
      this.programs.set(formula, program);
    }
    return program;
  }
}

const scalarOf = (result: Scalar | Matrix): Scalar => zero(result.k === 'matrix' ? at(result, 0, 0) : result);

const zero = (s: Scalar): Scalar => (s.k === 'blank' ? num(0, s.d) : s);

/** A cell of an array formula's result. */
const part = (result: Scalar | Matrix, i: number, j: number): Scalar => zero(result.k === 'matrix' ? elementOf(result, i, j) : result);
