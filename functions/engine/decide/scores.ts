import { EngineError } from '../EngineError';

/**
 * z score of a participant: the difference from the assigned value over the standard deviation for proficiency assessment.
 *
 * @param sd   In the unit of the value, > 0.
 * @source     ISO 13528:2022, 9.4 (from memory).
 * @example    zScore(10.4, 10, 0.2) // 2
 */
export function zScore(value: number, assigned: number, sd: number): number {
  return over('zScore', value - assigned, sd);
}

/**
 * ζ score: the difference over the combined standard uncertainty of both values, which must be independent.
 *
 * @param u           Standard uncertainty of the participant's value, >= 0.
 * @param uAssigned   Standard uncertainty of the assigned value, >= 0; not both 0.
 * @source            ISO 13528:2022, 9.6 (from memory).
 */
export function zetaScore(value: number, u: number, assigned: number, uAssigned: number): number {
  return over('zetaScore', value - assigned, Math.hypot(u, uAssigned));
}

/**
 * E_n score: the difference over the root sum of squares of both expanded uncertainties, of one coverage probability.
 *
 * @param expanded           Expanded uncertainty of the participant's value, >= 0.
 * @param expandedAssigned   Expanded uncertainty of the assigned value, >= 0; not both 0.
 * @source                   ISO 13528:2022, 9.7 (from memory).
 */
export function enScore(value: number, expanded: number, assigned: number, expandedAssigned: number): number {
  return over('enScore', value - assigned, Math.hypot(expanded, expandedAssigned));
}

/** What z and ζ scores are called: up to 2 satisfactory, below 3 questionable. @source ISO/IEC 17043:2010, B.4.1.1 (from memory) */
export function zVerdict(score: number): 'satisfactory' | 'questionable' | 'unsatisfactory' {
  const size = Math.abs(score);
  if (size <= 2) return 'satisfactory';
  return size < 3 ? 'questionable' : 'unsatisfactory';
}

/** What E_n scores are called: up to 1 satisfactory. @source ISO/IEC 17043:2010, B.4.1.1 (from memory) */
export const enVerdict = (score: number): 'satisfactory' | 'unsatisfactory' => (Math.abs(score) <= 1 ? 'satisfactory' : 'unsatisfactory');

function over(who: string, difference: number, scale: number): number {
  if (!(scale > 0)) throw new EngineError('domain', `${who} needs an uncertainty > 0 to compare with, got ${scale}`);
  const score = difference / scale;
  if (!Number.isFinite(score)) throw new EngineError('notFinite', `${who} of a difference of ${difference} over ${scale} is too large for a number`);
  return score;
}
