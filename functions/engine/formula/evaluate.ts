import { EngineError } from '../EngineError';
import { toBool, toNumber, toText } from './coerce';
import type { BinaryOperator, Bound, Expression, Program, RelativeArea } from './expression';
import { kindAt, type Lazy, type Native, type ParameterKind } from './native';
import { binary } from './operators';
import type { RowState } from './rowState';
import type { Run } from './run';
import { type Scalar, BLANK, NONE, err, num } from './scalar';
import { Steps } from './steps';
import { type Area, type Matrix, type Union, type Value, MISSING, at, isReference, isScalar, matrix } from './value';

export const MAX_ROWS = 1048576;
export const MAX_COLS = 16384;

/** A table of the workbook: its whole area, and how many of its rows are headers and totals. */
export interface TableShape {
  readonly area: Area;
  readonly columns: readonly string[];
  readonly headerRows: number;
  readonly totalsRows: number;
}

/** What the evaluation of a formula asks of the workbook around it. */
export interface Cells {
  cell(sheet: number, row: number, col: number): Scalar;
  read(area: Area): Matrix;
  used(sheet: number): { rows: number; cols: number };
  rowState(sheet: number, row: number): RowState;
  /** The formula (R1C1, with its `=`) that stands in a cell, if one does. */
  formulaAt(sheet: number, row: number, col: number): string | undefined;
  sheetIndex(name: string): number | undefined;
  /** A defined name seen from a sheet: its formula, compiled. */
  name(name: string, sheet: number): Program | undefined;
  /** A table by name, or with an empty name the table around a cell. */
  table(name: string, sheet: number, row: number, col: number): TableShape | undefined;
  /** The range that the formula at this cell spilled over. */
  spilled(sheet: number, row: number, col: number): Area | undefined;
  /** The value of a call that many cells share: computed once. */
  shared(key: string, compute: () => Value): Value;
  /** The value of a call that only the host can run. */
  host(name: string, args: readonly Value[], site: number): Value;
}

/** Names bound by LET and LAMBDA, innermost first. */
interface Scope {
  readonly name: string;
  readonly value: Value;
  readonly outer: Scope | undefined;
}

const DEEPEST = 200;

/** Functions whose parameters are of the array class. @source the file format's tables of parameter classes, from memory */
const TAKES_ARRAYS = new Set([
  'SUMPRODUCT', 'LOOKUP', 'LINEST', 'LOGEST', 'TREND', 'GROWTH', 'MMULT', 'MDETERM', 'MINVERSE', 'FREQUENCY', 'SLOPE', 'INTERCEPT',
  'RSQ', 'CORREL', 'PEARSON', 'STEYX', 'FORECAST', 'FORECAST.LINEAR', 'COVAR', 'SUMX2MY2', 'SUMX2PY2', 'SUMXMY2', 'MODE', 'PROB',
]);

/** Arrays that a formula makes may have so many cells. */
const LARGEST_ARRAY = 4e6;

/** Evaluates compiled formulas over the cells of a workbook. One object serves many cells, one at a time. */
export class Evaluator implements Run {
  steps = new Steps();
  sheet = 0;
  row = 1;
  col = 1;
  private implicit = false;
  private scope: Scope | undefined;
  private depth = 0;

  constructor(private readonly cells: Cells) {}

  /**
   * The value of a program at a cell: a scalar or a matrix, never a reference.
   *
   * @param implicit  True where a range in a scalar's place means the cell in the same row or column, not all of it.
   * @throws EngineError "refused" with the rest of a sentence that begins with the cell.
   */
  run(program: Program, sheet: number, row: number, col: number, implicit: boolean): Scalar | Matrix {
    this.sheet = sheet;
    this.row = row;
    this.col = col;
    this.implicit = implicit;
    this.scope = undefined;
    this.depth = 0;
    const { root } = program;
    if (root.k === 'binary' && (root.operator === '+' || root.operator === '-')) return this.finish(this.lastSum(root));
    return this.finish(this.evaluate(root));
  }

  /** Runs `compute` with steps of its own; used for what is shared by several cells. */
  apart<T>(compute: () => T): { result: T; steps: Steps } {
    const outer = this.steps;
    const steps = new Steps();
    steps.recording = outer.recording;
    this.steps = steps;
    try {
      return { result: compute(), steps };
    } finally {
      this.steps = outer;
    }
  }

