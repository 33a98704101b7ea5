import { strFromU8, strToU8, unzipSync } from 'fflate';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { BookCell, CellValue } from '../../../addin/desk/book/BookCell';
import { BookError } from '../../../addin/desk/book/BookError';
import type { Edit } from '../../../addin/desk/book/Edit';
import { openBook } from '../../../addin/desk/book/openBook';
import { writeBook } from '../../../addin/desk/book/writeBook';
import { readZip } from '../../../addin/desk/book/zip';
import { buildBook, MAIN, partsOf, sheetPart, STRICT, STRICT_RELS } from './buildBook';
import type { BookParts } from './buildBook';

const SHEET = 'xl/worksheets/sheet1.xml';
const at = (row: number, col: number) => ({ sheet: 0, row, col });

/** The sheet data after the edits, as text. */
function sheetAfter(data: string, edits: Edit[], more: BookParts = {}): string {
  const bytes = writeBook(openBook(buildBook({ sheets: [{ xml: data }], ...more })), edits);
  openBook(bytes);
  const part = partsOf(bytes)[SHEET];
  return part.slice(part.indexOf('>', part.indexOf('<worksheet')) + 1, -'</worksheet>'.length);
}

function cellAfter(value: CellValue, set: 'constant' | 'formula' = 'constant'): BookCell | undefined {
  const edit: Edit = set === 'constant' ? { set, ...at(1, 1), value } : { set, ...at(1, 1), formula: 'B1', value };
  return openBook(writeBook(openBook(buildBook()), [edit])).cell(0, 1, 1);
}

describe('a workbook without edits', () => {
  test('keeps every part, its order and its packing', () => {
    const bytes = buildBook({ extra: { 'xl/media/image1.png': [new Uint8Array([137, 80, 78, 71]), { level: 0 }], 'xl/charts/chart1.xml': strToU8('<c/>') } });
    const again = writeBook(openBook(bytes), []);
    const list = (archive: Uint8Array): unknown[] => readZip(archive).map(({ name, method, crc, size, time, packed }) => [name, method, crc, size, time, [...packed]]);
    expect(list(again)).toEqual(list(bytes));
  });
});

