import { describe, expect, it } from 'vitest';
import { type Plain, formulaOn } from '../formulaOn';

const column = (letter: string, first: number, values: Plain[]): Record<string, Plain> =>
  Object.fromEntries(values.map((v, i) => [`${letter}${first + i}`, v]));

describe('SUMIF, AVERAGEIF, COUNTIF', () => {
  // The examples of the documentation of SUMIF and AVERAGEIF: property values and commissions
  const homes = { ...column('A', 2, [100000, 200000, 300000, 400000]), ...column('B', 2, [7000, 14000, 21000, 28000]), C2: 250000 };
  it.each<[string, Plain]>([
    ['=SUMIF(A2:A5,">160000",B2:B5)', 63000],
    ['=SUMIF(A2:A5,">160000")', 900000],
    ['=SUMIF(A2:A5,300000,B2:B5)', 21000],
    ['=SUMIF(A2:A5,">"&C2,B2:B5)', 49000],
    ['=AVERAGEIF(B2:B5,"<23000")', 14000],
    ['=AVERAGEIF(A2:A5,"<250000")', 150000],
    ['=AVERAGEIF(A2:A5,"<95000")', '#DIV/0!'],
    ['=AVERAGEIF(A2:A5,">250000",B2:B5)', 24500],
  ])('%s is %s', (formula, value) => expect(formulaOn(homes, formula).value).toBe(value));

  const market = {
    ...column('A', 2, ['Vegetables', 'Vegetables', 'Fruits', null, 'Vegetables', 'Fruits']),
    ...column('B', 2, ['Tomatoes', 'Celery', 'Oranges', 'Butter', 'Carrots', 'Apples']),
    ...column('C', 2, [2300, 5500, 800, 400, 4200, 1200]),
  };
  it.each<[string, Plain]>([
    ['=SUMIF(A2:A7,"Fruits",C2:C7)', 2000],
    ['=SUMIF(A2:A7,"vegetables",C2:C7)', 12000],
    ['=SUMIF(B2:B7,"*es",C2:C7)', 4300],
    ['=SUMIF(A2:A7,"",C2:C7)', 400],
  ])('%s is %s', (formula, value) => expect(formulaOn(market, formula).value).toBe(value));

  const fruit = { ...column('A', 2, ['apples', 'oranges', 'peaches', 'apples']), ...column('B', 2, [32, 54, 75, 86]) };
  it.each<[string, Plain]>([
    ['=COUNTIF(A2:A5,"apples")', 2],
    ['=COUNTIF(A2:A5,A4)', 1],
    ['=COUNTIF(A2:A5,A5)+COUNTIF(A2:A5,A3)', 3],
    ['=COUNTIF(B2:B5,">55")', 2],
    ['=COUNTIF(B2:B5,"<>"&B4)', 3],
    ['=COUNTIF(B2:B5,">=32")-COUNTIF(B2:B5,">85")', 3],
    ['=COUNTIF(A2:A5,"*")', 4],
    ['=COUNTIF(A2:A5,"?????es")', 2],
  ])('%s is %s', (formula, value) => expect(formulaOn(fruit, formula).value).toBe(value));

  it('give the numbers summed slope 1 and what decided slope 0; texts are not linked', () => {
    expect(formulaOn({ A1: 1, A2: 5, A3: 'x', B1: 10, B2: 20, B3: 30, C1: 3 }, '=SUMIF(A1:A3,">"&C1,B1:B3)').slopes)
      .toEqual({ A1: 0, A2: 0, B2: 1, C1: 0 });
    expect(formulaOn({ A1: 1, A2: 5 }, '=SUMIF(A1:A2,">3")').slopes).toEqual({ A1: 0, A2: 1 });
    expect(formulaOn({ A1: 1, A2: 5, A3: 9 }, '=AVERAGEIF(A1:A3,">3")').slopes).toEqual({ A1: 0, A2: 0.5, A3: 0.5 });
    expect(formulaOn({ A1: 1, A2: 5 }, '=COUNTIF(A1:A2,">3")').slopes).toEqual({ A1: 0, A2: 0 });
  });

  it('take the first cell of the range summed and the size of the range compared', () => {
    expect(formulaOn({ A1: 1, A2: 2, A3: 3, B1: 10, B2: 20, B3: 40 }, '=SUMIF(A1:A3,">1",B1)').value).toBe(60);
    expect(formulaOn({ A1: 1, A2: 2, A3: 3, B2: 10, B3: 20, B4: 40 }, '=SUMIF(A1:A3,">1",B2:Z99)').value).toBe(60);
  });

  it('read whole columns; blank cells beyond what is used count', () => {
    expect(formulaOn({ A1: 1, A2: 5, B1: 10, B2: 20 }, '=SUMIF(A:A,">3",B:B)')).toMatchObject({ value: 20, slopes: { A1: 0, A2: 0, B2: 1 } });
    expect(formulaOn({ A1: 1, A2: '', A3: 'x' }, '=COUNTIF(A:A,"")').value).toBe(1048574);
    expect(formulaOn({ A1: 1, A2: '', A3: 'x' }, '=COUNTIF(A:A,"=")').value).toBe(1048573);
    expect(formulaOn({ A1: 1, A2: '', A3: 'x' }, '=COUNTIF(A:A,"<>")').value).toBe(3);
    expect(formulaOn({ A1: 1, A2: '', A3: 'x' }, '=COUNTIF(A:A,"<>x")').value).toBe(1048575);
  });

  it('take a criterion that is a blank cell as 0, and count an error by its code', () => {
    expect(formulaOn({ A1: 0, A2: null, A3: '' }, '=COUNTIF(A1:A3,Z1)').value).toBe(1);
    expect(formulaOn({ A1: '#N/A', A2: '#DIV/0!' }, '=COUNTIF(A1:A2,"#N/A")+10*COUNTIF(A1:A2,1/0)').value).toBe(11);
  });

  it('compare text that reads as a number with numbers for = and <>, not for an order (common practice)', () => {
    expect(formulaOn({ A1: 5, A2: '5', A3: 'x' }, '=COUNTIF(A1:A3,5)*100+COUNTIF(A1:A3,"<>5")*10+COUNTIF(A1:A3,">4")').value).toBe(211);
  });

  it('compare numbers at 15 digits, and booleans with booleans', () => {
    expect(formulaOn({ A1: 0.1 + 0.2 }, '=COUNTIF(A1,0.3)').value).toBe(1);
    expect(formulaOn({ A1: true, A2: 1, A3: 'TRUE' }, '=COUNTIF(A1:A3,TRUE)*10+COUNTIF(A1:A3,"=TRUE")').value).toBe(11);
  });

  it('return an error that is selected, pass over one that is not, and refuse arrays', () => {
    expect(formulaOn({ A1: 1, A2: 5, B1: '#N/A', B2: 20 }, '=SUMIF(A1:A2,">3",B1:B2)').value).toBe(20);
    expect(formulaOn({ A1: 1, A2: 5, B1: '#N/A', B2: 20 }, '=SUMIF(A1:A2,"<3",B1:B2)').value).toBe('#N/A');
    expect(formulaOn({ A1: 1 }, '=SUMIF({1,2},1)').value).toBe('#VALUE!');
  });

  it('give one result for each criterion of an array', () => {
    expect(formulaOn({ A1: 1, A2: 2, A3: 2 }, '=COUNTIF(A1:A3,{1,2,3})').value).toEqual([[1, 2, 0]]);
  });
});

