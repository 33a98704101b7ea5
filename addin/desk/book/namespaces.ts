import type { XmlTag } from './scanXml';

/** Each namespace of the format exists twice: transitional and strict (ECMA-376 parts 4 and 1). */
const MAIN = ['http://schemas.openxmlformats.org/spreadsheetml/2006/main', 'http://purl.oclc.org/ooxml/spreadsheetml/main'];
const RELATIONSHIPS = [
  'http://schemas.openxmlformats.org/officeDocument/2006/relationships',
  'http://purl.oclc.org/ooxml/officeDocument/relationships',
];

export function isMain(uri: string): boolean {
  return uri === MAIN[0] || uri === MAIN[1];
}

/** The relationship types that go with a main namespace end in `/name` after this. */
export function relationshipsOf(mainUri: string): string {
  return mainUri === MAIN[1] ? RELATIONSHIPS[1] : RELATIONSHIPS[0];
}

/** The value of `r:id`, whatever its prefix. */
export function relationId(tag: Pick<XmlTag, 'attributes'>): string | undefined {
  for (const attribute of Object.values(tag.attributes)) {
    if (attribute.local === 'id' && RELATIONSHIPS.includes(attribute.uri)) return attribute.value;
  }
  return undefined;
}

/** `xsd:boolean`, as Excel reads it. */
export function isTrue(value: string | undefined): boolean {
  return value === '1' || value === 'true' || value === 'on';
}
