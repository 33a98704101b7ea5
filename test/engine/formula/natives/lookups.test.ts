import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

const table = (rows: Plain[][], firstRow = 1): Record<string, Plain> =>
  Object.fromEntries(rows.flatMap((row, i) => row.map((v, j) => [`${'ABCDEFGH'[j]}${firstRow + i}`, v])));

describe('VLOOKUP, HLOOKUP', () => {
  // The examples of the documentation of HLOOKUP
  const parts = table([['Axles', 'Bearings', 'Bolts'], [4, 4, 9], [5, 7, 10], [6, 8, 11]]);
  it.each<[string, Plain]>([
    ['=HLOOKUP("Axles",A1:C4,2,TRUE)', 4],
    ['=HLOOKUP("Bearings",A1:C4,3,FALSE)', 7],
    ['=HLOOKUP("B",A1:C4,3,TRUE)', 5],
    ['=HLOOKUP("Bolts",A1:C4,4)', 11],
    ['=HLOOKUP(3,{1,2,3;"a","b","c";"d","e","f"},2,TRUE)', 'c'],
  ])('%s is %s', (formula, value) => expect(formulaOn(parts, formula).value).toBe(value));

  const list = table([[10, 'ten', 1], [20, 'twenty', 2], [30, 'thirty', 3], ['Key', 'word', 4], ['a*c', 'star', 5], [true, 'yes', 6]]);
  it.each<[string, Plain | Plain[][]]>([
    ['=VLOOKUP(20,A1:C6,2,FALSE)', 'twenty'],
    ['=VLOOKUP(20,A1:C6,2,0)', 'twenty'],
    ['=VLOOKUP(20,A1:C6,3,)', 2],
    ['=VLOOKUP(25,A1:C6,3,)', '#N/A'],
    ['=VLOOKUP(25,A1:C6,2)', 'twenty'],
    ['=VLOOKUP(25,A1:C6,2,FALSE)', '#N/A'],
    ['=VLOOKUP(5,A1:C6,2)', '#N/A'],
    ['=VLOOKUP(1000,A1:C6,2)', 'thirty'],
    ['=VLOOKUP("KEY",A1:C6,2,FALSE)', 'word'],
    ['=VLOOKUP("k?y",A1:C6,2,FALSE)', 'word'],
    ['=VLOOKUP("a~*c",A1:C6,2,FALSE)', 'star'],
    ['=VLOOKUP("20",A1:C6,2,FALSE)', '#N/A'],
    ['=VLOOKUP(TRUE,A1:C6,2,FALSE)', 'yes'],
    ['=VLOOKUP(20,A1:C6,4,FALSE)', '#REF!'],
    ['=VLOOKUP(20,A1:C6,0,FALSE)', '#VALUE!'],
    ['=VLOOKUP(1/0,A1:C6,0,FALSE)', '#DIV/0!'],
    ['=VLOOKUP(20,A1:C6,2,"x")', '#VALUE!'],
    ['=VLOOKUP(20,A:C,3,FALSE)', 2],
    ['=VLOOKUP(1000,A:C,3)', 3],
    ['=VLOOKUP({30;10},A1:C6,3,FALSE)', [[3], [1]]],
    ['=VLOOKUP(20,A1:C6,{2,3},FALSE)', [['twenty', 2]]],
    ['=VLOOKUP(Z9,A1:C6,2)', '#N/A'],
  ])('%s is %s', (formula, value) => expect(formulaOn(list, formula).value).toEqual(value));

  it('link what is found by 1, the key and the key cell by 0, in an approximate match also the next key cell', () => {
    const cells = { ...table([[1, 10], [2, 20], [3, 30]]), D1: 2.5, E1: 2 };
    expect(formulaOn(cells, '=VLOOKUP(E1,A1:B3,2,FALSE)').slopes).toEqual({ E1: 0, A2: 0, B2: 1 });
    expect(formulaOn(cells, '=VLOOKUP(D1,A1:B3,2)').slopes).toEqual({ D1: 0, A2: 0, A3: 0, B2: 1 });
    expect(formulaOn(cells, '=VLOOKUP(D1,A1:B3,2,FALSE)')).toMatchObject({ value: '#N/A', slopes: { D1: 0 } });
    expect(formulaOn(cells, '=VLOOKUP(E1,A1:B3,1,FALSE)').slopes).toEqual({ E1: 0, A2: 1 });
  });

  it('do not round numbers before they compare', () => {
    expect(formulaOn({ A1: 0.1 + 0.2, B1: 1 }, '=VLOOKUP(0.3,A1:B1,2,FALSE)').value).toBe('#N/A');
  });
});

