import { BLANK, readCall, readItem, readRow, shapeOf } from './arguments';
import { readGrids } from './blanks';
import type { RawArgument } from './blanks';
import { whereIn, writeCells } from './cells';
import type { CellResult, Grid } from './cells';
import type { Body, CallContext, Declaration, Matrix, Parameter } from './declaration';
import { CellError, refusal, toCellError, toExcelError } from './errors';

/** What the surroundings give to every call. */
export interface Surroundings {
  readonly port?: CallContext['port'];
  readonly decimalSeparator?: '.' | ',';
}

/** The part of the host's invocation object that is used. */
export interface Invocation {
  readonly address?: string;
  readonly parameterAddresses?: readonly (string | null | undefined)[];
}

/**
 * One call of a worksheet function as the host makes it: one raw value a parameter (an array of them for a repeating one), then the
 * invocation object.
 *
 * @returns   The matrix that the host takes, or a promise of it where the workbook has to be read.
 * @throws    The host's error object where the call as a whole fails.
 */
export function callFunction(declaration: Declaration, args: readonly unknown[], surroundings: Surroundings): unknown[][] | Promise<unknown[][]> {
  const { name } = declaration;
  const fail = (thrown: unknown): never => {
    throw toExcelError(name, toCellError(thrown));
  };
  try {
    const slots = slotsOf(declaration, args);
    const context = contextOf(declaration, args, surroundings);
    const grids = readGrids(slots, context.port, context.parameterAddresses !== undefined);
    const run = (ready: readonly Grid[]) => {
      const result = evaluate(declaration, slots, ready, context);
      return isPromise(result) ? result.then((matrix) => writeCells(name, matrix)) : writeCells(name, result);
    };
    const result = isPromise(grids) ? grids.then(run) : run(grids);
    return isPromise(result) ? result.then((cells) => cells, fail) : result;
  } catch (thrown) {
    return fail(thrown);
  }
}

/** A port may live in another realm, so a promise is known by its `then`. */
const isPromise = <T>(x: T | Promise<T>): x is Promise<T> => typeof (x as Partial<Promise<T>>).then === 'function';

/** An argument with its parameter. */
interface Slot extends RawArgument {
  readonly key: string;
  readonly parameter: Parameter;
}

function slotsOf(declaration: Declaration, args: readonly unknown[]): readonly Slot[] {
  const addresses = invocationOf(declaration, args).parameterAddresses;
  return Object.entries(declaration.parameters).flatMap(([key, parameter], i) => {
    const given = parameter.repeating ? (Array.isArray(args[i]) ? (args[i] as unknown[]) : []) : [args[i]];
    return given.map((raw, j): Slot => ({
      key,
      parameter,
      raw,
      name: parameter.repeating ? `argument ${i + j + 1}` : (parameter.label ?? key),
      address: addresses?.[i + j] ?? undefined,
      // FALSE is the default of every flag, and 0 means it too.
      tellBlanks: parameter.kind !== 'boolean' && parameter.kind !== 'reference',
    }));
  });
}

function invocationOf(declaration: Declaration, args: readonly unknown[]): Invocation {
  const last = args[Object.keys(declaration.parameters).length];
  return typeof last === 'object' && last !== null && !Array.isArray(last) ? last : {};
}

function contextOf(declaration: Declaration, args: readonly unknown[], surroundings: Surroundings): CallContext {
  const { address, parameterAddresses } = invocationOf(declaration, args);
  return {
    name: declaration.name,
    address,
    parameterAddresses: Array.isArray(parameterAddresses) ? parameterAddresses.map((a) => (a as string | null) ?? undefined) : undefined,
    port: surroundings.port,
    decimalSeparator: surroundings.decimalSeparator === ',' ? ',' : '.',
  };
}

function evaluate(declaration: Declaration, slots: readonly Slot[], grids: readonly Grid[], context: CallContext): Matrix | Promise<Matrix> {
  const values: Record<string, unknown> = {};
  const perItem: Item[] = [];
  for (const [key, parameter] of Object.entries(declaration.parameters)) if (parameter.repeating) values[key] = [];
  slots.forEach((slot, i) => {
    if (slot.parameter.per !== 'call') perItem.push({ slot, grid: grids[i] });
    else if (slot.parameter.repeating) (values[slot.key] as unknown[]).push(readCall(slot.name, slot.parameter, grids[i]));
    else values[slot.key] = readCall(slot.name, slot.parameter, grids[i]);
  });
  const { body } = declaration;
  if (body.kind === 'whole') return body.run(values as never, context);
  return evaluateEach(body, values, perItem, context);
}

