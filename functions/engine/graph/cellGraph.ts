import { EngineError } from '../EngineError';
import { compile, type FunctionTable } from '../formula/compile';
import type { RowState } from '../formula/rowState';
import { type Cells, Evaluator, type TableShape, placeArea } from '../formula/evaluate';
import type { Program } from '../formula/expression';
import { nativeNamed } from '../formula/natives';
import { nativeIn1904 } from '../formula/natives/calendar1904';
import { BLANK, type ErrorCode, type Scalar, bool, err, num, text } from '../formula/scalar';
import type { Steps } from '../formula/steps';
import { type Area, type Matrix, type Value, at, isScalar } from '../formula/value';
import { cellName } from './address';
import { BEGUN, CellStates, EMPTY, UNSEEN, WAITING, isDone, isNode, nodeOf } from './cellStates';
import { type Refusal, Nodes } from './nodes';
import { disagreement } from './disagreement';
import type { CellContent, WorkbookView } from './workbookView';

/** What a graph may be told beyond the workbook. */
export interface GraphOptions {
  /** False to compute values only, without slopes. */
  readonly slopes?: boolean;
  /** False where stored results are not compared with computed ones. */
  readonly compare?: boolean;
  /** Functions that only the host can run, and how to ask for one: undefined means "not yet", and the cell waits. */
  readonly host?: {
    readonly isHost: (name: string) => boolean;
    readonly call: (name: string, args: readonly Value[], at: CellPlace, site: number) => Value | undefined;
  };
}

export interface CellPlace {
  readonly sheet: number;
  readonly row: number;
  readonly col: number;
}

/** Thrown inside an evaluation when cells are needed that are not evaluated yet. */
class Needs {
  constructor(readonly area: Area) {}
}

/** Thrown inside an evaluation when something outside has to answer first. */
class Waits {}

/** Thrown inside an evaluation when a cell it reads has been refused. */
class PassedOn {
  constructor(readonly refusal: Refusal) {}
}

/**
 * The cells of a workbook that some results depend on, each evaluated once, with its slopes. An explicit stack takes the place
 * of recursion, so that a chain of formulas may be as long as a sheet. Cells that cannot be followed are refused by name, and
 * with them all that read them.
 */
export class CellGraph implements Cells {
  readonly nodes = new Nodes();
  /** Formula cells that had no stored result to compare with. */
  readonly unchecked = new Set<number>();
  private readonly states: CellStates;
  private readonly evaluator: Evaluator;
  private readonly programs = new Map<string, Program>();
  private readonly names = new Map<string, Program | undefined>();
  private readonly finished = new Set<string>();
  private readonly matrices = new Map<string, Matrix>();
  private readonly sharedValues = new Map<string, Value>();
  private readonly sheetPlaces = new Map<string, number>();
  private readonly functions: FunctionTable;
  private stack: CellPlace[] = [];
  private kept = 0;

  constructor(
    readonly view: WorkbookView,
    private readonly options: GraphOptions = {},
  ) {
    this.states = new CellStates(view.sheets);
    this.evaluator = new Evaluator(this);
    this.evaluator.steps.recording = options.slopes ?? true;
    this.functions = { native: view.date1904 ? nativeIn1904 : nativeNamed, isHost: options.host?.isHost ?? (() => false) };
    view.sheets.forEach((s, i) => this.sheetPlaces.set(s.name.toLowerCase(), i));
  }

  /**
   * Evaluates cells and all they depend on.
   *
   * @returns true when all are done; false when cells have to be read, or host calls answered, before another round.
   */
  evaluate(targets: Iterable<CellPlace>): boolean {
    this.states.wake();
    let complete = true;
    for (const target of targets) {
      this.settle(target);
      if (!isDone(this.state(target))) complete = false;
    }
    return complete;
  }

  /** The node of an evaluated cell; undefined for a blank one. */
  node(place: CellPlace): number | undefined {
    const state = this.state(place);
    return isNode(state) ? nodeOf(state) : undefined;
  }