  matrix(value: Value): Matrix {
    switch (value.k) {
      case 'matrix':
        return value;
      case 'area':
        return isOneCell(value) ? matrix(1, 1, [this.at(value)]) : this.cellsOf(value);
      case 'union':
        return value.areas.length === 1 ? this.matrix(value.areas[0]) : matrix(1, 1, [err('#VALUE!')]);
      case 'lambda':
        return matrix(1, 1, [err('#CALC!')]);
      case 'missing':
        return matrix(1, 1, [BLANK]);
      default:
        return matrix(1, 1, [value]);
    }
  }

  areas(value: Value): readonly Area[] | undefined {
    if (value.k === 'area') return [value];
    return value.k === 'union' ? value.areas : undefined;
  }

  parts(value: Value): readonly (Area | Exclude<Value, Union>)[] {
    return value.k === 'union' ? value.areas : [value];
  }

  scalar(value: Value): Scalar {
    if (isScalar(value)) return value;
    switch (value.k) {
      case 'area':
        if (isOneCell(value)) return this.at(value);
        return this.implicit ? this.intersected(value) : at(this.matrix(value), 0, 0);
      case 'matrix':
        return at(value, 0, 0);
      case 'union':
        return err('#VALUE!');
      case 'lambda':
        return err('#CALC!');
      case 'missing':
        return BLANK;
    }
  }

  used(sheet: number): { rows: number; cols: number } {
    return this.cells.used(sheet);
  }

  rowState(sheet: number, row: number): RowState {
    return this.cells.rowState(sheet, row);
  }

  formulaAt(sheet: number, row: number, col: number): string | undefined {
    return this.cells.formulaAt(sheet, row, col);
  }

  sheetNamed(name: string): number | undefined {
    return this.cells.sheetIndex(name);
  }

  lift(
    args: readonly Value[],
    kindOf: (i: number) => ParameterKind,
    body: (run: Run, args: readonly (Scalar | undefined)[]) => Scalar,
  ): Value {
    const plain: (Scalar | Matrix | undefined)[] = args.map((a) => this.liftable(a));
    const matrices = plain.filter((p): p is Matrix => p?.k === 'matrix');
    if (matrices.length === 0) return this.once(plain as (Scalar | undefined)[], kindOf, body);
    return broadcast(matrices, (i, j) =>
      this.once(plain.map((p) => (p?.k === 'matrix' ? spread(p, i, j) : p)), kindOf, body),
    );
  }

  evaluate(e: Expression): Value {
    if (++this.depth > DEEPEST) throw new EngineError('refused', 'nests formulas and names too deeply to be followed');
    try {
      return this.step(e);
    } finally {
      this.depth--;
    }
  }

  private step(e: Expression): Value {
    switch (e.k) {
      case 'constant':
        return e.value;
      case 'array':
        return matrix(e.rows, e.cols, e.cells);
      case 'reference':
        return this.area(e.reference);
      case 'sheets':
        return this.across(e.first, e.last, e.reference);
      case 'table':
        return this.tablePart(e.table, e.columns, e.sections);
      case 'name':
        return this.named(e.name, e.sheet);
      case 'unary':
        return this.unary(e.operator, e.of);
      case 'binary':
        return this.operate(e.operator, this.evaluate(e.left), this.evaluate(e.right));
      case 'range':
      case 'union':
      case 'intersection':
        return this.referenceOperator(e.k, this.evaluate(e.left), this.evaluate(e.right));
      case 'spill':
        return this.spill(this.evaluate(e.of));
      case 'single': {
        const v = this.evaluate(e.of);
        if (v.k !== 'area') return isScalar(v) ? v : this.scalar(v);
        return isOneCell(v) ? v : this.intersected(v);
      }
      case 'call':
        return this.call(e);
      case 'host':
        return this.cells.host(e.name, e.args.map((a) => (a ? this.evaluate(a) : MISSING)), e.site);
      case 'apply':
        return this.apply(e);
      case 'let':
        return this.bound(e.names, e.values, () => this.evaluate(e.body));
      case 'lambda': {
        const scope = this.scope;
        return { k: 'lambda', parameters: e.parameters.length, call: (args) => this.within(scope, e.parameters, args, e.body) };
      }
      case 'refuse':
        throw new EngineError('refused', e.why);
    }
  }

