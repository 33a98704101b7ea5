import { normalUpperTail } from '../../numbers/normalCdf';
import { regularizedBeta } from '../../numbers/regularizedBeta';
import { regularizedGamma } from '../../numbers/regularizedGamma';
import { tUpperTail } from '../../numbers/tCdf';
import { type Native, rangeFunction } from '../native';
import { numbersOf, pairsOf } from '../ranges';
import type { Run } from '../run';
import type { ErrorCode, Num, Scalar } from '../scalar';
import type { Value } from '../value';
import { numberOf } from './argument';
import { centred } from './centred';
import { errorFrom } from './linked';

/** Probabilities of hypothesis tests: values without slopes. */
export const hypothesisTests: Native[] = [
  ...['Z.TEST', 'ZTEST'].map((name) => rangeFunction(name, ['range', 'number', 'number'], zTest, { args: [2, 3] })),
  ...['T.TEST', 'TTEST'].map((name) => rangeFunction(name, ['range', 'range', 'number', 'number'], tTest)),
  ...['F.TEST', 'FTEST'].map((name) => rangeFunction(name, ['range', 'range'], (run, args) => {
    const samples = samplesOf(run, args);
    if ('k' in samples) return samples;
    const [a, b] = samples.map((xs) => varianceOf(xs.map((x) => x.v)));
    if (a === undefined || b === undefined || a.variance === 0 || b.variance === 0) return failed(run, '#DIV/0!', samples);
    const ratio = a.variance / b.variance;
    const z = (a.dof * ratio) / (a.dof * ratio + b.dof);
    const tails = [regularizedBeta(z, a.dof / 2, b.dof / 2, 1 - z), regularizedBeta(1 - z, b.dof / 2, a.dof / 2, z)];
    return run.steps.many(Math.min(1, 2 * Math.min(...tails)), samples.flat(), NaN);
  })),
  ...['CHISQ.TEST', 'CHITEST'].map((name) => rangeFunction(name, ['range', 'range'], chiSquaredTest)),
];

/** Z.TEST(array, x, [sigma]): the probability above the mean of the array, were x the true mean. */
function zTest(run: Run, [from, given, sigma]: readonly Value[]): Scalar {
  const xs = numbersOf(run, [from]);
  if ('k' in xs) return xs;
  const options = [given, ...(sigma === undefined ? [] : [sigma])].map((v) => run.scalar(v));
  for (const s of options) if (s.k === 'error') return s;
  if (xs.length === 0) return errorFrom(run, '#N/A', options);
  const [x, sd] = options.map((s) => numberOf(s).v);
  const values = xs.map((s) => s.v);
  const scale = sd ?? Math.sqrt(varianceOf(values)?.variance ?? 0);
  if (sd !== undefined && sd <= 0) return errorFrom(run, '#NUM!', [...xs, ...options]);
  if (scale === 0) return errorFrom(run, '#DIV/0!', [...xs, ...options]);
  return run.steps.many(normalUpperTail((centred(values).mean - x) / (scale / Math.sqrt(xs.length))), [...xs, ...options], NaN);
}

/** T.TEST(a, b, tails, type): 1 paired, 2 equal variances, 3 unequal ones (Welch, with degrees of freedom that are not cut off). */
function tTest(run: Run, [a, b, tailsGiven, typeGiven]: readonly Value[]): Scalar {
  const options = [run.scalar(tailsGiven), run.scalar(typeGiven)];
  for (const s of options) if (s.k === 'error') return s;
  const [tails, type] = options.map((s) => Math.trunc(numberOf(s).v));
  if ((tails !== 1 && tails !== 2) || type < 1 || type > 3) return errorFrom(run, '#NUM!', options);
  const samples = type === 1 ? pairedSamples(run, a, b) : samplesOf(run, [a, b]);
  if ('k' in samples) return samples;
  const found = studentOf(type, samples.map((xs) => xs.map((x) => x.v)));
  if (found === undefined) return failed(run, '#DIV/0!', samples);
  return run.steps.many(tails * tUpperTail(Math.abs(found.t), found.dof), [...samples.flat(), ...options], NaN);
}

function pairedSamples(run: Run, a: Value, b: Value): Num[][] | Scalar {
  const pairs = pairsOf(run, a, b);
  return 'k' in pairs ? pairs : [pairs.x, pairs.y];
}

/** Student's t and its degrees of freedom; undefined where a variance is missing or 0. */
function studentOf(type: number, [x, y]: readonly number[][]): { t: number; dof: number } | undefined {
  if (type === 1) {
    const differences = x.map((v, i) => v - y[i]);
    const of = varianceOf(differences);
    return of && of.variance > 0 ? { t: of.mean / Math.sqrt(of.variance / x.length), dof: of.dof } : undefined;
  }
  const [a, b] = [varianceOf(x), varianceOf(y)];
  if (!a || !b) return undefined;
  const [va, vb] = [a.variance / x.length, b.variance / y.length];
  const dof = type === 2 ? a.dof + b.dof : (va + vb) ** 2 / (va ** 2 / a.dof + vb ** 2 / b.dof);
  const scale = type === 2 ? ((a.variance * a.dof + b.variance * b.dof) / dof) * (1 / x.length + 1 / y.length) : va + vb;
  return scale > 0 ? { t: (a.mean - b.mean) / Math.sqrt(scale), dof } : undefined;
}

/** CHISQ.TEST(actual, expected): the probability above Σ(a − e)²/e, with (rows − 1)(columns − 1) degrees of freedom. */
function chiSquaredTest(run: Run, [actual, expected]: readonly Value[]): Scalar {
  const { rows, cols } = run.matrix(actual);
  const other = run.matrix(expected);
  if (other.rows !== rows || other.cols !== cols || rows * cols < 2) return run.steps.error('#N/A');
  const pairs = pairsOf(run, actual, expected);
  if ('k' in pairs) return pairs;
  const all = [...pairs.x, ...pairs.y];
  if (pairs.y.some((e) => e.v === 0)) return errorFrom(run, '#DIV/0!', all);
  const total = pairs.x.reduce((sum, a, i) => sum + (a.v - pairs.y[i].v) ** 2 / pairs.y[i].v, 0);
  const dof = rows > 1 && cols > 1 ? (rows - 1) * (cols - 1) : rows * cols - 1;
  return total < 0 ? errorFrom(run, '#NUM!', all) : run.steps.many(regularizedGamma(dof / 2, total / 2).upper, all, NaN);
}

function samplesOf(run: Run, args: readonly Value[]): Num[][] | Scalar {
  const samples: Num[][] = [];
  for (const arg of args) {
    const xs = numbersOf(run, [arg]);
    if ('k' in xs) return xs;
    samples.push(xs);
  }
  return samples;
}

const failed = (run: Run, code: ErrorCode, samples: readonly Num[][]): Scalar => errorFrom(run, code, samples.flat());

/** Mean, variance and degrees of freedom of a sample; undefined for fewer than two numbers. */
function varianceOf(values: readonly number[]): { mean: number; variance: number; dof: number } | undefined {
  if (values.length < 2) return undefined;
  const { mean, squares } = centred(values);
  return { mean, variance: squares / (values.length - 1), dof: values.length - 1 };
}
