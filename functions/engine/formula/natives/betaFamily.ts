import { firstWhere } from '../../numbers/firstWhere';
import { logBeta } from '../../numbers/logBeta';
import { logGamma } from '../../numbers/logGamma';
import { regularizedBeta } from '../../numbers/regularizedBeta';
import type { Native } from '../native';
import { type WithSlopes, named } from './distribution';
import { refuseUse } from './refuseUse';

/** Trials and populations beyond this are refused. */
const LARGEST = 1e6;

/**
 * The beta and F distributions with slopes by the variable and the limits; shapes and degrees of freedom have none. Also the binomial,
 * negative binomial and hypergeometric distributions, with a slope by the probability only.
 */
export const betaFamily: Native[] = [
  ...named('BETA.DIST', 4, 6, ([x, a, b, cumulative, from, to]) => betaDistribution(x, a, b, cumulative !== 0, from, to, true)),
  ...named('BETADIST', 3, 5, ([x, a, b, from, to]) => betaDistribution(x, a, b, true, from, to, false)),
  ...named('BETA.INV BETAINV', 3, 5, ([p, a, b, from, to]) => {
    const [low, high] = limits(from, to);
    if (!(p > 0 && p < 1) || !(a > 0 && b > 0) || !(high > low)) return '#NUM!';
    const x = firstWhere(p <= 0.5 ? (v) => regularizedBeta(v, a, b, 1 - v) >= p : (v) => regularizedBeta(1 - v, b, a, v) <= 1 - p, 0, 1);
    return [low + (high - low) * x, (high - low) / betaDensity(x, a, b), NaN, NaN, 1 - x, x];
  }),
  ...named('F.DIST', 4, 4, ([x, d1, d2, cumulative]) => fDistribution(x, Math.trunc(d1), Math.trunc(d2), cumulative !== 0 ? 'lower' : 'density')),
  ...named('F.DIST.RT FDIST', 3, 3, ([x, d1, d2]) => fDistribution(x, Math.trunc(d1), Math.trunc(d2), 'upper')),
  ...named('F.INV', 3, 3, ([p, d1, d2]) => (p >= 0 && p < 1 ? fInverse(p, Math.trunc(d1), Math.trunc(d2), 1) : '#NUM!')),
  ...named('F.INV.RT FINV', 3, 3, ([p, d1, d2]) => (p > 0 && p <= 1 ? fInverse(p, Math.trunc(d2), Math.trunc(d1), -1) : '#NUM!')),
  ...named('BINOM.DIST BINOMDIST', 4, 4, ([given, trials, p, cumulative]) => {
    const [k, n] = [Math.trunc(given), Math.trunc(trials)];
    if (k < 0 || k > n || !(p >= 0 && p <= 1)) return '#NUM!';
    if (p === 0 || p === 1) return [(p === 0 ? k === 0 : k === n) || (cumulative !== 0 && p === 0) ? 1 : 0, NaN, NaN, NaN, 0];
    const mass = binomial(k, n, p);
    if (cumulative === 0) return [mass, NaN, NaN, mass * (k / p - (n - k) / (1 - p)), 0];
    return [k === n ? 1 : regularizedBeta(1 - p, n - k, k + 1, p), NaN, NaN, (-(n - k) * mass) / (1 - p), 0];
  }),
  ...named('BINOM.DIST.RANGE', 3, 4, ([trials, p, from, to]) => {
    const [n, low, high] = [Math.trunc(trials), Math.trunc(from), Math.trunc(Number.isNaN(to) ? from : to)];
    if (!(p >= 0 && p <= 1) || n < 0 || low < 0 || low > n || high < low || high > n) return '#NUM!';
    if (p === 0 || p === 1) return [(p === 0 ? low === 0 : high === n) ? 1 : 0, NaN, NaN, NaN, NaN];
    let [sum, slope] = [0, 0];
    for (let k = low; k <= high; k++) {
      const mass = binomial(k, n, p);
      sum += mass;
      slope += mass * (k / p - (n - k) / (1 - p));
    }
    return [Math.min(1, sum), NaN, slope, NaN, NaN];
  }),
  ...named('BINOM.INV CRITBINOM', 3, 3, ([trials, p, alpha]) => {
    const n = Math.trunc(trials);
    if (n < 0 || !(p > 0 && p < 1) || !(alpha > 0 && alpha < 1)) return '#NUM!';
    let [low, high] = [0, n];
    while (low < high) {
      const k = Math.floor((low + high) / 2);
      if (regularizedBeta(1 - p, n - k, k + 1, p) >= alpha) high = k;
      else low = k + 1;
    }
    return [low, NaN, NaN, NaN];
  }),
  ...named('NEGBINOM.DIST', 4, 4, ([failures, successes, p, cumulative]) => negativeBinomial(Math.trunc(failures), Math.trunc(successes), p, cumulative !== 0)),
  ...named('NEGBINOMDIST', 3, 3, ([failures, successes, p]) => negativeBinomial(Math.trunc(failures), Math.trunc(successes), p, false)),
  ...named('HYPGEOM.DIST', 5, 5, ([k, n, marked, size, cumulative]) =>
    hypergeometric(Math.trunc(k), Math.trunc(n), Math.trunc(marked), Math.trunc(size), cumulative !== 0)),
  ...named('HYPGEOMDIST', 4, 4, ([k, n, marked, size]) => hypergeometric(Math.trunc(k), Math.trunc(n), Math.trunc(marked), Math.trunc(size), false)),
];

