import { deflateSync, inflateSync } from 'fflate';
import { BookError } from './BookError';
import { crc32 } from './crc32';

/** One file of an archive, still packed. */
export interface ZipEntry {
  name: string;
  rawName: Uint8Array;
  method: 0 | 8;
  crc: number;
  size: number;
  packed: Uint8Array;
  /** General purpose flags, "version made by", DOS time and date, attributes: carried over when the archive is written. */
  flags: number;
  madeBy: number;
  time: number;
  attributes: number;
}

/**
 * Limits against archives built to exhaust memory. Deflate cannot exceed 1032 : 1; a sheet of equal cells reaches about
 * 100 : 1, so the ratio counts only for parts that are large in earnest.
 */
export const ZIP_LIMITS = { entries: 20_000, part: 400_000_000, total: 1_000_000_000, ratio: 400, ratioFrom: 16_000_000 };

const LOCAL = 0x04034b50;
const CENTRAL = 0x02014b50;
const END = 0x06054b50;
const END64 = 0x06064b50;
const LOCATOR64 = 0x07064b50;

/**
 * The entries of a zip archive in the order of its directory. Nothing is unpacked here.
 *
 * @throws  BookError for bytes that are no zip, cut short, encrypted, packed by a method other than stored or deflated,
 *          overlapping, or whose declared sizes exceed `ZIP_LIMITS`.
 * @source  APPNOTE.TXT (the zip file format), 4.3 and 4.4; ISO/IEC 21320-1 for the two methods.
 */
export function readZip(bytes: Uint8Array): ZipEntry[] {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (bytes.length < 4 || (view.getUint32(0, true) !== LOCAL && view.getUint32(0, true) !== END)) {
    throw new BookError('the file is not a zip archive, so it is not an .xlsx workbook');
  }
  const directory = findDirectory(view);
  if (directory.count > ZIP_LIMITS.entries) throw new BookError(`the archive has ${directory.count} parts, more than ${ZIP_LIMITS.entries}`);
  const entries: ZipEntry[] = [];
  const spans: [number, number][] = [];
  let at = directory.offset;
  let total = 0;
  for (let i = 0; i < directory.count; i++) {
    if (at + 46 > directory.end || view.getUint32(at, true) !== CENTRAL) throw damaged('its directory is cut short');
    const nameLength = view.getUint16(at + 28, true);
    const extraLength = view.getUint16(at + 30, true);
    const next = at + 46 + nameLength + extraLength + view.getUint16(at + 32, true);
    if (next > directory.end) throw damaged('its directory is cut short');
    const rawName = bytes.slice(at + 46, at + 46 + nameLength);
    const name = decodeName(rawName);
    const flags = view.getUint16(at + 8, true);
    const method = view.getUint16(at + 10, true);
    if (flags & 0x41) throw new BookError(`the archive is encrypted (part ${name})`);
    if (method !== 0 && method !== 8) throw new BookError(`part ${name} is packed by method ${method}; only stored and deflated are read`);
    const { size, packedSize, offset } = sizes(view, at, at + 46 + nameLength, extraLength);
    total += size;
    guardSize(name, size, packedSize, total);
    const start = dataStart(view, offset, name);
    if (start + packedSize > directory.offset) throw damaged(`part ${name} runs past its end`);
    spans.push([offset, start + packedSize]);
    entries.push({
      name, rawName, method, size, flags,
      crc: view.getUint32(at + 16, true),
      packed: bytes.subarray(start, start + packedSize),
      madeBy: view.getUint16(at + 4, true),
      time: view.getUint32(at + 12, true),
      attributes: view.getUint32(at + 38, true),
    });
    at = next;
  }
  spans.sort((a, b) => a[0] - b[0]);
  for (let i = 1; i < spans.length; i++) if (spans[i][0] < spans[i - 1][1]) throw damaged('two parts overlap');
  return entries;
}

/** The bytes of an entry. @throws BookError where length or checksum disagree with the directory. */
export function unpack(entry: ZipEntry): Uint8Array {
  let data: Uint8Array;
  if (entry.method === 0) data = entry.packed;
  else if (entry.size === 0) data = new Uint8Array(0);
  else {
    try {
      // A buffer of the declared size: a stream that holds more than it declares is cut, and then fails the checksum.
      data = inflateSync(entry.packed, { out: new Uint8Array(entry.size) });
    } catch {
      throw damaged(`part ${entry.name} cannot be unpacked`);
    }
  }
  if (data.length !== entry.size || crc32(data) !== entry.crc) throw damaged(`part ${entry.name} does not match its checksum`);
  return data;
}

/** Packs new bytes for the place of `like` (same name, method and attributes), or as a new deflated entry. */
export function pack(name: string, data: Uint8Array, like?: ZipEntry): ZipEntry {
  const method = like?.method ?? 8;
  return {
    name,
    rawName: like?.rawName ?? new TextEncoder().encode(name),
    method,
    crc: crc32(data),
    size: data.length,
    packed: method === 8 ? deflateSync(data, { level: 6 }) : data,
    flags: like ? like.flags & 0x800 : 0,
    madeBy: like?.madeBy ?? 45,
    time: like?.time ?? 0x00210000, // 1980-01-01, so that equal content gives equal bytes
    attributes: like?.attributes ?? 0,
  };
}