describe('an edit', () => {
  test('changes the bytes of its sheet alone', () => {
    const bytes = buildBook({
      sheets: [{ xml: '<sheetData/>' }, { xml: '<sheetData><row r="1"><c r="A1"><v>1</v></c></row></sheetData>' }],
      strings: `<sst xmlns="${MAIN}"/>`, styles: `<styleSheet xmlns="${MAIN}"/>`,
      extra: { 'xl/charts/chart1.xml': strToU8('<c/>'), 'docProps/app.xml': strToU8('<Properties/>') },
    });
    const before = partsOf(bytes);
    const after = partsOf(writeBook(openBook(bytes), [{ set: 'constant', ...at(2, 2), value: 5 }]));
    expect(Object.keys(after)).toEqual(Object.keys(before));
    expect(Object.keys(after).filter((name) => after[name] !== before[name])).toEqual([SHEET]);
  });

  test('keeps everything else of the sheet, character by character', () => {
    const head = "<sheetPr/><dimension  ref='A1:C9' />\r\n<sheetViews><!-- a > b --><sheetView workbookViewId=\"0\"/></sheetViews><sheetData>";
    const tail = '</sheetData>\r\n<conditionalFormatting sqref="A1"><cfRule type="expression"><formula>A1&gt;2</formula></cfRule></conditionalFormatting>';
    const one = '<row r="1"  spans="1:3" x14ac:dyDescent="0.25" xmlns:x14ac="urn:a"><c r="A1" s="0" t="s" ><v>0</v></c>\r\n<c   r="C1"><f ca="1">NOW()</f><v>1</v></c></row>';
    const strings = `<sst xmlns="${MAIN}"><si><t>a</t></si></sst>`;
    expect(sheetAfter(`${head}${one}${tail}`, [{ set: 'constant', ...at(1, 2), value: 7 }], { strings }))
      .toBe(`${head}${one.replace('\r\n', '\r\n<c r="B1"><v>7</v></c>')}${tail}`);
  });

  test.each<[string, string, Edit[], string]>([
    ['fills an empty sheet', '<sheetData/>', [{ set: 'constant', ...at(2, 3), value: 1 }], '<sheetData><row r="2"><c r="C2"><v>1</v></c></row></sheetData>'],
    ['fills an empty row', '<sheetData><row r="2" ht="20"/></sheetData>', [{ set: 'constant', ...at(2, 1), value: true }],
      '<sheetData><row r="2" ht="20"><c r="A2" t="b"><v>1</v></c></row></sheetData>'],
    ['puts rows and cells in order', '<sheetData><row r="2"><c r="B2"/><c r="D2"/></row><row r="4"/></sheetData>',
      [[4, 1], [2, 5], [2, 3], [5, 1], [2, 1], [3, 2], [3, 1], [1, 1]].map(([row, col]) => ({ set: 'constant', ...at(row, col), value: 0 })),
      '<sheetData><row r="1"><c r="A1"><v>0</v></c></row><row r="2"><c r="A2"><v>0</v></c><c r="B2"/><c r="C2"><v>0</v></c><c r="D2"/><c r="E2"><v>0</v></c></row>'
      + '<row r="3"><c r="A3"><v>0</v></c><c r="B3"><v>0</v></c></row><row r="4"><c r="A4"><v>0</v></c></row><row r="5"><c r="A5"><v>0</v></c></row></sheetData>'],
    ['counts rows and cells without references', '<sheetData><row><c><v>1</v></c><c><v>2</v></c></row><row><c><v>3</v></c></row></sheetData>',
      [{ set: 'constant', ...at(1, 2), value: 9 }, { set: 'clear', ...at(2, 1) }],
      '<sheetData><row><c><v>1</v></c><c r="B1"><v>9</v></c></row><row><c r="A2"/></row></sheetData>'],
    ['drops spans that it leaves', '<sheetData><row r="1" spans="1:1"><c r="A1"/></row><row r="2" spans="1:3"><c r="A2"/></row></sheetData>',
      [{ set: 'constant', ...at(1, 2), value: 1 }, { set: 'constant', ...at(2, 2), value: 1 }],
      '<sheetData><row r="1"><c r="A1"/><c r="B1"><v>1</v></c></row><row r="2" spans="1:3"><c r="A2"/><c r="B2"><v>1</v></c></row></sheetData>'],
    ['lets the dimension grow', '<dimension ref="B2"/><sheetData/>', [{ set: 'constant', ...at(1, 4), value: 1 }],
      '<dimension ref="B1:D2"/><sheetData><row r="1"><c r="D1"><v>1</v></c></row></sheetData>'],
    ['leaves the dimension where it only clears', '<dimension ref="B2"/><sheetData><row r="9"><c r="A9" s="1"><v>1</v></c></row></sheetData>', [{ set: 'clear', ...at(9, 1) }],
      '<dimension ref="B2"/><sheetData><row r="9"><c r="A9" s="1"/></row></sheetData>'],
    ['replaces a formula by a constant', '<sheetData><row r="1"><c r="A1" s="3" cm="1" t="str"><f>B1</f><v>x</v></c></row></sheetData>',
      [{ set: 'constant', ...at(1, 1), value: 2.5 }], '<sheetData><row r="1"><c r="A1" s="3"><v>2.5</v></c></row></sheetData>'],
    ['writes a formula with its result', '<sheetData/>', [{ set: 'formula', ...at(1, 1), formula: 'IF(B1<2,"a","b")&C1', value: 'a' }],
      '<sheetData><row r="1"><c r="A1" t="str"><f>IF(B1&lt;2,&quot;a&quot;,&quot;b&quot;)&amp;C1</f><v>a</v></c></row></sheetData>'],
    ['writes a formula without a result', '<sheetData/>', [{ set: 'formula', ...at(1, 1), formula: 'B1' }], '<sheetData><row r="1"><c r="A1"><f>B1</f></c></row></sheetData>'],
    ['clears the content and keeps the style', '<sheetData><row r="1"><c r="A1" s="3"><f>B1</f><v>1</v></c></row></sheetData>', [{ set: 'clear', ...at(1, 1) }],
      '<sheetData><row r="1"><c r="A1" s="3"/></row></sheetData>'],
    ['clears nothing where nothing is', '<sheetData/>', [{ set: 'clear', ...at(1, 1) }], '<sheetData/>'],
    ['gives a formula a new result', '<sheetData><row r="1"><c r="A1" s="3" t="e" vm="1"><f ca="1" >B1</f><v>#N/A</v></c></row></sheetData>', [{ set: 'result', ...at(1, 1), value: 4 }],
      '<sheetData><row r="1"><c r="A1" s="3"><f ca="1" >B1</f><v>4</v></c></row></sheetData>'],
    ['gives a formula its first result', '<sheetData><row r="1"><c r="A1"><f>B1</f></c></row></sheetData>', [{ set: 'result', ...at(1, 1), value: 'x' }],
      '<sheetData><row r="1"><c r="A1" t="str"><f>B1</f><v>x</v></c></row></sheetData>'],
    ['takes a result away', '<sheetData><row r="1"><c r="A1" t="b"><f>B1</f><v>1</v></c></row></sheetData>', [{ set: 'result', ...at(1, 1), value: null }],
      '<sheetData><row r="1"><c r="A1"><f>B1</f></c></row></sheetData>'],
    ['stores a newer error as #VALUE!', '<sheetData/>', [{ set: 'constant', ...at(1, 1), value: { error: '#SPILL!' } }, { set: 'constant', ...at(1, 2), value: { error: '#N/A' } }],
      '<sheetData><row r="1"><c r="A1" t="e"><v>#VALUE!</v></c><c r="B1" t="e"><v>#N/A</v></c></row></sheetData>'],
  ])('%s', (_what, before, edits, after) => {
    expect(sheetAfter(before, edits)).toBe(after);
  });

  test('takes the prefix of its part, also in UTF-16', () => {
    const text = `<x:worksheet xmlns:x="${MAIN}"><x:sheetData/></x:worksheet>`;
    const after = text.replace('<x:sheetData/>', '<x:sheetData><x:row r="1"><x:c r="A1" t="inlineStr"><x:is><x:t>µ</x:t></x:is></x:c><x:c r="B1"><x:f>A1</x:f></x:c></x:row></x:sheetData>');
    const units = (s: string): Uint8Array => new Uint8Array(new Uint16Array([...`\ufeff${s}`].map((c) => c.charCodeAt(0))).buffer);
    const edits: Edit[] = [{ set: 'constant', ...at(1, 1), value: 'µ' }, { set: 'formula', ...at(1, 2), formula: 'A1' }];
    expect(partsOf(writeBook(openBook(buildBook({ sheets: [{ part: text }] })), edits))[SHEET]).toBe(after);
    const utf16 = writeBook(openBook(buildBook({ sheets: [{ part: units(text) }] })), edits);
    expect(partsOf(utf16)[SHEET]).toBe(strFromU8(units(after)));
  });

  test('keeps a byte order mark', () => {
    const bytes = writeBook(openBook(buildBook({ sheets: [{ part: `\ufeff${sheetPart('<sheetData/>')}` }] })), [{ set: 'constant', ...at(1, 1), value: 1 }]);
    expect([...unzipSync(bytes)[SHEET].subarray(0, 5)]).toEqual([0xef, 0xbb, 0xbf, 0x3c, 0x3f]);
    expect(openBook(bytes).cell(0, 1, 1)?.value).toBe(1);
  });

  test('leaves the book it was made from alone', () => {
    const book = openBook(buildBook());
    writeBook(book, [{ set: 'constant', ...at(1, 1), value: 1 }]);
    expect(book.cell(0, 1, 1)).toBeUndefined();
  });
});

