import { EngineError } from '../EngineError';
import { worksheetDigits } from '../numbers/decimal';
import { type Entry, leadOf } from './Entry';

const PLAIN = /^([+-]?)(\d+(?:[.,]\d*)?|[.,]\d+)(?:e([+-]?\d{1,3}))?$/i;

/**
 * Reads an entry with its significant figures. Text keeps its zeros: `12.10` has four figures, `0.0120` three, `1.200e3` four, `1200.`
 * four; the zeros of `1200` count for nothing, as they do in a number cell. `3 exact` limits nothing. A comma is a decimal comma
 * unless three digits follow it in a way that could be a group of thousands: that is refused.
 *
 * @param entry     A number as the sheet holds it (15 digits), or text.
 * @param figures   So many of its digits are significant, whatever is written: the count that came with an unrounded value.
 * @throws          EngineError "text" for text that is no number, "domain" for a count that is no whole number above 0.
 * @source          Common practice.
 */
export function readEntry(entry: number | string, figures?: number): Entry {
  const read = typeof entry === 'number' ? ofNumber(entry) : ofText(entry);
  if (figures === undefined || figures === Infinity) return figures === undefined ? read : { ...read, place: -Infinity };
  if (!(Number.isInteger(figures) && figures >= 1)) throw new EngineError('domain', `readEntry needs a whole number of figures, at least 1, got ${figures}`);
  if (read.steps === 0n) throw new EngineError('domain', 'readEntry needs a number other than 0 where its figures are counted, got 0');
  return { ...read, place: leadOf(read.steps, read.exponent) - figures + 1 };
}

function ofNumber(x: number): Entry {
  const { sign, digits, exponent } = worksheetDigits(x);
  return { steps: BigInt(sign) * BigInt(digits), exponent, place: exponent };
}

function ofText(written: string): Entry {
  const plain = written.trim().replace(/[\u2212\u2013]/g, '-');
  const exact = /^(.*\S)\s+exact$/i.exec(plain);
  const body = (exact ? exact[1] : plain).replace(/(?<=\d)[\u00a0\u2009\u202f ](?=\d{3}(?!\d))/g, '');
  const match = PLAIN.exec(body);
  if (!match) throw new EngineError('text', `readEntry needs a number as it was written, such as 12.10 or 1.20e3, got "${written}"`);
  const [, sign, mantissa, power = '0'] = match;
  if (/^[1-9]\d{0,2},\d{3}$/.test(mantissa))
    throw new EngineError('text', `readEntry needs an entry whose comma is surely a decimal comma, or none, got "${written}"`);
  const [whole, fraction] = mantissa.split(/[.,]/);
  const steps = BigInt(whole + (fraction ?? '')) * (sign === '-' ? -1n : 1n);
  const exponent = Number(power) - (fraction?.length ?? 0);
  if (exact) return { steps, exponent, place: -Infinity };
  const zeros = fraction === undefined && steps !== 0n ? /0*$/.exec(whole)![0].length : 0;
  return { steps, exponent, place: exponent + zeros };
}
