import { cellName, isExternal } from '../address';
import { shapeOf } from '../arguments';
import type { Cell, Grid } from '../cells';
import type { CallContext } from '../declaration';
import { EngineError } from '../engine/EngineError';
import { Carry, type Input } from '../engine/carry/carry';
import { sheetPrefix } from '../engine/graph/address';
import type { CellPlace } from '../engine/graph/cellGraph';
import { readTags } from '../engine/quantity/tags';
import { refusal } from '../errors';
import { type EvidenceRow, readEvidence } from '../evidenceRows';
import type { PortArea } from '../workbook';
import { type Followed, evaluateAll, follow, forget } from './followed';

/** A call of a carrying function, read and followed: ready to give results. */
export interface CarryCall {
  readonly followed: Followed;
  readonly carry: Carry;
  readonly results: readonly CellPlace[];
  /** The address of each evidence row, by its key. */
  readonly evidenceCells: ReadonlyMap<string, string>;
  /** What an input argument is called in messages: `input 2 (C5:C24)`. */
  readonly argumentName: (argument: number) => string;
}

interface Pair {
  readonly area: PortArea;
  readonly input: Grid;
  readonly evidence: Grid;
}

/**
 * Reads the arguments of a carrying function, follows the workbook from the results down to the inputs, and evaluates all cells
 * between. What arrives as an argument is compared with what is read: a difference is read once more, then refused.
 */
export async function readCarryCall(context: CallContext, results: Grid, rest: readonly Grid[]): Promise<CarryCall> {
  if (!context.port) throw refusal('needs to read the formulas of the workbook, which this installation does not allow; install it with the shared runtime');
  const resultArea = areaFor(results, 'results');
  const pairs = pairsOf(rest);
  const read = () => readOnce(context, resultArea, results, pairs);
  const first = await read();
  if (typeof first !== 'string') return first;
  forget(context.port);
  const second = await read();
  if (typeof second === 'string') throw refusal(second);
  return second;
}

async function readOnce(context: CallContext, resultArea: PortArea, resultGrid: Grid, pairs: readonly Pair[]): Promise<CarryCall | string> {
  const followed = await follow(context.port!);
  const results = placesOf(followed, resultArea);
  const evidenceCells = new Map<string, string>();
  const inputPlaces = pairs.map((pair) => placesOf(followed, pair.area));
  const rows = await Promise.all(pairs.map((pair, i) => evidenceRows(followed, pair, i, evidenceCells, context)));
  await evaluateAll(followed, [...results, ...inputPlaces.flat()]);
  const moved = changed(followed, results, resultGrid) ?? pairs.map((p, i) => changed(followed, inputPlaces[i], p.input)).find((m) => m !== undefined);
  if (moved !== undefined) return moved;
  const inputs = pairs.flatMap((pair, argument) => inputsOf(followed, pair, argument, inputPlaces[argument], rows[argument]));
  return {
    followed, results, evidenceCells,
    carry: new Carry(followed.graph, inputs),
    argumentName: (argument) => `input ${argument + 1} (${areaName(pairs[argument].area)})`,
  };
}

function pairsOf(rest: readonly Grid[]): Pair[] {
  if (rest.length === 0) throw refusal('needs at least one input with its evidence after the results');
  if (rest.length % 2 === 1) {
    throw refusal(`needs inputs and evidence in pairs, got ${rest.length} arguments: input ${(rest.length + 1) / 2} has no evidence`);
  }
  return Array.from({ length: rest.length / 2 }, (_, i) => {
    const input = rest[2 * i];
    const evidence = rest[2 * i + 1];
    const area = areaFor(input, `input ${i + 1}`);
    const cells = input.rows * input.cols;
    if (evidence.rows !== 1 && evidence.rows !== cells) {
      throw refusal(`input ${i + 1} has ${cells} cells (${shapeOf(input)}), its evidence ${evidence.rows} rows (${shapeOf(evidence)}): give one row, or one row an input cell`);
    }
    return { area, input, evidence };
  });
}

function areaFor(grid: Grid, name: string): PortArea {
  if (!grid.area) throw refusal(`${name} must be a reference to cells of this workbook`);
  if (isExternal(grid.area)) throw refusal(`${name} lies in another workbook (${areaName(grid.area)}); refer to cells of this workbook`);
  return grid.area;
}

