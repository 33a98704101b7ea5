/**
 * The least x of an interval, to the last binary place, at which a condition holds that holds for all larger ones: bisection over the
 * doubles themselves, for quantiles whose distribution is known at both tails.
 *
 * @param low    Where it does not hold; finite, >= 0.
 * @param high   Where it holds; may be infinite.
 * @returns      Infinity where it holds for no double.
 * @example      firstWhere((x) => x * x >= 2, 0, Infinity) // 1.4142135623730951
 */
export function firstWhere(holds: (x: number) => boolean, low: number, high: number): number {
  let [below, above] = [low, high];
  if (above === Infinity) {
    above = Math.max(1, low * 2);
    while (!holds(above)) {
      below = above;
      above *= 2;
      if (above === Infinity) return Infinity;
    }
  }
  for (;;) {
    const middle = between(below, above);
    if (!(middle > below && middle < above)) return above;
    if (holds(middle)) above = middle;
    else below = middle;
  }
}

/** The geometric mean of numbers far apart, else the arithmetic one. */
function between(below: number, above: number): number {
  if (below === 0) return above > 1e-300 ? above * 1e-6 : above / 2;
  return above / below > 4 ? Math.sqrt(below) * Math.sqrt(above) : below + (above - below) / 2;
}
