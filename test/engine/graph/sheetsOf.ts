import { translateFormulaToR1C1 } from '@borgar/fx';
import type { HiddenRows } from '../../../functions/engine/formula/rowState';
import type { TableShape } from '../../../functions/engine/formula/evaluate';
import { CellGraph, type CellPlace } from '../../../functions/engine/graph/cellGraph';
import type { CellContent, WorkbookView } from '../../../functions/engine/graph/workbookView';

export type Entry = number | string | boolean | { readonly formula: string; readonly shows?: CellContent['value']; readonly rest?: Partial<CellContent> };

/** A workbook in memory: `{Sheet1: {A1: 5, B1: '=A1*2'}}`. Texts that begin with = are formulas without a stored result. */
export class Sheets implements WorkbookView {
  /** Rows of the first sheet that do not show. */
  hidden: HiddenRows = new Map();
  readonly sheets: { name: string; rows: number; cols: number }[];
  private readonly cells: Map<number, CellContent>[];

  constructor(
    contents: Record<string, Record<string, Entry>>,
    private readonly names: Record<string, string> = {},
    private readonly tables: Record<string, TableShape> = {},
  ) {
    this.cells = Object.values(contents).map((sheet) => new Map(Object.entries(sheet).map(([name, entry]) => [keyOf(...cellOf(name)), contentOf(name, entry)])));
    this.sheets = Object.entries(contents).map(([name, sheet]) => ({
      name,
      rows: Math.max(1, ...Object.keys(sheet).map((n) => cellOf(n)[0])),
      cols: Math.max(1, ...Object.keys(sheet).map((n) => cellOf(n)[1])),
    }));
  }

  cell(sheet: number, row: number, col: number): CellContent | null {
    return this.cells[sheet].get(keyOf(row, col)) ?? null;
  }

  formula(sheet: number, row: number, col: number): string | null {
    return this.cell(sheet, row, col)?.formula ?? null;
  }

  hiddenRows(sheet: number): HiddenRows {
    return sheet === 0 ? this.hidden : new Map();
  }

  want(): void {
    throw new Error('all cells are here');
  }

  name(name: string): string | undefined {
    const formula = this.names[name];
    return formula === undefined ? undefined : translateFormulaToR1C1(`=${formula}`, 'A1');
  }

  table(name: string, sheet: number, row: number, col: number): TableShape | undefined {
    if (name !== '') return this.tables[name];
    return Object.values(this.tables).find(({ area: a }) => a.sheet === sheet && row >= a.r1 && row <= a.r2 && col >= a.c1 && col <= a.c2);
  }

  /** `Sheet2!B3`, or `B3` on the first sheet. */
  place(address: string): CellPlace {
    const [cell, sheet] = address.split('!').reverse();
    const [row, col] = cellOf(cell);
    return { sheet: sheet === undefined ? 0 : this.sheets.findIndex((s) => s.name === sheet), row, col };
  }

  /** The cells of `A1:B3`, row by row. */
  places(range: string): CellPlace[] {
    const [from, to = from.split('!').at(-1)!] = range.split(':');
    const a = this.place(from);
    const [lastRow, lastCol] = cellOf(to);
    const out: CellPlace[] = [];
    for (let row = a.row; row <= lastRow; row++) for (let col = a.col; col <= lastCol; col++) out.push({ sheet: a.sheet, row, col });
    return out;
  }
}

/** The graph of a workbook in memory with some cells evaluated. */
export function graphOf(sheets: Sheets, ...ranges: string[]): CellGraph {
  const graph = new CellGraph(sheets);
  if (!graph.evaluate(ranges.flatMap((r) => sheets.places(r)))) throw new Error('cells stay open');
  return graph;
}

function contentOf(name: string, entry: Entry): CellContent {
  if (typeof entry === 'object') return { value: entry.shows, formula: translateFormulaToR1C1(entry.formula, name), ...entry.rest };
  if (typeof entry === 'string' && entry.startsWith('=')) return { value: undefined, formula: translateFormulaToR1C1(entry, name) };
  return { value: entry };
}

function cellOf(name: string): [row: number, col: number] {
  const [, letters, digits] = /^([A-Z]+)(\d+)$/.exec(name)!;
  return [Number(digits), [...letters].reduce((n, l) => n * 26 + l.charCodeAt(0) - 64, 0)];
}

const keyOf = (row: number, col: number): number => row * 16384 + col;
