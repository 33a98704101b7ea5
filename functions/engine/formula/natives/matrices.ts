import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Num, type Scalar, NONE, err, num } from '../scalar';
import { type Matrix, type Value, at, matrix } from '../value';
import { built, checkLinks, decidedBy, transposed } from './arrays';
import { cofactors, determinant, inverse } from './gauss';
import { errorFrom } from './linked';
import { isError, optionsOf, present, whole } from './options';

/** Up to this size all cofactors are computed, n² determinants; a larger determinant has no slopes and uncertain inputs refuse. */
const LARGEST_WITH_SLOPES = 40;

/** TRANSPOSE, MMULT, MDETERM, MINVERSE, MUNIT. A cell that holds no number makes #VALUE!, as sizes that do not fit do. */
export const matrices: Native[] = [
  rangeFunction('TRANSPOSE', ['range'], (run, [given]) => transposed(run.matrix(given)), { shareable: false }),
  rangeFunction('MMULT', ['range', 'range'], product),
  rangeFunction('MDETERM', ['range'], (run, [given]) => {
    const square = squareOf(run, given);
    if ('k' in square) return square;
    const a = valuesOf(square);
    const elements = square.flat();
    return run.steps.many(determinant(a), elements, uncertain(elements) ? slopesOfDeterminant(a) : 0);
  }),
  rangeFunction('MINVERSE', ['range'], inverted),
  rangeFunction('MUNIT', ['range'], (run, given) => {
    const options = optionsOf(run, 'MUNIT', given, ['number']);
    if (isError(options)) return options;
    const n = whole(options[0], 0);
    if (n < 1) return run.steps.error('#VALUE!', ...present(options));
    return decidedBy(run, built(n, n, (i, j) => num(i === j ? 1 : 0)), present(options));
  }, { shareable: false }),
];

/** Each element is a sum of products, with the factors as each other's slopes. */
function product(run: Run, [left, right]: readonly Value[]): Value {
  const a = run.matrix(left);
  const b = run.matrix(right);
  const p = numbersIn(run, a);
  if ('k' in p) return p;
  const q = numbersIn(run, b);
  if ('k' in q) return q;
  if (a.cols !== b.rows) return err('#VALUE!');
  if (uncertain(p) || uncertain(q)) checkLinks(2 * a.cols * a.rows * b.cols);
  return built(a.rows, b.cols, (i, j) => {
    const row = p.slice(i * a.cols, (i + 1) * a.cols);
    const col = row.map((_, k) => q[k * b.cols + j]);
    const sum = row.reduce((s, x, k) => s + x.v * col[k].v, 0);
    return run.steps.many(sum, [...row, ...col], [...col, ...row].map((x) => x.v));
  });
}

/** The inverse B of A, with the slopes ∂B_ij/∂A_kl = -B_ik B_lj from dB = -B dA B. Exactly singular: #NUM!. */
function inverted(run: Run, [given]: readonly Value[]): Value {
  const square = squareOf(run, given);
  if ('k' in square) return square;
  const elements = square.flat();
  const b = inverse(valuesOf(square));
  if (!b) return errorFrom(run, '#NUM!', elements);
  const n = b.length;
  const linked = uncertain(elements);
  if (linked) checkLinks(n ** 4);
  return matrix(n, n, b.flatMap((row, i) => row.map((value, j) => {
    const slopes = linked ? elements.map((_, e) => -b[i][Math.floor(e / n)] * b[e % n][j]) : 0;
    return run.steps.many(value, elements, slopes);
  })));
}

function slopesOfDeterminant(a: readonly (readonly number[])[]): number[] | number {
  return a.length > LARGEST_WITH_SLOPES ? NaN : cofactors(a).flat();
}

function squareOf(run: Run, given: Value): Num[][] | Err {
  const m = run.matrix(given);
  const numbers = numbersIn(run, m);
  if ('k' in numbers) return numbers;
  if (m.rows !== m.cols) return err('#VALUE!');
  return Array.from({ length: m.rows }, (_, i) => numbers.slice(i * m.cols, (i + 1) * m.cols));
}

/** The elements, all of them numbers; else the first error, or #VALUE! from the first that is something else. */
function numbersIn(run: Run, m: Matrix): Num[] | Err {
  const error = m.cells.find((s) => s.k === 'error');
  if (error) return error as Err;
  const other = m.cells.find((s) => s.k !== 'number');
  if (other) return run.steps.error('#VALUE!', other);
  if (m.height < m.rows || m.width < m.cols) {
    if (m.fill.k === 'error') return m.fill;
    if (m.fill.k !== 'number') return run.steps.error('#VALUE!', m.fill);
    return built(m.rows, m.cols, (i, j) => at(m, i, j)).cells as Num[];
  }
  return m.cells as Num[];
}

const valuesOf = (square: readonly (readonly Num[])[]): number[][] => square.map((row) => row.map((x) => x.v));
const uncertain = (elements: readonly Scalar[]): boolean => elements.some((s) => s.d !== NONE);
