import { type Native, rangeFunction } from '../native';
import { numbersOf } from '../ranges';
import type { Run } from '../run';
import type { Num, Scalar } from '../scalar';
import type { Value } from '../value';
import { numberOf } from './argument';
import { type WithSlopes, ofNumbers } from './distribution';
import { errorFrom } from './linked';
import { refuseUse } from './refuseUse';

const or = (x: number, otherwise: number): number => (Number.isNaN(x) ? otherwise : x);

/** Functions of offices, for the audit of their workbooks: values without slopes. @source Excel's documentation of each */
export const finance: Native[] = [
  ofNumbers('PV', 3, 5, ([rate, n, payment, fv, due]) => [presentValue(rate, n, payment, or(fv, 0), due > 0 || due < 0 ? 1 : 0)]),
  ofNumbers('FV', 3, 5, ([rate, n, payment, pv, due]) => [futureValue(rate, n, payment, or(pv, 0), due > 0 || due < 0 ? 1 : 0)]),
  ofNumbers('PMT', 3, 5, ([rate, n, pv, fv, due]) => [payment(rate, n, pv, or(fv, 0), or(due, 0))]),
  ofNumbers('NPER', 3, 5, ([rate, pay, pv, fv, due]) => {
    const [future, type] = [or(fv, 0), or(due, 0) === 0 ? 0 : 1];
    if (rate === 0) return pay === 0 ? '#NUM!' : [-(pv + future) / pay];
    const level = (pay * (1 + rate * type)) / rate;
    return [Math.log((level - future) / (level + pv)) / Math.log1p(rate)];
  }),
  ofNumbers('IPMT', 4, 6, ([rate, period, n, pv, fv, due]) =>
    (period >= 1 && period < n + 1 ? [interest(rate, period, n, pv, or(fv, 0), or(due, 0))] : '#NUM!')),
  ofNumbers('PPMT', 4, 6, ([rate, period, n, pv, fv, due]) => (period >= 1 && period < n + 1
    ? [payment(rate, n, pv, or(fv, 0), or(due, 0)) - interest(rate, period, n, pv, or(fv, 0), or(due, 0))] : '#NUM!')),
  ofNumbers('CUMIPMT', 6, 6, (args) => accumulated(args, (rate, k, n, pv, due) => interest(rate, k, n, pv, 0, due))),
  ofNumbers('CUMPRINC', 6, 6, (args) => accumulated(args, (rate, k, n, pv, due) => payment(rate, n, pv, 0, due) - interest(rate, k, n, pv, 0, due))),
  ofNumbers('RATE', 3, 6, ([n, pay, pv, fv, due, guess]) => {
    if (!(n > 0)) return '#NUM!';
    const type = or(due, 0) === 0 ? 0 : 1;
    return [root('RATE', (r) => -futureValue(r, n, pay, pv, type) + or(fv, 0), or(guess, 0.1))];
  }),
  ofNumbers('SLN', 3, 3, ([cost, salvage, life]) => (life === 0 ? '#DIV/0!' : [(cost - salvage) / life])),
  ofNumbers('SYD', 4, 4, ([cost, salvage, life, period]) =>
    (life > 0 && salvage >= 0 && period >= 1 && period <= life ? [((cost - salvage) * (life - period + 1) * 2) / (life * (life + 1))] : '#NUM!')),
  ofNumbers('DDB', 4, 5, ([cost, salvage, life, period, factor]) => doubleDeclining(cost, salvage, life, period, or(factor, 2))),
  ofNumbers('DB', 4, 5, ([cost, salvage, life, period, month]) => fixedDeclining(cost, salvage, life, period, or(month, 12))),
  ofNumbers('EFFECT', 2, 2, ([nominal, periods]) => {
    const n = Math.trunc(periods);
    return nominal > 0 && n >= 1 ? [Math.expm1(n * Math.log1p(nominal / n))] : '#NUM!';
  }),
  ofNumbers('NOMINAL', 2, 2, ([effect, periods]) => {
    const n = Math.trunc(periods);
    return effect > 0 && n >= 1 ? [n * Math.expm1(Math.log1p(effect) / n)] : '#NUM!';
  }),
  ofNumbers('RRI', 3, 3, ([n, pv, fv]) => (n > 0 && pv !== 0 && fv / pv >= 0 ? [(fv / pv) ** (1 / n) - 1] : '#NUM!')),
  ofNumbers('PDURATION', 3, 3, ([rate, pv, fv]) => (rate > 0 && pv > 0 && fv > 0 ? [(Math.log(fv) - Math.log(pv)) / Math.log1p(rate)] : '#NUM!')),
  rangeFunction('NPV', ['number', 'range'], (run, [rate, ...flows]) => overFlows(run, flows, [rate], (values, [r]) =>
    (r === -1 ? '#DIV/0!' : [values.reduce((sum, v, i) => sum + v / (1 + r) ** (i + 1), 0)])), { args: [2, 254], repeating: 1 }),
  rangeFunction('IRR', ['range', 'number'], (run, [flows, guess]) => overFlows(run, [flows], guess === undefined ? [] : [guess], (values, [start = 0.1]) => {
    if (!values.some((v) => v > 0) || !values.some((v) => v < 0)) return '#NUM!';
    return [root('IRR', (r) => values.reduce((sum, v, i) => sum + v / (1 + r) ** i, 0), start)];
  }), { args: [1, 2] }),
  ofNumbers('ISPMT', 4, 4, ([rate, period, n, pv]) => (n === 0 ? '#DIV/0!' : [pv * rate * (period / n - 1)])),
  ofNumbers('DOLLARDE', 2, 2, ([written, parts]) => {
    const n = Math.trunc(parts);
    if (n < 1) return n < 0 ? '#NUM!' : '#DIV/0!';
    const whole = Math.trunc(written);
    return [whole + ((written - whole) * 10 ** Math.ceil(Math.log10(n))) / n];
  }),
  ofNumbers('DOLLARFR', 2, 2, ([value, parts]) => {
    const n = Math.trunc(parts);
    if (n < 1) return n < 0 ? '#NUM!' : '#DIV/0!';
    const whole = Math.trunc(value);
    return [whole + ((value - whole) * n) / 10 ** Math.ceil(Math.log10(n))];
  }),
  rangeFunction('FVSCHEDULE', ['number', 'range'], (run, [principal, rates]) => overFlows(run, [rates], [principal], (values, [sum]) =>
    [values.reduce((product, r) => product * (1 + r), sum)])),
  rangeFunction('XNPV', ['number', 'range', 'range'], (run, [rate, flows, days]) => datedFlows(run, flows, days, [rate], (values, at, [r]) =>
    (r > 0 ? [datedValue(values, at, r)] : '#NUM!'))),
  rangeFunction('XIRR', ['range', 'range', 'number'], (run, [flows, days, guess]) =>
    datedFlows(run, flows, days, guess === undefined ? [] : [guess], (values, at, [start = 0.1]) => {
      if (!values.some((v) => v > 0) || !values.some((v) => v < 0)) return '#NUM!';
      return [root('XIRR', (r) => datedValue(values, at, r), start)];
    }), { args: [2, 3] }),
  rangeFunction('MIRR', ['range', 'number', 'number'], (run, [flows, paid, earned]) => overFlows(run, [flows], [paid, earned], (values, [out, back]) => {
    const n = values.length;
    const at = (rate: number, keep: (v: number) => boolean): number => values.reduce((sum, v, i) => sum + (keep(v) ? v / (1 + rate) ** i : 0), 0);
    const [costs, gains] = [at(out, (v) => v < 0), at(back, (v) => v > 0)];
    if (costs === 0 || gains === 0 || n < 2) return '#DIV/0!';
    return [((-gains * (1 + back) ** (n - 1)) / costs) ** (1 / (n - 1)) - 1];
  })),
];

