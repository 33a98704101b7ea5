import { compareNumbers, compareText } from '../compare';
import { textNumber } from '../numberText';
import type { Scalar } from '../scalar';
import { readDateText } from './dateText';
import { hasWildcards, wildcards } from './wildcards';

/** Whether a cell meets a criterion. */
export type Criterion = (cell: Scalar) => boolean;

type Relation = '=' | '<>' | '<' | '<=' | '>' | '>=';

/**
 * The condition that SUMIF, COUNTIF and their kin read out of a value: a number, boolean or error as it is, a blank cell as 0, a
 * text as a relation (`=` where none is written) and an operand.
 *
 * - An operand that reads as a number is compared with numbers; for `=` and `<>` also with texts that read as numbers.
 * - TRUE, FALSE and error codes are compared with booleans and errors.
 * - Other text is compared with text, case-blind; `=` and `<>` read wildcards.
 * - `""` is met by blank cells and empty texts, `"="` by blank cells only, `"<>"` by cells that are not blank.
 * - `<>` is met by everything that does not meet `=`, whatever its kind.
 *
 * @source the documentation of COUNTIF and COUNTIFS; common practice for `""`, `"="`, `"<>"` and texts that read as numbers
 */
export function criterion(value: Scalar): Criterion {
  switch (value.k) {
    case 'blank':
      return numberRelation('=', 0);
    case 'number':
      return numberRelation('=', value.v);
    case 'boolean':
    case 'error':
      return (cell) => cell.k === value.k && cell.v === value.v;
    case 'text':
      return textCriterion(value.v);
  }
}

function textCriterion(written: string): Criterion {
  if (written === '') return (cell) => cell.k === 'blank' || (cell.k === 'text' && cell.v === '');
  const [, sign, operand] = /^(<>|<=|>=|=|<|>)?([\s\S]*)$/.exec(written)!;
  const relation = (sign ?? '=') as Relation;
  if (relation === '<>') {
    const equal = operand === '' ? isBlank : relationTo('=', operand);
    return (cell) => !equal(cell);
  }
  if (operand === '') return relation === '=' ? isBlank : () => false;
  return relationTo(relation, operand);
}

function relationTo(relation: Exclude<Relation, '<>'>, operand: string): Criterion {
  const n = numberIn(operand);
  if (n !== undefined) return numberRelation(relation, n);
  const word = operand.toUpperCase();
  if (word === 'TRUE' || word === 'FALSE') {
    const wanted = word === 'TRUE' ? 1 : 0;
    return (cell) => cell.k === 'boolean' && holds(relation, Number(cell.v) - wanted);
  }
  if (relation === '=' && ERROR_CODE.test(word)) return (cell) => cell.k === 'error' && cell.v === word;
  if (relation === '=' && hasWildcards(operand)) {
    const pattern = wildcards(operand);
    return (cell) => cell.k === 'text' && pattern.matches(cell.v);
  }
  return (cell) => cell.k === 'text' && holds(relation, compareText(cell.v, operand));
}

/** The number that a text stands for, or the serial number of the date or time that it says. */
function numberIn(text: string): number | undefined {
  const n = textNumber(text);
  if (n !== undefined) return n;
  const read = readDateText(text);
  return typeof read === 'object' ? read.day + read.clock : undefined;
}

function numberRelation(relation: Exclude<Relation, '<>'>, wanted: number): Criterion {
  if (relation !== '=') return (cell) => cell.k === 'number' && holds(relation, compareNumbers(cell.v, wanted));
  return (cell) => {
    if (cell.k === 'number') return compareNumbers(cell.v, wanted) === 0;
    if (cell.k !== 'text') return false;
    const read = numberIn(cell.v);
    return read !== undefined && compareNumbers(read, wanted) === 0;
  };
}

function holds(relation: Exclude<Relation, '<>'>, order: number): boolean {
  switch (relation) {
    case '=':
      return order === 0;
    case '<':
      return order < 0;
    case '<=':
      return order <= 0;
    case '>':
      return order > 0;
    case '>=':
      return order >= 0;
  }
}

const isBlank: Criterion = (cell) => cell.k === 'blank';

const ERROR_CODE =
  /^#(NULL!|DIV\/0!|VALUE!|REF!|NAME\?|NUM!|N\/A|SPILL!|CALC!|GETTING_DATA|FIELD!|BLOCKED!|UNKNOWN!|CONNECT!|BUSY!|EXTERNAL!)$/;
