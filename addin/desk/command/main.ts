import { realpathSync } from 'node:fs';
import { dirname } from 'node:path';
import { runCommand } from './runCommand';
import { processTerminal } from './Terminal';

// A reader that has seen enough (`rootsum functions | head`) closes the pipe: that is no fault.
process.stdout.on('error', (problem: NodeJS.ErrnoException) => {
  if (problem.code !== 'EPIPE') throw problem;
  process.exit(0);
});

/* Entry of dist/rootsum.cjs. The built functions lie beside it, also where it is started through a link. */
const folder = dirname(realpathSync(process.argv[1]));

void runCommand(process.argv.slice(2), { terminal: processTerminal(process.stdout, process.stderr), folder }).then((status) => {
  process.exitCode = status;
});
