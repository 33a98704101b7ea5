import type { Expression, Program, RelativeArea } from '../../../functions/engine/formula/expression';
import { type TableShape, placeArea, tableArea } from '../../../functions/engine/formula/evaluate';
import type { Area } from '../../../functions/engine/formula/value';
import type { CellPlace } from '../../../functions/engine/graph/cellGraph';

/** What the walk asks of the workbook. */
export interface Surroundings {
  sheetIndex(name: string): number | undefined;
  /** A defined name seen from a sheet, compiled. */
  nameProgram(name: string, sheet: number): Program | undefined;
  table(name: string, sheet: number, row: number, col: number): TableShape | undefined;
}

/** All that a formula may read, whichever way its decisions fall. */
export interface FormulaReads {
  readonly areas: readonly Area[];
  /** It calls a custom function, itself or through a name. */
  readonly callsHost: boolean;
  /** It makes references that only an evaluation can tell: OFFSET, INDIRECT, `A1:INDEX(…)`. */
  readonly unforeseen: boolean;
}

const REFERENCE_MAKERS = new Set(['OFFSET', 'INDIRECT']);
const STRETCHES = new Set(['SUMIF', 'AVERAGEIF']);

/**
 * The references of a formula at a cell. Of a spill, `A1#`, it is the anchor alone: who asks for dependents of a spill asks for those of
 * its anchor too.
 */
export function formulaReads(program: Program, place: CellPlace, around: Surroundings): FormulaReads {
  const areas: Area[] = [];
  const open = new Set<string>();
  let callsHost = false;
  let unforeseen = false;

  const add = (r: RelativeArea, sheet: number | undefined): Area | undefined => {
    const area = sheet === undefined ? undefined : placeArea(r, sheet, place.row, place.col);
    if (area) areas.push(area);
    return area;
  };
  const sheetOf = (r: RelativeArea): number | undefined => (r.sheet === undefined ? place.sheet : around.sheetIndex(r.sheet));

  const addTable = (name: string, columns: readonly string[], sections: readonly string[]): void => {
    const table = around.table(name, place.sheet, place.row, place.col);
    const area = table && tableArea(table, columns, sections, place.row);
    if (area) areas.push(area);
  };

  const visit = (e: Expression | null): void => {
    if (!e) return;
    switch (e.k) {
      case 'reference':
        add(e.reference, sheetOf(e.reference));
        return;
      case 'sheets': {
        const first = around.sheetIndex(e.first);
        const last = around.sheetIndex(e.last);
        if (first === undefined || last === undefined) return;
        for (let sheet = Math.min(first, last); sheet <= Math.max(first, last); sheet++) add(e.reference, sheet);
        return;
      }
      case 'table':
        return addTable(e.table, e.columns, e.sections);
      case 'name': {
        const sheet = e.sheet === undefined ? place.sheet : around.sheetIndex(e.sheet);
        const key = `${sheet}!${e.name.toLowerCase()}`;
        if (sheet === undefined || open.has(key)) return;
        const named = around.nameProgram(e.name, sheet);
        if (!named) return addTable(e.name, [], []);
        open.add(key);
        visit(named.root);
        open.delete(key);
        return;
      }
      case 'range': {
        const before = areas.length;
        visit(e.left);
        visit(e.right);
        const [a, b] = areas.slice(before);
        const plain = e.left.k === 'reference' && e.right.k === 'reference' && a && b && a.sheet === b.sheet;
        if (!plain) unforeseen = true;
        else areas.push({ ...a, r1: Math.min(a.r1, b.r1), c1: Math.min(a.c1, b.c1), r2: Math.max(a.r2, b.r2), c2: Math.max(a.c2, b.c2) });
        return;
      }
      case 'unary':
      case 'spill':
      case 'single':
        return visit(e.of);
      case 'binary':
      case 'union':
      case 'intersection':
        visit(e.left);
        visit(e.right);
        return;
      case 'host':
        callsHost = true;
        return e.args.forEach(visit);
      case 'call': {
        const before = areas.length;
        e.args.forEach(visit);
        if (REFERENCE_MAKERS.has(e.native.name)) unforeseen = true;
        // SUMIF gives its last range the size of its first.
        const [first, ...others] = areas.slice(before);
        if (STRETCHES.has(e.native.name) && e.args[2] && others.some((a) => a.r2 - a.r1 !== first.r2 - first.r1 || a.c2 - a.c1 !== first.c2 - first.c1)) unforeseen = true;
        return;
      }
      case 'apply':
        visit(e.callee);
        return e.args.forEach(visit);
      case 'let':
        e.values.forEach(visit);
        return visit(e.body);
      case 'lambda':
        return visit(e.body);
      case 'constant':
      case 'array':
      case 'refuse':
    }
  };
  visit(program.root);
  return { areas, callsHost, unforeseen };
}
