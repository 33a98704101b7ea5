import { EngineError } from '../../EngineError';
import type { Run } from '../run';
import { type Scalar, BLANK, NONE, err } from '../scalar';
import { type Matrix, type Value, at, matrix } from '../value';
import { together } from './follow';

/** An array made by a function may store so many cells, and be so long. */
const LARGEST = 4e6;
const LONGEST = 1048576;

/** So many dependences may come out of one function: of each cell on all that decided its place. */
const MOST_LINKS = 1e7;

export const NOT_AVAILABLE = err('#N/A');

/** Refuses an array that would be too large to be stored. */
export function checkSize(rows: number, cols: number): void {
  if (rows * cols <= LARGEST && Math.max(rows, cols) <= LONGEST) return;
  throw new EngineError('refused', `makes an array of ${rows} × ${cols} cells, which is more than can be followed`);
}

/** Refuses more dependences than can be kept. */
export function checkLinks(count: number): void {
  if (count > MOST_LINKS) throw new EngineError('refused', 'makes an array whose cells depend on more cells than can be followed');
}

/** An array of a size, with an element for each 0-based place, row by row. */
export function built(rows: number, cols: number, element: (row: number, col: number) => Scalar): Matrix {
  checkSize(rows, cols);
  const cells: Scalar[] = [];
  for (let i = 0; i < rows; i++) for (let j = 0; j < cols; j++) cells.push(element(i, j));
  return matrix(rows, cols, cells);
}

/** A matrix with rows and columns exchanged. */
export function transposed(m: Matrix): Matrix {
  const cells: Scalar[] = [];
  for (let j = 0; j < m.width; j++) for (let i = 0; i < m.height; i++) cells.push(m.cells[i * m.width + j]);
  return { k: 'matrix', rows: m.cols, cols: m.rows, height: m.width, width: m.height, cells, fill: m.fill };
}

/** All elements of a matrix over its nominal size, row by row. */
export function elementsOf(m: Matrix): readonly Scalar[] {
  return m.rows === m.height && m.cols === m.width ? m.cells : built(m.rows, m.cols, (i, j) => at(m, i, j)).cells;
}

/** The matrix with every cell linked, with slope 0, to the scalars that decided which cells stand where. */
export function decidedBy(run: Run, m: Matrix, deciders: readonly Scalar[]): Matrix {
  const by = deciders.filter((s) => s.d !== NONE);
  if (by.length === 0) return m;
  checkLinks(by.length * m.cells.length);
  const all = by.length === 1 ? by[0] : together(run, by);
  const linked = (s: Scalar): Scalar => run.steps.chosen(s, all);
  return { ...m, cells: m.cells.map(linked), fill: m.cells.length < m.rows * m.cols ? linked(m.fill) : BLANK };
}

/** The matrices that the areas of a value hold: one, or one for each area of a union. */
export const matricesOf = (run: Run, value: Value): Matrix[] => run.parts(value).map((part) => run.matrix(part));
