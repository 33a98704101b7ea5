import { EngineError } from '../EngineError';
import { tFactor } from '../numbers/tQuantile';

export type CoverageShape = 'normal' | 't' | 'rectangular' | 'triangular' | 'trapezoidal' | 'arcsine';

export interface CoverageRequest {
  /** Coverage probability, in (0, 1). */
  readonly probability: number;
  /** Degrees of freedom, real, > 0; default `Infinity`. */
  readonly dof?: number;
  /** Default: t where the degrees of freedom are finite, else normal. */
  readonly shape?: CoverageShape;
  /** Length of the top of a trapezoid over that of its base, in [0, 1]; only and always for 'trapezoidal'. */
  readonly edgeRatio?: number;
}

/**
 * Half-length of the symmetric interval that holds a given probability, in units of the standard uncertainty.
 *
 * @returns   k > 0, dimensionless. 'normal' is normal whatever the degrees of freedom.
 * @throws    EngineError "domain" if the probability is not between 0 and 1, nu <= 0, the edge ratio is missing or outside [0, 1], or
 *            a shape with sharp limits comes with finite degrees of freedom (its limits would not be sharp).
 * @source    JCGM 100:2008, G.1.3, G.3.4, 4.3.7 and 4.3.9; the four bounded shapes by integrating their densities.
 * @example   coverageFactor({ probability: 0.95, shape: 'rectangular' }) // 1.6454482671904334 = 0.95 √3
 */
export function coverageFactor(request: CoverageRequest): number {
  const { probability: p, dof = Infinity, edgeRatio } = request;
  const shape = request.shape ?? (dof < Infinity ? 't' : 'normal');
  if (!(p > 0 && p < 1)) throw new EngineError('domain', `coverageFactor needs a probability between 0 and 1, got ${p}`);
  if (!(dof > 0)) throw new EngineError('domain', `coverageFactor needs degrees of freedom > 0, got ${dof}`);
  if (shape === 't') return tFactor(p, dof);
  if (shape === 'normal') return tFactor(p, Infinity);
  if (dof < Infinity)
    throw new EngineError('domain', `coverageFactor needs infinite degrees of freedom for the shape ${shape}, got ${dof}`);
  switch (shape) {
    case 'rectangular':
      return Math.sqrt(3) * p;
    case 'triangular':
      return trapezoid(p, 0);
    case 'trapezoidal':
      if (!(edgeRatio !== undefined && edgeRatio >= 0 && edgeRatio <= 1))
        throw new EngineError('domain', `coverageFactor needs an edge ratio from 0 to 1 for a trapezoid, got ${edgeRatio ?? 'none'}`);
      return trapezoid(p, edgeRatio);
    case 'arcsine':
      return Math.SQRT2 * Math.sin((Math.PI / 2) * p);
    default:
      throw new EngineError('choice', `coverageFactor needs a known shape, got ${String(shape)}`);
  }
}

/** Trapezoid of half-base a = √(6/(1 + β²)) standard uncertainties and flat part ±βa. */
function trapezoid(p: number, beta: number): number {
  const a = Math.sqrt(6 / (1 + beta * beta));
  if (p * (1 + beta) <= 2 * beta) return (p * a * (1 + beta)) / 2; // inside the flat part
  const outside = (1 - p) * (1 - beta * beta);
  const inside = p + (1 - p) * beta * beta; // 1 − outside, and below 1 − √outside, without their cancellation at small p
  return (a * inside) / (1 + Math.sqrt(outside));
}
