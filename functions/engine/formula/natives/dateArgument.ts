import { toNumber } from '../coerce';
import { textNumber } from '../numberText';
import type { Run } from '../run';
import { type Err, type Num, type Scalar } from '../scalar';
import { LAST_DAY } from './dateSystem';
import { readDateText } from './dateText';
import { refuseUse } from './refuseUse';
import { wholeOf } from './wholeOf';

/** A scalar where a function wants a date or a time: a number as it is, text read as a number, else as a date or time. */
export function toDate(run: Run, name: string, s: Scalar): Num | Err {
  if (s.k !== 'text' || textNumber(s.v) !== undefined) return toNumber(run.steps, s);
  const read = readDateText(s.v);
  if (read === 'none') return run.steps.error('#VALUE!', s);
  if (read === 'unknown') refuseUse(name, `"${s.v}" may be a date in a form that is not read here`);
  return run.steps.fromText(read.day + read.clock, s);
}

/** The whole serial number of a date; undefined (#NUM!) outside the calendar of the sheet. */
export function serialIn(name: string, { v }: Num): number | undefined {
  if (v < 0) return undefined;
  const serial = wholeOf(name, v);
  return serial > LAST_DAY ? undefined : serial;
}
