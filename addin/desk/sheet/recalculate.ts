import type { CellValue } from '../book/BookCell';
import { type ErrorCode, type Scalar, err } from '../../../functions/engine/formula/scalar';
import { type Matrix, type Value, at, matrix } from '../../../functions/engine/formula/value';
import { CellGraph, type CellPlace } from '../../../functions/engine/graph/cellGraph';
import { Dependents } from './Dependents';
import type { FunctionHost } from './functionHost';
import { GraphView, SPILL_MARK, STORED_MARK } from './GraphView';
import { HostCalls, scalarOf } from './HostCalls';
import { addressOf, placeKey, placeOf } from './places';
import { SpillPlaces } from './SpillPlaces';
import { sameValue } from './values';
import type { WorkingBook } from './WorkingBook';

/** A cell that could not be computed, or whose function said no. */
export interface CellRefusal {
  readonly key: number;
  /** `Sheet1!B7` */
  readonly cell: string;
  /** What a user of Excel would see in the cell: `#VALUE!`, `#SPILL!`; nothing where it was left without a result. */
  readonly error?: string;
  readonly message: string;
}

export interface Recalculation {
  /** Cells whose formulas were computed. */
  readonly computed: number;
  readonly refused: readonly CellRefusal[];
  /** Stored results that may be out of date and could not be computed: the program that opens the file has to. */
  readonly leftOpen: boolean;
}

/** Spills that keep changing each other's size are stopped after so many rounds. */
const MOST_ROUNDS = 50;

/** How far a recalculation is: cells computed out of those known to need it. */
export type Progress = (done: number, of: number) => void;

/**
 * Recalculation of a working book, again and again as it is edited. Computed are: formulas without a stored value, edited ones, calls of
 * custom functions, and all formulas that depend on these. Every other formula keeps the value that is stored.
 */
export class Recalculator {
  private readonly dependents: Dependents;
  private readonly refusals = new Map<number, Omit<CellRefusal, 'key' | 'cell'>>();
  private readonly spills: SpillPlaces;
  private first = true;

  constructor(
    private readonly working: WorkingBook,
    private readonly host: FunctionHost,
  ) {
    this.dependents = new Dependents(working);
    this.spills = new SpillPlaces(working);
  }

  /** Brings the book up to date. */
  async run(progress: Progress = () => undefined): Promise<Recalculation> {
    let dirty = this.begin();
    let computed = 0;
    this.spills.begin();
    for (let round = 1; ; round++) {
      if (round > MOST_ROUNDS) {
        this.stop(dirty);
        break;
      }
      computed += dirty.size;
      if (dirty.size > 0) await this.round(dirty, progress);
      const moved = this.spills.place();
      for (const { key, words } of moved.blocked) this.refuse(key, { error: '#SPILL!', message: words });
      for (const key of moved.gone) this.refusals.delete(key);
      dirty = this.dependents.closure([], moved.changed);
      if (dirty.size === 0) dirty = this.unforeseen();
      if (dirty.size === 0) break;
    }
    this.working.edited.clear();
    return { computed, refused: this.refused(), leftOpen: [...this.refusals.keys()].some((key) => this.isLeftOpen(key)) };
  }

  private stop(dirty: Iterable<number>): void {
    for (const key of dirty) {
      this.unsettle(key);
      this.refuse(key, { message: 'depends on spills that keep changing each other\'s size' });
    }
  }

  /** The cells that have to be computed. */
  private begin(): Set<number> {
    const seeds = new Set<number>();
    for (const key of this.working.edited) {
      this.refusals.delete(key);
      const cell = this.cellOf(key);
      if (cell?.formula !== undefined) {
        this.dependents.add(key, cell);
        seeds.add(key);
      }
    }
    if (this.first) {
      for (const key of this.dependents.callers) seeds.add(key);
      for (const [key] of this.working.formulaCells()) if (this.lacksValue(key)) seeds.add(key);
      this.first = false;
    }
    for (const key of this.refusals.keys()) if (this.cellOf(key)?.value === undefined) seeds.add(key);
    return this.dependents.closure(seeds, this.working.edited);
  }

