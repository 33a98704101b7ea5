import { showCell, ZERO_OR_BLANK } from './cells';
import type { Cell } from './cells';
import { EngineError } from './engine/EngineError';
import { parseShape } from './engine/evidence/shape';
import type { Shape } from './engine/evidence/shape';
import { CellError } from './errors';

/** What one row of evidence says, or why it cannot be used. */
export type EvidenceRow = GivenEvidence | BlankEvidence | EvidenceProblem;

export interface GivenEvidence {
  readonly ok: true;
  readonly blank: false;
  /** The word `exact` stands in place of u. */
  readonly exact: boolean;
  /** Standard uncertainty, > 0; 0 where exact. */
  readonly u: number;
  /** Degrees of freedom, > 0; `Infinity` where blank or `inf`. */
  readonly dof: number;
  /** As given; where blank, t for finite degrees of freedom, else normal. */
  readonly shape: Shape;
  /** As written but for outer blanks; absent where blank. */
  readonly tag?: string;
  readonly group?: string;
}

/** All cells of the row are blank. */
export interface BlankEvidence {
  readonly ok: true;
  readonly blank: true;
}

export interface EvidenceProblem {
  readonly ok: false;
  /**
   *     zero      u is 0
   *     noU       u is blank while other cells of the row are filled
   *     doubtful  a cell is 0 or blank, which the host does not tell apart
   *     error     a cell holds an error value
   *     other     anything else
   */
  readonly kind: 'zero' | 'noU' | 'doubtful' | 'error' | 'other';
  /** A phrase without place: `u is the text "0.1", which is no number`. */
  readonly problem: string;
}

/** Most columns that evidence may have: u, degrees of freedom, shape, tag, group. */
export const evidenceColumns = 5;

/**
 * Reads evidence row by row: `u | degrees of freedom | shape | tag | group`, one to five columns, blank cells meaning the default. Numbers
 * stored as text are not coerced.
 *
 * @param cells   As grids hold them, each row of the same length; blanks told from zeros.
 * @returns       One entry a row.
 */
export function readEvidence(cells: readonly (readonly Cell[])[]): readonly EvidenceRow[] {
  return cells.map(readEvidenceRow);
}

function readEvidenceRow(row: readonly Cell[]): EvidenceRow {
  if (row.length > evidenceColumns) return { ok: false, kind: 'other', problem: `evidence has 1 to ${evidenceColumns} columns, got ${row.length}` };
  if (row.every(isBlank)) return { ok: true, blank: true };
  try {
    const exact = typeof row[0] === 'string' && row[0].trim().toLowerCase() === 'exact';
    const u = exact ? 0 : readU(row[0]);
    const dof = readDof(row[1]);
    const shape = readShape(row[2]) ?? { kind: dof < Infinity ? 't' : 'normal' };
    const tag = readLabel('tag', row[3]);
    const group = readLabel('group', row[4]);
    return { ok: true, blank: false, exact, u, dof, shape, ...(tag !== undefined && { tag }), ...(group !== undefined && { group }) };
  } catch (thrown) {
    if (!(thrown instanceof Unusable)) throw thrown;
    return { ok: false, kind: thrown.kind, problem: thrown.message };
  }
}

const isBlank = (cell: Cell): boolean => cell === null || (typeof cell === 'string' && cell.trim() === '');

function readU(cell: Cell): number {
  if (isBlank(cell)) throw problem('noU', 'u is blank; write exact where there is no doubt');
  if (cell === ZERO_OR_BLANK) throw problem('zero', 'u is 0 or blank; write exact where there is no doubt');
  if (cell === 0) throw problem('zero', 'u is 0; write exact where there is no doubt');
  refuseError('u', cell);
  if (typeof cell !== 'number') throw problem('other', `u must be a number > 0 or exact, got ${showCell(cell)}`);
  if (cell < 0) throw problem('other', `u must be > 0, got ${showCell(cell)}`);
  return cell;
}

function readDof(cell: Cell | undefined): number {
  if (cell === undefined || isBlank(cell)) return Infinity;
  refuseDoubt('degrees of freedom', cell);
  refuseError('degrees of freedom', cell);
  if (typeof cell === 'string' && cell.trim().toLowerCase() === 'inf') return Infinity;
  if (typeof cell !== 'number' || !(cell > 0)) throw problem('other', `degrees of freedom must be a number > 0 or inf, got ${showCell(cell)}`);
  return cell;
}

function readShape(cell: Cell | undefined): Shape | undefined {
  // No shape is called 0, so a 0 that may be a blank is one.
  if (cell === undefined || isBlank(cell) || cell === ZERO_OR_BLANK) return undefined;
  refuseError('shape', cell);
  if (typeof cell !== 'string') throw problem('other', `shape must be text, got ${showCell(cell)}`);
  try {
    return parseShape(cell);
  } catch (thrown) {
    if (thrown instanceof EngineError) throw problem('other', thrown.message);
    throw thrown;
  }
}

/** A tag or a group may be a number too. */
function readLabel(name: string, cell: Cell | undefined): string | undefined {
  if (cell === undefined || isBlank(cell)) return undefined;
  refuseDoubt(name, cell);
  refuseError(name, cell);
  if (typeof cell !== 'string' && typeof cell !== 'number') throw problem('other', `${name} must be text, got ${showCell(cell)}`);
  return String(cell).trim();
}

function refuseDoubt(name: string, cell: Cell): void {
  if (cell === ZERO_OR_BLANK)
    throw problem('doubtful', `${name} is 0 or blank, which cannot be told apart here; give evidence without blank cells`);
}

function refuseError(name: string, cell: Cell): void {
  if (cell instanceof CellError) throw problem('error', `${name} is the error ${cell.code}`);
}

const problem = (kind: EvidenceProblem['kind'], words: string): Unusable => new Unusable(kind, words);

/** Leaves this file as an EvidenceProblem only. */
class Unusable extends Error {
  constructor(
    readonly kind: EvidenceProblem['kind'],
    words: string,
  ) {
    super(words);
  }
}
