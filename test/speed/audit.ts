/** Prints how long an audit takes: `npm run speed`. Nothing is asserted. */
import { openBook } from '../../addin/desk/book/openBook';
import { audit } from '../../addin/desk/sheet/audit';
import { type SmallCell, smallBook } from '../desk/sheet/smallBook';

/** A laboratory's long sheet: of five formulas a row one looks up, one decides, one writes text. */
function longBook(rows: number): Uint8Array {
  const cells: Record<string, SmallCell> = { J1: 1, K1: 0.9, J2: 50, K2: 1.1, J3: 500, K3: 1.3 };
  for (let r = 1; r <= rows; r++) {
    const [a, b] = [(r * 37) % 1000 + 0.25, (r * 91) % 700 + 1.5];
    const factor = b < 50 ? 0.9 : b < 500 ? 1.1 : 1.3;
    cells[`A${r}`] = a;
    cells[`B${r}`] = b;
    cells[`C${r}`] = { f: `A${r}/B${r}*1000`, v: (a / b) * 1000 };
    cells[`D${r}`] = { f: `VLOOKUP(B${r},$J$1:$K$3,2)`, v: factor };
    const e = Math.round((a / b) * 1000 * factor * 100) / 100;
    cells[`E${r}`] = { f: `ROUND(C${r}*D${r},2)`, v: e };
    cells[`F${r}`] = { f: `IF(E${r}>100,"high","low")`, v: e > 100 ? 'high' : 'low' };
    cells[`G${r}`] = { f: `SUM(A${r}:B${r})^2`, v: (a + b) ** 2 };
  }
  return smallBook({ Long: cells });
}

const heap = (): number => process.memoryUsage().heapUsed / 2 ** 20;

for (const rows of [5000, 20000]) {
  const bytes = longBook(rows);
  const began = performance.now();
  const book = openBook(bytes);
  const opened = performance.now();
  const found = audit(book);
  const done = performance.now();
  console.log(
    `${`audit of ${found.formulas} formulas, ${(bytes.length / 2 ** 20).toFixed(1)} MB`.padEnd(56)} open ${(opened - began).toFixed(0).padStart(10)} ms   audit ${(done - opened).toFixed(0).padStart(6)} ms   ` +
      `${found.agree} agree, ${found.differ.length} differ, ${found.unstored} without a result, heap ${heap().toFixed(0)} MB, at most ${(process.resourceUsage().maxRSS / 1024).toFixed(0)} MB resident`,
  );
}
