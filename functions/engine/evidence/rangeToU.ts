import { EngineError } from '../EngineError';
import { toleranceToU } from './toleranceToU';
import type { Shape } from './shape';

/**
 * Estimate and standard uncertainty of a quantity known to lie between two limits.
 *
 * @param lower   Finite, below upper.
 * @param shape   With sharp limits; default rectangular.
 * @returns       The midpoint, and u from half the distance.
 * @throws        EngineError "domain" if the limits are not finite or not in order, "choice" for a shape without limits.
 * @source        JCGM 100:2008, 4.3.7, equations (6) and (7).
 * @example       rangeToU(7, 10) // { estimate: 8.5, u: 0.8660254037844387 }
 */
export function rangeToU(lower: number, upper: number, shape?: Shape): { estimate: number; u: number } {
  if (!Number.isFinite(lower) || !Number.isFinite(upper) || !(lower < upper))
    throw new EngineError('domain', `rangeToU needs a lower limit below the upper one, got ${lower} and ${upper}`);
  // Halves first: the sum of two large limits may overflow.
  return { estimate: lower / 2 + upper / 2, u: toleranceToU(upper / 2 - lower / 2, shape) };
}