  private lacksValue(key: number): boolean {
    const { sheet, row, col } = placeOf(key);
    const cell = this.working.cell(sheet, row, col)!;
    if (cell.value === undefined) return true;
    const { rows, cols } = cell.array ?? { rows: 1, cols: 1 };
    for (let r = 0; r < rows; r++) {
      for (let c = 0; c < cols; c++) if (this.working.cell(sheet, row + r, col + c)?.value === undefined) return true;
    }
    return false;
  }

  /** Formulas whose references cannot be told beforehand, once a value that was stored has changed: it may be one they read. */
  private unforeseen(): Set<number> {
    const waiting = [...this.dependents.unforeseen].filter((key) => !this.settledUnforeseen.has(key) && this.cellOf(key)?.formula !== undefined);
    if (waiting.length === 0 || !this.storedValueChanged()) return new Set();
    for (const key of waiting) this.settledUnforeseen.add(key);
    return this.dependents.closure(waiting, []);
  }

  private readonly settledUnforeseen = new Set<number>();

  private storedValueChanged(): boolean {
    for (const [key, now] of this.working.changed) {
      const { sheet, row, col } = placeOf(key);
      const before = this.working.stored(sheet, row, col);
      if (before?.value !== undefined && !sameValue(before.value, now?.value)) return true;
    }
    return false;
  }

  private async round(dirty: ReadonlySet<number>, progress: Progress): Promise<void> {
    const calls = new HostCalls(this.working, this.host, (place) => {
      const cell = this.working.cell(place.sheet, place.row, place.col);
      return cell?.formula === undefined ? undefined : this.dependents.wholeCall(placeKey(place.sheet, place.row, place.col), cell);
    });
    for (const key of dirty) {
      this.spills.forget(key);
      this.unsettle(key);
    }
    const graph: CellGraph = new CellGraph(new GraphView(this.working), {
      slopes: false, compare: false,
      host: {
        isHost: (name) => name === SPILL_MARK || name === STORED_MARK || this.working.names.idOf(name) !== undefined,
        call: (name, args, place, site) => this.answer(graph, calls, name, args, place, site),
      },
    });
    const remaining = new Set(dirty);
    for (let idle = 0; remaining.size > 0;) {
      const before = remaining.size;
      graph.evaluate([...remaining].map(placeOf));
      this.harvest(graph, calls, remaining);
      progress(dirty.size - remaining.size, dirty.size);
      const moved = (await calls.answer()) > 0 || remaining.size < before;
      idle = moved ? 0 : idle + 1;
      if (idle > 1) throw new Error('the recalculation waits for something that nobody was asked for');
    }
  }

  private unsettle(key: number): void {
    const { sheet, row, col } = placeOf(key);
    const { rows, cols } = this.working.cell(sheet, row, col)!.array ?? { rows: 1, cols: 1 };
    for (let r = 0; r < rows; r++) {
      for (let c = 0; c < cols; c++) {
        this.working.setValue(sheet, row + r, col + c, undefined);
        this.refusals.delete(placeKey(sheet, row + r, col + c));
      }
    }
  }

  /** A call that the graph leaves to its host: one of ours, or a mark of the view. */
  private answer(graph: CellGraph, calls: HostCalls, name: string, args: readonly Value[], place: CellPlace, site: number): Value | undefined {
    if (name === STORED_MARK) return this.storedSpill(place);
    if (name !== SPILL_MARK) return calls.value(graph, name, args, place, site);
    const result = wholeResult(graph, args[0]);
    this.spills.found(placeKey(place.sheet, place.row, place.col), {
      rows: result.rows, cols: result.cols, valueAt: (r, c) => plainValue(at(result, r, c)),
    });
    return result;
  }

  private storedSpill({ sheet, row, col }: CellPlace): Value {
    const { rows, cols } = this.working.cell(sheet, row, col)!.array!;
    const cells: Scalar[] = [];
    for (let r = 0; r < rows; r++) for (let c = 0; c < cols; c++) cells.push(scalarOf(this.working.cell(sheet, row + r, col + c)?.value));
    return matrix(rows, cols, cells);
  }

