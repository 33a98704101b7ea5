import type { FunctionMetadata, FunctionsMetadata } from '../../../functions/metadata';
import type { WorkbookPort } from '../../../functions/workbook';

/** A value in a cell as the sheet holds it; null for a blank one. */
export type HostCell = number | string | boolean | null | { readonly error: string };

/** One argument of a call; undefined for one that is left out. */
export type HostArgument = { readonly cells: readonly (readonly HostCell[])[]; readonly address?: string } | undefined;

/** Error value of a cell or of a whole call, with the message that the host would show. */
export interface HostError {
  readonly error: string;
  readonly message?: string;
}

export type HostResult =
  | { readonly ok: true; readonly cells: readonly (readonly (number | string | boolean | HostError)[])[] }
  | { readonly ok: false; readonly error: HostError };

export interface FunctionHostOptions {
  /** Text of the built functions bundle, which is then run in a scope of its own. */
  readonly source?: string;
  /** Or what the bundle associated when it was loaded as a script: where texts may not be run. */
  readonly loaded?: LoadedFunctions;
  /** Text of the built functions.json. */
  readonly metadata: string;
  readonly port?: WorkbookPort | (() => WorkbookPort | undefined);
  readonly settings?: { readonly decimalSeparator?: '.' | ',' };
  /** How blank cells arrive; both happen. Default 'null'. */
  readonly blanks?: 'null' | 'zero';
  /** Whether the host knows addresses of arguments. Default true. */
  readonly parameterAddresses?: boolean;
}

export interface LoadedFunctions {
  readonly bodies: ReadonlyMap<string, FunctionBody>;
  /** Says through which port the functions read from now on. */
  usePort(port: FunctionHostOptions['port']): void;
}

export interface FunctionHost {
  readonly functions: readonly FunctionMetadata[];
  /**
   * Calls a function as Excel does.
   *
   * @param id        As in functions.json, without the namespace.
   * @param args      One a parameter in order; those of a repeating parameter follow one another.
   * @param address   The calling cell: `Sheet1!F5`.
   * @throws          Error for what only a mistake in the library or in its caller can cause: an unknown function, too many arguments, a
   *                  result that is no matrix.
   */
  call(id: string, args: readonly HostArgument[], address?: string): Promise<HostResult>;
}

/**
 * Runs the functions bundle without Excel, with Excel's own habits of handing cells over and taking them back, so that what would go wrong
 * there goes wrong here: blanks as null or as 0, omitted arguments as null, errors as objects or (without the permission in the metadata)
 * never reaching the function, NaN and infinity in a result as 0.
 */
export function createFunctionHost(options: FunctionHostOptions): FunctionHost {
  const metadata = JSON.parse(options.metadata) as FunctionsMetadata;
  const bodies = load(options);
  const known = new Map(metadata.functions.map((f) => [f.id, f]));
  for (const { id } of metadata.functions) if (!bodies.has(id)) throw new Error(`the bundle has no function ${id}`);
  for (const id of bodies.keys()) if (!known.has(id)) throw new Error(`functions.json has no function ${id}`);

  return {
    functions: metadata.functions,
    async call(id, args, address) {
      const declared = known.get(id);
      const body = bodies.get(id);
      if (!declared || !body) throw new Error(`no function ${id}`);
      const stopped = metadata.allowErrorForDataTypeAny ? undefined : firstError(args);
      if (stopped) return { ok: false, error: stopped };
      const handed = handOver(declared, args, address, options);
      let result: unknown;
      try {
        result = await body(...handed);
      } catch (thrown) {
        if (thrown instanceof HostErrorObject) return { ok: false, error: errorOf(thrown) };
        // What Excel shows for any other exception: no words.
        return { ok: false, error: { error: '#VALUE!' } };
      }
      return takeBack(id, result);
    },
  };
}

export type FunctionBody = (...args: unknown[]) => unknown;

/** The host's error class: what the bundle knows as CustomFunctions.Error. */
class HostErrorObject {
  constructor(
    readonly code: string,
    readonly message?: string,
  ) {}
}

