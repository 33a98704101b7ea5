import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from './formulaOn';

/** What the sheet does where mathematics, or another program, would do otherwise. Common practice unless a source is named. */
const conventions: Readonly<Record<string, readonly (readonly [cells: Record<string, Plain>, formula: string, value: Plain])[]>> = {
  'a sign binds closer than a power': [
    [{}, '=-2^2', 4], [{}, '=0-2^2', -4], [{ A1: 3 }, '=-A1^2', 9], [{}, '=2^-1', 0.5], [{}, '=-(2^2)', -4], [{}, '=1-2^2', -3],
  ],
  'powers are taken from the left': [[{}, '=2^3^2', 64], [{}, '=2^(3^2)', 512]],
  'zero and negative bases': [
    [{}, '=0^0', '#NUM!'], [{}, '=POWER(0,0)', '#NUM!'], [{}, '=0^-1', '#DIV/0!'], [{}, '=POWER(0,-1)', '#DIV/0!'], [{}, '=(-8)^0.5', '#NUM!'],
  ],
  'percent is a hundredth': [[{}, '=50%', 0.5], [{}, '=2^50%', 2 ** 0.5], [{}, '=200%^2', 4], [{}, '=10%%', 0.001], [{}, '="5%"*2', 0.1]],
  'the year 1900 has a 29 February': [
    [{}, '=DATE(1900,2,28)', 59], [{}, '=DATE(1900,2,29)', 60], [{}, '=DATE(1900,3,1)', 61], [{}, '=DAY(60)', 29], [{}, '=MONTH(60)', 2],
    [{}, '=DATE(1900,1,1)', 1], [{}, '=DATE(2024,2,29)', 45351], [{}, '=DAY(0)', 0], [{}, '=WEEKDAY(1)', 1],
  ],
  'text that reads as a number counts in operators and as an argument, not in ranges': [
    [{ A1: '5' }, '=A1+1', 6], [{ A1: '5' }, '=SUM(A1,1)', 1], [{}, '=SUM("5",1)', 6], [{ A1: '5', A2: 1 }, '=SUM(A1:A2)', 1],
    [{ A1: 'x' }, '=A1+1', '#VALUE!'], [{ A1: true }, '=A1+1', 2], [{ A1: true }, '=SUM(A1,1)', 1], [{}, '=SUM(TRUE,1)', 2],
    [{ A1: '5' }, '=COUNT(A1)', 0], [{}, '=COUNT("5")', 1], [{ A1: '' }, '=A1*1', '#VALUE!'], [{}, '=Z9*1', 0], [{ A1: '5' }, '=-A1', -5],
    [{ A1: '5', A2: 3 }, '=SUMPRODUCT(A1:A2)', 3], [{ A1: '5', A2: 3 }, '=SUMPRODUCT(--A1:A2)', 8],
  ],
  'wildcards ? and * and ~': [
    [{ A1: 'apple', A2: 'APRICOT', A3: 'a*' }, '=COUNTIF(A1:A3,"a*")', 3], [{ A1: 'apple', A2: 'a*' }, '=COUNTIF(A1:A2,"a~*")', 1],
    [{ A1: 'fig', A2: 'pig' }, '=COUNTIF(A1:A2,"?ig")', 2], [{ A1: 12, A2: '12' }, '=COUNTIF(A1:A2,"1*")', 1], [{ A1: 'x', A2: 'fig' }, '=MATCH("f?g",A1:A2,0)', 2],
    [{ A1: 'fig' }, '="f?g"=A1', false], [{ A1: 'a', A2: '' }, '=COUNTIF(A1:A2,"*")', 2], [{ A1: 'xfig' }, '=SEARCH("f?g",A1)', 2],
    [{ A1: 'xfig' }, '=FIND("f?g",A1)', '#VALUE!'],
  ],
  'an approximate match halves the range, sorted or not': [
    [{ A1: 1, A2: 3, A3: 5 }, '=MATCH(4,A1:A3)', 2], [{ A1: 1, A2: 3, A3: 5 }, '=MATCH(0,A1:A3)', '#N/A'], [{ A1: 5, A2: 1, A3: 3 }, '=MATCH(2,A1:A3)', 2],
    [{ A1: 3, A2: 3, A3: 3 }, '=MATCH(3,A1:A3)', 3], [{ A1: 1, A2: 'b', A3: 5 }, '=MATCH(6,A1:A3)', 3], [{ A1: 9, A2: 5, A3: 1 }, '=MATCH(4,A1:A3,-1)', 2],
  ],
  'comparison is blind to case and has an order across types': [
    [{}, '="a"="A"', true], [{}, '=1<"a"', true], [{}, '="z"<FALSE', true], [{}, '=1E300<"0"', true], [{}, '="5"=5', false], [{}, '=Z9=0', true],
    [{}, '=Z9=""', true], [{}, '=Z9=FALSE', true], [{}, '=TRUE>1E9', true], [{}, '=EXACT("a","A")', false],
  ],
  'whole-number arguments are cut off': [
    [{}, '=LEFT("abc",2.9)', 'ab'], [{}, '=ROUND(2.345,2.9)', 2.35], [{ A1: 1, A2: 2 }, '=INDEX(A1:A2,2.9)', 2], [{}, '=CHOOSE(2.9,1,2,3)', 2],
    [{}, '=REPT("a",2.9)', 'aa'], [{}, '=MID("abcdef",2.9,1.9)', 'b'], [{}, '=DATE(2024.9,1.9,1.9)', 45292],
  ],
  'numbers are compared and joined to text in 15 digits': [
    [{}, '=0.1+0.2=0.3', true], [{}, '=1/3&""', '0.333333333333333'], [{}, '=1E21&""', '1E+21'], [{}, '=0.1+0.2&""', '0.3'], [{}, '=1234567890123456&""', '1234567890123460'],
    [{}, '=1.1-1=0.1', true],
  ],
  'a sum or difference that all but cancels at the end of a formula is 0': [
    [{}, '=0.5-0.4-0.1', 0], [{}, '=1.1-1-0.1', 0], [{}, '=1*(0.5-0.4-0.1)', -2.7755575615628914e-17], [{ A1: 0.3, B1: 0.1, C1: 0.2 }, '=A1-(B1+C1)', 0],
    [{}, '=(43.1-43.2)+1', 0.8999999999999986],
  ],
  'ties round away from zero, in decimal': [
    [{}, '=ROUND(2.5,0)', 3], [{}, '=ROUND(-2.5,0)', -3], [{}, '=ROUND(1.005,2)', 1.01], [{}, '=ROUND(2.675,2)', 2.68], [{}, '=INT(-0.5)', -1], [{}, '=TRUNC(-0.5)', 0],
    [{}, '=MOD(-3,2)', 1], [{}, '=MOD(3,-2)', -1],
  ],
  'a condition takes any number but 0 for TRUE': [
    [{}, '=IF(0.1,1,2)', 1], [{}, '=IF("TRUE",1,2)', 1], [{}, '=IF("x",1,2)', '#VALUE!'], [{}, '=IF(Z9,1,2)', 2], [{ A1: 'x' }, '=AND(A1,TRUE)', true], [{}, '=IF(FALSE,1)', false],
  ],
  'dates and times inside text are read in operators': [
    [{ A1: 45366, A2: 45367 }, '=COUNTIF(A1:A2,">2024-03-15")', 1], [{ A1: 45366, A2: 'x' }, '=COUNTIF(A1:A2,"3/15/2024")', 1], [{}, '="sample 7"*1', '#VALUE!'],
    [{}, '="2024-03-15"*1', 45366], [{}, '="16:48"*1', 0.7], [{}, '=VALUE("2024-03-15")', 45366], [{}, '="3/15/2024"+0', 45366],
  ],
};

describe.each(Object.entries(conventions))('%s', (_title, rows) => {
  it.each(rows.map(([cells, formula, value]) => [formula, value, cells] as const))('%s is %s', (formula, value, cells) => {
    expect(formulaOn(cells, formula).value).toBe(value);
  });
});
