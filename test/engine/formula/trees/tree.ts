import { nativeNamed, nativeNames } from '../../../../functions/engine/formula/natives';
import { kindAt } from '../../../../functions/engine/formula/native';
import type { Draws } from '../crosscheck/seeded';

/** An expression made at random: a leaf as it is written, or a node whose text is written around its children. */
export type Tree = { readonly leaf: string } | { readonly name: string; readonly children: readonly Tree[] };

const OPERATORS = ['+', '-', '*', '/', '^', '&', '=', '<', '>', '<=', '>=', '<>'];
const NUMBERS = ['0', '1', '2', '3', '0.5', '12.25', '0.001', '7', 'A1', 'A2', 'A3', 'B1', 'B2', 'B3'];
const TEXTS = ['"ab"', '"7"', '""', '"x,y"', '"2024-03-15"', 'C1', 'C2'];
const RANGES = ['A1:A3', 'B1:B3', 'A1:B3', 'C1:C3', '{1,2;3,4}', 'A1:C1'];
const LEAVES = [...NUMBERS, ...NUMBERS, ...TEXTS, 'TRUE', 'FALSE', '1/0', 'Z9', '#N/A'];

/** Functions whose arguments are functions, or that need the place of a reference itself. */
const APART = new Set(['MAP', 'REDUCE', 'SCAN', 'BYROW', 'BYCOL', 'MAKEARRAY']);
const NAMES = nativeNames().filter((name) => !APART.has(name));

const pick = <T>(from: Draws, items: readonly T[]): T => items[Math.floor(from.between(0, items.length))];

/** A tree over the whole function table, so deep at most. */
export function anyTree(from: Draws, depth: number): Tree {
  if (depth === 0 || from.between(0, 1) < 0.15) return { leaf: pick(from, LEAVES) };
  const kind = from.between(0, 1);
  if (kind < 0.3) return { name: pick(from, OPERATORS), children: [anyTree(from, depth - 1), anyTree(from, depth - 1)] };
  if (kind < 0.38) return { name: pick(from, ['u-', 'u+', '%']), children: [anyTree(from, depth - 1)] };
  const native = nativeNamed(pick(from, NAMES))!;
  const count = Math.floor(from.between(native.least, Math.min(native.most, native.least + 2) + 1));
  const children = Array.from({ length: count }, (_, i) => {
    const range = kindAt(native.kinds, native.repeating, i) === 'range' && from.between(0, 1) < 0.8;
    return range ? { leaf: pick(from, RANGES) } : anyTree(from, depth - 1);
  });
  return { name: native.name, children };
}

const SMOOTH = ['SQRT', 'EXP', 'LN', 'LOG10', 'SIN', 'COS', 'TAN', 'ATAN', 'ABS', 'SUM', 'AVERAGE', 'MAX', 'MIN', 'PRODUCT', 'POWER', 'SIGN', 'DEGREES', 'RADIANS', 'SUMSQ', 'IF'];

/** A tree of arithmetic and functions of numbers, which every engine has. */
export function numberTree(from: Draws, depth: number): Tree {
  if (depth === 0 || from.between(0, 1) < 0.15) return { leaf: pick(from, NUMBERS) };
  const kind = from.between(0, 1);
  if (kind < 0.5) return { name: pick(from, OPERATORS.slice(0, 5)), children: [numberTree(from, depth - 1), numberTree(from, depth - 1)] };
  if (kind < 0.6) return { name: pick(from, ['u-', '%']), children: [numberTree(from, depth - 1)] };
  const native = nativeNamed(pick(from, SMOOTH))!;
  const count = native.name === 'IF' ? 3 : native.name === 'POWER' ? 2 : native.most > 2 ? Math.floor(from.between(1, 4)) : native.least;
  return { name: native.name, children: Array.from({ length: count }, () => numberTree(from, depth - 1)) };
}

/** The text of one node around the texts of its children. */
export function written(name: string, children: readonly string[]): string {
  if (name === 'u-' || name === 'u+') return `(${name[1]}${children[0]})`;
  if (name === '%') return `(${children[0]}%)`;
  if (OPERATORS.includes(name)) return `(${children[0]}${name}${children[1]})`;
  return `${name}(${children.join(',')})`;
}

/** The whole tree as text. */
export const print = (tree: Tree): string => ('leaf' in tree ? (tree.leaf === '1/0' ? '(1/0)' : tree.leaf) : written(tree.name, tree.children.map(print)));
