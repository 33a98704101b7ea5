import { strToU8, zipSync } from 'fflate';
import { describe, expect, test } from 'vitest';
import { BookError } from '../../../addin/desk/book/BookError';
import { openBook } from '../../../addin/desk/book/openBook';
import { bookFiles, buildBook, MAIN, sheetPart } from './buildBook';

const refusal = (bytes: Uint8Array): string => {
  try {
    openBook(bytes);
  } catch (error) {
    if (error instanceof BookError) return error.message;
    throw error;
  }
  return 'opened';
};

const utf16 = (text: string): number[] => [...text].flatMap((c) => [c.charCodeAt(0), 0]);
const OLE = [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1];

describe('a file that is no .xlsx is refused by what it is:', () => {
  test.each<[string, Uint8Array, string]>([
    ['nothing', new Uint8Array(0), 'the file is empty'],
    ['text', strToU8('value;u\n1;2\n'), 'the file is not a zip archive, so it is not an .xlsx workbook'],
    ['encrypted', new Uint8Array([...OLE, ...utf16('EEncryptedPackage')]), 'the workbook is encrypted: remove its password, then open it again'],
    ['.xls', new Uint8Array([...OLE, ...utf16('Workbook')]), 'the file is not an .xlsx workbook but an older compound file, such as .xls: save it as .xlsx first'],
    ['.ods', zipSync({ mimetype: strToU8('application/vnd.oasis.opendocument.spreadsheet') }), 'the file is an OpenDocument file (.ods); save it as .xlsx first'],
    ['.xlsb', buildBook({ workbookType: 'application/vnd.ms-excel.sheet.binary.macroEnabled.main' }), 'the file is a binary workbook (.xlsb): save it as .xlsx first'],
    ['.docx', buildBook({ workbookType: 'application/vnd.openxmlformats-officedocument.wordprocessingml.document.main+xml' }), 'the file is not a workbook but another kind of office document'],
    ['another archive', zipSync({ 'a.txt': strToU8('a') }), 'the archive is not an .xlsx workbook: it has no [Content_Types].xml'],
  ])('%s', (_what, bytes, message) => {
    expect(refusal(bytes)).toBe(message);
  });
});

describe('a damaged archive is refused:', () => {
  test('cut short', () => {
    expect(refusal(buildBook().subarray(0, 500))).toBe('the file is cut short: it begins as a zip archive but its directory is missing');
  });

  test('cut at any length, never by another exception', () => {
    const bytes = buildBook();
    for (let length = 0; length < bytes.length; length += 7) expect(refusal(bytes.subarray(0, length))).not.toBe('opened');
  });

  test('a changed byte in a packed part', () => {
    const bytes = zipSync({ ...bookFiles({}), 'xl/workbook.xml': [bookFiles({})['xl/workbook.xml'] as Uint8Array, { level: 0 }] });
    bytes[bytes.findIndex((_, i) => String.fromCharCode(...bytes.subarray(i, i + 9)) === '<workbook') + 3] ^= 1;
    expect(refusal(bytes)).toBe('the archive is damaged: part xl/workbook.xml does not match its checksum');
  });

  test('a directory that points past the parts', () => {
    const bytes = buildBook();
    const view = new DataView(bytes.buffer);
    for (let at = 0; at + 46 < bytes.length; at++) if (view.getUint32(at, true) === 0x02014b50) view.setUint32(at + 42, 5, true);
    expect(refusal(bytes)).toBe('the archive is damaged: part [Content_Types].xml cannot be found');
  });

  test.each([0x01, 0x40])('an encrypted part (flag %i)', (flag) => {
    const bytes = buildBook();
    const view = new DataView(bytes.buffer);
    for (let at = 0; at + 46 < bytes.length; at++) if (view.getUint32(at, true) === 0x02014b50) view.setUint16(at + 8, flag, true);
    expect(refusal(bytes)).toBe('the archive is encrypted (part [Content_Types].xml)');
  });

  test('but a comment after the directory does no harm', () => {
    const bytes = new Uint8Array([...buildBook(), ...strToU8('a comment')]);
    new DataView(bytes.buffer).setUint16(bytes.length - 11, 9, true);
    expect(refusal(bytes)).toBe('opened');
  });

  test('a part named in the workbook but missing', () => {
    const files = bookFiles({});
    delete files['xl/worksheets/sheet1.xml'];
    expect(refusal(zipSync(files))).toBe('part xl/worksheets/sheet1.xml is missing');
  });

  test('XML that is not well-formed, in one line', () => {
    const message = refusal(buildBook({ sheets: [{ part: sheetPart('<sheetData>\n<row r="1"></sheetData>') }] }));
    expect(message).toMatch(/^part xl\/worksheets\/sheet1\.xml is not well-formed XML: .*$/);
  });

  test('bytes that are no UTF-8', () => {
    const part = strToU8(sheetPart('<sheetData/>').replace('UTF-8', 'UTF-8\xff'), true);
    expect(refusal(buildBook({ sheets: [{ part }] }))).toBe('part xl/worksheets/sheet1.xml is not valid UTF-8 text');
  });
});

