import { expect } from 'vitest';
import { EngineError } from '../../../functions/engine/EngineError';
import type { EngineErrorKind } from '../../../functions/engine/EngineError';

/** Within a relative tolerance of a reference given as a number or as the digits of a table. */
export function expectRelative(actual: number, reference: number | string, tolerance: number, at: unknown = ''): void {
  const expected = Number(reference);
  const difference = expected === 0 ? Math.abs(actual) : Math.abs(actual / expected - 1);
  expect(difference <= tolerance, `${JSON.stringify(at)}: got ${actual}, reference ${reference}, relative ${difference}`).toBe(true);
}

/** Agrees with a printed figure to half a unit of its last place. */
export function expectPrinted(actual: number, printed: string, at: unknown = ''): void {
  const places = printed.split('.')[1]?.length ?? 0;
  const half = 0.5 * 10 ** -places;
  // 1e-12: binary rounding of the bound itself.
  const agrees = Math.abs(actual - Number(printed)) <= half + 1e-12 * Math.abs(actual);
  expect(agrees, `${JSON.stringify(at)}: got ${actual}, printed ${printed}`).toBe(true);
}

/** Refuses with an EngineError of that kind whose message holds the text and ends without a full stop. */
export function expectRefusal(act: () => unknown, kind: EngineErrorKind, text: string): void {
  let caught: unknown;
  try {
    act();
  } catch (error) {
    caught = error;
  }
  expect(caught).toBeInstanceOf(EngineError);
  const error = caught as EngineError;
  expect(error.kind).toBe(kind);
  expect(error.message).toContain(text);
  expect(error.message).not.toMatch(/\.$/);
}
