import { coverageFor } from '../engine/coverage/coverageFor';
import type { Carried } from '../engine/carry/carry';
import { pairText } from '../engine/report/pairText';

/** The expanded uncertainty of a result and how it is stated. */
export interface Statement {
  readonly k: number;
  readonly p: number;
  readonly expanded: number;
  /** Degrees of freedom that the factor was taken with. */
  readonly nuUsed: number;
  /** Rounded, with ±, k stated. */
  readonly text: string;
}

/** States a result with a coverage as the user gave it; blank is k = 2, or t at 95.45 % below 50 degrees of freedom. */
export function statement(result: Carried, coverage: number | undefined, decimalSeparator: '.' | ','): Statement {
  const { k, p, nuUsed } = coverageFor(coverage, result.dof);
  const expanded = k * result.u;
  const text = result.u > 0 ? pairText(result.estimate, result.u, { k, decimalSeparator }) : `${result.estimate} exactly`;
  return { k, p, nuUsed, expanded, text };
}
