import { toNumber } from '../coerce';
import { type Native, rangeFunction, scalarFunction } from '../native';
import { type ErrorCode, type Scalar, BLANK, FALSE, TRUE, bool, err, num } from '../scalar';
import { isReference } from '../value';
import { sizeOf } from './follow';
import { refuseUse } from './refuseUse';

const ERROR_NUMBERS: Partial<Record<ErrorCode, number>> = {
  '#NULL!': 1, '#DIV/0!': 2, '#VALUE!': 3, '#REF!': 4, '#NAME?': 5, '#NUM!': 6, '#N/A': 7, '#GETTING_DATA': 8,
  '#SPILL!': 9, '#CONNECT!': 10, '#BLOCKED!': 11, '#UNKNOWN!': 12, '#FIELD!': 13, '#CALC!': 14,
};

const TYPE_NUMBERS = { number: 1, blank: 1, text: 2, boolean: 4, error: 16 } as const;

/** What kind of value stands somewhere: the IS functions, NA, ERROR.TYPE, TYPE. All decide or count, with slope 0. */
export const information: Native[] = [
  is('ISNUMBER', (s) => s.k === 'number'),
  is('ISTEXT', (s) => s.k === 'text'),
  is('ISNONTEXT', (s) => s.k !== 'text'),
  is('ISBLANK', (s) => s.k === 'blank'),
  is('ISERROR', (s) => s.k === 'error'),
  is('ISERR', (s) => s.k === 'error' && s.v !== '#N/A'),
  is('ISNA', (s) => s.k === 'error' && s.v === '#N/A'),
  is('ISLOGICAL', (s) => s.k === 'boolean'),
  rangeFunction('ISREF', ['range'], (_run, [value]) => (isReference(value) ? TRUE : FALSE)),
  rangeFunction('ISFORMULA', ['range'], (run, [value]) => {
    if (value.k === 'error') return value;
    const areas = run.areas(value);
    if (areas?.length !== 1) return err('#VALUE!');
    if (sizeOf(run, areas[0])!.rows * sizeOf(run, areas[0])!.cols > 1) refuseUse('ISFORMULA', 'its range has several cells');
    return bool(run.formulaAt(areas[0].sheet, areas[0].r1, areas[0].c1) !== undefined);
  }, { shareable: false }),
  parity('ISEVEN', 0),
  parity('ISODD', 1),
  scalarFunction('NA', [], () => err('#N/A')),
  scalarFunction('ERROR.TYPE', ['scalar'], (run, [s = BLANK]) => {
    const n = s.k === 'error' ? ERROR_NUMBERS[s.v] : undefined;
    return n === undefined ? run.steps.error('#N/A', s) : run.steps.count(n, s);
  }),
  rangeFunction('TYPE', ['range'], (run, [value]) => {
    if (value.k === 'lambda') return num(128);
    if (value.k === 'union') return num(16);
    if (value.k === 'missing') return num(1);
    const m = run.matrix(value);
    if (m.rows * m.cols > 1) return num(64);
    const s = m.height * m.width > 0 ? m.cells[0] : m.fill;
    return run.steps.count(TYPE_NUMBERS[s.k], s);
  }),
];

function is(name: string, holds: (s: Scalar) => boolean): Native {
  return scalarFunction(name, ['scalar'], (run, [s = BLANK]) => run.steps.decision(holds(s), s));
}

/** ISEVEN and ISODD look at the whole part; a boolean is #VALUE!. */
function parity(name: string, remainder: 0 | 1): Native {
  return scalarFunction(name, ['scalar'], (run, [s = BLANK]) => {
    if (s.k === 'boolean') return run.steps.error('#VALUE!', s);
    const n = toNumber(run.steps, s);
    if (n.k === 'error') return n;
    return run.steps.decision(Math.abs(Math.trunc(n.v)) % 2 === remainder, n);
  });
}
