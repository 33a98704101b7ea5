import { strFromU8, unzipSync } from 'fflate';

/** The parts of a workbook by name, unpacked. */
export const partsOf = (bytes: Uint8Array): Record<string, Uint8Array> => unzipSync(bytes);

/** Names of parts that are not byte for byte in both. */
export function changedParts(before: Uint8Array, after: Uint8Array): string[] {
  const [old, now] = [partsOf(before), partsOf(after)];
  const names = new Set([...Object.keys(old), ...Object.keys(now)]);
  return [...names].filter((name) => !old[name] || !now[name] || !Buffer.from(old[name]).equals(Buffer.from(now[name]))).sort();
}

/**
 * The text of a worksheet without some columns' cells, and without what must grow with them: the dimension and the rows' spans. Two texts
 * that are then equal differ in the cells of those columns alone.
 */
export function withoutColumns(part: Uint8Array, columns: readonly string[]): string {
  const cell = new RegExp(`<((?:\\w+:)?)c r="(?:${columns.join('|')})\\d+"(?:[^>]*/>|.*?</\\1c>)`, 'gs');
  return strFromU8(part).replace(cell, '').replace(/<((?:\w+:)?)dimension ref="[^"]*"\/>/, '').replace(/ spans="[^"]*"/g, '');
}
