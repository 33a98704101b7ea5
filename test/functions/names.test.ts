import { expect, test } from 'vitest';
import { each } from '../../functions/declaration';
import type { Parameters } from '../../functions/declaration';
import { namingProblems, storedName } from '../../functions/names';
import { number, repeatingReference } from '../../functions/parameters';
import { registry } from '../../functions/registry';

const named = (name: string, parameters: Parameters = {}) => each({ name, family: 'Proof', help: '', parameters, result: '', body: () => 0 });
const required = number({ help: '' });
const optional = number({ help: '', optional: true });

test('every declared name is one that the host takes', () => {
  expect(namingProblems(registry)).toEqual([]);
});

test('a name that the host would refuse is found', () => {
  for (const name of ['AB', 'AB1', 'XFD1048576', 'R1C1', 'RC', '1ST_OF', 'A-B_C', 'SUM', 'unc_round', 'UNC_ROUND ', `A_${'B'.repeat(120)}`])
    expect(namingProblems([named(name)]), name).not.toEqual([]);
  expect(namingProblems([named('SIG_COUNT'), named('LINE.FIT_2')])).toEqual([]);
});

test('two names that a file would store alike are found', () => {
  expect(namingProblems([named('LINE_FIT.A'), named('LINE.FIT_A')])).toEqual(['LINE.FIT_A is stored under the same name as LINE_FIT.A']);
  expect(storedName('LINE.FIT')).toBe('ROOTSUM_LINE_FIT');
});

test('arguments in an order that the host would refuse are found', () => {
  expect(namingProblems([named('A_B', { x: optional, y: required })])).toEqual(['A_B: y is required after an optional argument']);
  expect(namingProblems([named('A_B', { x: repeatingReference({ help: '' }), y: required })])).toEqual(['A_B: x repeats but is not last']);
  expect(namingProblems([named('A_B', { 'x y': required })])).toEqual(['A_B: x y is no argument name']);
});
