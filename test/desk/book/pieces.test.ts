import { strFromU8, strToU8, zipSync } from 'fflate';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { areaName, cellKey, cellOfKey, columnName, columnNumber, parseArea, parseCell } from '../../../addin/desk/book/area';
import { crc32 } from '../../../addin/desk/book/crc32';
import { isoDateSerial } from '../../../addin/desk/book/isoDate';
import { sharedFormula } from '../../../addin/desk/book/sharedFormula';
import { applySplices } from '../../../addin/desk/book/splice';
import { withAttributes } from '../../../addin/desk/book/xmlTree';
import { decodeXstring, encodeXstring, encodeXstringAttribute } from '../../../addin/desk/book/xstring';
import { readZip, unpack, writeZip } from '../../../addin/desk/book/zip';

test('crc32 gives the check value of its definition', () => {
  // the customary check of CRC-32 (ISO-HDLC): the nine digits
  expect(crc32(strToU8('123456789'))).toBe(0xcbf43926);
  expect(crc32(new Uint8Array(0))).toBe(0);
});

describe('cell names', () => {
  test.each([[1, 'A'], [26, 'Z'], [27, 'AA'], [702, 'ZZ'], [703, 'AAA'], [16384, 'XFD']])('column %i is %s', (col, name) => {
    expect(columnName(col)).toBe(name);
    expect(columnNumber(name)).toBe(col);
  });
  test('end at the edges of the sheet', () => {
    expect(parseCell('XFD1048576')).toEqual({ row: 1048576, col: 16384 });
    expect(['XFE1', 'A1048577', 'A0', 'A', '1', 'A01', 'Ä1'].map(parseCell)).toEqual(Array(7).fill(undefined));
  });
  test('of areas are read with corners in any order', () => {
    expect(parseArea('$B$9:A2', 'x')).toEqual({ top: 2, left: 1, bottom: 9, right: 2 });
    expect(areaName(parseArea('C3', 'x'))).toBe('C3');
    expect(() => parseArea('A:B', 'part p')).toThrow('part p needs an area such as A1:B2, got "A:B"');
  });
  test('have keys in row-major order that can be turned back', () => {
    expect(cellOfKey(cellKey(3, 16384))).toEqual({ row: 3, col: 16384 });
    expect(cellKey(3, 16384)).toBeLessThan(cellKey(4, 1));
  });
});

describe('a shared formula moves', () => {
  // by two rows and one column, from B2 to C4; ECMA-376 part 1, 18.3.1.40 (f): relative references shift, absolute ones stay
  test.each([
    ['A1+$A$1+$A1+A$1', 'B3+$A$1+$A3+B$1'],
    ["SUM('My !A1'!C3:D4,Sheet2!$C3)", "SUM('My !A1'!D5:E6,Sheet2!$C5)"],
    ['"A1"&LOG10(A1)&tax2020x', '"A1"&LOG10(B3)&tax2020x'],
    ['T[[#This Row],[A1]]*A1', 'T[[#This Row],[A1]]*B3'],
    ['SUM(A:B)+SUM($A:A)+SUM(1:2)+SUM($1:2)', 'SUM(B:C)+SUM($A:B)+SUM(3:4)+SUM($1:4)'],
    ['_xlfn.STDEV.S(A1:A9)+_xldudf_ROOTSUM_UNC_CARRY(A1)', '_xlfn.STDEV.S(B3:B11)+_xldudf_ROOTSUM_UNC_CARRY(B3)'],
    ['[1]S!A1+{1,2}+#REF!+TRUE', '[1]S!B3+{1,2}+#REF!+TRUE'],
    ['SUM(A1:B$2)', 'SUM(B$2:C3)'],
    ['A1 : A3', 'B3 : B5'],
  ])('%s to %s', (formula, moved) => {
    expect(sharedFormula(formula, 2, 2)(4, 3)).toBe(moved);
    expect(sharedFormula(formula, 2, 2)(2, 2)).toBe(formula);
  });

  test('to #REF! where it would leave the sheet', () => {
    expect(sharedFormula('A1+S!B2:C3', 2, 2)(1, 2)).toBe('#REF!+S!B1:C2');
    expect(sharedFormula('S!XFD1', 1, 1)(1, 2)).toBe('S!#REF!');
    expect(sharedFormula('A1048576', 1, 1)(2, 1)).toBe('#REF!');
  });

  test('there and back to itself (law)', () => {
    const reference = fc.tuple(fc.constantFrom('', '$'), fc.integer({ min: 40, max: 99 }), fc.constantFrom('', '$'), fc.integer({ min: 40, max: 99 }))
      .map(([a, col, b, row]) => a + columnName(col) + b + row);
    fc.assert(fc.property(fc.array(reference, { minLength: 1 }), fc.integer({ min: 1, max: 70 }), fc.integer({ min: 1, max: 70 }), (list, row, col) => {
      const formula = list.join('*');
      expect(sharedFormula(sharedFormula(formula, 36, 36)(row, col), row, col)(36, 36)).toBe(formula);
    }), { seed: 5 });
  });
});

