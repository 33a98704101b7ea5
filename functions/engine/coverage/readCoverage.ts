import { EngineError } from '../EngineError';

/** A coverage as it was asked for: a factor k, or a probability. */
export type Coverage = { readonly k: number } | { readonly probability: number };

/**
 * Tells a coverage factor from a coverage probability: from 1 on it is k, below 1 a probability. Above 15 nobody means a factor, but
 * 95 may be meant as a percentage.
 *
 * @param who   Names the caller in the message.
 * @throws      EngineError "domain" if the number is not positive and at most 15.
 * @source      Common practice; a t factor above 15 has its probability and degrees of freedom as its proper statement.
 * @example     readCoverage(2, 'certificateToU') // { k: 2 }
 */
export function readCoverage(coverage: number, who: string): Coverage {
  if (!(coverage > 0)) throw new EngineError('domain', `${who} needs a coverage > 0, got ${coverage}`);
  if (coverage < 1) return { probability: coverage };
  if (coverage <= 15) return { k: coverage };
  const meant = coverage < 100 ? `; for ${coverage} % write ${Number((coverage / 100).toPrecision(15))}` : '; for 95 % write 0.95';
  throw new EngineError('domain', `${who} needs a coverage factor up to 15 or a probability below 1, got ${coverage}${meant}`);
}