describe('LOOKUP', () => {
  // The examples of the documentation of LOOKUP
  const colours = table([[4.14, 'red'], [4.19, 'orange'], [5.17, 'yellow'], [5.77, 'green'], [6.39, 'blue']], 2);
  it.each<[string, Plain]>([
    ['=LOOKUP(4.19,A2:A6,B2:B6)', 'orange'],
    ['=LOOKUP(5.75,A2:A6,B2:B6)', 'yellow'],
    ['=LOOKUP(7.66,A2:A6,B2:B6)', 'blue'],
    ['=LOOKUP(0,A2:A6,B2:B6)', '#N/A'],
    ['=LOOKUP("C",{"a","b","c","d";1,2,3,4})', 3],
    ['=LOOKUP("bump",{"a",1;"b",2;"c",3})', 2],
    ['=LOOKUP(2,1/(B2:B7<>""),A2:A7)', 6.39], // the last row that is not empty (common practice)
    ['=LOOKUP(9.99E+307,A:A)', 6.39],
  ])('%s is %s', (formula, value) => expect(formulaOn(colours, formula).value).toBe(value));

  it('links the key and its two neighbours', () => {
    expect(formulaOn({ ...colours, D1: 5, B3: 100 }, '=LOOKUP(D1,A2:A6,B2:B6)').slopes).toEqual({ D1: 0, A3: 0, A4: 0, B3: 1 });
  });
});

describe('MATCH, XMATCH', () => {
  // The examples of the documentation of MATCH
  const fruit = table([['Bananas', 25], ['Oranges', 38], ['Apples', 40], ['Pears', 41]], 2);
  it.each<[string, Plain | Plain[][]]>([
    ['=MATCH(39,B2:B5,1)', 2],
    ['=MATCH(41,B2:B5,0)', 4],
    ['=MATCH(40,B2:B5,-1)', '#N/A'],
    ['=MATCH(39,B2:B5)', 2],
    ['=MATCH(41,B2:B5,)', 4],
    ['=MATCH("*an*",A2:A5,0)', 1],
    ['=MATCH("?ears",A2:A5,0)', 4],
    ['=MATCH(5,{9,7,5,5,3},-1)', 3],
    ['=MATCH(6,{9,7,5,3},-1)', 2],
    ['=MATCH(10,{9,7,5,3},-1)', '#N/A'],
    ['=MATCH(2,{1,2,2,2,3},1)', 4],
    ['=MATCH("b",{"a","B","c"},0)', 2],
    ['=MATCH(1,A2:B5,0)', '#N/A'],
    ['=MATCH("x",A2:A5,1/0)', '#DIV/0!'],
    ['=MATCH({41;25},B2:B5,0)', [[4], [1]]],
    ['=MATCH(Z1,{3,0},0)', 2],
    ['=XMATCH(40,B2:B5)', 3],
    ['=XMATCH(39,B2:B5,-1)', 2],
    ['=XMATCH(39,B2:B5,1)', 3],
    ['=XMATCH(99,B2:B5,1)', '#N/A'],
    ['=XMATCH("?r*",A2:A5,2)', 2],
    ['=XMATCH("?r*",A2:A5)', '#N/A'],
    ['=XMATCH(1,{1,2,1},0,-1)', 3],
    ['=XMATCH(6,{9,1,7,5,7},1)', 3],
    ['=XMATCH(6,{9,1,7,5,7},1,-1)', 5],
    ['=XMATCH(6,{9,7,5,1},1,-2)', 2],
    ['=XMATCH(6,{9,7,5,1},-1,-2)', 3],
    ['=XMATCH(6,{1,5,7,9},-1,2)', 2],
    ['=XMATCH(6,{1,5,7,9},1,2)', 3],
    ['=XMATCH(6,{1,5,7,9},0,2)', '#N/A'],
    ['=XMATCH(7,{1,5,7,9},0,2)', 3],
    ['=XMATCH(7,{1,5},3)', '#VALUE!'],
    ['=XMATCH("a*",A2:A5,2,2)', '#VALUE!'],
    ['=XMATCH(,C2:C5)', 1],
    ['=XMATCH(,B2:B9)', 5],
  ])('%s is %s', (formula, value) => expect(formulaOn(fruit, formula).value).toEqual(value));

  it('give a place with slope 0 in the key and the key cells that decided', () => {
    expect(formulaOn({ A1: 1, A2: 3, A3: 5, B1: 4 }, '=MATCH(B1,A1:A3)').slopes).toEqual({ B1: 0, A2: 0, A3: 0 });
    expect(formulaOn({ A1: 1, A2: 3, A3: 5, B1: 4 }, '=XMATCH(B1,A1:A3,1)').slopes).toEqual({ B1: 0, A2: 0, A3: 0 });
    expect(formulaOn({ A1: 1, A2: 3, B1: 3 }, '=INDEX({7,8},MATCH(B1,A1:A2,0))').slopes).toEqual({ B1: 0, A2: 0 });
  });
});

