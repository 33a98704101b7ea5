import { FUTURE_FUNCTIONS } from '../../addin/desk/sheet/futureFunctions';

/** A formula with the prefixes under which files store functions that are younger than their format. */
export const storedFormula = (formula: string): string =>
  formula.replace(/(?<![A-Z0-9._])([A-Z][A-Z0-9.]*)(?=\()/g, (name) => (FUTURE_FUNCTIONS.get(name) ?? '') + name);
