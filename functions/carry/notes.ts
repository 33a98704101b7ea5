import type { Carried } from '../engine/carry/carry';
import type { CarryCall } from './readCarryCall';

/** What a reader of a result should know besides its numbers; each note a sentence without full stop. */
export function notesOn(call: CarryCall, result: Carried): string[] {
  const { graph } = call.followed;
  const notes: string[] = [];
  if (result.unchecked) notes.push('unchecked: the workbook holds no stored result to compare with');
  for (const { component, gross, source } of result.effects) {
    if (Math.abs(component) < gross / 2) notes.push(`the effects of ${sourceName(call, result, source)} cancel by more than half`);
  }
  const rounding = result.ancestors.filter((n) => roundsAt(call, n)).map((n) => graph.nameOf(n));
  if (rounding.length > 0) notes.push(`rounding inside formulas is passed over (${shortList(rounding)})`);
  notes.push(...doubleCounting(call, result));
  return notes;
}

/** The name of a source in a sentence: its tag, or the cells it belongs to. */
export function sourceName(call: CarryCall, result: Carried, source: number): string {
  const { tag } = call.carry.table.sources[source];
  if (tag !== '') return `tag "${tag}"`;
  const parts = result.effects.find((e) => e.source === source)!.parts;
  return shortList(parts.map((p) => call.followed.graph.nameOf(p.node)));
}

/** The first few names of a list. */
export function shortList(names: readonly string[]): string {
  const unique = [...new Set(names)];
  return unique.length > 5 ? `${unique.slice(0, 4).join(', ')} and ${unique.length - 4} more` : unique.join(', ');
}

function roundsAt({ followed: { graph } }: CarryCall, node: number): boolean {
  const { sheet, row, col } = graph.nodes;
  if (row.data[node] === 0) return false;
  return graph.programAt({ sheet: sheet.data[node], row: row.data[node], col: col.data[node] })?.rounds ?? false;
}

/** A formula cell with a doubt of its own above cells that already have Type A evidence. */
function doubleCounting({ carry, followed: { graph } }: CarryCall, result: Carried): string[] {
  const doubted = new Map<number, { formula: boolean; typeA: boolean }>();
  for (const { parts, source } of result.effects) {
    const { dof, shape } = carry.table.sources[source];
    for (const { node } of parts) {
      const before = doubted.get(node);
      doubted.set(node, { formula: hasEdges(graph.nodes, node), typeA: (before?.typeA ?? false) || (dof < Infinity && shape.kind === 't') });
    }
  }
  const notes: string[] = [];
  for (const [node, { formula }] of doubted) {
    if (!formula) continue;
    const below = [...doubted].filter(([other, d]) => other !== node && d.typeA && isAbove(graph.nodes, other, node)).map(([other]) => graph.nameOf(other));
    if (below.length > 0) {
      notes.push(`possible double counting: ${graph.nameOf(node)} has a doubt of its own, and ${shortList(below)} below it Type A evidence`);
    }
  }
  return notes;
}

const hasEdges = (nodes: CarryCall['followed']['graph']['nodes'], node: number): boolean => nodes.edge.data[node] < nodes.edge.data[node + 1];

/** Whether `ancestor` is read, directly or not, by `node`. */
function isAbove({ edge, parent }: CarryCall['followed']['graph']['nodes'], ancestor: number, node: number): boolean {
  const seen = new Set<number>([node]);
  const open = [node];
  while (open.length > 0) {
    const n = open.pop()!;
    for (let e = edge.data[n]; e < edge.data[n + 1]; e++) {
      const p = parent.data[e];
      if (p === ancestor) return true;
      if (p > ancestor && !seen.has(p)) {
        seen.add(p);
        open.push(p);
      }
    }
  }
  return false;
}
