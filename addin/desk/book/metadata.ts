import { applySplices } from './splice';
import { appendInside, attribute, childOf, childrenOf, parseXml, prefixOf } from './xmlTree';
import type { XmlElement } from './xmlTree';

export const METADATA_TYPE = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheetMetadata+xml';

/** The extension that marks a dynamic array. @source [MS-XLSX] 2.2.4.9, 2.4.81 (dynamicArrayProperties) */
const NAME = 'XLDAPR';
const EXT_URI = '{bdbb8cdc-fa1e-496e-a857-3c3f30c029c3}';
const EXT_NAMESPACE = 'http://schemas.microsoft.com/office/spreadsheetml/2017/dynamicarray';
const METADATA_FLAGS = 'minSupportedVersion="120000" copy="1" pasteAll="1" pasteValues="1" merge="1" splitFirst="1" rowColShift="1" '
  + 'clearFormats="1" clearComments="1" assign="1" coerce="1" cellMeta="1"';

/** For each `cm` index of a cell (1-based: place 0 is false), whether it marks a dynamic array. */
export function readDynamicMarks(text: string, part: string): boolean[] {
  const root = parseXml(text, part);
  const types = childrenOf(childOf(root, 'metadataTypes'), 'metadataType').map((type) => attribute(type, 'name'));
  const dynamic = childrenOf(futureMetadata(root), 'bk').map(isDynamic);
  const marks = childrenOf(childOf(root, 'cellMetadata'), 'bk').map((bk) =>
    childrenOf(bk, 'rc').some((rc) => types[Number(attribute(rc, 't')) - 1] === NAME && dynamic[Number(attribute(rc, 'v'))] === true));
  return [false, ...marks];
}

/** The `cm` index that marks a dynamic array: the existing one, else one appended. Existing indexes keep their meaning. */
export function withDynamicMark(text: string, part: string): { text: string; cm: number } {
  const cm = readDynamicMarks(text, part).indexOf(true);
  if (cm > 0) return { text, cm };
  let current = text;
  const root = (): XmlElement => parseXml(current, part);
  const p = prefixOf(root());

  let types = childrenOf(childOf(root(), 'metadataTypes'), 'metadataType');
  let type = types.findIndex((item) => attribute(item, 'name') === NAME);
  if (type < 0) {
    type = types.length;
    current = append(current, root(), 'metadataTypes', `<${p}metadataType name="${NAME}" ${METADATA_FLAGS}/>`, type + 1, []);
    types = childrenOf(childOf(root(), 'metadataTypes'), 'metadataType');
  }

  const future = futureMetadata(root());
  const blocks = childrenOf(future, 'bk');
  let value = blocks.findIndex(isDynamic);
  if (value < 0) {
    value = blocks.length;
    const bk = `<${p}bk><${p}extLst><${p}ext uri="${EXT_URI}"><xda:dynamicArrayProperties xmlns:xda="${EXT_NAMESPACE}" `
      + `fDynamic="1" fCollapsed="0"/></${p}ext></${p}extLst></${p}bk>`;
    if (future) current = applySplices(current, appendInside(current, future, bk, { count: String(value + 1) }));
    else {
      const list = `<${p}futureMetadata name="${NAME}" count="1">${bk}</${p}futureMetadata>`;
      current = insertAfter(current, root(), list, ['metadataTypes', 'metadataStrings', 'mdxMetadata', 'futureMetadata']);
    }
  }

  const cells = childrenOf(childOf(root(), 'cellMetadata'), 'bk').length;
  const bk = `<${p}bk><${p}rc t="${type + 1}" v="${value}"/></${p}bk>`;
  const before = ['metadataTypes', 'metadataStrings', 'mdxMetadata', 'futureMetadata'];
  return { text: append(current, root(), 'cellMetadata', bk, cells + 1, before), cm: cells + 1 };
}

/** A metadata part that holds nothing but the dynamic mark, whose `cm` is 1. */
export function newMetadata(mainUri: string): string {
  return withDynamicMark(`<metadata xmlns="${mainUri}"/>`, 'metadata').text;
}

function futureMetadata(root: XmlElement): XmlElement | undefined {
  return childrenOf(root, 'futureMetadata').find((item) => attribute(item, 'name') === NAME);
}

function isDynamic(bk: XmlElement): boolean {
  return childrenOf(childOf(bk, 'extLst'), 'ext').some((ext) =>
    ext.children.some((child) => child.tag.local === 'dynamicArrayProperties' && ['1', 'true'].includes(attribute(child, 'fDynamic') ?? '0')));
}

/** Appends to a counted list, making the list after those elements that the schema puts before it. */
function append(text: string, root: XmlElement, list: string, xml: string, count: number, before: string[]): string {
  const element = childOf(root, list);
  if (element) return applySplices(text, appendInside(text, element, xml, { count: String(count) }));
  const name = prefixOf(root) + list;
  return insertAfter(text, root, `<${name} count="${count}">${xml}</${name}>`, before);
}

function insertAfter(text: string, root: XmlElement, xml: string, before: string[]): string {
  const last = root.children.filter((child) => before.includes(child.tag.local)).at(-1);
  if (last) return applySplices(text, [{ start: last.end, end: last.end, text: xml }]);
  if (root.tag.isSelfClosing) return applySplices(text, appendInside(text, root, xml));
  return applySplices(text, [{ start: root.openEnd, end: root.openEnd, text: xml }]);
}
