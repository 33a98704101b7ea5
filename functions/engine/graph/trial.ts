import { EngineError } from '../EngineError';
import { type Cells, Evaluator, type TableShape } from '../formula/evaluate';
import type { RowState } from '../formula/rowState';
import type { Program } from '../formula/expression';
import { BLANK, type Scalar, err, num } from '../formula/scalar';
import { type Area, type Matrix, type Value, at } from '../formula/value';
import type { CellGraph } from './cellGraph';

/** Thrown when a shifted run reads a cell that cannot be had (a branch not taken before, whose cells have not been read). */
class Unknown {}

/** Thrown when a shifted run reads a node outside the ancestors known before: it has to be settled first. */
class Later {
  constructor(readonly node: number) {}
}

/**
 * The same cells with some inputs shifted: what a finite step does to a result. Only cells below the shifted ones are computed
 * again, values only, by the same programs; decisions fall as the shifted values demand.
 */
export class Trial implements Cells {
  private readonly evaluator = new Evaluator(this);
  private overlay = new Map<number, Scalar>();
  private shifts: ReadonlyMap<number, number> = new Map();
  private affected = new Map<number, boolean>();
  private arrays = new Map<string, Scalar | Matrix>();
  private sharedValues = new Map<string, Value>();

  constructor(private readonly graph: CellGraph) {
    this.evaluator.steps.recording = false;
  }

  /**
   * The value of a result when input nodes are moved by the given amounts.
   *
   * @param result  Node of the result.
   * @param above   Ancestors of the result, itself first, in falling order (as a sweep leaves them).
   * @returns the shifted value; undefined where it is no finite number or cannot be followed there.
   */
  value(result: number, above: readonly number[], shifts: ReadonlyMap<number, number>): number | undefined {
    this.overlay = new Map();
    this.affected = new Map();
    this.arrays = new Map();
    this.sharedValues = new Map();
    this.shifts = shifts;
    try {
      for (let i = above.length - 1; i >= 0; i--) this.update(above[i]);
      const value = this.current(result);
      return value.k === 'number' ? value.v : undefined;
    } catch (reason) {
      if (reason instanceof EngineError || reason instanceof Unknown) return undefined;
      throw reason;
    }
  }

  cell(sheet: number, row: number, col: number): Scalar {
    const { rows, cols } = this.graph.view.sheets[sheet];
    if (row > rows || col > cols) return BLANK;
    const place = { sheet, row, col };
    const node = this.graph.node(place);
    if (node !== undefined) return this.current(node);
    if (this.graph.view.cell(sheet, row, col) === null) return BLANK;
    if (!this.graph.evaluate([place])) throw new Unknown();
    const found = this.graph.node(place);
    return found === undefined ? BLANK : this.current(found);
  }

  read(area: Area): Matrix {
    const { rows, cols } = this.graph.view.sheets[area.sheet];
    const height = Math.max(0, Math.min(area.r2, rows) - area.r1 + 1);
    const width = Math.max(0, Math.min(area.c2, cols) - area.c1 + 1);
    const cells: Scalar[] = [];
    for (let r = 0; r < height; r++) for (let c = 0; c < width; c++) cells.push(this.cell(area.sheet, area.r1 + r, area.c1 + c));
    return { k: 'matrix', rows: area.r2 - area.r1 + 1, cols: area.c2 - area.c1 + 1, height, width, cells, fill: BLANK };
  }

  used(sheet: number): { rows: number; cols: number } {
    return this.graph.used(sheet);
  }

  rowState(sheet: number, row: number): RowState {
    const rows = this.graph.view.hiddenRows(sheet);
    if (!rows) throw new Unknown();
    return rows.get(row) ?? 'shown';
  }

  formulaAt(sheet: number, row: number, col: number): string | undefined {
    const { rows, cols } = this.graph.view.sheets[sheet];
    if (row > rows || col > cols) return undefined;
    const formula = this.graph.view.formula(sheet, row, col);
    if (formula === undefined) throw new Unknown();
    return formula ?? undefined;
  }

