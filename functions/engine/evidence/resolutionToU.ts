import { EngineError } from '../EngineError';

/**
 * Standard uncertainty that comes from a display or a scale being read to a step: rectangular, half-width of half the readable part.
 *
 * @param step       Smallest difference shown, or scale division; > 0.
 * @param readable   Part of a division that can be told apart, > 0: 1 for a digital display, 0.2 for a fifth of a division.
 * @returns          readable × step / √12.
 * @throws           EngineError "domain" if an argument is not positive and finite.
 * @source           JCGM 100:2008, F.2.2.1.
 * @example          resolutionToU(1) // 0.2886751345948129
 */
export function resolutionToU(step: number, readable = 1): number {
  if (!(step > 0 && step < Infinity)) throw new EngineError('domain', `resolutionToU needs a step > 0, got ${step}`);
  if (!(readable > 0 && readable < Infinity))
    throw new EngineError('domain', `resolutionToU needs a readable part > 0, got ${readable}`);
  return (readable * step) / Math.sqrt(12);
}
