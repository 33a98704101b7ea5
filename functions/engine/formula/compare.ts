import type { Scalar } from './scalar';

const RANK = { number: 0, blank: 0, text: 1, boolean: 2, error: 3 } as const;

/**
 * The order of two scalars that are no errors, as Excel compares them: numbers before text before booleans; text without regard
 * to case; blank equals 0, "" and FALSE; numbers that agree in 15 significant digits are equal.
 *
 * @returns negative, 0 or positive
 */
export function compare(a: Scalar, b: Scalar): number {
  if (a.k === 'blank' && b.k !== 'blank') return -compareWithBlank(b);
  if (b.k === 'blank' && a.k !== 'blank') return compareWithBlank(a);
  if (RANK[a.k] !== RANK[b.k]) return RANK[a.k] - RANK[b.k];
  if (a.k === 'number' && b.k === 'number') return compareNumbers(a.v, b.v);
  if (a.k === 'text' && b.k === 'text') return compareText(a.v, b.v);
  return Number(a.v) - Number(b.v);
}

/** Two numbers, equal where their 15 significant digits are. */
export function compareNumbers(a: number, b: number): number {
  if (a === b) return 0;
  if (Math.abs(a - b) <= 1e-14 * Math.abs(a) && a.toPrecision(15) === b.toPrecision(15)) return 0;
  return a < b ? -1 : 1;
}

/** Two texts without regard to case. */
export function compareText(a: string, b: string): number {
  if (a === b) return 0;
  const x = a.toLowerCase();
  const y = b.toLowerCase();
  return x === y ? 0 : x.localeCompare(y, 'en');
}

function compareWithBlank(s: Scalar): number {
  switch (s.k) {
    case 'number':
      return Math.sign(s.v);
    case 'text':
      return s.v === '' ? 0 : 1;
    case 'boolean':
      return s.v ? 1 : 0;
    default:
      return 0;
  }
}