describe('XLOOKUP', () => {
  const cells = table([['a', 1, 10, 'x'], ['b', 2, 20, 'y'], ['c', 4, 40, 'z']]);
  it.each<[string, Plain | Plain[][]]>([
    ['=XLOOKUP("B",A1:A3,C1:C3)', 20],
    ['=XLOOKUP("q",A1:A3,C1:C3)', '#N/A'],
    ['=XLOOKUP("q",A1:A3,C1:C3,"none")', 'none'],
    ['=XLOOKUP("q",A1:A3,C1:C3,)', '#N/A'],
    ['=XLOOKUP(3,B1:B3,C1:C3,,-1)', 20],
    ['=XLOOKUP(3,B1:B3,C1:C3,,1)', 40],
    ['=XLOOKUP("b",A1:A3,B1:D3)', [[2, 20, 'y']]],
    ['=SUM(XLOOKUP("b",A1:A3,B1:C3))', 22],
    ['=XLOOKUP("b",A1:A3,C1:C2)', '#VALUE!'],
    ['=XLOOKUP("b",A1:B3,C1:C3)', '#VALUE!'],
    ['=XLOOKUP({"a";"c"},A1:A3,C1:C3)', [[10], [40]]],
    ['=XLOOKUP(2,{1,2},{5,6;7,8})', [[6], [8]]],
    ['=XLOOKUP("a",A1,B1:C1)', [[1, 10]]],
    ['=SUM(C1:XLOOKUP("b",{"a";"b";"c"},C1:C3))', 30],
    ['=XLOOKUP(1/0,A1:A3,C1:C3,7)', '#DIV/0!'],
  ])('%s is %s', (formula, value) => expect(formulaOn(cells, formula).value).toEqual(value));

  it('links the fallback to the key', () => {
    expect(formulaOn({ ...cells, E1: 9, F1: 3 }, '=XLOOKUP(E1,B1:B3,C1:C3,F1)').slopes).toEqual({ E1: 0, F1: 1 });
    expect(formulaOn({ ...cells, E1: 2 }, '=XLOOKUP(E1,B1:B3,C1:C3)').slopes).toEqual({ E1: 0, B2: 0, C2: 1 });
  });
});
