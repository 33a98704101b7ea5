import { BookError } from './BookError';
import { attribute, parseXml } from './xmlTree';
import { decodeXml } from './xmlText';
import type { XmlEncoding } from './xmlText';
import { readZip, unpack } from './zip';
import type { ZipEntry } from './zip';

export interface Relation {
  id: string;
  /** The full type; `kind` is its last word, which transitional and strict files share. */
  type: string;
  kind: string;
  /** A part name, or an address where `external`. */
  target: string;
  external: boolean;
}

export const CONTENT_TYPES = '[Content_Types].xml';

/** The parts of a package, kept packed; names are compared without case (ECMA-376 part 2, 6.2.2.3). */
export class Parts {
  readonly entries: readonly ZipEntry[];
  private readonly byName = new Map<string, ZipEntry>();
  private defaults = new Map<string, string>();
  private overrides = new Map<string, string>();

  /** @throws BookError for anything that is no package, with a word on what it looks like. */
  constructor(bytes: Uint8Array) {
    refuseOtherFiles(bytes);
    this.entries = readZip(bytes);
    for (const entry of this.entries) {
      guardName(entry.name);
      const key = entry.name.toLowerCase();
      if (this.byName.has(key)) throw new BookError(`the archive holds part ${entry.name} twice`);
      this.byName.set(key, entry);
    }
    const mimetype = this.byName.get('mimetype');
    if (mimetype && new TextDecoder().decode(unpack(mimetype)).includes('opendocument')) {
      throw new BookError('the file is an OpenDocument file (.ods); save it as .xlsx first');
    }
    if (!this.find(CONTENT_TYPES)) throw new BookError('the archive is not an .xlsx workbook: it has no [Content_Types].xml');
    this.readContentTypes();
  }

  /** The name of a part as stored, or undefined. */
  find(name: string): string | undefined {
    return this.entry(name)?.name;
  }

  entry(name: string): ZipEntry | undefined {
    return this.byName.get(name.toLowerCase());
  }

  bytes(name: string): Uint8Array {
    const entry = this.entry(name);
    if (!entry) throw new BookError(`part ${name} is missing`);
    return unpack(entry);
  }

  xml(name: string): { text: string; encoding: XmlEncoding } {
    return decodeXml(this.bytes(name), name);
  }

  contentType(name: string): string {
    const key = name.toLowerCase();
    return this.overrides.get(key) ?? this.defaults.get(key.slice(key.lastIndexOf('.') + 1)) ?? '';
  }

  /** Relationships of a part, or of the package for "". */
  relations(source: string): Relation[] {
    const name = this.find(relationsPart(source));
    if (name === undefined) return [];
    return parseXml(this.xml(name).text, name).children.filter((child) => child.tag.local === 'Relationship').map((child) => {
      const type = attribute(child, 'Type') ?? '';
      const target = attribute(child, 'Target') ?? '';
      const external = attribute(child, 'TargetMode') === 'External';
      return {
        id: attribute(child, 'Id') ?? '', type, kind: type.slice(type.lastIndexOf('/') + 1), external,
        target: external ? target : this.resolve(source, target),
      };
    });
  }

  /**
   * A relationship's target as a part name: the stored spelling where the part exists. What would lead above the package stays in it
   * (RFC 3986, 5.2.4); LibreOffice writes such targets.
   */
  private resolve(source: string, target: string): string {
    const path = target.split('#')[0];
    const segments = path.startsWith('/') ? [] : source.split('/').slice(0, -1);
    for (const segment of path.split('/')) {
      if (segment === '..') segments.pop();
      else if (segment !== '' && segment !== '.') segments.push(segment);
    }
    const name = segments.join('/');
    return this.find(name) ?? this.find(decodePercent(name)) ?? name;
  }

  private readContentTypes(): void {
    const root = parseXml(this.xml(CONTENT_TYPES).text, CONTENT_TYPES);
    for (const child of root.children) {
      const type = attribute(child, 'ContentType') ?? '';
      if (child.tag.local === 'Default') this.defaults.set((attribute(child, 'Extension') ?? '').toLowerCase(), type);
      if (child.tag.local === 'Override') this.overrides.set((attribute(child, 'PartName') ?? '').replace(/^\//, '').toLowerCase(), type);
    }
  }
}

/** `xl/workbook.xml` has its relationships in `xl/_rels/workbook.xml.rels`, the package in `_rels/.rels`. */
export function relationsPart(source: string): string {
  const slash = source.lastIndexOf('/') + 1;
  return `${source.slice(0, slash)}_rels/${source.slice(slash)}.rels`;
}

function refuseOtherFiles(bytes: Uint8Array): void {
  const ole = [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1];
  if (bytes.length === 0) throw new BookError('the file is empty');
  if (!ole.every((byte, i) => bytes[i] === byte)) return;
  // Names in a compound file's directory are UTF-16; the directory may lie anywhere in the file.
  const has = (name: string): boolean => indexOfUtf16(bytes, name) >= 0;
  if (has('EncryptedPackage')) throw new BookError('the workbook is encrypted: remove its password, then open it again');
  throw new BookError('the file is not an .xlsx workbook but an older compound file, such as .xls: save it as .xlsx first');
}

function indexOfUtf16(bytes: Uint8Array, name: string): number {
  search: for (let at = bytes.indexOf(name.charCodeAt(0)); at >= 0; at = bytes.indexOf(name.charCodeAt(0), at + 1)) {
    for (let i = 0; i < name.length; i++) {
      if (bytes[at + 2 * i] !== name.charCodeAt(i) || bytes[at + 2 * i + 1] !== 0) continue search;
    }
    return at;
  }
  return -1;
}

/** Names that could lead out of the package or be taken for another part. A name that ends in "/" is a folder's entry. */
function guardName(name: string): void {
  const segments = name.replace(/\/$/, '').split('/');
  const bad = segments.some((segment) => segment === '' || segment === '.' || segment === '..');
  // eslint-disable-next-line no-control-regex -- control characters are what is refused
  if (bad || /[\\:\u0000-\u001f\u007f]/.test(name) || /%(2e|2f|5c|00)/i.test(name)) {
    throw new BookError(`the archive holds a part with a forbidden name: ${JSON.stringify(name.slice(0, 80))}`);
  }
}

function decodePercent(name: string): string {
  try {
    return decodeURIComponent(name);
  } catch {
    return name;
  }
}
