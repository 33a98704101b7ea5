import { EngineError } from '../EngineError';
import { logGamma, stirlingRest } from './logGamma';

const halfLogTwoPi = 0.9189385332046728; // ln(2π)/2

/**
 * Natural logarithm of the beta function, ln Γ(a) + ln Γ(b) − ln Γ(a + b), without the cancellation of the large terms.
 *
 * @param a   > 0, finite.
 * @param b   > 0, finite.
 * @returns   ln B(a, b); absolute error about 1e-15 where the smaller argument is 1/2, a few 1e-15 below 10.
 * @throws    EngineError "domain" if an argument is not a positive finite number.
 * @source    The form for large arguments: Stirling's series (DLMF 5.11.1), terms collected by hand.
 * @example   logBeta(0.5, 0.5) // 1.1447298858494002 = ln π
 */
export function logBeta(a: number, b: number): number {
  if (!(a > 0 && b > 0 && a < Infinity && b < Infinity))
    throw new EngineError('domain', `logBeta needs positive finite numbers, got ${a} and ${b}`);
  const small = Math.min(a, b);
  let large = Math.max(a, b);
  let raised = 1; // B(a, b) = B(a + 1, b) (a + b)/a brings the larger argument to where Stirling's series holds
  for (; large < 10; large += 1) raised *= (small + large) / large;
  const total = small + large;
  const rest = stirlingRest(large) - stirlingRest(total) + Math.log(raised);
  const logShare = Math.log1p(-small / total); // ln(large/total)
  if (small < 10) return logGamma(small) + rest + small - small * Math.log(total) + (large - 0.5) * logShare;
  return halfLogTwoPi - 0.5 * Math.log(large) + stirlingRest(small) + rest + (small - 0.5) * Math.log(small / total) + large * logShare;
}
