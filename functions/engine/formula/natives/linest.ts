import { EngineError } from '../../EngineError';
import { type Native, rangeFunction } from '../native';
import { element } from '../ranges';
import type { Run } from '../run';
import { type Err, type Num, type Scalar, err, num } from '../scalar';
import { type Matrix, type Value, matrix } from '../value';
import { centred, dot } from './centred';
import { type Fit, leastSquares } from './leastSquares';
import { linked } from './linked';

/**
 * LINEST(known_y, [known_x], [const], [stats]): coefficients in reversed order, the constant last; with stats the block of five
 * rows. Slopes by every y and every x are exact, for the statistics too.
 *
 * @throws EngineError "refused" where an x column follows from the others: the sheet then drops one, and no slope exists
 */
export const linest: Native[] = [rangeFunction('LINEST', ['range', 'range', 'boolean', 'boolean'], body, { args: [1, 4] })];

/** A number with its slopes: by the i-th y, and by the i-th x of column m. */
interface Sloped {
  value: number;
  byY: (i: number) => number;
  byX: (i: number, m: number) => number;
}

interface Data {
  readonly y: readonly Num[];
  /** One entry a column. */
  readonly x: readonly (readonly Num[])[];
}

/** A fit with its constant among the coefficients, as the last, where there is one. */
interface Model extends Fit {
  readonly y: readonly number[];
  readonly x: readonly (readonly number[])[];
  readonly constant: boolean;
}

function body(run: Run, args: readonly Value[]): Value {
  const data = read(run, args[0], args[1]);
  if ('k' in data) return data;
  const options: Scalar[] = [];
  const constant = option(run, args[2], true, options);
  const stats = option(run, args[3], false, options);
  const wrong = options.find((s) => s.k === 'error');
  if (wrong) return wrong;
  const model = fitted(data, constant);
  const k = data.x.length;
  const from = [...data.y, ...data.x.flat()];
  const cell = (s: Sloped): Scalar => {
    const slopes = data.y.map((_, i) => s.byY(i));
    data.x.forEach((column, m) => column.forEach((_, i) => slopes.push(s.byX(i, m))));
    return Number.isFinite(s.value) ? linked(run, s.value, from, slopes, options) : linkedError(run, from, options);
  };
  const na = err('#N/A');
  const order = Array.from({ length: k }, (_, j) => k - 1 - j);
  const first = [...order.map((j) => cell(coefficient(model, j))), constant ? cell(coefficient(model, k)) : num(0)];
  if (!stats) return matrix(1, k + 1, first);
  const s = statistics(model);
  const padding = Array.from({ length: k - 1 }, () => na);
  return matrix(5, k + 1, [
    ...first,
    ...order.map((j) => cell(s.deviation(j))), constant ? cell(s.deviation(k)) : na,
    cell(s.determination), cell(s.residual), ...padding,
    cell(s.f), linked(run, s.dof, from, 0, options), ...padding,
    cell(s.regression), cell(s.residualSquares), ...padding,
  ]);
}

function fitted(data: Data, constant: boolean): Model {
  const y = data.y.map((s) => s.v);
  const x = data.x.map((column) => column.map((s) => s.v));
  const yc = centred(y);
  const xc = x.map(centred);
  const fit = constant ? leastSquares(xc.map((c) => c.left), yc.left) : leastSquares(x, y);
  if (!fit) throw new EngineError('refused', 'fits a line to x values of which one column follows from the others or never changes');
  if (!constant) return { ...fit, y, x, constant };
  const b = xc.reduce((s, c, j) => s - fit.coefficients[j] * c.mean, yc.mean);
  const byY = yc.left.map((_, i) => xc.reduce((s, c, j) => s - c.mean * fit.byY[j][i], 1 / y.length));
  return { ...fit, coefficients: [...fit.coefficients, b], byY: [...fit.byY, byY], y, x, constant };
}

/**
 * With X the matrix of all columns (the constant's ones among them), G = (XᵀX)⁻¹, P = G Xᵀ and e the residuals:
 *     dβ = P dy + G dXᵀ e − P dX β,    dG = −G (dXᵀ X + Xᵀ dX) G,    d(eᵀe) = 2 eᵀ(dy − dX β)
 *
 * @source differentiating the normal equations
 */
function coefficient({ byY, coefficients, residuals }: Model, j: number): Sloped {
  return {
    value: coefficients[j],
    byY: (i) => byY[j][i],
    byX: (i, m) => dot(byY[j], byY[m]) * residuals[i] - byY[j][i] * coefficients[m],
  };
}

