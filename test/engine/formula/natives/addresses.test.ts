import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

const cells = { A1: 1, B1: 'B2', C1: 2, A2: 4, B2: 5, C2: 6, A3: 7, B3: 8, C3: 9, D1: 'R2C[-7]', E1: 'nothing', F1: "'Sheet1'!A3" };

describe('ADDRESS', () => {
  it.each<[string, Plain]>([
    // as in the documentation
    ['=ADDRESS(2,3)', '$C$2'],
    ['=ADDRESS(2,3,2)', 'C$2'],
    ['=ADDRESS(2,3,2,FALSE)', 'R2C[3]'],
    ['=ADDRESS(2,3,1,FALSE,"[Book1]Sheet1")', "'[Book1]Sheet1'!R2C3"],
    ['=ADDRESS(2,3,1,FALSE,"EXCEL SHEET")', "'EXCEL SHEET'!R2C3"],
    ['=ADDRESS(2,3,3)', '$C2'],
    ['=ADDRESS(2,3,4)', 'C2'],
    ['=ADDRESS(2,3,3,FALSE)', 'R[2]C3'],
    ['=ADDRESS(2,3,4,FALSE)', 'R[2]C[3]'],
    ['=ADDRESS(1,28,4,,"Data")', 'Data!AB1'],
    ['=ADDRESS(1048576,16384)', '$XFD$1048576'],
    ['=ADDRESS(1,1,1,TRUE,"It\'s")', "'It''s'!$A$1"],
    ['=ADDRESS(1,1,1,TRUE,"2026")', "'2026'!$A$1"],
    ['=ADDRESS(1,1,1,TRUE,"R1C1")', "'R1C1'!$A$1"],
    ['=ADDRESS(1,1,1,TRUE,"AB12")', "'AB12'!$A$1"],
    ['=ADDRESS(1,1,1,TRUE,"Prüfung_1")', 'Prüfung_1!$A$1'],
    ['=ADDRESS(0,1)', '#VALUE!'],
    ['=ADDRESS(1,16385)', '#VALUE!'],
    ['=ADDRESS(1,1,5)', '#VALUE!'],
    ['=ADDRESS(1/0,1)', '#DIV/0!'],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toBe(value));

  it('depends on its numbers, but has no slope', () => expect(formulaOn(cells, '=ADDRESS(A1,C1)')).toMatchObject({ value: '$B$1', slopes: { A1: 0, C1: 0 } }));
});

describe('AREAS', () => {
  it.each<[string, Plain]>([['=AREAS(B2:D4)', 1], ['=AREAS((B2:D4,E5,F6:I9))', 3], ['=AREAS(B2:D4 B2)', 1], ['=AREAS(7)', '#VALUE!'], ['=AREAS(1/0)', '#DIV/0!']])(
    '%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toBe(value)); // the first three as in the documentation
});

describe('OFFSET', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=OFFSET(A1,1,2)', 6],
    ['=OFFSET(A1,1.9,2)', 6],
    ['=SUM(OFFSET(A1:B2,1,1))', 28],
    ['=SUM(OFFSET(A1,1,0,2,3))', 39],
    ['=SUM(OFFSET(A1,1,0,2,))', 11],
    ['=SUM(OFFSET(C3,0,0,-2,-2))', 28],
    ['=OFFSET(A1,,1)', 'B2'],
    ['=OFFSET(A1,1,1,2,1)', [[5], [8]]],
    ['=ROW(OFFSET(A1,5,0))', 6],
    ['=COLUMNS(OFFSET(A1,0,0,1,7))', 7],
    ['=SUM(A2:OFFSET(A2,1,1))', 24],
    ['=SUM(OFFSET(A:A,0,2))', 17],
    ['=OFFSET(A1,-1,0)', '#REF!'],
    ['=OFFSET(A1,0,-1)', '#REF!'],
    ['=OFFSET(A:A,1,0)', '#REF!'],
    ['=OFFSET(A1,0,0,0)', '#REF!'],
    ['=OFFSET(A1,0,16384)', '#REF!'],
    ['=OFFSET(A1,1/0,0)', '#DIV/0!'],
    ['=OFFSET(A1,"x",0)', '#VALUE!'],
    ['=OFFSET(7,1,0)', '#VALUE!'],
    ['=OFFSET((A1,B1),1,0)', '#VALUE!'],
    ['=SUMIF(OFFSET(A1,0,0,3),">1",C1)', 15],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it('has slope 1 in what is read, and 0 in what decided where', () => {
    expect(formulaOn(cells, '=OFFSET(A1,A1,C1)*2').slopes).toEqual({ C2: 2, A1: 0, C1: 0 });
    expect(formulaOn(cells, '=SUM(OFFSET(A1,1,0,C1))').slopes).toEqual({ A2: 1, A3: 1, C1: 0 });
    expect(formulaOn(cells, '=OFFSET(A1,-C1,0)')).toMatchObject({ value: '#REF!', slopes: { C1: 0 } });
    expect(formulaOn(cells, '=AREAS(OFFSET(A1,C1,0))')).toMatchObject({ value: 1, slopes: { C1: 0 } });
  });

  it('with offsets in an array it is refused, but takes the one of its row where the sheet intersects', () => {
    expect(() => formulaOn(cells, '=SUM(OFFSET(A1,{0,1},0))')).toThrow(/gives OFFSET an array where it takes one value/);
    expect(formulaOn({ ...cells, G20: 2 }, '=OFFSET(A1,G19:G21,0)', { implicit: true }).value).toBe(7);
  });
});

describe('INDIRECT', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=INDIRECT("B2")', 5],
    ['=INDIRECT("$b$2")', 5],
    ['=INDIRECT(B1)', 5],
    ['=SUM(INDIRECT("A1:A"&3))', 12],
    ['=SUM(INDIRECT("C:C"))', 17],
    ['=SUM(INDIRECT("2:3"))', 39],
    ['=SUM(INDIRECT("B3:A2"))', 24],
    ['=INDIRECT("Sheet1!C3")', 9],
    ['=INDIRECT(F1)', 7],
    ['=INDIRECT("R2C3",FALSE)', 6],
    ['=INDIRECT("r2c3",0)', 6],
    ['=INDIRECT(D1,FALSE)', 6], // the formula stands in J20
    ['=INDIRECT("R[-18]C1",FALSE)', 4],
    ['=SUM(INDIRECT("R1C1:R2C1",)*1)', 5],
    ['=SUM(INDIRECT("C3",FALSE))', 17],
    ['=SUM(INDIRECT("Sheet1!R2",FALSE))', 15],
    ['=ROWS(INDIRECT("1:7"))', 7],
    ['=SUM(A1:INDIRECT("A3"))', 12],
    ['=INDIRECT("")', '#REF!'],
    ['=INDIRECT("12")', '#REF!'],
    ['=INDIRECT("Nowhere!A1")', '#REF!'],
    ['=INDIRECT("Sheet1:Nowhere!A1")', '#REF!'],
    ['=INDIRECT("R[-20]C1",FALSE)', '#REF!'],
    ['=INDIRECT(7)', '#REF!'],
    ['=INDIRECT("#REF!")', '#REF!'],
    ['=INDIRECT(1/0)', '#DIV/0!'],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it('has slope 1 in what is read, and 0 in the text that decided where, without taking it for a number in text', () => {
    expect(formulaOn(cells, '=INDIRECT(B1)*3')).toEqual({ value: 15, slopes: { B1: 0, B2: 3 }, tainted: [] });
    expect(formulaOn(cells, '=SUM(INDIRECT("A1:A"&C1))')).toEqual({ value: 5, slopes: { A1: 1, A2: 1, C1: 0 }, tainted: [] });
    expect(formulaOn(cells, '=INDIRECT(B1&"-")')).toMatchObject({ value: '#REF!', slopes: { B1: 0 } });
  });

  it.each(['Total', 'Sheet1!Total', 'Table1[Mass]', '[Other.xlsx]Sheet1!A1', 'A1#', 'A1,B1', 'A1:.A9', 'Sheet1!A1:Sheet1!A3', 'XFE1'])('%s, which may be more than a cell, is refused', (text) =>
    expect(() => formulaOn(cells, `=INDIRECT("${text}")`)).toThrow(/^hands INDIRECT the text/));

  it('of several texts is refused', () => expect(() => formulaOn(cells, '=INDIRECT({"A1","A2"})')).toThrow(/gives INDIRECT an array/));
});

describe('CELL and ISFORMULA', () => {
  const cells = { A1: 5, B2: 'x' };
  it.each([
    ['CELL("row",B2:C9)', 2], ['CELL("col",B2)', 2], ['CELL("ADDRESS",B2)', '$B$2'], ['CELL("contents",A1:B2)', 5],
    ['CELL("type",A1)', 'v'], ['CELL("type",B2)', 'l'], ['CELL("type",C3)', 'b'], ['ISFORMULA(A1)', false],
  ])('%s', (formula, expected) => expect(formulaOn(cells, formula).value).toBe(expected));

  it('CELL("contents") has the slope of the cell', () => expect(formulaOn(cells, 'CELL("contents",A1)*2').slopes).toEqual({ A1: 2 }));

  it.each([
    ['CELL("row")', 'uses CELL in a way that cannot be followed: without a reference it means the cell that was changed last'],
    ['CELL("format",A1)', 'uses CELL in a way that cannot be followed: "format" tells of more than the cell\'s contents'],
    ['ISFORMULA(A1:A2)', 'uses ISFORMULA in a way that cannot be followed: its range has several cells'],
  ])('%s is refused', (formula, words) => expect(() => formulaOn(cells, formula)).toThrow(words));
});
