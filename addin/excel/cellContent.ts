/** What a cell held, as far as it takes to put it back. */
export interface Content {
  readonly formula: unknown;
  readonly value: unknown;
  readonly type: string;
  readonly format: unknown;
  readonly hasSpill: boolean;
}

/**
 * A constant as it has to be written so that the cell holds just this: Excel reads what is written as if it were typed, and would make a
 * date of the text "1-2", a formula of "=A1". An apostrophe before it says that it is a text; Excel takes it away.
 */
export function asTyped(value: string | number | boolean): string | number | boolean {
  return typeof value === 'string' && (/^\s*[=+\-@'#]|\d/.test(value) || /^\s*(true|false)\s*$/i.test(value)) ? `'${value}` : value;
}

/** What has to be written so that a cell holds again what it held. Its number format has to be back before. */
export function asBefore({ formula, value, type, format, hasSpill }: Content): unknown {
  const isFormula = typeof formula === 'string' && formula.startsWith('=') && formula !== value;
  if (isFormula) return formula;
  if (hasSpill || value === '') return ''; // what spilled into it comes back with its anchor
  if (type === 'String' && format !== '@') return asTyped(String(value)); // in a cell for texts everything that is typed is a text
  return formula;
}