describe('values that are written are read back', () => {
  test.each<CellValue>([0, -0, 0.1, 1e21, 5e-324, -1.7976931348623157e308, '', ' a ', 'a\nb', 'a\r\nb\t', '_x0041_', '<&>"\']]>', '🧪', '\ud83e', '\u0000\u001f\uffff', '=1+1', true, false, { error: '#REF!' }])('%j', (value) => {
    const expected = value === 0 ? 0 : value;
    expect(cellAfter(value)).toEqual({ value: expected, style: 0 });
    expect(cellAfter(value, 'formula')).toEqual({ value: expected, style: 0, formula: 'B1' });
  });

  test('any text and any number (law)', () => {
    const text = fc.string({ unit: fc.oneof(fc.integer({ min: 0, max: 0xffff }).map((c) => String.fromCharCode(c)), fc.constantFrom('_x', '005F_', '_', '<', '\r', ']]>')) });
    fc.assert(fc.property(fc.oneof(text, fc.double({ noNaN: true, noDefaultInfinity: true }).filter((x) => !Object.is(x, -0))), (value) => {
      expect(cellAfter(value)?.value).toBe(value);
      expect(cellAfter(value, 'formula')?.value).toBe(value);
    }), { seed: 7, numRuns: 200 });
  });
});

test('random edits give the sheet that a plain table of cells gives (law)', () => {
  const place = fc.record({ row: fc.integer({ min: 1, max: 6 }), col: fc.integer({ min: 1, max: 6 }) });
  const cells = fc.uniqueArray(fc.record({ place, value: fc.integer({ min: 0, max: 99 }), bare: fc.boolean() }), { selector: ({ place: { row, col } }) => row * 10 + col, maxLength: 20 });
  const edits = fc.uniqueArray(fc.record({ place, value: fc.integer({ min: 100, max: 199 }), clear: fc.boolean() }), { selector: ({ place: { row, col } }) => row * 10 + col, maxLength: 12 });
  fc.assert(fc.property(cells, edits, (stored, changed) => {
    const table = new Map<string, number>();
    let xml = '';
    for (let row = 1; row <= 6; row++) {
      const own = stored.filter((c) => c.place.row === row).sort((a, b) => a.place.col - b.place.col);
      if (own.length === 0) continue;
      let last = 0;
      xml += `<row r="${row}">`;
      for (const { place: { col }, value, bare } of own) {
        xml += bare && col === last + 1 ? `<c><v>${value}</v></c>` : `<c r="${'ABCDEF'[col - 1]}${row}"><v>${value}</v></c>`;
        table.set(`${row},${col}`, value);
        last = col;
      }
      xml += '</row>';
    }
    for (const { place: { row, col }, value, clear } of changed) {
      if (clear) table.delete(`${row},${col}`);
      else table.set(`${row},${col}`, value);
    }
    const list = changed.map(({ place: { row, col }, value, clear }): Edit => (clear ? { set: 'clear', ...at(row, col) } : { set: 'constant', ...at(row, col), value }));
    const after = openBook(writeBook(openBook(buildBook({ sheets: [{ xml: `<sheetData>${xml}</sheetData>` }] })), list));
    const read = new Map<string, unknown>();
    for (const [row, own] of after.rows(0)) for (const [col, { value }] of own) if (value !== null) read.set(`${row},${col}`, value);
    expect(new Map([...read].sort())).toEqual(new Map([...table].sort()));
  }), { seed: 11, numRuns: 300 });
});

