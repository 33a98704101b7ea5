import { describe, expect, test } from 'vitest';
import { icon, outlineIcon } from '../../manifest/icons';
import { iconSizes, manifestFiles } from '../../manifest/manifestFiles';
import { crc32, png } from '../../manifest/png';
import { pngChunks, readPng } from './readPng';

describe('crc32', () => {
  test('gives the published check value', () => {
    // "123456789" gives cbf43926: the check value of CRC-32/ISO-HDLC in the usual catalogues.
    expect(crc32(Buffer.from('123456789'))).toBe(0xcbf43926);
  });
  test('gives the check of the empty last chunk that every PNG ends with', () => {
    expect(crc32(Buffer.from('IEND'))).toBe(0xae426082); // the twelve fixed bytes 00000000 49454e44 ae426082
  });
});

describe('png', () => {
  test('gives back the pixels it was given', () => {
    const pixels = Uint8Array.from({ length: 3 * 2 * 4 }, (_, i) => (i * 37) % 256);
    const { width, height, at } = readPng(png({ width: 3, height: 2, pixels }));
    expect([width, height]).toEqual([3, 2]);
    for (let y = 0; y < 2; y++) for (let x = 0; x < 3; x++) expect(at(x, y)).toEqual([...pixels.subarray((y * 3 + x) * 4, (y * 3 + x) * 4 + 4)]);
  });
  test('writes header, data and end, each with its check', () => {
    const chunks = pngChunks(icon(16));
    expect(chunks.map(({ type }) => type)).toEqual(['IHDR', 'IDAT', 'IEND']);
    for (const { crc, checked } of chunks) expect(crc).toBe(crc32(checked));
  });
});

describe('icons', () => {
  test('are as large as their names say', () => {
    const files = manifestFiles();
    for (const size of iconSizes) {
      const { width, height } = readPng(files.get(`icons/rootsum-${size}.png`) as Uint8Array);
      expect([width, height]).toEqual([size, size]);
    }
    const outline = files.get('icons/rootsum-outline.png') as Uint8Array;
    expect(readPng(outline)).toMatchObject({ width: 32, height: 32 }); // that size, says the schema of the unified manifest
    expect(outline).toEqual(outlineIcon(32));
  });
  test('are the same bytes each time', () => {
    expect(icon(32)).toEqual(icon(32));
  });
  test('show the root sign, the sum and the ground at every size, with clear corners', () => {
    for (const size of iconSizes) {
      const { at } = readPng(icon(size));
      const near = (x: number, y: number) => at(Math.floor(x * size), Math.floor(y * size));
      const [bar, between, sum] = [near(0.66, 0.2), near(0.34, 0.35), near(0.66, 0.77)];
      expect(at(0, 0)[3], `corner at ${size}`).toBeLessThan(128);
      expect(Math.min(...bar.slice(0, 3)), `bar at ${size}`).toBeGreaterThan(128); // white
      expect(Math.max(...between.slice(0, 3)), `ground at ${size}`).toBeLessThan(128); // dark
      expect(sum[0] - sum[2], `sum at ${size}`).toBeGreaterThan(64); // more red than blue
    }
  });
  test('have smooth edges', () => {
    const { at } = readPng(icon(64));
    const opacities = new Set(Array.from({ length: 64 * 64 }, (_, i) => at(i % 64, Math.floor(i / 64))[3]));
    expect(opacities.size).toBeGreaterThan(4);
  });
  test('the outline is white wherever it is not clear', () => {
    const { at } = readPng(outlineIcon(32));
    const seen = Array.from({ length: 32 * 32 }, (_, i) => at(i % 32, Math.floor(i / 32))).filter(([, , , opacity]) => opacity > 0);
    expect(seen.length).toBeGreaterThan(50);
    expect(seen.length).toBeLessThan(32 * 32);
    for (const pixel of seen) expect(pixel.slice(0, 3)).toEqual([255, 255, 255]);
  });
});
