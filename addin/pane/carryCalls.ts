import { tokenize, translateFormulaToA1 } from '@borgar/fx';
import { cellName } from '../../functions/engine/graph/address';
import type { PortArea, WorkbookPort } from '../../functions/workbook';
import { areaOf } from './areas';

/** A call of UNC_CARRY or UNC_REPORT that stands in the workbook. */
export interface CarryCall {
  readonly name: 'UNC_CARRY' | 'UNC_REPORT';
  /** Where its results stand. */
  readonly results: PortArea;
  /** Where it stands itself: its spill. */
  readonly at: PortArea;
  /** Inputs and evidence in turn: areas; undefined for what is no plain reference. */
  readonly pairs: readonly (PortArea | undefined)[];
}

/** The calls in the used part of a sheet, top to bottom. */
export async function carryCalls(port: WorkbookPort, sheet: string): Promise<CarryCall[]> {
  const size = (await port.sheets()).find((s) => s.name === sheet);
  if (!size || size.rows === 0) return [];
  const [{ cells }] = await port.read([{ sheet, row: 1, col: 1, rows: size.rows, cols: size.cols }]);
  const calls: CarryCall[] = [];
  cells.forEach((cell, i) => {
    if (!cell?.formula || !/UNC_(CARRY|REPORT)\(/i.test(cell.formula)) return;
    const row = 1 + Math.floor(i / size.cols);
    const col = 1 + (i % size.cols);
    const call = readCall(translateFormulaToA1(cell.formula, cellName(row, col)), sheet);
    if (call) calls.push({ ...call, at: { sheet, row, col, rows: cell.array?.rows ?? 1, cols: cell.array?.cols ?? 1 } });
  });
  return calls;
}

/** The call that tells of a cell: its results hold it, or what it gives does. */
export function callFor(calls: readonly CarryCall[], { sheet, row, col }: PortArea): { readonly call: CarryCall; readonly result: PortArea; readonly index: number } | undefined {
  const inside = (a: PortArea): boolean => a.sheet === sheet && row >= a.row && row < a.row + a.rows && col >= a.col && col < a.col + a.cols;
  for (const call of calls) {
    const { results, at } = call;
    const index = inside(results) ? (row - results.row) * results.cols + col - results.col
      : inside(at) ? (call.name === 'UNC_REPORT' ? row - at.row : (row - at.row) * at.cols + col - at.col) : -1;
    if (index < 0 || index >= results.rows * results.cols) continue;
    return { call, index, result: { ...results, row: results.row + Math.floor(index / results.cols), col: results.col + (index % results.cols), rows: 1, cols: 1 } };
  }
  return undefined;
}

function readCall(formula: string, sheet: string): Omit<CarryCall, 'at'> | undefined {
  const [name, ...args] = callParts(formula);
  const found = /UNC_(?:CARRY|REPORT)$/i.exec(name ?? '');
  if (!found) return undefined;
  const results = areaOf(args[0] ?? '', sheet);
  if (!results) return undefined;
  const report = /REPORT/i.test(found[0]);
  return { name: report ? 'UNC_REPORT' : 'UNC_CARRY', results, pairs: args.slice(report ? 2 : 1).map((arg) => areaOf(arg, sheet)) };
}

/** Name and arguments of a formula that is one call: `=F(A1, B1)` is `F`, `A1`, `B1`. */
function callParts(formula: string): string[] {
  const tokens = tokenize(formula, { mergeRefs: true }).filter((t) => t.type !== 'fx_prefix');
  if (tokens[0]?.type !== 'func') return [];
  const parts = [tokens[0].value];
  let depth = 0;
  let text = '';
  for (const { value } of tokens.slice(1)) {
    if (value === '(' || value === '{') depth++;
    if (value === ')' || value === '}') depth--;
    if (depth === 0 && value === ')') break;
    if (depth === 1 && value === '(' ) continue;
    if (depth === 1 && value === ',') {
      parts.push(text);
      text = '';
    } else text += value;
  }
  return [...parts, text];
}
