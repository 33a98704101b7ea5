import type { Native } from './native';
import type { Scalar } from './scalar';

/** A formula as it is evaluated: compiled once for each distinct text in relative (R1C1) form. */
export type Expression =
  | { readonly k: 'constant'; readonly value: Scalar; readonly literal?: string }
  | { readonly k: 'array'; readonly rows: number; readonly cols: number; readonly cells: readonly Scalar[] }
  | { readonly k: 'reference'; readonly reference: RelativeArea }
  | { readonly k: 'sheets'; readonly first: string; readonly last: string; readonly reference: RelativeArea }
  | { readonly k: 'table'; readonly table: string; readonly columns: readonly string[]; readonly sections: readonly string[] }
  | { readonly k: 'name'; readonly name: string; readonly sheet?: string }
  | { readonly k: 'unary'; readonly operator: '-' | '+' | '%'; readonly of: Expression }
  | { readonly k: 'binary'; readonly operator: BinaryOperator; readonly left: Expression; readonly right: Expression }
  | { readonly k: 'range' | 'union' | 'intersection'; readonly left: Expression; readonly right: Expression }
  | { readonly k: 'spill' | 'single'; readonly of: Expression }
  | { readonly k: 'call'; readonly native: Native; readonly args: readonly (Expression | null)[]; readonly shared: boolean }
  | { readonly k: 'host'; readonly name: string; readonly args: readonly (Expression | null)[]; readonly site: number }
  | { readonly k: 'apply'; readonly callee: Expression; readonly args: readonly (Expression | null)[] }
  | { readonly k: 'let'; readonly names: readonly string[]; readonly values: readonly Expression[]; readonly body: Expression }
  | { readonly k: 'lambda'; readonly parameters: readonly string[]; readonly body: Expression }
  | { readonly k: 'refuse'; readonly why: string };

export type BinaryOperator = '+' | '-' | '*' | '/' | '^' | '&' | '=' | '<>' | '<' | '<=' | '>' | '>=';

/**
 * A rectangle relative to the cell that holds the formula. Rows and columns are 1-based where absolute, offsets where not;
 * null bounds mean whole columns or rows.
 */
export interface RelativeArea {
  readonly sheet?: string;
  readonly r1: Bound | null;
  readonly c1: Bound | null;
  readonly r2: Bound | null;
  readonly c2: Bound | null;
}

export interface Bound {
  readonly at: number;
  readonly absolute: boolean;
}

/** What a formula text compiles to. */
export interface Program {
  readonly root: Expression;
  /** References that any evaluation reads, whichever way its decisions fall: they can be fetched beforehand. */
  readonly reads: readonly RelativeArea[];
  /** Number literals that enter the arithmetic, as written. */
  readonly literals: readonly string[];
  /** Names that the formula uses, LET variables among them. */
  readonly names: readonly string[];
  /** True if the formula calls a function that rounds, whose slope is taken as 1. */
  readonly rounds: boolean;
  /** True if the formula calls a function that only the host can run. */
  readonly callsHost: boolean;
}
