import { cellName } from '../book/area';
import type { EntryOutcome } from '../sheet/applyPlan';
import { headersOf } from '../sheet/Plan';
import type { WorkingBook } from '../sheet/WorkingBook';
import { pairText } from '../../../functions/engine/report/pairText';
import { parseAddress } from '../../../functions/address';
import { budgetLines } from './budgetLines';

/** So many results of one column are shown; the rest is counted. */
const SHOWN = 8;

/**
 * The results of a plan that was applied, as lines of text: results with their uncertainty, then the budgets with what was taken as exact.
 */
export function reportLines(working: WorkingBook, entries: readonly EntryOutcome[]): string[] {
  const there = entries.filter(({ target }) => target !== undefined);
  const withText = there.map((outcome) => ({ outcome, texts: textsOf(working, outcome) }));
  const told = new Set(withText.filter(({ texts }) => texts.length > 0).map(({ outcome }) => outcome.target!.sheet));
  const lines: string[] = [];
  for (const { outcome, texts } of withText) {
    const { entry, target } = outcome;
    const results = texts.length > 0 || told.has(target!.sheet) ? texts : carriedTexts(working, outcome);
    if (results.length === 0) continue;
    const width = Math.max(...results.slice(0, SHOWN).map(([label]) => label.length));
    lines.push('', `${entry.sheet}: ${headersOf(entry).length > 1 ? 'result' : headersOf(entry)[0]}`);
    for (const [label, text] of results.slice(0, SHOWN)) lines.push(`  ${label.padEnd(width)}  ${text}`);
    if (results.length > SHOWN) lines.push(`  … and ${results.length - SHOWN} more in the workbook`);
  }
  for (const outcome of there) if (/ROOTSUM\.UNC_BUDGET\(/i.test(outcome.entry.formula)) lines.push('', ...budgetLines(working, outcome));
  return lines.slice(1);
}

/** The texts with ± among the cells of an entry, each with the label of its row. */
function textsOf(working: WorkingBook, { entry, target }: EntryOutcome): [label: string, text: string][] {
  const { sheet, left, first, last } = target!;
  const texts: [string, string][] = [];
  if (/ROOTSUM\.UNC_BUDGET\(/i.test(entry.formula)) return texts;
  for (let row = first; row <= last; row++) {
    for (let col = left; col < left + headersOf(entry).length; col++) {
      const value = working.cell(sheet, row, col)?.value;
      if (typeof value === 'string' && value.includes('±')) texts.push([labelOfRow(working, sheet, row, left), value]);
    }
  }
  return texts;
}

/** Carried standard uncertainties beside their results. */
function carriedTexts(working: WorkingBook, { entry, target }: EntryOutcome): [label: string, text: string][] {
  const results = /^=\s*ROOTSUM\.UNC_CARRY\(\s*((?:'(?:[^']|'')+'!|[^\s,!'()]+!)?\$?[A-Z]{1,3}\$?\d+(?::\$?[A-Z]{1,3}\$?\d+)?)/i.exec(entry.formula)?.[1];
  const area = results && parseAddress(results.includes('!') ? results : `'${entry.sheet.replaceAll("'", "''")}'!${results}`);
  const resultSheet = area ? working.sheetIndex(area.sheet) : undefined;
  if (!area || resultSheet === undefined || area.cols > 1) return [];
  const texts: [string, string][] = [];
  for (let i = 0; i < area.rows; i++) {
    const value = working.cell(resultSheet, area.row + i, area.col)?.value;
    const u = working.cell(target!.sheet, target!.first + i, target!.left)?.value;
    if (typeof value === 'number' && typeof u === 'number' && u > 0) {
      texts.push([labelOfRow(working, resultSheet, area.row + i, area.col), `${pairText(value, u)} (standard uncertainty)`]);
    }
  }
  return texts;
}

/** The first text to the left in a row, or the address. */
function labelOfRow(working: WorkingBook, sheet: number, row: number, before: number): string {
  for (let col = 1; col < before; col++) {
    const value = working.cell(sheet, row, col)?.value;
    if (typeof value === 'string' && value.trim() !== '') return value.trim();
  }
  return cellName(row, before);
}
