import type { Run } from '../run';
import type { Err, Num, Scalar } from '../scalar';

/**
 * A number from many with their slopes (or one slope for all), which also depends, with slope 0, on what only decided: cells
 * that were passed over, options.
 */
export function linked(
  run: Run, value: number, from: readonly Scalar[], slopes: ArrayLike<number> | number, deciders: readonly Scalar[],
): Num | Err {
  if (deciders.length === 0) return run.steps.many(value, from, slopes);
  const slope = (i: number): number => (i >= from.length ? 0 : typeof slopes === 'number' ? slopes : slopes[i]);
  const all = Array.from({ length: from.length + deciders.length }, (_, i) => slope(i));
  return run.steps.many(value, [...from, ...deciders], all);
}

/** An error raised by many scalars. */
export function errorFrom(run: Run, code: Err['v'], by: readonly Scalar[]): Err {
  const d = run.steps.many(0, by, 0).d;
  return { k: 'error', v: code, d };
}
