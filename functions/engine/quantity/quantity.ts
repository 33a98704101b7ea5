import { effectiveDof } from '../coverage/effectiveDof';
import { rootSumSquares } from '../numbers/rootSumSquares';
import type { SourceTable } from './sourceTable';

/** The doubt of a result: its linear components by source, with their signs. */
export type Components = ReadonlyMap<number, number>;

/** Combined standard uncertainty: the root of the sum of squared components (JCGM 100, 5.1.2, over independent sources). */
export const combinedUncertainty = (components: Components): number => rootSumSquares([...components.values()]);

/** Covariance of two results: the sum of products over the sources they share (JCGM 100, F.1.2.3). */
export function covariance(a: Components, b: Components): number {
  let sum = 0;
  for (const [source, component] of a) {
    const other = b.get(source);
    if (other !== undefined) sum += component * other;
  }
  return sum;
}

/**
 * Effective degrees of freedom, by Welch–Satterthwaite over evaluations: sources from one evaluation are one term, their squared
 * components are summed first.
 *
 * @returns Not truncated; Infinity where no source has finite degrees of freedom or u = 0.
 * @source  JCGM 100:2008, G.4.1; the joining of terms: H.3, where all sources come from one residual standard deviation.
 */
export function degreesOfFreedom(components: Components, table: SourceTable): number {
  const variance = new Map<number, number>();
  const dof = new Map<number, number>();
  for (const [source, component] of components) {
    const evaluation = table.evaluationOf(source);
    variance.set(evaluation, (variance.get(evaluation) ?? 0) + component ** 2);
    dof.set(evaluation, Math.min(dof.get(evaluation) ?? Infinity, table.sources[source].dof));
  }
  const evaluations = [...variance.keys()].filter((e) => variance.get(e)! > 0);
  if (evaluations.length === 0) return Infinity;
  return effectiveDof(evaluations.map((e) => Math.sqrt(variance.get(e)!)), evaluations.map((e) => dof.get(e)!));
}
