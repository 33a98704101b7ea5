import { randomBytes } from 'node:crypto';
import { closeSync, fsyncSync, mkdirSync, openSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { BookError } from '../book/BookError';
import { reasonOf } from './openDesk';

/**
 * Writes a file as a whole or not at all: through a temporary file beside it, which has reached the disk before it takes the name. Its
 * folder is made where needed.
 *
 * @throws BookError that names the file and says why it could not be written; then whatever stood there stands there still.
 */
export function saveFile(path: string, bytes: Uint8Array): void {
  try {
    mkdirSync(dirname(path), { recursive: true });
    writeAndRename(path, bytes);
  } catch (problem) {
    const reason = reasonOf(problem);
    if (reason === undefined) throw problem;
    throw new BookError(`${path} was not written: ${reason}`);
  }
}

function writeAndRename(path: string, bytes: Uint8Array): void {
  const temporary = join(dirname(path), `.${basename(path)}.${randomBytes(6).toString('hex')}.tmp`);
  const file = openSync(temporary, 'wx');
  try {
    try {
      writeFileSync(file, bytes);
      fsyncSync(file);
    } finally {
      closeSync(file);
    }
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