/** What the bundle knows by the name CustomFunctions: it puts its functions into `bodies`. */
export const customFunctions = (bodies: Map<string, FunctionBody>): object => ({
  associate: (id: string, body: FunctionBody) => void bodies.set(id, body),
  Error: HostErrorObject,
  ErrorCode: {
    invalidValue: '#VALUE!', notAvailable: '#N/A', invalidNumber: '#NUM!', divisionByZero: '#DIV/0!',
    nullReference: '#NULL!', invalidName: '#NAME?', invalidReference: '#REF!',
  },
});

/** Evaluates the bundle in a scope of its own: its free names are parameters, nothing is put on the global object. */
function load({ source, loaded, port, settings }: FunctionHostOptions): ReadonlyMap<string, FunctionBody> {
  if (loaded) {
    loaded.usePort(port);
    return loaded.bodies;
  }
  const bodies = new Map<string, FunctionBody>();
  new Function('CustomFunctions', 'RootsumPort', 'RootsumHost', source!)(customFunctions(bodies), port, settings);
  return bodies;
}

function handOver(declared: FunctionMetadata, args: readonly HostArgument[], address: string | undefined, options: FunctionHostOptions): unknown[] {
  const { parameters } = declared;
  const repeats = parameters[parameters.length - 1]?.repeating === true;
  const fixed = repeats ? parameters.length - 1 : parameters.length;
  if (!repeats && args.length > fixed) throw new Error(`${declared.id} takes ${fixed} arguments, got ${args.length}`);
  const handed: unknown[] = parameters.slice(0, fixed).map((p, i) => handOne(p.dimensionality, args[i], options));
  if (repeats) handed.push(args.slice(fixed).map((arg) => handOne(parameters[fixed].dimensionality, arg, options)));
  const { requiresAddress, requiresParameterAddresses } = declared.options ?? {};
  const tells = requiresParameterAddresses && options.parameterAddresses !== false;
  const flat = Array.from({ length: repeats ? Math.max(args.length, fixed) : fixed }, (_, i) => args[i]?.address);
  handed.push({
    functionName: declared.id,
    address: requiresAddress ? address : undefined,
    parameterAddresses: tells ? flat : undefined,
  });
  return handed;
}

function handOne(dimensionality: string, arg: HostArgument, options: FunctionHostOptions): unknown {
  if (!arg) return null;
  const cells = arg.cells.map((row) => row.map((cell) => handCell(cell, options)));
  if (dimensionality === 'matrix') return cells;
  if (cells.length !== 1 || cells[0].length !== 1) throw new Error('a range was given where the metadata declares a single value');
  return cells[0][0];
}

function handCell(cell: HostCell, { blanks = 'null' }: FunctionHostOptions): unknown {
  if (cell === null) return blanks === 'zero' ? 0 : null;
  return typeof cell === 'object' ? new HostErrorObject(cell.error) : cell;
}

function firstError(args: readonly HostArgument[]): HostError | undefined {
  for (const arg of args)
    for (const row of arg?.cells ?? []) for (const cell of row) if (typeof cell === 'object' && cell !== null) return { error: cell.error };
  return undefined;
}

function takeBack(id: string, result: unknown): HostResult {
  if (!Array.isArray(result) || result.length === 0 || !result.every((row) => Array.isArray(row) && row.length > 0))
    throw new Error(`${id} is declared to give a matrix and gave something else`);
  const rows = result as unknown[][];
  if (rows.some((row) => row.length !== rows[0].length)) throw new Error(`${id} gave rows of different lengths`);
  return { ok: true, cells: rows.map((row) => row.map((cell) => takeCell(id, cell))) };
}

function takeCell(id: string, cell: unknown): number | string | boolean | HostError {
  if (cell instanceof HostErrorObject) return errorOf(cell);
  if (typeof cell === 'string' || typeof cell === 'boolean') return cell;
  if (typeof cell === 'number') return Number.isFinite(cell) ? cell : 0; // becomes null on its way, which shows as 0
  if (cell == null) return 0;
  throw new Error(`${id} gave a cell of type ${typeof cell}`);
}

/** Only #VALUE! and #N/A show a message. */
function errorOf({ code, message }: HostErrorObject): HostError {
  return code === '#VALUE!' || code === '#N/A' ? { error: code, message } : { error: code };
}
