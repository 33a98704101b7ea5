/** Text made safe for an XML element or a double-quoted attribute. */
export function escapeXml(text: string): string {
  return text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
}

export type Attributes = Record<string, string | number | undefined>;

/** One element as text. `content` is XML already; an attribute that is undefined is left out. */
export function element(name: string, attributes: Attributes = {}, content = ''): string {
  let head = `<${name}`;
  for (const [key, value] of Object.entries(attributes)) {
    if (value !== undefined) head += ` ${key}="${escapeXml(String(value))}"`;
  }
  return content === '' ? `${head}/>` : `${head}>${content}</${name}>`;
}

/** An element whose content is plain text. */
export function textElement(name: string, text: string, attributes: Attributes = {}): string {
  const keepsBlanks = text !== text.trim() || text.includes('\n');
  return element(name, keepsBlanks ? { ...attributes, 'xml:space': 'preserve' } : attributes, escapeXml(text));
}

/** A whole part: declaration and root element. */
export function xmlPart(root: string): string {
  return `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n${root}`;
}
