import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { PlanProblem, readPlan } from '../../../addin/desk/command/readPlan';

const column = { sheet: 'S', anchor: 'C2', header: 'u', formula: '=A1', mode: 'spill', rows: '3:5' };

/** The problems of a plan, one line each. */
function problems(plan: unknown): readonly string[] {
  try {
    readPlan(typeof plan === 'string' ? plan : JSON.stringify(plan));
    return [];
  } catch (problem) {
    if (problem instanceof PlanProblem) return problem.problems;
    throw problem;
  }
}
const ofColumn = (change: object): readonly string[] => problems({ columns: [column, { ...column, ...change }] });
const ENTRY = 'entry 2 (sheet S, anchor C2)';

describe('readPlan', () => {
  it('takes a plan, with a byte order mark too', () => {
    expect(readPlan(`\uFEFF${JSON.stringify({ title: 'T', columns: [column] })}`)).toEqual({ title: 'T', columns: [column] });
  });

  it('takes the plan of the demo', () => {
    expect(problems(readFileSync(new URL('../../../addin/desk/demo/demoPlan.json', import.meta.url), 'utf8'))).toEqual([]);
  });

  it('says in one line that a text is not JSON', () => {
    expect(problems('{\n"columns": [}')).toEqual([expect.stringMatching(/^the plan is not JSON: .*\}/)]);
  });

  it.each([
    [[], 'the plan: needs an object, got []'],
    [{}, 'the plan: columns is missing: needs a list of at least one column'],
    [{ columns: [] }, 'the plan: columns needs a list of at least one column, got []'],
    [{ columns: [column], colums: 1 }, 'the plan: colums is not a property of a plan; it may have $schema, title, columns'],
    [{ columns: [3] }, 'entry 1: needs an object, got 3'],
  ])('%j: %s', (plan, message) => expect(problems(plan)).toEqual([message]));

  it.each([
    [{ mode: 'row' }, `${ENTRY}: mode needs "spill" or "perRow", got "row"`],
    [{ rows: '3-5' }, `${ENTRY}: rows needs rows such as "6:69", or "while D has numbers", got "3-5"`],
    [{ rows: 'while 3 has numbers' }, `${ENTRY}: rows needs rows such as "6:69", or "while D has numbers", got "while 3 has numbers"`],
    [{ formula: 'A1' }, `${ENTRY}: formula needs a formula of at most 8192 characters that begins with =, got "A1"`],
    [{ header: [] }, `${ENTRY}: header needs a heading, or a list of headings, got []`],
    [{ header: ['a', ''] }, `${ENTRY}: header needs a heading, or a list of headings, got ["a",""]`],
    [{ header: undefined }, `${ENTRY}: header is missing: needs a heading, or a list of headings`],
    [{ colour: 'red' }, `${ENTRY}: colour is not a property of a column; it may have sheet, anchor, header, formula, mode, rows, numberFormat`],
    [{ numberFormat: 3 }, `${ENTRY}: numberFormat needs a number format such as "0.000", or a list of them, got 3`],
    [{ mode: 'perRow', numberFormat: ['0', '0.0'] }, `${ENTRY}: numberFormat needs as many formats as there are headings, 1, got 2`],
    [{ header: ['a', 'b', 'c'], numberFormat: ['0', '0.0'] }, `${ENTRY}: numberFormat needs as many formats as there are headings, 3, got 2`],
  ])('%j: %s', (change, message) => expect(ofColumn(change)).toEqual([message]));

  it('names every problem, not the first alone', () => {
    expect(ofColumn({ mode: 1, rows: '' })).toHaveLength(2);
  });
});
