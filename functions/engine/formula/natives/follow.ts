import type { Run } from '../run';
import { type Num, type Scalar, NONE, num } from '../scalar';
import { type Matrix, type Value, at } from '../value';

/**
 * The value that was selected, linked with slope 0 to what decided for it. A reference stays one, which SUMIF, ROWS or
 * `A1:INDEX(…)` need, and carries the link to whatever is read from it.
 */
export function follow(run: Run, selected: Value, ...deciders: readonly Scalar[]): Value {
  if (selected.k === 'missing') return run.steps.chosen(num(0), ...deciders);
  if (deciders.every((s) => s.d === NONE)) return selected;
  switch (selected.k) {
    case 'matrix': {
      const linked = (s: Scalar): Scalar => run.steps.chosen(s, ...deciders);
      return { ...selected, cells: selected.cells.map(linked), fill: linked(selected.fill) };
    }
    case 'area':
      return { ...selected, by: together(run, selected.by ? [selected.by, ...deciders] : deciders) };
    case 'union':
    case 'lambda':
      return selected;
    default:
      return run.steps.chosen(selected, ...deciders);
  }
}

/** One scalar that stands for the dependence on many, with slope 0. */
export const together = (run: Run, scalars: readonly Scalar[]): Num => run.steps.many(0, scalars, 0) as Num;

/** The size of a value; a reference is not read for it. A union has none. */
export function sizeOf(run: Run, value: Value): { rows: number; cols: number } | undefined {
  if (value.k === 'area') return { rows: value.r2 - value.r1 + 1, cols: value.c2 - value.c1 + 1 };
  return value.k === 'union' ? undefined : run.matrix(value);
}

/** A part of an area or a matrix, by 0-based row and column and size; it must lie inside. A part of an area is an area. */
export function portion(run: Run, value: Value, row: number, col: number, rows: number, cols: number): Value {
  if (value.k === 'area') {
    const r1 = value.r1 + row;
    const c1 = value.c1 + col;
    return { ...value, r1, c1, r2: r1 + rows - 1, c2: c1 + cols - 1 };
  }
  const m = run.matrix(value);
  if (rows === 1 && cols === 1) return at(m, row, col);
  if (rows === m.rows && cols === m.cols) return m;
  return cut(m, row, col, rows, cols);
}

function cut(m: Matrix, row: number, col: number, rows: number, cols: number): Matrix {
  const height = Math.max(0, Math.min(rows, m.height - row));
  const width = Math.max(0, Math.min(cols, m.width - col));
  const cells: Scalar[] = [];
  for (let i = 0; i < height; i++) for (let j = 0; j < width; j++) cells.push(at(m, row + i, col + j));
  return { k: 'matrix', rows, cols, height, width, cells, fill: m.fill };
}
