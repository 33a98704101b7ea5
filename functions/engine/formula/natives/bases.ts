import { type Native, scalarFunction } from '../native';
import { type Num, type Scalar, type Text } from '../scalar';
import { numberOf } from './argument';
import { refuseUse } from './refuseUse';
import { strictFunction } from './strictFunction';
import { made } from './texts';
import { digitsIn, numberIn } from './writtenNumbers';
import { wholeOf } from './wholeOf';

/** Notations from one base to another, roman numerals, and the bits of whole numbers below 2^48. */
export const bases: Native[] = [
  between('BIN2OCT', 2, 8), between('BIN2HEX', 2, 16), between('OCT2BIN', 8, 2), between('OCT2HEX', 8, 16), between('HEX2BIN', 16, 2), between('HEX2OCT', 16, 8),
  scalarFunction('BASE', ['number', 'number', 'number'], (run, args) => {
    const from = args.map(numberOf);
    const [n, radix, width = 0] = from.map(({ v }) => Math.trunc(v));
    if (n < 0 || n >= 2 ** 53 || radix < 2 || radix > 36 || width < 0 || width > 255) return run.steps.error('#NUM!', ...from);
    return made(run, n.toString(radix).toUpperCase().padStart(width, '0'), from);
  }, { args: [2, 3] }),
  scalarFunction('DECIMAL', ['text', 'number'], (run, [s, radix]) => {
    if (s === undefined || radix === undefined) return refuseUse('DECIMAL', 'an argument is left empty');
    const base = Math.trunc(numberOf(radix).v);
    const written = (s as Text).v;
    if (base < 2 || base > 36) return run.steps.error('#NUM!', s, radix);
    const digits = [...written.trim().toLowerCase()].map((c) => (/[0-9a-z]/.test(c) ? parseInt(c, 36) : 99));
    if (digits.length === 0) refuseUse('DECIMAL', 'its text is empty');
    if (digits.some((d) => d >= base)) return run.steps.error('#NUM!', s, radix);
    const value = digits.reduce((sum, d) => sum * base + d, 0);
    return value < 2 ** 53 ? run.steps.fromText(value, s as Text) : run.steps.error('#NUM!', s);
  }),
  scalarFunction('ROMAN', ['number', 'scalar'], (run, args) => {
    const x = numberOf(args[0]);
    const form = args[1];
    if (form !== undefined && !(form.k === 'number' && form.v === 0) && !(form.k === 'boolean' && form.v)) refuseUse('ROMAN', 'its form is not the classic one');
    const n = Math.trunc(x.v);
    return n < 0 || n > 3999 ? run.steps.error('#VALUE!', x) : made(run, roman(n), [x]);
  }, { args: [1, 2] }),
  scalarFunction('ARABIC', ['text'], (run, [s]) => {
    const written = ((s as Text | undefined)?.v ?? '').trim().toUpperCase();
    const [, sign, numeral] = /^(-?)([MDCLXVI]*)$/.exec(written) ?? [undefined, '', undefined];
    if (numeral === undefined || (sign && !numeral)) return run.steps.error('#VALUE!', s!);
    const value = arabic(numeral);
    if (roman(value) !== numeral && numeral !== '') refuseUse('ARABIC', `"${written}" is no numeral in its classic form`);
    return run.steps.fromText(sign ? -value : value, s as Text);
  }),
  bits('BITAND', (a, b) => a & b), bits('BITOR', (a, b) => a | b), bits('BITXOR', (a, b) => a ^ b),
  shift('BITLSHIFT', 1), shift('BITRSHIFT', -1),
];

function between(name: string, from: 2 | 8 | 16, to: 2 | 8 | 16): Native {
  return strictFunction(name, ['text', 'number'], (run, args) => {
    const n = numberIn(from, (args[0] as Text).v);
    const digits = n === undefined ? undefined : digitsIn(name, to, n, args[1] as Num | undefined);
    return digits === undefined ? run.steps.error('#NUM!', ...(args as Scalar[])) : made(run, digits, args as Scalar[]);
  }, { args: [1, 2] });
}

const NUMERALS: readonly [string, number][] = [
  ['M', 1000], ['CM', 900], ['D', 500], ['CD', 400], ['C', 100], ['XC', 90], ['L', 50], ['XL', 40], ['X', 10], ['IX', 9], ['V', 5], ['IV', 4], ['I', 1],
];

function roman(n: number): string {
  let written = '';
  for (const [numeral, value] of NUMERALS) for (; n >= value; n -= value) written += numeral;
  return written;
}

function arabic(numeral: string): number {
  const values = [...numeral].map((c) => NUMERALS.find(([letter]) => letter === c)![1]);
  return values.reduce((sum, v, i) => sum + (v < (values[i + 1] ?? 0) ? -v : v), 0);
}

const isBits = (n: number): boolean => Number.isInteger(n) && n >= 0 && n < 2 ** 48;

function bits(name: string, of: (a: bigint, b: bigint) => bigint): Native {
  return strictFunction(name, ['number', 'number'], (run, args) => {
    const [a, b] = args as Num[];
    return isBits(a.v) && isBits(b.v) ? run.steps.count(Number(of(BigInt(a.v), BigInt(b.v))), a, b) : run.steps.error('#NUM!', a, b);
  });
}

function shift(name: string, direction: 1 | -1): Native {
  return strictFunction(name, ['number', 'number'], (run, args) => {
    const [a, by] = args as Num[];
    const places = direction * Math.sign(by.v) * wholeOf(name, Math.abs(by.v));
    if (!isBits(a.v) || Math.abs(places) > 53) return run.steps.error('#NUM!', a, by);
    const value = Math.floor(a.v * 2 ** places);
    return value < 2 ** 48 ? run.steps.count(value, a, by) : run.steps.error('#NUM!', a, by);
  });
}