  /** The address of a node as a person writes it. Sheets are named where they differ from `home`. */
  nameOf(node: number, home?: number): string {
    return this.placeName({ sheet: this.nodes.sheet.data[node], row: this.nodes.row.data[node], col: this.nodes.col.data[node] }, home);
  }

  placeName(place: CellPlace, home?: number): string {
    return cellName(place.row, place.col, place.sheet === home || this.view.sheets.length === 1 ? undefined : this.view.sheets[place.sheet].name);
  }

  /** The compiled formula of a cell, if it holds one. */
  programAt(place: CellPlace): Program | undefined {
    const content = this.view.cell(place.sheet, place.row, place.col);
    return content?.formula === undefined ? undefined : this.program(content.formula);
  }

  cell(sheet: number, row: number, col: number): Scalar {
    if (row > this.view.sheets[sheet].rows || col > this.view.sheets[sheet].cols) return BLANK;
    const state = this.states.get(sheet, row, col);
    if (state === EMPTY) return BLANK;
    if (!isNode(state)) throw state === WAITING ? new Waits() : new Needs({ k: 'area', sheet, r1: row, c1: col, r2: row, c2: col });
    return this.settled(nodeOf(state));
  }

  read(area: Area): Matrix {
    const key = areaKey(area);
    const known = this.matrices.get(key);
    if (known) return known;
    const { rows, cols } = this.view.sheets[area.sheet];
    const height = Math.max(0, Math.min(area.r2, rows) - area.r1 + 1);
    const width = Math.max(0, Math.min(area.c2, cols) - area.c1 + 1);
    const cells = new Array<Scalar>(height * width);
    for (let c = 0; c < width; c++) {
      const column = this.states.column(area.sheet, area.c1 + c);
      for (let r = 0; r < height; r++) {
        const state = column[area.r1 + r];
        if (isNode(state)) cells[r * width + c] = this.settled(nodeOf(state));
        else if (state === EMPTY) cells[r * width + c] = BLANK;
        else throw state === WAITING ? new Waits() : new Needs(area);
      }
    }
    const matrix: Matrix = { k: 'matrix', rows: area.r2 - area.r1 + 1, cols: area.c2 - area.c1 + 1, height, width, cells, fill: BLANK };
    if (this.shouldKeep(area)) this.matrices.set(key, matrix);
    return matrix;
  }

  used(sheet: number): { rows: number; cols: number } {
    return this.view.sheets[sheet];
  }

  rowState(sheet: number, row: number): RowState {
    const rows = this.view.hiddenRows(sheet);
    if (!rows) throw new Waits();
    return rows.get(row) ?? 'shown';
  }

  formulaAt(sheet: number, row: number, col: number): string | undefined {
    if (row > this.view.sheets[sheet].rows || col > this.view.sheets[sheet].cols) return undefined;
    const formula = this.view.formula(sheet, row, col);
    if (formula === undefined) throw new Needs({ k: 'area', sheet, r1: row, c1: col, r2: row, c2: col });
    return formula ?? undefined;
  }

  sheetIndex(name: string): number | undefined {
    return this.sheetPlaces.get(name.toLowerCase());
  }

  name(name: string, sheet: number): Program | undefined {
    const key = `${sheet}!${name.toLowerCase()}`;
    if (!this.names.has(key)) {
      const formula = this.view.name(name, sheet);
      this.names.set(key, formula === undefined ? undefined : this.program(formula));
    }
    return this.names.get(key);
  }

  table(name: string, sheet: number, row: number, col: number): TableShape | undefined {
    return this.view.table(name, sheet, row, col);
  }

