import { strToU8 } from 'fflate';
import { describe, expect, test } from 'vitest';
import type { BookCell } from '../../../addin/desk/book/BookCell';
import { openBook } from '../../../addin/desk/book/openBook';
import { buildBook, MAIN, sheetPart, STRICT, STRICT_RELS } from './buildBook';
import type { BookParts } from './buildBook';

// Expectations follow ECMA-376 part 1, 18.3.1 (worksheets), 18.4 (shared strings) and 18.18.11 (cell types).

const cell = (xml: string, row = 1, col = 1, more: BookParts = {}): BookCell | undefined =>
  openBook(buildBook({ sheets: [{ xml: `<sheetData>${xml}</sheetData>` }], ...more })).cell(0, row, col);
const value = (c: string, more: BookParts = {}): unknown => cell(`<row r="1">${c}</row>`, 1, 1, more)?.value;
const strings = (...si: string[]): BookParts => ({ strings: `<sst xmlns="${MAIN}">${si.map((text) => `<si>${text}</si>`).join('')}</sst>` });

describe('a value', () => {
  test.each<[string, string, unknown]>([
    ['a number', '<c r="A1"><v>1.5E-3</v></c>', 0.0015],
    ['a number with its type', '<c r="A1" t="n"><v> 7 </v></c>', 7],
    ['TRUE', '<c r="A1" t="b"><v>1</v></c>', true],
    ['FALSE', '<c r="A1" t="b"><v>0</v></c>', false],
    ['an error', '<c r="A1" t="e"><v>#DIV/0!</v></c>', { error: '#DIV/0!' }],
    ['text of a formula', '<c r="A1" t="str"><f>B1</f><v>x &lt; y</v></c>', 'x < y'],
    ['empty text of a formula', '<c r="A1" t="str"><f>B1</f><v></v></c>', ''],
    ['inline text', '<c r="A1" t="inlineStr"><is><t>abc</t></is></c>', 'abc'],
    ['inline rich text', '<c r="A1" t="inlineStr"><is><r><rPr><b/></rPr><t>a</t></r><r><t xml:space="preserve"> b</t></r></is></c>', 'a b'],
    ['inline text with a phonetic run', '<c r="A1" t="inlineStr"><is><t>田</t><rPh sb="0" eb="1"><t>タ</t></rPh></is></c>', '田'],
    ['a cell with only a style', '<c r="A1" s="0"/>', null],
    ['a formula without a result', '<c r="A1"><f>B1</f></c>', undefined],
    ['text in CDATA', '<c r="A1" t="str"><v><![CDATA[a<b]]></v></c>', 'a<b'],
    ['an astral character', '<c r="A1" t="str"><v>&#x1F9EA;🧪</v></c>', '🧪🧪'],
    ['escapes', '<c r="A1" t="str"><v>a_x000D_b_x005F_x0041_</v></c>', 'a\rb_x0041_'],
    ['a line end CRLF', '<c r="A1" t="str"><v>a\r\nb</v></c>', 'a\nb'],
    // serial numbers: 1900-03-01 is 61 because the system counts a 1900-02-29 (ECMA-376 part 1, 18.17.4.1)
    ['a date in a strict file', '<c r="A1" t="d"><v>1900-03-01T12:00:00</v></c>', 61.5],
    ['the first date', '<c r="A1" t="d"><v>1900-01-01</v></c>', 1],
  ])('is read for %s', (_what, xml, expected) => {
    expect(value(xml)).toEqual(expected);
  });

  test('of a date counts from 1904 where the workbook does', () => {
    expect(value('<c r="A1" t="d"><v>1904-01-02</v></c>', { before: '<workbookPr date1904="1"/>' })).toBe(1);
  });

  test('is a shared string: rich text joined, phonetic runs left out', () => {
    const rich = '<r><t>田</t></r><r><t>中</t></r><rPh sb="0" eb="2"><t>タナカ</t></rPh><phoneticPr fontId="1"/>';
    expect(value('<c r="A1" t="s"><v>1</v></c>', strings('<t>no</t>', rich))).toBe('田中');
  });

  test('is a shared string that is empty', () => {
    expect(value('<c r="A1" t="s"><v>0</v></c>', strings(''))).toBe('');
  });

  test.each([
    ['<c r="A1"><v>12,5</v></c>', 'xl/worksheets/sheet1.xml cell A1 holds "12,5" where a number is needed'],
    ['<c r="A1" t="s"><v>9</v></c>', 'xl/worksheets/sheet1.xml cell A1 refers to shared string 9, which is missing'],
    ['<c r="A1" t="z"><v>9</v></c>', 'xl/worksheets/sheet1.xml cell A1 has the unknown type z'],
    ['<c r="B1"/><c r="A1"/>', 'part xl/worksheets/sheet1.xml has cell A1 after B1'],
    ['<c r="A1"/><c r="A1"/>', 'part xl/worksheets/sheet1.xml has cell A1 after A1'],
    ['<c r="A2"/>', 'part xl/worksheets/sheet1.xml has cell A2 in row 1'],
    ['<c r="XFE1"/>', 'part xl/worksheets/sheet1.xml has cell XFE1 in row 1'],
  ])('is refused in %s', (xml, message) => {
    expect(() => value(xml)).toThrow(message);
  });
});

