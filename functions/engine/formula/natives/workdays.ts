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
    const count = between(Math.min(a, b), Math.max(a, b), free.days);
    return stepped(run, a <= b || count === 0 ? count : -count, [start, end, ...free.from]);
  }, { args: [2, 3] }),
  strictFunction('WORKDAY', ['date', 'number', 'whole range'], (run, args, [given]) => {
    const [start, days] = args as Num[];
    const free = holidays(run, 'WORKDAY', given);
    if ('k' in free) return free;
    const from = serialIn('WORKDAY', start);
    const count = wholeOf('WORKDAY', days.v);
    return stepped(run, from === undefined ? undefined : later(from, count, free.days), [start, days, ...free.from]);
  }, { args: [2, 3] }),
];

const isWeekend = (serial: number): boolean => weekdayOf(serial) >= 5;

/** The working days from one day to another, both included. */
function between(first: number, last: number, free: ReadonlySet<number>): number {
  const weeks = Math.floor((last - first + 1) / 7);
  let count = weeks * 5;
  for (let day = first + weeks * 7; day <= last; day++) if (!isWeekend(day)) count++;
  for (const day of free) if (day >= first && day <= last && !isWeekend(day)) count--;
  return count;
}

/** The working day so many working days later or earlier; undefined where it lies outside the calendar. */
function later(from: number, count: number, free: ReadonlySet<number>): number | undefined {
  const step = Math.sign(count);
  let day = from;
  for (let left = Math.abs(count); left > 0;) {
    day += step;
    if (day < 0 || day > LAST_DAY) return undefined;
    if (!isWeekend(day) && !free.has(day)) left--;
  }
  return day;
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
