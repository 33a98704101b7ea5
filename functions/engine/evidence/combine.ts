import { EngineError } from '../EngineError';
import { effectiveDof } from '../coverage/effectiveDof';
import { rootSumSquares } from '../numbers/rootSumSquares';
import { sum } from '../numbers/sum';
import { requireCorrelationMatrix } from './correlationMatrix';

export interface CombinedUncertainty {
  /** Combined standard uncertainty. */
  readonly u: number;
  /**
   * Effective degrees of freedom, not truncated; `Infinity` where all that matter are infinite. Undefined where Welch–Satterthwaite
   * does not hold: a component with finite degrees of freedom is correlated with another, or u is 0.
   */
  readonly nuEff: number | undefined;
}

/**
 * Combined standard uncertainty: the root sum of squares of c_i u_i, or with correlations the law of propagation
 *     u² = sum over i and j of c_i c_j u_i u_j r_ij
 *
 * @param u               Length n. Standard uncertainties, >= 0.
 * @param sensitivities   Length n. Sensitivity coefficients c_i; default all 1.
 * @param correlations    n rows of n correlation coefficients; default none.
 * @param dof             Length n. Degrees of freedom, > 0; default all infinite.
 * @throws                EngineError "shape" if lengths disagree or n = 0, "domain" if a number is outside its range or the matrix is
 *                        no correlation matrix; the entry is named.
 * @source                JCGM 100:2008, 5.1.2 (10), 5.2.2 (16), G.4.1 (G.2b).
 * @example               combine([3, 4]) // { u: 5, nuEff: Infinity }
 */
export function combine(
  u: ArrayLike<number>,
  sensitivities?: ArrayLike<number>,
  correlations?: ArrayLike<ArrayLike<number>>,
  dof?: ArrayLike<number>,
): CombinedUncertainty {
  const n = u.length;
  if (n === 0) throw new EngineError('shape', 'combine needs at least one standard uncertainty, got none');
  requireLength('sensitivity coefficients', sensitivities, n);
  requireLength('degrees of freedom', dof, n);
  const effects = Array.from(u, (ui, i) => {
    const c = sensitivities?.[i] ?? 1;
    if (!(ui >= 0 && ui < Infinity))
      throw new EngineError('domain', `combine needs standard uncertainties >= 0, got ${ui} at index ${i}`);
    if (!Number.isFinite(c))
      throw new EngineError('domain', `combine needs finite sensitivity coefficients, got ${c} at index ${i}`);
    return c * ui;
  });
  const nu = Array.from(effects, (_, i) => dof?.[i] ?? Infinity);
  nu.forEach((x, i) => {
    if (!(x > 0)) throw new EngineError('domain', `combine needs degrees of freedom > 0, got ${x} at index ${i}`);
  });
  if (correlations) requireCorrelationMatrix(correlations, n, 'combine');

  const combined = correlations ? propagate(effects, correlations) : rootSumSquares(effects);
  if (!Number.isFinite(combined)) throw new EngineError('notFinite', 'combine gives a standard uncertainty too large for a number');
  return { u: combined, nuEff: effectiveDofOf(effects, nu, correlations, combined) };
}

function propagate(effects: number[], r: ArrayLike<ArrayLike<number>>): number {
  const largest = Math.max(...effects.map(Math.abs));
  if (largest === 0) return 0;
  const scaled = effects.map((e) => e / largest);
  const terms = scaled.flatMap((a, i) => scaled.map((b, j) => a * b * r[i][j]));
  const variance = sum(terms);
  // Full cancellation leaves rounding of the size of the terms, of either sign.
  const noise = 1e-15 * sum(terms.map(Math.abs));
  return variance > noise ? largest * Math.sqrt(variance) : 0;
}

function effectiveDofOf(
  effects: number[],
  nu: number[],
  r: ArrayLike<ArrayLike<number>> | undefined,
  combined: number,
): number | undefined {
  if (combined === 0) return undefined;
  const matters = effects.map((e) => e !== 0);
  for (let i = 0; r && i < nu.length; i++)
    for (let j = 0; j < nu.length; j++)
      if (j !== i && r[i][j] !== 0 && matters[i] && matters[j] && nu[i] < Infinity) return undefined;
  if (!r) return effectiveDof(effects.map(Math.abs), nu);
  // Correlated effects all have infinite degrees of freedom here, so they are one exactly known component.
  const finite = effects.map((e, i) => (nu[i] < Infinity ? Math.abs(e) : 0));
  const known = Math.sqrt(Math.max(0, 1 - (rootSumSquares(finite) / combined) ** 2)) * combined;
  return effectiveDof([...finite, known], [...nu, Infinity]);
}

function requireLength(what: string, given: ArrayLike<number> | undefined, n: number): void {
  if (given && given.length !== n) throw new EngineError('shape', `combine needs ${n} ${what}, got ${given.length}`);
}
