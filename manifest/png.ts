import { zlibSync } from 'fflate';

/** A picture: red, green, blue and opacity of each pixel from 0 to 255, row by row from the top. */
export interface Picture {
  readonly width: number;
  readonly height: number;
  readonly pixels: Uint8Array;
}

/**
 * A picture as a PNG file: 8 bits a channel with opacity, no filter, no interlace, no time in it.
 *
 * @source   W3C, Portable Network Graphics (PNG) Specification, 2nd edition (ISO/IEC 15948), clauses 5 and 11.
 */
export function png({ width, height, pixels }: Picture): Uint8Array {
  const stride = width * 4;
  const rows = new Uint8Array((stride + 1) * height);
  for (let y = 0; y < height; y++) rows.set(pixels.subarray(y * stride, (y + 1) * stride), y * (stride + 1) + 1); // filter type 0 before
  const header = new Uint8Array(13);
  const view = new DataView(header.buffer);
  view.setUint32(0, width);
  view.setUint32(4, height);
  header.set([8, 6, 0, 0, 0], 8); // depth 8, colour with opacity, deflate, filter method 0, no interlace
  const parts = [signature, chunk('IHDR', header), chunk('IDAT', zlibSync(rows, { level: 9 })), chunk('IEND', new Uint8Array())];
  return join(parts);
}

const signature = Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a);

function chunk(type: string, data: Uint8Array): Uint8Array {
  const body = join([Uint8Array.from(type, (letter) => letter.charCodeAt(0)), data]);
  return join([bigEndian(data.length), body, bigEndian(crc32(body))]);
}

function bigEndian(n: number): Uint8Array {
  const bytes = new Uint8Array(4);
  new DataView(bytes.buffer).setUint32(0, n);
  return bytes;
}

function join(parts: readonly Uint8Array[]): Uint8Array {
  const whole = new Uint8Array(parts.reduce((sum, { length }) => sum + length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}

/**
 * Cyclic redundancy check of 32 bits as PNG uses it.
 *
 * @source   PNG Specification, annex D.
 */
export function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) crc = (crc >>> 8) ^ table[(crc ^ byte) & 0xff];
  return (crc ^ 0xffffffff) >>> 0;
}

const table = Uint32Array.from({ length: 256 }, (_, n) => {
  let c = n;
  for (let bit = 0; bit < 8; bit++) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1;
  return c >>> 0;
});
