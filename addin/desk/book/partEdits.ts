import { CONTENT_TYPES, relationsPart } from './parts';
import type { Parts } from './parts';
import { applySplices } from './splice';
import type { Splice } from './splice';
import { appendInside, attribute, parseXml, prefixOf } from './xmlTree';
import { encodeXml, escapeXml } from './xmlText';
import type { XmlEncoding } from './xmlText';
import { pack, writeZip } from './zip';
import type { ZipEntry } from './zip';

const PACKAGE_RELATIONSHIPS = 'http://schemas.openxmlformats.org/package/2006/relationships';
const DECLARATION = '<?xml version="1.0" encoding="UTF-8" standalone="yes"?>\n';

/** Changes to a package, gathered part by part; parts that are not named here keep their bytes, packed as they were. */
export class PartEdits {
  private readonly changed = new Map<string, { text: string; encoding: XmlEncoding }>();
  private readonly removed = new Set<string>();
  private readonly added: string[] = [];

  constructor(private readonly parts: Parts) {}

  /** The text as changed so far. */
  text(name: string): string {
    return this.changed.get(name)?.text ?? this.parts.xml(name).text;
  }

  set(name: string, text: string): void {
    const before = this.changed.get(name);
    if (before) this.changed.set(name, { text, encoding: before.encoding });
    else if (this.parts.entry(name)) {
      const stored = this.parts.xml(name);
      if (stored.text !== text) this.changed.set(name, { text, encoding: stored.encoding });
    } else {
      this.changed.set(name, { text: DECLARATION + text, encoding: 'utf-8' });
      this.added.push(name);
    }
  }

  splice(name: string, splices: readonly Splice[]): void {
    this.set(name, applySplices(this.text(name), splices));
  }

  /** A free part name such as `xl/metadata.xml`, with a number where that is taken. */
  freeName(folder: string, stem: string): string {
    let name = `${folder}${stem}.xml`;
    for (let n = 1; this.parts.entry(name) || this.changed.has(name); n++) name = `${folder}${stem}${n}.xml`;
    return name;
  }

  /** Adds a part with its content type and its relationship from `source`. */
  addPart(name: string, text: string, contentType: string, source: string, relationType: string): void {
    this.set(name, text);
    const types = parseXml(this.text(CONTENT_TYPES), CONTENT_TYPES);
    const override = `<${prefixOf(types)}Override PartName="/${name}" ContentType="${contentType}"/>`;
    this.splice(CONTENT_TYPES, appendInside(this.text(CONTENT_TYPES), types, override));
    const stored = this.parts.find(relationsPart(source));
    const rels = stored ?? relationsPart(source);
    if (stored === undefined && !this.changed.has(rels)) this.set(rels, `<Relationships xmlns="${PACKAGE_RELATIONSHIPS}"/>`);
    const root = parseXml(this.text(rels), rels);
    const ids = new Set(root.children.map((child) => attribute(child, 'Id')));
    let n = root.children.length + 1;
    while (ids.has(`rId${n}`)) n++;
    const relation = `<${prefixOf(root)}Relationship Id="rId${n}" Type="${relationType}" Target="/${escapeXml(name)}"/>`;
    this.splice(rels, appendInside(this.text(rels), root, relation));
  }

  /** Removes a part, its content type and its relationship from `source`. */
  removePart(name: string, source: string): void {
    this.removed.add(name);
    const types = parseXml(this.text(CONTENT_TYPES), CONTENT_TYPES);
    this.splice(CONTENT_TYPES, types.children
      .filter((child) => child.tag.local === 'Override' && attribute(child, 'PartName')?.toLowerCase() === `/${name}`.toLowerCase())
      .map((child) => ({ start: child.start, end: child.end, text: '' })));
    const rels = this.parts.find(relationsPart(source));
    if (rels === undefined) return;
    const ids = this.parts.relations(source).filter((relation) => !relation.external && relation.target === name).map((relation) => relation.id);
    this.splice(rels, parseXml(this.text(rels), rels).children
      .filter((child) => ids.includes(attribute(child, 'Id') ?? ''))
      .map((child) => ({ start: child.start, end: child.end, text: '' })));
  }

  /** The archive: order, packing method and names as they were, new parts last. */
  bytes(): Uint8Array {
    const entries: ZipEntry[] = [];
    for (const entry of this.parts.entries) {
      if (this.removed.has(entry.name)) continue;
      const change = this.changed.get(entry.name);
      entries.push(change ? pack(entry.name, encodeXml(change.text, change.encoding), entry) : entry);
    }
    for (const name of this.added) {
      const change = this.changed.get(name)!;
      entries.push(pack(name, encodeXml(change.text, change.encoding)));
    }
    return writeZip(entries);
  }
}
