/** Draws from a stream that a seed fixes. */
export interface Draws {
  /** Uniform between two limits. */
  between(low: number, high: number): number;
  /** The same items in another order. */
  shuffled<T>(items: readonly T[]): T[];
}

/** A small published generator (a Weyl sequence with a 32-bit mixing step), good enough to choose arguments of tests. */
export function seeded(seed: number): Draws {
  let state = seed >>> 0;
  const next = (): number => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return ((z ^ (z >>> 16)) >>> 0) / 2 ** 32;
  };
  return {
    between: (low, high) => low + (high - low) * next(),
    shuffled: (items) => {
      const left = [...items];
      return items.map(() => left.splice(Math.floor(next() * left.length), 1)[0]);
    },
  };
}
