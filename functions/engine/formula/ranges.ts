import { toNumber } from './coerce';
import type { Run } from './run';
import { type Err, NONE, type Num, type Scalar } from './scalar';
import type { Matrix, Value } from './value';
import { at } from './value';

/**
 * The numbers among arguments, as SUM and its kin take them: in a reference or a matrix only numbers count (text, booleans and
 * blanks are passed over); a scalar written as an argument is coerced. The first error found is returned instead.
 *
 * @param passedOver   Collects what was passed over and depends on a cell: it decided that it does not count (`"<LOD"`), so a
 *                     result must be linked to it, with slope 0.
 */
export function numbersOf(run: Run, args: readonly Value[], passedOver?: Scalar[]): Num[] | Err {
  const found: Num[] = [];
  for (const arg of args) {
    if (arg.k === 'missing') {
      found.push({ k: 'number', v: 0, d: -1 });
      continue;
    }
    for (const part of run.parts(arg)) {
      if (part.k === 'number' || part.k === 'text' || part.k === 'boolean' || part.k === 'error' || part.k === 'blank') {
        const n = toNumber(run.steps, part);
        if (n.k === 'error') return n;
        found.push(n);
        continue;
      }
      const m = run.matrix(part);
      for (const s of m.cells) {
        if (s.k === 'number') found.push(s);
        else if (s.k === 'error') return s;
        else if (s.d !== NONE) passedOver?.push(s);
      }
      if (m.fill.k === 'number') {
        for (let i = m.height * m.width; i < m.rows * m.cols; i++) found.push(m.fill);
      } else if (m.fill.k === 'error' && m.height * m.width < m.rows * m.cols) return m.fill;
    }
  }
  return found;
}

/**
 * Two ranges of one size as pairs of numbers; pairs with anything that is no number are passed over. Sizes that differ: #N/A.
 *
 * @param passedOver   As in `numbersOf`.
 */
export function pairsOf(run: Run, a: Value, b: Value, passedOver?: Scalar[]): { x: Num[]; y: Num[] } | Err {
  const p = run.matrix(a);
  const q = run.matrix(b);
  if (p.rows * p.cols !== q.rows * q.cols) return run.steps.error('#N/A');
  const x: Num[] = [];
  const y: Num[] = [];
  const alongRows = p.cols === q.cols;
  const count = alongRows ? Math.max(p.height, q.height) * p.cols : p.rows * p.cols;
  for (let i = 0; i < count; i++) {
    const s = element(p, i);
    const t = element(q, i);
    if (s.k === 'error') return s;
    if (t.k === 'error') return t;
    if (s.k === 'number' && t.k === 'number') {
      x.push(s);
      y.push(t);
    } else for (const other of [s, t]) if (other.k !== 'number' && other.d !== NONE) passedOver?.push(other);
  }
  return { x, y };
}

/** The i-th element of a matrix, row by row over its nominal size. */
export const element = (m: Matrix, i: number): Scalar => at(m, Math.floor(i / m.cols), i % m.cols);