/** The places of an area, row by row; cells beyond the used part of the sheet are blank and left where they are. */
function placesOf({ snapshot }: Followed, area: PortArea): CellPlace[] {
  const sheet = snapshot.sheetIndex(area.sheet);
  if (sheet === undefined) throw refusal(`sheet ${area.sheet} is not in this workbook`);
  const places: CellPlace[] = [];
  for (let r = 0; r < area.rows; r++) for (let c = 0; c < area.cols; c++) places.push({ sheet, row: area.row + r, col: area.col + c });
  return places;
}

/** The evidence rows of a pair, a 0 that may be a blank looked up in the workbook. */
async function evidenceRows(
  { snapshot }: Followed,
  { evidence }: Pair,
  argument: number,
  cells: Map<string, string>,
  context: CallContext,
): Promise<{ key: string; row: EvidenceRow }[]> {
  const { area } = evidence;
  let told: readonly (readonly Cell[])[] = evidence.cells;
  if (area && !isExternal(area) && evidence.cells.some((row) => row.includes(0))) {
    const sheet = snapshot.sheetIndex(area.sheet);
    if (sheet === undefined) throw refusal(`sheet ${area.sheet} is not in this workbook`);
    snapshot.want({ k: 'area', sheet, r1: area.row, c1: area.col, r2: area.row + area.rows - 1, c2: area.col + area.cols - 1 });
    await snapshot.fetch();
    told = evidence.cells.map((row, r) => row.map((cell, c) => (cell === 0 && snapshot.cell(sheet, area.row + r, area.col + c) === null ? null : cell)));
  } else if (!area && context.parameterAddresses === undefined && evidence.cols > 1 && evidence.cells.some((row) => row.includes(0))) {
    throw refusal(`the evidence of input ${argument + 1} holds 0 or a blank cell, which cannot be told apart here; give evidence without blank cells`);
  }
  return readEvidence(told).map((row, i) => {
    const key = area ? `${area.sheet.toLowerCase()}!${area.row + i},${area.col}` : `argument ${argument}, row ${i}`;
    if (area) cells.set(key, areaName({ ...area, row: area.row + i, rows: 1 }));
    return { key, row };
  });
}

function inputsOf({ graph }: Followed, { evidence }: Pair, argument: number, places: readonly CellPlace[], rows: readonly { key: string; row: EvidenceRow }[]): Input[] {
  const inputs: Input[] = [];
  places.forEach((place, i) => {
    if (graph.node(place) === undefined) return; // blank: passed over with its evidence
    const { key, row } = rows[rows.length === 1 ? 0 : i];
    const where = evidence.area ? ` (evidence in ${cellName(evidence.area, rows.length === 1 ? 0 : i, 0)})` : '';
    inputs.push({ place, argument, evidence: evidenceOf(key, row, where) });
  });
  return inputs;
}

function evidenceOf(key: string, row: EvidenceRow, where: string): Input['evidence'] {
  if (!row.ok) return { problem: `has evidence that cannot be used${where}: ${row.problem}`, row: key };
  if (row.blank) return { problem: `has no evidence${where}: u is blank; write exact where there is no doubt`, row: key };
  if (row.exact) return { exact: true, row: key };
  try {
    return { u: row.u, dof: row.dof, shape: row.shape, tags: readTags(row.tag ?? ''), group: row.group ?? '', row: key };
  } catch (thrown) {
    if (thrown instanceof EngineError) return { problem: `has evidence that cannot be used${where}: ${thrown.message}`, row: key };
    throw thrown;
  }
}

/** A cell whose value as an argument is not the one that was read. */
function changed({ graph, snapshot }: Followed, places: readonly CellPlace[], grid: Grid): string | undefined {
  for (let i = 0; i < places.length; i++) {
    const given = grid.cells[Math.floor(i / grid.cols)][i % grid.cols];
    const { sheet, row, col } = places[i];
    const read = snapshot.cell(sheet, row, col)?.value;
    if (typeof given !== 'number' || read === undefined || (read === null && given === 0)) continue;
    if (typeof read === 'number' ? read === given || Math.abs(read - given) <= 1e-9 * Math.abs(given) : given === 0 && read === '') continue;
    return `cell ${graph.placeName(places[i])} changed while it was read; recalculate`;
  }
  return undefined;
}

/** An area as a person writes it. */
export const areaName = (area: PortArea): string =>
  `${sheetPrefix(area.sheet)}${cellName(area, 0, 0)}${area.rows * area.cols > 1 ? `:${cellName(area, area.rows - 1, area.cols - 1)}` : ''}`;
