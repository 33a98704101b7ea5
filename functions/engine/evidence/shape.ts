import { EngineError } from '../EngineError';
import type { CoverageShape } from '../coverage/coverageFactor';

/** Distribution that is attributed to an input. */
export interface Shape {
  readonly kind: CoverageShape;
  /** Length of the top of a trapezoid over that of its base, in [0, 1]; only and always for 'trapezoidal'. */
  readonly edgeRatio?: number;
}

export const shapeChoices = 'normal, rectangular, triangular, trapezoidal 0.5 (top over base), arcsine, t';

/**
 * Reads a shape as it stands in a cell. Case and outer blanks do not matter; the edge ratio takes a decimal point or comma.
 *
 * @returns   undefined for empty text: the default of whoever asks.
 * @throws    EngineError "choice" if the text names no shape, "domain" if the edge ratio is missing or not from 0 to 1.
 * @example   parseShape('Trapezoidal 0.5') // { kind: 'trapezoidal', edgeRatio: 0.5 }
 */
export function parseShape(text: string): Shape | undefined {
  const words = text.trim().toLowerCase().split(/\s+/);
  if (words[0] === '') return undefined;
  if (words[0] === 'trapezoidal' && words.length <= 2) return { kind: 'trapezoidal', edgeRatio: readEdgeRatio(words[1]) };
  const kind = words.length === 1 ? plainKinds.find((name) => name === words[0]) : undefined;
  if (kind === undefined) throw new EngineError('choice', `shape needs one of ${shapeChoices}, got "${text.trim()}"`);
  return { kind };
}

/** The text that parseShape reads back. */
export function formatShape(shape: Shape): string {
  return shape.kind === 'trapezoidal' ? `trapezoidal ${requireEdgeRatio(shape)}` : shape.kind;
}

/**
 * Half-width over standard uncertainty for a shape with sharp limits: √3, √6, √(6/(1 + β²)), √2.
 *
 * @throws   EngineError "choice" for normal and t, which have no limits.
 * @source   JCGM 100:2008, 4.3.7 and 4.3.9; JCGM 101:2008, 6.4.2 to 6.4.6.
 */
export function halfWidthDivisor(shape: Shape, who = 'halfWidthDivisor'): number {
  switch (shape.kind) {
    case 'rectangular':
      return Math.sqrt(3);
    case 'triangular':
      return Math.sqrt(6);
    case 'trapezoidal':
      return Math.sqrt(6 / (1 + requireEdgeRatio(shape) ** 2));
    case 'arcsine':
      return Math.SQRT2;
    default:
      throw new EngineError(
        'choice',
        `${who} needs a shape with limits (rectangular, triangular, trapezoidal, arcsine), got ${shape.kind}`,
      );
  }
}

const plainKinds = ['normal', 'rectangular', 'triangular', 'arcsine', 't'] as const;

function readEdgeRatio(word: string | undefined): number {
  if (word === undefined) throw new EngineError('domain', 'trapezoidal needs its edge ratio, as in "trapezoidal 0.5", got none');
  const number = /^(\d+([.,]\d*)?|[.,]\d+)$/.test(word) ? Number(word.replace(',', '.')) : NaN;
  if (!(number >= 0 && number <= 1)) throw new EngineError('domain', `trapezoidal needs an edge ratio from 0 to 1, got "${word}"`);
  return number;
}

function requireEdgeRatio(shape: Shape): number {
  const { edgeRatio } = shape;
  if (!(edgeRatio !== undefined && edgeRatio >= 0 && edgeRatio <= 1))
    throw new EngineError('domain', `trapezoidal needs an edge ratio from 0 to 1, got ${edgeRatio ?? 'none'}`);
  return edgeRatio;
}
