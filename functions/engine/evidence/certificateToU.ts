import { EngineError } from '../EngineError';
import { coverageFactor } from '../coverage/coverageFactor';
import { readCoverage } from '../coverage/readCoverage';
import type { Shape } from './shape';

export interface CertificateTerms {
  /** Coverage factor (1 to 15) or coverage probability (below 1); default k = 2. */
  readonly coverage?: number;
  /** Degrees of freedom, > 0; default `Infinity`. They matter for a probability only. */
  readonly dof?: number;
  /** Distribution of a stated probability; default t where the degrees of freedom are finite, else normal. */
  readonly shape?: Shape;
}

/**
 * Standard uncertainty from the expanded uncertainty of a certificate.
 *
 * @param expanded   Half-length of the stated interval, >= 0, finite.
 * @returns          u and the coverage factor that was divided by.
 * @throws           EngineError "domain" if a number is outside its range; a coverage above 15 is taken for a percentage and refused.
 * @source           JCGM 100:2008, 4.3.3 and 4.3.4.
 * @example          certificateToU(0.1) // { u: 0.05, k: 2 }
 */
export function certificateToU(expanded: number, terms: CertificateTerms = {}): { u: number; k: number } {
  if (!(expanded >= 0 && expanded < Infinity))
    throw new EngineError('domain', `certificateToU needs an expanded uncertainty >= 0, got ${expanded}`);
  if (terms.dof !== undefined && !(terms.dof > 0))
    throw new EngineError('domain', `certificateToU needs degrees of freedom > 0, got ${terms.dof}`);
  const asked = readCoverage(terms.coverage ?? 2, 'certificateToU');
  const { dof, shape } = terms;
  const k =
    'k' in asked
      ? asked.k
      : coverageFactor({ probability: asked.probability, dof, shape: shape?.kind, edgeRatio: shape?.edgeRatio });
  return { u: expanded / k, k };
}
