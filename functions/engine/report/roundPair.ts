import { EngineError } from '../EngineError';
import { formatPlaces, formatSteps, leadingPlace, roundToPlace, roundToSteps, worksheetDigits } from '../numbers/decimal';

/**
 * even   to the nearest, a tie to the even digit
 * up     never down
 * up5    to the nearest, but up where rounding down would lose more than 5 % of u
 * pdg    even, to two digits or one by the leading three digits of u: 100–354 two, 355–949 one, 950–999 up to 1000 and two
 */
export type PairRule = 'even' | 'up' | 'up5' | 'pdg';

export const pairRules: readonly PairRule[] = ['even', 'up', 'up5', 'pdg'];

export interface RoundedPair {
  readonly value: number;
  readonly u: number;
  /** Power of ten of the last digit kept in both: −2 for hundredths. */
  readonly place: number;
  readonly valueText: string;
  readonly uText: string;
}

/**
 * Rounds u to a number of significant digits and the value to the same decimal place, both in decimal on the 15 digits a worksheet
 * shows. The value is rounded half to even whatever the rule. A carry keeps the number of digits: 0.0996 at two digits is 0.10.
 *
 * @param value    Finite.
 * @param u        Standard or expanded uncertainty, > 0, finite.
 * @param digits   Significant digits of u, 1 to 15; the rule `pdg` chooses its own.
 * @throws         EngineError "domain" if a number is outside its range, "choice" for an unknown rule.
 * @source         JCGM 100:2008, 7.2.6; ISO 80000-1:2009, annex B; `up5`: EA-4/02, 6.3 (from memory); `pdg`: Particle Data Group,
 *                 Review of Particle Physics, Introduction, 5.3.
 * @example        roundPair(10.05762, 0.027).valueText // '10.058'
 */
export function roundPair(value: number, u: number, digits = 2, rule: PairRule = 'even'): RoundedPair {
  if (!Number.isFinite(value)) throw new EngineError('domain', `roundPair needs a finite value, got ${value}`);
  if (!(u > 0 && u < Infinity)) throw new EngineError('domain', `roundPair needs an uncertainty > 0, got ${u}`);
  if (!(Number.isInteger(digits) && digits >= 1 && digits <= 15))
    throw new EngineError('domain', `roundPair needs a whole number of digits from 1 to 15, got ${digits}`);
  if (!pairRules.includes(rule)) throw new EngineError('choice', `roundPair needs a rule out of ${pairRules.join(', ')}, got "${rule}"`);

  const { steps, place } = roundUncertainty(u, digits, rule);
  const uText = formatSteps(steps, -place);
  const rounded = Number(`${steps}e${place}`);
  if (!Number.isFinite(rounded)) throw new EngineError('notFinite', `roundPair of the uncertainty ${u} is too large for a number`);
  return { value: roundToPlace(value, place, 'even'), u: rounded, place, valueText: formatPlaces(value, -place), uText };
}

/** u as a whole number of steps of 10^place. */
function roundUncertainty(u: number, digits: number, rule: PairRule): { steps: bigint; place: number } {
  const lead = leadingPlace(u);
  const three = leadingThree(u);
  if (rule === 'pdg' && three >= 950) return { steps: 10n, place: lead };
  const kept = rule !== 'pdg' ? digits : three <= 354 ? 2 : 1;
  const place = lead - kept + 1;
  const steps = stepsOf(u, place, rule);
  // A carry to the next power of ten: its last digit is a zero, so dropping it is exact.
  return steps.toString().length > kept ? { steps: steps / 10n, place: place + 1 } : { steps, place };
}

function stepsOf(u: number, place: number, rule: PairRule): bigint {
  if (rule === 'up') return roundToSteps(u, place, 'ceiling');
  const nearest = roundToSteps(u, place, 'even');
  return rule === 'up5' && losesMoreThan5Percent(u, nearest, place) ? roundToSteps(u, place, 'ceiling') : nearest;
}

/** The first three digits as they stand, not rounded: 3549 gives 354. */
function leadingThree(u: number): number {
  return Number(worksheetDigits(u).digits.slice(0, 3).padEnd(3, '0'));
}

/** 20 (u − rounded) > u, in whole numbers: a loss of exactly 5 % is no matter of binary rounding. */
function losesMoreThan5Percent(u: number, steps: bigint, place: number): boolean {
  const exact = worksheetDigits(u);
  const common = Math.min(place, exact.exponent);
  const given = BigInt(exact.digits) * 10n ** BigInt(exact.exponent - common);
  const rounded = steps * 10n ** BigInt(place - common);
  return 20n * (given - rounded) > given;
}
