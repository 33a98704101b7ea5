import type { Plain } from './formulaOn';

/** Something that Excel does otherwise, or may do otherwise, as far as it is known. */
export interface Difference {
  readonly about: string;
  readonly here: string;
  readonly there: string;
  /** A formula that shows it, the cells under it, and what it gives here: a value, or words of the refusal. */
  readonly shown?: { readonly cells?: Readonly<Record<string, Plain>>; readonly formula: string; readonly gives: Plain | RegExp };
}

/** Known differences between formulas as Excel computes them and as they are read here. The page is built from this list. */
export const differences: readonly Difference[] = [
  {
    about: 'A negative number to a fractional power', here: '#NUM!', there: 'may give the real root for exponents such as 1/3 (from memory)',
    shown: { formula: '=(-8)^(1/3)', gives: '#NUM!' },
  },
  {
    about: 'A sum or difference at the end of a formula that nearly cancels', here: '0 within 2^-50 of the larger operand',
    there: '0 within a width that is not documented', shown: { formula: '=0.5-0.4-0.1', gives: 0 },
  },
  {
    about: 'Text compared with text', here: 'by the English order of letters, without regard to case', there: 'by the order of the computer\'s language',
    shown: { formula: '="a"<"B"', gives: true },
  },
  {
    about: 'A fraction closely below a whole number in functions of dates', here: 'refused', there: 'may go on to the whole number',
    shown: { formula: '=DATE(2025.9999999,1,1)', gives: /very close to a whole number/ },
  },
  {
    about: 'Dates in text with two-digit years from 30 to 49', here: 'refused', there: 'depends on the computer\'s settings',
    shown: { formula: '=DATEVALUE("1/1/35")', gives: /may be a date in a form that is not read here/ },
  },
  {
    about: 'An array where a function that returns an array takes one value', here: 'refused', there: 'an array of first elements, or #VALUE!',
    shown: { cells: { A1: 1, A2: 2 }, formula: '=TAKE(A1:A2,{1;2})', gives: /gives TAKE an array where it takes one value/ },
  },
  {
    about: 'INDIRECT with the name of a range, a table or another workbook', here: 'refused', there: 'followed',
    shown: { formula: '=INDIRECT("prices")', gives: /hands INDIRECT the text "prices"/ },
  },
  {
    about: 'LINEST over columns that depend on each other', here: 'refused', there: 'one column is dropped, its coefficient 0',
    shown: { cells: { A1: 1, A2: 2, A3: 3, A4: 5, B1: 1, B2: 2, B3: 3, B4: 4, C1: 2, C2: 4, C3: 6, C4: 8 }, formula: '=INDEX(LINEST(A1:A4,B1:C4),1)', gives: /./ },
  },
  {
    about: 'Arrays of more than four million cells', here: 'refused', there: 'computed if memory allows',
    shown: { formula: '=SUM(IF(A:A=1,1:1))', gives: /more than can be followed/ },
  },
  { about: 'Precision as displayed, iterative calculation, data tables', here: 'results do not agree with the stored ones and are refused by name', there: 'computed' },
  { about: 'Functions of the calendar in a workbook that counts its days from 1904', here: 'refused', there: 'serial numbers are 1,462 days lower' },
  { about: 'TODAY, NOW, RAND, RANDBETWEEN, RANDARRAY', here: 'the stored value stands; an audit counts them', there: 'computed anew at each recalculation' },
  { about: 'Functions of other add-ins, macros, cubes, web queries', here: 'refused by name', there: 'run' },
];