  private finish(value: Value): Scalar | Matrix {
    if (isScalar(value) || value.k === 'matrix') return value;
    if (value.k === 'area') {
      if (isOneCell(value)) return zeroForBlank(this.at(value));
      return this.implicit ? zeroForBlank(this.intersected(value)) : mapped(this.matrix(value), zeroForBlank);
    }
    return value.k === 'missing' ? BLANK : this.scalar(value);
  }

  private liftable(a: Value): Scalar | Matrix | undefined {
    if (a.k === 'missing') return undefined;
    if (isScalar(a)) return a;
    if (a.k === 'area' && isOneCell(a)) return this.at(a);
    if (a.k === 'area' && this.implicit) return this.intersected(a);
    const m = this.matrix(a);
    return m.rows === 1 && m.cols === 1 ? at(m, 0, 0) : m;
  }

  private once(
    args: readonly (Scalar | undefined)[],
    kindOf: (i: number) => ParameterKind,
    body: (run: Run, args: readonly (Scalar | undefined)[]) => Scalar,
  ): Scalar {
    const coerced: (Scalar | undefined)[] = [];
    for (let i = 0; i < args.length; i++) {
      const a = args[i];
      const kind = kindOf(i);
      const c = a === undefined || kind === 'scalar' ? a : coerce(this.steps, a, kind);
      if (c !== undefined && c.k === 'error' && kind !== 'scalar') return c;
      coerced.push(c);
    }
    return body(this, coerced);
  }

  private unary(operator: '-' | '+' | '%', of: Expression): Value {
    const value = this.evaluate(of);
    if (operator === '+') return value;
    return this.lift([value], () => 'number', (_run, [x]) => {
      const v = (x as { v: number }).v;
      return operator === '-' ? this.steps.unary(-v, x!, -1) : this.steps.unary(v / 100, x!, 0.01);
    });
  }

  private operate(operator: BinaryOperator, left: Value, right: Value): Value {
    const a = isScalar(left) ? left : this.liftable(left);
    const b = isScalar(right) ? right : this.liftable(right);
    if (a !== undefined && b !== undefined && a.k !== 'matrix' && b.k !== 'matrix') return binary(this.steps, operator, a, b);
    return this.lift([a ?? MISSING, b ?? MISSING], () => 'scalar', (_run, [x, y]) => binary(this.steps, operator, x ?? BLANK, y ?? BLANK));
  }

  /**
   * Excel's last step: where a formula ends in a sum or difference that cancels to within a few units of the last binary place,
   * the sheet shows exactly 0 (`=0.5-0.4-0.1`).
   *
   * @source common practice (the vendor's note on floating-point results); the width of 2^-50 from memory
   */
  private lastSum(root: Extract<Expression, { k: 'binary' }>): Value {
    const left = this.evaluate(root.left);
    const right = this.evaluate(root.right);
    const value = this.operate(root.operator, left, right);
    if (value.k !== 'number' || value.v === 0) return value;
    const a = this.scalar(left);
    const b = this.scalar(right);
    if (a.k !== 'number' || b.k !== 'number') return value;
    return Math.abs(value.v) <= 2 ** -50 * Math.max(Math.abs(a.v), Math.abs(b.v)) ? num(0, value.d) : value;
  }

  private call(e: Extract<Expression, { k: 'call' }>): Value {
    const { native } = e;
    if (native.lazy) return native.lazy(this, e.args.map((a) => this.lazily(a)));
    const args = this.argumentsOf(e);
    if (e.shared) return this.cells.shared(`${native.name}(${e.args.map((_, i) => keyOf(args[i])).join(';')})`, () => this.callBody(native, args));
    return this.callBody(native, args);
  }

  /** Arguments of a call. Some functions take whole arrays even where the sheet intersects: `SUMPRODUCT(A1:A3^2,B1:B3)`. */
  private argumentsOf({ native, args }: Extract<Expression, { k: 'call' }>): Value[] {
    const implicit = this.implicit;
    if (TAKES_ARRAYS.has(native.name)) this.implicit = false;
    try {
      return args.map((a) => (a ? this.evaluate(a) : MISSING));
    } finally {
      this.implicit = implicit;
    }
  }

