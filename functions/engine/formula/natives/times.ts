import { type Native, scalarFunction } from '../native';
import type { Run } from '../run';
import { BLANK, type Scalar } from '../scalar';
import { numberOf } from './argument';
import { toDate } from './dateArgument';
import { LAST_DAY } from './dateSystem';
import { readDateText } from './dateText';
import { stepped } from './dates';
import { refuseUse } from './refuseUse';
import { wholeOf } from './wholeOf';

const SECONDS = 86400;

/** The most that TIME takes for one of its arguments. */
const MOST = 32767;

/** Times of day. HOUR, MINUTE and SECOND first round to the second, as the sheet does; none has a slope (see `dates`). */
export const times: Native[] = [
  scalarFunction('TIME', ['number', 'number', 'number'], (run, args) => {
    const from = args.map(numberOf);
    const [h, m, s] = from.map(({ v }) => wholeOf('TIME', v));
    const total = h * 3600 + m * 60 + s;
    return stepped(run, total < 0 || Math.max(h, m, s) > MOST ? undefined : (total % SECONDS) / SECONDS, from);
  }),
  part('HOUR', (second) => Math.floor(second / 3600)),
  part('MINUTE', (second) => Math.floor(second / 60) % 60),
  part('SECOND', (second) => second % 60),
  scalarFunction('TIMEVALUE', ['scalar'], (run, [s = BLANK]) => {
    if (s.k === 'error') return s;
    const read = s.k === 'text' ? readDateText(s.v) : 'none';
    if (read === 'none' || s.k !== 'text') return run.steps.error('#VALUE!', s);
    if (read === 'unknown') refuseUse('TIMEVALUE', `"${s.v}" may be a time in a form that is not read here`);
    return run.steps.fromText(read.clock, s);
  }),
];

/** A part of the time of day, of the number of its second. Refused within a millisecond of half a second. */
function part(name: string, of: (second: number) => number): Native {
  return scalarFunction(name, ['scalar'], (run, [s = BLANK]) => ofTime(run, name, s, of));
}

function ofTime(run: Run, name: string, s: Scalar, of: (second: number) => number): Scalar {
  const at = toDate(run, name, s);
  if (at.k === 'error') return at;
  if (at.v < 0 || at.v >= LAST_DAY + 1) return stepped(run, undefined, [at]);
  const seconds = (at.v - Math.floor(at.v)) * SECONDS;
  if (Math.abs(seconds - Math.floor(seconds) - 0.5) < 1e-3) refuseUse(name, 'the time lies at half a second');
  return stepped(run, of(Math.round(seconds) % SECONDS), [at]);
}