/** ((1 + rate)^n − 1) / rate, n at rate 0. */
const annuity = (rate: number, n: number): number => (rate === 0 ? n : Math.expm1(n * Math.log1p(rate)) / rate);

const futureValue = (rate: number, n: number, pay: number, pv: number, type: number): number =>
  -(pv * (1 + rate) ** n + pay * (1 + rate * type) * annuity(rate, n));

const presentValue = (rate: number, n: number, pay: number, fv: number, type: number): number =>
  -(fv + pay * (1 + rate * type) * annuity(rate, n)) / (1 + rate) ** n;

function payment(rate: number, n: number, pv: number, fv: number, due: number): number {
  return n === 0 ? NaN : -(pv * (1 + rate) ** n + fv) / ((1 + rate * (due === 0 ? 0 : 1)) * annuity(rate, n));
}

/** The interest part of a payment: of what is owed at the end of the period before; the first at the beginning of a period is 0. */
function interest(rate: number, period: number, n: number, pv: number, fv: number, due: number): number {
  const type = due === 0 ? 0 : 1;
  const pay = payment(rate, n, pv, fv, due);
  if (type === 1) return period === 1 ? 0 : (futureValue(rate, period - 2, pay, pv, 1) - pay) * rate;
  return futureValue(rate, period - 1, pay, pv, 0) * rate;
}

