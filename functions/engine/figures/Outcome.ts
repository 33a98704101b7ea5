import { EngineError } from '../EngineError';
import { formatSteps } from '../numbers/decimal';
import { leadOf } from './Entry';

/** A result with the figures it deserves. */
export interface Outcome {
  /** Rounded, half to even, with its zeros; scientific notation where zeros would mislead. */
  readonly text: string;
  /** Before rounding, for the next step of a calculation. */
  readonly unrounded: number;
  /** Significant figures of the unrounded value; infinite if exact. */
  readonly figures: number;
}

/** A fraction of whole numbers times a power of ten; the denominator is above 0. */
export interface Ratio {
  readonly numerator: bigint;
  readonly denominator: bigint;
  readonly exponent: number;
}

/** Digits of a double and two more. */
const ENOUGH = 19;

/** The ratio rounded to 10^place; an exact one (place −Infinity) is written with all of its up to 15 digits. */
export function outcomeOf(ratio: Ratio, place: number): Outcome {
  const unrounded = doubleOf(ratio);
  if (place === -Infinity) return { text: String(unrounded), unrounded, figures: Infinity };
  const steps = rounded(ratio, place);
  const figures = ratio.numerator === 0n ? 0 : leadOf(...leading(ratio)) - place + 1;
  return { text: written(steps, place), unrounded, figures: Math.max(0, figures) };
}

/** Rounds to a whole number of 10^place, half to even. */
export function rounded({ numerator, denominator, exponent }: Ratio, place: number): bigint {
  const shift = exponent - place;
  const n = shift > 0 ? numerator * 10n ** BigInt(shift) : numerator;
  const d = shift < 0 ? denominator * 10n ** BigInt(-shift) : denominator;
  const size = n < 0n ? -n : n;
  const kept = size / d;
  const twice = (size % d) * 2n;
  const up = twice > d || (twice === d && kept % 2n === 1n) ? kept + 1n : kept;
  return n < 0n ? -up : up;
}

/** Steps of 10^place as text that reads back with the same figures. */
export function written(steps: bigint, place: number): string {
  if (steps === 0n) return formatSteps(0n, Math.max(0, -place));
  const lead = leadOf(steps, place);
  const misleads = place > 0 || (place === 0 && steps % 10n === 0n);
  if (!misleads && lead >= -5) return formatSteps(steps, -place);
  return `${formatSteps(steps, lead - place)}e${lead}`;
}

/** The first digits of a ratio, cut off, as steps and their power of ten. */
export function leading({ numerator, denominator, exponent }: Ratio): [steps: bigint, exponent: number] {
  const size = numerator < 0n ? -numerator : numerator;
  const shift = ENOUGH + denominator.toString().length - size.toString().length;
  const steps = shift > 0 ? (size * 10n ** BigInt(shift)) / denominator : size / denominator;
  return [numerator < 0n ? -steps : steps, shift > 0 ? exponent - shift : exponent];
}

function doubleOf(ratio: Ratio): number {
  if (ratio.numerator === 0n) return 0;
  const [steps, exponent] = leading(ratio);
  const value = Number(`${steps}e${exponent}`);
  if (!Number.isFinite(value)) throw new EngineError('notFinite', 'a result of significant figures is too large for a number');
  return value;
}
