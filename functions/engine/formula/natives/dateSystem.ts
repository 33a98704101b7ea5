/** The last serial number of the sheet, 9999-12-31. */
export const LAST_DAY = 2958465;

/** A day of the sheet's calendar; serial number 0 is day 0 of January 1900. */
export interface Day {
  readonly year: number;
  readonly month: number;
  readonly day: number;
}

const DAY_MS = 86400000;

/** Serial numbers of the real calendar from 1900-03-01 on count from this day. */
const ORIGIN = Date.UTC(1899, 11, 30);

/** The serial number of a leap day that never was, 1900-02-29. */
const FALSE_LEAP_DAY = 60;

/**
 * The serial number of a day in the 1900 date system, in which 1900 is a leap year. The day may lie outside its month; the month
 * must be 1 to 12 and the year at least 1900.
 *
 * @source ECMA-376-1, 18.17.4.1 (the 1900 date system counts 1900-02-29)
 * @example serialOf(2008, 1, 1) // 39448
 */
export function serialOf(year: number, month: number, day: number): number {
  const first = Math.round((Date.UTC(year, month - 1, 1) - ORIGIN) / DAY_MS);
  return (first > FALSE_LEAP_DAY ? first : first - 1) + day - 1;
}

/**
 * The day of a whole serial number from 0 to `LAST_DAY`.
 *
 * @example dayOf(60) // { year: 1900, month: 2, day: 29 }
 */
export function dayOf(serial: number): Day {
  if (serial === 0) return { year: 1900, month: 1, day: 0 };
  if (serial === FALSE_LEAP_DAY) return { year: 1900, month: 2, day: 29 };
  const date = new Date(ORIGIN + (serial < FALSE_LEAP_DAY ? serial + 1 : serial) * DAY_MS);
  return { year: date.getUTCFullYear(), month: date.getUTCMonth() + 1, day: date.getUTCDate() };
}

export const isLeap = (year: number): boolean => year === 1900 || (year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0));

export const daysInMonth = (year: number, month: number): number =>
  month === 2 ? (isLeap(year) ? 29 : 28) : [4, 6, 9, 11].includes(month) ? 30 : 31;

/** The day of the week of a serial number as the sheet has it, Monday 0 to Sunday 6; before 1900-03-01 one day off the true one. */
export const weekdayOf = (serial: number): number => (serial + 5) % 7;

/** The month so many months later. */
export function monthsLater({ year, month }: Day, months: number): { year: number; month: number } {
  const count = year * 12 + month - 1 + months;
  return { year: Math.floor(count / 12), month: count - Math.floor(count / 12) * 12 + 1 };
}
