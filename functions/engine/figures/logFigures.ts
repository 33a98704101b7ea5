import { EngineError } from '../EngineError';
import { worksheetDigits } from '../numbers/decimal';
import { type Entry, figuresOf } from './Entry';
import { type Outcome, type Ratio, outcomeOf } from './Outcome';
import { toFigures } from './productFigures';

/**
 * The decimal logarithm of an entry: as many decimal places as the entry has significant figures.
 *
 * @throws   EngineError "domain" for an entry that is not above 0.
 * @source   Common practice.
 * @example  logFigures(readEntry('3.2e-4')).text // '-3.49'
 */
export function logFigures(entry: Entry): Outcome {
  const x = Number(`${entry.steps}e${entry.exponent}`);
  if (!(x > 0)) throw new EngineError('domain', `logFigures needs a number above 0, got ${x}`);
  return outcomeOf(ratioOf(Math.log10(x)), -figuresOf(entry));
}

/**
 * Ten to the power of an entry: as many significant figures as the entry has decimal places.
 *
 * @throws   EngineError "domain" for an entry without decimal places; "notFinite" where the result is no number of a sheet.
 * @source   Common practice.
 * @example  antilogFigures(readEntry('-3.49')).text // '0.00032'
 */
export function antilogFigures(entry: Entry): Outcome {
  const x = Number(`${entry.steps}e${entry.exponent}`);
  if (entry.place >= 0) throw new EngineError('domain', `antilogFigures needs an entry with decimal places, for they become its figures, got ${x}`);
  const value = 10 ** x;
  if (!(value > 0 && value < Infinity)) throw new EngineError('notFinite', `antilogFigures of ${x} is no number that a sheet can hold`);
  return toFigures(ratioOf(value), -entry.place);
}

/** A double as the decimal number of its 15 digits. */
function ratioOf(x: number): Ratio {
  const { sign, digits, exponent } = worksheetDigits(x);
  return { numerator: BigInt(sign) * BigInt(digits), denominator: 1n, exponent };
}