const limits = (from: number, to: number): [number, number] => [Number.isNaN(from) ? 0 : from, Number.isNaN(to) ? 1 : to];

const betaDensity = (x: number, a: number, b: number): number => Math.exp((a - 1) * Math.log(x) + (b - 1) * Math.log1p(-x) - logBeta(a, b));

/** BETADIST takes the limits themselves; the density at a limit is refused, for it may be infinite. */
function betaDistribution(x: number, a: number, b: number, cumulative: boolean, from: number, to: number, withCumulative: boolean): WithSlopes {
  const [low, high] = limits(from, to);
  if (!(a > 0 && b > 0) || !(x >= low && x <= high) || low === high) return '#NUM!';
  const width = high - low;
  const z = (x - low) / width;
  const end = withCumulative ? [0] : [];
  if (z === 0 || z === 1) {
    if (!cumulative) refuseUse('BETA.DIST', 'its density is asked for at a limit');
    return [z, NaN, NaN, NaN, ...end, NaN, NaN];
  }
  const f = betaDensity(z, a, b);
  const steep = f * ((a - 1) / z - (b - 1) / (1 - z));
  const [value, byZ] = cumulative ? [regularizedBeta(z, a, b, 1 - z), f] : [f / width, steep / width];
  const scale = cumulative ? 0 : value / width;
  return [value, byZ / width, NaN, NaN, ...end, (byZ * (z - 1)) / width + scale, (-byZ * z) / width - scale];
}

function fDistribution(x: number, d1: number, d2: number, side: 'lower' | 'upper' | 'density'): WithSlopes {
  if (x < 0 || d1 < 1 || d2 < 1) return '#NUM!';
  const [a, b] = [d1 / 2, d2 / 2];
  if (x === 0) {
    if (side !== 'density') return [side === 'lower' ? 0 : 1, NaN, NaN, NaN, 0];
    return [d1 > 2 ? 0 : d1 === 2 ? 1 : Infinity, NaN, NaN, NaN, 0];
  }
  const z = (d1 * x) / (d1 * x + d2);
  const w = d2 / (d1 * x + d2);
  const f = Math.exp(a * Math.log(z) + b * Math.log(w) - logBeta(a, b)) / x;
  if (side === 'density') return [f, (f * (a * w - b * z - 1)) / x, NaN, NaN, 0];
  return side === 'lower' ? [regularizedBeta(z, a, b, w), f, NaN, NaN, 0] : [regularizedBeta(w, b, a, z), -f, NaN, NaN, 0];
}

/** The quantile through the beta distribution; a lower one for a probability above is the reciprocal with the degrees exchanged. */
function fInverse(p: number, d1: number, d2: number, power: 1 | -1): WithSlopes {
  if (d1 < 1 || d2 < 1) return '#NUM!';
  if (p === 0 || p === 1) return [0, NaN, NaN, NaN];
  const [a, b] = [d1 / 2, d2 / 2];
  // The odds z/(1 − z) keep their digits near both ends.
  const reached = p <= 0.5
    ? (o: number): boolean => regularizedBeta(o / (1 + o), a, b, 1 / (1 + o)) >= p
    : (o: number): boolean => regularizedBeta(1 / (1 + o), b, a, o / (1 + o)) <= 1 - p;
  const odds = firstWhere(reached, 0, Infinity);
  const lower = (odds * d2) / d1;
  const x = power === 1 ? lower : 1 / lower;
  const found = power === 1 ? fDistribution(x, d1, d2, 'lower') : fDistribution(x, d2, d1, 'upper');
  return [x, 1 / (found[1] as number), NaN, NaN];
}

function binomial(k: number, n: number, p: number): number {
  if (n > LARGEST) refuseUse('a distribution', `its trials exceed ${LARGEST}`);
  return Math.exp(logChoose(n, k) + k * Math.log(p) + (n - k) * Math.log1p(-p));
}

const logChoose = (n: number, k: number): number => logGamma(n + 1) - logGamma(k + 1) - logGamma(n - k + 1);

function negativeBinomial(failures: number, successes: number, p: number, cumulative: boolean): WithSlopes {
  if (failures < 0 || successes < 1 || !(p > 0 && p < 1)) return '#NUM!';
  if (failures + successes > LARGEST) refuseUse('a distribution', `its trials exceed ${LARGEST}`);
  const mass = Math.exp(logChoose(failures + successes - 1, failures) + successes * Math.log(p) + failures * Math.log1p(-p));
  if (!cumulative) return [mass, NaN, NaN, mass * (successes / p - failures / (1 - p)), 0];
  const slope = Math.exp((successes - 1) * Math.log(p) + failures * Math.log1p(-p) - logBeta(successes, failures + 1));
  return [regularizedBeta(p, successes, failures + 1, 1 - p), NaN, NaN, slope, 0];
}

function hypergeometric(k: number, n: number, marked: number, size: number, cumulative: boolean): WithSlopes {
  if (k < 0 || n < 1 || n > size || marked < 1 || marked > size || size < 1 || k > Math.min(n, marked) || k < n - size + marked) return '#NUM!';
  if (size > LARGEST) refuseUse('a distribution', `its population exceeds ${LARGEST}`);
  const mass = (i: number): number => Math.exp(logChoose(marked, i) + logChoose(size - marked, n - i) - logChoose(size, n));
  if (!cumulative) return [mass(k), NaN, NaN, NaN, NaN];
  let sum = 0;
  for (let i = Math.max(0, n - size + marked); i <= k; i++) sum += mass(i);
  return [Math.min(1, sum), NaN, NaN, NaN, NaN];
}
