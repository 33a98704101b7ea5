import { CellGraph, type CellPlace } from '../engine/graph/cellGraph';
import type { WorkbookPort } from '../workbook';
import { Snapshot } from './Snapshot';

/** A workbook that is being followed: what was read of it, and the graph of its cells. */
export interface Followed {
  readonly snapshot: Snapshot;
  readonly graph: CellGraph;
}

const latest = new WeakMap<WorkbookPort, { revision: number; followed: Promise<Followed> }>();

/** The graph of the workbook behind a port; calls that see the same revision share one. */
export function follow(port: WorkbookPort): Promise<Followed> {
  const revision = port.revision();
  const known = latest.get(port);
  if (known?.revision === revision) return known.followed;
  const followed = Snapshot.open(port).then((snapshot) => ({ snapshot, graph: new CellGraph(snapshot) }));
  latest.set(port, { revision, followed });
  return followed;
}

/** Evaluates cells, reading the workbook as far as they need it. */
export async function evaluateAll({ snapshot, graph }: Followed, places: readonly CellPlace[]): Promise<void> {
  while (!graph.evaluate(places)) {
    if (!(await snapshot.fetch())) throw new Error('cells stay open although nothing more is to be read');
  }
}

/** Lets the next call read the workbook anew. */
export function forget(port: WorkbookPort): void {
  latest.delete(port);
}
