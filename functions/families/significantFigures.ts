import { shapeOf } from '../arguments';
import { type Cell, type CellResult, type Grid, ZERO_OR_BLANK, showCell, whereIn } from '../cells';
import { each, whole } from '../declaration';
import { type Entry, figuresOf } from '../engine/figures/Entry';
import { antilogFigures, logFigures } from '../engine/figures/logFigures';
import type { Outcome } from '../engine/figures/Outcome';
import { productFigures } from '../engine/figures/productFigures';
import { readEntry } from '../engine/figures/readEntry';
import { sumFigures } from '../engine/figures/sumFigures';
import { roundToDigits } from '../engine/numbers/decimal';
import { refusal, toCellError } from '../errors';
import { entry, flag, number, oneNumber, range } from '../parameters';

const family = 'Significant figures';

const entries = range({ help: 'Entries as written; text keeps its zeros (12.10), 3 exact limits nothing; blank cells are passed over' });
const figures = range({ help: 'Significant figures of entries that are unrounded values; blank: as written; exact: limit nothing', optional: true });
const full = flag('TRUE spills the text, the unrounded value and its significant figures, for the next step');
const result = 'text; with full: text, unrounded value, figures';
const columns = ({ full }: { full: boolean }): number => (full ? 3 : 1);

export const significantFigureFunctions = [
  each({
    name: 'SIG_COUNT',
    family,
    help: 'Number of significant figures of an entry as written. Enter it as text to keep its zeros.',
    parameters: { entry: entry({ help: 'Text such as 12.10 or 1.20e3, or a number, whose last zeros are lost' }) },
    result: 'figures, or exact',
    body: ({ entry }) => figuresCell(figuresOf(readEntry(entry))),
  }),
  each({
    name: 'SIG_ROUND',
    family,
    help: 'Value rounded in decimal to significant figures, a tie to the even digit.',
    parameters: {
      value: number({ help: 'Value', leads: true }),
      figures: oneNumber({ help: 'Significant figures, 1 to 15', atLeast: 1, atMost: 15, whole: true }),
    },
    result: 'value',
    body: ({ value, figures }) => roundToDigits(value, figures, 'even'),
  }),
  whole({
    name: 'SIG_SUM',
    family,
    help: 'Sum of entries, rounded to the decimal place of the coarsest one, as text with its zeros.',
    parameters: { entries, figures, full },
    result,
    body: ({ entries, figures, full }) => [outcomeCells(full, sumFigures(entriesOf('entries', entries, figures)))],
  }),
  whole({
    name: 'SIG_PRODUCT',
    family,
    help: 'Product of entries over divisors, with the figures of the one that has fewest, as text with its zeros.',
    parameters: {
      entries,
      divisors: range({ help: 'Entries that divide; blank for none', optional: true }),
      figures,
      divisor_figures: range({ help: 'Significant figures of divisors that are unrounded values; blank: as written', optional: true }),
      full,
    },
    result,
    body: ({ entries, divisors, figures, divisor_figures: below, full }) => {
      const under = divisors ? entriesOf('divisors', divisors, below, true) : [];
      return [outcomeCells(full, productFigures(entriesOf('entries', entries, figures), under))];
    },
  }),
  each({
    name: 'SIG_LOG',
    family,
    help: 'Decimal logarithm of an entry, with as many decimal places as the entry has figures.',
    parameters: { entry: entry({ help: 'Entry as written, above 0' }), full },
    result,
    columns,
    body: ({ entry, full }) => outcomeCells(full, logFigures(readEntry(entry))),
  }),
  each({
    name: 'SIG_ANTILOG',
    family,
    help: 'Ten to the power of an entry, with as many figures as the entry has decimal places.',
    parameters: { entry: entry({ help: 'Entry as written, with decimal places' }), full },
    result,
    columns,
    body: ({ entry, full }) => outcomeCells(full, antilogFigures(readEntry(entry))),
  }),
];

const figuresCell = (figures: number): CellResult => (figures === Infinity ? 'exact' : figures);

function outcomeCells(full: boolean, { text, unrounded, figures }: Outcome): readonly CellResult[] {
  return full ? [text, unrounded, figuresCell(figures)] : [text];
}

/** The entries of a range, each with the figures given beside it. */
function entriesOf(name: string, grid: Grid, figures: Grid | undefined, mayBeNone = false): Entry[] {
  if (figures && (figures.rows !== grid.rows || figures.cols !== grid.cols))
    throw refusal(`figures must have the shape of ${name}, got ${shapeOf(figures)} for ${shapeOf(grid)}`);
  const found: Entry[] = [];
  for (let row = 0; row < grid.rows; row++) {
    for (let col = 0; col < grid.cols; col++) {
      const cell = grid.cells[row][col];
      if (cell === null) continue;
      const where = whereIn(grid, row, col);
      if (typeof cell !== 'number' && typeof cell !== 'string') throw refusal(`${name} must be numbers or text as written, got ${showCell(cell)}${where}`);
      try {
        found.push(readEntry(cell, countOf(figures?.cells[row][col])));
      } catch (reason) {
        throw toCellError(reason, where);
      }
    }
  }
  if (found.length === 0 && !mayBeNone) throw refusal(`${name} must hold at least one entry`);
  return found;
}

/** A count of figures: undefined for a blank, infinite for `exact`. */
function countOf(cell: Cell | undefined): number | undefined {
  if (cell === null || cell === undefined || cell === ZERO_OR_BLANK) return undefined;
  if (typeof cell === 'string' && /^(exact|inf)$/i.test(cell.trim())) return Infinity;
  if (typeof cell !== 'number') throw refusal(`figures must be whole numbers, exact or blank, got ${showCell(cell)}`);
  return cell;
}
