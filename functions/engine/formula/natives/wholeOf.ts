import { refuseUse } from './refuseUse';

/** So close below a whole number the sheet may go on to it, by rules that are not documented (for times, half a second). */
const CLOSE = 1e-5;

/**
 * The whole part of a number, as functions of dates, counts and codes take it. Refused where the sheet's own way is not sure:
 * closely below a whole number (`DATE(2025.9999999, 1, 1)` lies in 2026 there), and for negative fractions.
 */
export function wholeOf(name: string, x: number): number {
  const below = Math.floor(x);
  if (below === x) return x;
  if (x < 0) refuseUse(name, `${x} is a negative number that is not whole`);
  if (x - below > 1 - CLOSE) refuseUse(name, `${x} is very close to a whole number`);
  return below;
}
