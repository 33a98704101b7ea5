import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

/** Workbooks as LibreOffice saves them, in their order, by one start of the program. Needs `soffice`. */
export function libreOfficeBooks(books: readonly Uint8Array[]): Uint8Array[] {
  const folder = mkdtempSync(join(tmpdir(), 'saved-'));
  try {
    mkdirSync(join(folder, 'out'));
    const files = books.map((bytes, i) => {
      writeFileSync(join(folder, `book${i}.xlsx`), bytes);
      return join(folder, `book${i}.xlsx`);
    });
    execFileSync('soffice', [
      `-env:UserInstallation=${pathToFileURL(join(folder, 'profile')).href}`, '--headless', '--convert-to', 'xlsx', '--outdir', join(folder, 'out'), ...files,
    ], { stdio: 'ignore', timeout: 300_000 });
    return books.map((_, i) => readFileSync(join(folder, 'out', `book${i}.xlsx`)));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
