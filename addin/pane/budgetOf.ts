import { evaluateAll, follow } from '../../functions/carry/followed';
import type { PortArea, WorkbookPort } from '../../functions/workbook';
import { addressOf, rowsOf } from './areas';
import type { CarryCall } from './carryCalls';
import { callFor, carryCalls } from './carryCalls';

/** What a cell's uncertainty is made of: the call that gives it, and its arguments as far as they reach this result. */
export interface ResultCall {
  readonly call: CarryCall;
  readonly result: PortArea;
  /** Where the call gives u of this result. */
  readonly u: PortArea;
  /** Inputs and evidence in turn; inputs that do not reach the result are left out. */
  readonly pairs: readonly PortArea[];
}

/** Finds the call that tells of the selected cell; words where there is none, or it cannot be repeated here. */
export async function resultCallFor(port: WorkbookPort, selected: PortArea): Promise<ResultCall | string> {
  const found = callFor(await carryCalls(port, selected.sheet), selected);
  if (!found) return 'Select a result whose uncertainty has been carried, or its u';
  const { call, result, index } = found;
  const reaches = await above(port, result);
  const elsewhere = `The call in ${addressOf({ ...call.at, rows: 1, cols: 1 })} cannot be repeated for one result here: write its budget with UNC_BUDGET`;
  const pairs: PortArea[] = [];
  for (let i = 0; i < call.pairs.length; i += 2) {
    const [input, evidence] = [call.pairs[i], call.pairs[i + 1]];
    if (!input || !evidence) return elsewhere;
    const rows = Array.from({ length: input.rows }, (_, r) => r).filter((r) => Array.from({ length: input.cols }, (_, c) => c).some((c) => reaches(input.sheet, input.row + r, input.col + c)));
    if (rows.length === 0) continue;
    const [first, last] = [rows[0], rows[rows.length - 1]];
    if (last - first + 1 !== rows.length) return elsewhere;
    pairs.push(rowsOf(input, first, rows.length), evidence.rows === input.rows ? rowsOf(evidence, first, rows.length) : evidence);
  }
  const u = call.name === 'UNC_REPORT' ? { ...call.at, row: call.at.row + index, col: call.at.col + 1, rows: 1, cols: 1 }
    : { ...call.at, row: call.at.row + Math.floor(index / call.results.cols), col: call.at.col + (index % call.results.cols), rows: 1, cols: 1 };
  return { call, result, u, pairs };
}

/** The cells on which a result depends, itself included. */
async function above(port: WorkbookPort, { sheet, row, col }: PortArea): Promise<(sheet: string, row: number, col: number) => boolean> {
  const followed = await follow(port);
  const { snapshot, graph } = followed;
  const place = { sheet: snapshot.sheetIndex(sheet)!, row, col };
  await evaluateAll(followed, [place]);
  const { nodes } = graph;
  const seen = new Set<string>();
  const known = new Set<number>();
  const queue = [graph.node(place) ?? []].flat();
  while (queue.length > 0) {
    const node = queue.pop()!;
    if (known.has(node)) continue;
    known.add(node);
    seen.add(`${nodes.sheet.data[node]} ${nodes.row.data[node]} ${nodes.col.data[node]}`);
    for (let e = nodes.edge.data[node]; e < nodes.edge.data[node + 1]; e++) queue.push(nodes.parent.data[e]);
  }
  return (name, r, c) => seen.has(`${snapshot.sheetIndex(name)} ${r} ${c}`);
}
