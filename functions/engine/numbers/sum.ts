/**
 * Sum with the rounding of each addition carried along (Neumaier's variant of compensated summation).
 *
 * @param values   Any length; 0 for none.
 * @returns        Relative error about 1e-16 of the result plus n · 1e-32 of the sum of magnitudes.
 * @source         A. Neumaier, Z. Angew. Math. Mech. 54 (1974) 39–51.
 * @example        sum([1, 1e100, 1, -1e100]) // 2
 */
export function sum(values: ArrayLike<number>): number {
  let total = 0;
  let lost = 0;
  for (let i = 0; i < values.length; i++) {
    const x = values[i];
    const next = total + x;
    lost += Math.abs(total) >= Math.abs(x) ? total - next + x : x - next + total;
    total = next;
  }
  return Number.isFinite(lost) ? total + lost : total;
}
