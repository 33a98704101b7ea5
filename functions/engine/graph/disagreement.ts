import { compareText } from '../formula/compare';
import { numberText } from '../formula/numberText';
import type { Scalar } from '../formula/scalar';
import type { CellContent } from './workbookView';

/**
 * Whether a recomputed value is what the cell shows, within max(1e-9 |y|, 1e-12 Σ|c x|) for numbers.
 *
 * @param turnover  Gives Σ|c x|, the size of the terms that made the value; asked for only where the first bound is exceeded.
 * @returns the rest of a sentence that begins with the cell where they differ, else undefined
 */
export function disagreement(computed: Scalar, shown: CellContent['value'], turnover: () => number): string | undefined {
  if (shown === undefined) return undefined;
  if (computed.k === 'number' && typeof shown === 'number') {
    const difference = Math.abs(computed.v - shown);
    if (difference <= 1e-9 * Math.abs(shown) || difference <= 1e-12 * turnover()) return undefined;
  } else if (computed.k === 'text' && typeof shown === 'string') {
    if (compareText(computed.v, shown) === 0) return undefined;
  } else if (computed.k === 'boolean' && typeof shown === 'boolean') {
    if (computed.v === shown) return undefined;
  } else if (computed.k === 'error' && typeof shown === 'object') {
    if (computed.v === shown.error) return undefined;
  }
  return `shows ${shownText(shown)}, but its formula gives ${valueText(computed)}: typed over, or not recalculated`;
}

export const shownText = (v: NonNullable<CellContent['value']>): string =>
  typeof v === 'object' ? v.error : typeof v === 'number' ? numberText(v) : typeof v === 'string' ? `"${v}"` : String(v).toUpperCase();

export function valueText(s: Scalar): string {
  switch (s.k) {
    case 'number':
      return numberText(s.v);
    case 'text':
      return `"${s.v}"`;
    case 'blank':
      return 'nothing';
    default:
      return String(s.v).toUpperCase();
  }
}