function accumulated([rate, n, pv, from, to, due]: number[], part: (rate: number, k: number, n: number, pv: number, due: number) => number): WithSlopes {
  const [first, last] = [Math.trunc(from), Math.trunc(to)];
  if (!(rate > 0 && n > 0 && pv > 0) || first < 1 || last < first || last > n || (due !== 0 && due !== 1)) return '#NUM!';
  let sum = 0;
  for (let k = first; k <= last; k++) sum += part(rate, k, n, pv, due);
  return [sum];
}

function doubleDeclining(cost: number, salvage: number, life: number, period: number, factor: number): WithSlopes {
  if (cost < 0 || salvage < 0 || !(life > 0 && factor > 0) || period < 1 || period > life) return '#NUM!';
  if (!Number.isInteger(period)) refuseUse('DDB', 'its period is not whole');
  let left = cost;
  let lost = 0;
  for (let k = 1; k <= period; k++) {
    lost = Math.max(0, Math.min(left * Math.min(1, factor / life), left - salvage));
    left -= lost;
  }
  return [lost];
}

/** DB: the rate is rounded to three decimal places; the first year may have fewer than twelve months, the rest follow at the end. */
function fixedDeclining(cost: number, salvage: number, life: number, period: number, month: number): WithSlopes {
  if (cost < 0 || salvage < 0 || !(life > 0) || period < 1 || month < 1 || month > 12 || period > life + (month < 12 ? 1 : 0)) return '#NUM!';
  if (![life, period, month].every(Number.isInteger) || cost === 0) refuseUse('DB', 'its periods are not whole, or it costs nothing');
  const rate = Math.round((1 - (salvage / cost) ** (1 / life)) * 1000) / 1000;
  let left = cost;
  let lost = 0;
  for (let k = 1; k <= period; k++) {
    lost = left * rate * (k === 1 ? month / 12 : k === life + 1 ? (12 - month) / 12 : 1);
    left -= lost;
  }
  return [lost];
}

/** A rate at which a value is 0, by Newton's steps from a guess; refused where they do not settle, for the sheet may find another. */
function root(name: string, of: (rate: number) => number, guess: number): number {
  let rate = guess;
  for (let i = 0; i < 100; i++) {
    const h = 1e-6 * Math.max(1, Math.abs(rate));
    const slope = (of(rate + h) - of(rate - h)) / (2 * h);
    const step = of(rate) / slope;
    if (!Number.isFinite(step) || rate - step <= -1) break;
    rate -= step;
    if (Math.abs(step) <= 1e-14 * Math.max(1, Math.abs(rate))) return rate;
  }
  return refuseUse(name, 'no rate is found from its guess');
}

function overFlows(run: Run, flows: readonly Value[], options: readonly Value[], of: (values: number[], options: number[]) => WithSlopes): Scalar {
  const given = options.map((o) => run.scalar(o));
  for (const s of given) if (s.k === 'error') return s;
  const xs: Num[] | Scalar = numbersOf(run, flows);
  if ('k' in xs) return xs;
  const found = xs.length === 0 ? '#NUM!' : of(xs.map((x) => x.v), given.map((s) => numberOf(s).v));
  return typeof found === 'string' ? errorFrom(run, found, [...xs, ...given]) : run.steps.many(found[0], [...xs, ...given], NaN);
}

/** Flows on days, discounted to the first of them by the year of 365 days. */
const datedValue = (values: readonly number[], days: readonly number[], rate: number): number =>
  values.reduce((sum, v, i) => sum + v / (1 + rate) ** ((days[i] - days[0]) / 365), 0);

/** Flows with their days; refused where cells are missing or hold no number, for a flow and its day must stay together. */
function datedFlows(
  run: Run, flows: Value, days: Value, options: readonly Value[], of: (values: number[], days: number[], options: number[]) => WithSlopes,
): Scalar {
  const pairs = [flows, days].map((v) => run.matrix(v).cells);
  const wrong = pairs.flat().find((s) => s.k !== 'number');
  if (wrong) return wrong.k === 'error' ? wrong : refuseUse('XNPV or XIRR', 'a flow or a day is no number');
  if (pairs[0].length !== pairs[1].length) return errorFrom(run, '#NUM!', pairs.flat());
  const given = options.map((o) => run.scalar(o));
  for (const s of given) if (s.k === 'error') return s;
  const [values, at] = pairs.map((cells) => cells.map((s) => (s as Num).v));
  const dates = at.map(Math.trunc);
  const found = dates.length === 0 || dates.some((d) => d < dates[0]) ? '#NUM!' : of(values, dates, given.map((s) => numberOf(s).v));
  return typeof found === 'string' ? errorFrom(run, found, [...pairs.flat(), ...given]) : run.steps.many(found[0], [...pairs.flat(), ...given], NaN);
}