  spilled(sheet: number, row: number, col: number): Area | undefined {
    const content = this.view.cell(sheet, row, col);
    if (content === undefined && row <= this.view.sheets[sheet].rows && col <= this.view.sheets[sheet].cols) {
      throw new Needs({ k: 'area', sheet, r1: row, c1: col, r2: row, c2: col });
    }
    if (!content?.formula) return undefined;
    const { rows, cols } = content.array ?? { rows: 1, cols: 1 };
    return { k: 'area', sheet, r1: row, c1: col, r2: row + rows - 1, c2: col + cols - 1 };
  }

  shared(key: string, compute: () => Value): Value {
    const known = this.sharedValues.get(key);
    if (known !== undefined) return known;
    const { result, steps } = this.evaluator.apart(compute);
    const value = isScalar(result)
      ? this.own(result, steps)
      : result.k === 'matrix'
        ? { ...result, cells: result.cells.map((s) => this.own(s, steps)), fill: this.own(result.fill, steps) }
        : result;
    this.sharedValues.set(key, value);
    return value;
  }

  host(name: string, args: readonly Value[], site: number): Value {
    const { sheet, row, col } = this.evaluator;
    const value = this.options.host!.call(name, args, { sheet, row, col }, site);
    if (value === undefined) throw new Waits();
    return value;
  }

  /** Another evaluator over the same programs, for what-if runs. */
  programOf(formula: string): Program {
    return this.program(formula);
  }

  private own(scalar: Scalar, steps: Steps): Scalar {
    if (scalar.d >= -1) return scalar;
    return this.nodes.value[this.nodes.add(scalar, steps.slopes(scalar.d), 0, 0, 0)];
  }

  private settled(node: number): Scalar {
    const refusal = this.nodes.refusal[node];
    if (refusal) throw new PassedOn(refusal);
    return this.nodes.value[node];
  }

  private state({ sheet, row, col }: CellPlace): number {
    const { rows, cols } = this.view.sheets[sheet];
    return row > rows || col > cols ? EMPTY : this.states.get(sheet, row, col);
  }

  private settle(target: CellPlace): void {
    this.stack = [target];
    while (this.stack.length > 0) {
      const place = this.stack[this.stack.length - 1];
      const state = this.state(place);
      if (isDone(state) || state === WAITING) {
        this.stack.pop();
        continue;
      }
      const content = this.view.cell(place.sheet, place.row, place.col);
      if (content === undefined) {
        this.view.want({ k: 'area', sheet: place.sheet, r1: place.row, c1: place.col, r2: place.row, c2: place.col });
        this.wait(place);
      } else if (content === null) {
        this.states.set(place.sheet, place.row, place.col, EMPTY);
        this.stack.pop();
      } else if (content.partOf) {
        this.takePart(place, content, state);
      } else if (content.formula === undefined) {
        this.keep(place, constant(content.value), undefined, content);
        this.stack.pop();
      } else {
        this.followFormula(place, content, content.formula, state);
      }
    }
  }

  private followFormula(place: CellPlace, content: CellContent, formula: string, state: number): void {
    if (content.hidden) return this.refuse(place, 'may hide its formula (the sheet is protected), so it cannot be followed');
    const program = this.program(formula);
    if (state === UNSEEN) {
      this.states.set(place.sheet, place.row, place.col, BEGUN);
      let pushed = false;
      for (const reference of program.reads) {
        const sheet = reference.sheet === undefined ? place.sheet : this.sheetIndex(reference.sheet);
        const area = sheet === undefined ? undefined : placeArea(reference, sheet, place.row, place.col);
        if (area && this.isSmallFor(area, content)) pushed = this.push(area, place) || pushed;
      }
      if (pushed || this.state(place) !== BEGUN) return;
    }
    this.compute(place, content, program);
  }

  /** Implicit intersection reads one cell of a range: the rest of it need not be evaluated first. */
  private isSmallFor(area: Area, content: CellContent): boolean {
    return !content.implicit || (area.r1 === area.r2 && area.c1 === area.c2);
  }

