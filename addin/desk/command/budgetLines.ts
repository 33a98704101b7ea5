import type { EntryOutcome } from '../sheet/applyPlan';
import { headersOf } from '../sheet/Plan';
import type { WorkingBook } from '../sheet/WorkingBook';

const BAR = 30;
const WIDEST_LABEL = 52;

/** A spilled budget as a bar table: a line a source with its share of the variance, the totals, what was taken as exact, the notes. */
export function budgetLines(working: WorkingBook, { entry, target }: EntryOutcome): string[] {
  const rows = spilledRows(working, target!);
  const [headings, ...rest] = rows;
  const share = headings?.indexOf('Share of variance') ?? -1;
  const component = headings?.indexOf('Component |c| u') ?? -1;
  const u = headings?.indexOf('Standard uncertainty u') ?? -1;
  const title = headersOf(entry)[0];
  if (share < 0 || component < 0) return [title, `  ${String(headings?.[0] ?? 'no budget')}`];

  const end = rest.findIndex((row) => typeof row[share] !== 'number');
  const sources = rest.slice(0, end < 0 ? rest.length : end);
  const after = rest.slice(sources.length);
  // Several cells of a form share a label: their addresses tell them apart.
  const labels = sources.map((row) => short(`${String(row[0])} (${String(row[1])})`));
  const width = Math.max(0, ...labels.map((label) => label.length));
  const lines = [title, `  ${'source'.padEnd(width)}  ${'component'.padStart(11)}  share of the variance`];
  sources.forEach((row, i) => {
    const part = row[share] as number;
    lines.push(`  ${labels[i].padEnd(width)}  ${number(row[component]).padStart(11)}  ${bar(part)} ${(100 * part).toFixed(1)} %`);
  });
  for (const row of after) {
    const [label] = row;
    if (isExact(label) || isNote(label)) continue;
    const [, statement] = row;
    const figure = [row[component], row[u], ...row].find((cell) => typeof cell === 'number');
    lines.push(`  ${String(label)}: ${typeof statement === 'string' && statement.includes('±') ? statement : number(figure)}`);
  }
  const exact = after.filter(([label]) => isExact(label));
  if (exact.length > 0) lines.push('', 'Taken as exact');
  for (const [label, cells] of exact) lines.push(`  ${String(label).replace(EXACT, '')} (${String(cells)})`);
  const notes = after.filter(([label]) => isNote(label));
  if (notes.length > 0) lines.push('', 'Notes');
  for (const [, note] of notes) lines.push(`  ${String(note)}`);
  return lines;
}

const EXACT = /^Taken as exact: /;
const isExact = (cell: unknown): boolean => typeof cell === 'string' && EXACT.test(cell);
const isNote = (cell: unknown): boolean => cell === 'Note';

type Shown = number | string | boolean;

function spilledRows(working: WorkingBook, { sheet, first, left }: NonNullable<EntryOutcome['target']>): Shown[][] {
  const { rows, cols } = working.cell(sheet, first, left)?.array ?? { rows: 1, cols: 1 };
  return Array.from({ length: rows }, (_, r) => Array.from({ length: cols }, (_x, c) => {
    const value = working.cell(sheet, first + r, left + c)?.value ?? '';
    return typeof value === 'object' ? value.error : value;
  }));
}

const bar = (part: number): string => '█'.repeat(Math.round(BAR * part)).padEnd(BAR, '·');
const number = (value: unknown): string => (typeof value === 'number' ? String(Number(value.toPrecision(4))) : String(value ?? ''));
const short = (label: string): string => (label.length > WIDEST_LABEL ? `${label.slice(0, WIDEST_LABEL - 1)}…` : label);
