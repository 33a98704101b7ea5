import { type Native, scalarFunction } from '../native';
import type { Run } from '../run';
import { BLANK, type Err, type Num, type Scalar } from '../scalar';
import { numberOf } from './argument';
import { serialIn, toDate } from './dateArgument';
import { type Day, LAST_DAY, dayOf, daysInMonth, monthsLater, serialOf, weekdayOf } from './dateSystem';
import { readDateText } from './dateText';
import { refuseUse } from './refuseUse';
import { strictFunction } from './strictFunction';
import { wholeOf } from './wholeOf';

/**
 * Days of the 1900 date system. All go in steps, so none has a slope (NaN): an uncertain number that reaches a result through one
 * of them is refused.
 */
export const dates: Native[] = [
  scalarFunction('DATE', ['number', 'number', 'number'], date),
  part('YEAR', (d) => d.year),
  part('MONTH', (d) => d.month),
  part('DAY', (d) => d.day),
  scalarFunction('WEEKDAY', ['scalar', 'number'], weekday, { args: [1, 2] }),
  strictFunction('WEEKNUM', ['date', 'number'], (run, args) => weekNumber(run, args as Num[]), { args: [1, 2] }),
  part('ISOWEEKNUM', (_d, serial) => isoWeek('ISOWEEKNUM', serial)),
  strictFunction('EDATE', ['date', 'number'], (run, args) => monthLater(run, 'EDATE', args as Num[], (d, last) => Math.min(d.day, last))),
  strictFunction('EOMONTH', ['date', 'number'], (run, args) => monthLater(run, 'EOMONTH', args as Num[], (_d, last) => last)),
  scalarFunction('DAYS', ['scalar', 'scalar'], (run, args) => {
    for (const s of args) if (s?.k === 'boolean') return run.steps.error('#VALUE!', s);
    const [end, start] = args.map((s) => toDate(run, 'DAYS', s ?? BLANK));
    for (const s of [end, start]) if (s.k === 'error') return s;
    const [to, from] = [end, start].map((s) => serialIn('DAYS', s as Num));
    return stepped(run, to === undefined || from === undefined ? undefined : to - from, [end, start]);
  }),
  scalarFunction('DATEVALUE', ['scalar'], (run, [s = BLANK]) => {
    if (s.k === 'error') return s;
    const read = s.k === 'text' ? readDateText(s.v) : 'none';
    if (read === 'none' || s.k !== 'text') return run.steps.error('#VALUE!', s);
    if (read === 'unknown') refuseUse('DATEVALUE', `"${s.v}" may be a date in a form that is not read here`);
    return run.steps.fromText(read.day, s);
  }),
];

/** A number without a slope, or #NUM! where there is none. */
export function stepped(run: Run, value: number | undefined, from: readonly Scalar[]): Num | Err {
  return value === undefined ? run.steps.error('#NUM!', ...from) : run.steps.many(value, from, NaN);
}

function part(name: string, of: (day: Day, serial: number) => number): Native {
  return scalarFunction(name, ['scalar'], (run, [s = BLANK]) => {
    const at = toDate(run, name, s);
    if (at.k === 'error') return at;
    const serial = serialIn(name, at);
    return stepped(run, serial === undefined ? undefined : of(dayOf(serial), serial), [at]);
  });
}

/** DATE(year, month, day): years below 1900 count from 1900; months and days may lie outside their range. */
function date(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const from = args.map(numberOf);
  const [y, m, d] = from.map(({ v }) => wholeOf('DATE', v));
  if (y < 0 || y > 9999) return stepped(run, undefined, from);
  const at = monthsLater({ year: y < 1900 ? y + 1900 : y, month: 1, day: 1 }, m - 1);
  if (at.year < 1900) refuseUse('DATE', 'its month lies before 1900');
  if (at.year > 9999) return stepped(run, undefined, from);
  const serial = serialOf(at.year, at.month, d);
  return stepped(run, serial < 0 || serial > LAST_DAY ? undefined : serial, from);
}

/** WEEKDAY(date, [type]): types 1 (Sunday is 1), 2 (Monday is 1), 3 (Monday is 0), 11 to 17 (Monday to Sunday is 1). */
function weekday(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  const at = toDate(run, 'WEEKDAY', args[0] ?? BLANK);
  if (at.k === 'error') return at;
  if (args.length > 1 && args[1] === undefined) refuseUse('WEEKDAY', 'an argument is left empty');
  const type = numberOf(args[1]);
  const kind = args.length > 1 ? wholeOf('WEEKDAY', type.v) : 1;
  const serial = serialIn('WEEKDAY', at);
  if (serial === undefined) return stepped(run, undefined, [at, type]);
  if (serial < 1) refuseUse('WEEKDAY', 'the date is day 0');
  const monday = weekdayOf(serial);
  if (kind === 3) return stepped(run, monday, [at, type]);
  const first = firstDayOf(kind);
  return stepped(run, first === undefined ? undefined : ((monday - first + 7) % 7) + 1, [at, type]);
}

/** The first day of the week (Monday 0) by the number of a type; undefined if there is no such type. */
function firstDayOf(type: number): number | undefined {
  if (type === 1) return 6;
  if (type === 2) return 0;
  return type >= 11 && type <= 17 ? type - 11 : undefined;
}

/** WEEKNUM(date, [type]): the week that holds January 1 is the first; type 21 is the week of ISO 8601. */
function weekNumber(run: Run, args: readonly Num[]): Scalar {
  const serial = serialIn('WEEKNUM', args[0]);
  const type = args.length > 1 ? wholeOf('WEEKNUM', args[1].v) : 1;
  if (serial === undefined) return stepped(run, undefined, args);
  if (serial < 1) refuseUse('WEEKNUM', 'the date is day 0');
  if (type === 21) return stepped(run, isoWeek('WEEKNUM', serial), args);
  const first = firstDayOf(type);
  if (first === undefined) return stepped(run, undefined, args);
  const start = serialOf(dayOf(serial).year, 1, 1);
  return stepped(run, Math.floor((serial - start + ((weekdayOf(start) - first + 7) % 7)) / 7) + 1, args);
}

/** The week of ISO 8601: the first has the year's first Thursday. Before 1900-03-01 the sheet's days of the week are wrong. */
function isoWeek(name: string, serial: number): number {
  if (serial <= 60) refuseUse(name, 'the date lies before 1900-03-01');
  const thursday = serial - weekdayOf(serial) + 3;
  const year = thursday > LAST_DAY ? 10000 : dayOf(thursday).year;
  return Math.floor((thursday - serialOf(year, 1, 1)) / 7) + 1;
}

function monthLater(run: Run, name: string, args: readonly Num[], dayIn: (from: Day, last: number) => number): Scalar {
  const serial = serialIn(name, args[0]);
  const months = wholeOf(name, args[1].v);
  if (serial === undefined) return stepped(run, undefined, args);
  const from = dayOf(serial);
  const { year, month } = monthsLater(from, months);
  if (!(year >= 1900 && year <= 9999)) return stepped(run, undefined, args);
  const value = serialOf(year, month, dayIn(from, daysInMonth(year, month)));
  return stepped(run, value < 0 ? undefined : value, args);
}