describe('rows and cells', () => {
  test('without references count on from the one before', () => {
    const book = openBook(buildBook({ sheets: [{ xml: '<sheetData><row><c><v>1</v></c><c r="C1"><v>3</v></c><c><v>4</v></c></row><row r="5"/><row><c><v>6</v></c></row></sheetData>' }] }));
    expect([...book.rows(0)].map(([row, cells]) => [row, cells.map(([col, { value: v }]) => [col, v])]))
      .toEqual([[1, [[1, 1], [3, 3], [4, 4]]], [5, []], [6, [[1, 6]]]]);
    expect(book.used(0)).toEqual({ rows: 6, cols: 4 });
  });

  test('that hold only a style do not count as used', () => {
    const xml = '<sheetData><row r="1"><c r="A1"><v>1</v></c><c r="C1" s="1"/></row><row r="7"><c r="A7" s="1"/></row></sheetData>';
    expect(openBook(buildBook({ sheets: [{ xml }] })).used(0)).toEqual({ rows: 1, cols: 1 });
  });

  test('out of order are refused', () => {
    expect(() => cell('<row r="2"/><row r="1"/>')).toThrow('part xl/worksheets/sheet1.xml has row 1 after row 2');
  });

  test('of a prefixed part are read, elements of another namespace are not', () => {
    const part = `<x:worksheet xmlns:x="${MAIN}" xmlns:y="urn:y"><x:sheetData><x:row r="1"><y:c r="A1"><y:v>9</y:v></y:c><x:c r="A1" t="str"><y:v>8</y:v><x:f>B1</x:f><x:v>7</x:v></x:c></x:row></x:sheetData></x:worksheet>`;
    expect(openBook(buildBook({ sheets: [{ part }] })).cell(0, 1, 1)).toEqual({ value: '7', style: 0, formula: 'B1' });
  });

  test('of a strict workbook are read', () => {
    const bytes = buildBook({ main: STRICT, rels: STRICT_RELS, sheets: [{ xml: '<sheetData><row r="1"><c r="A1"><v>2</v></c></row></sheetData>' }] });
    expect(openBook(bytes).cell(0, 1, 1)?.value).toBe(2);
  });

  test.each<[string, (text: string) => Uint8Array]>([
    ['a byte order mark', (text) => strToU8(`\ufeff${text}`)],
    ['UTF-16', (text) => new Uint8Array(new Uint16Array([...`\ufeff${text.replace('UTF-8', 'UTF-16')}`].map((c) => c.charCodeAt(0))).buffer)],
    ['UTF-16, high byte first', (text) => new Uint8Array([...`\ufeff${text.replace('UTF-8', 'UTF-16')}`].flatMap((c) => [c.charCodeAt(0) >> 8, c.charCodeAt(0) & 255]))],
  ])('are read from a part with %s', (_what, encode) => {
    const part = encode(sheetPart('<sheetData><row r="1"><c r="A1" t="str"><v>µ</v></c></row></sheetData>'));
    expect(openBook(buildBook({ sheets: [{ part }] })).cell(0, 1, 1)?.value).toBe('µ');
  });
});

