import { isExternal } from './address';
import { ZERO_OR_BLANK, areaOf, filledRows, gridOf, isWholeColumn, isWholeRow, rawRows } from './cells';
import type { Cell, Grid } from './cells';
import { refusal } from './errors';
import type { PortArea, WorkbookPort } from './workbook';

/** One argument as it arrived. */
export interface RawArgument {
  /** For messages. */
  readonly name: string;
  readonly raw: unknown;
  readonly address: string | undefined;
  /** False where 0 and blank mean the same, or where the body tells them apart itself. */
  readonly tellBlanks: boolean;
}

/**
 * Arguments as grids of cells, whole columns cut to their used part (the same height for all of them), blanks told from zeros: a cell
 * that arrived as 0 is looked up in the workbook. Without a port or an address it stays ZERO_OR_BLANK; where the host does tell addresses
 * and has none for this argument, it is a literal or computed, and its 0 is one.
 *
 * @param tellsAddresses   The host gave a list of addresses with this call.
 * @returns                A promise only where something has to be looked up.
 */
export function readGrids(
  given: readonly RawArgument[],
  port: WorkbookPort | undefined,
  tellsAddresses: boolean,
): readonly Grid[] | Promise<readonly Grid[]> {
  const all = given.map((argument) => ({ argument, rows: rawRows(argument.raw) }));
  const tall = all.filter(({ rows }) => isWholeColumn(rows));
  const wide = all.find(({ rows }) => isWholeRow(rows));
  if (wide) throw refusal(`${wide.argument.name} is a whole row; give the part that holds data`);
  const filled = tall.map(({ rows }) => filledRows(rows));
  const sure = filled.reduce((most, { sure: n }) => Math.max(most, n), 1);
  const open = tall.filter((_, i) => filled[i].possible > sure);
  const finish = (height: number) => {
    const grids = all.map(({ argument, rows }) => {
      const area = areaOf(rows, argument.address);
      return gridOf(rows, area, isWholeColumn(rows) ? height : rows.length);
    });
    return tellBlanks(grids, given, port, tellsAddresses);
  };
  if (open.length === 0) return finish(sure);
  return usedRows(open, port).then((used) => finish(Math.max(sure, used)));
}

/** Last used row among the sheets of whole columns whose lower end may be blank cells or zeros. */
async function usedRows(
  open: readonly { argument: RawArgument; rows: readonly (readonly unknown[])[] }[],
  port: WorkbookPort | undefined,
): Promise<number> {
  const sheets = port ? await port.sheets() : [];
  const used = open.map(({ argument, rows }) => {
    const area = areaOf(rows, argument.address);
    const sheet = area && sheets.find(({ name }) => name.toLowerCase() === area.sheet.toLowerCase());
    if (!area || !sheet) throw refusal(`${argument.name} is a whole column; give the part that holds data`);
    return sheet.rows - area.row + 1;
  });
  return Math.max(...used);
}

function tellBlanks(
  grids: readonly Grid[],
  given: readonly RawArgument[],
  port: WorkbookPort | undefined,
  tellsAddresses: boolean,
): readonly Grid[] | Promise<readonly Grid[]> {
  const lookUps: { index: number; area: PortArea; top: number }[] = [];
  const out = grids.map((grid, index): Grid => {
    const zeros = given[index].tellBlanks ? zeroRows(grid) : undefined;
    if (!zeros) return grid;
    if (grid.area && port && !isExternal(grid.area)) {
      const rows = zeros.last - zeros.first + 1;
      lookUps.push({ index, area: { ...grid.area, row: grid.area.row + zeros.first, rows }, top: zeros.first });
      return grid;
    }
    const literal = tellsAddresses && !given[index].address;
    return literal ? grid : mapZeros(grid, () => ZERO_OR_BLANK);
  });
  if (!port || lookUps.length === 0) return out;
  return port.read(lookUps.map(({ area }) => area)).then((tiles) => {
    const told = [...out];
    lookUps.forEach(({ index, area, top }, i) => {
      const tile = tiles[i];
      told[index] = mapZeros(told[index], (row, col) => (tile.cells[(row - top) * area.cols + col] == null ? null : 0));
    });
    return told;
  });
}

function zeroRows(grid: Grid): { first: number; last: number } | undefined {
  let first = -1;
  let last = -1;
  grid.cells.forEach((row, i) => {
    if (!row.includes(0)) return;
    if (first < 0) first = i;
    last = i;
  });
  return first < 0 ? undefined : { first, last };
}

function mapZeros(grid: Grid, cell: (row: number, col: number) => Cell): Grid {
  return { ...grid, cells: grid.cells.map((row, i) => (row.includes(0) ? row.map((c, j) => (c === 0 ? cell(i, j) : c)) : row)) };
}
