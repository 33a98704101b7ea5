import { mkdirSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';

/** Writes a file as a whole or not at all: through a temporary file beside it and a rename. Its folder is made where needed. */
export function saveFile(path: string, bytes: Uint8Array): void {
  const folder = dirname(path);
  mkdirSync(folder, { recursive: true });
  const temporary = join(folder, `.${basename(path)}.${process.pid}.tmp`);
  try {
    writeFileSync(temporary, bytes);
    renameSync(temporary, path);
  } catch (problem) {
    rmSync(temporary, { force: true });
    throw problem;
  }
}

/** Whether two paths lead to one file, through links too. */
export function isSameFile(a: string, b: string): boolean {
  const [one, other] = [a, b].map((path) => statSync(path, { throwIfNoEntry: false, bigint: true }));
  return one !== undefined && other !== undefined && one.dev === other.dev && one.ino === other.ino;
}
