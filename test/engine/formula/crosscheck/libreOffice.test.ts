import { describe, expect, it } from 'vitest';
import { libreOffice, libreOfficeVersion } from '../../../tools/libreOffice';
import { storedFormula } from '../../../golden/storedFormula';
import { exceptionOf, verdicts } from './agreement';
import { exceptions } from './exceptions';
import { type Job, FORMULA_COLUMN, lay } from './job';
import { smoothTable } from './table';

const version = libreOfficeVersion();

function engine(jobs: readonly Job[]): (number | string)[] {
  const laid = lay(jobs);
  const formulas = laid.formulas.map(({ row, formula }) => (
    { row, col: FORMULA_COLUMN, formula: storedFormula(formula) }));
  const values = libreOffice({ rows: laid.rows, numbers: laid.numbers, formulas });
  return laid.formulas.map(({ row }) => values[row]?.[FORMULA_COLUMN] ?? 'nothing');
}

describe('jobs on one sheet', () => {
  it('stand below each other, with the references of their formulas moved', () => {
    const laid = lay([{ formula: '=LOG10(A2)+B1', cells: { A2: 5, B1: 7 } }, { formula: '=ATAN2(A1,B1)*1E5', cells: { A1: 1, B1: 2 } }]);
    expect(laid.formulas).toEqual([{ row: 0, formula: '=LOG10(A2)+B1' }, { row: 2, formula: '=ATAN2(A3,B3)*1E5' }]);
    expect(laid.numbers.map(({ row, col, value }) => [row, col, value])).toEqual([[1, 0, 5], [0, 1, 7], [2, 0, 1], [2, 1, 2]]);
    expect(laid.rows).toBe(3);
  });
});

if (version === undefined) {
  console.log(`not compared with LibreOffice, for soffice is not on this machine: ${smoothTable.length} formulas`);
} else {
  const all = verdicts(engine, 4);
  const judged = all.filter((v) => !exceptionOf('LibreOffice', v.name)).map((v) => [v.title, v.objections] as const);

  describe(`values and slopes agree with ${version} and its differences`, () => {
    it.each(judged)('%s', (_title, objections) => {
      expect(objections.flat().slice(0, 3)).toEqual([]);
    });
  });

  describe('exceptions', () => {
    it('of LibreOffice are still needed', () => {
      const needless = exceptions.filter((e) => e.engine === 'LibreOffice')
        .filter((e) => all.filter((v) => v.name === e.name).every((v) => v.objections.flat().length === 0));
      expect(needless).toEqual([]);
    });
  });
}