describe('a shared formula', () => {
  const xml = '<row r="1"><c r="B1"><f t="shared" ref="B1:B3" si="0">A1*$C$1+Sheet2!A$1</f><v>1</v></c></row>'
    + '<row r="2"><c r="B2"><f t="shared" si="0"/><v>2</v></c></row><row r="3"><c r="B3"><f t="shared" si="0"></f><v>3</v></c></row>';

  test('is written out for each cell', () => {
    const book = openBook(buildBook({ sheets: [{ xml: `<sheetData>${xml}</sheetData>` }] }));
    expect([1, 2, 3].map((row) => book.cell(0, row, 2)?.formula)).toEqual(['A1*$C$1+Sheet2!A$1', 'A2*$C$1+Sheet2!A$1', 'A3*$C$1+Sheet2!A$1']);
  });

  test('may stand after a cell that follows it', () => {
    expect(cell('<row r="1"><c r="A1"><f t="shared" si="3"/></c><c r="B1"><f t="shared" ref="A1:B1" si="3">B9</f></c></row>')?.formula).toBe('A9');
  });

  test('may use an index again', () => {
    const again = '<row r="1"><c r="A1"><f t="shared" ref="A1:B1" si="0">A9</f></c><c r="B1"><f t="shared" si="0"/></c>'
      + '<c r="C1"><f t="shared" ref="C1:D1" si="0">A5</f></c><c r="D1"><f t="shared" si="0"/></c></row>';
    expect([2, 4].map((col) => cell(again, 1, col)?.formula)).toEqual(['B9', 'B5']);
  });

  test('without an owner is refused', () => {
    expect(() => cell('<row r="1"><c r="A1"><f t="shared" si="3"/></c></row>')).toThrow('cell A1 shares formula 3, which no cell holds');
  });
});

describe('an array formula', () => {
  const metadata = `<metadata xmlns="${MAIN}" xmlns:xda="http://schemas.microsoft.com/office/spreadsheetml/2017/dynamicarray"><metadataTypes count="2"><metadataType name="XLRICHVALUE"/><metadataType name="XLDAPR" cellMeta="1"/></metadataTypes>`
    + '<futureMetadata name="XLDAPR" count="1"><bk><extLst><ext uri="{bdbb8cdc-fa1e-496e-a857-3c3f30c029c3}"><xda:dynamicArrayProperties fDynamic="1" fCollapsed="0"/></ext></extLst></bk></futureMetadata>'
    + '<cellMetadata count="2"><bk><rc t="1" v="0"/></bk><bk><rc t="2" v="0"/></bk></cellMetadata></metadata>';
  const xml = (cm: string): string => `<row r="1"><c r="A1"${cm}><f t="array" ref="A1:A3">B1:B3*2</f><v>2</v></c></row><row r="2"><c r="A2"><v>4</v></c></row>`;
  const ref = { top: 1, left: 1, bottom: 3, right: 1 };

  test.each([['', false], [' cm="1"', false], [' cm="2"', true], [' cm="3"', false]])('with "%s" is dynamic: %s', (cm, dynamic) => {
    expect(cell(xml(cm), 1, 1, { metadata })).toEqual({ value: 2, style: 0, formula: 'B1:B3*2', array: { ref, dynamic } });
    expect(cell(xml(cm), 2, 1, { metadata })).toEqual({ value: 4, style: 0, partOfArray: { row: 1, col: 1, dynamic } });
  });

  test('has parts that the file does not store', () => {
    expect(cell(xml(''), 3, 1)).toEqual({ value: undefined, style: 0, partOfArray: { row: 1, col: 1, dynamic: false } });
    expect(cell(xml(''), 4, 1)).toBeUndefined();
  });

  test('that overlaps another is refused', () => {
    const overlap = '<row r="1"><c r="A1"><f t="array" ref="A1:B2">1</f></c><c r="B1"><f t="array" ref="B1:B2">1</f></c></row><row r="2"><c r="B2"><v>1</v></c></row>';
    expect(() => cell(overlap)).toThrow('cell B2 belongs to two array formulas');
  });
});

