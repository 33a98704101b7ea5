import type { Native } from '../native';
import type { Run } from '../run';
import { type Err, NONE, type Num, type Scalar } from '../scalar';
import type { Value } from '../value';
import { serialIn } from './dateArgument';
import { LAST_DAY, weekdayOf } from './dateSystem';
import { stepped } from './dates';
import { refuseUse } from './refuseUse';
import { strictFunction } from './strictFunction';
import { wholeOf } from './wholeOf';

/** Days that are neither Saturday, Sunday nor among the holidays given; without slopes (see `dates`). */
export const workdays: Native[] = [
  strictFunction('NETWORKDAYS', ['date', 'date', 'whole range'], (run, args, [given]) => {
    const [start, end] = args as Num[];
    const free = holidays(run, 'NETWORKDAYS', given);
    if ('k' in free) return free;
    const [a, b] = [start, end].map((s) => serialIn('NETWORKDAYS', s));
    if (a === undefined || b === undefined) return stepped(run, undefined, args as Num[]);
    const count = between(Math.min(a, b), Math.max(a, b), free.days, SATURDAY_SUNDAY);
    return stepped(run, a <= b || count === 0 ? count : -count, [start, end, ...free.from]);
  }, { args: [2, 3] }),
  international('NETWORKDAYS.INTL', (run, [start, end], free, weekend, by) => {
    const [a, b] = [start, end].map((s) => serialIn('NETWORKDAYS.INTL', s));
    if (a === undefined || b === undefined) return stepped(run, undefined, by);
    const count = between(Math.min(a, b), Math.max(a, b), free, weekend);
    return stepped(run, a <= b || count === 0 ? count : -count, by);
  }),
  international('WORKDAY.INTL', (run, [start, days], free, weekend, by) => {
    const from = serialIn('WORKDAY.INTL', start);
    if (weekend.size === 7) return run.steps.error('#VALUE!', ...by);
    return stepped(run, from === undefined ? undefined : later(from, wholeOf('WORKDAY.INTL', days.v), free, weekend), by);
  }),
  strictFunction('WORKDAY', ['date', 'number', 'whole range'], (run, args, [given]) => {
    const [start, days] = args as Num[];
    const free = holidays(run, 'WORKDAY', given);
    if ('k' in free) return free;
    const from = serialIn('WORKDAY', start);
    const count = wholeOf('WORKDAY', days.v);
    return stepped(run, from === undefined ? undefined : later(from, count, free.days, SATURDAY_SUNDAY), [start, days, ...free.from]);
  }, { args: [2, 3] }),
];

/** A function of two numbers or dates, a weekend and holidays. A number that is no weekend is #NUM!, text #VALUE!. */
function international(
  name: string, of: (run: Run, pair: readonly [Num, Num], free: ReadonlySet<number>, weekend: Weekend, by: readonly Scalar[]) => Scalar,
): Native {
  return strictFunction(name, ['date', 'date', 'whole range', 'whole range'], (run, args, [given, days]) => {
    const pair = args as unknown as readonly [Num, Num];
    const free = holidays(run, name, days);
    if ('k' in free) return free;
    const code = given === undefined || given.k === 'missing' ? undefined : run.scalar(given);
    if (code?.k === 'error') return code;
    const weekend = code === undefined ? SATURDAY_SUNDAY : weekendOf(code);
    if (weekend === undefined) return run.steps.error(code!.k === 'text' ? '#VALUE!' : '#NUM!', code!);
    return of(run, pair, free.days, weekend, [...pair, ...(code ? [code] : []), ...free.from]);
  }, { args: [2, 4] });
}

/** The days of the week that are free, Monday 0. */
type Weekend = ReadonlySet<number>;

const SATURDAY_SUNDAY: Weekend = new Set([5, 6]);

/** The working days from one day to another, both included. */
function between(first: number, last: number, free: ReadonlySet<number>, weekend: Weekend): number {
  const weeks = Math.floor((last - first + 1) / 7);
  let count = weeks * (7 - weekend.size);
  for (let day = first + weeks * 7; day <= last; day++) if (!weekend.has(weekdayOf(day))) count++;
  for (const day of free) if (day >= first && day <= last && !weekend.has(weekdayOf(day))) count--;
  return count;
}

/** The working day so many working days later or earlier; undefined where it lies outside the calendar. */
function later(from: number, count: number, free: ReadonlySet<number>, weekend: Weekend): number | undefined {
  const step = Math.sign(count);
  let day = from;
  for (let left = Math.abs(count); left > 0;) {
    day += step;
    if (day < 0 || day > LAST_DAY) return undefined;
    if (!weekend.has(weekdayOf(day)) && !free.has(day)) left--;
  }
  return day;
}

/** A weekend by its number (1 to 7 two days, 11 to 17 one) or by seven digits from Monday on, all seven allowed; undefined where it is none. */
function weekendOf(given: Scalar): Weekend | undefined {
  if (given.k === 'text') return /^[01]{7}$/.test(given.v) ? new Set([...given.v].flatMap((c, day) => (c === '1' ? [day] : []))) : undefined;
  const code = given.k === 'number' ? Math.trunc(given.v) : NaN;
  if (code >= 1 && code <= 7) return new Set([(code + 4) % 7, (code + 5) % 7]);
  return code >= 11 && code <= 17 ? new Set([(code - 12 + 7) % 7]) : undefined;
}

/** The days of a range of holidays, and the scalars they depend on; blank cells are passed over. */
function holidays(run: Run, name: string, given: Value | undefined): { days: Set<number>; from: Scalar[] } | Err {
  const days = new Set<number>();
  const from: Scalar[] = [];
  if (given === undefined || given.k === 'missing') return { days, from };
  const { cells, fill } = run.matrix(given);
  if (fill.k !== 'blank') refuseUse(name, 'its holidays are a filled whole column');
  for (const s of cells) {
    if (s.k === 'error') return s;
    if (s.d !== NONE) from.push(s);
    if (s.k === 'blank') continue;
    if (s.k !== 'number') refuseUse(name, 'among its holidays is something that is no number');
    const serial = serialIn(name, s);
    if (serial === undefined) return run.steps.error('#NUM!', s);
    days.add(serial);
  }
  return { days, from };
}
