import { describe, expect, test } from 'vitest';
import { DataTypeCell, ZERO_OR_BLANK } from '../../functions/cells';
import type { Cell } from '../../functions/cells';
import { CellError } from '../../functions/errors';
import { readEvidence } from '../../functions/evidenceRows';

const row = (...cells: Cell[]) => readEvidence([cells])[0];
const plain = { ok: true, blank: false, exact: false };

describe('readEvidence', () => {
  test('takes a number as u, normal, with infinite degrees of freedom', () => {
    expect(row(0.1)).toEqual({ ...plain, u: 0.1, dof: Infinity, shape: { kind: 'normal' } });
  });
  test('takes five columns, blank cells meaning the default', () => {
    expect(row(0.1, 9, null, ' Pipette 5 ', 'A')).toEqual({ ...plain, u: 0.1, dof: 9, shape: { kind: 't' }, tag: 'Pipette 5', group: 'A' });
    expect(row(0.1, 'INF', 'Trapezoidal 0.5', null, 3)).toEqual({
      ...plain, u: 0.1, dof: Infinity, shape: { kind: 'trapezoidal', edgeRatio: 0.5 }, group: '3',
    });
    expect(row(0.1, 5, 'rectangular')).toEqual({ ...plain, u: 0.1, dof: 5, shape: { kind: 'rectangular' } });
    expect(row(0.1, 2.5, ' ')).toMatchObject({ dof: 2.5, shape: { kind: 't' } });
  });
  test('takes exact in place of u', () => {
    expect(row(' Exact ', null)).toEqual({ ok: true, blank: false, exact: true, u: 0, dof: Infinity, shape: { kind: 'normal' } });
  });
  test('tells a blank row from a row without u and from u = 0', () => {
    expect(row(null, null, ' ')).toEqual({ ok: true, blank: true });
    expect(row(null, 9)).toMatchObject({ ok: false, kind: 'noU' });
    expect(row(0)).toMatchObject({ ok: false, kind: 'zero', problem: 'u is 0; write exact where there is no doubt' });
    expect(row(ZERO_OR_BLANK)).toMatchObject({ ok: false, kind: 'zero' });
  });
  test('reads on after a bad row', () => {
    expect(readEvidence([['x'], [1], [null]]).map(({ ok }) => ok)).toEqual([false, true, true]);
  });
  test.each<[string, Cell[], string]>([
    ['a number stored as text', ['0.1'], 'u must be a number > 0 or exact, got the text "0.1"'],
    ['a negative u', [-1], 'u must be > 0, got -1'],
    ['a boolean', [true], 'u must be a number > 0 or exact, got TRUE'],
    ['a data type', [new DataTypeCell('Entity')], 'u must be a number > 0 or exact, got a data type (Entity)'],
    ['0 degrees of freedom', [1, 0], 'degrees of freedom must be a number > 0 or inf, got 0'],
    ['degrees of freedom stored as text', [1, '9'], 'degrees of freedom must be a number > 0 or inf, got the text "9"'],
    ['a shape that is none', [1, null, 5], 'shape must be text, got 5'],
    ['a tag that is none', [1, null, null, true], 'tag must be text, got TRUE'],
    ['too many columns', [1, 2, 't', 'a', 'b', 'c'], 'evidence has 1 to 5 columns, got 6'],
  ])('refuses %s', (_, cells, problem) => {
    expect(row(...cells)).toEqual({ ok: false, kind: 'other', problem });
  });
  test('refuses an unknown shape with the shapes there are', () => {
    expect(row(1, null, 'round')).toMatchObject({ ok: false, problem: expect.stringMatching(/^shape needs one of normal, .*, got "round"$/) });
  });
  test('names an error value and a cell that may be 0 or blank', () => {
    expect(row(new CellError('#REF!'))).toEqual({ ok: false, kind: 'error', problem: 'u is the error #REF!' });
    expect(row(1, ZERO_OR_BLANK)).toMatchObject({ ok: false, kind: 'doubtful' });
    expect(row(1, null, null, ZERO_OR_BLANK)).toMatchObject({ ok: false, kind: 'doubtful' });
    expect(row(1, null, ZERO_OR_BLANK)).toMatchObject({ ok: true, shape: { kind: 'normal' } });
  });
});