describe('the chain of calculation', () => {
  const book = (): BookParts => ({
    sheets: [{ xml: '<sheetData><row r="1"><c r="A1"><f>B1</f><v>1</v></c><c r="B1"><v>1</v></c></row></sheetData>' }],
    calcChain: `<calcChain xmlns="${MAIN}"><c r="A1" i="1"/></calcChain>`,
  });
  const chained = (edit: Edit): boolean => {
    const parts = partsOf(writeBook(openBook(buildBook(book())), [edit]));
    const traces = ['[Content_Types].xml', 'xl/_rels/workbook.xml.rels'].map((name) => /calcChain/.test(parts[name]));
    const kept = 'xl/calcChain.xml' in parts;
    expect(traces).toEqual([kept, kept]);
    return kept;
  };

  test('goes with its traces where a formula comes, changes or goes', () => {
    expect(chained({ set: 'formula', ...at(2, 1), formula: 'B1' })).toBe(false);
    expect(chained({ set: 'constant', ...at(1, 1), value: 1 })).toBe(false);
    expect(chained({ set: 'clear', ...at(1, 1) })).toBe(false);
  });

  test('stays where none does', () => {
    expect(chained({ set: 'result', ...at(1, 1), value: 2 })).toBe(true);
    expect(chained({ set: 'constant', ...at(1, 2), value: 2 })).toBe(true);
  });
});

describe('full calculation', () => {
  const workbook = (after: string, recalculate?: boolean): string => {
    const bytes = writeBook(openBook(buildBook({ after })), [], { recalculate });
    return partsOf(bytes)['xl/workbook.xml'].split('</sheets>')[1];
  };

  test('is asked for on request only', () => {
    expect(workbook('<calcPr calcId="191029"/>')).toBe('<calcPr calcId="191029"/></workbook>');
    expect(workbook('<calcPr calcId="191029"/>', true)).toBe('<calcPr calcId="191029" fullCalcOnLoad="1"/></workbook>');
    expect(workbook('<definedNames/><oleSize ref="A1"/>', true)).toBe('<definedNames/><calcPr fullCalcOnLoad="1"/><oleSize ref="A1"/></workbook>');
  });
});

