import { areaName, parseArea } from './area';
import { BookError } from './BookError';
import type { Splice } from './splice';
import { appendInside, attribute, childOf, childrenOf, parseXml, prefixOf, withAttributes } from './xmlTree';
import { escapeXml } from './xmlText';
import { encodeXstring, encodeXstringAttribute } from './xstring';

export interface NewColumn {
  name: string;
  formula?: string;
}

/** The replacements that add columns at the right of a table: its area, its filter and its list of columns grow together. */
export function extendTable(text: string, part: string, columns: readonly NewColumn[]): Splice[] {
  const root = parseXml(text, part);
  const list = childOf(root, 'tableColumns');
  if (!list) throw new BookError(`part ${part} has no table columns`);
  const p = prefixOf(list);
  const known = childrenOf(list, 'tableColumn');
  let id = Math.max(0, ...known.map((column) => Number(attribute(column, 'id'))));
  const xml = columns.map(({ name, formula }) => {
    const head = `<${p}tableColumn id="${++id}" name="${escapeXml(encodeXstringAttribute(name))}"`;
    if (formula === undefined) return `${head}/>`;
    return `${head}><${p}calculatedColumnFormula>${escapeXml(encodeXstring(formula))}</${p}calculatedColumnFormula></${p}tableColumn>`;
  });
  const wider = (ref: string | undefined): string => {
    const area = parseArea(ref ?? '', `part ${part}`);
    return areaName({ ...area, right: area.right + columns.length });
  };
  const splices: Splice[] = [
    { start: root.start, end: root.openEnd, text: withAttributes(text.slice(root.start, root.openEnd), { ref: wider(attribute(root, 'ref')) }) },
    ...appendInside(text, list, xml.join(''), { count: String(known.length + columns.length) }),
  ];
  const filter = childOf(root, 'autoFilter');
  if (filter && attribute(filter, 'ref') !== undefined) {
    const tag = withAttributes(text.slice(filter.start, filter.openEnd), { ref: wider(attribute(filter, 'ref')) });
    splices.push({ start: filter.start, end: filter.openEnd, text: tag });
  }
  return splices;
}
