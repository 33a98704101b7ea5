import { parse, parseR1C1Ref, parseStructRef, tokenize } from '@borgar/fx';
import type { BinaryOperator, Bound, Expression, Program, RelativeArea } from './expression';
import { kindAt, type Native } from './native';
import { BLANK, type ErrorCode, type Scalar, bool, err, num, text } from './scalar';

/** What names in call position may mean. */
export interface FunctionTable {
  native(name: string): Native | undefined;
  /** True for a function that the host runs (a custom function on the desk). */
  isHost(name: string): boolean;
}

/** A node of the syntax tree, as far as it is looked at. */
interface Node {
  type: string;
  operator?: string;
  value?: unknown;
  raw?: string;
  kind?: string;
  name?: string;
  arguments?: (Node | null)[];
  elements?: Node[][];
  callee?: Node;
  declarations?: { id: Node; init: Node }[];
  params?: Node[];
  body?: Node;
  id?: Node;
}

const STORED_PREFIX = /^(_xlfn\.|_xlws\.|_xlpm\.)+/i;

/**
 * Compiles a formula in relative (R1C1, en-US) form, with or without its leading `=`.
 * What cannot be followed becomes a step that refuses when it is reached, so that an untaken branch does no harm.
 */
export function compile(formula: string, table: FunctionTable): Program {
  const compiler = new Compiler(table);
  let root: Expression;
  try {
    const tokens = tokenize(formula.startsWith('=') ? formula : `=${formula}`, { mergeRefs: true, r1c1: true });
    for (const token of tokens) {
      if (token.type === 'func' || token.type === 'range_named') token.value = token.value.replace(STORED_PREFIX, '');
      else if (/#REF!/i.test(token.value) && token.type.startsWith('range')) {
        token.type = 'error';
        token.value = '#REF!';
      }
    }
    root = compiler.expression(parse(tokens, { r1c1: true } as never) as unknown as Node);
  } catch (problem) {
    if (!(problem instanceof Error)) throw problem;
    root = { k: 'refuse', why: `holds a formula that cannot be read (${problem.message})` };
  }
  return {
    root,
    reads: [...readsOf(root)],
    literals: [...new Set(literalsOf(root, true))],
    names: [...new Set(compiler.names)],
    rounds: compiler.rounds,
    callsHost: compiler.hostCalls > 0,
  };
}

class Compiler {
  hostCalls = 0;
  rounds = false;
  readonly names: string[] = [];

  constructor(private readonly table: FunctionTable) {}

  expression(node: Node | null): Expression {
    if (!node) return { k: 'constant', value: BLANK };
    switch (node.type) {
      case 'Literal':
        return { k: 'constant', value: literal(node.value), literal: typeof node.value === 'number' ? node.raw : undefined };
      case 'ErrorLiteral':
        return { k: 'constant', value: err(String(node.value).toUpperCase() as ErrorCode) };
      case 'ArrayExpression':
        return this.array(node.elements!);
      case 'ReferenceIdentifier':
        return this.named(reference(String(node.value), node.kind!));
      case 'Identifier':
        return this.named({ k: 'name', name: node.name! });
      case 'UnaryExpression':
        return this.unary(node);
      case 'BinaryExpression':
        return this.binary(node);
      case 'CallExpression':
        return this.call(node);
      case 'LetExpression':
        return {
          k: 'let',
          names: node.declarations!.map((d) => d.id.name!.toLowerCase()),
          values: node.declarations!.map((d) => this.expression(d.init)),
          body: this.expression(node.body!),
        };
      case 'LambdaExpression':
        return { k: 'lambda', parameters: node.params!.map((p) => p.name!.toLowerCase()), body: this.expression(node.body!) };
      default:
        return { k: 'refuse', why: `holds ${node.type}, which cannot be followed` };
    }
  }

  private named(e: Expression): Expression {
    if (e.k === 'name') this.names.push(e.name);
    return e;
  }

  private unary(node: Node): Expression {
    const of = this.expression(node.arguments![0]);
    switch (node.operator) {
      case '-':
      case '+':
      case '%':
        return { k: 'unary', operator: node.operator, of };
      case '#':
        return { k: 'spill', of };
      case '@':
        return { k: 'single', of };
      default:
        return { k: 'refuse', why: `uses the operator ${node.operator}, which cannot be followed` };
    }
  }

