import { EngineError } from '../EngineError';
import { normalQuantile } from '../numbers/normalQuantile';
import { formatAll, roundToDigits } from '../numbers/decimal';
import { type Limits, requireLimits } from './conformity';

/**
 * guarded      pass inside the limits by a guard band, fail outside them by as much, conditional between
 * acceptance   pass inside the limits by a guard band, else fail
 * rejection    fail outside the limits by a guard band, else pass
 * simple       pass inside the limits, else fail, whatever the uncertainty (the risk at a limit is then 50 %)
 */
export type DecisionRule = 'guarded' | 'acceptance' | 'rejection' | 'simple';
export const decisionRules: readonly DecisionRule[] = ['guarded', 'acceptance', 'rejection', 'simple'];

export interface Decision {
  readonly decision: 'pass' | 'conditional' | 'fail';
  /** The rule as a sentence, to be stated beside the result. */
  readonly words: string;
}

/**
 * A statement of conformity by a decision rule, with the rule in words. The guard band is w = z u, z the normal quantile for the stated
 * risk of a wrong decision for a value at the guarded limit.
 *
 * @param value   Measured value.
 * @param u       Standard uncertainty, in the unit of the value, > 0.
 * @param risk    Above 0 and below 0.5; default 0.05.
 * @throws        EngineError "domain" for arguments outside their range, or where the guard bands leave no zone of acceptance.
 * @source        ISO/IEC 17025:2017, 7.8.6; JCGM 106:2012, 8.2 (simple acceptance), 8.3 (guard bands).
 * @example       decide(9.9, 0.1, { lower: -Infinity, upper: 10 }).decision // 'conditional'
 */
export function decide(value: number, u: number, limits: Limits, rule: DecisionRule = 'guarded', risk = 0.05): Decision {
  requireLimits('decide', limits);
  if (!(u > 0 && u < Infinity)) throw new EngineError('domain', `decide needs a standard uncertainty > 0, got ${u}`);
  if (!(risk > 0 && risk < 0.5)) throw new EngineError('domain', `decide needs a risk above 0 and below 0.5, got ${risk}`);
  const w = -normalQuantile(risk) * u;
  const inside = Math.min(value - limits.lower, limits.upper - value);
  const narrowed = rule === 'guarded' || rule === 'acceptance';
  if (narrowed && !(limits.lower + w <= limits.upper - w))
    throw new EngineError('domain', `decide needs limits wider than the two guard bands of ${shown(w)}, got ${limits.lower} and ${limits.upper}: nothing could pass`);
  return { decision: decisionOf(rule, inside, w), words: wordsOf(rule, shown(w), `${formatAll(roundToDigits(risk * 100, 6, 'even'))} %`) };
}

function decisionOf(rule: DecisionRule, inside: number, w: number): Decision['decision'] {
  switch (rule) {
    case 'simple':
      return inside >= 0 ? 'pass' : 'fail';
    case 'acceptance':
      return inside >= w ? 'pass' : 'fail';
    case 'rejection':
      return inside <= -w ? 'fail' : 'pass';
    case 'guarded':
      if (inside >= w) return 'pass';
      return inside <= -w ? 'fail' : 'conditional';
  }
}

function wordsOf(rule: DecisionRule, w: string, risk: string): string {
  switch (rule) {
    case 'simple':
      return 'Simple acceptance: pass inside the limits, else fail; the risk of a wrong decision at a limit is up to 50 %';
    case 'acceptance':
      return `Guarded acceptance: pass at least ${w} inside the limits, else fail; risk of a wrong pass at most ${risk}`;
    case 'rejection':
      return `Guarded rejection: fail at least ${w} outside the limits, else pass; risk of a wrong fail at most ${risk}`;
    case 'guarded':
      return `Guard bands on both sides: pass at least ${w} inside the limits, fail at least ${w} outside, else conditional; risk of a wrong pass or fail at most ${risk}`;
  }
}

const shown = (w: number): string => formatAll(roundToDigits(w, 3, 'even'));
