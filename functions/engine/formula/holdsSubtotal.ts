/**
 * Whether a formula calls SUBTOTAL or AGGREGATE anywhere: then other subtotals pass over its cell.
 *
 * @param formula   With or without its `=`, in either notation.
 * @source Excel's documentation of SUBTOTAL ("nested subtotals are ignored"); that "anywhere" is meant is from memory
 * @example holdsSubtotal('=1+SUBTOTAL(9,RC[-1])') // true
 */
export const holdsSubtotal = (formula: string): boolean =>
  /\b(?:SUBTOTAL|AGGREGATE)\s*\(/i.test(formula.includes('"') || formula.includes("'") ? formula.replace(/"[^"]*"|'[^']*'/g, '""') : formula);
