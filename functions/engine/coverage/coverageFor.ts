import { normalWithin } from '../numbers/normalCdf';
import { tWithin } from '../numbers/tCdf';
import { tFactor } from '../numbers/tQuantile';
import { readCoverage } from './readCoverage';
import { snapDof, truncateDof } from './truncateDof';

/** Probability of a normal variable within ±2 standard deviations: the "95.45 %" of JCGM 100, Table G.2. */
export const twoSigmaProbability = normalWithin(2);

export interface CoverageStatement {
  /** Coverage factor. */
  readonly k: number;
  /** Coverage probability of ±k u under t with the degrees of freedom used. */
  readonly p: number;
  /** Degrees of freedom used: truncated, or as they are where interpolation was asked for. */
  readonly nuUsed: number;
}

/**
 * Coverage factor and probability of a result.
 *     blank   k = 2, or t at 95.45 % where nu_eff < 50, so that the coverage does not sink below what k = 2 promises
 *     >= 1    that k
 *     < 1     that probability, by t
 *
 * @param coverage      null or undefined for blank. 0 is refused: a blank that arrives as 0 is the caller's to recognize.
 * @param nuEff         Effective degrees of freedom, > 0; `Infinity` for a normal distribution.
 * @param interpolate   Use the real nu_eff instead of the truncated one.
 * @throws              EngineError "domain" if coverage <= 0 or > 15, or nuEff <= 0.
 * @source              JCGM 100:2008, G.6.4; the limit of 50 is this project's choice (t exceeds 2 by 2.6 % there).
 * @example             coverageFor(0.95, 10.7) // { k: 2.2281388519862744, p: 0.95, nuUsed: 10 }
 */
export function coverageFor(coverage: number | null | undefined, nuEff: number, interpolate = false): CoverageStatement {
  const nuUsed = interpolate ? snapDof(nuEff) : truncateDof(nuEff);
  if (coverage == null)
    return snapDof(nuEff) < 50 ? byProbability(twoSigmaProbability, nuUsed) : { k: 2, p: tWithin(2, nuUsed), nuUsed };
  const asked = readCoverage(coverage, 'coverageFor');
  return 'k' in asked ? { k: asked.k, p: tWithin(asked.k, nuUsed), nuUsed } : byProbability(asked.probability, nuUsed);
}

function byProbability(probability: number, nuUsed: number): CoverageStatement {
  return { k: tFactor(probability, nuUsed), p: probability, nuUsed };
}
