import { EngineError } from '../EngineError';
import { formatPlaces, formatSteps, leadingPlace, roundToDigits, roundToPlace, roundToSteps } from '../numbers/decimal';
import { roundPair } from './roundPair';
import type { PairRule, RoundedPair } from './roundPair';

/**
 * plusminus    12.10 ± 0.05
 * brackets     12.10(5): u in units of the last digit of the value
 * scientific   (1.210 ± 0.005) × 10³: one power of ten for both
 * percent      12.10, u_rel = 0.41 %
 */
export type PairStyle = 'plusminus' | 'brackets' | 'scientific' | 'percent';

export const pairStyles: readonly PairStyle[] = ['plusminus', 'brackets', 'scientific', 'percent'];

export interface PairTextOptions {
  /** Default plusminus. */
  readonly style?: PairStyle;
  /** Significant digits of the uncertainty, 1 to 15; default 2. */
  readonly digits?: number;
  /** Rounding rule of the uncertainty; default even. */
  readonly rule?: PairRule;
  /** An opaque label; blank for none. */
  readonly unit?: string;
  /** Coverage factor, > 0: multiplies u and is stated. Default: u itself is written and nothing stated. */
  readonly k?: number;
  /** Default a point. */
  readonly decimalSeparator?: '.' | ',';
}

/**
 * A value with its uncertainty as the text of a report: both rounded to the same place, trailing zeros kept, no exponents but the
 * power of ten of `scientific`, a hyphen as the minus sign so that the text reads back.
 *
 * @param value   Finite.
 * @param u       Standard uncertainty, > 0, finite.
 * @throws        EngineError "domain" if a number is outside its range, a relative uncertainty of 0 is asked for, or a bracket notation
 *                with k (brackets state a standard uncertainty); "choice" for an unknown style, rule or separator; "notFinite" if what
 *                is to be written exceeds the largest number.
 * @source        JCGM 100:2008, 7.2.2 and 7.2.4; ISO 80000-1:2009, 7.3.4.
 * @example       pairText(12.1, 0.05, { digits: 1, unit: 'mg/L', k: 2 }) // '(12.1 ± 0.1) mg/L, k = 2'
 */
export function pairText(value: number, u: number, options: PairTextOptions = {}): string {
  const { style = 'plusminus', digits = 2, rule = 'even', k, decimalSeparator = '.' } = options;
  if (!pairStyles.includes(style))
    throw new EngineError('choice', `pairText needs a style out of ${pairStyles.join(', ')}, got "${style}"`);
  if (decimalSeparator !== '.' && decimalSeparator !== ',')
    throw new EngineError('choice', `pairText needs a point or a comma as decimal separator, got "${String(decimalSeparator)}"`);
  if (k !== undefined && !(k > 0 && k < Infinity)) throw new EngineError('domain', `pairText needs a coverage factor > 0, got ${k}`);
  if (k !== undefined && style === 'brackets')
    throw new EngineError('domain', `pairText needs the standard uncertainty alone for brackets, got a coverage factor ${k}`);
  if (!(u > 0 && u < Infinity)) throw new EngineError('domain', `pairText needs an uncertainty > 0, got ${u}`);

  const stated = u * (k ?? 1);
  if (stated === Infinity) throw new EngineError('notFinite', `pairText of ${k} times the uncertainty ${u} is too large for a number`);
  const pair = roundPair(value, stated, digits, rule);
  const number = (text: string) => text.replace('.', decimalSeparator);
  const unit = options.unit?.trim() ?? '';
  const withUnit = (text: string) => (unit === '' ? text : `${text} ${unit}`);
  const factor = k === undefined ? '' : `, k = ${number(factorText(k))}`;
  switch (style) {
    case 'brackets':
      return withUnit(`${number(pair.valueText)}(${bracketDigits(pair)})`);
    case 'percent': {
      const name = k === undefined ? 'u_rel' : 'U_rel';
      return `${withUnit(number(pair.valueText))}, ${name} = ${number(percentText(value, stated, digits, rule))} %${factor}`;
    }
    case 'scientific': {
      const { text, power } = scientific(pair, number);
      const bracketed = power === '' && unit === '' ? text : `(${text})`;
      return withUnit(bracketed + power) + factor;
    }
    default: {
      const text = `${number(pair.valueText)} ± ${number(pair.uText)}`;
      return (unit === '' ? text : `(${text}) ${unit}`) + factor;
    }
  }
}

/** u in units of the last digit written: hundredths for 12.10(5), ones for 1230(120). */
function bracketDigits(pair: RoundedPair): string {
  return pair.place < 0 ? pair.uText.replace('.', '').replace(/^0+/, '') : pair.uText;
}

/** Power from the larger of the rounded value and its uncertainty; 10⁰ is left out. */
function scientific(pair: RoundedPair, number: (text: string) => string): { text: string; power: string } {
  const lead = leadingPlace(Math.abs(pair.value) >= pair.u ? pair.value : pair.u);
  const write = (x: number) => number(formatSteps(roundToSteps(x, pair.place, 'even'), lead - pair.place));
  return { text: `${write(pair.value)} ± ${write(pair.u)}`, power: lead === 0 ? '' : ` × 10${superscript(lead)}` };
}

function superscript(n: number): string {
  return String(n).replace(/[-0-9]/g, (c) => (c === '-' ? '⁻' : '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(c)]));
}

function percentText(value: number, stated: number, digits: number, rule: PairRule): string {
  if (value === 0) throw new EngineError('domain', 'pairText needs a value other than 0 for a relative uncertainty, got 0');
  const percent = (stated / Math.abs(value)) * 100;
  if (percent === Infinity) throw new EngineError('notFinite', `pairText of ${stated} relative to ${value} is too large for a number`);
  return roundPair(0, percent, digits, rule).uText;
}

/** Two decimal places, or three figures where the factor is below 1, without trailing zeros: 2, 1.96, 2.57, 0.674. */
function factorText(k: number): string {
  const rounded = k >= 1 ? roundToPlace(k, -2, 'even') : roundToDigits(k, 3, 'even');
  const places = rounded >= 1 ? 2 : 2 - leadingPlace(rounded);
  return formatPlaces(rounded, places).replace(/\.?0+$/, '');
}
