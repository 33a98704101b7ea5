import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

describe('IF', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=IF(1,"a","b")', 'a'],
    ['=IF("false","a","b")', 'b'],
    ['=IF("x",1,2)', '#VALUE!'],
    ['=IF(FALSE,1)', false],
    ['=IF(TRUE,,5)', 0],
    ['=IF(FALSE,5,)', 0],
    ['=IF(1/0,1,2)', '#DIV/0!'],
    ['=IF(TRUE,1,1/0)', 1],
    ['=IF({TRUE,FALSE;FALSE,TRUE},{1,2;3,4},0)', [[1, 0], [0, 4]]],
    ['=IF({1;0},{10,20},-1)', [[10, 20], [-1, -1]]],
    ['=SUM(IF(A1:A3>1,B1:B3))', 50],
    ['=IF(A1:A3="",0,A1:A3)', [[1], [2], [3]]],
    ['=SUM(IF(TRUE,B1:B3,0))', 60],
    ['=SUMIF(IF(TRUE,A1:A3),">1",B1)', 50],
    ['=ROWS(IF(TRUE,B1:B3,0))', 3],
  ])('%s is %s', (formula, value) => {
    expect(formulaOn({ A1: 1, A2: 2, A3: 3, B1: 10, B2: 20, B3: 30 }, formula).value).toEqual(value);
  });

  it('has slope 1 in what is chosen and 0 in the condition', () => {
    expect(formulaOn({ A1: 1, B1: 3, C1: 5 }, '=IF(A1>0,2*B1,C1)').slopes).toEqual({ A1: 0, B1: 2 });
    expect(formulaOn({ A1: 1, B1: 3, C1: 5 }, '=IF(A1<0,B1,C1)').slopes).toEqual({ A1: 0, C1: 1 });
    expect(formulaOn({ A1: 1, A2: -1, B1: 3, B2: 5 }, '=SUM(IF(A1:A2>0,2*B1:B2,B1:B2))').slopes).toEqual({ A1: 0, A2: 0, B1: 2, B2: 1 });
    expect(formulaOn({ A1: 1 }, '=IF(A1>0,7,8)').slopes).toEqual({ A1: 0 });
    expect(formulaOn({ A1: '#N/A' }, '=IF(A1>0,7,8)')).toMatchObject({ value: '#N/A', slopes: { A1: 1 } });
  });

  it('evaluates no branch that is not taken', () => {
    expect(formulaOn({ A1: 1 }, '=IF(A1>0,A1,NOSUCH(1))').value).toBe(1);
    expect(() => formulaOn({ A1: -1 }, '=IF(A1>0,A1,NOSUCH(1))')).toThrow(/NOSUCH/);
  });

  it('looks at its own row where the sheet intersects', () => {
    expect(formulaOn({ A19: 1, A20: 0, B20: 7 }, '=IF(A19:A21,1,B19:B21+1)', { implicit: true }).value).toBe(8);
  });
});

describe('IFS, SWITCH, CHOOSE', () => {
  it.each<[string, Plain | Plain[][]]>([
    // grades as in the documentation of IFS
    ['=IFS(93>89,"A",93>79,"B",93>69,"C",93>59,"D",TRUE,"F")', 'A'],
    ['=IFS(58>89,"A",58>79,"B",58>69,"C",58>59,"D",TRUE,"F")', 'F'],
    ['=IFS(FALSE,1)', '#N/A'],
    ['=IFS(1/0,1,TRUE,2)', '#DIV/0!'],
    ['=IFS(TRUE,1,1/0,2)', 1],
    ['=IFS({1,0},"a",TRUE,"b")', [['a', 'b']]],
    ['=IFS(FALSE,0,{1,0},"a",TRUE,"b")', [['a', 'b']]],
    // weekdays as in the documentation of SWITCH
    ['=SWITCH(2,1,"Sunday",2,"Monday",3,"Tuesday","No match")', 'Monday'],
    ['=SWITCH(99,1,"Sunday",2,"Monday",3,"Tuesday")', '#N/A'],
    ['=SWITCH(99,1,"Sunday",2,"Monday",3,"Tuesday","No match")', 'No match'],
    ['=SWITCH("b","A",1,"B",2)', 2],
    ['=SWITCH({1,3},1,"x",3,"y")', [['x', 'y']]],
    ['=SWITCH(2,{1,2},"x","y")', [['y', 'x']]],
    ['=SWITCH(1/0,1,2)', '#DIV/0!'],
    ['=CHOOSE(2,"a","b")', 'b'],
    ['=CHOOSE(2.9,"a","b")', 'b'],
    ['=CHOOSE(3,"a","b")', '#VALUE!'],
    ['=CHOOSE(0,"a","b")', '#VALUE!'],
    ['=CHOOSE({1,2},{1;2},{3;4})', [[1, 3], [2, 4]]],
    // a sum as in the documentation of CHOOSE
    ['=SUM(A2:CHOOSE(2,A3,A4,A5))', 80],
  ])('%s is %s', (formula, value) => expect(formulaOn({ A2: 23, A3: 45, A4: 12, A5: 10 }, formula).value).toEqual(value));

  it('link all that was asked on the way', () => {
    expect(formulaOn({ A1: 1, B1: 2, C1: 9 }, '=IFS(A1>5,0,B1>1,C1)').slopes).toEqual({ A1: 0, B1: 0, C1: 1 });
    expect(formulaOn({ A1: 1, B1: 2, C1: 1, D1: 9 }, '=SWITCH(A1,B1,0,C1,D1)').slopes).toEqual({ A1: 0, B1: 0, C1: 0, D1: 1 });
    expect(formulaOn({ A1: 2, B1: 9 }, '=CHOOSE(A1,0,B1)').slopes).toEqual({ A1: 0, B1: 1 });
    expect(formulaOn({ A1: 7 }, '=CHOOSE(A1,0)')).toMatchObject({ value: '#VALUE!', slopes: { A1: 0 } });
  });
});

describe('IFERROR, IFNA', () => {
  it.each<[string, Plain | Plain[][]]>([
    ['=IFERROR(1/0,"e")', 'e'],
    ['=IFERROR(5,1/0)', 5],
    ['=IFERROR(,3)', 0],
    ['=IFERROR(1/0,)', 0],
    ['=IFNA(NA(),"e")', 'e'],
    ['=IFNA(1/0,"e")', '#DIV/0!'],
    ['=IFERROR(1/{1,0,2},0)', [[1, 0, 0.5]]],
    ['=IFERROR({1,2},1/0)', [[1, 2]]],
  ])('%s is %s', (formula, value) => expect(formulaOn({}, formula).value).toEqual(value));

  it('link the fallback to where the error came from', () => {
    expect(formulaOn({ A1: 0, B1: 4 }, '=IFERROR(1/A1,B1)').slopes).toEqual({ A1: 0, B1: 1 });
    expect(formulaOn({ A1: 2, B1: 4 }, '=IFERROR(1/A1,B1)').slopes).toEqual({ A1: -0.25 });
    expect(formulaOn({ A1: '#N/A', B1: 4 }, '=IFNA(A1,B1)').slopes).toEqual({ A1: 0, B1: 1 });
    expect(formulaOn({ A1: 0, A2: 2, B1: 4 }, '=SUM(IFERROR(1/A1:A2,B1))').slopes).toEqual({ A1: 0, A2: -0.25, B1: 1 });
  });
});
