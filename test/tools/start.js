import { spawn } from 'node:child_process';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildIfStale, distFolder } from './buildIfStale.js';

/*
 * npm start                          builds what is stale and shows the demo: report on the terminal, workbooks in out/
 * npm start -- BOOK.xlsx PLAN.json   the same for a workbook and a plan of one's own
 * npm start -- --once                does the job and exits; without it, a start from a terminal also serves the desk's page
 */
const root = fileURLToPath(new URL('../..', import.meta.url));
// npm runs this in the checkout; names on the command line are meant from where it was called.
const from = process.env.INIT_CWD ?? process.cwd();
const given = process.argv.slice(2).filter((argument) => argument !== '--once');
const args = given.map((argument) => (argument.startsWith('-') ? argument : resolve(from, argument)));

await buildIfStale((line) => console.error(line));
const outDir = given.includes('--out-dir') ? [] : ['--out-dir', 'out'];
const command = spawn(process.execPath, [join(distFolder, 'rootsum.cjs'), 'report', ...args, ...outDir], { cwd: root, stdio: 'inherit' });
command.on('close', (status, signal) => {
  process.exitCode = status ?? (signal ? 1 : 0);
  // Someone who sits before the terminal also gets the page; a script gets its end.
  if (status === 0 && process.stdout.isTTY && !process.argv.includes('--once'))
    spawn(process.execPath, [join(distFolder, 'rootsum.cjs'), 'serve', ...args.filter((a) => /\.xls[xm]$/i.test(a)).slice(0, 1)], { cwd: root, stdio: 'inherit' });
});