describe('SUMIFS, AVERAGEIFS, COUNTIFS, MAXIFS, MINIFS', () => {
  // The examples of the documentation of SUMIFS
  const sold = {
    ...column('A', 2, [5, 4, 15, 3, 22, 12, 10, 33]),
    ...column('B', 2, ['Apples', 'Apples', 'Artichokes', 'Artichokes', 'Bananas', 'Bananas', 'Carrots', 'Carrots']),
    ...column('C', 2, ['Tom', 'Sarah', 'Tom', 'Sarah', 'Tom', 'Sarah', 'Tom', 'Sarah']),
  };
  it.each<[string, Plain]>([
    ['=SUMIFS(A2:A9,B2:B9,"=A*",C2:C9,"Tom")', 20],
    ['=SUMIFS(A2:A9,B2:B9,"<>Bananas",C2:C9,"Tom")', 30],
    ['=COUNTIFS(B2:B9,"=A*",C2:C9,"Tom")', 2],
    ['=AVERAGEIFS(A2:A9,C2:C9,"Tom")', 13],
    ['=AVERAGEIFS(A2:A9,C2:C9,"Ann")', '#DIV/0!'],
    ['=SUMIFS(A2:A9,B2:B8,"A*")', '#VALUE!'],
    ['=MAXIFS(A2:A9,C2:C9,"Ann")', 0],
  ])('%s is %s', (formula, value) => expect(formulaOn(sold, formula).value).toBe(value));

  // The examples of the documentation of MAXIFS and MINIFS
  const grades = { ...column('A', 2, [89, 93, 96, 85, 91, 88]), ...column('B', 2, [1, 2, 2, 3, 1, 1]) };
  const weights = { ...column('A', 2, [10, 1, 100, 1, 1, 1]), ...column('B', 2, ['b', 'a', 'a', 'b', 'a', 'a']) };
  it('MAXIFS and MINIFS', () => {
    expect(formulaOn(grades, '=MAXIFS(A2:A7,B2:B7,1)').value).toBe(91);
    expect(formulaOn(grades, '=MINIFS(A2:A7,B2:B7,1)').value).toBe(88);
    expect(formulaOn(weights, '=MAXIFS(A2:A5,B3:B6,"a")').value).toBe(10);
  });

  it('MAXIFS has slope 1 in the number selected, 0 in what decided', () => {
    expect(formulaOn({ A1: 4, A2: 9, A3: 7, B1: 1, B2: 2, B3: 1 }, '=MAXIFS(A1:A3,B1:B3,1)').slopes)
      .toEqual({ A1: 0, A3: 1, B1: 0, B2: 0, B3: 0 });
  });
});
