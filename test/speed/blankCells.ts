/** Opens and writes a sheet with a million blank cells that have a style: prints times and memory, asserts nothing. */
import { openBook } from '../../addin/desk/book/openBook';
import { writeBook } from '../../addin/desk/book/writeBook';
import { buildBook } from '../desk/book/buildBook';

for (const rows of [10_000, 100_000]) {
  const row = (r: number): string => `<row r="${r}">${'ABCDEFGHIJ'.replace(/./g, (c) => `<c r="${c}${r}" s="1"/>`)}</row>`;
  const bytes = buildBook({ sheets: [{ xml: `<sheetData>${Array.from({ length: rows }, (_, i) => row(i + 1)).join('')}</sheetData>` }] });
  const start = performance.now();
  const book = openBook(bytes);
  const opened = performance.now();
  const written = writeBook(book, [{ set: 'constant', sheet: 0, row: 5, col: 20, value: 1 }]);
  const done = performance.now();
  console.log(`${rows * 10} blank cells with a style, ${(bytes.length / 1e6).toFixed(1)} MB   open ${(opened - start).toFixed(0)} ms   write ${(done - opened).toFixed(0)} ms   used ${book.used(0).rows} rows, ${written.length} bytes, ${(process.memoryUsage().rss / 1e6).toFixed(0)} MB resident`);
}
