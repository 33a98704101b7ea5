import { EngineError } from '../EngineError';

/** `sign` × `digits` × 10^`exponent`; the digits are a whole number without trailing zeros. Zero is '0' with sign and exponent 0. */
export interface WorksheetDigits {
  readonly sign: -1 | 0 | 1;
  readonly digits: string;
  readonly exponent: number;
}

/**
 * even     to the nearest, a tie to the even digit (ISO 80000-1, B.3 rule A)
 * halfUp   to the nearest, a tie away from zero (ISO 80000-1, B.3 rule B)
 * ceiling  away from zero, never down in magnitude
 * floor    towards zero, never up in magnitude
 */
export type RoundingRule = 'even' | 'halfUp' | 'ceiling' | 'floor';

/**
 * The decimal number that a worksheet shows: a double holds a decimal entry only nearly, and 15 significant digits give the entry
 * back. All decimal rounding starts here, so 0.285 is 0.285 and not 0.28499999999999998.
 *
 * @param x   Finite.
 * @throws    EngineError "domain" if x is not finite.
 * @source    15 digits are what a double always holds (IEEE 754) and what a worksheet stores and shows.
 * @example   worksheetDigits(-0.1 - 0.2) // { sign: -1, digits: '3', exponent: -1 }
 */
export function worksheetDigits(x: number): WorksheetDigits {
  if (!Number.isFinite(x)) throw new EngineError('domain', `worksheetDigits needs a finite number, got ${x}`);
  if (x === 0) return { sign: 0, digits: '0', exponent: 0 };
  const [mantissa, power] = Math.abs(x).toExponential(14).split('e');
  const all = mantissa.replace('.', '');
  const digits = all.replace(/0+$/, '');
  return { sign: x < 0 ? -1 : 1, digits, exponent: Number(power) - 14 + (all.length - digits.length) };
}

/** Place (power of ten) of the leading digit: 1 for 12.3, −2 for 0.05. Zero has none and is refused. */
export function leadingPlace(x: number): number {
  const { sign, digits, exponent } = worksheetDigits(x);
  if (sign === 0) throw new EngineError('domain', 'leadingPlace needs a number other than 0, got 0');
  return exponent + digits.length - 1;
}

/**
 * Whole number of steps of 10^place nearest to x by the rule, with its sign; the digits that are printed come from it.
 *
 * @param place   Whole number: −2 rounds to hundredths, 1 to tens.
 * @example       roundToSteps(2.675, -2, 'even') // 268n
 */
export function roundToSteps(x: number, place: number, rule: RoundingRule): bigint {
  requireWhole('roundToSteps', 'place', place);
  const { sign, digits, exponent } = worksheetDigits(x);
  const steps = sign === 0 ? 0n : roundDigits(digits, place - exponent, rule);
  return sign < 0 ? -steps : steps;
}

/** Drops the last `drop` digits of a whole number by the rule; a negative `drop` appends zeros. */
function roundDigits(digits: string, drop: number, rule: RoundingRule): bigint {
  if (drop <= 0) return BigInt(digits) * 10n ** BigInt(-drop);
  const kept = digits.length > drop ? BigInt(digits.slice(0, -drop)) : 0n;
  return up(kept, digits, drop, rule) ? kept + 1n : kept;
}

function up(kept: bigint, digits: string, drop: number, rule: RoundingRule): boolean {
  // `digits` has no trailing zeros, so something is always dropped here.
  if (rule === 'ceiling') return true;
  if (rule === 'floor' || digits.length < drop) return false;
  const rest = digits.slice(-drop);
  if (rest[0] !== '5') return rest[0] > '5';
  return rest.length > 1 || rule === 'halfUp' || kept % 2n === 1n;
}

/**
 * x rounded in decimal to a multiple of 10^place. Returns x itself where the place lies below its 15 significant digits.
 *
 * @param x       Finite.
 * @param place   Whole number, the power of ten: −2 rounds to hundredths, 1 to tens.
 * @returns       The double nearest to the rounded decimal; 0 (never −0) where nothing is left.
 * @throws        EngineError "domain" for x not finite or place not whole, "notFinite" if rounding up leaves the range of numbers.
 * @source        ISO 80000-1:2009, annex B (one step only, B.4).
 * @example       roundToPlace(0.285, -2, 'even') // 0.28
 */
export function roundToPlace(x: number, place: number, rule: RoundingRule): number {
  requireWhole('roundToPlace', 'place', place);
  if (!Number.isFinite(x)) throw new EngineError('domain', `roundToPlace needs a finite number, got ${x}`);
  if (x === 0) return 0;
  if (place < leadingPlace(x) - 14) return x;
  if (place > 400 && rule !== 'ceiling') return 0;
  const rounded = Number(`${roundToSteps(x, place, rule)}e${place}`);
  if (!Number.isFinite(rounded))
    throw new EngineError('notFinite', `roundToPlace of ${x} to the place 10^${place} is too large a number`);
  return rounded;
}

/**
 * x rounded in decimal to so many significant figures.
 *
 * @param figures   Whole number, >= 1; from 16 on nothing changes.
 * @example         roundToDigits(0.0996, 2, 'even') // 0.1
 */
export function roundToDigits(x: number, figures: number, rule: RoundingRule): number {
  requireWhole('roundToDigits', 'figures', figures);
  if (figures < 1) throw new EngineError('domain', `roundToDigits needs at least 1 figure, got ${figures}`);
  return x === 0 ? 0 : roundToPlace(x, leadingPlace(x) - figures + 1, rule);
}

/**
 * x in plain decimal notation with exactly so many decimal places, trailing zeros kept, no exponent, no −0. A negative number of
 * places rounds to tens, hundreds, … and writes the zeros.
 *
 * @param places   Whole number, at most 400.
 * @example        formatPlaces(12.1, 2) // '12.10'
 */
export function formatPlaces(x: number, places: number, rule: RoundingRule = 'even'): string {
  if (places > 400) throw new EngineError('domain', `formatPlaces needs at most 400 decimal places, got ${places}`);
  return formatSteps(roundToSteps(x, -places, rule), places);
}

/** Writes a whole number of steps of 10^−places: formatSteps(1210n, 2) is '12.10', formatSteps(12n, −1) is '120'. */
export function formatSteps(steps: bigint, places: number): string {
  const sign = steps < 0n ? '-' : '';
  const digits = (steps < 0n ? -steps : steps).toString();
  if (steps === 0n && places <= 0) return '0';
  if (places <= 0) return sign + digits + '0'.repeat(-places);
  const padded = digits.padStart(places + 1, '0');
  return `${sign}${padded.slice(0, -places)}.${padded.slice(-places)}`;
}

/** x in plain decimal notation with all of its up to 15 significant digits and no more: 0.1 + 0.2 is '0.3', 1e-7 is '0.0000001'. */
export function formatAll(x: number): string {
  const { exponent } = worksheetDigits(x);
  return formatPlaces(x, Math.max(0, -exponent));
}

function requireWhole(who: string, what: string, n: number): void {
  if (!Number.isInteger(n)) throw new EngineError('domain', `${who} needs a whole number as ${what}, got ${n}`);
}
