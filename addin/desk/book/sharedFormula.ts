import { tokenize } from '@borgar/fx';
import { columnName, columnNumber, MAX_COLS, MAX_ROWS } from './area';

/** The formula of the cell at (row, col), both 1-based, that shares its owner's formula. */
export type SharedFormula = (row: number, col: number) => string;

interface End {
  row?: number;
  col?: number;
  fixedRow: boolean;
  fixedCol: boolean;
}
interface Reference {
  prefix: string;
  ends: End[];
  joints: string[];
}

/**
 * Prepares the formula of a shared group's owner, so that each follower costs a few concatenations. Relative references
 * move with the cell; one that would leave the sheet becomes #REF!, it never wraps around.
 *
 * @param formula  Text of the owner, without "=".
 * @param row      Of the owner, 1-based; `col` likewise.
 */
export function sharedFormula(formula: string, row: number, col: number): SharedFormula {
  const pieces: (string | Reference)[] = [];
  for (const token of tokenize(formula, { mergeRefs: true })) {
    const reference = token.type === 'range' || token.type === 'range_beam' || token.type === 'range_ternary' ? readReference(token.value) : undefined;
    if (reference) pieces.push(reference);
    else if (typeof pieces.at(-1) === 'string') pieces.push(pieces.pop() + token.value);
    else pieces.push(token.value);
  }
  return (toRow, toCol) => {
    let text = '';
    for (const piece of pieces) text += typeof piece === 'string' ? piece : move(piece, toRow - row, toCol - col);
    return text;
  };
}

/** `'My sheet'!$A1:B$2` into its prefix and ends; ends are joined by ":", or ".:" and the like where a range is trimmed. */
function readReference(text: string): Reference | undefined {
  const at = text.lastIndexOf('!') + 1;
  const parts = text.slice(at).split(/(\.?:\.?)/);
  const ends: End[] = [];
  for (let i = 0; i < parts.length; i += 2) {
    const match = /^(?:(\$?)([A-Za-z]{1,3}))?(?:(\$?)(\d{1,7}))?$/.exec(parts[i]);
    if (!match || parts[i] === '') return undefined;
    ends.push({
      fixedCol: match[1] === '$', col: match[2] === undefined ? undefined : columnNumber(match[2]),
      fixedRow: match[3] === '$', row: match[4] === undefined ? undefined : Number(match[4]),
    });
  }
  return { prefix: text.slice(0, at), ends, joints: parts.filter((_, i) => i % 2 === 1) };
}

function move({ prefix, ends, joints }: Reference, rows: number, cols: number): string {
  const moved = ends.map((end) => ({
    ...end,
    row: end.row === undefined || end.fixedRow ? end.row : end.row + rows,
    col: end.col === undefined || end.fixedCol ? end.col : end.col + cols,
  }));
  for (const { row, col } of moved) {
    if ((row !== undefined && (row < 1 || row > MAX_ROWS)) || (col !== undefined && (col < 1 || col > MAX_COLS))) return `${prefix}#REF!`;
  }
  if (moved.length === 2) putCornersInOrder(moved[0], moved[1]);
  return prefix + moved.map((end, i) => endText(end) + (joints[i] ?? '')).join('');
}

/** `A1:B$2` moved down by two is `A$2:B3`, not `A3:B$2`. */
function putCornersInOrder(a: End, b: End): void {
  if (a.row !== undefined && b.row !== undefined && a.row > b.row) {
    [a.row, b.row] = [b.row, a.row];
    [a.fixedRow, b.fixedRow] = [b.fixedRow, a.fixedRow];
  }
  if (a.col !== undefined && b.col !== undefined && a.col > b.col) {
    [a.col, b.col] = [b.col, a.col];
    [a.fixedCol, b.fixedCol] = [b.fixedCol, a.fixedCol];
  }
}

function endText({ row, col, fixedRow, fixedCol }: End): string {
  return (col === undefined ? '' : (fixedCol ? '$' : '') + columnName(col)) + (row === undefined ? '' : (fixedRow ? '$' : '') + row);
}
