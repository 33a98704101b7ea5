import { compile } from '../../../functions/engine/formula/compile';
import type { Program } from '../../../functions/engine/formula/expression';
import { nativeNamed } from '../../../functions/engine/formula/natives';
import type { Area } from '../../../functions/engine/formula/value';
import { formulaReads } from './formulaReads';
import type { FormulaReads, Surroundings } from './formulaReads';
import { placeKey, placeOf } from './places';
import { RowIntervals } from './RowIntervals';
import type { WorkingBook, WorkingCell } from './WorkingBook';

/** Areas wider than this are kept in a list of their sheet and looked at one by one. */
const WIDE = 64;

/** Which formulas read which cells, by the references that stand in them. */
export class Dependents implements Surroundings {
  /** Formulas that call a custom function. */
  readonly callers = new Set<number>();
  /** Formulas whose references only an evaluation can tell. */
  readonly unforeseen = new Set<number>();
  private tableColumns = 0;
  private readonly programs = new Map<string, Program>();
  private readonly reads = new Map<number, { formula: string; areas: readonly Area[] }>();

  constructor(private readonly working: WorkingBook) {
    for (const [key, cell] of working.formulaCells()) this.add(key, cell);
  }

  /** Takes in a formula that is new, or new in its place. */
  add(key: number, cell: WorkingCell): void {
    const formula = this.working.relativeFormula(key, cell);
    const reads: FormulaReads = formulaReads(this.program(formula), placeOf(key), this);
    this.callers.delete(key);
    this.unforeseen.delete(key);
    if (reads.callsHost) this.callers.add(key);
    if (reads.unforeseen) this.unforeseen.add(key);
    this.reads.set(key, { formula, areas: reads.areas });
  }

  /** Whether the whole formula of a cell is a call of a custom function, and the place of that call among the formula's own. */
  wholeCall(key: number, cell: WorkingCell): number | undefined {
    const { root } = this.program(this.working.relativeFormula(key, cell));
    return root.k === 'host' ? root.site : undefined;
  }

  /**
   * All formulas that read one of the changed cells, directly or through others. Where a formula of a spill or an array is among them, so
   * are the readers of all its cells.
   *
   * @param seeds   Formula cells that are to be computed anew anyway: they are part of the answer.
   * @param changed Cells whose content changed; of a spill that did, the anchor too, through which `A1#` reads it.
   */
  closure(seeds: Iterable<number>, changed: Iterable<number>): Set<number> {
    this.readTablesAnew();
    const found = new Set<number>();
    const queue: number[] = [...changed];
    const reach = (key: number): void => {
      if (found.has(key)) return;
      const { sheet, row, col } = placeOf(key);
      const cell = this.working.cell(sheet, row, col);
      if (cell?.formula === undefined) return;
      found.add(key);
      const { rows, cols } = cell.array ?? { rows: 1, cols: 1 };
      for (let r = 0; r < rows; r++) for (let c = 0; c < cols; c++) queue.push(placeKey(sheet, row + r, col + c));
    };
    for (const key of seeds) reach(key);
    if (queue.length === 0) return found;
    const index = this.index();
    while (queue.length > 0) {
      const key = queue.pop()!;
      const { sheet, row, col } = placeOf(key);
      index.readersOf(sheet, row, col, reach);
    }
    return found;
  }

  sheetIndex(name: string): number | undefined {
    return this.working.sheetIndex(name);
  }

  nameProgram(name: string, sheet: number): Program | undefined {
    const formula = this.working.name(name, sheet);
    return formula === undefined ? undefined : this.program(formula);
  }

  table(name: string, sheet: number, row: number, col: number): ReturnType<WorkingBook['table']> {
    return this.working.table(name, sheet, row, col);
  }

  /** Formulas read what a table covers now: once one has grown, all are looked at again. */
  private readTablesAnew(): void {
    const { length } = this.working.tableColumns;
    if (length === this.tableColumns) return;
    this.tableColumns = length;
    for (const [key, cell] of this.working.formulaCells()) this.add(key, cell);
  }

  private program(formula: string): Program {
    let program = this.programs.get(formula);
    if (!program) {
      program = compile(formula, { native: nativeNamed, isHost: (name) => this.working.names.idOf(name) !== undefined });
      this.programs.set(formula, program);
    }
    return program;
  }

  private index(): ReaderIndex {
    const index = new ReaderIndex();
    for (const [key, { areas }] of this.reads) for (const area of areas) index.add(area, key);
    return index;
  }
}

/** Readers by the cells they read; each area hands out its readers once. */
class ReaderIndex {
  private readonly single = new Map<number, number[]>();
  private readonly columns = new Map<number, RowIntervals<number>>();
  private readonly wide: { area: Area; reader: number }[] = [];

  add(area: Area, reader: number): void {
    const { sheet, r1, c1, r2, c2 } = area;
    if (r1 === r2 && c1 === c2) {
      const key = placeKey(sheet, r1, c1);
      const readers = this.single.get(key);
      if (readers) readers.push(reader);
      else this.single.set(key, [reader]);
    } else if (c2 - c1 >= WIDE) {
      this.wide.push({ area, reader });
    } else {
      for (let col = c1; col <= c2; col++) {
        const key = placeKey(sheet, 0, col);
        let column = this.columns.get(key);
        if (!column) this.columns.set(key, (column = new RowIntervals()));
        column.add(r1, r2, reader);
      }
    }
  }

  readersOf(sheet: number, row: number, col: number, use: (reader: number) => void): void {
    const key = placeKey(sheet, row, col);
    this.single.get(key)?.forEach(use);
    this.single.delete(key);
    const column = this.columns.get(placeKey(sheet, 0, col));
    if (column) for (const reader of column.take(row)) use(reader);
    for (const { area, reader } of this.wide) {
      if (area.sheet === sheet && row >= area.r1 && row <= area.r2 && col >= area.c1 && col <= area.c2) use(reader);
    }
  }
}
