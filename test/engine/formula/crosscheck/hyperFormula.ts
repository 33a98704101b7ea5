import { HyperFormula } from 'hyperformula';
import { type Job, FORMULA_COLUMN, lay } from './job';

/** The values of jobs as HyperFormula finds them, without its rounding to 10 digits. */
export function hyperFormula(jobs: readonly Job[]): (number | string)[] {
  const laid = lay(jobs);
  const sheet = Array.from({ length: laid.rows }, () => Array<number | string | null>(FORMULA_COLUMN + 1).fill(null));
  for (const { row, col, value } of laid.numbers) sheet[row][col] = value;
  for (const { row, formula } of laid.formulas) sheet[row][FORMULA_COLUMN] = formula;
  const engine = HyperFormula.buildFromArray(sheet, {
    licenseKey: 'gpl-v3', smartRounding: false, useArrayArithmetic: true, maxRows: laid.rows + 1,
  });
  const values = laid.formulas.map(({ row }) => {
    const value = engine.getCellValue({ sheet: 0, row, col: FORMULA_COLUMN });
    return typeof value === 'number' ? value : typeof value === 'object' ? String(value?.value) : String(value);
  });
  engine.destroy();
  return values;
}