describe('a shared formula', () => {
  const column = '<sheetData><row r="1"><c r="B1"><f t="shared" ref="B1:B3" si="4">A1*2</f><v>1</v></c></row><row r="2"><c r="B2"><f t="shared" si="4"/><v>2</v></c></row><row r="3"><c r="B3"><f t="shared" si="4"/><v>3</v></c></row></sheetData>';
  const constant = (row: number, col: number): Edit => ({ set: 'constant', ...at(row, col), value: 0 });

  test('passes to the next cell where its owner is overwritten', () => {
    expect(sheetAfter(column, [constant(1, 2)])).toBe(column
      .replace('<c r="B1"><f t="shared" ref="B1:B3" si="4">A1*2</f><v>1</v></c>', '<c r="B1"><v>0</v></c>')
      .replace('<f t="shared" si="4"/><v>2', '<f t="shared" ref="B2:B3" si="4">A2*2</f><v>2'));
  });

  test('loses a follower without further change', () => {
    expect(sheetAfter(column, [constant(2, 2)])).toBe(column.replace('<f t="shared" si="4"/><v>2</v>', '<v>0</v>'));
  });

  test('of a block is written out, since no cell that is left is its corner', () => {
    const block = '<sheetData><row r="1"><c r="A1"><f t="shared" ref="A1:B2" si="0">D1</f></c><c r="B1"><f t="shared" si="0"/></c></row><row r="2"><c r="A2"><f t="shared" si="0"/></c><c r="B2"><f t="shared" si="0"/></c></row></sheetData>';
    expect(sheetAfter(block, [constant(1, 1)])).toBe('<sheetData><row r="1"><c r="A1"><v>0</v></c><c r="B1"><f>E1</f></c></row><row r="2"><c r="A2"><f>D2</f></c><c r="B2"><f>E2</f></c></row></sheetData>');
  });

  test('is written out where its index is used again: a new owner could be taken for the other’s', () => {
    const again = '<sheetData><row r="1"><c r="A1"><f t="shared" ref="A1:A3" si="0">D1</f></c></row><row r="2"><c r="A2"><f t="shared" si="0"/></c><c r="B2"><f t="shared" ref="B2:B3" si="0">E5</f></c></row>'
      + '<row r="3"><c r="B3"><f t="shared" si="0"/></c></row></sheetData>';
    expect(sheetAfter(again, [constant(1, 1)])).toBe(again.replace('<f t="shared" ref="A1:A3" si="0">D1</f>', '<v>0</v>').replace('<c r="A2"><f t="shared" si="0"/>', '<c r="A2"><f>D2</f>'));
  });

  test('keeps its text where only results change', () => {
    expect(sheetAfter(column, [{ set: 'result', ...at(1, 2), value: 8 }])).toBe(column.replace('<v>1</v>', '<v>8</v>'));
  });

  test('means the same in every cell left, whichever cells are overwritten (law)', () => {
    fc.assert(fc.property(fc.uniqueArray(fc.integer({ min: 0, max: 11 }), { maxLength: 11 }), fc.constantFrom(1, 2, 3, 4, 6, 12), (gone, width) => {
      const cells = Array.from({ length: 12 }, (_, i) => ({ row: Math.floor(i / width) + 1, col: (i % width) + 1 }));
      const name = ({ row, col }: { row: number; col: number }): string => `${'ABCDEFGHIJKL'[col - 1]}${row}`;
      let xml = '';
      for (let row = 1; row <= 12 / width; row++) {
        const own = cells.filter((c) => c.row === row).map((c) =>
          `<c r="${name(c)}">${row === 1 && c.col === 1 ? `<f t="shared" si="0" ref="A1:${name(cells[11])}">M1+$N$1</f>` : '<f t="shared" si="0"/>'}<v>1</v></c>`);
        xml += `<row r="${row}">${own.join('')}</row>`;
      }
      const before = openBook(buildBook({ sheets: [{ xml: `<sheetData>${xml}</sheetData>` }] }));
      const after = openBook(writeBook(before, gone.map((i) => constant(cells[i].row, cells[i].col))));
      cells.forEach(({ row, col }, i) => expect(after.cell(0, row, col)?.formula).toBe(gone.includes(i) ? undefined : before.cell(0, row, col)?.formula));
    }), { seed: 3, numRuns: 200 });
  });
});

