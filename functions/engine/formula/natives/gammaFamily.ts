import { firstWhere } from '../../numbers/firstWhere';
import { logGamma } from '../../numbers/logGamma';
import { regularizedGamma } from '../../numbers/regularizedGamma';
import type { Native } from '../native';
import { type WithSlopes, named } from './distribution';
import { refuseUse } from './refuseUse';

/** Shapes beyond this are refused: the digits of the tails cannot be vouched for. */
const LARGEST = 1e6;

/**
 * The gamma and χ² distributions with slopes by the variable and the scale; shapes and degrees of freedom have none. Also the gamma
 * function and the exponential, Weibull and Poisson distributions.
 */
export const gammaFamily: Native[] = [
  ...named('GAMMA.DIST GAMMADIST', 4, 4, ([x, shape, scale, cumulative]) =>
    (x >= 0 && shape > 0 && scale > 0 ? gamma(x, shape, scale, cumulative !== 0) : '#NUM!')),
  ...named('GAMMA.INV GAMMAINV', 3, 3, ([p, shape, scale]) => (p >= 0 && p < 1 && shape > 0 && scale > 0 ? gammaInverse(p, shape, scale, 'lower') : '#NUM!')),
  ...named('CHISQ.DIST', 3, 3, ([x, freedom, cumulative]) => {
    const nu = Math.trunc(freedom);
    if (x < 0 || nu < 1) return '#NUM!';
    return dropped(gamma(x, nu / 2, 2, cumulative !== 0));
  }),
  ...named('CHISQ.DIST.RT CHIDIST', 2, 2, ([x, freedom]) => {
    const nu = Math.trunc(freedom);
    if (x < 0 || nu < 1) return '#NUM!';
    return [regularizedGamma(shapeOf(nu / 2), x / 2).upper, -density(x, nu / 2, 2), NaN];
  }),
  ...named('CHISQ.INV', 2, 2, ([p, freedom]) => {
    const nu = Math.trunc(freedom);
    return p >= 0 && p < 1 && nu >= 1 ? dropped(gammaInverse(p, nu / 2, 2, 'lower')) : '#NUM!';
  }),
  ...named('CHISQ.INV.RT CHIINV', 2, 2, ([p, freedom]) => {
    const nu = Math.trunc(freedom);
    return p > 0 && p <= 1 && nu >= 1 ? dropped(gammaInverse(p, nu / 2, 2, 'upper')) : '#NUM!';
  }),
  ...named('GAMMALN GAMMALN.PRECISE', 1, 1, ([x]) => (x > 0 ? [logGamma(x), NaN] : '#NUM!')),
  ...named('GAMMA', 1, 1, ([x]) => [gammaFunction(x), NaN]),
  ...named('EXPON.DIST EXPONDIST', 3, 3, ([x, rate, cumulative]) => {
    if (x < 0 || !(rate > 0)) return '#NUM!';
    const e = Math.exp(-rate * x);
    return cumulative !== 0 ? [-Math.expm1(-rate * x), rate * e, x * e, 0] : [rate * e, -rate * rate * e, e * (1 - rate * x), 0];
  }),
  ...named('WEIBULL.DIST WEIBULL', 4, 4, ([x, shape, scale, cumulative]) =>
    (x >= 0 && shape > 0 && scale > 0 ? weibull(x, shape, scale, cumulative !== 0) : '#NUM!')),
  ...named('POISSON.DIST POISSON', 3, 3, ([given, mean, cumulative]) => {
    const k = Math.trunc(given);
    if (k < 0 || mean < 0) return '#NUM!';
    if (mean === 0) return [k === 0 || cumulative !== 0 ? 1 : 0, NaN, NaN, 0];
    const mass = Math.exp(k * Math.log(mean) - mean - logGamma(k + 1));
    return cumulative !== 0 ? [regularizedGamma(shapeOf(k + 1), mean).upper, NaN, -mass, 0] : [mass, NaN, mass * (k / mean - 1), 0];
  }),
];

function shapeOf(shape: number): number {
  if (shape > LARGEST) refuseUse('a distribution', `its shape or degrees of freedom exceed ${LARGEST}`);
  return shape;
}

function density(x: number, shape: number, scale: number): number {
  if (x === 0) return shape > 1 ? 0 : shape === 1 ? 1 / scale : Infinity;
  return Math.exp((shape - 1) * Math.log(x / scale) - x / scale - logGamma(shapeOf(shape))) / scale;
}

function gamma(x: number, shape: number, scale: number, cumulative: boolean): WithSlopes {
  const f = density(x, shape, scale);
  if (cumulative) return [regularizedGamma(shapeOf(shape), x / scale).lower, f, NaN, (-f * x) / scale, 0];
  return [f, x === 0 ? NaN : f * ((shape - 1) / x - 1 / scale), NaN, (f * (x / scale - shape)) / scale, 0];
}

function gammaInverse(p: number, shape: number, scale: number, side: 'lower' | 'upper'): WithSlopes {
  if (side === 'lower' ? p === 0 : p === 1) return [0, NaN, NaN, 0];
  const at = (x: number): { lower: number; upper: number } => regularizedGamma(shapeOf(shape), x);
  const [below, above] = side === 'lower' ? [p, 1 - p] : [1 - p, p];
  const x = scale * firstWhere(below <= 0.5 ? (v) => at(v).lower >= below : (v) => at(v).upper <= above, 0, Infinity);
  return [x, (side === 'lower' ? 1 : -1) / density(x, shape, scale), NaN, x / scale];
}

/** Without the slope by the scale, which is no argument. */
function dropped(found: WithSlopes): WithSlopes {
  return typeof found === 'string' ? found : [found[0], found[1], NaN, 0];
}

/** Γ(x): exact for small whole numbers; by reflection below 0. Infinite at 0 and negative whole numbers. */
function gammaFunction(x: number): number {
  if (x > 0) {
    if (Number.isInteger(x) && x <= 171) {
      let value = 1;
      for (let i = 2; i < x; i++) value *= i;
      return value;
    }
    return Math.exp(logGamma(x));
  }
  if (Number.isInteger(x)) return Infinity;
  return Math.PI / (Math.sin(Math.PI * (x - 2 * Math.floor(x / 2))) * Math.exp(logGamma(1 - x)));
}

function weibull(x: number, shape: number, scale: number, cumulative: boolean): WithSlopes {
  if (x === 0) return cumulative ? [0, NaN, NaN, NaN, 0] : [shape > 1 ? 0 : shape === 1 ? 1 / scale : Infinity, NaN, NaN, NaN, 0];
  const log = Math.log(x / scale);
  const t = (x / scale) ** shape;
  const e = Math.exp(-t);
  if (cumulative) return [-Math.expm1(-t), (shape / x) * t * e, t * log * e, (-shape / scale) * t * e, 0];
  const f = (shape / x) * t * e;
  return [f, (f * (shape - 1 - shape * t)) / x, f * (1 / shape + log - t * log), (f * shape * (t - 1)) / scale, 0];
}
