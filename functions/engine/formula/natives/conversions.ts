import { format } from 'numfmt';
import { toNumber } from '../coerce';
import { type Native, rangeFunction, scalarFunction } from '../native';
import { textNumber } from '../numberText';
import type { Run } from '../run';
import { type Scalar, type Text, BLANK, num, text } from '../scalar';
import { type Value } from '../value';

/** N, T, VALUE, TEXT: from one kind of value to another. */
export const conversions: Native[] = [
  rangeFunction('N', ['range'], (run, [value]) => first(run, value, (s) => {
    if (s.k === 'number' || s.k === 'error') return s;
    return s.k === 'boolean' ? run.steps.chosen(num(s.v ? 1 : 0), s) : run.steps.count(0, s);
  })),
  rangeFunction('T', ['range'], (run, [value]) => first(run, value, (s) =>
    s.k === 'text' || s.k === 'error' ? s : run.steps.chosen(text(''), s))),
  scalarFunction('VALUE', ['scalar'], (run, [s = BLANK]) =>
    s.k === 'boolean' ? run.steps.error('#VALUE!', s) : toNumber(run.steps, s)),
  scalarFunction('TEXT', ['scalar', 'text'], (run, [s = BLANK, pattern]) => formatted(run, s, (pattern as Text | undefined) ?? text(''))),
];

/** Of a reference only its first cell counts; a matrix is taken element by element. */
function first(run: Run, value: Value, body: (s: Scalar) => Scalar): Value {
  const one: Value = value.k === 'area' ? { ...value, r2: value.r1, c2: value.c1 } : value;
  return run.lift([one], () => 'scalar', (_run, [s = BLANK]) => body(s));
}

/**
 * A value written in an en-US number format. Text that reads as a number is taken as one, other text goes through the text
 * section; booleans stay as they are. A format that cannot be read, or a date before 1900, is #VALUE!.
 */
function formatted(run: Run, s: Scalar, pattern: Text): Scalar {
  if (s.k === 'error') return s;
  if (s.k === 'boolean') return run.steps.text(s.v ? 'TRUE' : 'FALSE', s, pattern);
  if (pattern.v === '') return run.steps.text('', s, pattern);
  const value = s.k === 'blank' ? 0 : s.k === 'text' ? (textNumber(s.v) ?? s.v) : s.v;
  try {
    return run.steps.text(format(pattern.v, value, { dateErrorThrows: true, dateSpanLarge: false }), s, pattern);
  } catch {
    return run.steps.error('#VALUE!', s, pattern);
  }
}
