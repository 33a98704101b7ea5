import { EngineError } from '../EngineError';
import { tQuantile } from '../numbers/tQuantile';

export type Side = 'upper' | 'lower';
export const sides: readonly Side[] = ['upper', 'lower'];

/**
 * acceptance   values up to here are accepted: the limit is drawn inwards, so that a value at it is wrongly accepted with the stated risk
 * rejection    values from here on are rejected: the limit is drawn outwards, so that a value at it is wrongly rejected with that risk
 */
export type Zone = 'acceptance' | 'rejection';
export const zones: readonly Zone[] = ['acceptance', 'rejection'];

export interface GuardOptions {
  readonly side: Side;
  /** Specific risk at the limit that is returned, above 0 and below 0.5; default 0.05. */
  readonly risk?: number;
  readonly zone?: Zone;
  /** True where u is a fraction of the measured value; the limit is then above 0. */
  readonly relative?: boolean;
  /** Degrees of freedom of u, > 0, not truncated; default infinite. */
  readonly dof?: number;
}

/**
 * The acceptance or rejection limit that a guard band makes of a tolerance limit: at it, the risk of a wrong decision is the stated one,
 * without knowledge from before the measurement.
 *
 * @param limit   Tolerance limit.
 * @param u       Standard uncertainty in the unit of the limit, or a fraction where relative; > 0.
 * @throws        EngineError "domain" for arguments outside their range, or where a relative u is so large that no value remains.
 * @source        JCGM 106:2012, 8.3.2 (guarded acceptance), 8.3.3 (guarded rejection).
 * @example       guardedLimit(100, 0.02, { side: 'upper', zone: 'rejection', relative: true, risk: 0.001 }) // 106.588
 */
export function guardedLimit(limit: number, u: number, options: GuardOptions): number {
  const { side, risk = 0.05, zone = 'acceptance', relative = false, dof = Infinity } = options;
  if (!(u > 0 && u < Infinity)) throw new EngineError('domain', `guardedLimit needs a standard uncertainty > 0, got ${u}`);
  if (!(risk > 0 && risk < 0.5)) throw new EngineError('domain', `guardedLimit needs a risk above 0 and below 0.5, got ${risk}`);
  const sign = (side === 'upper') === (zone === 'acceptance') ? -1 : 1;
  const width = -tQuantile(risk, dof) * u;
  if (!relative) return limit + sign * width;
  if (!(limit > 0)) throw new EngineError('domain', `guardedLimit needs a limit above 0 where the uncertainty is relative, got ${limit}`);
  if (sign > 0 && width >= 1)
    throw new EngineError('domain', `guardedLimit needs a relative uncertainty that leaves a zone, got ${u}: no value is far enough from ${limit}`);
  return limit / (1 - sign * width);
}
