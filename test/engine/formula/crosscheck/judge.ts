import type { Outcome } from '../formulaOn';
import type { Numbers } from './job';

/**
 * Relative difference allowed between values: some twenty times what a double holds per step, over the few hundred roundings of
 * the longest of the functions.
 */
const VALUE = 1e-12;

/** Relative difference allowed between a slope and the numerical one. */
const SLOPE = 1e-6;

/** Step for an argument over the argument: small against its distance to any pole, corner or tie that the table's draws leave. */
const STEP = 0.004;

const stepOf = (x: number, step: number): number => step * Math.max(Math.abs(x), 0.25);

const LEVELS = [1, 0.5, 0.25];

/** The points at which another engine must evaluate: the estimates, then for each cell pairs at ±h, ±h/2, ±h/4. */
export function points(cells: Numbers, step = STEP): Numbers[] {
  const around = Object.entries(cells).flatMap(([name, x]) =>
    LEVELS.flatMap((level) => [1, -1].map((side) => ({ ...cells, [name]: x + side * level * stepOf(x, step) }))),
  );
  return [cells, ...around];
}

/**
 * What is wrong with our value and slopes in the light of another engine's values at `points(cells)`; empty if nothing is.
 *
 * The numerical slope is Richardson's combination of three central differences, in error by about (h/d)^6 / 64 of itself, d the
 * distance to the next pole (below 1e-10 here). Beside 1e-6 of the slope, a difference may hold what is left of the rounding of
 * values to 15 digits, 5e-15 of the larger of |y| and Σ|c x|, divided by the step: 1e-13 of it over h is ample, and 2.5e-11
 * |y/x| at the common step.
 */
export function judge(ours: Outcome, cells: Numbers, theirs: readonly (number | string)[], step = STEP): string[] {
  const wrong = theirs.find((v) => typeof v !== 'number');
  if (wrong !== undefined) return [`other engine gives ${wrong}`];
  const [y, ...around] = theirs as number[];
  if (typeof ours.value !== 'number') return [`value ${String(ours.value)}, other engine ${y}`];
  const found: string[] = [];
  if (!(Math.abs(ours.value - y) <= VALUE * Math.abs(y))) found.push(`value ${ours.value}, other engine ${y}`);
  const size = Object.entries(cells).reduce((s, [name, x]) => s + Math.abs((ours.slopes[name] ?? 0) * x), 0);
  Object.entries(cells).forEach(([name, x], i) => {
    const h = stepOf(x, step);
    const numerical = extrapolated(LEVELS.map((level, l) => {
      const up = around[(i * LEVELS.length + l) * 2];
      const down = around[(i * LEVELS.length + l) * 2 + 1];
      return (up - down) / (x + level * h - (x - level * h));
    }));
    const slope = ours.slopes[name];
    const noise = (1e-13 * Math.max(Math.abs(y), size)) / h;
    if (slope === undefined || !(Math.abs(slope - numerical) <= SLOPE * Math.abs(numerical) + noise)) {
      found.push(`slope by ${name} ${slope}, numerical ${numerical}`);
    }
  });
  return found;
}

/** Richardson's extrapolation of central differences with steps h, h/2, h/4 to step 0. */
function extrapolated([d1, d2, d4]: readonly number[]): number {
  const a = d2 + (d2 - d1) / 3;
  const b = d4 + (d4 - d2) / 3;
  return b + (b - a) / 15;
}
