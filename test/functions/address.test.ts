import { expect, test } from 'vitest';
import { cellName, parseAddress } from '../../functions/address';
import { columnLetters } from '../../functions/engine/graph/address';

test('parseAddress reads the forms that the host writes', () => {
  expect(parseAddress('Sheet1!A1:B2')).toEqual({ sheet: 'Sheet1', row: 1, col: 1, rows: 2, cols: 2 });
  expect(parseAddress("'My sheet'!$C$4")).toEqual({ sheet: 'My sheet', row: 4, col: 3, rows: 1, cols: 1 });
  expect(parseAddress("'It''s'!B3:C4")).toEqual({ sheet: "It's", row: 3, col: 2, rows: 2, cols: 2 });
  expect(parseAddress('S!A:B')).toEqual({ sheet: 'S', row: 1, col: 1, rows: 1048576, cols: 2 });
  expect(parseAddress('S!2:3')).toEqual({ sheet: 'S', row: 2, col: 1, rows: 2, cols: 16384 });
  expect(parseAddress('S!XFD1048576')).toEqual({ sheet: 'S', row: 1048576, col: 16384, rows: 1, cols: 1 });
  expect(parseAddress('S!B2:A1')).toEqual({ sheet: 'S', row: 1, col: 1, rows: 2, cols: 2 });
  expect(parseAddress('[Book2]S!A1')?.sheet).toBe('[Book2]S');
});

test('parseAddress gives undefined for anything else', () => {
  for (const text of ['', 'A1', 'S!', 'S!A1,B2', 'S!A1:B2:C3', 'S!XFE1', 'S!A1048577', 'S!A0', 'S!A', 'S!3', 'S!A1:B', "'S!A1", 'name'])
    expect(parseAddress(text), text).toBeUndefined();
});

test('columnLetters counts as the worksheet does', () => {
  expect([1, 26, 27, 52, 53, 702, 703, 16384].map(columnLetters)).toEqual(['A', 'Z', 'AA', 'AZ', 'BA', 'ZZ', 'AAA', 'XFD']);
  for (let col = 1; col <= 16384; col++) expect(parseAddress(`S!${columnLetters(col)}1`)?.col).toBe(col);
});

test('cellName counts from the upper left cell of an area', () => {
  expect(cellName({ sheet: 'S', row: 7, col: 3, rows: 2, cols: 2 }, 1, 1)).toBe('D8');
});
