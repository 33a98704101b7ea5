import { readFileSync } from 'node:fs';
import { openBook } from '../book/openBook';
import { Desk } from '../sheet/Desk';
import type { FunctionBundle } from '../sheet/Desk';

/**
 * Opens a workbook file.
 *
 * @throws BookError or a file-system error; `reasonOf` puts either in words.
 */
export function openDesk(path: string, bundle: FunctionBundle): Desk {
  return new Desk(openBook(readFileSync(path)), bundle);
}

const FILE_PROBLEMS: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file', EACCES: 'it may not be read or written', EISDIR: 'it is a folder', ENOTDIR: 'part of its path is no folder',
  EPERM: 'it may not be read or written', ENOSPC: 'the disk is full', EROFS: 'the disk is read-only', EFBIG: 'the file would be larger than the system allows', EMFILE: 'too many files are open', EBUSY: 'another program holds it', EEXIST: 'a file is in the way of its folder',
};

/** Why a file could not be read or written, in words; undefined for a bug. */
export function reasonOf(problem: unknown): string | undefined {
  if (!(problem instanceof Error)) return undefined;
  if (problem.name === 'BookError') return problem.message;
  const { code } = problem as NodeJS.ErrnoException;
  return code === undefined || !/^E[A-Z]+$/.test(code) ? undefined : FILE_PROBLEMS[code] ?? problem.message;
}