  private binary(node: Node): Expression {
    const [left, right] = node.arguments!.map((a) => this.expression(a));
    switch (node.operator) {
      case ':':
        return { k: 'range', left, right };
      case ',':
        return { k: 'union', left, right };
      case ' ':
        return { k: 'intersection', left, right };
      default:
        return { k: 'binary', operator: node.operator as BinaryOperator, left, right };
    }
  }

  private call(node: Node): Expression {
    const args = node.arguments!.map((a) => (a ? this.expression(a) : null));
    if (node.callee!.type !== 'Identifier') return { k: 'apply', callee: this.expression(node.callee!), args };
    const name = node.callee!.name!.toUpperCase();
    if (name === 'ANCHORARRAY') return { k: 'spill', of: args[0] ?? { k: 'constant', value: err('#REF!') } };
    if (name === 'SINGLE') return { k: 'single', of: args[0] ?? { k: 'constant', value: err('#VALUE!') } };
    const native = this.table.native(name);
    if (native) {
      if (ROUNDING.has(name)) this.rounds = true;
      if (args.length < native.least || args.length > native.most) {
        return { k: 'refuse', why: `gives ${name} ${args.length} arguments, which takes ${native.least} to ${native.most}` };
      }
      return { k: 'call', native, args, shared: native.shareable && isSharedCall(native, args) };
    }
    if (this.table.isHost(name)) return { k: 'host', name, args, site: this.hostCalls++ };
    return { k: 'apply', callee: { k: 'name', name: node.callee!.name! }, args }; // a named LAMBDA, or nothing we know
  }

  private array(elements: Node[][]): Expression {
    const cells: Scalar[] = [];
    for (const row of elements) {
      for (const node of row) {
        const e = this.expression(node);
        if (e.k === 'constant') cells.push(e.value);
        else if (e.k === 'unary' && e.of.k === 'constant' && e.of.value.k === 'number') cells.push(num(e.operator === '-' ? -e.of.value.v : e.of.value.v));
        else return { k: 'refuse', why: 'holds an array constant that cannot be read' };
      }
    }
    return { k: 'array', rows: elements.length, cols: elements[0]?.length ?? 0, cells };
  }
}

function literal(value: unknown): Scalar {
  if (typeof value === 'number') return num(value);
  if (typeof value === 'boolean') return bool(value);
  return text(String(value));
}

