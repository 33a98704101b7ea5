import { describe, expect, it } from 'vitest';
import { nativeNames } from '../../../../functions/engine/formula/natives';
import { exceptions } from './exceptions';
import { notSmooth } from './notSmooth';
import { smoothTable } from './table';

const natives = new Set(nativeNames());
const smooth = new Set(smoothTable.map((r) => r.name));
const others = notSmooth.map((n) => n.name);

describe('the tables of native functions', () => {
  it('name every native function', () => {
    expect(nativeNames().filter((name) => !smooth.has(name) && !others.includes(name))).toEqual([]);
  });

  it('name nothing else but the operators', () => {
    expect([...smooth, ...others].filter((name) => !natives.has(name)).sort()).toEqual(['*', '+', '-', '/', '^']);
  });

  it('name each function once, as smooth or with a reason why not', () => {
    expect(others.filter((name, i) => smooth.has(name) || others.indexOf(name) !== i)).toEqual([]);
  });

  it('leave each smooth function to at least one other engine', () => {
    const excepted = exceptions.map((e) => e.name);
    expect(excepted.filter((name, i) => !smooth.has(name) || excepted.indexOf(name) !== i)).toEqual([]);
  });
});
