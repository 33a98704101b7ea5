import { ZERO_OR_BLANK, showCell, showNumber, whereIn } from './cells';
import type { Cell, Grid } from './cells';
import type { Bounds, NumberBlock, Parameter } from './declaration';
import { EngineError } from './engine/EngineError';
import { CellError, refusal } from './errors';

/** What a required argument gives where its cell is blank. */
export const BLANK: unique symbol = Symbol('blank');

/** An argument that is given once a call: its value, as the body receives it. */
export function readCall(name: string, parameter: Parameter, grid: Grid): unknown {
  switch (parameter.kind) {
    case 'range':
    case 'reference':
      return isLeftOut(parameter, grid) ? missing(name, parameter) : grid;
    case 'numbers':
      return isLeftOut(parameter, grid) ? missing(name, parameter) : readBlock(name, parameter, grid);
    default: {
      if (grid.rows > 1 || grid.cols > 1) throw refusal(`${name} must be one cell, got ${shapeOf(grid)}`);
      const value = readItem(name, parameter, grid, 0, 0);
      return value === BLANK ? missing(name, parameter) : value;
    }
  }
}

/** One cell of an argument that gives a result a cell. A required one that is blank gives BLANK. */
export function readItem(name: string, parameter: Parameter, grid: Grid, row: number, col: number): unknown {
  const cell = settle(name, parameter, grid, row, col);
  const where = () => whereIn(grid, row, col);
  if (cell === null) return parameter.optional ? parameter.fallback : BLANK;
  if (cell instanceof CellError) throw passedOn(name, cell, where());
  const wrong = () => refusal(`${name} must be ${needOf(parameter)}, got ${showCell(cell)}${where()}`);
  switch (parameter.kind) {
    case 'number': {
      if (typeof cell === 'string') {
        const word = parameter.words?.[cell.trim().toLowerCase()];
        if (word !== undefined) return word;
      }
      if (typeof cell !== 'number' || !within(cell, parameter.bounds)) throw wrong();
      return cell;
    }
    case 'boolean':
      if (cell === 0 || cell === 1) return cell === 1;
      if (typeof cell !== 'boolean') throw wrong();
      return cell;
    case 'choice': {
      const word = typeof cell === 'string' ? cell.trim().toLowerCase() : undefined;
      const choice = parameter.choices?.find((offered) => offered.toLowerCase() === word);
      if (choice === undefined) throw wrong();
      return choice;
    }
    case 'entry':
      if (typeof cell !== 'string' && typeof cell !== 'number') throw wrong();
      return cell;
    default:
      if (typeof cell !== 'string') throw wrong();
      return readText(name, parameter, cell, where);
  }
}

/** The numbers of one row of a block, or of the whole of it where it is a single row or column; blank cells are passed over. */
export function readRow(name: string, parameter: Parameter, grid: Grid, row: number): readonly number[] {
  const all = grid.rows === 1 || grid.cols === 1;
  const found: number[] = [];
  for (let i = all ? 0 : row; i < (all ? grid.rows : row + 1); i++) {
    for (let j = 0; j < grid.cols; j++) {
      const value = readNumber(name, parameter, grid, i, j);
      if (value !== null) found.push(value);
    }
  }
  return found;
}

function readBlock(name: string, parameter: Parameter, grid: Grid): NumberBlock {
  return { grid, values: grid.cells.map((row, i) => row.map((_, j) => readNumber(name, parameter, grid, i, j))) };
}

function readNumber(name: string, parameter: Parameter, grid: Grid, row: number, col: number): number | null {
  const cell = settle(name, parameter, grid, row, col);
  if (cell === null) return null;
  if (cell instanceof CellError) throw passedOn(name, cell, whereIn(grid, row, col));
  if (typeof cell !== 'number' || !within(cell, parameter.bounds))
    throw refusal(`${name} must be ${needOf(parameter)}, got ${showCell(cell)}${whereIn(grid, row, col)}`);
  return cell;
}

