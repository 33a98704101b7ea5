import { EngineError } from '../EngineError';

/**
 * Degrees of freedom within 1e-9 of an integer (relative to it, where it is above 1) are that integer: n − 1 computed through
 * Welch–Satterthwaite may come out as 8.999999999999998.
 *
 * @param nu   > 0; `Infinity` stays.
 * @example    snapDof(8.999999999999998) // 9
 */
export function snapDof(nu: number): number {
  if (!(nu > 0)) throw new EngineError('domain', `snapDof needs degrees of freedom > 0, got ${nu}`);
  const whole = Math.round(nu);
  return whole >= 1 && Math.abs(nu - whole) <= 1e-9 * Math.max(1, nu) ? whole : nu;
}

/**
 * Degrees of freedom for the coverage factor: snapped, then truncated to the next lower integer. Below 1 there is no lower
 * integer with a t-distribution, so such a value stays the real number it is; a caller that reports it shows it as it is.
 *
 * @param nu   > 0; `Infinity` stays.
 * @source     JCGM 100:2008, G.4.1 note 1 and G.6.4 step 3 (truncation; interpolation is the other choice).
 * @example    truncateDof(16.7) // 16
 */
export function truncateDof(nu: number): number {
  const snapped = snapDof(nu);
  return snapped < 1 ? snapped : Math.floor(snapped);
}
