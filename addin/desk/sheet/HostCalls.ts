import { MAX_COLS, MAX_ROWS } from '../book/area';
import { EngineError } from '../../../functions/engine/EngineError';
import { type Scalar, type ErrorCode, BLANK, bool, err, num, text } from '../../../functions/engine/formula/scalar';
import { type Area, type Matrix, type Value, at, isScalar, matrix } from '../../../functions/engine/formula/value';
import type { CellGraph, CellPlace } from '../../../functions/engine/graph/cellGraph';
import type { FunctionHost, HostArgument, HostCell, HostResult } from './functionHost';
import { addressOf, placeKey, rangeAddress } from './places';
import type { WorkingBook } from './WorkingBook';

/** One answer of a custom function in a cell. */
export interface Answer {
  readonly id: string;
  readonly result: HostResult;
  /** The call is the cell's whole formula, so that the cells of its result are the cells of the spill. */
  readonly whole: boolean;
}

/** Calls of custom functions that the cells of a graph make: asked for once, answered together, kept for when the cell comes again. */
export class HostCalls {
  /** Answers by calling cell. */
  readonly answers = new Map<number, Answer[]>();
  private readonly values = new Map<string, Value>();
  private asked: { key: string; id: string; args: readonly HostArgument[]; place: CellPlace; whole: boolean }[] = [];

  /**
   * @param wholeCall  Which call of a cell is its whole formula, if one is.
   */
  constructor(
    private readonly working: WorkingBook,
    private readonly host: FunctionHost,
    private readonly wholeCall: (place: CellPlace) => number | undefined,
  ) {}

  /** The value of a call, or undefined if it is still to be answered. */
  value(graph: CellGraph, name: string, args: readonly Value[], place: CellPlace, site: number): Value | undefined {
    const id = this.working.names.idOf(name)!;
    const cell = placeKey(place.sheet, place.row, place.col);
    const key = `${cell} ${site} ${id}(${args.map(fingerprint).join(';')})`;
    const known = this.values.get(key);
    if (known !== undefined) return known;
    if (this.asked.some((call) => call.key === key)) return undefined;
    this.checkCount(id, args.length);
    const whole = this.wholeCall(place) === site;
    this.asked.push({ key, id, args: args.map((arg) => this.argument(graph, arg, whole)), place, whole });
    return undefined;
  }

  /** Makes all calls asked for since the last time, together. @returns how many there were. */
  async answer(): Promise<number> {
    const calls = this.asked;
    this.asked = [];
    await Promise.all(calls.map(async ({ key, id, args, place, whole }) => {
      const { sheet, row, col } = place;
      const result = await this.host.call(id, args, addressOf(this.working.sheetName(sheet), row, col));
      const cell = placeKey(sheet, row, col);
      this.answers.set(cell, [...(this.answers.get(cell) ?? []), { id, result, whole }]);
      this.values.set(key, valueOf(result));
    }));
    return calls.length;
  }

  /** Forgets what a cell was answered. */
  forget(cell: number): void {
    this.answers.delete(cell);
  }

  /** Excel does not let such a formula be entered. */
  private checkCount(id: string, count: number): void {
    const { parameters } = this.host.functions.find((f) => f.id === id)!;
    const least = parameters.filter((p) => !p.optional && !p.repeating).length;
    const most = parameters.at(-1)?.repeating ? Infinity : parameters.length;
    if (count >= least && count <= most) return;
    const needed = most === Infinity ? `${least} or more` : least === most ? `${least}` : `${least} to ${most}`;
    throw new EngineError('refused', `gives ${this.working.names.typed(id)} ${count} argument${count === 1 ? '' : 's'}, which takes ${needed}`);
  }

  private argument(graph: CellGraph, value: Value, whole: boolean): HostArgument {
    switch (value.k) {
      case 'missing':
        return undefined;
      case 'union':
        return value.areas.length === 1 ? this.argument(graph, value.areas[0], whole) : { cells: [[{ error: '#VALUE!' }]] };
      case 'lambda':
        return { cells: [[{ error: '#CALC!' }]] };
      case 'area':
        return { cells: rowsOf(matrixOf(graph, value)), ...(whole && { address: this.address(value) }) };
      case 'matrix':
        return { cells: rowsOf(value) };
      default:
        return { cells: [[cellOf(value)]] };
    }
  }

  private address({ sheet, r1, c1, r2, c2 }: Area): string {
    return rangeAddress(this.working.sheetName(sheet), { top: r1, left: c1, bottom: Math.min(r2, MAX_ROWS), right: Math.min(c2, MAX_COLS) });
  }
}

function matrixOf(graph: CellGraph, area: Area): Matrix {
  const { sheet, r1, c1, r2, c2 } = area;
  return r1 === r2 && c1 === c2 ? matrix(1, 1, [graph.cell(sheet, r1, c1)]) : graph.read(area);
}

/** All rows that the range has; those below what is stored are one and the same array. */
function rowsOf(m: Matrix): HostCell[][] {
  const fill = Array.from({ length: m.cols }, () => cellOf(m.fill));
  return Array.from({ length: m.rows }, (_, r) => (r < m.height ? Array.from({ length: m.cols }, (_x, c) => cellOf(at(m, r, c))) : fill));
}

const cellOf = (s: Scalar): HostCell => (s.k === 'blank' ? null : s.k === 'error' ? { error: s.v } : s.v);

function valueOf(result: HostResult): Value {
  if (!result.ok) return err(result.error.error as ErrorCode);
  const { cells } = result;
  return matrix(cells.length, cells[0].length, cells.flatMap((row) => row.map(scalarOf)));
}

/** A plain value as the engine holds it; null is a blank. */
export function scalarOf(value: HostCell | undefined): Scalar {
  switch (typeof value) {
    case 'number':
      return num(value);
    case 'string':
      return text(value);
    case 'boolean':
      return bool(value);
    default:
      return value ? err(value.error as ErrorCode) : BLANK;
  }
}

/** What tells two calls of one place apart: ranges by where they lie, for their values are fixed once they were evaluated. */
function fingerprint(value: Value): string {
  if (isScalar(value)) return `${value.k} ${String(value.v)}`;
  if (value.k === 'area') return `${value.sheet}!${value.r1},${value.c1},${value.r2},${value.c2}`;
  if (value.k === 'union') return value.areas.map(fingerprint).join('|');
  return value.k === 'matrix' ? JSON.stringify([value.rows, value.cols, value.cells.map((s) => s.v), value.fill.v]) : value.k;
}
