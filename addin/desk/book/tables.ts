import { parseArea } from './area';
import type { Area } from './area';
import { attribute, childOf, childrenOf, parseXml } from './xmlTree';
import { decodeXstring } from './xstring';

export interface BookTable {
  /** The name that formulas use. */
  name: string;
  /** Index into `Book.sheets`. */
  sheet: number;
  ref: Area;
  columns: string[];
  headerRows: number;
  totalsRows: number;
  /** The area of its filter, if that is in force. */
  filter?: Area;
}

/** A table and the part that holds it. */
export interface StoredTable extends BookTable {
  part: string;
  /** "worksheet", or "queryTable" and "xml", whose columns are bound to a source of data. */
  kind: string;
}

export function readTable(text: string, part: string, sheet: number): StoredTable {
  const root = parseXml(text, part);
  const filter = childOf(root, 'autoFilter');
  const filtered = childrenOf(filter, 'filterColumn').some((column) => column.children.length > 0) ? attribute(filter!, 'ref') : undefined;
  return {
    part, sheet,
    name: decodeXstring(attribute(root, 'displayName') ?? attribute(root, 'name') ?? ''),
    kind: attribute(root, 'tableType') ?? 'worksheet',
    ref: parseArea(attribute(root, 'ref') ?? '', `part ${part}`),
    columns: childrenOf(childOf(root, 'tableColumns'), 'tableColumn').map((column) => decodeXstring(attribute(column, 'name') ?? '')),
    headerRows: Number(attribute(root, 'headerRowCount') ?? 1),
    totalsRows: Number(attribute(root, 'totalsRowCount') ?? 0),
    ...(filtered !== undefined && { filter: parseArea(filtered, `part ${part}`) }),
  };
}
