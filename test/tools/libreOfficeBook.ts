import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

/** A workbook as LibreOffice saves it; formulas without a stored value are computed. Needs `soffice`. */
export function libreOfficeBook(book: Uint8Array): Uint8Array {
  const folder = mkdtempSync(join(tmpdir(), 'saved-'));
  try {
    const file = join(folder, 'book.xlsx');
    mkdirSync(join(folder, 'out'));
    writeFileSync(file, book);
    execFileSync('soffice', [
      `-env:UserInstallation=${pathToFileURL(join(folder, 'profile')).href}`, '--headless', '--convert-to', 'xlsx', '--outdir', join(folder, 'out'), file,
    ], { stdio: 'ignore', timeout: 300_000 });
    return readFileSync(join(folder, 'out', 'book.xlsx'));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
