import { readFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { applyPlan } from '../sheet/applyPlan';
import type { PlanOutcome } from '../sheet/applyPlan';
import type { FunctionBundle } from '../sheet/Desk';
import type { Plan } from '../sheet/Plan';
import { bundleFiles } from './bundleFiles';
import { openDesk, reasonOf } from './openDesk';
import { readArguments } from './readArguments';
import { PlanProblem, readPlan } from './readPlan';
import { checkExtension, refusalLines } from './refusals';
import type { Command } from './Command';
import { isSameFile, saveFile } from './saveFile';
import { progressBar } from './Terminal';
import { APPLY_HELP, UsageError } from './Usage';

/** `rootsum apply PLAN BOOK… --out-dir DIR` */
export const applyCommand: Command = async (args, { terminal, folder }) => {
  const { values, positionals } = readArguments(args, { 'out-dir': { type: 'string' }, values: { type: 'boolean' } });
  if (values.help) return terminal.out(APPLY_HELP), 0;
  const [planPath, ...books] = positionals;
  if (planPath === undefined || books.length === 0) throw new UsageError('apply needs a plan and at least one workbook');
  const outDir = values['out-dir'] as string | undefined;
  if (outDir === undefined) throw new UsageError('apply needs --out-dir with the folder for the new files');
  const plan = planFile(planPath);
  const bundle = bundleFiles(folder);
  const written = new Map<string, string>();
  let refusedBooks = 0;
  let partly = 0;
  for (const [i, path] of books.entries()) {
    terminal.progress(progressBar(i, books.length, `workbooks ${path}`));
    try {
      const out = join(outDir, basename(path));
      if (books.some((book) => isSameFile(book, out))) throw new Refused(`${out} is a workbook that was given, which is never changed`);
      const other = written.get(out.toLowerCase());
      if (other !== undefined) throw new Refused(`${other} has the same name and was written to ${out}`);
      const outcome = await applyTo(path, out, plan, bundle, values.values === true);
      written.set(out.toLowerCase(), path);
      for (const line of problemLines(outcome, `${path}: `)) terminal.err(line);
      if (hasRefusals(outcome)) partly++;
      terminal.out(`${out}: ${summary(outcome)}`);
    } catch (problem) {
      const reason = problem instanceof Refused ? problem.message : reasonOf(problem);
      if (reason === undefined) throw problem;
      refusedBooks++;
      terminal.err(`${path}: ${reason}`);
    }
  }
  terminal.progress('');
  if (books.length > 1) terminal.out(`${books.length} workbooks: ${books.length - refusedBooks} written, ${partly} of them with refusals; ${refusedBooks} refused`);
  return refusedBooks > 0 || partly > 0 ? 1 : 0;
};

class Refused extends Error {}

/** @throws UsageError that names the file and every problem of the plan. */
export function planFile(path: string): Plan {
  try {
    return readPlan(readFileSync(path, 'utf8'));
  } catch (problem) {
    if (problem instanceof PlanProblem) throw new UsageError(problem.problems.map((line) => `${path}: ${line}`).join('\n'));
    const reason = reasonOf(problem);
    if (reason === undefined) throw problem;
    throw new UsageError(`${path}: ${reason}`);
  }
}

async function applyTo(path: string, out: string, plan: Plan, bundle: FunctionBundle, values: boolean): Promise<PlanOutcome> {
  const desk = openDesk(path, bundle);
  checkExtension(desk.working.book, out);
  const outcome = await applyPlan(desk, plan);
  saveFile(out, desk.write(values));
  return outcome;
}

/** One line an entry or a cell that was refused. */
export function problemLines({ entries, recalculation }: PlanOutcome, prefix = ''): string[] {
  const refused = entries.filter(({ state }) => state === 'refused')
    .map(({ number, entry, message }) => `${prefix}entry ${number} (sheet ${entry.sheet}, anchor ${entry.anchor}): ${message}`);
  return [...refused, ...refusalLines(recalculation.refused, prefix)];
}

export const hasRefusals = ({ entries, recalculation }: PlanOutcome): boolean =>
  recalculation.refused.length > 0 || entries.some(({ state }) => state === 'refused');

/** `12 entries: 10 added, 1 already there, 1 refused; 2 cells refused` */
export function summary({ entries, recalculation }: PlanOutcome): string {
  const count = (state: string): number => entries.filter((entry) => entry.state === state).length;
  const words = (['added', 'already there', 'refused'] as const).filter((state) => count(state) > 0).map((state) => `${count(state)} ${state}`);
  return `${entries.length} entries: ${words.join(', ')}; ${recalculation.refused.length} cells refused`;
}
