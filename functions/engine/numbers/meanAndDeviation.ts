import { EngineError } from '../EngineError';
import { rootSumSquares } from './rootSumSquares';
import { sum } from './sum';

/**
 * Mean and experimental standard deviation (n − 1) of readings, in two passes: readings are first taken relative to the first
 * one, so that a large common part costs no digits, then relative to their mean. The mean of the differences is then of the size
 * of s or below, so its rounding enters s in the second order only.
 *
 * @param values   Finite readings, at least one.
 * @returns        Mean; s, which is undefined for a single reading; n.
 * @throws         EngineError "shape" if there is no reading, "domain" if one is not finite.
 * @source         JCGM 100:2008, 4.2.1 and 4.2.2. Method: Chan, Golub, LeVeque, The American Statistician 37 (1983) 242.
 * @example        meanAndDeviation([1, 2, 3, 4]).mean // 2.5
 */
export function meanAndDeviation(values: ArrayLike<number>): { mean: number; s: number | undefined; n: number } {
  const n = values.length;
  if (n === 0) throw new EngineError('shape', 'meanAndDeviation needs at least one reading, got none');
  const shifted = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    if (!Number.isFinite(values[i]))
      throw new EngineError('domain', `meanAndDeviation needs finite readings, got ${values[i]} at index ${i}`);
    shifted[i] = values[i] - values[0];
  }
  const shiftedMean = sum(shifted) / n;
  const mean = values[0] + shiftedMean;
  if (n === 1) return { mean, s: undefined, n };
  return { mean, s: rootSumSquares(shifted.map((x) => x - shiftedMean)) / Math.sqrt(n - 1), n };
}
