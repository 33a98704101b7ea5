import { type Native } from '../native';
import type { Run } from '../run';
import type { Value } from '../value';
import { nativeNamed } from './index';
import { refuseUse } from './refuseUse';

/** Functions for which a number means a day of the calendar. */
const CALENDAR = new Set(`
  DATE DATEDIF DATEVALUE DAY DAYS360 EDATE EOMONTH ISOWEEKNUM MONTH NETWORKDAYS NETWORKDAYS.INTL WEEKDAY WEEKNUM WORKDAY WORKDAY.INTL YEAR YEARFRAC`
  .trim().split(/\s+/));

/**
 * The native function of that name in a workbook that counts its days from 1904: functions of the calendar are refused, for here they count
 * from 1900; so is TEXT in a form of a date.
 */
export function nativeIn1904(name: string): Native | undefined {
  const native = nativeNamed(name);
  if (!native) return undefined;
  if (CALENDAR.has(name)) return { ...native, body: () => refused(name) };
  return name === 'TEXT' ? { ...native, body: (run, args) => (isDateForm(run, args[1]) ? refused(name) : native.body(run, args)) } : native;
}

const refused = (name: string): never => refuseUse(name, 'the workbook counts its days from 1904');

const isDateForm = (run: Run, form: Value | undefined): boolean =>
  form !== undefined && run.matrix(form).cells.some((s) => s.k === 'text' && /[dmy]/i.test(s.v.replace(/"[^"]*"|\\./g, '').replace(/\[[^\]]*\]/g, '')));
