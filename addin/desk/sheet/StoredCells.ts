import type { Cells, TableShape } from '../../../functions/engine/formula/evaluate';
import type { RowState } from '../../../functions/engine/formula/rowState';
import type { Program } from '../../../functions/engine/formula/expression';
import { EngineError } from '../../../functions/engine/EngineError';
import { constant } from '../../../functions/engine/graph/cellGraph';
import { BLANK, type Scalar, withOrigin } from '../../../functions/engine/formula/scalar';
import type { Area, Matrix, Value } from '../../../functions/engine/formula/value';
import type { WorkingBook } from './WorkingBook';

/** A book whose cells all show what the file holds: each formula can be computed by itself, from its stored inputs. */
export class StoredCells implements Cells {
  /** True to give every number an origin, so that a formula's slopes can be asked for. */
  tracking = false;
  private readonly origins: number[] = [];
  private readonly matrices = new Map<string, Matrix>();
  private kept = 0;

  constructor(
    private readonly working: WorkingBook,
    private readonly compiled: (formula: string) => Program,
  ) {}

  cell(sheet: number, row: number, col: number): Scalar {
    const cell = this.working.cell(sheet, row, col);
    if (!cell) return BLANK;
    const scalar = constant(cell.value);
    if (!this.tracking || scalar.k !== 'number') return scalar;
    this.origins.push(scalar.v);
    return withOrigin(scalar, this.origins.length - 1);
  }

  /** The number behind an origin that was given while tracking. */
  valueOf(origin: number): number {
    return this.origins[origin];
  }

  read(area: Area): Matrix {
    const key = this.tracking ? undefined : `${area.sheet}!${area.r1},${area.c1},${area.r2},${area.c2}`;
    const known = key === undefined ? undefined : this.matrices.get(key);
    if (known) return known;
    const { rows, cols } = this.working.used(area.sheet);
    const height = Math.max(0, Math.min(area.r2, rows) - area.r1 + 1);
    const width = Math.max(0, Math.min(area.c2, cols) - area.c1 + 1);
    const cells: Scalar[] = [];
    for (let r = 0; r < height; r++) for (let c = 0; c < width; c++) cells.push(this.cell(area.sheet, area.r1 + r, area.c1 + c));
    const matrix: Matrix = { k: 'matrix', rows: area.r2 - area.r1 + 1, cols: area.c2 - area.c1 + 1, height, width, cells, fill: BLANK };
    if (key !== undefined && this.kept < MOST_KEPT) {
      this.kept += cells.length;
      this.matrices.set(key, matrix);
    }
    return matrix;
  }

  used(sheet: number): { rows: number; cols: number } {
    return this.working.used(sheet);
  }

  rowState(sheet: number, row: number): RowState {
    return this.working.hiddenRows(sheet).get(row) ?? 'shown';
  }

  formulaAt(sheet: number, row: number, col: number): string | undefined {
    return this.working.formulaAt(sheet, row, col);
  }

  sheetIndex(name: string): number | undefined {
    return this.working.sheetIndex(name);
  }

  name(name: string, sheet: number): Program | undefined {
    const formula = this.working.name(name, sheet);
    return formula === undefined ? undefined : this.compiled(formula);
  }

  table(name: string, sheet: number, row: number, col: number): TableShape | undefined {
    return this.working.table(name, sheet, row, col);
  }

  spilled(sheet: number, row: number, col: number): Area | undefined {
    const cell = this.working.cell(sheet, row, col);
    if (cell?.formula === undefined) return undefined;
    const { rows, cols } = cell.array ?? { rows: 1, cols: 1 };
    return { k: 'area', sheet, r1: row, c1: col, r2: row + rows - 1, c2: col + cols - 1 };
  }

  shared(_key: string, compute: () => Value): Value {
    return compute();
  }

  host(): Value {
    throw new EngineError('refused', 'calls a function of the library');
  }
}

/** How many cells the kept matrices may hold in all. */
const MOST_KEPT = 4e6;

