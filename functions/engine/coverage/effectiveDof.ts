import { EngineError } from '../EngineError';
import { rootSumSquares } from '../numbers/rootSumSquares';
import { sum } from '../numbers/sum';

/**
 * Effective degrees of freedom of a combined standard uncertainty, by Welch–Satterthwaite
 *     nu_eff = u_c^4 / sum(u_i^4 / nu_i),    u_c^2 = sum(u_i^2)
 * For independent components only; this function cannot tell: the caller must know.
 *
 * @param components   Length n. |c_i| u(x_i), unit of the measurand, unrounded, >= 0, not all zero.
 * @param dof          Length n. Degrees of freedom, > 0; `Infinity` if exactly known.
 * @returns            Dimensionless, not truncated, in [min nu_i, sum nu_i] over the non-zero components.
 * @throws             EngineError "shape" if lengths differ or n = 0; "domain" if a component is negative or not finite, nu <= 0,
 *                     NaN, all zero.
 * @source             JCGM 100:2008, G.4.1, equation (G.2b).
 * @example            effectiveDof([3, 4], [10, 10]) // 18.5459940652819
 */
export function effectiveDof(components: ArrayLike<number>, dof: ArrayLike<number>): number {
  const n = components.length;
  if (n === 0 || dof.length !== n)
    throw new EngineError('shape', `effectiveDof needs as many degrees of freedom as components, got ${dof.length} for ${n}`);
  for (let i = 0; i < n; i++) {
    if (!(components[i] >= 0 && components[i] < Infinity))
      throw new EngineError('domain', `effectiveDof needs components >= 0, got ${components[i]} at index ${i}`);
    if (!(dof[i] > 0)) throw new EngineError('domain', `effectiveDof needs nu > 0, got ${dof[i]} at index ${i}`);
  }
  const combined = rootSumSquares(components);
  if (combined === 0) throw new EngineError('domain', 'effectiveDof needs a component other than 0, got none');
  // Shares of the variance instead of fourth powers: nothing overflows.
  return 1 / sum(Array.from(components, (u, i) => ((u / combined) ** 2) ** 2 / dof[i]));
}