describe('a dangerous archive is refused:', () => {
  test('a part that unpacks far beyond its size', () => {
    const bytes = buildBook({ extra: { 'xl/media/zeros.bin': new Uint8Array(20_000_000) } });
    expect(refusal(bytes)).toMatch(/^part xl\/media\/zeros\.bin unpacks to 20000000 bytes from \d+: refused as a zip bomb$/);
  });

  test('a part that declares more than its bytes can hold', () => {
    const bytes = buildBook();
    const view = new DataView(bytes.buffer);
    for (let at = 0; at + 46 < bytes.length; at++) if (view.getUint32(at, true) === 0x02014b50) view.setUint32(at + 24, 10_000_000, true);
    expect(refusal(bytes)).toBe('the archive is damaged: part [Content_Types].xml cannot hold what it declares');
  });

  test('a document type, with or without entities', () => {
    const part = `<!DOCTYPE worksheet [<!ENTITY a "b">]><worksheet xmlns="${MAIN}"><sheetData/></worksheet>`;
    expect(refusal(buildBook({ sheets: [{ part }] }))).toBe('part xl/worksheets/sheet1.xml has a DOCTYPE, which a workbook must not have');
    expect(refusal(buildBook({ sheets: [{ xml: '<sheetData><row><c t="str"><v>&a;</v></c></row></sheetData>' }] }))).toContain('not well-formed');
  });

  test.each(['../evil.xml', 'xl/../../evil.xml', '/etc/passwd', 'xl\\evil.xml', 'C:/evil.xml', 'xl//evil.xml', 'xl/%2e%2e/evil.xml', 'xl/\u0000.xml'])('a part named %j', (name) => {
    expect(refusal(buildBook({ extra: { [name]: strToU8('x') } }))).toBe(`the archive holds a part with a forbidden name: ${JSON.stringify(name)}`);
  });

  test('a relationship that would leave the archive finds no part outside it', () => {
    const files = bookFiles({});
    const withTarget = (part: string, from: string, to: string): Uint8Array => {
      const rels = new TextDecoder().decode(files[part] as Uint8Array).replace(from, to);
      return zipSync({ ...files, [part]: strToU8(rels) });
    };
    expect(refusal(withTarget('xl/_rels/workbook.xml.rels', 'worksheets/sheet1.xml', '../../../etc/passwd'))).toBe('part etc/passwd is missing');
    expect(openBook(withTarget('_rels/.rels', 'xl/workbook', '../xl/workbook')).sheets.length).toBe(1); // as LibreOffice writes some
  });

  test('two sheets in one part', () => {
    const files = bookFiles({ sheets: [{ name: 'A' }, { name: 'B' }] });
    const rels = new TextDecoder().decode(files['xl/_rels/workbook.xml.rels'] as Uint8Array).replace('sheet2.xml', 'sheet1.xml');
    expect(refusal(zipSync({ ...files, 'xl/_rels/workbook.xml.rels': strToU8(rels) }))).toBe('sheets A and B are stored in one part, xl/worksheets/sheet1.xml');
  });

  test('two parts whose names differ in case only', () => {
    expect(refusal(buildBook({ extra: { 'xl/Workbook.xml': strToU8('x') } }))).toBe('the archive holds part xl/Workbook.xml twice');
  });
});

