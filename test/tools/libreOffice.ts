import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

/** A sheet to be computed: numbers and formulas (in the words of an .xlsx file, `_xlfn.` included), 0-based. */
export interface FlatSheet {
  readonly rows: number;
  readonly numbers: readonly { row: number; col: number; value: number }[];
  readonly formulas: readonly { row: number; col: number; formula: string }[];
}

/** The version of LibreOffice on this machine, or undefined if there is none. */
export function libreOfficeVersion(): string | undefined {
  const found = spawnSync('soffice', ['--version'], { encoding: 'utf8', timeout: 60_000 });
  return found.status === 0 ? found.stdout.trim() : undefined;
}

/**
 * Has LibreOffice compute a sheet: writes a flat XML file with formulas and no values, converts it headlessly to CSV with all 15
 * digits and reads it back. A cell that is no number comes back as the text shown (`#VALUE!`).
 */
export function libreOffice(sheet: FlatSheet): (number | string)[][] {
  const folder = mkdtempSync(join(tmpdir(), 'sheet-'));
  try {
    const file = join(folder, 'sheet.fods');
    writeFileSync(file, flatXml(sheet));
    execFileSync('soffice', [
      `-env:UserInstallation=${pathToFileURL(join(folder, 'profile')).href}`, '--headless',
      '--convert-to', 'csv:Text - txt - csv (StarCalc):9,0,76,1,,0,false,false,false', '--outdir', folder, file,
    ], { stdio: 'ignore', timeout: 300_000 });
    const csv = readdirSync(folder).find((name) => name.endsWith('.csv'));
    if (csv === undefined) throw new Error('LibreOffice wrote no file');
    return readFileSync(join(folder, csv), 'utf8').split('\n').map((line) => line.split('\t').map(numberOrText));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** A cell as shown: a number, a percentage (also a number), or something else. */
function numberOrText(shown: string): number | string {
  const [digits, scale] = shown.endsWith('%') ? [shown.slice(0, -1), 100] : [shown, 1];
  return digits.trim() !== '' && Number.isFinite(Number(digits)) ? Number(digits) / scale : shown;
}

const namespaces = [
  'xmlns:office="urn:oasis:names:tc:opendocument:xmlns:office:1.0"',
  'xmlns:table="urn:oasis:names:tc:opendocument:xmlns:table:1.0"',
  'xmlns:msoxl="http://schemas.microsoft.com/office/excel/formula"',
].join(' ');

function flatXml(sheet: FlatSheet): string {
  const cells = Array.from({ length: sheet.rows }, () => new Map<number, string>());
  for (const { row, col, value } of sheet.numbers) {
    cells[row].set(col, `<table:table-cell office:value-type="float" office:value="${value}"/>`);
  }
  for (const { row, col, formula } of sheet.formulas) {
    cells[row].set(col, `<table:table-cell table:formula="msoxl:${escaped(formula)}"/>`);
  }
  const rows = cells.map((row) => {
    const last = Math.max(-1, ...row.keys());
    const inside = Array.from({ length: last + 1 }, (_, col) => row.get(col) ?? '<table:table-cell/>').join('');
    return `<table:table-row>${inside || '<table:table-cell/>'}</table:table-row>`;
  });
  return [
    `<?xml version="1.0" encoding="UTF-8"?><office:document ${namespaces} office:version="1.2"`,
    ' office:mimetype="application/vnd.oasis.opendocument.spreadsheet"><office:body><office:spreadsheet>',
    `<table:table table:name="Sheet1">${rows.join('\n')}</table:table></office:spreadsheet></office:body></office:document>`,
  ].join('');
}

const escaped = (formula: string): string =>
  formula.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
