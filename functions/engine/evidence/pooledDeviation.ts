import { EngineError } from '../EngineError';

/**
 * Pooled standard deviation of several series, each weighted by its degrees of freedom.
 *
 * @param deviations   Standard deviations of the series, >= 0, of one unit; at least one.
 * @param dofs         Their degrees of freedom, > 0, finite; one each.
 * @returns            √(Σ ν s² / Σ ν) and Σ ν.
 * @throws             EngineError "shape" if the lists are empty or differ in length, "domain" for a number outside its range.
 * @source             JCGM 100:2008, H.3.6 note and H.5.2.2; ISO 5725-2.
 * @example            pooledDeviation([3, 4], [1, 1]).s // 3.5355339059327378
 */
export function pooledDeviation(deviations: readonly number[], dofs: readonly number[]): { s: number; dof: number } {
  if (deviations.length === 0) throw new EngineError('shape', 'pooledDeviation needs at least one deviation, got none');
  if (deviations.length !== dofs.length)
    throw new EngineError('shape', `pooledDeviation needs as many degrees of freedom as deviations, got ${dofs.length} for ${deviations.length}`);
  deviations.forEach((s, i) => {
    if (!(s >= 0 && s < Infinity)) throw new EngineError('domain', `pooledDeviation needs deviations >= 0, got ${s} at place ${i + 1}`);
    if (!(dofs[i] > 0 && dofs[i] < Infinity)) throw new EngineError('domain', `pooledDeviation needs finite degrees of freedom > 0, got ${dofs[i]} at place ${i + 1}`);
  });
  const dof = dofs.reduce((sum, nu) => sum + nu, 0);
  const largest = Math.max(...deviations);
  if (largest === 0) return { s: 0, dof };
  return { s: largest * Math.sqrt(deviations.reduce((sum, s, i) => sum + (dofs[i] * (s / largest) ** 2) / dof, 0)), dof };
}
