import { EngineError } from '../EngineError';
import { meanAndDeviation } from '../numbers/meanAndDeviation';

export interface RepeatsTerms {
  /** How many readings the reported value is the mean of: 1 for a single one; default all of them. */
  readonly averaged?: number;
  /** Prior or pooled standard deviation of one reading, used in place of the readings' own. */
  readonly priorS?: number;
  /** Degrees of freedom of `priorS`, > 0; default `Infinity`. */
  readonly priorDof?: number;
}

export interface RepeatsResult {
  readonly u: number;
  readonly dof: number;
  /** The standard deviation of one reading that was used. */
  readonly s: number;
  readonly n: number;
  readonly mean: number;
}

/**
 * Type A evaluation: standard uncertainty of a value reported from repeated readings, u = s/√m.
 *
 * @param readings   Finite; two at least, or one with a prior standard deviation.
 * @throws           EngineError "shape" if there are too few readings, "domain" if a number is outside its range.
 * @source           JCGM 100:2008, 4.2.1 to 4.2.4 and 4.2.6.
 * @example          repeatsToU([10, 12, 14]).u // 1.1547005383792517
 */
export function repeatsToU(readings: ArrayLike<number>, terms: RepeatsTerms = {}): RepeatsResult {
  const { averaged, priorS, priorDof } = terms;
  if (averaged !== undefined && !(Number.isInteger(averaged) && averaged >= 1))
    throw new EngineError('domain', `repeatsToU needs a whole number of averaged readings from 1, got ${averaged}`);
  if (priorS !== undefined && !(priorS >= 0 && priorS < Infinity))
    throw new EngineError('domain', `repeatsToU needs a prior standard deviation >= 0, got ${priorS}`);
  if (priorDof !== undefined && priorS === undefined)
    throw new EngineError('shape', `repeatsToU needs a prior standard deviation for the prior degrees of freedom ${priorDof}, got none`);
  if (priorDof !== undefined && !(priorDof > 0))
    throw new EngineError('domain', `repeatsToU needs prior degrees of freedom > 0, got ${priorDof}`);
  if (readings.length === 0) throw new EngineError('shape', 'repeatsToU needs at least one reading, got none');
  const own = meanAndDeviation(readings);
  const s = priorS ?? own.s;
  if (s === undefined)
    throw new EngineError('shape', 'repeatsToU needs two readings or more, or a prior standard deviation, got one reading');
  return {
    u: s / Math.sqrt(averaged ?? own.n),
    dof: priorS === undefined ? own.n - 1 : (priorDof ?? Infinity),
    s,
    n: own.n,
    mean: own.mean,
  };
}