  private compute(place: CellPlace, content: CellContent, program: Program): void {
    const { steps } = this.evaluator;
    steps.reset();
    let result: Scalar | Matrix;
    try {
      result = this.evaluator.run(program, place.sheet, place.row, place.col, content.implicit ?? false);
    } catch (reason) {
      if (reason instanceof Needs) {
        this.push(reason.area, place);
        return;
      }
      if (reason instanceof Waits) return this.wait(place);
      if (reason instanceof PassedOn) return this.keepRefused(place, reason.refusal);
      if (reason instanceof EngineError) return this.refuse(place, reason.message);
      throw reason;
    }
    this.keepResult(place, content, result);
    this.stack.pop();
  }

  private keepResult(place: CellPlace, content: CellContent, result: Scalar | Matrix): void {
    const { steps } = this.evaluator;
    if (!content.array) {
      const one = result.k === 'matrix' ? at(result, 0, 0) : result;
      this.keep(place, noBlank(one), steps.slopes(one.d), content);
      return;
    }
    const { rows, cols } = content.array;
    for (let i = 0; i < rows; i++) {
      for (let j = 0; j < cols; j++) {
        const one = noBlank(result.k === 'matrix' ? elementOf(result, i, j) : result);
        const part = { sheet: place.sheet, row: place.row + i, col: place.col + j };
        if (isDone(this.state(part))) continue;
        const shown = i === 0 && j === 0 ? content : (this.view.cell(part.sheet, part.row, part.col) ?? undefined);
        this.keep(part, one, steps.slopes(one.d), shown);
      }
    }
  }

  /** A cell of a spill or array formula: its value comes from the anchor. */
  private takePart(place: CellPlace, content: CellContent, state: number): void {
    const anchor = { sheet: place.sheet, row: content.partOf!.row, col: content.partOf!.col };
    const anchorState = this.state(anchor);
    if (anchorState === WAITING) return this.wait(place);
    if (isNode(anchorState)) {
      const refusal = this.nodes.refusal[nodeOf(anchorState)];
      if (refusal) return this.keepRefused(place, refusal);
      return this.refuse(place, `stands in the range of the formula in ${this.placeName(anchor, place.sheet)}, which does not reach it`);
    }
    if (anchorState === BEGUN) return this.refuseCircle(anchor);
    if (state === UNSEEN) this.states.set(place.sheet, place.row, place.col, BEGUN);
    this.stack.push(anchor);
  }

  /**
   * Puts the cells of an area that are not done on the stack.
   *
   * @returns true if the present cell has to come again: some were put there, or it was refused.
   */
  private push(area: Area, from: CellPlace): boolean {
    const key = areaKey(area);
    if (this.finished.has(key)) return false;
    const { rows, cols } = this.view.sheets[area.sheet];
    const lastRow = Math.min(area.r2, rows);
    const lastCol = Math.min(area.c2, cols);
    let pushed = false;
    let waiting = false;
    let unread = false;
    for (let col = area.c1; col <= lastCol; col++) {
      const column = this.states.column(area.sheet, col);
      for (let row = area.r1; row <= lastRow; row++) {
        const state = column[row];
        if (isDone(state)) continue;
        if (state === WAITING) {
          waiting = true;
          continue;
        }
        const content = this.view.cell(area.sheet, row, col);
        if (content === null) {
          column[row] = EMPTY;
          continue;
        }
        if (content === undefined) {
          this.states.set(area.sheet, row, col, WAITING);
          unread = true;
          continue;
        }
        if (state === BEGUN) {
          this.refuseCircle({ sheet: area.sheet, row, col });
          return true;
        }
        this.stack.push({ sheet: area.sheet, row, col });
        pushed = true;
      }
    }
    if (unread) this.view.want(area);
    if (!pushed && !waiting && !unread) this.finished.add(key);
    if (!pushed && (waiting || unread)) {
      this.wait(from);
      return true;
    }
    return pushed;
  }

