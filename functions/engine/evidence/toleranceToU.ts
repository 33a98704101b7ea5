import { EngineError } from '../EngineError';
import { halfWidthDivisor } from './shape';
import type { Shape } from './shape';

/**
 * Standard uncertainty of a quantity known to lie within ±a.
 *
 * @param a       Half-width, >= 0, finite.
 * @param shape   With sharp limits; default rectangular.
 * @returns       Unit of a.
 * @throws        EngineError "domain" if a is negative or not finite, "choice" for a shape without limits.
 * @source        JCGM 100:2008, 4.3.7 (rectangular), 4.3.9 (triangular, trapezoidal); JCGM 101:2008, 6.4.6 (arcsine).
 * @example       toleranceToU(3) // 1.7320508075688774
 */
export function toleranceToU(a: number, shape: Shape = { kind: 'rectangular' }): number {
  if (!(a >= 0 && a < Infinity)) throw new EngineError('domain', `toleranceToU needs a half-width >= 0, got ${a}`);
  return a / halfWidthDivisor(shape, 'toleranceToU');
}
