import { EngineError } from '../EngineError';
import { tUpperTail } from '../numbers/tCdf';

/** Limits of a tolerance interval; an open end is infinite. */
export interface Limits {
  readonly lower: number;
  readonly upper: number;
}

/**
 * Probability that the true value conforms, given the measured one: P(lower ≤ Y ≤ upper) for a Y that is distributed about the value
 * with the standard uncertainty as its scale, normal or t. No knowledge from before the measurement enters.
 *
 * @param value   Finite.
 * @param u       Standard uncertainty, in the unit of the value, > 0.
 * @param dof     Degrees of freedom, > 0, not truncated; infinite for a normal distribution.
 * @returns       In [0, 1]. Small probabilities keep their digits.
 * @throws        EngineError "domain" where the limits leave nothing between them, or both are open.
 * @source        JCGM 106:2012, 7.2 to 7.4.
 * @example       conformity(-5.47, 0.05, { lower: -Infinity, upper: -5.4 }) // 0.919
 */
export function conformity(value: number, u: number, limits: Limits, dof = Infinity): number {
  requireLimits('conformity', limits);
  if (!(u > 0 && u < Infinity)) throw new EngineError('domain', `conformity needs a standard uncertainty > 0, got ${u}`);
  const a = (limits.lower - value) / u;
  const b = (limits.upper - value) / u;
  if (a > 0) return tUpperTail(a, dof) - tUpperTail(b, dof);
  if (b < 0) return tUpperTail(-b, dof) - tUpperTail(-a, dof);
  return 1 - tUpperTail(-a, dof) - tUpperTail(b, dof);
}

/** Refuses limits that are both open, or of which the lower is not below the upper. */
export function requireLimits(who: string, { lower, upper }: Limits): void {
  if (lower === -Infinity && upper === Infinity) throw new EngineError('domain', `${who} needs at least one limit, got none`);
  if (!(lower < upper)) throw new EngineError('domain', `${who} needs a lower limit below the upper one, got ${lower} and ${upper}`);
}