interface Item {
  readonly slot: Slot;
  readonly grid: Grid;
}

function evaluateEach(body: Extract<Body, { kind: 'each' }>, values: Record<string, unknown>, items: readonly Item[], context: CallContext): Matrix {
  const shape = commonShape(items);
  const columns = body.columns(values as never);
  if (columns > 1 && shape.cols > 1)
    throw refusal(`${shape.name} must be one column where each result takes ${columns} cells, got ${shapeOf(shape)}`);
  const out: CellResult[][] = [];
  for (let i = 0; i < shape.rows; i++) {
    const line: CellResult[] = [];
    for (let j = 0; j < shape.cols; j++) line.push(...evaluateOne(body, values, items, context, i, j, columns));
    out.push(line);
  }
  return out;
}

function evaluateOne(
  body: Extract<Body, { kind: 'each' }>,
  values: Record<string, unknown>,
  items: readonly Item[],
  context: CallContext,
  row: number,
  col: number,
  columns: number,
): readonly CellResult[] {
  const fill = (cell: CellResult) => Array.from({ length: columns }, () => cell);
  try {
    const own: Record<string, unknown> = { ...values };
    for (const item of items) own[item.slot.key] = readOne(item, row, col);
    const blank = items.filter(({ slot }) => own[slot.key] === BLANK);
    if (blank.length > 0) {
      const required = items.filter(({ slot }) => !slot.parameter.optional);
      if (blank.length === required.length || blank.some(({ slot }) => slot.parameter.leads)) return fill('');
      throw refusal(`${blank[0].slot.name} is blank${whereOf(blank, row, col)}`);
    }
    const result = body.run(own as never, context);
    const cells: readonly CellResult[] = Array.isArray(result) ? result : [result as CellResult];
    if (cells.length !== columns) throw new Error(`${cells.length} cells instead of ${columns}`);
    const bad = cells.find((cell) => typeof cell === 'number' && !Number.isFinite(cell));
    return bad === undefined ? cells : fill(refusal(`the result is not a finite number${whereOf(items, row, col)}`));
  } catch (thrown) {
    return fill(thrown instanceof CellError ? thrown : toCellError(thrown, whereOf(items, row, col)));
  }
}

function readOne({ slot, grid }: Item, row: number, col: number): unknown {
  if (slot.parameter.per === 'row') {
    const found = readRow(slot.name, slot.parameter, grid, row);
    return found.length === 0 ? (slot.parameter.optional ? slot.parameter.fallback : BLANK) : found;
  }
  const single = grid.rows === 1 && grid.cols === 1;
  return readItem(slot.name, slot.parameter, grid, single ? 0 : row, single ? 0 : col);
}

/** The place of a result among the arguments: that of the first argument that has a cell for each. */
function whereOf(items: readonly Item[], row: number, col: number): string {
  const leading = items.find(({ slot, grid }) => slot.parameter.per === 'cell' && grid.rows * grid.cols > 1);
  if (leading) return whereIn(leading.grid, row, col);
  const block = items.find(({ slot, grid }) => slot.parameter.per === 'row' && grid.rows > 1 && grid.cols > 1);
  return block ? ` in row ${block.grid.area ? block.grid.area.row + row : row + 1}` : '';
}

/** The one shape of all arguments that are not a single cell. */
function commonShape(items: readonly Item[]): { rows: number; cols: number; name: string } {
  let common: { rows: number; cols: number; name: string } | undefined;
  for (const { slot, grid } of items) {
    const byRow = slot.parameter.per === 'row';
    if (byRow && (grid.rows === 1 || grid.cols === 1)) continue;
    const shape = { rows: grid.rows, cols: byRow ? 1 : grid.cols, name: slot.name };
    if (shape.rows === 1 && shape.cols === 1) continue;
    if (!common) common = shape;
    else if (common.rows !== shape.rows || common.cols !== shape.cols)
      throw refusal(`the shapes of ${common.name} (${shapeOf(common)}) and ${shape.name} (${shapeOf(shape)}) do not agree`);
  }
  return common ?? { rows: 1, cols: 1, name: items[0]?.slot.name ?? '' };
}

