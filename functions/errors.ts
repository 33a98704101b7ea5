import { EngineError } from './engine/EngineError';

/** Every error value a worksheet knows. Only #VALUE! and #N/A show a message. */
export const errorCodes = ['#VALUE!', '#N/A', '#NUM!', '#DIV/0!', '#NULL!', '#REF!', '#NAME?'] as const;
export type ErrorCode = (typeof errorCodes)[number];

/**
 * An error as a cell: what a body returns for one cell, or throws for the whole call. The message is a phrase that follows the
 * function's name and a colon: `cell E7 uses BESSELJ, which cannot be followed`, no full stop.
 */
export class CellError extends Error {
  override name = 'CellError';

  constructor(
    readonly code: ErrorCode,
    message = '',
  ) {
    super(message);
  }
}

/** A refusal in words, which only #VALUE! can show. */
export const refusal = (message: string): CellError => new CellError('#VALUE!', message);

/**
 * Whatever was thrown, as a cell. The engine's refusals become #VALUE! with their words, the engine function's name dropped: the
 * user knows the worksheet function only. So do those of the workbook's port. Anything else is a bug of this library and says so.
 *
 * @param where   Appended to the engine's words: ` in row 3`.
 */
export function toCellError(thrown: unknown, where = ''): CellError {
  if (thrown instanceof CellError) return thrown;
  if (thrown instanceof EngineError) return refusal(withoutFunctionName(thrown.message) + where);
  if (thrown instanceof Error && thrown.name === 'PortRefusal') return refusal(thrown.message + where);
  const words = thrown instanceof Error ? `${thrown.name}: ${thrown.message}` : String(thrown);
  return refusal(`fault in the library (${words})${where}`);
}

/** `combine needs 3 …` is `needs 3 …`; an argument's own name (`shape needs …`) stays, having no capital inside or being no function. */
export function withoutFunctionName(message: string): string {
  return message.replace(/^(?:combine|[a-z]+[A-Z][A-Za-z]*)(?= (?:needs|gives)\b)\s*/, '');
}

/** The error of a cell as the host takes it, its message beginning with the function's name. */
export function toExcelError(functionName: string, error: CellError): unknown {
  const message = error.message === '' ? undefined : `${functionName}: ${error.message}`;
  return new CustomFunctions.Error(error.code, message);
}

/** What the host provides. Declared here instead of through a types package: three members are all that is used. */
interface CustomFunctionsHost {
  associate(id: string, body: (...args: unknown[]) => unknown): void;
  Error: new (code: string, message?: string) => object;
}

declare global {
  const CustomFunctions: CustomFunctionsHost;
}
