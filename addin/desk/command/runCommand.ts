import { applyCommand } from './applyCommand';
import { auditCommand } from './auditCommand';
import type { Command, Surroundings } from './Command';
import { functionsCommand } from './functionsCommand';
import { recalcCommand } from './recalcCommand';
import { serveCommand } from './serveCommand';
import { reportCommand } from './reportCommand';
import { USAGE, UsageError } from './Usage';

/** `report` is what `npm start` runs; it is not listed. */
const COMMANDS: Readonly<Record<string, Command>> = {
  recalc: recalcCommand, apply: applyCommand, audit: auditCommand, functions: functionsCommand, serve: serveCommand, report: reportCommand,
};

/** Runs a command line. @returns 0; 1 if something was refused; 2 for wrong usage. */
export async function runCommand(args: readonly string[], surroundings: Surroundings): Promise<number> {
  const { terminal } = surroundings;
  const [name, ...rest] = args;
  try {
    if (name === '--help' || name === '-h' || name === 'help') return terminal.out(USAGE), 0;
    if (name === undefined || !Object.hasOwn(COMMANDS, name)) {
      throw new UsageError(name === undefined ? 'a command is needed: recalc, apply, audit, functions or serve' : `there is no command ${name}: use recalc, apply, audit, functions or serve`);
    }
    return await COMMANDS[name](rest, surroundings);
  } catch (problem) {
    if (!(problem instanceof UsageError)) throw problem;
    terminal.err(`rootsum: ${problem.message}`);
    terminal.err(Object.hasOwn(COMMANDS, name ?? '') ? `See rootsum ${name} --help` : 'See rootsum --help');
    return 2;
  }
}
