import { hyperFormula } from '../crosscheck/hyperFormula';
import { type Draws, seeded } from '../crosscheck/seeded';
import { type Plain, formulaOn } from '../formulaOn';

/** Whole serial numbers of days from 1955 to 2064. */
export const someDay = (from: Draws): number => Math.floor(from.between(20_090, 60_260));

/**
 * The results of a formula here and in HyperFormula over cells drawn from a seed, where they differ by more than a
 * tolerance relative to their size (or to 1): by default twelve digits, for a few roundings.
 */
export function differencesFromHyperFormula(formula: string, draw: (from: Draws) => Record<string, number>, count = 60, tolerance = 1e-12): string[] {
  const from = seeded(formula.length);
  const jobs = Array.from({ length: count }, () => ({ formula, cells: draw(from) }));
  const theirs = hyperFormula(jobs);
  return jobs.flatMap(({ cells }, i) => {
    const ours = formulaOn(cells, formula).value;
    return same(ours, theirs[i], tolerance) ? [] : [`${JSON.stringify(cells)}: ${String(ours)}, not ${theirs[i]}`];
  });
}

const same = (ours: Plain | Plain[][], theirs: number | string, tolerance: number): boolean =>
  typeof ours === 'number' && typeof theirs === 'number' ? Math.abs(ours - theirs) <= tolerance * Math.max(1, Math.abs(theirs)) : ours === theirs;
