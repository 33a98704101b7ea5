import type { CellResult } from '../cells';
import type { Carried, Outcome } from '../engine/carry/carry';
import { refusal } from '../errors';
import type { CarryCall } from './readCarryCall';

/**
 * Carries all results of a call, one after the other, and hands each to `use`; what cannot be trusted is an error in its own
 * place, and an empty result gives "".
 */
export function outcomes(call: CarryCall, width: number, use: (carried: Carried) => readonly CellResult[]): (readonly CellResult[])[] {
  const rows = call.results.map((place) => cellsOf(call.carry.result(place), width, use));
  refuseUnreached(call, rows.some(({ carried }) => carried));
  return rows.map(({ cells }) => cells);
}

/** The one result of a call. */
export function onlyOutcome(call: CarryCall): Carried | undefined {
  if (call.results.length !== 1) throw refusal(`result must be one cell, got ${call.results.length}`);
  const outcome = call.carry.result(call.results[0]);
  if (outcome.k === 'refused') throw refusal(outcome.message);
  if (outcome.k === 'empty') return undefined;
  refuseUnreached(call, true);
  return outcome;
}

/** Refuses the whole call if an input argument reaches none of the results. */
export function refuseUnreached(call: CarryCall, anyCarried: boolean): void {
  if (!anyCarried) return;
  const [unreached] = call.carry.unreachedArguments();
  if (unreached !== undefined) throw refusal(`${call.argumentName(unreached)} reaches no result: take it out, or look for a formula typed over`);
}

function cellsOf(outcome: Outcome, width: number, use: (carried: Carried) => readonly CellResult[]): { cells: readonly CellResult[]; carried: boolean } {
  switch (outcome.k) {
    case 'carried':
      return { cells: use(outcome), carried: true };
    case 'empty':
      return { cells: Array.from({ length: width }, () => ''), carried: false };
    case 'refused':
      return { cells: Array.from({ length: width }, () => refusal(outcome.message)), carried: false };
  }
}
