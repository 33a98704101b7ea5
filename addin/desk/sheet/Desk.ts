import type { Book } from '../book/Book';
import { BookError } from '../book/BookError';
import { writeBook } from '../book/writeBook';
import type { FunctionsMetadata } from '../../../functions/metadata';
import { compile } from '../../../functions/engine/formula/compile';
import { nativeNamed } from '../../../functions/engine/formula/natives';
import { bookEdits } from './bookEdits';
import { bookPort } from './bookPort';
import { createFunctionHost } from './functionHost';
import type { LoadedFunctions } from './functionHost';
import { FunctionNames } from './functionNames';
import { needsArray } from './needsArray';
import { Recalculator } from './recalculate';
import type { Progress, Recalculation } from './recalculate';
import { valueEdits } from './valueEdits';
import { WorkingBook } from './WorkingBook';

/** The built functions: what Excel loads. */
export interface FunctionBundle {
  /** Text of functions.js; or what it associated when it was loaded as a script. */
  readonly source?: string;
  readonly loaded?: LoadedFunctions;
  /** Text of functions.json. */
  readonly metadata: string;
}

/** An open workbook with the functions beside it: it can be edited, recalculated and written. */
export class Desk {
  readonly working: WorkingBook;
  readonly names: FunctionNames;
  private readonly recalculator: Recalculator;
  private leftOpen = false;

  /** @throws BookError for a workbook that calculates in a way that is not followed here. */
  constructor(book: Book, bundle: FunctionBundle) {
    if (!book.fullPrecision) throw new BookError('the workbook calculates with precision as displayed, which is not followed here: switch that off and save it first');
    const { functions } = JSON.parse(bundle.metadata) as FunctionsMetadata;
    this.names = new FunctionNames(functions.map(({ id }) => id));
    this.working = new WorkingBook(book, this.names);
    const host = createFunctionHost({ ...bundle, port: bookPort(this.working) });
    this.recalculator = new Recalculator(this.working, host);
  }

  /** Whether a stored formula is one that only a dynamic array computes as it was typed. */
  needsArray(formula: string): boolean {
    const isHost = (name: string): boolean => this.names.idOf(name) !== undefined;
    return needsArray(compile(this.working.relative(formula, 1, 1), { native: nativeNamed, isHost }).root);
  }

  /** Computes what has to be computed since the last time. */
  async recalculate(progress?: Progress): Promise<Recalculation> {
    const outcome = await this.recalculator.run(progress);
    this.leftOpen = outcome.leftOpen;
    return outcome;
  }

  /**
   * The file with what changed written into it. Where results were left open, whoever opens the file is asked to calculate.
   *
   * @param values   True for a copy in which the library's results are plain values, for readers without the add-in.
   */
  write(values = false): Uint8Array {
    const edits = values ? valueEdits(this.working) : bookEdits(this.working);
    return writeBook(this.working.book, edits, { recalculate: this.leftOpen && !values });
  }
}
