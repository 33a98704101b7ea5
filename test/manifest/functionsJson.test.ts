import { describe, expect, test } from 'vitest';
import type { FunctionMetadata, FunctionsMetadata, ParameterMetadata } from '../../functions/metadata';
import { bundle } from '../functions/bundle';
import { functionsJsonProblems } from './functionsJsonProblems';

test('functions.json of the build is what a host takes', async () => {
  const metadata = JSON.parse((await bundle()).metadata) as FunctionsMetadata;
  expect(metadata.functions.length).toBeGreaterThan(0);
  expect(functionsJsonProblems(metadata)).toEqual([]);
});

describe('functionsJsonProblems', () => {
  const matrix = { type: 'any', dimensionality: 'matrix' } as const;
  const parameter = (name: string, more: Partial<ParameterMetadata> = {}): ParameterMetadata => ({ name, description: 'd', ...matrix, ...more });
  const problems = (...given: object[]) => {
    const functions = given.map((more) => ({ id: 'UNC_X', name: 'UNC_X', description: 'd', parameters: [], result: matrix, ...more })) as FunctionMetadata[];
    return functionsJsonProblems({ allowCustomDataForDataTypeAny: true, allowErrorForDataTypeAny: true, functions });
  };

  test('finds nothing where nothing is wrong', () => {
    const parameters = [parameter('a'), parameter('b', { optional: true }), parameter('c', { repeating: true })];
    const options = { requiresAddress: true, requiresParameterAddresses: true };
    expect(problems({ parameters, options }, { id: 'LINE.B2', name: 'LINE.B2' })).toEqual([]);
  });
  test('finds names that read as a cell, up to the last one of a sheet', () => {
    for (const name of ['ABC1', 'XFD1048576', 'xfd1', 'A001', 'R1C1', 'R12', 'C345'])
      expect(problems({ name }), name).toContain(`${name} has a name that reads as a cell`);
    for (const name of ['XFE1', 'XFD1048577', 'ABCD1', 'R1C1X', 'UNC_1']) expect(problems({ name }), name).toEqual([]);
  });
  test('finds ids and names of wrong length or characters', () => {
    for (const name of ['AB', '1AB', '_AB', 'A-B', 'A B', 'A!B', `A${'B'.repeat(64)}`]) {
      expect(problems({ name }), name).toContain(`${name} has a name of wrong length or characters`);
      expect(problems({ id: name }), name).toContain('UNC_X has an id of wrong length or characters');
    }
    expect(problems({ id: `A${'B'.repeat(63)}`, name: `Ä${'B'.repeat(63)}` })).toEqual([]);
  });
  test('finds two functions of one id or name, whatever the case', () => {
    expect(problems({}, { id: 'OTHER', name: 'unc_x' })).toEqual(['unc_x has the id or name of another']);
    expect(problems({}, { id: 'unc_x', name: 'OTHER' })).toEqual(['OTHER has the id or name of another']);
  });
  test('finds descriptions and argument names that are missing or too long', () => {
    for (const description of ['', ' ', 'x'.repeat(1025)]) expect(problems({ description })).toEqual(['UNC_X has a description of wrong length']);
    expect(problems({ parameters: [parameter('a', { description: 'x'.repeat(513) })] })).toEqual(['UNC_X has a description of wrong length for a']);
    expect(problems({ parameters: [parameter('x'.repeat(65))] })).toHaveLength(1);
    expect(problems({ parameters: [parameter('a'), parameter('A')] })).toEqual(['UNC_X has two arguments of one name']);
    expect(problems({ parameters: Array.from({ length: 129 }, (_, i) => parameter(`p${i}`)) })).toEqual(['UNC_X has too many arguments']);
  });
  test('finds arguments in an order that no call could fill', () => {
    const repeating = { repeating: true } as const;
    expect(problems({ parameters: [parameter('a', repeating), parameter('b')] })).toEqual(['UNC_X has a repeating argument that is not last']);
    expect(problems({ parameters: [parameter('a', repeating), parameter('b', repeating)] })).toEqual(['UNC_X has two repeating arguments']);
    const optional = parameter('a', { optional: true });
    expect(problems({ parameters: [optional, parameter('b')] })).toEqual(['UNC_X has a required argument after an optional one']);
  });
  test('finds flags that contradict each other', () => {
    // "Manually create JSON metadata for custom functions": addresses of arguments need a matrix result; streaming excludes addresses.
    const options = { requiresParameterAddresses: true };
    const result = { type: 'any', dimensionality: 'scalar' };
    expect(problems({ options, result })).toEqual(['UNC_X wants addresses of arguments but gives no matrix']);
    expect(problems({ options: { ...options, stream: true } })).toEqual(['UNC_X has options that it may not combine with addresses: stream']);
    expect(problems({ requiresAddress: true })).toEqual(['UNC_X has unknown members requiresAddress']);
  });
});
