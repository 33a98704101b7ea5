const table = new Uint32Array(256);
for (let n = 0; n < 256; n++) {
  let c = n;
  for (let bit = 0; bit < 8; bit++) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1;
  table[n] = c;
}

/**
 * CRC-32 of the bytes as a zip directory stores it (reflected polynomial 0xEDB88320), in [0, 2^32).
 *
 * @source   ISO/IEC/IEEE 8802-3, 3.2.9; APPNOTE.TXT, 4.4.7.
 * @example  crc32(new TextEncoder().encode('123456789')) // 0xcbf43926
 */
export function crc32(bytes: Uint8Array): number {
  let c = 0xffffffff;
  for (let i = 0; i < bytes.length; i++) c = table[(c ^ bytes[i]) & 255] ^ (c >>> 8);
  return (c ^ 0xffffffff) >>> 0;
}
