import { EngineError } from '../EngineError';

/** A value with its uncertainty as it was written. */
export interface WrittenPair {
  readonly value: number;
  /** What stands after ±, in the unit of the value; for brackets the standard uncertainty; 0 for an exact value. */
  readonly half: number;
  /** Stated coverage factor; 1 for brackets, which hold a standard uncertainty; undefined where a ± states none. */
  readonly k: number | undefined;
  /** The unit that is left, or nothing. */
  readonly unit: string;
}

const DIGITS = String.raw`\d[\d\u0020\u00a0\u2009\u202f]*`;
const NUMBER = String.raw`[+-]?\s*(?:${DIGITS}(?:[.,][\d\u0020\u00a0\u2009\u202f]*)?|[.,]\d[\d\u0020\u00a0\u2009\u202f]*)`;
const POWER = String.raw`(?:\s*[eE]([+-]?\d{1,3})|\s*[×x*·]\s*10(?:\^([+-]?\d{1,3})|([⁻⁺]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+)))?`;

const BRACKETS = new RegExp(`^(${NUMBER})\\((\\d+(?:[.,]\\d+)?)\\)${POWER}(.*)$`);
const PLUS_MINUS = new RegExp(`^(${NUMBER}?)${POWER}\\s*(?:±|\\+\\/-|\\+-)\\s*(${NUMBER})${POWER}\\s*(%?)(.*)$`);
const OUTER = /^\((.*?(?:±|\+\/-|\+-).*?)\)(.*)$/;
const ALONE = new RegExp(`^(${NUMBER})${POWER}(.*)\\(exact\\)$`);
/** A value whose comma may separate thousands, and a comma elsewhere that cannot. */
const GROUPED = /^\(?[+-]?\s*[1-9]\d{0,2},\d{3}(?![\d,])/;
const DECIMAL_COMMA = /(?<![\d.])0,\d|\d,(?:\d{1,2}|\d{4,})(?!\d)/;

/** What is left beside the numbers and cannot be a unit. */
const NO_UNIT = /±|\+\/-|^[\d.,(]/;

const COVERAGE = /[,;]?\s*\(?\s*k\s*=\s*(\d+(?:[.,]\d+)?)\s*\)?\s*$/;

/**
 * Reads a value with its uncertainty in the notations of the trade: `12.10 ± 0.05`, `12.10(5)`, `12.10(5)e-3`, `(12.10 ± 0.12) mg/L,
 * k = 2`, `(1.210 ± 0.005) × 10³`, `12.1 ± 2 %` (of the value), `6.022 140 76e23 (exact)`; decimal point or comma, spaces between
 * groups of digits.
 *
 * @param separator   The user's decimal separator. Where it is a point, `1,234 ± 5` may mean 1234 as well and is refused.
 * @throws   EngineError "text" for text that is none of these.
 * @source   JCGM 100:2008, 7.2.2 and 7.2.4; the notation of CODATA's tables.
 * @example  readPair('12.10(5)').half // 0.05
 */
export function readPair(written: string, separator: '.' | ',' = '.'): WrittenPair {
  const plain = written.trim().replace(/[\u2212\u2013]/g, '-');
  if (separator === '.' && GROUPED.test(plain) && !DECIMAL_COMMA.test(plain))
    throw new EngineError('text', `readPair needs a value whose comma is surely a decimal comma, got "${written}"`);
  const exact = ALONE.exec(plain);
  if (exact) return { value: numberOf(exact[1], powerOf(exact, 2)), half: 0, k: 1, unit: exact[5].trim() };
  const stated = COVERAGE.exec(plain);
  const body = stated ? plain.slice(0, stated.index).trim() : plain;
  const k = stated ? Number(stated[1].replace(',', '.')) : undefined;
  if (k !== undefined && !(k > 0)) throw new EngineError('text', `readPair needs a coverage factor above 0, got "${written}"`);
  const found = brackets(body, k) ?? plusMinus(body, k);
  if (!found || !Number.isFinite(found.value) || !Number.isFinite(found.half) || NO_UNIT.test(found.unit))
    throw new EngineError('text', `readPair needs a value with its uncertainty, such as 12.10 ± 0.05 or 12.10(5), got "${written}"`);
  return found;
}

/** `12.10(5)`: the digits in brackets count in units of the last place, or as written where they hold a point. */
function brackets(body: string, k: number | undefined): WrittenPair | undefined {
  const match = BRACKETS.exec(body);
  if (!match || k !== undefined) return undefined;
  const power = powerOf(match, 3);
  const [, whole, fraction = ''] = /^([^.,]*)(?:[.,](.*))?$/.exec(compact(match[1]))!;
  const places = whole === '' && fraction === '' ? 0 : fraction.length;
  const half = /[.,]/.test(match[2]) ? numberOf(match[2], power) : numberOf(match[2], power - places);
  return half > 0 ? { value: numberOf(match[1], power), half, k: 1, unit: match[6].trim() } : undefined;
}

function plusMinus(body: string, k: number | undefined): WrittenPair | undefined {
  const outer = OUTER.exec(body);
  const match = PLUS_MINUS.exec(outer ? outer[1].trim() : body);
  if (!match || match[1].trim() === '') return undefined;
  const after = outer ? new RegExp(`^${POWER}(.*)$`).exec(outer[2])! : undefined;
  const common = after ? powerOf(after, 1) : 0;
  const value = numberOf(match[1], powerOf(match, 2) + common);
  const stated = numberOf(match[5], powerOf(match, 6) + common);
  const unit = (after ? after[4] : match[10]).trim();
  if (match[5].trim().startsWith('-') || !(stated >= 0)) return undefined;
  return { value, half: match[9] === '%' && !outer ? (Math.abs(value) * stated) / 100 : stated, k, unit };
}

const compact = (digits: string): string => digits.replace(/[\s\u00a0\u2009\u202f]/g, '');

const numberOf = (digits: string, power: number): number => Number(`${compact(digits).replace(',', '.')}e${power}`);

/** The power of ten in one of three groups of a match: after e, after ^, or raised. */
function powerOf(match: RegExpExecArray, at: number): number {
  const raised = match[at + 2]?.replace(/[⁻⁺⁰¹²³⁴⁵⁶⁷⁸⁹]/g, (c) => ({ '⁻': '-', '⁺': '+' })[c] ?? String('⁰¹²³⁴⁵⁶⁷⁸⁹'.indexOf(c)));
  return Number(match[at] ?? match[at + 1] ?? raised ?? 0);
}
