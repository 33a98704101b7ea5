import { EngineError } from '../EngineError';
import type { Entry } from './Entry';
import { type Outcome, outcomeOf } from './Outcome';

/**
 * The sum of entries, with the decimal places that the coarsest of them allows.
 *
 * @throws   EngineError "shape" for no entries.
 * @source   Common practice.
 * @example  sumFigures([readEntry('12.11'), readEntry('18.0'), readEntry('1.013')]).text // '31.1'
 */
export function sumFigures(entries: readonly Entry[]): Outcome {
  if (entries.length === 0) throw new EngineError('shape', 'sumFigures needs at least one entry, got none');
  const exponent = Math.min(...entries.map((e) => e.exponent));
  const numerator = entries.reduce((sum, e) => sum + e.steps * 10n ** BigInt(e.exponent - exponent), 0n);
  return outcomeOf({ numerator, denominator: 1n, exponent }, Math.max(...entries.map((e) => e.place)));
}
