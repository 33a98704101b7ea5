import { createFunctionHost } from '../../addin/desk/sheet/functionHost';
import type { FunctionHostOptions, HostArgument, HostCell, HostResult } from '../../addin/desk/sheet/functionHost';
import type { PortArea, PortCell, WorkbookPort } from '../../functions/workbook';
import { bundle } from './bundle';

/** An argument as tests write it: a cell, a column, or rows; undefined for an omitted one; or with its address. */
export type Given = HostCell | readonly HostCell[] | readonly (readonly HostCell[])[] | HostArgument;

/** What a cell shows: errors as their code and message. */
export type Shown = number | string | boolean;

/** Calls functions of the built bundle as Excel does; an error of the whole call is shown as one cell, as Excel does. */
export async function excel(options: Partial<FunctionHostOptions> = {}): Promise<(id: string, ...args: Given[]) => Promise<Shown[][]>> {
  const host = createFunctionHost({ ...(await bundle()), ...options });
  return async (id, ...args) => shown(await host.call(id, args.map(toArgument)));
}

export function toArgument(given: Given): HostArgument {
  if (given === undefined) return undefined;
  if (typeof given === 'object' && given !== null && 'cells' in given) return given;
  if (!Array.isArray(given)) return { cells: [[given as HostCell]] };
  const rows = given as readonly (HostCell | readonly HostCell[])[];
  return { cells: rows.map((row) => (Array.isArray(row) ? (row as readonly HostCell[]) : [row as HostCell])) };
}

function shown(result: HostResult): Shown[][] {
  const show = (cell: Shown | { error: string; message?: string }): Shown =>
    typeof cell === 'object' ? [cell.error, cell.message].filter(Boolean).join(' ') : cell;
  return result.ok ? result.cells.map((row) => row.map(show)) : [[show(result.error)]];
}

/** A workbook of constants: the rows of its sheets, null for a blank cell. `asked` collects what was read. */
export function portOf(sheets: Record<string, HostCell[][]>, asked: PortArea[] = []): WorkbookPort {
  const cellOf = (value: HostCell | undefined): PortCell | null => (value == null ? null : { value });
  return {
    revision: () => 1,
    sheets: () => Promise.resolve(Object.entries(sheets).map(([name, rows]) => ({ name, rows: rows.length, cols: rows[0]?.length ?? 0 }))),
    names: () => Promise.resolve([]),
    tables: () => Promise.resolve([]),
    date1904: () => Promise.resolve(false),
    hiddenRows: () => Promise.resolve([]),
    read: (areas) => {
      asked.push(...areas);
      return Promise.resolve(
        areas.map((area) => ({
          area,
          cells: Array.from({ length: area.rows * area.cols }, (_, i) =>
            cellOf(sheets[area.sheet]?.[area.row - 1 + Math.floor(i / area.cols)]?.[area.col - 1 + (i % area.cols)]),
          ),
        })),
      );
    },
  };
}
