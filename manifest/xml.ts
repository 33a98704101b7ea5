/** An element of an XML document. */
export interface XmlElement {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly content: string | readonly XmlElement[];
}

/** An element with attributes, and with children or a text. */
export const element = (
  name: string,
  attributes: Readonly<Record<string, string>> = {},
  content: string | readonly XmlElement[] = [],
): XmlElement => ({ name, attributes, content });

/** The text of a document, indented by two spaces. */
export const xmlDocument = (root: XmlElement): string => `<?xml version="1.0" encoding="UTF-8"?>\n${lines(root, '').join('\n')}\n`;

function lines({ name, attributes, content }: XmlElement, indent: string): string[] {
  const tag = [name, ...Object.entries(attributes).map(([key, value]) => `${key}="${escape(value)}"`)].join(' ');
  if (content.length === 0) return [`${indent}<${tag}/>`];
  if (typeof content === 'string') return [`${indent}<${tag}>${escape(content)}</${name}>`];
  return [`${indent}<${tag}>`, ...content.flatMap((child) => lines(child, `${indent}  `)), `${indent}</${name}>`];
}

const escape = (text: string): string =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;').replaceAll('"', '&quot;');
