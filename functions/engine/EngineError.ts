/** The closed list of reasons for which the engine refuses its input. */
export type EngineErrorKind =
  | 'domain' // a number outside what the function is defined for
  | 'shape' // lengths or dimensions that do not agree
  | 'text' // text that cannot be read
  | 'choice' // a word that is not one of those offered
  | 'notFinite' // a result that is not a finite number
  | 'refused'; // cells that cannot be followed safely

/**
 * The only exception the engine throws on purpose. The message says who needs what, what was given and where, without a full
 * stop: `effectiveDof needs nu > 0, got -2 at index 1`. Any other exception is a bug.
 */
export class EngineError extends Error {
  override name = 'EngineError';

  constructor(
    readonly kind: EngineErrorKind,
    message: string,
  ) {
    super(message);
  }
}