  /** Takes over what has been evaluated. */
  private harvest(graph: CellGraph, calls: HostCalls, remaining: Set<number>): void {
    for (const key of remaining) {
      const { sheet, row, col } = placeOf(key);
      const node = graph.node({ sheet, row, col });
      if (node === undefined) continue;
      remaining.delete(key);
      const refusal = graph.nodes.refusal[node];
      if (refusal) {
        this.refuse(key, { message: refusal.message });
        continue;
      }
      const { rows, cols } = this.working.cell(sheet, row, col)!.array ?? { rows: 1, cols: 1 };
      for (let r = 0; r < rows; r++) {
        for (let c = 0; c < cols; c++) {
          const part = graph.node({ sheet, row: row + r, col: col + c });
          if (part !== undefined) this.working.setValue(sheet, row + r, col + c, plainValue(graph.nodes.value[part]));
        }
      }
      this.noteErrors(key, graph.nodes.value[node], calls);
    }
  }

  /** The words of custom functions that gave an error: for each cell of a whole result, or for the cell that used it. */
  private noteErrors(key: number, value: Scalar, calls: HostCalls): void {
    const { sheet, row, col } = placeOf(key);
    const spills = this.cellOf(key)?.array !== undefined;
    for (const { id, result, whole } of calls.answers.get(key) ?? []) {
      const cells = result.ok ? result.cells : [[result.error]];
      cells.forEach((line, r) => line.forEach((one, c) => {
        if (typeof one !== 'object') return;
        const shown = whole ? r + c === 0 || spills : value.k === 'error' && !this.refusals.has(key);
        if (!shown) return;
        const place = whole ? placeKey(sheet, row + r, col + c) : key;
        this.refuse(place, { error: one.error, message: one.message ?? `${id}: gives ${one.error}` });
      }));
    }
  }

  private refuse(key: number, refusal: Omit<CellRefusal, 'key' | 'cell'>): void {
    this.refusals.set(key, refusal);
  }

  private refused(): CellRefusal[] {
    return [...this.refusals].sort(([a], [b]) => a - b).map(([key, refusal]) => {
      const { sheet, row, col } = placeOf(key);
      return { key, cell: addressOf(this.working.sheetName(sheet), row, col), ...refusal };
    });
  }

  private isLeftOpen(key: number): boolean {
    const { sheet, row, col } = placeOf(key);
    return this.working.cell(sheet, row, col)?.value === undefined && this.working.stored(sheet, row, col)?.value !== undefined;
  }

  private cellOf(key: number): ReturnType<WorkingBook['cell']> {
    const { sheet, row, col } = placeOf(key);
    return this.working.cell(sheet, row, col);
  }
}

/** What a spill shows: a range by its cells, a blank one as 0. */
function wholeResult(graph: CellGraph, value: Value): Matrix {
  switch (value.k) {
    case 'matrix':
      return withoutBlanks(value);
    case 'area':
      return withoutBlanks(value.r1 === value.r2 && value.c1 === value.c2 ? matrix(1, 1, [graph.cell(value.sheet, value.r1, value.c1)]) : graph.read(value));
    case 'union':
      return matrix(1, 1, [err('#VALUE!')]);
    case 'lambda':
      return matrix(1, 1, [err('#CALC!')]);
    case 'missing':
      return matrix(1, 1, [scalarOf(0)]);
    default:
      return withoutBlanks(matrix(1, 1, [value]));
  }
}

const zeroForBlank = (s: Scalar): Scalar => (s.k === 'blank' ? scalarOf(0) : s);
const withoutBlanks = (m: Matrix): Matrix => ({ ...m, cells: m.cells.map(zeroForBlank), fill: zeroForBlank(m.fill) });

function plainValue(s: Scalar): CellValue {
  if (s.k === 'error') return { error: s.v satisfies ErrorCode };
  return s.k === 'blank' ? 0 : s.v;
}
