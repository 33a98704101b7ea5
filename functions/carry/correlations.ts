import type { CellResult } from '../cells';
import type { Carried, Outcome } from '../engine/carry/carry';
import { covariance } from '../engine/quantity/quantity';
import { refusal } from '../errors';
import { refuseUnreached } from './outcomes';
import type { CarryCall } from './readCarryCall';

/**
 * Correlation matrix of the results of a call, from the sources they share. A result that cannot be trusted spoils its row and
 * column only.
 *
 * @source JCGM 100:2008, F.1.2.3
 */
export function correlations(call: CarryCall): CellResult[][] {
  const outcomes = call.results.map((place) => call.carry.result(place));
  refuseUnreached(call, outcomes.some((o) => o.k === 'carried'));
  const components = outcomes.map((o) => (o.k === 'carried' ? new Map(o.effects.map((e) => [e.source, e.component])) : undefined));
  return outcomes.map((a, i) => outcomes.map((b, j) => correlation(call, a, b, () => covariance(components[i]!, components[j]!), i === j)));
}

function correlation(call: CarryCall, a: Outcome, b: Outcome, covariance: () => number, diagonal: boolean): CellResult {
  if (a.k === 'refused') return refusal(a.message);
  if (b.k === 'refused') return refusal(b.message);
  if (a.k === 'empty' || b.k === 'empty') return '';
  for (const { u, place } of [a, b]) if (u === 0) return refusal(`result cell ${call.followed.graph.placeName(place)} has no uncertainty, so no correlation`);
  if (diagonal) return 1;
  const words = undecided(call, a, b);
  if (words) return refusal(words);
  return Math.max(-1, Math.min(1, covariance() / (a.u * b.u)));
}

/** Two results fed by different cells of one evidence row that does not say whether they share their doubt. */
function undecided({ carry, followed: { graph } }: CarryCall, a: Carried, b: Carried): string | undefined {
  const cellOf = (result: Carried) => {
    const found = new Map<string, number>();
    for (const { parts, gross } of result.effects) {
      for (const { input, node } of parts) {
        const { evidence } = carry.inputs[input];
        if (gross > 0 && 'tags' in evidence && evidence.tags.k === 'none') found.set(evidence.row, node);
      }
    }
    return found;
  };
  const other = cellOf(b);
  for (const [row, node] of cellOf(a)) {
    const there = other.get(row);
    if (there === undefined || there === node) continue;
    return `the results depend on ${graph.nameOf(node)} and ${graph.nameOf(there)}, which one evidence row serves: write each (independent) or a tag (shared) in its tag column`;
  }
  return undefined;
}
