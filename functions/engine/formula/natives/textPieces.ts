import { toText } from '../coerce';
import { type Native, rangeFunction, scalarFunction } from '../native';
import { element } from '../ranges';
import type { Run } from '../run';
import { type Err, type Num, type Scalar, type Text, text } from '../scalar';
import type { Value } from '../value';
import { numberOf } from './argument';
import { refuseUse } from './refuseUse';
import { made } from './texts';
import { wholeOf } from './wholeOf';

/** The longest text a cell can hold. */
const LONGEST = 32767;

const EMPTY: Text = text('');

/** Text put together and taken apart: TEXTJOIN, TEXTBEFORE, TEXTAFTER, REPLACE, PROPER. Made from numbers it is tainted. */
export const textPieces: Native[] = [
  rangeFunction('TEXTJOIN', ['range', 'boolean', 'range'], join, { args: [3, 254], repeating: 1, shareable: false }),
  divided('TEXTBEFORE', (s, at) => s.slice(0, at), ''),
  divided('TEXTAFTER', (s, at, length) => s.slice(at + length), undefined),
  scalarFunction('REPLACE', ['text', 'number', 'number', 'text'], (run, args) => {
    const [s, fresh] = [(args[0] as Text | undefined) ?? EMPTY, (args[3] as Text | undefined) ?? EMPTY];
    const [start, count] = [numberOf(args[1]), numberOf(args[2])];
    const [from, length] = [Math.trunc(start.v) - 1, Math.trunc(count.v)];
    if (from < 0 || length < 0) return run.steps.error('#VALUE!', start, count);
    return made(run, s.v.slice(0, from) + fresh.v + s.v.slice(from + length), [s, fresh, start, count]);
  }),
  scalarFunction('PROPER', ['text'], (run, [a]) => {
    const s = (a as Text | undefined) ?? EMPTY;
    return made(run, s.v.toLowerCase().replace(/(?<!\p{L})\p{L}/gu, (letter) => letter.toUpperCase()), [s]);
  }),
];

/** TEXTJOIN(delimiter, ignore empty, texts …): several delimiters are used in turn. */
function join(run: Run, [delimiter, ignore, ...args]: readonly Value[]): Scalar {
  if (ignore.k === 'error') return ignore;
  const between = pieces(run, [delimiter], LONGEST);
  if ('k' in between) return between;
  const counted = ignore.k === 'boolean' ? !ignore.v : between.some((t) => t.v !== '');
  const all = pieces(run, args, counted ? (LONGEST + 1) * between.length : 0);
  if ('k' in all) return all;
  const kept = counted ? all : all.filter((t) => t.v !== '');
  if (counted && ignore.k !== 'boolean' && all.some((t) => t.v === '')) refuseUse('TEXTJOIN', 'it does not say whether empty cells count');
  const joined = kept.reduce((s, t, i) => s + (i > 0 ? between[(i - 1) % between.length].v : '') + t.v, '');
  return made(run, joined, [...between, ...all, ...(ignore.k === 'boolean' ? [ignore] : [])]);
}

/**
 * The texts of all cells of all arguments, row by row. The blank rest of a whole column is read until there are `most` pieces.
 */
function pieces(run: Run, args: readonly Value[], most: number): Text[] | Err {
  const found: Text[] = [];
  for (const arg of args) {
    for (const part of run.parts(arg)) {
      const m = run.matrix(part);
      const rest = m.fill.k === 'blank' ? 0 : Infinity;
      for (let i = 0; i < m.rows * m.cols && (i < m.height * m.cols || found.length < Math.max(rest, most)); i++) {
        const t = toText(run.steps, element(m, i));
        if (t.k === 'error') return t;
        found.push(t);
      }
    }
  }
  return found;
}

/**
 * TEXTBEFORE and TEXTAFTER(text, delimiter, [instance], [match mode], [match end], [if not found]).
 *
 * @param ofEmpty   What is taken from an empty text; undefined where that is not documented.
 */
function divided(name: string, take: (s: string, at: number, length: number) => string, ofEmpty: string | undefined): Native {
  return rangeFunction(name, ['text', 'range', 'number', 'number', 'number', 'scalar'], (run, args) => {
    const [given, separator] = args;
    const plain = [given, ...args.slice(2, 5)];
    for (const a of plain) if (a.k === 'error') return a;
    const { rows, cols } = run.matrix(separator);
    if (rows * cols > 1) refuseUse(name, 'it has several delimiters');
    const delimiter = toText(run.steps, run.scalar(separator));
    if (delimiter.k === 'error') return delimiter;
    const s = given.k === 'missing' ? EMPTY : (given as Text);
    const [instance, mode, end] = [2, 3, 4].map((i) => option(name, args[i], i === 2 ? 1 : 0));
    const by = [s, delimiter, ...args.slice(2, 5).filter((a) => a.k !== 'missing')] as Scalar[];
    if (instance === 0) return run.steps.error('#VALUE!', ...by);
    if (s.v === '') {
      if (ofEmpty === undefined || delimiter.v === '') refuseUse(name, 'its text is empty');
      return made(run, ofEmpty, by);
    }
    if (Math.abs(instance) > s.v.length || ![0, 1].includes(mode) || ![0, 1].includes(end)) refuseUse(name, 'its options are unusual');
    const at = delimiter.v === '' ? edge(name, s.v, instance) : found(name, s.v, delimiter.v, instance, mode === 1, end === 1);
    if (at !== undefined) return made(run, take(s.v, at, at === s.v.length ? 0 : delimiter.v.length), by);
    const other = args[5];
    if (other === undefined || other.k === 'missing') return run.steps.error('#N/A', ...by);
    return run.steps.chosenByAll(run.scalar(other), by);
  }, { args: [2, 6], shareable: false });
}

function option(name: string, given: Value | undefined, otherwise: number): number {
  return given === undefined || given.k === 'missing' ? otherwise : wholeNumber(name, (given as Num).v);
}

const wholeNumber = (name: string, v: number): number => (Number.isInteger(v) ? v : wholeOf(name, v));

/** An empty delimiter is met at once: at the front, or from the end. */
function edge(name: string, s: string, instance: number): number {
  if (Math.abs(instance) !== 1) refuseUse(name, 'its delimiter is empty');
  return instance > 0 ? 0 : s.length;
}

/** Where the delimiter stands for the n-th time, counted from the end if n is negative; undefined if it does not. */
function found(name: string, s: string, delimiter: string, n: number, blind: boolean, end: boolean): number | undefined {
  const [within, wanted] = blind ? [s.toLowerCase(), delimiter.toLowerCase()] : [s, delimiter];
  if (within.length !== s.length || wanted.length !== delimiter.length) refuseUse(name, 'letters change their number with their case');
  const places: number[] = [];
  for (let at = within.indexOf(wanted); at >= 0; at = within.indexOf(wanted, at + 1)) places.push(at);
  if (places.some((at, i) => i > 0 && at < places[i - 1] + wanted.length)) refuseUse(name, 'its delimiter overlaps itself');
  if (end && n < 0 && -n > places.length) refuseUse(name, 'its options are unusual');
  if (end) places.push(s.length);
  return n > 0 ? places[n - 1] : (end ? places.slice(0, -1) : places).at(n);
}
