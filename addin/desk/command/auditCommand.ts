import { readFileSync } from 'node:fs';
import { openBook } from '../book/openBook';
import { type Audit, audit } from '../sheet/audit';
import type { Command } from './Command';
import { reasonOf } from './openDesk';
import { readArguments } from './readArguments';
import { AUDIT_HELP, UsageError } from './Usage';

/** How many lines of one kind a person is shown. */
const SHOWN = 10;

/** `rootsum audit BOOK… [--json]` */
export const auditCommand: Command = async (args, { terminal }) => {
  const { values, positionals } = readArguments(args, { json: { type: 'boolean' } });
  if (values.help) return terminal.out(AUDIT_HELP), 0;
  if (positionals.length === 0) throw new UsageError('audit needs at least one workbook');
  const found: object[] = [];
  let clean = true;
  for (const path of positionals) {
    try {
      const result = audit(openBook(readFileSync(path)), (done) => terminal.progress(`${path}: ${done} formulas`));
      terminal.progress('');
      clean &&= isClean(result);
      found.push({ book: path, ...result });
      for (const line of auditLines(path, result)) (values.json ? terminal.err : terminal.out)(line);
    } catch (problem) {
      const reason = reasonOf(problem);
      if (reason === undefined) throw problem;
      clean = false;
      terminal.err(`${path}: ${reason}`);
    }
  }
  if (values.json) terminal.out(JSON.stringify(found.length === 1 && positionals.length === 1 ? found[0] : found, null, 2));
  return clean ? 0 : 1;
};

const isClean = ({ differ, unsupported, refused }: Audit): boolean => differ.length === 0 && unsupported.length === 0 && refused.length === 0;

/** An audit as a person reads it: the counts, the worst first, and what to do. */
function auditLines(path: string, result: Audit): string[] {
  const { formulas, agree, differ, unsupported, refused, volatile, unstored, library } = result;
  const unread = unsupported.reduce((n, u) => n + u.cells.length, 0) + refused.length;
  const rest = [
    [differ.length, 'differ'], [unread, 'not followed'], [volatile, 'volatile'], [unstored, 'without a stored result'], [library, 'of the library'],
  ] as const;
  const lines = [`${path}: ${formulas} formula cells, ${agree} agree${rest.filter(([n]) => n > 0).map(([n, words]) => `, ${n} ${words}`).join('')}`];
  if (differ.length > 0) {
    lines.push('  The stored result is not what the formula gives: recalculate in the program that wrote the workbook, or look for a result typed over');
    lines.push(...cut(differ.map((d) => `    ${d.cell}  stored ${d.stored}, computed ${d.computed}  ${d.formula}`)));
  }
  if (unsupported.length > 0) {
    lines.push('  Functions that cannot be followed: results above these cells can be carried, results below are refused');
    lines.push(...cut(unsupported.map((u) => `    ${u.function}  in ${u.cells.length === 1 ? u.cells[0] : `${u.cells.length} cells, the first ${u.cells[0]}`}`)));
  }
  if (refused.length > 0) lines.push('  Cells that cannot be followed', ...cut(refused.map((r) => `    ${r.cell} ${r.why}`)));
  if (unstored > 0) lines.push('  Formulas without a stored result have nothing to be compared with: recalculate, in the program that wrote the workbook or by `rootsum recalc`');
  if (differ.length + unread === 0 && agree > 0) lines.push(`  Every ${unstored > 0 ? 'stored result' : 'formula'} is read right: results of this workbook can be carried`);
  return lines;
}

const cut = (lines: string[]): string[] => (lines.length > SHOWN ? [...lines.slice(0, SHOWN), `    … and ${lines.length - SHOWN} more: --json names them all`] : lines);
