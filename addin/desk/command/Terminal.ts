/** Where a command writes. */
export interface Terminal {
  /** Results. */
  out(line: string): void;
  /** Refusals and wrong usage. */
  err(line: string): void;
  /** Shows how far the work is, in place of what it showed before; nothing unless a person watches. */
  progress(text: string): void;
}

/** A terminal over the process's own streams. Progress appears on a terminal only, and is wiped before anything else is written. */
export function processTerminal(stdout: NodeJS.WriteStream, stderr: NodeJS.WriteStream): Terminal {
  let shown = false;
  const wipe = (): void => {
    if (shown) stderr.write('\r\x1b[K');
    shown = false;
  };
  return {
    out: (line) => {
      wipe();
      stdout.write(`${line}\n`);
    },
    err: (line) => {
      wipe();
      stderr.write(`${line}\n`);
    },
    progress: (text) => {
      if (!stderr.isTTY) return;
      wipe();
      shown = text !== '';
      if (shown) stderr.write(text.slice(0, (stderr.columns ?? 80) - 1));
    },
  };
}

/** `[#########.......] 12 of 20 label` */
export function progressBar(done: number, of: number, label: string): string {
  const filled = of === 0 ? BAR : Math.round((BAR * done) / of);
  return `[${'#'.repeat(filled)}${'.'.repeat(BAR - filled)}] ${done} of ${of} ${label}`;
}

const BAR = 24;
