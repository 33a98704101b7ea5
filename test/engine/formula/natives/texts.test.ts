import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

describe('text functions', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=LEFT("Sale Price",4)', 'Sale'],
    ['=LEFT("Sweden")', 'S'],
    ['=LEFT("Sweden",)', ''],
    ['=LEFT("abc",-1)', '#VALUE!'],
    ['=LEFT(123.5,4)', '123.'],
    ['=RIGHT("Sale Price",5)', 'Price'],
    ['=RIGHT("Stock Number")', 'r'],
    ['=RIGHT("abc",0)', ''],
    ['=RIGHT("abc",9)', 'abc'],
    ['=MID("Fluid Flow",1,5)', 'Fluid'],
    ['=MID("Fluid Flow",7,20)', 'Flow'],
    ['=MID("Fluid Flow",20,5)', ''],
    ['=MID("abc",0,1)', '#VALUE!'],
    ['=LEN("Phoenix, AZ")', 11],
    ['=LEN(Z1)', 0],
    ['=LEN(1/3)', 17], // 0.333333333333333: 15 digits
    ['=TRIM("  First  Quarter Earnings ")', 'First Quarter Earnings'],
    ['=TRIM("a\u00a0 b")', 'a\u00a0 b'],
    ['=UPPER("total")', 'TOTAL'],
    ['=LOWER("E. E. Cummings")', 'e. e. cummings'],
    ['=CONCATENATE("a",1,TRUE)', 'a1TRUE'],
    ['=CONCAT(A1:B2,"!")', 'x1yz!'],
    ['=CONCAT(A:B)', 'x1yz'],
    ['=CONCAT(A1:A2&"-")', 'x-y-'],
    ['=EXACT("word","Word")', false],
    ['=EXACT("word","word")', true],
    ['=SUBSTITUTE("Sales Data","Sales","Cost")', 'Cost Data'],
    ['=SUBSTITUTE("Quarter 1, 2008","1","2",1)', 'Quarter 2, 2008'],
    ['=SUBSTITUTE("Quarter 1, 2011","1","2",3)', 'Quarter 1, 2012'],
    ['=SUBSTITUTE("aaa","a","b",4)', 'aaa'],
    ['=SUBSTITUTE("aaa","","b")', 'aaa'],
    ['=SUBSTITUTE("aaa","A","b")', 'aaa'],
    ['=SUBSTITUTE("aaa","a","b",0)', '#VALUE!'],
    ['=FIND("M","Miriam McGovern")', 1],
    ['=FIND("m","Miriam McGovern")', 6],
    ['=FIND("M","Miriam McGovern",3)', 8],
    ['=FIND("z","abc")', '#VALUE!'],
    ['=FIND("","abc")', 1],
    ['=FIND("a","abc",0)', '#VALUE!'],
    ['=FIND("a","abc",4)', '#VALUE!'],
    ['=SEARCH("e","Statements",6)', 7],
    ['=SEARCH("margin","Profit Margin")', 8],
    ['=SEARCH("p*n","Profit Margin")', 1],
    ['=SEARCH("~?","who?")', 4],
    ['=REPT("*-",3)', '*-*-*-'],
    ['=REPT("x",2.9)', 'xx'],
    ['=REPT("x",-1)', '#VALUE!'],
    ['=REPT("xx",20000)', '#VALUE!'],
    ['=REPT("",1E9)', ''],
    ['=LEN({"a","bcd"})', [[1, 3]]],
    ['=UPPER(1/0)', '#DIV/0!'],
  ])('%s is %s', (formula, value) => expect(formulaOn({ A1: 'x', B1: 1, A2: 'y', B2: 'z' }, formula).value).toEqual(value));

  it('taint what is made from a number, not what is made from text', () => {
    expect(formulaOn({ A1: 12.5 }, '=VALUE(LEFT(A1,2))')).toEqual({ value: 12, slopes: { A1: 0 }, tainted: ['A1'] });
    expect(formulaOn({ A1: '12 mg' }, '=VALUE(LEFT(A1,2))')).toEqual({ value: 12, slopes: { A1: 0 }, tainted: [] });
    expect(formulaOn({ A1: '12', B1: 3 }, '=CONCAT(A1:B1)+0').tainted).toEqual(['A1', 'B1']);
    expect(formulaOn({ A1: 12.5 }, '=LEN(A1)')).toEqual({ value: 4, slopes: { A1: 0 }, tainted: [] });
  });

  it('joins two hundred thousand empty texts', () => {
    expect(formulaOn({ A1: 1 }, '=CONCAT(IF(A1+ROW(1:200000)>0,""))').value).toBe('');
  });
});
