import { BookError } from './BookError';
import { isMain } from './namespaces';
import { scanXml } from './scanXml';
import type { XmlTag } from './scanXml';
import type { Splice } from './splice';

/** An element of a small part, with its places in the text. Sheets and shared strings are scanned instead. */
export interface XmlElement {
  tag: XmlTag;
  children: XmlElement[];
  text: string;
  start: number;
  openEnd: number;
  closeStart: number;
  end: number;
}

export function parseXml(text: string, part: string): XmlElement {
  const open: XmlElement[] = [];
  let root: XmlElement | undefined;
  scanXml(text, part, {
    open(tag, start, openEnd) {
      const element: XmlElement = { tag, children: [], text: '', start, openEnd, closeStart: 0, end: 0 };
      if (open.length > 0) open[open.length - 1].children.push(element);
      else root = element;
      open.push(element);
    },
    close(_tag, start, end) {
      const element = open.pop()!;
      element.closeStart = start;
      element.end = end;
    },
    text(data) {
      if (open.length > 0) open[open.length - 1].text += data;
    },
  });
  if (!root) throw new BookError(`part ${part} is empty`);
  return root;
}

/** Value of an attribute without prefix. */
export function attribute(element: XmlElement, name: string): string | undefined {
  return element.tag.attributes[name]?.value;
}

/** Children of the main namespace by that name. */
export function childrenOf(element: XmlElement | undefined, local: string): XmlElement[] {
  return element?.children.filter((child) => child.tag.local === local && isMain(child.tag.uri)) ?? [];
}

export function childOf(element: XmlElement | undefined, local: string): XmlElement | undefined {
  return childrenOf(element, local)[0];
}

/** `x:` or nothing: the prefix that new elements of the same namespace take. */
export function prefixOf(element: { tag: Pick<XmlTag, 'prefix'> }): string {
  return element.tag.prefix === '' ? '' : `${element.tag.prefix}:`;
}

/** The opening tag with attributes set (or removed, where undefined), all else as written. */
export function withAttributes(openTag: string, changes: Record<string, string | undefined>): string {
  let result = openTag;
  for (const [name, value] of Object.entries(changes)) {
    const found = new RegExp(`\\s+${name}\\s*=\\s*(?:"[^"]*"|'[^']*')`).exec(maskValues(result, name));
    const text = value === undefined ? '' : ` ${name}="${value}"`;
    if (found) result = result.slice(0, found.index) + text + result.slice(found.index + found[0].length);
    else if (text !== '') result = result.replace(/\s*\/?>$/, (tail) => text + tail.trim());
  }
  return result;
}

/** Appends XML inside an element, opening it first if it is `<a/>`, with attributes of its tag changed. */
export function appendInside(text: string, element: XmlElement, xml: string, changes: Record<string, string | undefined> = {}): Splice[] {
  const tag = withAttributes(text.slice(element.start, element.openEnd), changes);
  if (element.tag.isSelfClosing) {
    return [{ start: element.start, end: element.openEnd, text: `${tag.replace(/\s*\/>$/, '>')}${xml}</${element.tag.name}>` }];
  }
  return [
    { start: element.start, end: element.openEnd, text: tag },
    { start: element.closeStart, end: element.closeStart, text: xml },
  ];
}

/** The same text with other attributes' values blanked, so that ` r="…"` inside a value is never taken for an attribute. */
function maskValues(tag: string, keep: string): string {
  return tag.replace(/([^\s=]+)(\s*=\s*)("[^"]*"|'[^']*')/g, (all, name: string, equals: string, value: string) =>
    name === keep ? all : name + equals + value[0] + '_'.repeat(value.length - 2) + value[0]);
}
