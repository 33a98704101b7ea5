/**
 * Makes the golden workbooks anew: `npm run golden`. Each holds the calls of one family of native functions, computed by
 * LibreOffice. What it writes is committed; run it when calls are added, and look at what changes.
 */
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { storedFormula } from './storedFormula';
import { libreOfficeBook } from '../tools/libreOfficeBook';
import { type SmallCell, smallBook } from '../desk/sheet/smallBook';
import { type Calls, goldenCalls } from './calls';
import { goldenData, goldenNames } from './goldenData';

for (const [family, calls] of goldenCalls) {
  const sheets = Object.fromEntries(calls.map((c) => [c.name, sheetOf(c)]));
  const book = libreOfficeBook(smallBook({ Data: goldenData, ...sheets }, goldenNames));
  writeFileSync(join(import.meta.dirname, 'books', `${family}.xlsx`), book);
  console.log(`${family}: ${calls.length} functions, ${calls.reduce((n, c) => n + c.formulas.length, 0)} formulas`);
}

function sheetOf({ formulas }: Calls): Record<string, SmallCell> {
  return Object.fromEntries(formulas.map((formula, i) => [`A${i + 1}`, { f: storedFormula(formula), v: null }]));
}