  /**
   * Calls a native function. Where only some parameters are ranges, the others are coerced here, and a range or matrix in
   * such a place makes one call an element (`LARGE(A1:A9, {1,2,3})`).
   */
  private callBody(native: Native, args: readonly Value[]): Value {
    if (native.kinds.every((k) => k !== 'range')) return native.body(this, args);
    const kinds = args.map((_, i) => kindAt(native.kinds, native.repeating, i));
    const plain = args.map((a, i) => (kinds[i] === 'range' || a.k === 'missing' ? a : this.liftable(a)!));
    const many = plain.filter((p, i): p is Matrix => kinds[i] !== 'range' && p.k === 'matrix');
    const coerced = (p: Value, i: number): Value =>
      kinds[i] === 'range' || kinds[i] === 'scalar' || !isScalar(p) ? p : coerce(this.steps, p, kinds[i]);
    if (many.length === 0) return native.body(this, plain.map(coerced));
    return broadcast(many, (r, c) =>
      this.scalar(native.body(this, plain.map((p, i) => coerced(kinds[i] !== 'range' && p.k === 'matrix' ? spread(p, r, c) : p, i)))),
    );
  }

  private lazily(e: Expression | null): Lazy {
    const scope = this.scope;
    return {
      missing: e === null,
      value: () => {
        if (!e) return MISSING;
        const now = this.scope;
        this.scope = scope;
        try {
          return this.evaluate(e);
        } finally {
          this.scope = now;
        }
      },
    };
  }

  private apply(e: Extract<Expression, { k: 'apply' }>): Value {
    if (e.callee.k === 'name' && !this.isKnown(e.callee.name)) {
      throw new EngineError('refused', `uses ${e.callee.name.toUpperCase()}, which cannot be followed`);
    }
    const callee = this.evaluate(e.callee);
    if (callee.k !== 'lambda') return err('#VALUE!');
    return callee.call(e.args.map((a) => (a ? this.evaluate(a) : MISSING)));
  }

  private isKnown(name: string): boolean {
    for (let s = this.scope; s; s = s.outer) if (s.name === name.toLowerCase()) return true;
    return this.cells.name(name, this.sheet) !== undefined;
  }

  private bound<T>(names: readonly string[], values: readonly Expression[], then: () => T): T {
    const outer = this.scope;
    try {
      for (let i = 0; i < names.length; i++) this.scope = { name: names[i], value: this.evaluate(values[i]), outer: this.scope };
      return then();
    } finally {
      this.scope = outer;
    }
  }

  private within(scope: Scope | undefined, parameters: readonly string[], args: Value[], body: Expression): Value {
    if (args.length > parameters.length) return err('#VALUE!');
    const now = this.scope;
    this.scope = scope;
    for (let i = 0; i < parameters.length; i++) this.scope = { name: parameters[i], value: args[i] ?? MISSING, outer: this.scope };
    try {
      return this.evaluate(body);
    } finally {
      this.scope = now;
    }
  }

  private area(r: RelativeArea): Value {
    const sheet = r.sheet === undefined ? this.sheet : this.cells.sheetIndex(r.sheet);
    return sheet === undefined ? err('#REF!') : this.placed(r, sheet);
  }

  private placed(r: RelativeArea, sheet: number): Value {
    const area = placeArea(r, sheet, this.row, this.col);
    return area ?? err('#REF!');
  }

  private across(first: string, last: string, r: RelativeArea): Value {
    const a = this.cells.sheetIndex(first);
    const b = this.cells.sheetIndex(last);
    if (a === undefined || b === undefined) return err('#REF!');
    const areas: Area[] = [];
    for (let s = Math.min(a, b); s <= Math.max(a, b); s++) {
      const area = this.placed(r, s);
      if (area.k === 'area') areas.push(area);
      else return err('#REF!');
    }
    return { k: 'union', areas };
  }

  private tablePart(name: string, columns: readonly string[], sections: readonly string[]): Value {
    const table = this.cells.table(name, this.sheet, this.row, this.col);
    if (!table) return err('#REF!');
    return tableArea(table, columns, sections, this.row) ?? err('#VALUE!');
  }