  /** Refuses the cell that closes a circle, naming all cells on it. */
  private refuseCircle(closing: CellPlace): void {
    const path: CellPlace[] = [];
    for (let i = this.stack.length - 1; i >= 0; i--) {
      const p = this.stack[i];
      if (this.state(p) === BEGUN) path.push(p);
      if (p.sheet === closing.sheet && p.row === closing.row && p.col === closing.col && this.state(p) === BEGUN) break;
    }
    const names = path.reverse().map((p) => this.placeName(p, closing.sheet));
    const shown = names.length > 12 ? [...names.slice(0, 6), '…', ...names.slice(-5)] : names;
    const refusal = { message: `cells ${[...shown, names[0]].join(' → ')} form a circle` };
    for (const p of path) this.states.set(p.sheet, p.row, p.col, UNSEEN);
    for (const p of path) this.nodeFor(p, err('#VALUE!'), undefined, refusal);
  }

  private wait(place: CellPlace): void {
    this.states.set(place.sheet, place.row, place.col, WAITING);
    this.stack.pop();
  }

  private refuse(place: CellPlace, words: string): void {
    this.keepRefused(place, { message: `cell ${this.placeName(place)} ${words}` });
  }

  private keepRefused(place: CellPlace, refusal: Refusal): void {
    this.nodeFor(place, err('#VALUE!'), undefined, refusal);
    this.stack.pop();
  }

  private keep(place: CellPlace, value: Scalar, slopes: ReturnType<Evaluator['steps']['slopes']> | undefined, content: CellContent | undefined): void {
    const id = this.nodeFor(place, value, slopes, undefined);
    if (!content || (content.formula === undefined && !content.partOf) || this.options.compare === false) return;
    if (content.value === undefined) this.unchecked.add(id);
    const words = disagreement(value, content.value, () => this.nodes.turnover(id));
    if (words) this.nodes.refusal[id] = { message: `cell ${this.placeName(place)} ${words}` };
  }

  private nodeFor(place: CellPlace, value: Scalar, slopes: ReturnType<Evaluator['steps']['slopes']> | undefined, refusal: Refusal | undefined): number {
    const id = this.nodes.add(value, slopes, place.sheet, place.row, place.col, refusal);
    this.states.setNode(place.sheet, place.row, place.col, id);
    return id;
  }

  private program(formula: string): Program {
    let program = this.programs.get(formula);
    if (!program) {
      program = compile(formula, this.functions);
      this.programs.set(formula, program);
    }
    return program;
  }

  /** Matrices are kept to be read again, up to a bound: ranges that grow from row to row would fill the memory. */
  private shouldKeep(area: Area): boolean {
    const size = (area.r2 - area.r1 + 1) * (area.c2 - area.c1 + 1);
    if (this.kept + size > MOST_KEPT) return false;
    this.kept += size;
    return true;
  }
}

/** How many cells the kept matrices may hold in all. */
const MOST_KEPT = 4e6;

const areaKey = (a: Area): string => `${a.sheet}!${a.r1},${a.c1},${a.r2},${a.c2}`;

/** A stored value as a scalar; what has not been computed is #VALUE!. */
export function constant(value: CellContent['value']): Scalar {
  switch (typeof value) {
    case 'number':
      return num(value);
    case 'string':
      return text(value);
    case 'boolean':
      return bool(value);
    case 'object':
      return err(value.error as ErrorCode);
    default:
      return err('#VALUE!');
  }
}

const noBlank = (s: Scalar): Scalar => (s.k === 'blank' ? num(0, s.d) : s);

/** An element of an array formula's result: a single row, column or value repeats, what lies beyond is #N/A. */
export function elementOf(m: Matrix, i: number, j: number): Scalar {
  const r = m.rows === 1 ? 0 : i;
  const c = m.cols === 1 ? 0 : j;
  return r < m.rows && c < m.cols ? at(m, r, c) : err('#N/A');
}
