import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '../../../../functions/engine/EngineError';
import { nativeNamed, nativeNames } from '../../../../functions/engine/formula/natives';
import { formulaOn } from '../formulaOn';

const cells = {
  A1: 3, A2: 'apple', A3: true, A4: '#N/A', A5: -2.5, A6: '', A7: '12', B1: 1, B2: 2, B3: 3, B4: 4,
  C1: 1e300, C2: 0, C3: -1e-300, C4: '#DIV/0!', A12: 6,
};

/** Arguments of every kind. */
const argument = fc.constantFrom(
  '1', '0', '-1', '2.5', '1E300', '-1E300', '1E-300', '"a"', '""', '"12"', 'TRUE', 'FALSE', '#N/A', '1/0', 'A1', 'A2', 'A3', 'A4', 'A6', 'A7',
  'Z9', 'C1', 'C2', 'A1:A7', 'B1:B4', 'A1:C4', 'B1:C3', 'B1:B12', '(A1:A2,B1:B2)', '{1,2}', '{1;"x";TRUE}', 'B1:B4*2', 'B1:B4^{1,2}',
);

const natives = nativeNames().map((name) => nativeNamed(name)!).filter((n) => n.most > 0);

describe('whatever the arguments are, a finite number, an error value or a refusal comes out', () => {
  it.each(natives.map((n) => n.name))('%s', (name) => {
    const { least, most } = nativeNamed(name)!;
    const args = fc.array(argument, { minLength: least, maxLength: Math.min(most, least + 2) });
    fc.assert(fc.property(args, fc.boolean(), (list, implicit) => {
      let found;
      try {
        found = formulaOn(cells, `=${name}(${list.join(',')})`, { implicit });
      } catch (problem) {
        expect(problem).toBeInstanceOf(EngineError);
        return;
      }
      const values = Array.isArray(found.value) ? found.value.flat() : [found.value];
      for (const v of values) expect(typeof v === 'number' ? Number.isFinite(v) : v !== undefined).toBe(true);
    }), { seed: 3, numRuns: 100 });
  });

  it.each(natives.filter((n) => n.least > 1).map((n) => n.name))('%s with nothing between its commas', (name) => {
    const { least } = nativeNamed(name)!;
    for (let i = 0; i < least; i++) {
      const list = Array.from({ length: least }, (_, j) => (i === j ? '' : 'B1:B4')).join(',');
      expect(() => formulaOn(cells, `=${name}(${list})`)).not.toThrow(TypeError);
    }
  });
});
