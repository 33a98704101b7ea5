/** A number as it was written: sign × digits × 10^exponent exactly, and which of its digits are significant. */
export interface Entry {
  /** Whole, with its sign. */
  readonly steps: bigint;
  /** Power of ten of one step: the last digit written. */
  readonly exponent: number;
  /** Power of ten of the last significant digit; −Infinity for an exact number. */
  readonly place: number;
}

/** Count of significant figures; infinite for an exact number, 0 for a zero. */
export function figuresOf({ steps, exponent, place }: Entry): number {
  if (place === -Infinity) return Infinity;
  return steps === 0n ? 0 : leadOf(steps, exponent) - place + 1;
}

/** Power of ten of the leading digit of steps × 10^exponent, steps other than 0. */
export const leadOf = (steps: bigint, exponent: number): number => exponent + (steps < 0n ? -steps : steps).toString().length - 1;
