import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Num, type Scalar, err } from '../scalar';
import { type Matrix, type Value, MISSING, at, matrix } from '../value';
import { built, elementsOf } from './arrays';
import { linest } from './linest';

const [LINEST] = linest;

/**
 * Values on fitted lines and curves: all through LINEST, so their slopes come from its. TREND and GROWTH(known_y, [known_x], [new_x],
 * [const]); LOGEST(known_y, [known_x], [const], [stats]) fits y = b m1^x1 m2^x2 … by the logarithms of y.
 *
 * @source Excel's documentation of TREND, GROWTH and LOGEST
 */
export const regressions: Native[] = [
  rangeFunction('TREND', ['range', 'range', 'range', 'boolean'], (run, args) => onFit(run, args, (s) => s), { args: [1, 4] }),
  rangeFunction('GROWTH', ['range', 'range', 'range', 'boolean'], (run, [y, ...rest]) => {
    const logs = logarithms(run, y);
    return logs.k === 'error' ? logs : onFit(run, [logs, ...rest], (s) => exponential(run, s));
  }, { args: [1, 4] }),
  rangeFunction('LOGEST', ['range', 'range', 'boolean', 'boolean'], (run, [y, ...rest]) => {
    const logs = logarithms(run, y);
    if (logs.k === 'error') return logs;
    const fit = LINEST.body(run, [logs, ...rest]);
    return fit.k === 'matrix' ? { ...fit, cells: fit.cells.map((s, i) => (i < fit.cols ? exponential(run, s) : s)) } : fit;
  }, { args: [1, 4] }),
];

function exponential(run: Run, s: Scalar): Scalar {
  return s.k === 'number' ? run.steps.unary(Math.exp(s.v), s, Math.exp(s.v)) : s;
}

/** The logarithms of all elements; #NUM! where one is not above 0, #VALUE! where one is no number. */
function logarithms(run: Run, y: Value): Matrix | Scalar {
  const m = run.matrix(y);
  const logs: Scalar[] = [];
  for (const s of elementsOf(m)) {
    if (s.k === 'error') return s;
    if (s.k !== 'number') return run.steps.error('#VALUE!', s);
    if (s.v <= 0) return run.steps.error('#NUM!', s);
    logs.push(run.steps.unary(Math.log(s.v), s, 1 / s.v));
  }
  return matrix(m.rows, m.cols, logs);
}

/** The values of the fit at the new x: in their shape where there is one x, else one for each row (or column) of them. */
function onFit(run: Run, [y, x = MISSING, fresh = MISSING, constant = MISSING]: readonly Value[], finish: (s: Scalar) => Scalar): Value {
  const fit = LINEST.body(run, [y, x, ...(constant === MISSING ? [] : [constant])]);
  if (fit.k !== 'matrix') return fit;
  const coefficients = elementsOf(fit);
  const wrong = coefficients.find((s) => s.k === 'error');
  if (wrong) return wrong;
  const [b, ...m] = [...coefficients].reverse() as Num[];
  const known = run.matrix(y);
  const at_ = run.matrix(fresh.k !== 'missing' ? fresh : x.k !== 'missing' ? x : counting(known));
  if (m.length === 1) return built(at_.rows, at_.cols, (r, c) => finish(point(run, b, m, [at(at_, r, c)])));
  if (known.cols === 1) {
    return at_.cols === m.length ? built(at_.rows, 1, (r) => finish(point(run, b, m, m.map((_, j) => at(at_, r, j))))) : err('#REF!');
  }
  return at_.rows === m.length ? built(1, at_.cols, (_r, c) => finish(point(run, b, m, m.map((_, j) => at(at_, j, c))))) : err('#REF!');
}

/** b + Σ m x. */
function point(run: Run, b: Num, m: readonly Num[], x: readonly Scalar[]): Scalar {
  for (const s of x) {
    if (s.k === 'error') return s;
    if (s.k !== 'number') return run.steps.error('#VALUE!', s);
  }
  const numbers = x as readonly Num[];
  const value = numbers.reduce((sum, s, j) => sum + m[j].v * s.v, b.v);
  return run.steps.many(value, [b, ...m, ...numbers], [1, ...numbers.map((s) => s.v), ...m.map((s) => s.v)]);
}

/** 1, 2, 3 … in the shape of a matrix. */
const counting = ({ rows, cols }: Matrix): Matrix => built(rows, cols, (r, c) => ({ k: 'number', v: r * cols + c + 1, d: -1 }));