/**
 * Decides about a 0 that may be a blank cell. A word cannot be 0, so there it is a blank; a single cell for a number that has no default is
 * read as 0, as every worksheet function does. Elsewhere the two would give different results without a sign of it: refused.
 */
function settle(name: string, parameter: Parameter, grid: Grid, row: number, col: number): Exclude<Cell, typeof ZERO_OR_BLANK> {
  const cell = grid.cells[row][col];
  if (cell !== ZERO_OR_BLANK) return cell;
  if (parameter.kind === 'boolean') return 0;
  if (parameter.kind === 'choice' || parameter.kind === 'text') return null;
  const single = grid.rows === 1 && grid.cols === 1;
  if (single && !parameter.optional && within(0, parameter.bounds)) return 0;
  const remedy = single ? (parameter.optional ? 'leave the argument out' : 'give a number') : 'give a range without blanks';
  throw refusal(`${name} is 0 or a blank cell, which cannot be told apart here${whereIn(grid, row, col)}; ${remedy}`);
}

function readText(name: string, parameter: Parameter, cell: string, where: () => string): unknown {
  if (!parameter.read) return cell;
  try {
    return parameter.read(cell);
  } catch (thrown) {
    if (!(thrown instanceof EngineError)) throw thrown;
    const named = thrown.message.startsWith(`${name} `) ? thrown.message : `${name}: ${thrown.message}`;
    throw refusal(named + where());
  }
}

function missing(name: string, parameter: Parameter): unknown {
  if (parameter.optional) return parameter.fallback;
  throw refusal(`${name} is blank, and must be ${needOf(parameter)}`);
}

/** #N/A stays #N/A, which shows its message; the codes that show none become #VALUE!. */
function passedOn(name: string, error: CellError, where: string): CellError {
  return new CellError(error.code === '#N/A' ? '#N/A' : '#VALUE!', `${name} is the error ${error.code}${where}`);
}

/** An omitted argument and a blank single cell arrive alike; only a known address tells a reference to a blank cell. */
const isLeftOut = (parameter: Parameter, grid: Grid): boolean =>
  grid.rows === 1 && grid.cols === 1 && grid.cells[0][0] === null && (parameter.optional || grid.area === undefined);

/** Rows × columns, for a message. */
export const shapeOf = (grid: { rows: number; cols: number }): string => `${grid.rows} × ${grid.cols}`;

export function within(x: number, bounds: Bounds = {}): boolean {
  const { above = -Infinity, atLeast = -Infinity, below = Infinity, atMost = Infinity, whole = false } = bounds;
  return x > above && x >= atLeast && x < below && x <= atMost && (!whole || Number.isInteger(x));
}

/** What an argument must be, in words: `a whole number from 1 to 15`. */
export function needOf(parameter: Parameter): string {
  switch (parameter.kind) {
    case 'number':
    case 'numbers': {
      const words = Object.keys(parameter.words ?? {}).map((word) => ` or "${word}"`);
      return `a ${parameter.bounds?.whole ? 'whole number' : 'number'}${boundsInWords(parameter.bounds)}${words.join('')}`;
    }
    case 'choice':
      return `one of ${parameter.choices?.join(', ')}`;
    case 'boolean':
      return 'TRUE or FALSE';
    case 'text':
      return 'text';
    case 'entry':
      return 'a number or text';
    case 'range':
      return 'a range';
    case 'reference':
      return 'a reference to cells of this workbook';
  }
}

function boundsInWords({ above, atLeast, below, atMost }: Bounds = {}): string {
  if (atLeast !== undefined && atMost !== undefined) return ` from ${showNumber(atLeast)} to ${showNumber(atMost)}`;
  const limits = [
    above !== undefined && `> ${showNumber(above)}`,
    atLeast !== undefined && `>= ${showNumber(atLeast)}`,
    below !== undefined && `< ${showNumber(below)}`,
    atMost !== undefined && `<= ${showNumber(atMost)}`,
  ].filter((limit) => limit !== false);
  return limits.length > 0 ? ` ${limits.join(' and ')}` : '';
}

