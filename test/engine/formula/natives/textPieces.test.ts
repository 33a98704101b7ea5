import { describe, expect, it } from 'vitest';
import { formulaOn } from '../formulaOn';

// The texts of Excel's documentation of TEXTBEFORE and TEXTAFTER.
const hood = { A1: "Little Red Riding Hood's red hood", A2: "Little red Riding Hood's red hood", B1: 'x', B3: 1 };

describe('pieces of text', () => {
  it.each([
    // Excel's documentation of each function
    ['=TEXTBEFORE(A1,"Red")', 'Little '], ['=TEXTBEFORE(A2,"Red")', '#N/A'], ['=TEXTBEFORE(A2,"red",2)', "Little red Riding Hood's "],
    ['=TEXTBEFORE(A2,"red",-2)', 'Little '], ['=TEXTBEFORE(A2,"red",3)', '#N/A'], ['=TEXTBEFORE(A2,"Red",,1)', 'Little '],
    ['=TEXTBEFORE(A1,"x",,,1)', "Little Red Riding Hood's red hood"], ['=TEXTBEFORE(A1,"x",,,,"none")', 'none'], ['=TEXTBEFORE(A1,"e",0)', '#VALUE!'],
    ['=TEXTAFTER(A1,"Red")', " Riding Hood's red hood"], ['=TEXTAFTER(A1,"basket")', '#N/A'], ['=TEXTAFTER(A2,"red",2)', ' hood'],
    ['=TEXTAFTER(A2,"red",-2)', " Riding Hood's red hood"], ['=TEXTAFTER(A2,"red",3)', '#N/A'], ['=TEXTAFTER(A1,"x",,,1)', ''],
    ['=TEXTJOIN(", ",TRUE,B1:B3)', 'x, 1'], ['=TEXTJOIN(", ",FALSE,B1:B3)', 'x, , 1'], ['=TEXTJOIN({"-","+"},TRUE,1,2,3,4)', '1-2+3-4'],
    ['=TEXTJOIN("",TRUE,"a",TRUE,2)', 'aTRUE2'], ['=TEXTJOIN(",",TRUE,B:B)', 'x,1'],
    ['=REPLACE("abcdefghijk",6,5,"*")', 'abcde*k'], ['=REPLACE("2009",3,2,"10")', '2010'], ['=REPLACE("123456",1,3,"@")', '@456'],
    ['=REPLACE("abc",9,1,"d")', 'abcd'], ['=REPLACE("abc",0,1,"d")', '#VALUE!'], ['=REPLACE("abc",1,-1,"d")', '#VALUE!'],
    ['=PROPER("this is a TITLE")', 'This Is A Title'], ['=PROPER("2-way street")', '2-Way Street'], ['=PROPER("76BudGet")', '76Budget'],
  ])('%s is %s', (formula, value) => expect(formulaOn(hood, formula).value).toBe(value));

  it('taint a number that is read out of text joined from numbers', () =>
    expect(formulaOn({ A1: 1.5, A2: '6' }, '=VALUE(TEXTJOIN("",TRUE,A1:A2))')).toMatchObject({ value: 1.56, tainted: expect.arrayContaining(['A1']) as string[] }));

  it.each([
    ['=TEXTBEFORE("aaa","aa")', /overlaps itself/], ['=TEXTBEFORE("a,b;c",{",",";"})', /several delimiters/], ['=TEXTAFTER("","a")', /text is empty/],
  ])('%s is refused', (formula, words) => expect(() => formulaOn({}, formula)).toThrow(words));
});