describe('a style', () => {
  const styles = `<styleSheet xmlns="${MAIN}"><fonts count="1"><font/></fonts><cellXfs count="2"><xf numFmtId="0" fontId="0"/><xf numFmtId="0" fontId="0" applyFont="1"><alignment horizontal="center"/></xf></cellXfs><dxfs count="0"/></styleSheet>`;
  const xml = '<sheetData><row r="1"><c r="A1" s="1"><v>1</v></c></row></sheetData>';
  const after = (edits: Edit[], more: BookParts = {}): Record<string, string> => partsOf(writeBook(openBook(buildBook({ sheets: [{ xml }], styles, ...more })), edits));

  test('of a neighbour with another number format is appended once', () => {
    const style = { like: { row: 1, col: 1 }, numberFormat: '0.0" mL"' };
    const parts = after([2, 3].map((col) => ({ set: 'constant', ...at(1, col), value: 1, style })));
    expect(parts['xl/styles.xml']).toBe(styles
      .replace('<fonts', '<numFmts count="1"><numFmt numFmtId="164" formatCode="0.0&quot; mL&quot;"/></numFmts><fonts')
      .replace('<cellXfs count="2">', '<cellXfs count="3">')
      .replace('</cellXfs>', '<xf numFmtId="164" fontId="0" applyFont="1" applyNumberFormat="1"><alignment horizontal="center"/></xf></cellXfs>'));
    expect(parts[SHEET]).toContain('<c r="B1" s="2"><v>1</v></c><c r="C1" s="2"><v>1</v></c>');
  });

  test('takes a built-in format by its number and a known custom one as it is', () => {
    const known = styles.replace('<fonts', '<numFmts count="1"><numFmt numFmtId="170" formatCode="0.0000"/></numFmts><fonts');
    const parts = after([{ set: 'style', ...at(1, 1), style: { numberFormat: '0.00' } }, { set: 'style', ...at(2, 1), style: { numberFormat: '0.0000' } }], { styles: known });
    expect(parts['xl/styles.xml']).toContain('<xf numFmtId="2" fontId="0" applyFont="1" applyNumberFormat="1"><alignment horizontal="center"/></xf><xf numFmtId="170" fontId="0" applyNumberFormat="1"/></cellXfs>');
    expect(parts[SHEET]).toContain('<row r="1"><c r="A1" s="2"><v>1</v></c></row><row r="2"><c r="A2" s="3"/></row>');
  });

  test('without another number format is the neighbour’s own', () => {
    const parts = after([{ set: 'constant', ...at(1, 2), value: 1, style: { like: { row: 1, col: 1 } } }]);
    expect(parts['xl/styles.xml']).toBe(styles);
    expect(parts[SHEET]).toContain('<c r="B1" s="1">');
  });

  test('of a new cell is its row’s or column’s', () => {
    const data = '<cols><col min="2" max="2" style="1"/></cols><sheetData><row r="1" s="1" customFormat="1"/></sheetData>';
    expect(sheetAfter(data, [{ set: 'constant', ...at(1, 1), value: 1 }, { set: 'constant', ...at(2, 2), value: 1 }], { styles }))
      .toContain('<c r="A1" s="1"><v>1</v></c></row><row r="2"><c r="B2" s="1"><v>1</v></c></row>');
  });

  test('makes a style part where there is none', () => {
    const bytes = writeBook(openBook(buildBook()), [{ set: 'constant', ...at(1, 1), value: 1, style: { numberFormat: '0.000' } }]);
    const book = openBook(bytes);
    expect(book.numberFormat(book.styleAt(0, 1, 1))).toBe('0.000');
    expect(partsOf(bytes)['[Content_Types].xml']).toContain('PartName="/xl/styles.xml"');
  });
});

