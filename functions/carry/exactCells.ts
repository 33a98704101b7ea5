import type { Carried } from '../engine/carry/carry';
import type { CellPlace } from '../engine/graph/cellGraph';
import type { CarryCall } from './readCarryCall';

/** A number that a result depends on and that was given no uncertainty. */
export interface TakenAsExact {
  readonly cells: readonly CellPlace[];
  /** A number literal inside a formula, as written. */
  readonly literal?: string;
}

/** The number cells and literals taken as exact; cells that stand below each other make one entry. */
export function takenAsExact({ followed: { graph } }: CarryCall, result: Carried): TakenAsExact[] {
  const { sheet, row, col } = graph.nodes;
  const placeOf = (node: number): CellPlace => ({ sheet: sheet.data[node], row: row.data[node], col: col.data[node] });
  const cells = result.exact.map(placeOf).sort((a, b) => a.sheet - b.sheet || a.col - b.col || a.row - b.row);
  const entries: { cells: CellPlace[]; literal?: string }[] = [];
  for (const place of cells) {
    const last = entries.at(-1)?.cells.at(-1);
    if (last && last.sheet === place.sheet && last.col === place.col && last.row + 1 === place.row) entries.at(-1)!.cells.push(place);
    else entries.push({ cells: [place] });
  }
  const literals = new Map<string, CellPlace[]>();
  for (const node of [...result.ancestors].reverse()) {
    if (row.data[node] === 0) continue;
    const program = graph.programAt(placeOf(node));
    const named = program?.names.flatMap((name) => graph.name(name, sheet.data[node])?.literals ?? []) ?? [];
    for (const literal of [...(program?.literals ?? []), ...named]) {
      const at = literals.get(literal);
      if (at) at.push(placeOf(node));
      else literals.set(literal, [placeOf(node)]);
    }
  }
  for (const [literal, places] of literals) entries.push({ cells: places, literal });
  return entries;
}