test('the cells of a data table are marked and have no formula', () => {
  const xml = '<row r="1"><c r="B1"><f t="dataTable" ref="B1:B2" dt2D="0" dtr="0" r1="A9"/><v>5</v></c></row><row r="2"><c r="B2"><v>6</v></c></row>';
  expect(cell(xml, 1, 2)).toEqual({ value: 5, style: 0, dataTable: true });
  expect(cell(xml, 2, 2)).toEqual({ value: 6, style: 0, dataTable: true });
});

describe('styles', () => {
  const styles = `<styleSheet xmlns="${MAIN}"><numFmts count="1"><numFmt numFmtId="164" formatCode="0.0&quot; mL&quot;"/></numFmts>`
    + '<cellStyleXfs count="1"><xf numFmtId="0"/></cellStyleXfs><cellXfs count="3"><xf numFmtId="0"/><xf numFmtId="164"/><xf numFmtId="10"><protection hidden="1"/></xf></cellXfs></styleSheet>';
  const xml = '<cols><col min="2" max="3" style="1"/></cols><sheetData><row r="1" s="2" customFormat="1"><c r="A1" s="1"><f>1</f></c><c r="B1" s="2"><f>2</f></c></row></sheetData>';

  test('give the number format, custom or built in', () => {
    const book = openBook(buildBook({ sheets: [{ xml }], styles }));
    expect([0, 1, 2, 7].map((style) => book.numberFormat(style))).toEqual(['General', '0.0" mL"', '0.00%', 'General']);
  });

  test('of an empty cell are those of its row, else of its column', () => {
    const book = openBook(buildBook({ sheets: [{ xml }], styles }));
    expect([[1, 9], [5, 2], [5, 4]].map(([row, col]) => book.styleAt(0, row, col))).toEqual([2, 1, 0]);
  });

  test('hide a formula also through the named style, unless the cell says otherwise', () => {
    const inherited = `<styleSheet xmlns="${MAIN}"><cellStyleXfs><xf/><xf><protection hidden="1"/></xf></cellStyleXfs><cellXfs>`
      + '<xf xfId="0"/><xf xfId="1"/><xf xfId="1" applyProtection="1"/><xf xfId="1"><protection hidden="0"/></xf></cellXfs></styleSheet>';
    const book = openBook(buildBook({ styles: inherited }));
    expect([0, 1, 2, 3].map((style) => book.isHiddenStyle(style))).toEqual([false, true, false, false]);
  });

  test('hide a formula only on a protected sheet', () => {
    const hidden = (protection: string): unknown[] => {
      const book = openBook(buildBook({ sheets: [{ xml: xml + protection }], styles }));
      return [book.sheets[0].protected, book.cell(0, 1, 1)?.hiddenFormula, book.cell(0, 1, 2)?.hiddenFormula];
    };
    expect(hidden('')).toEqual([false, undefined, undefined]);
    expect(hidden('<sheetProtection sheet="1" objects="1"/>')).toEqual([true, undefined, true]);
  });
});
