import { describe, expect, it } from 'vitest';
import { hasWildcards, wildcards } from '../../../../functions/engine/formula/natives/wildcards';

describe('wildcards', () => {
  it.each([
    ['a*', 'apple', true],
    ['*', '', true],
    ['?', '', false],
    ['?', 'x', true],
    ['a?e', 'ABE', true],
    ['a?e', 'abbe', false],
    ['*es', 'Tomatoes', true],
    ['*a*b*', 'xxaxxbxx', true],
    ['*a*b*', 'xxbxxaxx', false],
    ['a~*', 'a*', true],
    ['a~*', 'abc', false],
    ['a~?b', 'a?b', true],
    ['a~~', 'a~', true],
    ['a~b', 'a~b', true],
    ['a.c', 'abc', false],
    ['(x', '(x', true],
    ['*ab', 'aab', true],
  ])('%s and %s: %s', (pattern, text, follows) => expect(wildcards(pattern).matches(text)).toBe(follows));

  it('finds the first place from a start', () => {
    expect(wildcards('b?').find('abcbd', 0)).toBe(1);
    expect(wildcards('b?').find('abcbd', 2)).toBe(3);
    expect(wildcards('b?').find('abcb', 2)).toBe(-1);
    expect(wildcards('a*c').find('xabbc', 0)).toBe(1);
  });

  it('takes no exponential time', () => {
    const long = 'a'.repeat(20000);
    expect(wildcards('*a*a*a*a*a*a*a*b').matches(long)).toBe(false);
  });

  it('knows which texts hold them', () => expect(['a*', 'a?', '~', 'a.b'].map(hasWildcards)).toEqual([true, true, true, false]));
});
