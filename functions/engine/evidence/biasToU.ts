import { EngineError } from '../EngineError';
import { rootSumSquares } from '../numbers/rootSumSquares';

/**
 * Standard uncertainty of the bias of a method and laboratory, from reference materials or proficiency tests.
 *
 * @param biases         Differences of the laboratory's results from the reference values, of one unit or all relative; at least one.
 * @param referenceStdu  Standard uncertainties of the reference values, >= 0, in the same unit; one each.
 * @returns              √(rms(bias)² + mean(u_ref)²).
 * @throws               EngineError "shape" if the lists are empty or differ in length, "domain" for a u outside its range or a result of 0.
 * @source               ISO 11352:2012, 8.3 and 8.4 (from memory).
 * @example              biasToU([3, -3], [4, 4]) // 5
 */
export function biasToU(biases: readonly number[], referenceStdu: readonly number[]): number {
  if (biases.length === 0) throw new EngineError('shape', 'biasToU needs at least one bias, got none');
  if (biases.length !== referenceStdu.length)
    throw new EngineError('shape', `biasToU needs as many reference uncertainties as biases, got ${referenceStdu.length} for ${biases.length}`);
  referenceStdu.forEach((u, i) => {
    if (!(u >= 0 && u < Infinity)) throw new EngineError('domain', `biasToU needs reference uncertainties >= 0, got ${u} at place ${i + 1}`);
  });
  const rms = rootSumSquares(biases) / Math.sqrt(biases.length);
  const mean = referenceStdu.reduce((sum, u) => sum + u / referenceStdu.length, 0);
  const u = Math.hypot(rms, mean);
  if (!(u > 0)) throw new EngineError('domain', 'biasToU needs a bias or a reference uncertainty other than 0, got none');
  return u;
}
