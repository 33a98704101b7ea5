import { toText } from '../coerce';
import { type Native, scalarFunction } from '../native';
import type { Run } from '../run';
import { BLANK, type Num, type Scalar } from '../scalar';
import { serialIn, toDate } from './dateArgument';
import { type Day, dayOf, daysInMonth, isLeap, monthsLater, serialOf } from './dateSystem';
import { stepped } from './dates';
import { refuseUse } from './refuseUse';
import { strictFunction } from './strictFunction';
import { wholeOf } from './wholeOf';

/** Spans between two days in years, months and days; without slopes (see `dates`). */
export const dateSpans: Native[] = [
  strictFunction('YEARFRAC', ['date', 'date', 'number'], (run, args) => {
    const from = args as Num[];
    const [a, b] = from.slice(0, 2).map((s) => serialIn('YEARFRAC', s));
    const basis = from.length > 2 ? wholeOf('YEARFRAC', from[2].v) : 0;
    if (a === undefined || b === undefined || !(basis >= 0 && basis <= 4)) return stepped(run, undefined, from);
    return stepped(run, a === b ? 0 : yearFraction(Math.min(a, b), Math.max(a, b), basis), from);
  }, { args: [2, 3] }),
  scalarFunction('DAYS360', ['scalar', 'scalar', 'boolean'], (run, args) => {
    const [start, end] = args.slice(0, 2).map((s) => toDate(run, 'DAYS360', s ?? BLANK));
    if (start.k === 'error') return start;
    if (end.k === 'error') return end;
    const [a, b] = [start, end].map((s) => serialIn('DAYS360', s));
    if (a === undefined || b === undefined) return stepped(run, undefined, [start, end]);
    return stepped(run, commercialDays(dayOf(a), dayOf(b), args[2]?.v === true), [start, end, ...(args[2] ? [args[2]] : [])]);
  }, { args: [2, 3] }),
  scalarFunction('DATEDIF', ['scalar', 'scalar', 'scalar'], dateDif),
];

/**
 * The fraction of a year from one day to a later one.
 *
 * @source D. A. Wheeler, "YEARFRAC Incompatibilities between Excel 2007 and OOXML (OXML), and the Definitions Actually Used by
 *         Excel 2007", 2008
 */
function yearFraction(first: number, last: number, basis: number): number {
  if (first <= 60) refuseUse('YEARFRAC', 'a date lies before 1900-03-01');
  const [a, b] = [dayOf(first), dayOf(last)];
  switch (basis) {
    case 0:
      return days360(a, b) / 360;
    case 1:
      return (last - first) / yearLength(a, b);
    case 2:
      return (last - first) / 360;
    case 3:
      return (last - first) / 365;
    default:
      return thirties({ ...a, day: Math.min(a.day, 30) }, { ...b, day: Math.min(b.day, 30) }) / 360;
  }
}

/** Days with months of 30, the way of the United States: ends of February count as day 30 where the span begins on one. */
function days360(a: Day, b: Day): number {
  let [from, to] = [a.day, b.day];
  if (isEndOfFebruary(a)) {
    from = 30;
    if (isEndOfFebruary(b)) to = 30;
  } else if (from >= 30) {
    from = 30;
    if (to === 31) to = 30;
  }
  return thirties({ ...a, day: from }, { ...b, day: to });
}

/** DAYS360: day 31 counts as 30; by the way of the United States, as the first of the next month after a day below 30. Ends of February are refused there. */
function commercialDays(a: Day, b: Day, european: boolean): number {
  const from = Math.min(a.day, 30);
  if (european) return thirties({ ...a, day: from }, { ...b, day: Math.min(b.day, 30) });
  if (isEndOfFebruary(a) || isEndOfFebruary(b)) refuseUse('DAYS360', 'a date is the end of February');
  return thirties({ ...a, day: from }, { ...b, day: b.day === 31 && from === 30 ? 30 : b.day });
}

const thirties = (a: Day, b: Day): number => (b.year - a.year) * 360 + (b.month - a.month) * 30 + b.day - a.day;

const isEndOfFebruary = ({ year, month, day }: Day): boolean => month === 2 && day === daysInMonth(year, 2);

/** The length of the year that a span is measured in: over more than a year the mean of all years touched, else 365 or 366. */
function yearLength(a: Day, b: Day): number {
  if (b.year > a.year + 1 || (b.year === a.year + 1 && !isBefore(b, a) && !isSameDate(a, b))) {
    return (serialOf(b.year + 1, 1, 1) - serialOf(a.year, 1, 1)) / (b.year - a.year + 1);
  }
  if (a.year === b.year) return isLeap(a.year) ? 366 : 365;
  const holdsLeapDay = (isLeap(a.year) && a.month <= 2) || (isLeap(b.year) && (b.month > 2 || (b.month === 2 && b.day === 29)));
  return holdsLeapDay ? 366 : 365;
}

/** Whether the month and day of one come before those of another. */
const isBefore = (b: Day, a: Day): boolean => b.month < a.month || (b.month === a.month && b.day < a.day);
const isSameDate = (a: Day, b: Day): boolean => a.month === b.month && a.day === b.day;

/**
 * DATEDIF(start, end, unit): whole years, months and days, or days without months ("MD"), months without years ("YM"), days
 * without years ("YD"). Where the documentation warns of wrong results for "MD", and where "YD" depends on the year in which the
 * days are counted, the call is refused.
 */
function dateDif(run: Run, args: readonly (Scalar | undefined)[]): Scalar {
  for (const s of args.slice(0, 2)) if (s?.k === 'boolean') return run.steps.error('#VALUE!', s);
  const [start, end] = args.slice(0, 2).map((s) => toDate(run, 'DATEDIF', s ?? BLANK));
  if (start.k === 'error') return start;
  if (end.k === 'error') return end;
  const unit = toText(run.steps, args[2] ?? BLANK);
  if (unit.k === 'error') return unit;
  const [first, last] = [start, end].map((s) => serialIn('DATEDIF', s));
  if (first === undefined || last === undefined || first > last) return stepped(run, undefined, [start, end, unit]);
  return stepped(run, difference(first, last, unit.v.toUpperCase()), [start, end, unit]);
}

function difference(first: number, last: number, unit: string): number | undefined {
  const [a, b] = [dayOf(first), dayOf(last)];
  const months = (b.year - a.year) * 12 + b.month - a.month - (b.day < a.day ? 1 : 0);
  switch (unit) {
    case 'Y':
      return Math.floor(months / 12);
    case 'M':
      return months;
    case 'D':
      return last - first;
    case 'YM':
      return months % 12;
    case 'MD': {
      const { year, month } = monthsLater(b, -1);
      if (b.day >= a.day) return b.day - a.day;
      if (a.day > daysInMonth(year, month)) refuseUse('DATEDIF', 'days without months are unreliable at the end of a month');
      return b.day + daysInMonth(year, month) - a.day;
    }
    case 'YD': {
      const forwards = serialOf(a.year + (isBefore(b, a) ? 1 : 0), b.month, b.day) - first;
      const backwards = last - serialOf(b.year - (isBefore(b, a) ? 1 : 0), a.month, a.day);
      if (forwards !== backwards) refuseUse('DATEDIF', 'days without years differ from year to year here');
      return forwards;
    }
    default:
      return undefined;
  }
}
