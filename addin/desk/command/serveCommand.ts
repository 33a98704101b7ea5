import { existsSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import type { Command } from './Command';
import { openDesk, reasonOf } from './openDesk';
import { bundleFiles } from './bundleFiles';
import { readArguments } from './readArguments';
import { servePage } from './servePage';
import { SERVE_HELP, UsageError } from './Usage';

/** `rootsum serve [BOOK] [--port N]`: serves until it is stopped. */
export const serveCommand: Command = async (args, { terminal, folder }) => {
  const { values, positionals } = readArguments(args, { port: { type: 'string' } });
  if (values.help) return terminal.out(SERVE_HELP), 0;
  if (positionals.length > 1) throw new UsageError(`serve takes one workbook, got ${positionals.length}`);
  const [book] = positionals;
  const port = Number(values.port ?? 3040);
  if (!Number.isInteger(port) || port < 0 || port > 65535) throw new UsageError(`--port needs a number from 0 to 65535, got ${String(values.port)}`);
  if (book !== undefined) {
    if (!existsSync(book)) throw new UsageError(`${book}: there is no such file`);
    try {
      openDesk(book, bundleFiles(folder));
    } catch (problem) {
      const reason = reasonOf(problem);
      if (reason === undefined) throw problem;
      return terminal.err(`${book}: ${reason}`), 1;
    }
  }
  try {
    const server = await servePage(folder, book, port);
    terminal.out(`The desk is at http://localhost:${(server.address() as AddressInfo).port}/ (this machine only; Ctrl+C ends it)`);
    await new Promise((ended) => server.once('close', ended));
    return 0;
  } catch (problem) {
    if ((problem as NodeJS.ErrnoException).code !== 'EADDRINUSE') throw problem;
    terminal.err(`port ${port} is in use: choose another with --port`);
    return 1;
  }
};