  private named(name: string, sheet: string | undefined): Value {
    if (sheet === undefined) {
      const key = name.toLowerCase();
      for (let s = this.scope; s; s = s.outer) if (s.name === key) return s.value;
    }
    const home = sheet === undefined ? this.sheet : this.cells.sheetIndex(sheet);
    if (home === undefined) return err('#REF!');
    const program = this.cells.name(name, home);
    if (!program) return this.cells.table(name, home, this.row, this.col) ? this.tablePart(name, [], []) : err('#NAME?'); // a table's bare name is its data
    const scope = this.scope;
    this.scope = undefined;
    try {
      return this.evaluate(program.root);
    } finally {
      this.scope = scope;
    }
  }

  private referenceOperator(operator: 'range' | 'union' | 'intersection', left: Value, right: Value): Value {
    if (left.k === 'error') return left;
    if (right.k === 'error') return right;
    if (!isReference(left) || !isReference(right)) return err('#VALUE!');
    const a = this.areas(left)!;
    const b = this.areas(right)!;
    if (operator === 'union') return { k: 'union', areas: [...a, ...b] };
    if (a.length !== 1 || b.length !== 1 || a[0].sheet !== b[0].sheet) return err('#VALUE!');
    const [p, q] = [a[0], b[0]];
    if (operator === 'range') {
      return {
        k: 'area', sheet: p.sheet, by: this.either(p, q),
        r1: Math.min(p.r1, q.r1), c1: Math.min(p.c1, q.c1), r2: Math.max(p.r2, q.r2), c2: Math.max(p.c2, q.c2),
      };
    }
    const r1 = Math.max(p.r1, q.r1);
    const c1 = Math.max(p.c1, q.c1);
    const r2 = Math.min(p.r2, q.r2);
    const c2 = Math.min(p.c2, q.c2);
    return r1 > r2 || c1 > c2 ? err('#NULL!') : { k: 'area', sheet: p.sheet, r1, c1, r2, c2, by: this.either(p, q) };
  }

  private either(p: Area, q: Area): Scalar | undefined {
    return p.by && q.by ? this.steps.many(0, [p.by, q.by], 0) : (p.by ?? q.by);
  }

  private spill(of: Value): Value {
    if (of.k !== 'area' || of.r1 !== of.r2 || of.c1 !== of.c2) return err('#REF!');
    return this.cells.spilled(of.sheet, of.r1, of.c1) ?? err('#REF!');
  }

  private intersected(area: Area): Scalar {
    const row = area.r1 === area.r2 ? area.r1 : this.row;
    const col = area.c1 === area.c2 ? area.c1 : this.col;
    if (row < area.r1 || row > area.r2 || col < area.c1 || col > area.c2) return err('#VALUE!');
    return this.decided(this.cells.cell(area.sheet, row, col), area);
  }

  /** The one cell of an area. */
  private at(area: Area): Scalar {
    return this.decided(this.cells.cell(area.sheet, area.r1, area.c1), area);
  }

  private cellsOf(area: Area): Matrix {
    const m = this.cells.read(area);
    return area.by && area.by.d !== NONE ? mapped(m, (s) => this.decided(s, area)) : m;
  }

  private decided(s: Scalar, { by }: Area): Scalar {
    return by && by.d !== NONE ? this.steps.chosen(s, by) : s;
  }
}

const isOneCell = (a: Area): boolean => a.r1 === a.r2 && a.c1 === a.c2;

/** Where a relative rectangle lies for a formula at a cell; undefined where it leaves the sheet. */
export function placeArea(r: RelativeArea, sheet: number, row: number, col: number): Area | undefined {
  const r1 = place(r.r1, row, 1);
  const r2 = place(r.r2, row, MAX_ROWS);
  const c1 = place(r.c1, col, 1);
  const c2 = place(r.c2, col, MAX_COLS);
  const low = Math.min(r1, r2);
  const high = Math.max(r1, r2);
  const left = Math.min(c1, c2);
  const right = Math.max(c1, c2);
  if (low < 1 || left < 1 || high > MAX_ROWS || right > MAX_COLS) return undefined;
  return { k: 'area', sheet, r1: low, c1: left, r2: high, c2: right };
}

