import { toText } from '../coerce';
import { type Native, rangeFunction, scalarFunction } from '../native';
import { element } from '../ranges';
import type { Run } from '../run';
import { type Num, type Scalar, type Text, text } from '../scalar';
import type { Value } from '../value';
import { together } from './follow';
import { hasWildcards, wildcards } from './wildcards';

/** The longest text a cell can hold. */
const LONGEST = 32767;

/**
 * Pieces, lengths and places of text. Text made from a number is tainted; lengths and places are counts with slope 0. Places are
 * counted in UTF-16 units, as the sheet does.
 */
export const texts: Native[] = [
  side('LEFT', (s, n) => s.slice(0, n)),
  side('RIGHT', (s, n) => s.slice(Math.max(0, s.length - n))),
  scalarFunction('MID', ['text', 'number', 'number'], (run, args) => {
    const [s, start, count] = [textAt(args, 0), whole(args, 1), whole(args, 2)];
    if (start.n < 1 || count.n < 0) return run.steps.error('#VALUE!', start.from, count.from);
    return made(run, s.v.slice(start.n - 1, start.n - 1 + count.n), [s, start.from, count.from]);
  }),
  scalarFunction('LEN', ['text'], (run, args) => run.steps.count(textAt(args, 0).v.length, textAt(args, 0))),
  altered('TRIM', (s) => s.replace(/ +/g, ' ').replace(/^ | $/g, '')),
  altered('UPPER', capitals),
  altered('LOWER', (s) => s.toLowerCase()),
  scalarFunction('CONCATENATE', ['text'], (run, args) => {
    const parts = args.filter((a) => a !== undefined) as Text[];
    return made(run, parts.map((p) => p.v).join(''), parts);
  }, { args: [1, 255], repeating: 1 }),
  rangeFunction('CONCAT', ['range'], concat, { args: [1, 254], repeating: 1 }),
  scalarFunction('EXACT', ['text', 'text'], (run, args) =>
    run.steps.decision(textAt(args, 0).v === textAt(args, 1).v, textAt(args, 0), textAt(args, 1))),
  scalarFunction('REPT', ['text', 'number'], (run, args) => {
    const [s, times] = [textAt(args, 0), whole(args, 1)];
    if (times.n < 0 || s.v.length * times.n > LONGEST) return run.steps.error('#VALUE!', s, times.from);
    return made(run, s.v.length === 0 ? '' : s.v.repeat(times.n), [s, times.from]);
  }),
  scalarFunction('SUBSTITUTE', ['text', 'text', 'text', 'number'], substitute, { args: [3, 4] }),
  place('FIND', (within, wanted, from) => within.indexOf(wanted, from)),
  place('SEARCH', (within, wanted, from) =>
    hasWildcards(wanted) ? wildcards(wanted).find(within, from) : within.toLowerCase().indexOf(wanted.toLowerCase(), from)),
];

/** LEFT and RIGHT: one character unless a number is given; left empty the number is 0. */
function side(name: string, cut: (s: string, n: number) => string): Native {
  return scalarFunction(name, ['text', 'number'], (run, args) => {
    const s = textAt(args, 0);
    const count = args.length < 2 ? { n: 1, from: EMPTY } : whole(args, 1);
    return count.n < 0 ? run.steps.error('#VALUE!', count.from) : made(run, cut(s.v, count.n), [s, count.from]);
  }, { args: [1, 2] });
}

/** Capitals, one for each letter: a letter whose capital would be two (ß) stays, as in the sheet. @source common practice */
function capitals(s: string): string {
  return Array.from(s, (c) => (c.toUpperCase().length === c.length ? c.toUpperCase() : c)).join('');
}

function altered(name: string, change: (s: string) => string): Native {
  return scalarFunction(name, ['text'], (run, args) => made(run, change(textAt(args, 0).v), [textAt(args, 0)]));
}

/** FIND and SEARCH: the 1-based place, from a 1-based start that must lie in the text; #VALUE! where there is none. */
function place(name: string, find: (within: string, wanted: string, from: number) => number): Native {
  return scalarFunction(name, ['text', 'text', 'number'], (run, args) => {
    const [wanted, within] = [textAt(args, 0), textAt(args, 1)];
    const start = args.length < 3 ? { n: 1, from: EMPTY } : whole(args, 2);
    const inside = start.n >= 1 && start.n <= Math.max(1, within.v.length);
    const found = inside ? find(within.v, wanted.v, start.n - 1) : -1;
    if (found < 0) return run.steps.error('#VALUE!', wanted, within, start.from);
    return run.steps.count(found + 1, wanted, within, start.from);
  }, { args: [2, 3] });
}

/** SUBSTITUTE: every occurrence, or the one whose number is given; case counts. */
function substitute(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const [s, old, fresh] = [textAt(args, 0), textAt(args, 1), textAt(args, 2)];
  if (args[3] === undefined) {
    return made(run, old.v === '' ? s.v : s.v.split(old.v).join(fresh.v), [s, old, fresh]);
  }
  const nth = whole(args, 3);
  if (nth.n < 1) return run.steps.error('#VALUE!', nth.from);
  let at = -old.v.length;
  for (let i = 0; i < nth.n && old.v !== ''; i++) {
    at = s.v.indexOf(old.v, at + old.v.length);
    if (at < 0) break;
  }
  const result = at < 0 || old.v === '' ? s.v : s.v.slice(0, at) + fresh.v + s.v.slice(at + old.v.length);
  return made(run, result, [s, old, fresh, nth.from]);
}

/** CONCAT joins all cells of all ranges, row by row. */
function concat(run: Run, args: readonly Value[]): Scalar {
  const parts: Text[] = [];
  let length = 0;
  for (const arg of args) {
    const m = run.matrix(arg);
    const whole = m.fill.k !== 'blank'; // beyond what is stored only blank cells can be passed over
    for (let i = 0; i < (whole ? m.rows * m.cols : m.cells.length); i++) {
      const t = toText(run.steps, whole ? element(m, i) : m.cells[i]);
      if (t.k === 'error') return t;
      parts.push(t);
      length += t.v.length;
      if (length > LONGEST) return run.steps.error('#VALUE!', together(run, parts));
    }
  }
  return made(run, parts.map((p) => p.v).join(''), parts);
}

/** Text made from other scalars, within the length a cell can hold; links are made through few steps, however many there are. */
export function made(run: Run, value: string, from: readonly Scalar[]): Scalar {
  if (value.length > LONGEST) return run.steps.error('#VALUE!', together(run, from));
  const tainted = from.some((s) => s.d !== -1 && (s.k === 'number' || (s.k === 'text' && s.tainted)));
  return text(value, together(run, from).d, tainted);
}

const EMPTY: Text = text('');

const textAt = (args: readonly (Scalar | undefined)[], i: number): Text => (args[i] as Text | undefined) ?? EMPTY;

/** The whole part of a number argument (0 where left empty), and the scalar it came from. */
function whole(args: readonly (Scalar | undefined)[], i: number): { n: number; from: Scalar } {
  const from = args[i] as Num | undefined;
  return { n: Math.trunc(from?.v ?? 0), from: from ?? EMPTY };
}
