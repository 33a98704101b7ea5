import { describe, expect, it } from 'vitest';
import { EngineError } from '../../../../functions/engine/EngineError';
import { hyperFormula } from '../crosscheck/hyperFormula';
import { seeded } from '../crosscheck/seeded';
import { type Outcome, type Plain, formulaOn } from '../formulaOn';
import { type Tree, anyTree, numberTree, print, written } from './tree';

const numbers = { A1: 3, A2: 0.25, A3: 11, B1: 1.5, B2: 4, B3: 0.75 };
const cells = { ...numbers, C1: 'fig', C2: '12', C3: true };

/** The value of a formula, or "refused"; any other exception, NaN and infinity fail the test. */
function outcome(on: Record<string, Plain>, formula: string): Outcome['value'] {
  try {
    const { value } = formulaOn(on, `=${formula}`);
    for (const v of [value].flat(2)) if (typeof v === 'number' && !Number.isFinite(v)) throw new Error(`${formula} gives ${v}`);
    return value;
  } catch (problem) {
    if (problem instanceof EngineError && problem.kind === 'refused') return 'refused';
    throw new Error(formula, { cause: problem });
  }
}

/** A value as it would be written into a formula; undefined where it cannot be. */
function literal(value: Outcome['value']): string | undefined {
  if (Array.isArray(value)) return value.flat().some((v) => v === null) ? undefined : `{${value.map((row) => row.map((v) => literal(v)).join(',')).join(';')}}`;
  if (typeof value === 'number') return value < 0 || Object.is(value, -0) ? `(-${-value})` : String(value).toUpperCase();
  if (typeof value === 'boolean') return String(value).toUpperCase();
  if (value === null || value === 'refused') return undefined;
  return /^#(N\/A|[A-Z/0]+[!?])$/.test(value) ? value : `"${value.replace(/"/g, '""')}"`;
}

/** A tree evaluated one node at a time, the children's values put in as written; undefined where one cannot be written. */
function stepwise(tree: Tree): Outcome['value'] | undefined {
  if ('leaf' in tree) return outcome(cells, print(tree));
  const children: string[] = [];
  for (const child of tree.children) {
    if ('leaf' in child) {
      children.push(print(child));
      continue;
    }
    const value = stepwise(child);
    const text = value === undefined || Array.isArray(value) ? undefined : literal(value);
    if (text === undefined) return undefined;
    children.push(text);
  }
  return outcome(cells, `(${written(tree.name, children)})`);
}

const trees = Array.from({ length: 4000 }, (_, i) => anyTree(seeded(7000 + i), 4));

describe('random expressions over the whole function table', () => {
  it('end in a finite value, an error value or a refusal, never in another exception', () => {
    const ends = trees.map((tree) => outcome(cells, print(tree)));
    expect(ends.filter((v) => typeof v === 'number').length).toBeGreaterThan(200);
  });

  it('give what their nodes give one by one', () => {
    let compared = 0;
    for (const tree of trees) {
      const whole = outcome(cells, `(${print(tree)})`);
      const steps = stepwise(tree);
      if (steps === undefined || whole === 'refused' || steps === 'refused') continue;
      compared++;
      expect({ formula: print(tree), value: whole }).toEqual({ formula: print(tree), value: steps });
    }
    expect(compared).toBeGreaterThan(1500);
  });
});

describe('random arithmetic', () => {
  it('gives what another engine gives', () => {
    const formulas = Array.from({ length: 2000 }, (_, i) => `=0+${print(numberTree(seeded(90000 + i), 5))}*1`);
    const theirs = hyperFormula(formulas.map((formula) => ({ formula, cells: numbers })));
    let compared = 0;
    let zeroToZero = 0;
    formulas.forEach((formula, i) => {
      const { value, slopes } = formulaOn(numbers, formula);
      if (value === '#NUM!' && typeof theirs[i] === 'number' && /\^|POWER/.test(formula)) {
        zeroToZero++; // 0^0 is 1 there
        return;
      }
      if (typeof value !== 'number' || typeof theirs[i] !== 'number') {
        expect({ formula, error: typeof value !== 'number' }).toEqual({ formula, error: typeof theirs[i] !== 'number' });
        return;
      }
      const size = Object.entries(numbers).reduce((s, [name, x]) => s + Math.abs((slopes[name] ?? 0) * x), Math.abs(value));
      compared++;
      expect(Math.abs(value - theirs[i]), `${formula}: ${value}, there ${theirs[i]}`).toBeLessThanOrEqual(1e-12 * (Number.isFinite(size) ? size : Infinity));
    });
    expect(compared).toBeGreaterThan(1000);
    expect(zeroToZero).toBeLessThan(40);
  });
});
