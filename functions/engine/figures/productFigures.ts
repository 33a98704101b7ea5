import { EngineError } from '../EngineError';
import { type Entry, figuresOf, leadOf } from './Entry';
import { type Outcome, type Ratio, leading, outcomeOf, rounded } from './Outcome';

/**
 * The product of entries over the product of divisors, with as many significant figures as the one of them that has fewest.
 *
 * @throws   EngineError "shape" for no entries; "domain" for a zero, whose figures cannot be counted or which divides.
 * @source   Common practice.
 * @example  productFigures([readEntry('4.56'), readEntry('1.4')], []).text // '6.4'
 */
export function productFigures(entries: readonly Entry[], divisors: readonly Entry[]): Outcome {
  if (entries.length === 0) throw new EngineError('shape', 'productFigures needs at least one entry, got none');
  const all = [...entries, ...divisors];
  if (all.some((e) => e.steps === 0n)) throw new EngineError('domain', 'productFigures needs numbers other than 0, whose figures can be counted, got 0');
  const product = (of: readonly Entry[]): bigint => of.reduce((p, e) => p * e.steps, 1n);
  const below = product(divisors);
  const sign = below < 0n ? -1n : 1n;
  const exponentOf = (of: readonly Entry[]): number => of.reduce((sum, e) => sum + e.exponent, 0);
  const ratio: Ratio = { numerator: product(entries) * sign, denominator: below * sign, exponent: exponentOf(entries) - exponentOf(divisors) };
  return toFigures(ratio, Math.min(...all.map(figuresOf)));
}

/** A ratio other than 0 rounded to so many figures. A carry keeps their number: 9.96 to two figures is 1.0e1. */
export function toFigures(ratio: Ratio, figures: number): Outcome {
  if (figures === Infinity) return outcomeOf(ratio, -Infinity);
  const place = leadOf(...leading(ratio)) - figures + 1;
  const carried = leadOf(rounded(ratio, place), place) - place + 1 > figures;
  return { ...outcomeOf(ratio, carried ? place + 1 : place), figures };
}
