import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

/** What LibreOffice shows of a workbook as it opens it: all sheets, unformatted, row by row. Needs `soffice`. */
export function libreOfficeSheets(book: Uint8Array): Map<string, string[][]> {
  const folder = mkdtempSync(join(tmpdir(), 'book-'));
  try {
    const file = join(folder, 'book.xlsx');
    writeFileSync(file, book);
    execFileSync('soffice', [
      `-env:UserInstallation=${pathToFileURL(join(folder, 'profile')).href}`, '--headless',
      '--convert-to', 'csv:Text - txt - csv (StarCalc):9,34,76,1,,0,false,false,false,false,false,-1', '--outdir', folder, file,
    ], { stdio: 'ignore', timeout: 300_000 });
    const sheets = new Map<string, string[][]>();
    for (const name of readdirSync(folder)) {
      const sheet = /^book-(.*)\.csv$/.exec(name)?.[1];
      if (sheet) sheets.set(sheet, readFileSync(join(folder, name), 'utf8').split('\n').map((line) => line.split('\t').map(unquoted)));
    }
    return sheets;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

const unquoted = (cell: string): string => (cell.startsWith('"') ? cell.slice(1, -1).replace(/""/g, '"') : cell);
