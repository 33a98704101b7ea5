import { EngineError } from '../EngineError';
import { logGamma } from './logGamma';

const MOST_TERMS = 1e6;

/**
 * The regularized incomplete gamma functions P(a, x) and Q(a, x) = 1 − P, each with its own digits.
 *
 * @param a   > 0, at most 1e8.
 * @param x   >= 0; infinite allowed.
 * @returns   Both in [0, 1]. Relative error about 1e-15 times the largest of 1, a and x.
 * @throws    EngineError "domain" outside these ranges.
 * @source    DLMF 8.7.1 (series) and 8.9.2 (continued fraction, evaluated forwards by Lentz's method).
 * @example   regularizedGamma(1, 1).upper // 0.36787944117144233
 */
export function regularizedGamma(a: number, x: number): { lower: number; upper: number } {
  if (!(a > 0 && a <= 1e8)) throw new EngineError('domain', `regularizedGamma needs a above 0 and up to 1e8, got ${a}`);
  if (!(x >= 0)) throw new EngineError('domain', `regularizedGamma needs x >= 0, got ${x}`);
  if (x === 0) return { lower: 0, upper: 1 };
  if (x === Infinity) return { lower: 1, upper: 0 };
  const front = Math.exp(a * Math.log(x) - x - logGamma(a));
  if (x < a + 1) {
    const lower = Math.min(1, front * series(a, x));
    return { lower, upper: 1 - lower };
  }
  const upper = Math.min(1, front * fraction(a, x));
  return { lower: 1 - upper, upper };
}

/** Σ x^n / (a (a+1) … (a+n)). */
function series(a: number, x: number): number {
  let term = 1 / a;
  let sum = term;
  for (let n = 1; n < MOST_TERMS && term > sum * 1e-17; n++) {
    term *= x / (a + n);
    sum += term;
  }
  return sum;
}

/** 1 / (x + 1 − a − 1(1 − a) / (x + 3 − a − …)). */
function fraction(a: number, x: number): number {
  const tiny = 1e-300;
  let b = x + 1 - a;
  let c = 1 / tiny;
  let d = 1 / (b || tiny);
  let value = d;
  for (let n = 1; n < MOST_TERMS; n++) {
    const an = -n * (n - a);
    b += 2;
    d = 1 / (an * d + b || tiny);
    c = b + an / c || tiny;
    const factor = c * d;
    value *= factor;
    if (Math.abs(factor - 1) < 1e-16) break;
  }
  return value;
}
