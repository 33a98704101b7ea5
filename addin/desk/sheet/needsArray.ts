import type { Expression } from '../../../functions/engine/formula/expression';
import { kindAt } from '../../../functions/engine/formula/native';

/**
 * Whether a formula, as typed into a program that spills, computes with whole ranges where an ordinary stored formula would take one cell
 * of them (`=SUM(A1:A3*B1:B3)`): such a formula has to be stored as a dynamic array, however many cells it fills.
 */
export function needsArray(e: Expression | null): boolean {
  if (!e) return false;
  switch (e.k) {
    case 'unary':
      return isRange(e.of) || needsArray(e.of);
    case 'binary':
      return [e.left, e.right].some((side) => isRange(side) || needsArray(side));
    case 'call':
      return GIVES_ARRAYS.has(e.native.name) || e.args.some((arg, i) => needsArray(arg) || (!e.native.lazy && kindAt(e.native.kinds, e.native.repeating, i) !== 'range' && isRange(arg)));
    case 'host':
    case 'apply':
      return e.args.some(needsArray);
    case 'let':
      return [...e.values, e.body].some(needsArray);
    case 'lambda':
      return needsArray(e.body);
    case 'spill':
    case 'single':
      return needsArray(e.of);
    default:
      return false;
  }
}

/** Functions that came with dynamic arrays: a formula with one of them is stored as such, whatever it gives. */
const GIVES_ARRAYS = new Set(`
  BYCOL BYROW CHOOSECOLS CHOOSEROWS DROP EXPAND FILTER HSTACK MAKEARRAY MAP SCAN SEQUENCE SORT SORTBY TAKE TEXTSPLIT TOCOL TOROW UNIQUE VSTACK
  WRAPCOLS WRAPROWS`.trim().split(/\s+/));

/** Several cells for certain, or what may be: a part of a table that is not its row. */
function isRange(e: Expression | null): boolean {
  switch (e?.k) {
    case 'array':
    case 'spill':
    case 'range':
      return true;
    case 'table':
      return !e.sections.some((section) => /^#?this row$/i.test(section)) || e.columns.length > 1;
    case 'reference': {
      const { r1, r2, c1, c2 } = e.reference;
      return !(r1 && r2 && c1 && c2 && r1.at === r2.at && r1.absolute === r2.absolute && c1.at === c2.at && c1.absolute === c2.absolute);
    }
    default:
      return false;
  }
}
