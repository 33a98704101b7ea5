import { daysInMonth, serialOf } from './dateSystem';

/**
 * What a text says in an en-US workbook: the serial number of its day and its time of day as a fraction, 0 where not written;
 * `none` for text that is surely neither, `unknown` where the sheet may see a date in a form that is not read here.
 */
export type TextDate = { readonly day: number; readonly clock: number } | 'none' | 'unknown';

const MONTHS = 'january february march april may june july august september october november december'.split(' ');
const WORDS = new Set([
  ...MONTHS, ...MONTHS.map((m) => m.slice(0, 3)), 'sept', 'am', 'pm', 'a', 'p', 't', 'z', 'mon', 'tue', 'tues', 'wed', 'thu', 'thur', 'thurs',
  'fri', 'sat', 'sun', 'monday', 'tuesday', 'wednesday', 'thursday', 'friday', 'saturday', 'sunday', 'st', 'nd', 'rd', 'th',
]);

/** Signs that stand in no date or time: `<0.1`, `5 ± 1`, `#3`. */
const IN_NO_DATE = /[<>=≤≥±~*#?&_@!|"^{}[\]\\µ°]/;

const TIME = /(?:^|\s)(\d{1,2}):(\d{2})(?::(\d{2}(?:\.\d{1,3})?))?(?:\s*(am|pm))?$/i;

/**
 * Reads a date, a time or both: `2026-12-01`, `2026/12/1`, `12/1/2026`, `12-1-26`, `1-Dec-2026`, `1 December 26`, `Dec 1, 2026`,
 * `Dec 2026`, `14:30`, `2:30:05 PM`. Years of two digits mean 2000 to 2029 or 1950 to 1999; 30 to 49 depend on the computer.
 *
 * @source common practice of en-US workbooks
 */
export function readDateText(text: string): TextDate {
  if (!/\d/.test(text) || IN_NO_DATE.test(text) || (text.toLowerCase().match(/\p{L}+/gu) ?? []).some((word) => !WORDS.has(word))) return 'none';
  if (text !== text.trim()) return 'unknown';
  const time = TIME.exec(text);
  const date = time ? text.slice(0, time.index).trim() : text;
  const clock = time ? timeOf(time) : 0;
  const day = date === '' ? 0 : dateOf(date);
  return clock === undefined || day === undefined ? 'unknown' : { day, clock };
}

function timeOf([, h, m, s = '0', half]: RegExpExecArray): number | undefined {
  const [hours, minutes, seconds] = [Number(h), Number(m), Number(s)];
  if (minutes > 59 || seconds >= 60) return undefined;
  if (half === undefined) return hours > 23 ? undefined : (hours * 3600 + minutes * 60 + seconds) / 86400;
  if (hours < 1 || hours > 12) return undefined;
  return (((hours % 12) + (half.toLowerCase() === 'pm' ? 12 : 0)) * 3600 + minutes * 60 + seconds) / 86400;
}

function dateOf(s: string): number | undefined {
  const iso = /^(\d{4})([-/])(\d{1,2})\2(\d{1,2})$/.exec(s);
  if (iso) return serialIfReal(Number(iso[1]), Number(iso[3]), Number(iso[4]));
  const us = /^(\d{1,2})([-/])(\d{1,2})\2(\d{4}|\d{2})$/.exec(s);
  if (us) return serialIfReal(yearOf(us[4]), Number(us[1]), Number(us[3]));
  const dayFirst = /^(\d{1,2})([- ])([a-z]+)\2(\d{4}|\d{2})$/i.exec(s);
  if (dayFirst) return serialIfReal(yearOf(dayFirst[4]), monthOf(dayFirst[3]), Number(dayFirst[1]));
  const monthFirst = /^([a-z]+) (\d{1,2}), ?(\d{4}|\d{2})$/i.exec(s);
  if (monthFirst) return serialIfReal(yearOf(monthFirst[3]), monthOf(monthFirst[1]), Number(monthFirst[2]));
  const month = /^([a-z]+)[- ](\d{4})$/i.exec(s);
  return month ? serialIfReal(Number(month[2]), monthOf(month[1]), 1) : undefined;
}

function serialIfReal(year: number, month: number, day: number): number | undefined {
  if (!(year >= 1900 && year <= 9999 && month >= 1 && month <= 12 && day >= 1 && day <= daysInMonth(year, month))) return undefined;
  return serialOf(year, month, day);
}

/** A year as written; NaN for two digits that computers read differently. */
function yearOf(digits: string): number {
  const n = Number(digits);
  if (digits.length === 4) return n;
  return n < 30 ? 2000 + n : n >= 50 ? 1900 + n : NaN;
}

/** A month by its name or the first three letters of it; 0 if it is none. */
const monthOf = (word: string): number =>
  MONTHS.findIndex((m) => m === word.toLowerCase() || m.slice(0, 3) === word.toLowerCase()) + 1;
