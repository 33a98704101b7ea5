import { BookError } from './BookError';

export type XmlEncoding = 'utf-8' | 'utf-8 with mark' | 'utf-16le' | 'utf-16be';

/** The text of an XML part, without byte order mark, and the encoding to write it back in. */
export function decodeXml(bytes: Uint8Array, part: string): { text: string; encoding: XmlEncoding } {
  const encoding = encodingOf(bytes);
  const skip = encoding === 'utf-8' ? 0 : encoding === 'utf-8 with mark' ? 3 : 2;
  try {
    const decoder = new TextDecoder(encoding === 'utf-8 with mark' ? 'utf-8' : encoding, { fatal: true, ignoreBOM: true });
    return { text: decoder.decode(skip === 0 ? bytes : bytes.subarray(skip)), encoding };
  } catch {
    throw new BookError(`part ${part} is not valid ${encoding.slice(0, 6).toUpperCase()} text`);
  }
}

/** The inverse of `decodeXml`: equal text gives equal bytes. */
export function encodeXml(text: string, encoding: XmlEncoding): Uint8Array {
  if (encoding === 'utf-8') return new TextEncoder().encode(text);
  if (encoding === 'utf-8 with mark') return new TextEncoder().encode('\ufeff' + text);
  const bytes = new Uint8Array(2 + 2 * text.length);
  const view = new DataView(bytes.buffer);
  const little = encoding === 'utf-16le';
  view.setUint16(0, 0xfeff, little);
  for (let i = 0; i < text.length; i++) view.setUint16(2 + 2 * i, text.charCodeAt(i), little);
  return bytes;
}

/** Character data, safe in an element and in an attribute in double quotes (where line ends would become blanks). */
export function escapeXml(text: string): string {
  return text.replace(/[&<>"]/g, (c) => (c === '&' ? '&amp;' : c === '<' ? '&lt;' : c === '>' ? '&gt;' : '&quot;'));
}

/** UTF-16 only with its mark, as XML 1.0, 4.3.3 requires. */
function encodingOf(bytes: Uint8Array): XmlEncoding {
  if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) return 'utf-8 with mark';
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'utf-16le';
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return 'utf-16be';
  return 'utf-8';
}
