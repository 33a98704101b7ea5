import { readArguments } from './readArguments';
import { isSameFile, saveFile } from './saveFile';
import { openDesk, reasonOf } from './openDesk';
import { progressBar } from './Terminal';
import { RECALC_HELP, UsageError } from './Usage';
import { bundleFiles } from './bundleFiles';
import { checkExtension, refusalLines } from './refusals';
import type { Command } from './Command';

/** `rootsum recalc BOOK --out NEW` */
export const recalcCommand: Command = async (args, { terminal, folder }) => {
  const { values, positionals } = readArguments(args, { out: { type: 'string' }, values: { type: 'boolean' } });
  if (values.help) return terminal.out(RECALC_HELP), 0;
  const [path, ...more] = positionals;
  if (path === undefined || more.length > 0) throw new UsageError(`recalc needs one workbook, got ${positionals.length}`);
  const out = values.out as string | undefined;
  if (out === undefined) throw new UsageError('recalc needs --out with the name of the new file');
  if (isSameFile(path, out)) throw new UsageError(`--out needs another file than ${path}: a workbook that is given is never changed`);
  const bundle = bundleFiles(folder);
  try {
    const desk = openDesk(path, bundle);
    checkExtension(desk.working.book, out);
    const outcome = await desk.recalculate((done, of) => terminal.progress(progressBar(done, of, 'cells')));
    terminal.progress('');
    saveFile(out, desk.write(values.values === true));
    for (const line of refusalLines(outcome.refused)) terminal.err(line);
    terminal.out(`${out}: ${outcome.computed} cells computed, ${outcome.refused.length} refused`);
    return outcome.refused.length > 0 ? 1 : 0;
  } catch (problem) {
    const reason = reasonOf(problem);
    if (reason === undefined) throw problem;
    terminal.err(`${path}: ${reason}`);
    return 1;
  }
};
