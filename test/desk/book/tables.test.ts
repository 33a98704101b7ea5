import { describe, expect, test } from 'vitest';
import type { Edit } from '../../../addin/desk/book/Edit';
import { openBook } from '../../../addin/desk/book/openBook';
import { writeBook } from '../../../addin/desk/book/writeBook';
import { buildBook, MAIN, partsOf } from './buildBook';

const table = (more = ''): string => `<table xmlns="${MAIN}" id="1" name="T" displayName="T" ref="A1:B4" totalsRowCount="1"${more}><autoFilter ref="A1:B3"/>`
  + '<tableColumns count="2"><tableColumn id="1" name="m"/><tableColumn id="5" name="V"/></tableColumns><tableStyleInfo name="TableStyleMedium2"/></table>';
const styles = `<styleSheet xmlns="${MAIN}"><cellXfs count="2"><xf numFmtId="0"/><xf numFmtId="0" fontId="1"/></cellXfs></styleSheet>`;
const DATA = '<sheetData><row r="1"><c r="A1" t="str"><v>m</v></c><c r="B1" s="1" t="str"><v>V</v></c></row><row r="2"><c r="A2"><v>1</v></c></row></sheetData>';
const book = (xml = DATA, part = table()): Uint8Array => buildBook({ sheets: [{ name: 'S', xml, tables: [part] }], styles });
const write = (edits: Edit[], bytes = book()): Record<string, string> => partsOf(writeBook(openBook(bytes), edits));
const grow: Edit = { set: 'tableColumn', table: 't', name: 'u(m)' };

describe('a table grows by a column', () => {
  test('in its area, its filter, its list and its header cell', () => {
    const parts = write([{ ...grow, formula: 'T[[#This Row],[m]]*2' }, { set: 'formula', sheet: 0, row: 2, col: 3, formula: 'A2*2', value: 2 }]);
    expect(parts['xl/tables/table11.xml']).toBe(table()
      .replace('ref="A1:B4"', 'ref="A1:C4"').replace('ref="A1:B3"', 'ref="A1:C3"').replace('count="2"', 'count="3"')
      .replace('</tableColumns>', '<tableColumn id="6" name="u(m)"><calculatedColumnFormula>T[[#This Row],[m]]*2</calculatedColumnFormula></tableColumn></tableColumns>'));
    expect(parts['xl/worksheets/sheet1.xml']).toContain('<c r="C1" s="1" t="inlineStr"><is><t>u(m)</t></is></c></row><row r="2"><c r="A2"><v>1</v></c><c r="C2"><f>A2*2</f><v>2</v></c></row>');
  });

  test('or by several, whose names and header cells stay equal whatever they hold', () => {
    const names = ['a\nb', '<&"', '_x0041_', ' '];
    const after = openBook(writeBook(openBook(book()), names.map((name): Edit => ({ set: 'tableColumn', table: 'T', name }))));
    expect(after.tables[0].columns).toEqual(['m', 'V', ...names]);
    expect(after.tables[0].ref).toEqual({ top: 1, left: 1, bottom: 4, right: 6 });
    expect(names.map((_, i) => after.cell(0, 1, 3 + i)?.value)).toEqual(names);
  });

  test('without a header cell where it has no header row', () => {
    const parts = write([grow], book('<sheetData/>', table(' headerRowCount="0"')));
    expect(parts['xl/worksheets/sheet1.xml']).toContain('<sheetData/>');
    expect(parts['xl/tables/table11.xml']).toContain('name="u(m)"');
  });
});

describe('a table refuses', () => {
  test.each<[string, Edit[], Uint8Array, string]>([
    ['a name it has', [{ ...grow, name: 'M' }], book(), 'table T already has a column m'],
    ['the same new name twice', [grow, grow], book(), 'table T already has a column u(m)'],
    ['no name', [{ ...grow, name: '' }], book(), 'table T needs a column name of 1 to 255 characters, got 0'],
    ['to cover a cell in use', [grow], book('<sheetData><row r="3"><c r="C3"><v>9</v></c></row></sheetData>'), 'table T cannot grow to C1:C4: C3 is occupied'],
    ['to cover merged cells', [grow], book(`${DATA}<mergeCells><mergeCell ref="C4:D4"/></mergeCells>`), 'table T cannot grow to C1:C4: there are merged cells'],
    ['to grow when bound to a query', [grow], book(DATA, table(' tableType="queryTable"')), 'table T is bound to a source of data and takes no new column'],
    ['another text in a header', [{ set: 'constant', sheet: 0, row: 1, col: 2, value: 'W' }], book(), 'sheet S cell B1 is a header of table T and must hold the name of its column'],
    ['an empty header', [{ set: 'clear', sheet: 0, row: 1, col: 2 }], book(), 'sheet S cell B1 is a header of table T and must hold the name of its column'],
    ['a spill', [{ set: 'formula', sheet: 0, row: 2, col: 2, formula: 'A2:A3', array: { ref: { top: 2, left: 2, bottom: 3, right: 2 }, dynamic: true } }], book(),
      'sheet S cell B2 cannot spill over B2:B3: spills are not allowed in table T'],
  ])('%s', (_what, edits, bytes, message) => {
    expect(() => write(edits, bytes)).toThrow(message);
  });

  test('to cover another table', () => {
    const other = table().replace(/"T"/g, '"Other"').replace('A1:B4', 'C3:D6');
    const bytes = buildBook({ sheets: [{ tables: [table(), other] }] });
    expect(() => write([grow], bytes)).toThrow('table T cannot grow to C1:C4: table Other is there');
  });
});
