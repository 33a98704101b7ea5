import { formulaOn } from '../formulaOn';
import { type Exception, exceptions } from './exceptions';
import type { Engine, Job, Numbers } from './job';
import { judge, points } from './judge';
import { seeded } from './seeded';
import { type Row, smoothTable } from './table';

/** One row of the table with what the other engine says against each of its draws. */
export interface Verdict {
  readonly title: string;
  readonly name: string;
  /** One list a draw; an empty one where the engine agrees. */
  readonly objections: string[][];
}

/** Compares every row of the table, at so many draws of arguments, with another engine, in one run of that engine. */
export function verdicts(engine: Engine, draws: number): Verdict[] {
  const cases = smoothTable.map((row, i) => ({ row, cells: drawn(row, i, draws) }));
  const jobs: Job[] = cases.flatMap(({ row, cells }) =>
    cells.flatMap((c) => points(c, row.step).map((p) => ({ formula: row.formula, cells: p }))));
  const values = engine(jobs);
  let next = 0;
  return cases.map(({ row, cells }) => ({
    title: row.formula,
    name: row.name,
    objections: cells.map((c) => {
      const theirs = values.slice(next, (next += points(c, row.step).length));
      return judge(formulaOn(c, row.formula), c, theirs, row.step).map((words) => `${words} at ${JSON.stringify(c)}`);
    }),
  }));
}

/** The exception of an engine for a name, if there is one. */
export const exceptionOf = (engine: Exception['engine'], name: string): Exception | undefined =>
  exceptions.find((e) => e.engine === engine && e.name === name);

function drawn(row: Row, place: number, draws: number): Numbers[] {
  const from = seeded(20240 + place);
  return Array.from({ length: draws }, () => row.draw(from));
}
