import { formatPlaces } from '../../numbers/decimal';
import { type Native, scalarFunction } from '../native';
import type { Run } from '../run';
import { type Num, type Scalar, type Text, text } from '../scalar';
import { numberOf } from './argument';
import { refuseUse } from './refuseUse';
import { strictFunction } from './strictFunction';
import { made } from './texts';
import { wholeOf } from './wholeOf';

/** Numbers written as text and read back: FIXED, DOLLAR, NUMBERVALUE, and binary, octal and hexadecimal notation in ten places. */
export const writtenNumbers: Native[] = [
  scalarFunction('FIXED', ['number', 'number', 'boolean'], (run, args) => fixed(run, args), { args: [1, 3] }),
  scalarFunction('DOLLAR', ['number', 'number'], dollar, { args: [1, 2] }),
  scalarFunction('NUMBERVALUE', ['text', 'text', 'text'], numberValue, { args: [1, 3] }),
  written('DEC2BIN', 2),
  written('DEC2OCT', 8),
  written('DEC2HEX', 16),
  read('BIN2DEC', 2),
  read('OCT2DEC', 8),
  read('HEX2DEC', 16),
];

/** FIXED(x, [places = 2], [no commas]): rounded half away from zero in decimal; a negative number of places rounds to tens. */
function fixed(run: Run, args: readonly (Scalar | undefined)[], name = 'FIXED'): Scalar {
  if (args.length > 1 && args[1] === undefined) refuseUse(name, 'an argument is left empty');
  const [x, digits, plain] = [numberOf(args[0]), args[1] as Num | undefined, args[2]];
  const places = Math.trunc(digits?.v ?? 2);
  if (places > 127) return run.steps.error('#VALUE!', x, digits!);
  const shown = formatPlaces(x.v, Math.max(places, -400), 'halfUp');
  if (x.v < 0 && !/[1-9]/.test(shown)) refuseUse(name, 'a negative number is rounded to 0');
  const [, sign, whole, rest] = /^(-?)(\d+)(.*)$/.exec(shown)!;
  const grouped = plain?.k === 'boolean' && plain.v ? whole : whole.replace(/\B(?=(\d{3})+$)/g, ',');
  return made(run, sign + grouped + rest, [x, ...(digits ? [digits] : []), ...(plain ? [plain] : [])]);
}

/** DOLLAR(x, [places = 2]): like FIXED with the sign of the dollar, negative amounts in brackets, as an en-US workbook has it. */
function dollar(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const found = fixed(run, args, 'DOLLAR');
  if (found.k !== 'text') return found;
  const amount = found.v.replace(/^-/, '');
  return { ...found, v: found.v.startsWith('-') ? `($${amount})` : `$${amount}` };
}

const READABLE = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;

/** NUMBERVALUE(text, [decimal separator], [group separator]): blanks are passed over, each % divides by 100, "" is 0. */
function numberValue(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const [s, decimal, group] = args.map((a) => (a as Text | undefined) ?? text(''));
  const point = args.length > 1 ? decimal.v[0] : '.';
  const comma = args.length > 2 ? group.v[0] : ',';
  const by = [s, decimal, group].filter((a) => a !== undefined);
  if (point === undefined || comma === undefined || point === comma) refuseUse('NUMBERVALUE', 'a separator is empty, or both are the same');
  const [, body, percents] = /^(.*?)(%*)$/s.exec(s.v.replace(/\s/g, ''))!;
  const [whole, ...fractions] = body.split(point);
  if (fractions.length > 1 || fractions[0]?.includes(comma)) return run.steps.error('#VALUE!', ...by);
  const digits = whole.split(comma).join('') + (fractions.length ? `.${fractions[0]}` : '');
  if (body === '' && percents === '') return run.steps.chosen(run.steps.fromText(0, s), ...by.slice(1));
  if (!READABLE.test(digits) || !Number.isFinite(Number(digits))) {
    if (/\d/.test(digits)) refuseUse('NUMBERVALUE', `"${s.v}" may be a number in a form that is not read here`);
    return run.steps.error('#VALUE!', ...by);
  }
  return run.steps.chosen(run.steps.fromText(Number(digits) / 100 ** percents.length, s), ...by.slice(1));
}

/** So many digits of notation with base 2, 8 or 16, negative numbers as their complement. */
const PLACES = 10;

type Base = 2 | 8 | 16;

/** The digits of a whole number; undefined (#NUM!) where it does not fit. Negative numbers take all ten places. */
export function digitsIn(name: string, base: Base, n: number, places: Num | undefined): string | undefined {
  const half = base ** PLACES / 2;
  if (n < -half || n >= half) return undefined;
  const digits = (n < 0 ? n + 2 * half : n).toString(base).toUpperCase();
  const width = places === undefined ? digits.length : wholeOf(name, places.v);
  if (width < 1 || width > PLACES || (n >= 0 && width < digits.length)) {
    if (n < 0) refuseUse(name, 'its number of places is unusual');
    return undefined;
  }
  return n < 0 ? digits : digits.padStart(width, '0');
}

/** The number that up to ten digits mean, the first of ten telling a negative one; undefined where they are none. */
export function numberIn(base: Base, digits: string): number | undefined {
  if (!{ 2: /^[01]{0,10}$/, 8: /^[0-7]{0,10}$/, 16: /^[0-9a-f]{0,10}$/i }[base].test(digits)) return undefined;
  const n = digits === '' ? 0 : parseInt(digits, base);
  return n >= base ** PLACES / 2 ? n - base ** PLACES : n;
}

/** DEC2BIN, DEC2OCT and DEC2HEX(number, [places]). */
function written(name: string, base: Base): Native {
  return strictFunction(name, ['number', 'number'], (run, args) => {
    const [x, places] = args as Num[];
    const digits = digitsIn(name, base, Math.abs(x.v) < 1 ? 0 : wholeOf(name, x.v), places);
    return digits === undefined ? run.steps.error('#NUM!', ...(args as Num[])) : made(run, digits, args as Num[]);
  }, { args: [1, 2] });
}

/** BIN2DEC, OCT2DEC and HEX2DEC. */
function read(name: string, base: Base): Native {
  return strictFunction(name, ['text'], (run, args) => {
    const s = args[0] as Text;
    const n = numberIn(base, s.v);
    return n === undefined ? run.steps.error('#NUM!', s) : run.steps.fromText(n, s);
  });
}