describe('a spill', () => {
  const ref = (top: number, left: number, bottom: number, right: number) => ({ top, left, bottom, right });
  const spill: Edit[] = [
    { set: 'formula', ...at(2, 1), formula: '_xlfn.SEQUENCE(3)', value: 1, array: { ref: ref(2, 1, 4, 1), dynamic: true } },
    { set: 'result', ...at(3, 1), value: 2 },
    { set: 'result', ...at(4, 1), value: 'x' },
  ];

  test('is written with its mark and read back', () => {
    const bytes = writeBook(openBook(buildBook()), spill);
    const parts = partsOf(bytes);
    expect(parts[SHEET]).toContain('<row r="2"><c r="A2" cm="1"><f t="array" ref="A2:A4">_xlfn.SEQUENCE(3)</f><v>1</v></c></row><row r="3"><c r="A3"><v>2</v></c></row><row r="4"><c r="A4" t="str"><v>x</v></c></row>');
    expect(parts['[Content_Types].xml']).toContain('<Override PartName="/xl/metadata.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.sheetMetadata+xml"/>');
    expect(parts['xl/_rels/workbook.xml.rels']).toContain('Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/sheetMetadata"');
    const book = openBook(bytes);
    expect(book.cell(0, 2, 1)).toEqual({ value: 1, style: 0, formula: '_xlfn.SEQUENCE(3)', array: { ref: ref(2, 1, 4, 1), dynamic: true } });
    expect(book.cell(0, 4, 1)).toEqual({ value: 'x', style: 0, partOfArray: { row: 2, col: 1, dynamic: true } });
  });

  test('may cover cells that hold only a style, and cells that another edit clears', () => {
    const xml = '<sheetData><row r="3"><c r="A3" s="1"/></row><row r="4"><c r="A4"><v>9</v></c></row></sheetData>';
    const edits: Edit[] = [spill[0], { set: 'result', ...at(3, 1), value: 2 }, { set: 'clear', ...at(4, 1) }];
    expect(sheetAfter(xml, edits)).toContain('<c r="A3" s="1"><v>2</v></c></row><row r="4"><c r="A4"/></row>');
  });

  test('uses the mark that is there: the metadata keep their bytes', () => {
    const first = writeBook(openBook(buildBook()), spill);
    const second = writeBook(openBook(first), [{ set: 'formula', ...at(2, 3), formula: 'A2:A3', array: { ref: ref(2, 3, 3, 3), dynamic: true } }]);
    expect(partsOf(second)['xl/metadata.xml']).toBe(partsOf(first)['xl/metadata.xml']);
    expect(partsOf(second)[SHEET]).toContain('<c r="C2" cm="1">');
  });

  test('appends its mark to other metadata, whose numbers stay', () => {
    const rich = `<m:metadata xmlns:m="${MAIN}"><m:metadataTypes count="1"><m:metadataType name="XLRICHVALUE" minSupportedVersion="120000"/></m:metadataTypes><m:futureMetadata name="XLRICHVALUE" count="1"><m:bk/></m:futureMetadata>`
      + '<m:cellMetadata count="1"><m:bk><m:rc t="1" v="0"/></m:bk></m:cellMetadata><m:valueMetadata count="1"><m:bk><m:rc t="1" v="0"/></m:bk></m:valueMetadata></m:metadata>';
    const bytes = writeBook(openBook(buildBook({ metadata: rich })), spill);
    const { 'xl/metadata.xml': text, [SHEET]: sheet } = partsOf(bytes);
    expect(text.replace(/<m:metadataType name="XLDAPR"[^>]*\/>/, '').replace(/<m:futureMetadata name="XLDAPR".*?<\/m:futureMetadata>/, '').replace('<m:bk><m:rc t="2" v="0"/></m:bk>', '')
      .replace('<m:metadataTypes count="2">', '<m:metadataTypes count="1">').replace('<m:cellMetadata count="2">', '<m:cellMetadata count="1">')).toBe(rich);
    expect(sheet).toContain('<c r="A2" cm="2">');
    expect(openBook(bytes).cell(0, 2, 1)?.array?.dynamic).toBe(true);
  });

  test('in a strict workbook takes strict names', () => {
    const bytes = writeBook(openBook(buildBook({ main: STRICT, rels: STRICT_RELS })), spill);
    expect(partsOf(bytes)['xl/metadata.xml']).toContain(`<metadata xmlns="${STRICT}">`);
    expect(partsOf(bytes)['xl/_rels/workbook.xml.rels']).toContain(`Type="${STRICT_RELS}/sheetMetadata"`);
    expect(openBook(bytes).cell(0, 2, 1)?.array?.dynamic).toBe(true);
  });

  test('that is replaced takes its old results along', () => {
    const before = openBook(writeBook(openBook(buildBook()), spill));
    const smaller = openBook(writeBook(before, [
      { set: 'formula', ...at(2, 1), formula: 'B2:B3', value: 7, array: { ref: ref(2, 1, 3, 1), dynamic: true } }, { set: 'result', ...at(3, 1), value: 8 },
    ]));
    expect([2, 3, 4].map((row) => smaller.cell(0, row, 1)?.value)).toEqual([7, 8, null]);
    const gone = openBook(writeBook(before, [{ set: 'constant', ...at(2, 1), value: 5 }]));
    expect([2, 3, 4].map((row) => gone.cell(0, row, 1)?.value)).toEqual([5, null, null]);
  });
});

