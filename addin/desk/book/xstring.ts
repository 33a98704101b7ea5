/**
 * The `_xHHHH_` escapes of spreadsheet strings: UTF-16 units that XML cannot hold. `_x005F_` stands for an underscore that
 * would otherwise begin an escape.
 *
 * @source  ECMA-376 part 1, 22.9.2.19 (ST_Xstring).
 */
export function decodeXstring(text: string): string {
  if (!text.includes('_x')) return text;
  return text.replace(/_x([0-9A-Fa-f]{4})_/g, (_all, code: string) => String.fromCharCode(parseInt(code, 16)));
}

/** UTF-16 units that XML cannot hold, or would turn into another: a carriage return becomes a line feed. */
const UNSAFE = '[\\u0000-\\u0008\\u000b-\\u001f\\ufffe\\uffff]|[\\ud800-\\udbff](?![\\udc00-\\udfff])|(?<![\\ud800-\\udbff])[\\udc00-\\udfff]';
/** In an attribute, tab and line feed would become blanks. */
const UNSAFE_IN_ATTRIBUTE = `${UNSAFE}|[\\t\\n]`;

/** The inverse, for the text of an element. Law: `decodeXstring(encodeXstring(s))` is `s`. */
export function encodeXstring(text: string): string {
  return text.replace(IN_ELEMENT, escapeUnit);
}

/** The same for an attribute's value. */
export function encodeXstringAttribute(text: string): string {
  return text.replace(IN_ATTRIBUTE, escapeUnit);
}

// An underscore begins an escape also where the underscore that would end it is the first of another escape.
const pattern = (unsafe: string): RegExp => new RegExp(`_(?=x[0-9A-Fa-f]{4}(?:_|${unsafe}))|${unsafe}`, 'g');
const IN_ELEMENT = pattern(UNSAFE);
const IN_ATTRIBUTE = pattern(UNSAFE_IN_ATTRIBUTE);

function escapeUnit(unit: string): string {
  return `_x${unit.charCodeAt(0).toString(16).toUpperCase().padStart(4, '0')}_`;
}
