import type { ResultColumn } from './hardnessSheet';
import { sum } from './readings';
import type { SharedStrings } from './sharedStrings';
import { SheetWriter } from './SheetWriter';

/** A summary of both methods; two charts stand below it. */
export function overviewSheet(hardness: ResultColumn, chloride: ResultColumn, strings: SharedStrings): SheetWriter {
  const sheet = new SheetWriter('Overview', strings, {
    widths: { A: 34, B: 14, C: 13, D: 13, E: 13, F: 13, G: 13, H: 13, I: 13, J: 13, K: 13, L: 13, M: 13 }, tabColor: 'FFB5542B', landscape: true, showGridLines: false,
  });
  sheet.text('A1', 'Drinking water, March 2025', 'title');
  sheet.height(1, 26);
  sheet.text('A2', 'Demonstration laboratory: all names, samples and readings are invented.', 'note');
  sheet.headings('A4', ['Parameter', 'Unit', 'Samples', 'Mean', 'Lowest', 'Highest', 'Above level'], 20);
  line(5, 'Total hardness', 'mg/L CaCO3', 'Hardness!I6:I69', 'Hardness!K6:K69', 'above limit', hardness);
  line(6, 'Chloride', 'mg/L', 'ChlorideData[Chloride mg/L]', 'ChlorideData[Status]', 'watch', chloride);
  return sheet;

  function line(row: number, label: string, unit: string, values: string, statuses: string, word: string, results: ResultColumn): void {
    sheet.text(`A${row}`, label, 'labelBold');
    sheet.text(`B${row}`, unit, 'center');
    sheet.formula(`C${row}`, `COUNT(${values})`, results.values.length, 'whole');
    sheet.formula(`D${row}`, `AVERAGE(${values})`, sum(results.values) / results.values.length, 'one');
    sheet.formula(`E${row}`, `MIN(${values})`, Math.min(...results.values), 'one');
    sheet.formula(`F${row}`, `MAX(${values})`, Math.max(...results.values), 'one');
    sheet.formula(`G${row}`, `COUNTIF(${statuses},"${word}")`, results.statuses.filter((status) => status === word).length, 'whole');
  }
}
