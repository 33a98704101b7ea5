import { SaxesParser } from 'saxes';
import type { SaxesTagNS } from 'saxes';
import { BookError } from './BookError';

export type XmlTag = SaxesTagNS;

/** Positions count UTF-16 units of the scanned text: `start` of the `<`, `end` after the `>`. */
export interface XmlHandlers {
  open(tag: XmlTag, start: number, end: number): void;
  /** For `<a/>`, called right after `open` with the same positions. */
  close(tag: XmlTag, start: number, end: number): void;
  text?(text: string): void;
}

/**
 * One pass over a part, with namespaces resolved, entities of XML itself decoded and line ends normalised.
 *
 * @throws  BookError for XML that is not well-formed, a DOCTYPE (nothing in the format needs one, and its entities can be
 *          turned against the reader), or a declared encoding other than UTF-8 or UTF-16.
 */
export function scanXml(text: string, part: string, handlers: XmlHandlers): void {
  const parser = new SaxesParser({ xmlns: true as const });
  parser.on('error', (error) => {
    throw new BookError(`part ${part} is not well-formed XML: ${error.message}`);
  });
  parser.on('doctype', () => {
    throw new BookError(`part ${part} has a DOCTYPE, which a workbook must not have`);
  });
  parser.on('xmldecl', ({ encoding }) => {
    if (encoding !== undefined && !/^(utf-?(8|16)|us-ascii)$/i.test(encoding)) {
      throw new BookError(`part ${part} declares the encoding ${encoding}; only UTF-8 and UTF-16 are read`);
    }
  });
  // A "<" cannot stand inside a tag (not even in an attribute value), so the last one before the end is the tag's own.
  parser.on('opentag', (tag) => handlers.open(tag, text.lastIndexOf('<', parser.position - 1), parser.position));
  parser.on('closetag', (tag) => handlers.close(tag, text.lastIndexOf('<', parser.position - 1), parser.position));
  if (handlers.text) {
    parser.on('text', handlers.text);
    parser.on('cdata', handlers.text);
  }
  // The whole text at once: positions are then indexes into it.
  parser.write(text).close();
}
