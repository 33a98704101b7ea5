import { parseAddress } from '../../../functions/address';
import { callFunction } from '../../../functions/call';
import { carryFamily } from '../../../functions/families/carry';
import type { PortCell, WorkbookPort } from '../../../functions/workbook';

/** An argument: the address of cells, or a literal (with an address where the host would tell one). */
export type Argument = string | { literal: unknown; address?: string };

/** What a cell of the result shows: errors as `#VALUE! message`. */
export type Shown = number | string | boolean;

/**
 * Calls a carrying function as Excel does, arguments read from the workbook behind the port, blanks as 0.
 * `fixed` are the arguments before the repeating one.
 */
export async function callOn(port: WorkbookPort, name: string, fixed: Argument[], pairs: Argument[]): Promise<Shown[][]> {
  provideHost();
  const declaration = carryFamily.find((d) => d.name === name)!;
  const all = [...fixed, ...pairs];
  const values = await Promise.all(all.map((a) => valueOf(port, a)));
  const addresses = all.map((a) => (typeof a === 'string' ? a : a.address));
  const args = [...values.slice(0, fixed.length), values.slice(fixed.length), { address: 'Out!Z1', parameterAddresses: addresses }];
  try {
    const cells = await callFunction(declaration, args, { port });
    return cells.map((row) => row.map(show));
  } catch (thrown) {
    return [[show(thrown)]];
  }
}

async function valueOf(port: WorkbookPort, argument: Argument): Promise<unknown> {
  if (typeof argument !== 'string') return argument.literal;
  const area = parseAddress(argument)!;
  const [{ cells }] = await port.read([area]);
  const raw = (cell: PortCell | null): unknown => (cell === null ? 0 : typeof cell.value === 'object' ? { type: 'Error', basicValue: cell.value.error } : cell.value);
  return Array.from({ length: area.rows }, (_, r) => cells.slice(r * area.cols, (r + 1) * area.cols).map(raw));
}

class HostError {
  constructor(
    readonly code: string,
    readonly message?: string,
  ) {}
}

function provideHost(): void {
  Object.assign(globalThis, { CustomFunctions: { associate: () => undefined, Error: HostError } });
}

function show(cell: unknown): Shown {
  if (cell instanceof HostError) return `${cell.code} ${cell.message ?? ''}`;
  if (cell instanceof Error) throw cell;
  return cell as Shown;
}
