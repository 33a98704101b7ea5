import { translateFormulaToR1C1 } from '@borgar/fx';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { EngineError } from '../../../../functions/engine/EngineError';
import { compile } from '../../../../functions/engine/formula/compile';
import { type Cells, Evaluator } from '../../../../functions/engine/formula/evaluate';
import { nativeNamed } from '../../../../functions/engine/formula/natives';
import { addresses } from '../../../../functions/engine/formula/natives/addresses';
import { choices } from '../../../../functions/engine/formula/natives/choices';
import { conditionalSums } from '../../../../functions/engine/formula/natives/conditionalSums';
import { conversions } from '../../../../functions/engine/formula/natives/conversions';
import { filtering } from '../../../../functions/engine/formula/natives/filtering';
import { information } from '../../../../functions/engine/formula/natives/information';
import { lambdas } from '../../../../functions/engine/formula/natives/lambdas';
import { logic } from '../../../../functions/engine/formula/natives/logic';
import { lookups } from '../../../../functions/engine/formula/natives/lookups';
import { matrices } from '../../../../functions/engine/formula/natives/matrices';
import { references } from '../../../../functions/engine/formula/natives/references';
import { shaping } from '../../../../functions/engine/formula/natives/shaping';
import { sorting } from '../../../../functions/engine/formula/natives/sorting';
import { texts } from '../../../../functions/engine/formula/natives/texts';
import { type Scalar, BLANK, bool, err, num, text } from '../../../../functions/engine/formula/scalar';

const A: Scalar[] = [num(3, 0), text('apple', 1), bool(true, 2), err('#N/A', 3), num(-2.5, 4), text('', 5), text('12', 6)];
const B: Scalar[] = [num(1, 7), num(2, 8), num(3, 9), num(4, 10)];
const C: Scalar[] = [num(1e300, 11), num(0, 12), text('*', 13), err('#DIV/0!', 14)];

const cell = (row: number, col: number): Scalar => [A, B, C][col - 1]?.[row - 1] ?? BLANK;

const cells: Cells = {
  cell: (_s, row, col) => cell(row, col),
  read: (area) => {
    const height = Math.max(0, Math.min(area.r2, 7) - area.r1 + 1);
    const width = Math.max(0, Math.min(area.c2, 3) - area.c1 + 1);
    const stored = Array.from({ length: height * width }, (_, i) => cell(area.r1 + Math.floor(i / width), area.c1 + (i % width)));
    return { k: 'matrix', rows: area.r2 - area.r1 + 1, cols: area.c2 - area.c1 + 1, height, width, cells: stored, fill: BLANK };
  },
  used: () => ({ rows: 7, cols: 3 }),
  rowState: () => 'shown',
  formulaAt: () => undefined,
  sheetIndex: () => undefined,
  name: () => undefined,
  table: () => undefined,
  spilled: () => undefined,
  shared: (_key, compute) => compute(),
  host: () => err('#NAME?'),
};

/** Every kind of argument: scalars of each kind, literals, arrays, references, unions, functions, nothing. */
const argument = fc.constantFrom(
  '', '1', '0', '-1', '2.5', '1E300', '-1E300', '"a"', '""', '"12"', '">1"', '"*"', '"~"', 'TRUE', 'FALSE', '#N/A', '#DIV/0!', '1/0',
  'A1', 'A2', 'A3', 'A4', 'A5', 'A6', 'A7', 'Z9', 'C1', 'A1:A7', 'B1:B4', 'A1:C4', 'B1:C1', 'B1:B12', 'A2:F2', 'Z1:Z3', '(A1:A2,B1:B2)',
  '{1,2}', '{1;"x";TRUE}', '{1,#N/A;"b",4}', 'A1:A3*1', 'B1:B4&""', 'LAMBDA(x,x)', 'LAMBDA(x,y,x*y)', '"B3"', 'INDEX(B1:B4,B2)', 'IF(B1>0,B1:B4)',
);

const names = [
  ...addresses, ...choices, ...conditionalSums, ...conversions, ...filtering, ...information, ...lambdas, ...logic, ...lookups,
  ...matrices, ...references, ...shaping, ...sorting, ...texts,
].map((n) => n.name);

describe('whatever the arguments are, a value or a refusal comes out', () => {
  it.each(names)('%s', (name) => {
    const { least, most } = nativeNamed(name)!;
    const args = fc.array(argument, { minLength: least, maxLength: Math.min(most, least + 4) });
    fc.assert(fc.property(args, fc.boolean(), (list, implicit) => {
      const evaluator = new Evaluator(cells);
      const formula = translateFormulaToR1C1(`=${name}(${list.join(',')})`, 'B3');
      let value;
      try {
        value = evaluator.run(compile(formula, { native: nativeNamed, isHost: () => false }), 0, 3, 2, implicit);
      } catch (problem) {
        expect((problem as Error).stack).toMatch(/^EngineError/);
        expect((problem as EngineError).kind).toBe('refused');
        return;
      }
      const results = value.k === 'matrix' ? [...value.cells, value.fill] : [value];
      for (const s of results) {
        if (s.k === 'number') expect(s.v).toSatisfy(Number.isFinite);
        expect(s.v).not.toBeUndefined();
        for (const slope of evaluator.steps.slopes(s.d).partials) expect(slope).not.toBeNaN();
      }
      if (value.k === 'matrix') expect(value.cells.length).toBe(value.height * value.width);
    }), { seed: 20260107, numRuns: 250 });
  });
});
