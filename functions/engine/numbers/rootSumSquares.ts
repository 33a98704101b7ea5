/**
 * Square root of the sum of squares, without overflow or underflow on the way.
 *
 * @param values   Any length; 0 for none. Signs do not matter.
 * @returns        >= 0, same unit; NaN if a value is; relative error a few 1e-16 whatever the length.
 * @example        rootSumSquares([3e200, 4e200]) // 5e200
 */
export function rootSumSquares(values: ArrayLike<number>): number {
  let largest = 0;
  for (let i = 0; i < values.length; i++) {
    const size = Math.abs(values[i]);
    if (Number.isNaN(size)) return NaN;
    if (size > largest) largest = size;
  }
  if (largest === 0 || !Number.isFinite(largest)) return largest;
  // Division by a power of two is exact, so scaling adds no rounding. Kept off 2^-1074, whose inverse is not a number.
  const scale = 2 ** Math.max(-1000, Math.floor(Math.log2(largest)));
  let total = 0;
  let lost = 0;
  for (let i = 0; i < values.length; i++) {
    const s = values[i] / scale;
    const square = s * s;
    const next = total + square;
    lost += total >= square ? total - next + square : square - next + total;
    total = next;
  }
  return scale * Math.sqrt(total + lost);
}