function statistics(model: Model) {
  const { byY, coefficients, residuals: e, y, x, constant } = model;
  const k = x.length;
  const dof = y.length - coefficients.length;
  const yMean = constant ? centred(y).mean : 0;
  const deviations = constant ? centred(y).left : Float64Array.from(y);
  const explained = deviations.map((d, i) => d - e[i]);

  const residualSquares: Sloped = { value: dot(e, e), byY: (i) => 2 * e[i], byX: (i, m) => -2 * coefficients[m] * e[i] };
  const regression: Sloped = {
    value: dot(explained, explained),
    byY: (i) => 2 * (y[i] - yMean) - residualSquares.byY(i),
    byX: (i, m) => -residualSquares.byX(i, m),
  };
  const whole = residualSquares.value + regression.value;
  const determination = combined(
    regression.value / whole, regression, residualSquares.value / whole ** 2, residualSquares, -regression.value / whole ** 2,
  );
  // without degrees of freedom the residuals are 0 whatever the data are, and so are all standard errors
  const s = dof > 0 ? Math.sqrt(residualSquares.value / dof) : 0;
  const half = dof === 0 ? 0 : s > 0 ? 0.5 / (dof * s) : Infinity;
  const residual = combined(s, residualSquares, half, residualSquares, 0);
  const f = combined(
    dof > 0 ? (regression.value * dof) / (k * residualSquares.value) : NaN,
    regression, dof / (k * residualSquares.value), residualSquares, (-regression.value * dof) / (k * residualSquares.value ** 2),
  );
  const deviation = (j: number): Sloped => {
    const root = Math.sqrt(dot(byY[j], byY[j]));
    return {
      value: s * root,
      byY: (i) => scaled(root, residual.byY(i)),
      byX: (i, m) => scaled(root, residual.byX(i, m)) - (s * dot(byY[j], byY[m]) * byY[j][i]) / root,
    };
  };
  return { dof, residualSquares, regression, determination, residual, f, deviation };
}

/** A value with slopes α da + β db. */
function combined(value: number, a: Sloped, alpha: number, b: Sloped, beta: number): Sloped {
  return {
    value,
    byY: (i) => scaled(alpha, a.byY(i)) + scaled(beta, b.byY(i)),
    byX: (i, m) => scaled(alpha, a.byX(i, m)) + scaled(beta, b.byX(i, m)),
  };
}

/** A factor times a slope; an infinite factor has no finite slope even where the other one is 0 (the root of a square at 0). */
const scaled = (factor: number, slope: number): number => (factor === Infinity ? Infinity : factor === 0 ? 0 : factor * slope);

/** The cells of known_y and known_x; every one must be a number. */
function read(run: Run, ys: Value, xs: Value | undefined): Data | Err {
  const my = run.matrix(ys);
  const y = numbers(run, my);
  if ('k' in y) return y;
  if (xs === undefined || xs.k === 'missing') return { y, x: [y.map((_, i) => num(i + 1) as Num)] };
  const mx = run.matrix(xs);
  const x = numbers(run, mx);
  if ('k' in x) return x;
  if (mx.rows === my.rows && mx.cols === my.cols) return { y, x: [x] };
  if (my.cols === 1 && mx.rows === my.rows) {
    return { y, x: Array.from({ length: mx.cols }, (_, m) => y.map((_y, i) => x[i * mx.cols + m])) };
  }
  if (my.rows === 1 && mx.cols === my.cols) {
    return { y, x: Array.from({ length: mx.rows }, (_, m) => y.map((_y, i) => x[m * mx.cols + i])) };
  }
  return run.steps.error('#REF!');
}

function numbers(run: Run, m: Matrix): Num[] | Err {
  const found: Num[] = [];
  if (m.fill.k !== 'number' && (m.height < m.rows || m.width < m.cols)) return run.steps.error('#VALUE!');
  for (let i = 0; i < m.rows * m.cols; i++) {
    const s = element(m, i);
    if (s.k === 'error') return s;
    if (s.k !== 'number') return run.steps.error('#VALUE!', s);
    found.push(s);
  }
  return found;
}

function option(run: Run, given: Value | undefined, otherwise: boolean, options: Scalar[]): boolean {
  if (given === undefined || given.k === 'missing') return otherwise;
  const s = run.scalar(given);
  options.push(s);
  return s.k === 'boolean' && s.v;
}

function linkedError(run: Run, from: readonly Scalar[], options: readonly Scalar[]): Err {
  return { k: 'error', v: '#NUM!', d: linked(run, 0, from, 0, options).d };
}
