import { evaluateAll, follow } from '../../functions/carry/followed';
import { labelOf } from '../../functions/carry/labelOf';
import type { PortArea, WorkbookPort } from '../../functions/workbook';

/** Cells with typed numbers on which results depend, that stand below one another. */
export interface InputGroup {
  readonly area: PortArea;
  readonly label: string;
}

export interface Inputs {
  readonly groups: readonly InputGroup[];
  /** Why some of the results cannot be followed, each named once. */
  readonly refusals: readonly string[];
}

/** Follows result cells down to the numbers that were typed. */
export async function inputsOf(port: WorkbookPort, results: PortArea): Promise<Inputs> {
  const followed = await follow(port);
  const { snapshot, graph } = followed;
  const sheet = snapshot.sheetIndex(results.sheet);
  if (sheet === undefined) return { groups: [], refusals: [`the workbook has no sheet ${results.sheet}`] };
  const places = Array.from({ length: results.rows * results.cols }, (_, i) => ({ sheet, row: results.row + Math.floor(i / results.cols), col: results.col + (i % results.cols) }));
  await evaluateAll(followed, places);
  const { nodes } = graph;
  const seen = new Set<number>();
  const queue = places.flatMap((place) => graph.node(place) ?? []);
  const refusals = new Set(queue.flatMap((node) => nodes.refusal[node]?.message ?? []));
  const leaves: { sheet: number; row: number; col: number }[] = [];
  while (queue.length > 0) {
    const node = queue.pop()!;
    if (seen.has(node)) continue;
    seen.add(node);
    const [from, to] = [nodes.edge.data[node], nodes.edge.data[node + 1]];
    for (let e = from; e < to; e++) queue.push(nodes.parent.data[e]);
    const place = { sheet: nodes.sheet.data[node], row: nodes.row.data[node], col: nodes.col.data[node] };
    const content = place.row === 0 ? undefined : snapshot.cell(place.sheet, place.row, place.col);
    if (content && content.formula === undefined && !content.partOf && typeof content.value === 'number') leaves.push(place);
  }
  leaves.sort((a, b) => a.sheet - b.sheet || a.col - b.col || a.row - b.row);
  const groups: { area: PortArea; label: string }[] = [];
  let last: (typeof leaves)[number] | undefined;
  for (const leaf of leaves) {
    if (last && last.sheet === leaf.sheet && last.col === leaf.col && last.row + 1 === leaf.row) {
      const group = groups[groups.length - 1];
      groups[groups.length - 1] = { ...group, area: { ...group.area, rows: group.area.rows + 1 } };
    } else groups.push({ area: { sheet: snapshot.sheets[leaf.sheet].name, row: leaf.row, col: leaf.col, rows: 1, cols: 1 }, label: await labelOf(snapshot, leaf) });
    last = leaf;
  }
  return { groups, refusals: [...refusals] };
}
