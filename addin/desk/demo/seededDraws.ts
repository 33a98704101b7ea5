export interface Draws {
  /** Uniform in [0, 1). */
  uniform(): number;
  /** Normal with the given mean and standard deviation: sum of twelve uniforms, which is enough for invented readings. */
  normal(mean: number, deviation: number): number;
  /** One of the list. */
  pick<T>(list: readonly T[]): T;
}

/** Draws for the invented readings: a 32-bit linear congruential generator (factor 1664525, increment 1013904223; common practice). */
export function seededDraws(seed: number): Draws {
  let state = seed >>> 0;
  const uniform = (): number => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 4294967296;
  };
  const normal = (mean: number, deviation: number): number => {
    let sum = -6;
    for (let i = 0; i < 12; i += 1) sum += uniform();
    return mean + deviation * sum;
  };
  return { uniform, normal, pick: (list) => list[Math.floor(uniform() * list.length)] };
}
