import { EngineError } from '../EngineError';
import { logBeta } from './logBeta';
import { normalCdf, normalUpperTail, normalWithin } from './normalCdf';
import { regularizedBeta } from './regularizedBeta';

/** From here on t and normal agree to the last digit wherever the tail is not below the smallest number. */
export const dofTakenAsNormal = 1e20;

/**
 * Probability that a variable with Student's t-distribution is below t.
 *
 * @param t    Dimensionless; infinite allowed.
 * @param nu   Degrees of freedom, real, > 0; `Infinity` is the normal distribution.
 * @returns    In [0, 1]; relative error below 1e-13 for t <= 0.
 * @throws     EngineError "domain" if t is NaN or nu is not positive.
 * @source     DLMF 8.17 through I_x(nu/2, 1/2), x = nu/(nu + t²).
 * @example    tCdf(1, 1) // 0.75
 */
export function tCdf(t: number, nu: number): number {
  requireDof('tCdf', nu);
  if (nu >= dofTakenAsNormal) return normalCdf(t);
  return t <= 0 ? tUpperTail(-t, nu) : 1 - tUpperTail(t, nu);
}

/** Probability that a t variable is above t. Keeps its digits in the far tail, where 1 − tCdf(t, nu) does not. */
export function tUpperTail(t: number, nu: number): number {
  requireDof('tUpperTail', nu);
  if (Number.isNaN(t)) throw new EngineError('domain', 'tUpperTail needs a number, got NaN');
  if (nu >= dofTakenAsNormal) return normalUpperTail(t);
  if (t < 0) return 1 - tUpperTail(-t, nu);
  if (t > 1e100 * Math.max(1, Math.sqrt(nu)))
    return Math.exp(-nu * Math.log(t / Math.sqrt(nu)) - Math.log(nu) - logBeta(nu / 2, 0.5));
  const square = t * t;
  return 0.5 * regularizedBeta(nu / (nu + square), nu / 2, 0.5, square / (nu + square));
}

/** Probability that a t variable lies within ±t, t >= 0: the coverage probability of a coverage factor. Keeps its digits near zero. */
export function tWithin(t: number, nu: number): number {
  requireDof('tWithin', nu);
  if (!(t >= 0)) throw new EngineError('domain', `tWithin needs t >= 0, got ${t}`);
  if (nu >= dofTakenAsNormal) return normalWithin(t);
  if (t > 1e100) return 1 - 2 * tUpperTail(t, nu);
  const square = t * t;
  return regularizedBeta(square / (nu + square), 0.5, nu / 2, nu / (nu + square));
}

/** Density of Student's t-distribution. */
export function tDensity(t: number, nu: number): number {
  return Math.exp(tLogDensity(t, nu));
}

/** Logarithm of the density, for tails where the density itself is below the smallest number. */
export function tLogDensity(t: number, nu: number): number {
  requireDof('tLogDensity', nu);
  const s = Math.abs(t) / Math.sqrt(nu);
  const logPower = s > 1e100 ? 2 * Math.log(s) : Math.log1p(s * s);
  return -0.5 * (nu + 1) * logPower - logBeta(nu / 2, 0.5) - 0.5 * Math.log(nu);
}

export function requireDof(who: string, nu: number): void {
  if (!(nu > 0)) throw new EngineError('domain', `${who} needs degrees of freedom > 0, got ${nu}`);
}
