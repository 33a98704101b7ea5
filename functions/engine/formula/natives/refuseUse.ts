import { EngineError } from '../../EngineError';

/** Refuses a call whose result in the sheet is not known for certain; `why` completes the sentence. */
export function refuseUse(name: string, why: string): never {
  throw new EngineError('refused', `uses ${name} in a way that cannot be followed: ${why}`);
}
