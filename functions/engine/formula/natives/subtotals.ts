import { holdsSubtotal } from '../holdsSubtotal';
import type { Native } from '../native';
import { rangeFunction } from '../native';
import type { Run } from '../run';
import { BLANK, type Scalar } from '../scalar';
import { type Area, type Matrix, type Value } from '../value';
import { numberOf } from './argument';
import { counts } from './counts';
import { follow } from './follow';
import { quantiles } from './quantiles';
import { rankings } from './rankings';
import { ranks } from './ranks';
import { refuseUse } from './refuseUse';
import { spread } from './spread';
import { sums } from './sums';

const siblings = new Map([...counts, ...quantiles, ...rankings, ...ranks, ...spread, ...sums].map((native) => [native.name, native]));

/** By their numbers from 1. */
const OVER_RANGES = ['AVERAGE', 'COUNT', 'COUNTA', 'MAX', 'MIN', 'PRODUCT', 'STDEV.S', 'STDEV.P', 'SUM', 'VAR.S', 'VAR.P', 'MEDIAN', 'MODE.SNGL'];
/** From 14 on: these take one more number, and an array where the others want a reference. */
const OVER_ARRAYS = ['LARGE', 'SMALL', 'PERCENTILE.INC', 'QUARTILE.INC', 'PERCENTILE.EXC', 'QUARTILE.EXC'];
const SUBTOTALS = 11;

/** What a call leaves out. */
interface PassOver {
  readonly nested: boolean;
  readonly errors: boolean;
  /** Rows hidden by hand, rows left out by a filter; undefined where it is not known what the sheet does. */
  readonly hidden: boolean;
  readonly filtered: boolean | undefined;
}

/**
 * SUBTOTAL and AGGREGATE: another function over the cells that are left when rows that do not show, cells that are subtotals
 * themselves, or errors are passed over. Which rows show is no number, so it decides without a slope; an error that was passed over
 * leaves a link.
 *
 * @source Excel's documentation of SUBTOTAL and AGGREGATE
 */
export const subtotals: Native[] = [
  rangeFunction('SUBTOTAL', ['number', 'range'], (run, [code, ...ranges]) => {
    const given = run.scalar(code);
    if (given.k === 'error') return given;
    const n = Math.trunc(numberOf(given).v);
    const name = OVER_RANGES[(n > 100 ? n - 100 : n) - 1];
    if (name === undefined || (n > 100 ? n - 100 : n) > SUBTOTALS) return run.steps.error('#VALUE!', given);
    const passOver: PassOver = { nested: true, errors: false, hidden: n > 100, filtered: true };
    return follow(run, overReferences(run, 'SUBTOTAL', name, ranges, passOver), given);
  }, { args: [2, 255], repeating: 1, shareable: false }),

  rangeFunction('AGGREGATE', ['number', 'number', 'range', 'range'], (run, [code, option, ...rest]) => {
    const given = run.scalar(code);
    const how = option.k === 'missing' ? undefined : run.scalar(option);
    for (const s of [given, how]) if (s?.k === 'error') return s;
    const n = Math.trunc(numberOf(given).v);
    const passOver = optionOf(Math.trunc(numberOf(how).v));
    const deciders = how ? [given, how] : [given];
    if (passOver && n >= 1 && n <= OVER_RANGES.length) return follow(run, overReferences(run, 'AGGREGATE', OVER_RANGES[n - 1], rest, passOver), ...deciders);
    const ranked = OVER_ARRAYS[n - 1 - OVER_RANGES.length];
    if (!passOver || ranked === undefined || rest.length !== 2) return run.steps.error('#VALUE!', ...deciders);
    const k = run.scalar(rest[1]);
    if (k.k === 'error') return k;
    if (k.k !== 'number') refuseUse('AGGREGATE', 'its last argument is no number');
    return follow(run, siblings.get(ranked)!.body(run, [kept(run, 'AGGREGATE', rest[0], passOver), k]), ...deciders);
  }, { args: [3, 255], repeating: 1, shareable: false }),
];

function optionOf(option: number): PassOver | undefined {
  if (!(option >= 0 && option <= 7)) return undefined;
  const hidden = option % 2 === 1;
  return { nested: option < 4, errors: option % 4 >= 2, hidden, filtered: hidden ? true : undefined };
}

function overReferences(run: Run, caller: string, name: string, ranges: readonly Value[], passOver: PassOver): Value {
  const areas: Area[] = [];
  for (const range of ranges) {
    if (range.k === 'error') return range;
    const own = run.areas(range);
    if (!own) return run.steps.error('#VALUE!');
    areas.push(...own);
  }
  return siblings.get(name)!.body(run, areas.map((area) => kept(run, caller, area, passOver)));
}

/** The cells of a range, blank where they are passed over. An array has neither rows that hide nor subtotals. */
function kept(run: Run, caller: string, value: Value, passOver: PassOver): Matrix {
  const m = run.matrix(value);
  const area = value.k === 'area' ? value : undefined;
  let cells: Scalar[] | undefined;
  for (let r = 0; r < m.height; r++) {
    const rowPassed = area !== undefined && isRowPassed(run, caller, area, r, passOver);
    for (let c = 0; c < m.width; c++) {
      const i = r * m.width + c;
      const s = m.cells[i];
      if (s.k === 'blank') continue;
      if (rowPassed || (area && passOver.nested && isSubtotal(run, area, r, c))) (cells ??= [...m.cells])[i] = BLANK;
      else if (s.k === 'error' && passOver.errors) (cells ??= [...m.cells])[i] = { k: 'blank', v: null, d: s.d };
    }
  }
  return cells ? { ...m, cells } : m;
}

function isRowPassed(run: Run, caller: string, area: Area, r: number, { hidden, filtered }: PassOver): boolean {
  const state = run.rowState(area.sheet, area.r1 + r);
  if (state === 'shown') return false;
  if (state === 'hidden') return hidden;
  return filtered ?? refuseUse(caller, `row ${area.r1 + r} is left out by a filter, and its option does not say what becomes of such rows`);
}

function isSubtotal(run: Run, area: Area, r: number, c: number): boolean {
  const formula = run.formulaAt(area.sheet, area.r1 + r, area.c1 + c);
  return formula !== undefined && holdsSubtotal(formula);
}
