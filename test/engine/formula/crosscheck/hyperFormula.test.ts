import { HyperFormula } from 'hyperformula';
import { describe, expect, it } from 'vitest';
import { exceptionOf, verdicts } from './agreement';
import { exceptions } from './exceptions';
import { hyperFormula } from './hyperFormula';

const all = verdicts(hyperFormula, 20);
const judged = all.filter((v) => !exceptionOf('HyperFormula', v.name)).map((v) => [v.title, v.objections] as const);
const known = new Set(HyperFormula.getRegisteredFunctionNames('enGB'));
const differing = exceptions.filter((e) => e.engine === 'HyperFormula' && e.how === 'differs');
const missing = exceptions.filter((e) => e.engine === 'HyperFormula' && e.how === 'missing');

describe('values and slopes agree with HyperFormula and its differences', () => {
  it.each(judged)('%s', (_title, objections) => {
    expect(objections.flat().slice(0, 3)).toEqual([]);
  });

  it.each(missing.map((e) => e.name))('%s is missing there still', (name) => expect(known.has(name)).toBe(false));

  it.each(differing.map((e) => e.name))('%s differs there still', (name) => {
    expect(all.filter((v) => v.name === name).flatMap((v) => v.objections.flat())).not.toEqual([]);
  });
});
