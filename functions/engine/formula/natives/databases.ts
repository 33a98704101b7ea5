import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Scalar, err } from '../scalar';
import { type Matrix, type Value, at, matrix } from '../value';
import { compareText } from '../compare';
import { counts } from './counts';
import { criterion, type Criterion } from './criteria';
import { ranks } from './ranks';
import { refuseUse } from './refuseUse';
import { spread } from './spread';
import { sums } from './sums';

const siblings = new Map([...counts, ...ranks, ...spread, ...sums].map((native) => [native.name, native]));

/**
 * Functions over a list with headings: the field's cells of the rows that meet a block of criteria (conditions of one row all, of
 * several rows any) go to the function of the same name without the D. All cells looked at decide.
 *
 * @source Excel's documentation of DSUM and its kin
 */
export const databases: Native[] = [
  ['DSUM', 'SUM'], ['DAVERAGE', 'AVERAGE'], ['DCOUNT', 'COUNT'], ['DCOUNTA', 'COUNTA'], ['DMAX', 'MAX'], ['DMIN', 'MIN'], ['DPRODUCT', 'PRODUCT'],
  ['DSTDEV', 'STDEV'], ['DSTDEVP', 'STDEVP'], ['DVAR', 'VAR'], ['DVARP', 'VARP'], ['DGET', ''],
].map(([name, sibling]) => rangeFunction(name, ['range', 'range', 'range'], (run, args) => {
  const chosen = chosenCells(run, name, args);
  if ('k' in chosen) return chosen;
  const { cells, deciders } = chosen;
  const value = sibling === '' ? onlyOne(cells) : siblings.get(sibling)!.body(run, [matrix(cells.length, 1, cells)]);
  return run.steps.chosenByAll(run.scalar(value), deciders);
}));

/** DGET: the one cell; #VALUE! where there is none, #NUM! where there are several. */
function onlyOne(cells: readonly Scalar[]): Scalar {
  return cells.length === 1 ? cells[0] : err(cells.length === 0 ? '#VALUE!' : '#NUM!');
}

function chosenCells(run: Run, name: string, [list, field, conditions]: readonly Value[]): { cells: Scalar[]; deciders: Scalar[] } | Err {
  const table = run.matrix(list);
  const wanted = run.matrix(conditions);
  const column = columnOf(run, name, table, field);
  if (typeof column !== 'number') return column;
  const deciders: Scalar[] = [...wanted.cells];
  const tests = rowsOfCriteria(name, table, wanted);
  const cells: Scalar[] = [];
  for (let row = 1; row < table.height; row++) {
    for (const test of tests) for (const { col } of test) deciders.push(at(table, row, col));
    if (tests.some((all) => all.every(({ col, meets }) => meets(at(table, row, col))))) cells.push(at(table, row, column));
  }
  return { cells, deciders };
}

/** The 0-based column of a field given by its heading or its number. */
function columnOf(run: Run, name: string, table: Matrix, field: Value): number | Err {
  if (field.k === 'missing') refuseUse(name, 'its field is left empty');
  const given = run.scalar(field);
  if (given.k === 'error') return given;
  if (given.k === 'number') {
    const place = Math.trunc(given.v) - 1;
    return place >= 0 && place < table.cols ? place : err('#VALUE!');
  }
  return headingOf(table, given) ?? err('#VALUE!');
}

function headingOf(table: Matrix, given: Scalar): number | undefined {
  for (let col = 0; col < table.cols; col++) {
    const heading = at(table, 0, col);
    if (heading.k === 'text' && given.k === 'text' && compareText(heading.v, given.v) === 0) return col;
  }
  return undefined;
}

interface Test {
  readonly col: number;
  readonly meets: Criterion;
}

/** For each row of the block the tests it makes; a row of blanks makes none, so everything meets it. */
function rowsOfCriteria(name: string, table: Matrix, wanted: Matrix): Test[][] {
  return Array.from({ length: Math.max(0, wanted.rows - 1) }, (_, row) => {
    const tests: Test[] = [];
    for (let c = 0; c < wanted.cols; c++) {
      const condition = at(wanted, row + 1, c);
      if (condition.k === 'blank') continue;
      const col = headingOf(table, at(wanted, 0, c));
      if (col === undefined) refuseUse(name, 'a condition stands under no heading of the list');
      tests.push({ col, meets: criterion(beginning(condition)) });
    }
    return tests;
  });
}

/** Text without a sign of comparison asks for what begins with it. */
function beginning(condition: Scalar): Scalar {
  return condition.k === 'text' && !/^(<>|<=|>=|=|<|>)/.test(condition.v) && Number.isNaN(Number(condition.v)) ? { ...condition, v: `${condition.v}*` } : condition;
}