/** A reference as written: an area, a table part or a name; links to other workbooks refuse. */
function reference(written: string, kind: string): Expression {
  if (kind === 'table') {
    const part = parseStructRef(written);
    if (!part) return { k: 'refuse', why: `holds the table reference ${written}, which cannot be read` };
    return { k: 'table', table: part.table ?? '', columns: part.columns ?? [], sections: part.sections ?? [] };
  }
  const parsed = parseR1C1Ref(written) as
    | { context: string[]; name?: string; range?: Record<string, number | boolean | null> }
    | undefined;
  if (!parsed) return { k: 'refuse', why: `holds the reference ${written}, which cannot be read` };
  if (parsed.context.length > 1 || /[[\]]/.test(written.split('!')[0].replace(/'/g, '')) && parsed.context.length > 0) {
    return { k: 'refuse', why: `links to another workbook (${written.split('!')[0]})` };
  }
  const sheet = parsed.context[0];
  if (parsed.name !== undefined) return { k: 'name', name: parsed.name, sheet };
  const r = parsed.range!;
  const bound = (key: string): Bound | null =>
    r[key] === null || r[key] === undefined ? null : { at: Number(r[key]) + (r[`$${key}`] ? 1 : 0), absolute: Boolean(r[`$${key}`]) };
  const area: RelativeArea = { sheet, r1: bound('r0'), c1: bound('c0'), r2: bound('r1'), c2: bound('c1') };
  if (sheet?.includes(':')) {
    const [first, last] = sheet.split(':');
    return { k: 'sheets', first, last, reference: { ...area, sheet: undefined } };
  }
  return { k: 'reference', reference: area };
}

/**
 * True if a call means the same wherever the formula stands, and covers enough cells for sharing to pay. A range in a scalar's
 * place may mean the cell in the formula's own row, so it is never shared.
 */
function isSharedCall(native: Native, args: readonly (Expression | null)[]): boolean {
  return args.some(isWide) && args.every((a, i) => isFixed(a) && (kindAt(native.kinds, native.repeating, i) === 'range' || a?.k !== 'reference' || isOneCell(a)));
}

const isOneCell = (e: Expression): boolean =>
  e.k === 'reference' && e.reference.r1 !== null && e.reference.c1 !== null && e.reference.r1.at === e.reference.r2?.at && e.reference.c1.at === e.reference.c2?.at;

/** True if an argument means the same wherever the formula stands. */
function isFixed(e: Expression | null): boolean {
  if (e === null || e.k === 'constant' || e.k === 'array') return true;
  if (e.k !== 'reference') return false;
  const { r1, c1, r2, c2 } = e.reference;
  return [r1, c1, r2, c2].every((b) => b === null || b.absolute);
}

/** True if an argument covers more than a few cells, so that sharing a call on it pays. */
function isWide(e: Expression | null): boolean {
  if (e?.k !== 'reference') return false;
  const { r1, c1, r2, c2 } = e.reference;
  if (!r1 || !r2 || !c1 || !c2) return true;
  return (r2.at - r1.at + 1) * (c2.at - c1.at + 1) > 4;
}

/** References read whichever way decisions fall: everything but the later arguments of lazy calls and function bodies. */
function* readsOf(e: Expression | null): Generator<RelativeArea> {
  if (!e) return;
  switch (e.k) {
    case 'reference':
      yield e.reference;
      return;
    case 'unary':
    case 'single':
      yield* readsOf(e.of);
      return;
    case 'binary':
      yield* readsOf(e.left);
      yield* readsOf(e.right);
      return;
    case 'call':
      if (!READS_NO_VALUES.has(e.native.name)) for (const arg of e.native.lazy ? e.args.slice(0, 1) : e.args) yield* readsOf(arg);
      return;
    case 'host':
      for (const arg of e.args) yield* readsOf(arg);
      return;
    case 'let':
      for (const value of e.values) yield* readsOf(value);
      yield* readsOf(e.body);
      return;
    default:
      return;
  }
}

/** Functions that look at where a reference lies, or at a small part of it: reading all of it beforehand could make a circle. */
const READS_NO_VALUES = new Set(['ROW', 'ROWS', 'COLUMN', 'COLUMNS', 'INDEX', 'OFFSET', 'INDIRECT', 'AREAS', 'CELL', 'ISFORMULA']);

/** Number literals that stand in the arithmetic of an expression: operands, and arguments of functions that sum or multiply. */
function* literalsOf(e: Expression | null, arithmetic: boolean): Generator<string> {
  if (!e) return;
  switch (e.k) {
    case 'constant':
      if (arithmetic && e.literal !== undefined) yield e.literal;
      return;
    case 'array':
      if (arithmetic) for (const cell of e.cells) if (cell.k === 'number') yield String(cell.v);
      return;
    case 'unary':
      yield* literalsOf(e.of, arithmetic);
      return;
    case 'binary': {
      const inside = '+-*/^'.includes(e.operator);
      yield* literalsOf(e.left, inside);
      yield* literalsOf(e.right, inside);
      return;
    }
    case 'call':
      for (const [i, arg] of e.args.entries()) yield* literalsOf(arg, ENTERS.has(e.native.name) || (e.native.lazy !== undefined && i > 0));
      return;
    case 'let':
      for (const value of e.values) yield* literalsOf(value, true);
      yield* literalsOf(e.body, true);
      return;
    default:
      return;
  }
}

const ROUNDING = new Set(['ROUND', 'ROUNDUP', 'ROUNDDOWN', 'MROUND']);

const ENTERS = new Set(['SUM', 'SUMPRODUCT', 'PRODUCT', 'AVERAGE', 'POWER', 'SUMSQ', 'SQRT', 'EXP', 'LN', 'LOG10']);
