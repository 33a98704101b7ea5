import { inflateSync } from 'node:zlib';

export interface PngChunk {
  readonly type: string;
  readonly data: Uint8Array;
  readonly crc: number;
  /** Type and data: what the check is over. */
  readonly checked: Uint8Array;
}

/** The chunks of a PNG file, after its signature. */
export function pngChunks(file: Uint8Array): PngChunk[] {
  if (Buffer.from(file.subarray(0, 8)).toString('latin1') !== '\x89PNG\r\n\x1a\n') throw new Error('no PNG signature');
  const view = new DataView(file.buffer, file.byteOffset, file.byteLength);
  const chunks: PngChunk[] = [];
  for (let at = 8; at < file.length;) {
    const length = view.getUint32(at);
    const checked = file.subarray(at + 4, at + 8 + length);
    chunks.push({
      type: Buffer.from(checked.subarray(0, 4)).toString('latin1'), data: checked.subarray(4), crc: view.getUint32(at + 8 + length), checked,
    });
    at += 12 + length;
  }
  return chunks;
}

/** Decodes a PNG of 8 bits a channel with opacity, without filters and interlace. Inflated by Node's zlib, not by what packed it. */
export function readPng(file: Uint8Array): { width: number; height: number; at: (x: number, y: number) => number[] } {
  const chunks = pngChunks(file);
  const header = chunks[0].data;
  const view = new DataView(header.buffer, header.byteOffset, header.length);
  const [width, height] = [view.getUint32(0), view.getUint32(4)];
  if (String(header.subarray(8)) !== '8,6,0,0,0') throw new Error(`another kind of PNG: ${header.subarray(8)}`);
  const rows = inflateSync(Buffer.concat(chunks.filter(({ type }) => type === 'IDAT').map(({ data }) => data)));
  const stride = width * 4 + 1;
  if (rows.length !== stride * height) throw new Error(`${rows.length} bytes for ${width} × ${height}`);
  for (let y = 0; y < height; y++) if (rows[y * stride] !== 0) throw new Error(`row ${y} is filtered`);
  return { width, height, at: (x, y) => [...rows.subarray(y * stride + 1 + x * 4, y * stride + 5 + x * 4)] };
}