test('a million blank cells with a style are read, and do not count as used', () => {
  const row = (r: number): string => `<row r="${r}">${'<c s="1"/>'.repeat(10_000)}</row>`;
  const book = openBook(buildBook({ sheets: [{ xml: `<sheetData>${Array.from({ length: 100 }, (_, i) => row(i + 1)).join('')}</sheetData>` }] }));
  expect([book.used(0), book.styleAt(0, 100, 10_000), book.styleAt(0, 100, 10_001)]).toEqual([{ rows: 0, cols: 0 }, 1, 0]);
});

describe('a workbook', () => {
  test('lists sheets in order, with kind and state', () => {
    const book = openBook(buildBook({
      sheets: [{ name: 'Data &amp; more' }, { name: 'Chart', kind: 'chartsheet', part: `<chartsheet xmlns="${MAIN}"/>` }, { name: 'Old', attributes: ' state="veryHidden"' }],
    }));
    expect(book.sheets.map(({ index, name, kind, state }) => [index, name, kind, state])).toEqual([
      [0, 'Data & more', 'worksheet', 'visible'], [1, 'Chart', 'chartsheet', 'visible'], [2, 'Old', 'worksheet', 'veryHidden'],
    ]);
    expect(book.cell(1, 1, 1)).toBeUndefined();
    expect(() => book.cell(3, 1, 1)).toThrow(RangeError);
    for (const [row, col] of [[0, 1], [1, 0], [1048577, 1], [1, 16385], [NaN, 1]]) expect(() => book.cell(0, row, col)).toThrow(RangeError);
    expect(book.isHiddenStyle(99)).toBe(false);
  });

  test('lists its names', () => {
    const after = '<definedNames><definedName name="k">2</definedName><definedName name="x" localSheetId="0" hidden="1">Sheet1!$A$1&amp;"_"</definedName></definedNames>';
    expect(openBook(buildBook({ after })).names).toEqual([{ name: 'k', formula: '2' }, { name: 'x', sheet: 0, hidden: true, formula: 'Sheet1!$A$1&"_"' }]);
  });

  test('tells how it calculates', () => {
    const facts = (after: string, before = ''): unknown[] => {
      const { calcMode, iterate, fullPrecision, date1904, macros } = openBook(buildBook({ after, before }));
      return [calcMode, iterate, fullPrecision, date1904, macros];
    };
    expect(facts('')).toEqual(['auto', false, true, false, false]);
    expect(facts('<calcPr calcMode="manual" iterate="1" fullPrecision="0"/>', '<workbookPr date1904="true"/>')).toEqual(['manual', true, false, true, false]);
  });

  test('tells of macros', () => {
    expect(openBook(buildBook({ workbookType: 'application/vnd.ms-excel.sheet.macroEnabled.main+xml' })).macros).toBe(true);
  });

  test('lists its tables', () => {
    const table = `<table xmlns="${MAIN}" id="1" name="T" displayName="Weighings" ref="B2:C5" totalsRowCount="1"><tableColumns count="2"><tableColumn id="1" name="m"/><tableColumn id="2" name="line_x000a_two"/></tableColumns></table>`;
    expect(openBook(buildBook({ sheets: [{}, { tables: [table] }] })).tables).toMatchObject([
      { name: 'Weighings', sheet: 1, ref: { top: 2, left: 2, bottom: 5, right: 3 }, columns: ['m', 'line\ntwo'], headerRows: 1, totalsRows: 1 },
    ]);
  });

  test('finds parts by absolute targets and without regard to case', () => {
    const files = bookFiles({ sheets: [{ xml: '<sheetData><row><c><v>4</v></c></row></sheetData>' }] });
    const rels = new TextDecoder().decode(files['xl/_rels/workbook.xml.rels'] as Uint8Array);
    files['xl/_rels/workbook.xml.rels'] = strToU8(rels.replace('worksheets/sheet1.xml', '/xl/Worksheets/Sheet1.xml'));
    expect(openBook(zipSync(files)).cell(0, 1, 1)?.value).toBe(4);
  });
});
