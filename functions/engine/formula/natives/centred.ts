import { sum } from '../../numbers/sum';

/** Numbers taken relative to their mean. */
export interface Centred {
  readonly mean: number;
  /** Each number minus the mean. */
  readonly left: Float64Array;
  /** The sum of their squares. */
  readonly squares: number;
}

/**
 * Deviations from the mean in two passes: first relative to the first number, so that a large common part costs no digits and
 * equal numbers give exactly 0, then relative to their mean, whose own rounding is removed.
 *
 * @param values   At least one.
 * @source         Chan, Golub, LeVeque, The American Statistician 37 (1983) 242.
 */
export function centred(values: readonly number[]): Centred {
  const n = values.length;
  const shifted = Float64Array.from(values, (x) => x - values[0]);
  const shift = sum(shifted) / n;
  const rough = shifted.map((x) => x - shift);
  const rest = sum(rough) / n;
  const left = rough.map((x) => x - rest);
  return { mean: values[0] + (shift + rest), left, squares: dot(left, left) };
}

/** The sum of products. */
export function dot(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let total = 0;
  for (let i = 0; i < a.length; i++) total += a[i] * b[i];
  return total;
}
