import { callFunction } from '../../functions/call';
import { registry } from '../../functions/registry';
import type { PortArea, PortCell, WorkbookPort } from '../../functions/workbook';
import { addressOf } from './areas';

/** An argument: cells of the workbook, a constant, or nothing. */
export type LibraryArgument = PortArea | number | string | boolean | undefined;

export type LibraryCell = number | string | boolean | { readonly error: string; readonly message?: string };

/** Calls a worksheet function on cells of the workbook as the sheet would; what it refuses comes back as an error with its words. */
export async function callLibrary(port: WorkbookPort, name: string, args: readonly LibraryArgument[]): Promise<LibraryCell[][]> {
  const declaration = registry.find((d) => d.name === name);
  if (!declaration) throw new Error(`no function ${name}`);
  const values = await Promise.all(args.map((arg) => rawOf(port, arg)));
  const addresses = args.map((arg) => (typeof arg === 'object' ? addressOf(arg) : undefined));
  const parameters = Object.values(declaration.parameters);
  const fixed = parameters.some((p) => p.repeating) ? parameters.length - 1 : parameters.length;
  const head = Array.from({ length: fixed }, (_, i) => values[i] ?? null);
  const call = fixed < parameters.length ? [...head, values.slice(fixed)] : head;
  try {
    const cells = await callFunction(declaration, [...call, { address: '', parameterAddresses: addresses }], { port });
    return cells.map((row) => row.map(cellOf));
  } catch (thrown) {
    const error = cellOf(thrown);
    if (typeof error !== 'object') throw thrown;
    return [[error]];
  }
}

async function rawOf(port: WorkbookPort, arg: LibraryArgument): Promise<unknown> {
  if (typeof arg !== 'object') return arg ?? null;
  const [{ cells }] = await port.read([arg]);
  return Array.from({ length: arg.rows }, (_, r) => cells.slice(r * arg.cols, (r + 1) * arg.cols).map(handed));
}

const handed = (cell: PortCell | null): unknown =>
  (cell === null ? null : typeof cell.value === 'object' ? new CustomFunctions.Error(cell.value.error) : (cell.value ?? null));

function cellOf(cell: unknown): LibraryCell {
  if (typeof cell === 'number' || typeof cell === 'string' || typeof cell === 'boolean') return cell;
  if (cell instanceof CustomFunctions.Error) {
    const { code, message } = cell as { code: string; message?: string };
    return { error: code, message };
  }
  throw cell instanceof Error ? cell : new Error('a function gave what is no cell');
}

/** The words of an error, or undefined where the cell is none. */
export const problemOf = (cell: LibraryCell | undefined): string | undefined => (typeof cell === 'object' ? (cell.message ?? cell.error) : undefined);
