import type { FunctionMetadata } from '../../../functions/metadata';
import { namespace } from '../../../functions/names';

/** A function that may be meant, and what is put into the formula. */
export interface Suggestion {
  readonly name: string;
  readonly help: string;
  /** From where to where of the text the name is replaced. */
  readonly from: number;
  readonly to: number;
}

/** The functions whose names begin, or whose later words begin, with what stands before the caret of a formula; the best first. */
export function suggestions(text: string, caret: number, functions: readonly FunctionMetadata[], natives: readonly string[]): Suggestion[] {
  if (!text.startsWith('=') || insideText(text.slice(0, caret))) return [];
  const word = /[A-Za-z_][A-Za-z0-9_.]*$/.exec(text.slice(0, caret))?.[0];
  if (word === undefined || word.length < 2) return [];
  const wanted = word.toUpperCase();
  const [from, to] = [caret - word.length, caret];
  const ours = functions.map((f) => ({ name: `${namespace}.${f.name}`, help: f.description, from, to }))
    .filter(({ name }) => name.startsWith(wanted) || name.slice(namespace.length + 1).startsWith(wanted) || name.includes(`_${wanted}`));
  const others = natives.filter((n) => n.startsWith(wanted)).map((name) => ({ name, help: '', from, to }));
  return [...ours, ...others].slice(0, 8);
}

/** The call in which the caret stands: its function and which argument, from 0. */
export function callAt(text: string, caret: number): { readonly name: string; readonly argument: number } | undefined {
  const open: { name: string; argument: number }[] = [];
  const before = text.slice(0, caret);
  for (const [token] of before.matchAll(/"(?:[^"]|"")*"?|'(?:[^']|'')*'?|[A-Za-z_][A-Za-z0-9_.]*\s*\(|[(),;{}]/g)) {
    if (token.endsWith('(') ) open.push({ name: token.slice(0, -1).trim().toUpperCase(), argument: 0 });
    else if (token === '{') open.push({ name: '', argument: 0 });
    else if (token === ')' || token === '}') open.pop();
    else if (token === ',' && open.length > 0) open[open.length - 1].argument++;
  }
  return open.reverse().find(({ name }) => name !== '');
}

const insideText = (before: string): boolean => ((before.match(/"/g) ?? []).length % 2) === 1;