  sheetIndex(name: string): number | undefined {
    return this.graph.sheetIndex(name);
  }

  name(name: string, sheet: number): Program | undefined {
    return this.graph.name(name, sheet);
  }

  table(name: string, sheet: number, row: number, col: number): TableShape | undefined {
    return this.graph.table(name, sheet, row, col);
  }

  spilled(sheet: number, row: number, col: number): Area | undefined {
    if (this.graph.view.cell(sheet, row, col) === undefined) throw new Unknown();
    return this.graph.spilled(sheet, row, col);
  }

  shared(key: string, compute: () => Value): Value {
    let value = this.sharedValues.get(key);
    if (value === undefined) {
      value = compute();
      this.sharedValues.set(key, value);
    }
    return value;
  }

  host(): Value {
    throw new EngineError('refused', 'calls a function of the host');
  }

  /** Settles a node whose parents are settled: its old value, or a new one where something above it moved. */
  private update(node: number): void {
    if (this.affected.has(node)) return;
    const { nodes } = this.graph;
    let moved = this.shifts.has(node);
    for (let e = nodes.edge.data[node]; e < nodes.edge.data[node + 1] && !moved; e++) moved = this.affected.get(nodes.parent.data[e])!;
    if (moved && nodes.row.data[node] !== 0) {
      let value = this.recomputed(node);
      const shift = this.shifts.get(node);
      if (shift !== undefined) value = value.k === 'number' ? num(value.v + shift) : err('#VALUE!');
      this.overlay.set(node, value);
    }
    this.affected.set(node, moved);
  }

  /** Settles a node that is no ancestor of the result at the estimates, and all above it, oldest first. */
  private settle(node: number): void {
    const { nodes } = this.graph;
    const found = [node];
    const seen = new Set(found);
    for (let i = 0; i < found.length; i++) {
      for (let e = nodes.edge.data[found[i]]; e < nodes.edge.data[found[i] + 1]; e++) {
        const parent = nodes.parent.data[e];
        if (seen.has(parent) || this.affected.has(parent)) continue;
        seen.add(parent);
        found.push(parent);
      }
    }
    for (const n of found.sort((a, b) => a - b)) this.update(n);
  }

  private recomputed(node: number): Scalar {
    const { nodes, view } = this.graph;
    const place = { sheet: nodes.sheet.data[node], row: nodes.row.data[node], col: nodes.col.data[node] };
    const content = view.cell(place.sheet, place.row, place.col);
    const anchor = content?.partOf ? { ...place, ...content.partOf } : place;
    const source = content?.partOf ? view.cell(anchor.sheet, anchor.row, anchor.col) : content;
    if (source?.formula === undefined) return nodes.value[node];
    const key = `${anchor.sheet}!${anchor.row},${anchor.col}`;
    let result = this.arrays.get(key);
    while (result === undefined) {
      try {
        result = this.evaluator.run(this.graph.programOf(source.formula), anchor.sheet, anchor.row, anchor.col, source.implicit ?? false);
      } catch (reason) {
        if (!(reason instanceof Later)) throw reason;
        this.settle(reason.node);
        continue;
      }
      if (source.array) this.arrays.set(key, result);
    }
    if (result.k !== 'matrix') return result;
    const i = result.rows === 1 ? 0 : place.row - anchor.row;
    const j = result.cols === 1 ? 0 : place.col - anchor.col;
    return i < result.rows && j < result.cols ? at(result, i, j) : err('#N/A');
  }

  private current(node: number): Scalar {
    if (!this.affected.has(node)) throw new Later(node);
    if (this.graph.nodes.refusal[node]) throw new Unknown();
    return this.overlay.get(node) ?? { ...this.graph.nodes.value[node], d: -1 };
  }
}
