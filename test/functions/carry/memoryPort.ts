import { CellGraph } from '../../../functions/engine/graph/cellGraph';
import type { HiddenRows } from '../../../functions/engine/formula/rowState';
import type { PortArea, PortCell, WorkbookPort } from '../../../functions/workbook';
import { type Entry, Sheets } from '../../engine/graph/sheetsOf';

/** A workbook in memory behind a port. Formulas without a stored result are computed first, as a sheet would show them. */
export function memoryPort(contents: Record<string, Record<string, Entry>>, names: Record<string, string> = {}, hidden?: HiddenRows): WorkbookPort & { reads: number } {
  const sheets = new Sheets(contents, names);
  if (hidden) sheets.hidden = hidden;
  const graph = new CellGraph(sheets, { compare: false, slopes: false });
  const shown = (sheet: number, row: number, col: number): PortCell | null => {
    const content = sheets.cell(sheet, row, col);
    if (!content || content.formula === undefined || content.value !== undefined) return content;
    graph.evaluate([{ sheet, row, col }]);
    const node = graph.node({ sheet, row, col })!;
    const value = graph.nodes.value[node];
    if (graph.nodes.refusal[node]) return content;
    return { ...content, value: value.k === 'error' ? { error: value.v } : (value.v ?? 0) };
  };
  const port = {
    reads: 0,
    revision: () => 1,
    sheets: async () => sheets.sheets,
    names: async () => Object.entries(names).map(([name]) => ({ name, formula: sheets.name(name)! })),
    date1904: async () => false,
    tables: async () => [],
    hiddenRows: async (sheet: string) =>
      [...sheets.hiddenRows(sheets.sheets.findIndex((s) => s.name === sheet))].map(([row, state]) => ({ row, filtered: state === 'filtered' })),
    read: async (areas: readonly PortArea[]) => {
      port.reads++;
      return areas.map((area) => {
        const sheet = sheets.sheets.findIndex((s) => s.name === area.sheet);
        const cells: (PortCell | null)[] = [];
        for (let r = 0; r < area.rows; r++) for (let c = 0; c < area.cols; c++) cells.push(shown(sheet, area.row + r, area.col + c));
        return { area, cells };
      });
    },
  };
  return port;
}
