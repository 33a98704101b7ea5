/** Number cells by their A1 names; columns A to L only, rows from 1 on. */
export type Numbers = Readonly<Record<string, number>>;

/** One formula over a few cells, to be evaluated by an engine that is not ours. */
export interface Job {
  readonly formula: string;
  readonly cells: Numbers;
}

/** What another engine found: numbers, or whatever words it has for an error. */
export type Engine = (jobs: readonly Job[]) => (number | string)[];

/** Jobs written below each other on one sheet. */
export interface Laid {
  /** The number cells, by 0-based row and column. */
  readonly numbers: { row: number; col: number; value: number }[];
  /** The formulas, each in the first row of its block, with its references moved there. */
  readonly formulas: { row: number; formula: string }[];
  readonly rows: number;
}

/** The column in which formulas stand. */
export const FORMULA_COLUMN = 15;

export function lay(jobs: readonly Job[]): Laid {
  const laid: Laid = { numbers: [], formulas: [], rows: 0 };
  let top = 0;
  for (const { formula, cells } of jobs) {
    let height = 1;
    for (const [name, value] of Object.entries(cells)) {
      const row = Number(name.slice(1)) - 1;
      height = Math.max(height, row + 1);
      laid.numbers.push({ row: top + row, col: name.charCodeAt(0) - 65, value });
    }
    laid.formulas.push({ row: top, formula: moved(formula, top) });
    top += height;
  }
  return { ...laid, rows: top };
}

/** The formula with every cell name moved down; names of functions that end in digits stay. */
const moved = (formula: string, by: number): string =>
  formula.replace(/(?<![A-Z0-9.])([A-L])(\d+)\b(?!\()/g, (_all, letter: string, row: string) => letter + String(Number(row) + by));