describe('spreadsheet strings', () => {
  // ECMA-376 part 1, 22.9.2.19
  test.each([['a_x000D_', 'a\r'], ['_x005F_x000D_', '_x000D_'], ['_x00E4_', 'ä'], ['_x12_', '_x12_'], ['_xlfn.A', '_xlfn.A']])('%s stands for %j', (stored, text) => {
    expect(decodeXstring(stored)).toBe(text);
  });
  test('come back from storage (law)', () => {
    fc.assert(fc.property(fc.array(fc.constantFrom('_', 'x', '005F', '0041', '_x', '\r', '\n', '\u0001', '\ud83e', '\uddea', 'A')).map((a) => a.join('')), (text) => {
      expect(decodeXstring(encodeXstring(text))).toBe(text);
      expect(decodeXstring(encodeXstringAttribute(text))).toBe(text);
    }), { seed: 6, numRuns: 2000 });
  });
});

test.each([['2024-02-29', 45351], ['1899-12-31', 0], ['1900-02-28T06:00:00Z', 59.25], ['T18:00:00', 0.75], ['12:00', 0.5], ['2023-02-29', NaN], ['x', NaN], ['', NaN]])('the date %s has serial number %d', (text, serial) => {
  // 45351 = 365 × 124 years + 31 leap days to the end of 2023 less one, with 1900-02-29, + 60 days
  expect(isoDateSerial(text, false)).toBe(serial);
});

describe('splices', () => {
  test('are applied in order of place, insertions at one place in the order given', () => {
    expect(applySplices('abcdef', [{ start: 4, end: 5, text: 'E' }, { start: 1, end: 1, text: '1' }, { start: 1, end: 1, text: '2' }, { start: 1, end: 3, text: '' }])).toBe('a12dEf');
  });
  test('must not overlap', () => {
    expect(() => applySplices('abc', [{ start: 0, end: 2, text: '' }, { start: 1, end: 3, text: '' }])).toThrow(RangeError);
  });
});

test.each([
  ['<c r="A1"/>', { s: '2' }, '<c r="A1" s="2"/>'],
  ["<c  t = 's'  r='A1' >", { t: undefined, r: 'B1' }, '<c r="B1" >'],
  ['<c note=" s=&quot; " x:s="1" s="1">', { s: '3' }, '<c note=" s=&quot; " x:s="1" s="3">'],
  ["<c note=' s=\"9\"'>", { s: '3' }, "<c note=' s=\"9\"' s=\"3\">"],
])('in %s attributes %j give %s', (tag, changes: Record<string, string | undefined>, after) => {
  expect(withAttributes(tag, changes)).toBe(after);
});

test('an archive keeps its entries when written anew', () => {
  const bytes = zipSync({ 'a.txt': strToU8('aaaa'.repeat(99)), 'b/c.bin': [new Uint8Array([1, 2, 3]), { level: 0 }], 'empty': new Uint8Array(0) });
  const again = readZip(writeZip(readZip(bytes)));
  expect(again.map(({ name, method }) => [name, method])).toEqual(readZip(bytes).map(({ name, method }) => [name, method]));
  expect(again.map((entry) => [...unpack(entry)])).toEqual(readZip(bytes).map((entry) => [...unpack(entry)]));
});

test('an archive may state its sizes in 64 bits', () => {
  // APPNOTE.TXT, 4.3.14 to 4.3.16 and 4.5.3: made from an ordinary archive of one stored entry
  const plain = zipSync({ 'a.txt': [strToU8('hello'), { level: 0 }] });
  const view = new DataView(plain.buffer);
  const end = plain.length - 22;
  const central = view.getUint32(end + 16, true);
  const header = plain.slice(central, end);
  const headerView = new DataView(header.buffer);
  headerView.setUint32(20, 0xffffffff, true);
  headerView.setUint32(24, 0xffffffff, true);
  headerView.setUint16(30, 5 + 20, true);
  const extra = new DataView(new ArrayBuffer(5 + 20)); // an unknown field first, then sizes: unpacked, packed
  extra.setUint16(0, 0x9999, true);
  extra.setUint16(2, 1, true);
  extra.setUint16(5, 1, true);
  extra.setUint16(7, 16, true);
  extra.setBigUint64(9, 5n, true);
  extra.setBigUint64(17, 5n, true);
  const tail = new DataView(new ArrayBuffer(56 + 20 + 22));
  const size = header.length + 25;
  tail.setUint32(0, 0x06064b50, true);
  tail.setBigUint64(4, 44n, true);
  tail.setBigUint64(32, 1n, true);
  tail.setBigUint64(40, BigInt(size), true);
  tail.setBigUint64(48, BigInt(central), true);
  tail.setUint32(56, 0x07064b50, true);
  tail.setBigUint64(64, BigInt(central + size), true);
  tail.setUint32(76, 0x06054b50, true);
  tail.setUint16(86, 0xffff, true);
  tail.setUint32(88, 0xffffffff, true);
  tail.setUint32(92, 0xffffffff, true);
  const parts = [plain.subarray(0, central), header, new Uint8Array(extra.buffer), new Uint8Array(tail.buffer)];
  const entries = readZip(new Uint8Array(parts.flatMap((part) => [...part])));
  expect(entries.map((entry) => [entry.name, strFromU8(unpack(entry))])).toEqual([['a.txt', 'hello']]);
});