const place = (b: Bound | null, here: number, open: number): number => (b === null ? open : b.absolute ? b.at : here + b.at);

/** The area that a structured reference means for a formula in `row`; undefined where it means none. */
export function tableArea(table: TableShape, columns: readonly string[], sections: readonly string[], row: number): Area | undefined {
  const { area } = table;
  let c1 = area.c1;
  let c2 = area.c2;
  if (columns.length > 0) {
    const places = columns.map((name) => table.columns.findIndex((c) => c.toLowerCase() === name.toLowerCase()));
    if (places.includes(-1)) return undefined;
    c1 = area.c1 + Math.min(...places);
    c2 = area.c1 + Math.max(...places);
  }
  const first = area.r1 + table.headerRows;
  const last = area.r2 - table.totalsRows;
  const wanted = new Set(sections.map((s) => s.toLowerCase().replace(/^#/, '')));
  let r1 = first;
  let r2 = last;
  if (wanted.has('this row')) {
    if (row < first || row > last) return undefined;
    r1 = r2 = row;
  } else if (wanted.has('all')) {
    r1 = area.r1;
    r2 = area.r2;
  } else if (wanted.size > 0) {
    r1 = wanted.has('headers') ? area.r1 : wanted.has('data') ? first : last + 1;
    r2 = wanted.has('totals') ? area.r2 : wanted.has('data') ? last : first - 1;
  }
  return r1 > r2 ? undefined : { k: 'area', sheet: area.sheet, r1, c1, r2, c2 };
}

function coerce(steps: Steps, s: Scalar, kind: ParameterKind): Scalar {
  switch (kind) {
    case 'number':
      return toNumber(steps, s);
    case 'text':
      return toText(steps, s);
    case 'boolean':
      return toBool(steps, s);
    default:
      return s;
  }
}

const zeroForBlank = (s: Scalar): Scalar => (s.k === 'blank' ? num(0, s.d) : s);

const mapped = (m: Matrix, f: (s: Scalar) => Scalar): Matrix => ({ ...m, cells: m.cells.map(f), fill: f(m.fill) });

/** The element of a matrix at (i, j) of the common shape: single rows and columns repeat, what lies outside is #N/A. */
function spread(m: Matrix, i: number, j: number): Scalar {
  const r = m.rows === 1 ? 0 : i;
  const c = m.cols === 1 ? 0 : j;
  return r < m.rows && c < m.cols ? at(m, r, c) : err('#N/A');
}

/** One scalar for each element of the common shape of matrices. */
function broadcast(matrices: readonly Matrix[], element: (i: number, j: number) => Scalar): Matrix {
  const rows = Math.max(...matrices.map((m) => m.rows));
  const cols = Math.max(...matrices.map((m) => m.cols));
  const partial = matrices.every((m) => m.rows === rows && m.cols === cols || (m.rows === 1 && m.cols === 1) || m.rows === rows && m.width === m.cols);
  const height = partial ? Math.max(...matrices.map((m) => (m.rows === 1 ? 1 : m.height))) : rows;
  const width = partial ? Math.max(...matrices.map((m) => (m.cols === 1 ? 1 : m.width))) : cols;
  if (height * width > LARGEST_ARRAY) throw new EngineError('refused', `makes an array of ${rows} × ${cols} cells, which is more than can be followed`);
  const cells: Scalar[] = [];
  for (let i = 0; i < height; i++) for (let j = 0; j < width; j++) cells.push(element(i, j));
  const fill = height < rows ? element(height, 0) : width < cols ? element(0, width) : BLANK;
  return { k: 'matrix', rows, cols, height, width, cells, fill };
}

function keyOf(value: Value): string {
  switch (value.k) {
    case 'area':
      return `${value.sheet}!${value.r1},${value.c1},${value.r2},${value.c2}`;
    case 'matrix':
      return `{${value.cells.map((s) => `${s.k}${String(s.v)}`).join(',')}/${value.cols}}`;
    case 'union':
      return value.areas.map(keyOf).join('+');
    case 'missing':
    case 'lambda':
      return value.k;
    default:
      return `${value.k}${String(value.v)}`;
  }
}
