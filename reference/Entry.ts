/** What the reference says of a function beyond its declaration. */
export interface Entry {
  /** When a laboratory reaches for it. */
  readonly purpose: string;
  readonly example: Example;
  /** The formula, in plain text. */
  readonly formula: string;
  /** Published source; "common practice" where there is none, "from memory" where it was not at hand. */
  readonly source: string;
  readonly cautions: readonly string[];
}

/** A piece of a sheet that the tests run. */
export interface Example {
  /** One sentence of story. */
  readonly story: string;
  /** Cells by address; texts that begin with = are formulas. */
  readonly cells: Readonly<Record<string, number | string>>;
  readonly at: string;
  /** With its =, as it is typed into the cell `at`. */
  readonly formula: string;
  /** Of a wide result, the columns that are shown (from 1); then `shows` may hold its first rows alone. */
  readonly columns?: readonly number[];
  /** What it shows, row by row, rounded to the digits that are written. */
  readonly shows: readonly (readonly string[])[];
}
