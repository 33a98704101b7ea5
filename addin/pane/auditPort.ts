import { evaluateAll } from '../../functions/carry/followed';
import { Snapshot } from '../../functions/carry/Snapshot';
import { CellGraph } from '../../functions/engine/graph/cellGraph';
import type { WorkbookPort } from '../../functions/workbook';

/** What following every formula of a workbook shows. */
export interface PortAudit {
  readonly formulas: number;
  readonly agree: number;
  /** Formulas that call this library. */
  readonly library: number;
  /** Cells that cannot be followed or do not agree with what they show, each with why. */
  readonly refused: readonly { readonly sheet: string; readonly row: number; readonly col: number; readonly why: string }[];
}

/** Follows every formula of the workbook behind a port and compares it with what the sheet shows. Calls of the library are left out. */
export async function auditPort(port: WorkbookPort): Promise<PortAudit> {
  const snapshot = await Snapshot.open(port);
  const graph = new CellGraph(snapshot);
  const places: { sheet: number; row: number; col: number }[] = [];
  let library = 0;
  for (const [sheet, { name, rows, cols }] of snapshot.sheets.entries()) {
    if (rows === 0) continue;
    const [{ cells }] = await port.read([{ sheet: name, row: 1, col: 1, rows, cols }]);
    cells.forEach((cell, i) => {
      if (cell?.formula === undefined) return;
      if (/\bROOTSUM\./i.test(cell.formula)) library++;
      else places.push({ sheet, row: 1 + Math.floor(i / cols), col: 1 + (i % cols) });
    });
  }
  await evaluateAll({ snapshot, graph }, places);
  const refused = places.flatMap((place) => {
    const node = graph.node(place);
    const why = node === undefined ? undefined : graph.nodes.refusal[node]?.message;
    return why === undefined ? [] : [{ sheet: snapshot.sheets[place.sheet].name, row: place.row, col: place.col, why }];
  });
  return { formulas: places.length, agree: places.length - refused.length, library, refused };
}