/** The archive of the entries, in their order. Extra fields, entry comments and data descriptors are not carried over. */
export function writeZip(entries: readonly ZipEntry[]): Uint8Array {
  let bodySize = 0;
  let directorySize = 0;
  for (const entry of entries) {
    bodySize += 30 + entry.rawName.length + entry.packed.length;
    directorySize += 46 + entry.rawName.length;
  }
  const bytes = new Uint8Array(bodySize + directorySize + 22);
  const view = new DataView(bytes.buffer);
  let at = 0;
  let central = bodySize;
  for (const entry of entries) {
    const common = (to: number): void => {
      view.setUint16(to, 20, true);
      view.setUint16(to + 2, entry.flags & ~8, true); // bit 3: sizes follow the data; here they stand in the header
      view.setUint16(to + 4, entry.method, true);
      view.setUint32(to + 6, entry.time, true);
      view.setUint32(to + 10, entry.crc, true);
      view.setUint32(to + 14, entry.packed.length, true);
      view.setUint32(to + 18, entry.size, true);
      view.setUint16(to + 22, entry.rawName.length, true);
    };
    view.setUint32(central, CENTRAL, true);
    view.setUint16(central + 4, entry.madeBy, true);
    common(central + 6);
    view.setUint32(central + 38, entry.attributes, true);
    view.setUint32(central + 42, at, true);
    bytes.set(entry.rawName, central + 46);
    central += 46 + entry.rawName.length;
    view.setUint32(at, LOCAL, true);
    common(at + 4);
    bytes.set(entry.rawName, at + 30);
    bytes.set(entry.packed, at + 30 + entry.rawName.length);
    at += 30 + entry.rawName.length + entry.packed.length;
  }
  view.setUint32(central, END, true);
  view.setUint16(central + 8, entries.length, true);
  view.setUint16(central + 10, entries.length, true);
  view.setUint32(central + 12, directorySize, true);
  view.setUint32(central + 16, bodySize, true);
  return bytes;
}

function damaged(what: string): BookError {
  return new BookError(`the archive is damaged: ${what}`);
}

function findDirectory(view: DataView): { count: number; offset: number; end: number } {
  const length = view.byteLength;
  for (let at = length - 22; at >= Math.max(0, length - 22 - 0xffff); at--) {
    if (view.getUint32(at, true) !== END || at + 22 + view.getUint16(at + 20, true) > length) continue;
    let count = view.getUint16(at + 10, true);
    let size = view.getUint32(at + 12, true);
    let offset = view.getUint32(at + 16, true);
    if (at >= 20 && view.getUint32(at - 20, true) === LOCATOR64) {
      const end64 = Number(view.getBigUint64(at - 12, true));
      if (end64 + 56 > length || view.getUint32(end64, true) !== END64) throw damaged('its directory cannot be found');
      count = Number(view.getBigUint64(end64 + 32, true));
      size = Number(view.getBigUint64(end64 + 40, true));
      offset = Number(view.getBigUint64(end64 + 48, true));
    }
    if (offset + size > at) throw damaged('its directory cannot be found');
    return { count, offset, end: offset + size };
  }
  throw new BookError('the file is cut short: it begins as a zip archive but its directory is missing');
}

function decodeName(raw: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(raw);
  } catch {
    return Array.from(raw, (code) => String.fromCharCode(code)).join('');
  }
}

/** Sizes and place of an entry; a 64-bit extra field holds, in this order, those that are all ones in the header. */
function sizes(view: DataView, at: number, extra: number, extraLength: number): { size: number; packedSize: number; offset: number } {
  const fields = [view.getUint32(at + 24, true), view.getUint32(at + 20, true), view.getUint32(at + 42, true)];
  if (fields.includes(0xffffffff)) {
    let field = extra;
    while (field + 4 <= extra + extraLength && view.getUint16(field, true) !== 1) field += 4 + view.getUint16(field + 2, true);
    let place = field + 4;
    const end = field + 4 <= extra + extraLength ? Math.min(extra + extraLength, place + view.getUint16(field + 2, true)) : 0;
    for (let i = 0; i < 3; i++) {
      if (fields[i] !== 0xffffffff) continue;
      if (place + 8 > end) throw damaged('a part has no size');
      fields[i] = Number(view.getBigUint64(place, true));
      place += 8;
    }
  }
  return { size: fields[0], packedSize: fields[1], offset: fields[2] };
}

function guardSize(name: string, size: number, packedSize: number, total: number): void {
  const { part, ratio, ratioFrom } = ZIP_LIMITS;
  if (size > part) throw new BookError(`part ${name} unpacks to ${size} bytes, more than ${part}`);
  if (total > ZIP_LIMITS.total) throw new BookError(`the archive unpacks to more than ${ZIP_LIMITS.total} bytes`);
  if (size > ratioFrom && size > ratio * packedSize) {
    throw new BookError(`part ${name} unpacks to ${size} bytes from ${packedSize}: refused as a zip bomb`);
  }
  if (size > 1032 * packedSize + 1032) throw damaged(`part ${name} cannot hold what it declares`);
}

function dataStart(view: DataView, offset: number, name: string): number {
  if (offset + 30 > view.byteLength || view.getUint32(offset, true) !== LOCAL) throw damaged(`part ${name} cannot be found`);
  return offset + 30 + view.getUint16(offset + 26, true) + view.getUint16(offset + 28, true);
}
