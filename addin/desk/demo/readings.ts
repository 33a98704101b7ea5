/**
 * A value as an instrument shows it: the nearest whole number of steps.
 * The step is `numerator / denominator` in whole numbers, so that the result is the double nearest to the decimal reading.
 * @example readAt(24.371, 2, 100) // 24.38
 */
export function readAt(value: number, numerator: number, denominator: number): number {
  return (Math.round((value * denominator) / numerator) * numerator) / denominator;
}

/** Serial number of a date in the 1900 system (valid from March 1900). */
export function dateSerial(year: number, month: number, day: number): number {
  return Math.round(Date.UTC(year, month - 1, day) / 86_400_000) + 25569;
}

/** Sum from left to right, as SUM and AVERAGE add. */
export function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}

export function average(values: readonly number[]): number {
  return sum(values) / values.length;
}

/** Sample standard deviation (n - 1), in two passes. */
export function sampleDeviation(values: readonly number[]): number {
  const mean = average(values);
  return Math.sqrt(sum(values.map((value) => (value - mean) * (value - mean))) / (values.length - 1));
}
