import { type Native, rangeFunction } from '../native';
import { numbersOf } from '../ranges';
import type { Run } from '../run';
import { type Num, type Scalar } from '../scalar';
import type { Value } from '../value';
import { numberOf } from './argument';
import { errorFrom, linked } from './linked';

/**
 * Percentiles and quartiles: between two neighbours in ascending order the value goes in a straight line, so both have a slope, and
 * the fraction has one too.
 *
 * @source Excel's documentation of PERCENTILE.INC and PERCENTILE.EXC; Hyndman and Fan, The American Statistician 50 (1996) 361,
 *         definitions 7 and 6
 */
export const quantiles: Native[] = [
  ...['PERCENTILE', 'PERCENTILE.INC'].map((name) => percentile(name, inclusive)),
  percentile('PERCENTILE.EXC', exclusive),
  ...['QUARTILE', 'QUARTILE.INC'].map((name) => quartile(name, 0, 4, inclusive)),
  quartile('QUARTILE.EXC', 1, 3, exclusive),
];

/** The 0-based place in ascending order that belongs to a fraction, and its slope; undefined outside the numbers. */
type PlaceOf = (fraction: number, n: number) => { place: number; slope: number } | undefined;

function inclusive(fraction: number, n: number): ReturnType<PlaceOf> {
  return fraction >= 0 && fraction <= 1 ? { place: fraction * (n - 1), slope: n - 1 } : undefined;
}

function exclusive(fraction: number, n: number): ReturnType<PlaceOf> {
  const exact = fraction * (n + 1) - 1;
  const place = Math.abs(exact - Math.round(exact)) < 1e-12 * (n + 1) ? Math.round(exact) : exact; // 1/(n + 1) may be a unit in the last place short
  return fraction > 0 && fraction < 1 && place >= 0 && place <= n - 1 ? { place, slope: n + 1 } : undefined;
}

function percentile(name: string, placeOf: PlaceOf): Native {
  return rangeFunction(name, ['range', 'number'], (run, [from, k]) => {
    const fraction = run.scalar(k);
    return fraction.k === 'error' ? fraction : between(run, from, numberOf(fraction).v, fraction, 1, placeOf);
  });
}

function quartile(name: string, least: number, most: number, placeOf: PlaceOf): Native {
  return rangeFunction(name, ['range', 'number'], (run, [from, k]) => {
    const given = run.scalar(k);
    if (given.k === 'error') return given;
    const quarter = Math.trunc(numberOf(given).v);
    return between(run, from, quarter >= least && quarter <= most ? quarter / 4 : NaN, given, 0, placeOf);
  });
}

/** @param byFraction  1 where the fraction itself was given, 0 where it was cut off to quarters. */
function between(run: Run, from: Value, fraction: number, given: Scalar, byFraction: 0 | 1, placeOf: PlaceOf): Scalar {
  const over: Scalar[] = [];
  const xs: Num[] | Scalar = numbersOf(run, [from], over);
  if ('k' in xs) return xs;
  const found = xs.length === 0 ? undefined : placeOf(fraction, xs.length);
  if (!found) return errorFrom(run, '#NUM!', [...xs, ...over, given]);
  const order = xs.map((_, i) => i).sort((i, j) => xs[i].v - xs[j].v);
  const low = Math.min(Math.floor(found.place), xs.length - 1);
  const high = Math.min(low + 1, xs.length - 1);
  const part = found.place - low;
  const step = xs[order[high]].v - xs[order[low]].v;
  const slopes = new Float64Array(xs.length + 1);
  slopes[order[low]] += 1 - part;
  slopes[order[high]] += part;
  slopes[xs.length] = step * found.slope * byFraction;
  return linked(run, xs[order[low]].v + part * step, [...xs, given], slopes, over);
}
