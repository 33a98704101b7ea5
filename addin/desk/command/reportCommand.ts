import { join } from 'node:path';
import { openBook } from '../book/openBook';
import { buildDemoBook } from '../demo/buildDemoBook';
import demoPlan from '../demo/demoPlan.json';
import { applyPlan } from '../sheet/applyPlan';
import { Desk } from '../sheet/Desk';
import type { Plan } from '../sheet/Plan';
import { hasRefusals, planFile, problemLines, summary } from './applyCommand';
import { bundleFiles } from './bundleFiles';
import { openDesk, reasonOf } from './openDesk';
import { readArguments } from './readArguments';
import { readPlan } from './readPlan';
import { checkExtension } from './refusals';
import { reportLines } from './reportLines';
import type { Command } from './Command';
import { isSameFile, saveFile } from './saveFile';
import { progressBar } from './Terminal';
import { UsageError } from './Usage';

const REPORT_HELP = `report [BOOK.xlsx PLAN.json] [--out-dir DIR]

Applies a plan to a workbook, writes the new workbook and prints its results, a budget, and what was
taken as exact. Without a workbook: the demo laboratory and its plan.

  --out-dir DIR     the folder for the new file (default: out)
  --help            this text`;

/** `rootsum report [BOOK PLAN]`: what `npm start` shows. */
export const reportCommand: Command = async (args, { terminal, folder }) => {
  const { values, positionals } = readArguments(args, { 'out-dir': { type: 'string' } });
  if (values.help) return terminal.out(REPORT_HELP), 0;
  if (positionals.length !== 0 && positionals.length !== 2) throw new UsageError(`report needs a workbook and a plan, or nothing for the demo, got ${positionals.join(' ')}`);
  const outDir = (values['out-dir'] as string | undefined) ?? 'out';
  const bundle = bundleFiles(folder);
  const [path, planPath] = positionals;
  try {
    const { desk, plan, out } = path === undefined ? demo(outDir, bundle) : own(path, planPath, outDir, bundle);
    const outcome = await applyPlan(desk, plan, (done, of) => terminal.progress(progressBar(done, of, 'cells')));
    terminal.progress('');
    saveFile(out, desk.write());
    const forReading = out.replace(/(\.[^.]*)$/, '-values$1');
    if (path === undefined) saveFile(forReading, desk.write(true));
    for (const line of reportLines(desk.working, outcome.entries)) terminal.out(line);
    terminal.out('');
    const problems = problemLines(outcome);
    for (const line of problems.slice(0, PROBLEMS_SHOWN)) terminal.err(line);
    if (problems.length > PROBLEMS_SHOWN) terminal.err(`… and ${problems.length - PROBLEMS_SHOWN} more: rootsum apply names them all`);
    terminal.out(`${plan.title ?? 'Plan'}: ${summary(outcome)}`);
    terminal.out(`The workbook with the new columns: ${out}`);
    if (path === undefined) {
      terminal.out(`The same with plain values, for readers without the add-in: ${forReading}`);
      terminal.out(`The workbook without them: ${join(outDir, DEMO_BEFORE)}`);
    }
    return hasRefusals(outcome) ? 1 : 0;
  } catch (problem) {
    const reason = reasonOf(problem);
    if (reason === undefined) throw problem;
    terminal.err(`${path ?? 'the demo'}: ${reason}`);
    return 1;
  }
};

/** A report is to be read: a list of refusals that is longer is cut. */
const PROBLEMS_SHOWN = 12;

const DEMO_BEFORE = 'demo-before.xlsx';

interface Job {
  desk: Desk;
  plan: Plan;
  out: string;
}

function demo(outDir: string, bundle: ConstructorParameters<typeof Desk>[1]): Job {
  const bytes = buildDemoBook();
  saveFile(join(outDir, DEMO_BEFORE), bytes);
  return { desk: new Desk(openBook(bytes), bundle), plan: readPlan(JSON.stringify(demoPlan)), out: join(outDir, 'demo.xlsx') };
}

function own(path: string, planPath: string, outDir: string, bundle: ConstructorParameters<typeof Desk>[1]): Job {
  const plan = planFile(planPath);
  const out = join(outDir, path.split(/[\\/]/).at(-1)!);
  if (isSameFile(path, out)) throw new UsageError(`--out-dir needs another folder than that of ${path}: a workbook that is given is never changed`);
  const desk = openDesk(path, bundle);
  checkExtension(desk.working.book, out);
  return { desk, plan, out };
}
