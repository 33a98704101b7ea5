import { EngineError } from '../EngineError';
import { rootSumSquares } from '../numbers/rootSumSquares';

/**
 * Repeatability standard deviation of one determination, from pairs of duplicates.
 *
 * @param first, second   The two results of each pair, of one unit; at least one pair.
 * @param relative        True to divide each difference by the mean of its pair: the result is then a fraction.
 * @returns               √(Σ d² / 2n), with n degrees of freedom.
 * @throws                EngineError "shape" if the lists are empty or differ in length, "domain" for a mean of 0 where relative, or where
 *                        all pairs agree, which leaves no uncertainty.
 * @source                ISO 5725-2 for two results a level; EURACHEM/CITAC CG 4, 3rd ed., A2 (from memory).
 * @example               duplicatesToU([1, 4], [3, 4]).u // 1
 */
export function duplicatesToU(first: readonly number[], second: readonly number[], relative = false): { u: number; dof: number } {
  if (first.length === 0) throw new EngineError('shape', 'duplicatesToU needs at least one pair, got none');
  if (first.length !== second.length)
    throw new EngineError('shape', `duplicatesToU needs as many second results as first ones, got ${second.length} for ${first.length}`);
  const differences = first.map((a, i) => {
    const mean = (a + second[i]) / 2;
    if (relative && mean === 0) throw new EngineError('domain', `duplicatesToU needs means other than 0 for relative differences, got 0 at pair ${i + 1}`);
    return relative ? (a - second[i]) / mean : a - second[i];
  });
  const u = rootSumSquares(differences) / Math.sqrt(2 * first.length);
  if (!(u > 0)) throw new EngineError('domain', 'duplicatesToU needs at least one pair that differs, got none');
  return { u, dof: first.length };
}
