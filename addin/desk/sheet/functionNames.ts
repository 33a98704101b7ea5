import { tokenize } from '@borgar/fx';
import { namespace } from '../../../functions/names';
import { FUTURE_FUNCTIONS } from './futureFunctions';

const STORED_CUSTOM = `_xldudf_${namespace}_`;
const TYPED_CUSTOM = `${namespace}.`;

/** A custom function's id by the name a formula calls it by, typed or stored; undefined for any other name. */
export class FunctionNames {
  private readonly byName = new Map<string, string>();

  constructor(ids: readonly string[]) {
    for (const id of ids) {
      this.byName.set(`${TYPED_CUSTOM}${id}`.toUpperCase(), id);
      this.byName.set(`${STORED_CUSTOM}${id.replaceAll('.', '_')}`.toUpperCase(), id);
    }
  }

  idOf(name: string): string | undefined {
    return this.byName.get(name.toUpperCase());
  }

  /** Whether a name belongs to the namespace, known or not. */
  isOurs(name: string): boolean {
    const upper = name.toUpperCase();
    return upper.startsWith(TYPED_CUSTOM) || upper.startsWith(STORED_CUSTOM.toUpperCase());
  }

  /** `ROOTSUM.UNC_CARRY` for an id. */
  typed(id: string): string {
    return TYPED_CUSTOM + id;
  }
}

type Token = ReturnType<typeof tokenize>[number];

/**
 * A formula as a user types it, with or without its "=", as the file stores it: custom functions by their stored name, newer native
 * functions with their prefixes, `A1#` and `@A1:A9` as calls, variables of LET and LAMBDA marked.
 *
 * @throws Error with words that complete "the formula …" where a custom function is not known or the text cannot be read.
 */
export function storedFormula(typed: string, names: FunctionNames): string {
  const tokens: Token[] = tokenize(typed.startsWith('=') ? typed : `=${typed}`, { mergeRefs: true }).slice(1);
  if (tokens.some((token) => token.type === 'unknown' || token.unterminated)) throw new Error('cannot be read');
  const variables = variablesOf(tokens);
  const texts = tokens.map((token) => {
    if (token.type === 'func') return storedName(token.value, names);
    return token.type === 'range_named' && variables.has(token.value.toLowerCase()) ? `_xlpm.${token.value}` : token.value;
  });
  tokens.forEach((token, i) => {
    if (token.type !== 'operator' || token.value !== '#') return;
    texts[i] = ')';
    texts[i - 1] = `_xlfn.ANCHORARRAY(${texts[i - 1]}`;
  });
  tokens.forEach((token, i) => {
    if (token.type !== 'operator' || token.value !== '@') return;
    texts[i] = '_xlfn.SINGLE(';
    texts[operandEnd(tokens, i + 1)] += ')';
  });
  return texts.join('');
}

function storedName(name: string, names: FunctionNames): string {
  const id = names.idOf(name);
  if (id !== undefined) return STORED_CUSTOM + id.replaceAll('.', '_');
  if (names.isOurs(name)) throw new Error(`calls ${name.toUpperCase()}, which is no function of this version`);
  if (/^_xl/i.test(name)) return name;
  return (FUTURE_FUNCTIONS.get(name.toUpperCase()) ?? '') + name.toUpperCase();
}

/** The last token of the operand that begins at i: a reference, a name, or a call with its parentheses. */
function operandEnd(tokens: readonly Token[], i: number): number {
  if (tokens[i]?.type !== 'func' && tokens[i]?.value !== '(') return tokens[i + 1]?.value === '#' ? i + 1 : Math.min(i, tokens.length - 1);
  let depth = 0;
  for (let at = i; at < tokens.length; at++) {
    if (tokens[at].value === '(' && tokens[at].type === 'operator') depth++;
    if (tokens[at].value === ')' && tokens[at].type === 'operator' && --depth === 0) return at;
  }
  return tokens.length - 1;
}

/** Names that a LET or a LAMBDA of the formula binds, in lower case. */
function variablesOf(tokens: readonly Token[]): Set<string> {
  const found = new Set<string>();
  const open: { call: string; place: number; names: string[] }[] = [];
  const shown = tokens.filter((token) => token.type !== 'whitespace');
  shown.forEach((token, i) => {
    if (token.type === 'operator' && token.value === '(') {
      open.push({ call: shown[i - 1]?.type === 'func' ? shown[i - 1].value.replace(/^_xlfn\./i, '').toUpperCase() : '', place: 0, names: [] });
    } else if (token.type === 'operator' && token.value === ')') {
      open.pop()?.names.forEach((name) => found.add(name));
    } else if (token.type === 'operator' && token.value === ',') {
      if (open.length > 0) open[open.length - 1].place++;
    } else if (token.type === 'range_named' && shown[i + 1]?.value === ',' && open.length > 0) {
      const call = open[open.length - 1];
      const before = shown[i - 1]?.value;
      const alone = before === '(' || before === ',';
      if (alone && ((call.call === 'LET' && call.place % 2 === 0) || call.call === 'LAMBDA')) call.names.push(token.value.toLowerCase());
    }
  });
  return found;
}

/** A stored formula as a user sees it: custom functions by the name they are typed by, no prefixes. `A1#` stays a call. */
export function typedFormula(stored: string, names: FunctionNames): string {
  if (!/_xl/i.test(stored)) return stored;
  return stored.replace(/"(?:[^"]|"")*"|'(?:[^']|'')*'|_xldudf_[A-Za-z0-9_.]+|(?:_xlfn\.|_xlws\.|_xlpm\.)+/gi, (part) => {
    if (part.startsWith('"') || part.startsWith("'")) return part;
    if (!/^_xldudf_/i.test(part)) return '';
    const id = names.idOf(part);
    return id === undefined ? part : names.typed(id);
  });
}
