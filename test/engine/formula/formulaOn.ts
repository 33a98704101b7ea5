import { translateFormulaToR1C1 } from '@borgar/fx';
import { compile } from '../../../functions/engine/formula/compile';
import { type Cells, Evaluator } from '../../../functions/engine/formula/evaluate';
import { nativeNamed } from '../../../functions/engine/formula/natives';
import { BLANK, type ErrorCode, type Scalar, bool, err, num, text } from '../../../functions/engine/formula/scalar';
import { type Area, type Matrix, at } from '../../../functions/engine/formula/value';

export type Plain = number | string | boolean | null;

/** The result of a formula on a small sheet: what stands in the cell (errors as `#N/A`), and its slope by each number cell. */
export interface Outcome {
  value: Plain | Plain[][];
  slopes: Record<string, number>;
  tainted: string[];
}

/**
 * Evaluates one formula, as typed in A1 form into cell J20 of the first sheet, over the given cells (`{A1: 5, B2: 'x'}`).
 * Texts that begin with # are error values.
 */
export function formulaOn(cells: Record<string, Plain>, formula: string, options: { implicit?: boolean } = {}): Outcome {
  const names = Object.keys(cells);
  const places = new Map(names.map((name, i) => [key(...cellOf(name)), i]));
  const scalarAt = (row: number, col: number): Scalar => {
    const i = places.get(key(row, col));
    return i === undefined ? BLANK : scalarOf(cells[names[i]], i);
  };
  const usedRows = Math.max(1, ...names.map((n) => cellOf(n)[0]));
  const usedCols = Math.max(1, ...names.map((n) => cellOf(n)[1]));
  const table: Cells = {
    cell: (_s, row, col) => scalarAt(row, col),
    read: (area: Area): Matrix => {
      const height = Math.max(0, Math.min(area.r2, usedRows) - area.r1 + 1);
      const width = Math.max(0, Math.min(area.c2, usedCols) - area.c1 + 1);
      const out: Scalar[] = [];
      for (let r = 0; r < height; r++) for (let c = 0; c < width; c++) out.push(scalarAt(area.r1 + r, area.c1 + c));
      return { k: 'matrix', rows: area.r2 - area.r1 + 1, cols: area.c2 - area.c1 + 1, height, width, cells: out, fill: BLANK };
    },
    used: () => ({ rows: usedRows, cols: usedCols }),
    rowState: () => 'shown',
    formulaAt: () => undefined,
    sheetIndex: (name) => (name === 'Sheet1' ? 0 : undefined),
    name: () => undefined,
    table: () => undefined,
    spilled: () => undefined,
    shared: (_key, compute) => compute(),
    host: () => err('#NAME?'),
  };
  const evaluator = new Evaluator(table);
  const r1c1 = translateFormulaToR1C1(formula.startsWith('=') ? formula : `=${formula}`, 'J20');
  const result = evaluator.run(compile(r1c1, { native: nativeNamed, isHost: () => false }), 0, 20, 10, options.implicit ?? false);
  const outcome: Outcome = { value: plain(result), slopes: {}, tainted: [] };
  if (result.k !== 'matrix') {
    const s = evaluator.steps.slopes(result.d);
    s.nodes.forEach((node, i) => {
      outcome.slopes[names[node]] = s.partials[i];
      if (s.tainted[i]) outcome.tainted.push(names[node]);
    });
  }
  return outcome;
}

function plain(value: Scalar | Matrix): Plain | Plain[][] {
  if (value.k !== 'matrix') return value.v;
  return Array.from({ length: value.rows }, (_, r) => Array.from({ length: value.cols }, (_x, c) => at(value, r, c).v));
}

function scalarOf(v: Plain, d: number): Scalar {
  if (v === null) return BLANK;
  if (typeof v === 'number') return num(v, d);
  if (typeof v === 'boolean') return bool(v, d);
  return /^#[A-Z/0!?]/.test(v) ? err(v as ErrorCode, d) : text(v, d);
}

function cellOf(name: string): [row: number, col: number] {
  const [, letters, digits] = /^([A-Z]+)(\d+)$/.exec(name)!;
  return [Number(digits), [...letters].reduce((n, l) => n * 26 + l.charCodeAt(0) - 64, 0)];
}

const key = (row: number, col: number): number => row * 16384 + col;
