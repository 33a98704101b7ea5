import { expect } from 'vitest';

/** A published figure: agreement to half a unit of its last printed place. */
export function expectPrinted(computed: unknown, printed: string): void {
  const [digits, exponent = '0'] = printed.toLowerCase().split('e');
  const places = digits.split('.')[1]?.length ?? 0;
  const half = 0.5 * 10 ** (Number(exponent) - places);
  // The half unit itself is binary; a thousandth of it more lets a figure lie on the edge.
  expect(Math.abs(Number(computed) - Number(printed)), `${String(computed)} is printed as ${printed}`).toBeLessThanOrEqual(half * 1.001);
}

/** Relative agreement; the caller says why the tolerance is what it is. */
export function expectRelative(computed: unknown, expected: number, tolerance: number): void {
  expect(Math.abs(Number(computed) / expected - 1), `${String(computed)} against ${expected}`).toBeLessThanOrEqual(tolerance);
}