describe('an edit is refused', () => {
  const xml = '<sheetData><row r="1"><c r="A1"><f t="array" ref="A1:A2">B1:B2</f><v>1</v></c><c r="C1"><v>1</v></c><c r="D1"><f t="dataTable" ref="D1:D2" r1="C1"/><v>1</v></c></row>'
    + '<row r="2"><c r="A2"><v>2</v></c></row></sheetData><mergeCells><mergeCell ref="E1:F2"/></mergeCells>';
  const refusal = (...edits: Edit[]): string => {
    const book = openBook(buildBook({ sheets: [{ name: 'S', xml }, { kind: 'chartsheet', part: '<c/>' }] }));
    try {
      writeBook(book, edits);
    } catch (error) {
      if (error instanceof BookError) return error.message;
      throw error;
    }
    return 'written';
  };
  const area = { top: 3, left: 3, bottom: 4, right: 3 };
  const spill = (top: number, left: number, bottom: number, right: number): Edit => ({ set: 'formula', ...at(top, left), formula: '1', array: { ref: { top, left, bottom, right }, dynamic: true } });

  test.each<[Edit[], string]>([
    [[{ set: 'constant', ...at(2, 1), value: 1 }], 'sheet S cell A2 belongs to the array formula in A1:A2, which can only be changed as a whole'],
    [[{ set: 'clear', ...at(1, 1) }], 'sheet S cell A1 belongs to the array formula in A1:A2, which can only be changed as a whole'],
    [[{ set: 'constant', ...at(2, 4), value: 1 }], 'sheet S cell D2 belongs to a data table, which can only be changed in a spreadsheet program'],
    [[{ set: 'constant', ...at(2, 6), value: 1 }], 'sheet S cell F2 is hidden in the merged cells E1:F2'],
    [[{ set: 'constant', ...at(3, 1), value: NaN }], 'sheet S cell A3 needs a finite number, got NaN'],
    [[{ set: 'constant', ...at(3, 1), value: 'x'.repeat(32768) }], 'sheet S cell A3 needs text of at most 32767 characters, got 32768'],
    [[{ set: 'formula', ...at(3, 1), formula: '=B1' }], 'sheet S cell A3 needs a formula without "=", got "=B1"'],
    [[{ set: 'formula', ...at(3, 1), formula: 'x'.repeat(8193) }], 'sheet S cell A3 needs a formula of at most 8192 characters, got 8193'],
    [[{ set: 'result', ...at(1, 3), value: 1 }], 'sheet S cell C1 takes no result: it holds no formula'],
    [[{ set: 'clear', ...at(1, 3) }, { set: 'constant', ...at(1, 3), value: 1 }], 'sheet S cell C1 is edited twice'],
    [[{ set: 'constant', ...at(0, 3), value: 1 }], 'sheet S has no cell at row 0, column 3'],
    [[{ set: 'constant', sheet: 1, row: 1, col: 1, value: 1 }], 'sheet Sheet2 is a chartsheet and has no cells'],
    [[{ set: 'constant', sheet: 2, row: 1, col: 1, value: 1 }], 'the workbook has no sheet 2'],
    [[{ set: 'formula', ...at(3, 1), formula: '1', array: { ref: area, dynamic: true } }], 'sheet S cell A3 needs a spill that begins in the cell and stays on the sheet'],
    [[spill(1, 1, 1, 2)], 'sheet S cell A1 belongs to the array formula in A1:A2, which can only be changed as a whole'],
    [[{ set: 'result', ...at(1, 1), value: Infinity }], 'sheet S cell A1 needs a finite number, got Infinity'],
    [[spill(1, 2, 1, 3)], 'sheet S cell B1 cannot spill over B1:C1: C1 is occupied'],
    [[spill(3, 1, 4, 2), { set: 'constant', ...at(4, 2), value: 1 }], 'sheet S cell A3 cannot spill over A3:B4: another edit writes B4'],
    [[spill(3, 2, 4, 2), spill(4, 1, 4, 2)], 'sheet S cell A4 cannot spill over A4:B4: another edit writes B4'],
    [[spill(4, 1, 4, 2), spill(3, 2, 4, 2)], 'sheet S cell B3 cannot spill over B3:B4: another edit writes B4'],
    [[spill(2, 5, 3, 5)], 'sheet S cell E2 cannot spill over E2:E3: it meets merged cells'],
    [[{ set: 'tableColumn', table: 'T', name: 'u' }], 'the workbook has no table T'],
  ])('%j', (edits, message) => {
    expect(refusal(...edits)).toBe(message);
  });

  test('but an array formula may be replaced as a whole', () => {
    expect(refusal({ set: 'clear', ...at(2, 1) }, { set: 'formula', ...at(1, 1), formula: 'B1' })).toBe('written');
  });

  test('on a cell of a spill by itself', () => {
    const book = openBook(writeBook(openBook(buildBook({ sheets: [{ name: 'S' }] })), [spill(1, 1, 2, 1)]));
    expect(() => writeBook(book, [{ set: 'constant', ...at(2, 1), value: 1 }])).toThrow('sheet S cell A2 belongs to the spill of A1 and cannot be changed by itself');
    expect(() => writeBook(book, [{ set: 'clear', ...at(1, 1) }, { set: 'result', ...at(2, 1), value: 1 }])).toThrow('sheet S cell A2 takes no result: the array formula it belonged to is replaced');
  });
});
