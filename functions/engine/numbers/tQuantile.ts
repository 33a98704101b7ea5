import { EngineError } from '../EngineError';
import { logBeta } from './logBeta';
import { normalQuantile, normalUpperQuantile } from './normalQuantile';
import { dofTakenAsNormal, requireDof, tDensity, tLogDensity, tUpperTail, tWithin } from './tCdf';

/**
 * The t below which a variable with Student's t-distribution lies with probability p.
 *
 * @param p    Probability in (0, 1), not below 1e-290. Above one half, 1 − p and p − ½ are exact in floating point: nothing is lost.
 * @param nu   Degrees of freedom, real, > 0; `Infinity` is the normal distribution.
 * @returns    Dimensionless; relative error below 1e-13 for nu >= 0.5.
 * @throws     EngineError "domain" if p or nu is outside its range; "notFinite" if t exceeds the largest number (nu far below 1).
 * @source     Newton's method on the distribution function; start from D. L. Wallace, Ann. Math. Statist. 30 (1959) 1121.
 * @example    tQuantile(0.975, 10) // 2.2281388519862744
 */
export function tQuantile(p: number, nu: number): number {
  requireDof('tQuantile', nu);
  if (!(p > 0 && p < 1)) throw new EngineError('domain', `tQuantile needs a probability between 0 and 1, got ${p}`);
  if (nu >= dofTakenAsNormal) return normalQuantile(p);
  return p < 0.5 ? -fromTail(p, 0.5 - p, nu) : fromTail(1 - p, p - 0.5, nu);
}

/** The t above which a t variable lies with probability `tail`: for tails too small to be written as 1 − p. */
export function tUpperQuantile(tail: number, nu: number): number {
  requireDof('tUpperQuantile', nu);
  if (!(tail > 0 && tail < 1)) throw new EngineError('domain', `tUpperQuantile needs a probability between 0 and 1, got ${tail}`);
  if (nu >= dofTakenAsNormal) return normalUpperQuantile(tail);
  return tail <= 0.5 ? fromTail(tail, 0.5 - tail, nu) : -fromTail(1 - tail, tail - 0.5, nu);
}

/**
 * The t with P(|T| <= t) = probability: the two-sided coverage factor.
 *
 * @param probability   Coverage probability in (0, 1).
 * @param nu            Degrees of freedom, real, > 0; `Infinity` is the normal distribution.
 * @source     JCGM 100:2008, G.3.4 and Table G.2.
 * @example    tFactor(0.95, 10) // 2.2281388519862744
 */
export function tFactor(probability: number, nu: number): number {
  requireDof('tFactor', nu);
  if (!(probability > 0 && probability < 1))
    throw new EngineError('domain', `tFactor needs a probability between 0 and 1, got ${probability}`);
  const tail = (1 - probability) / 2;
  if (nu < dofTakenAsNormal) return fromTail(tail, probability / 2, nu);
  return tail > 0.075 ? normalQuantile(0.5 + probability / 2) : normalUpperQuantile(tail);
}

const smallestTail = 1e-290; // below it the tail function itself runs out of numbers

/** t >= 0 from its upper tail and from P(0 < T < t), which add up to one half; the smaller of them is the one solved for. */
function fromTail(tail: number, centre: number, nu: number): number {
  if (centre === 0) return 0;
  if (tail < smallestTail)
    throw new EngineError('domain', `tQuantile needs a tail probability of at least ${smallestTail}, got ${tail}`);
  return centre < tail ? solveCentre(centre, nu) : solveTail(tail, nu);
}

/** Newton on P(0 < T < t). That is concave in t, so from the chord below the root the steps rise to it and never overshoot. */
function solveCentre(centre: number, nu: number): number {
  let t = centre / tDensity(0, nu);
  for (let i = 0; i < 100; i++) {
    const step = (centre - tWithin(t, nu) / 2) / tDensity(t, nu);
    t += step;
    if (Math.abs(step) <= 1e-15 * t) break;
  }
  return t;
}

/** Newton on ln(tail) against ln t. That is concave and falling: after at most one step the rest come down to the root from above. */
function solveTail(tail: number, nu: number): number {
  const logBound = 0.5 * Math.log(nu) - (Math.log(nu) + logBeta(nu / 2, 0.5) + Math.log(tail)) / nu; // tail < const × t^(−nu)
  if (logBound > 709.7)
    throw new EngineError('notFinite', `tQuantile needs a t below 1.8e308, got tail ${tail} with ${nu} degrees of freedom`);
  const bound = Math.exp(logBound);
  let t = nu < 1 ? bound : Math.min(bound, wallaceStart(tail, nu));
  let last = Infinity;
  for (let i = 0; i < 100; i++) {
    const reached = tUpperTail(t, nu);
    const step =
      reached > 0 ? (Math.log1p((reached - tail) / tail) * reached) / Math.exp(Math.log(t) + tLogDensity(t, nu)) : -0.1;
    t *= Math.exp(step);
    const size = Math.abs(step);
    if (size <= 1e-15 || (size < 1e-12 && size >= last)) break; // the second: what is left is rounding
    last = size;
  }
  return t;
}

/** z ≈ (8 nu + 1)/(8 nu + 3) sqrt(nu ln(1 + t²/nu)), turned round. */
function wallaceStart(tail: number, nu: number): number {
  const z = normalUpperQuantile(tail) * ((8 * nu + 3) / (8 * nu + 1));
  const exponent = (z * z) / nu;
  return exponent > 30 ? Math.exp(0.5 * (Math.log(nu) + exponent)) : Math.sqrt(nu * Math.expm1(exponent));
}
