import { mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { whole } from '../../functions/declaration';
import { functionsJson, functionsMetadata, functionsTable, parameterHelp, signature } from '../../functions/metadata';
import { oneNumber, reference, repeatingReference } from '../../functions/parameters';
import { registry } from '../../functions/registry';
import { build, bundle } from './bundle';

const carryLike = whole({
  name: 'TEST_CARRY',
  family: 'Carry',
  help: 'Carries.',
  parameters: {
    results: reference({ help: 'Result cells' }),
    given: repeatingReference({ help: 'An input, then its evidence', label: 'input, evidence, …' }),
  },
  result: 'u',
  readsWorkbook: true,
  body: () => [[1]],
});

describe('functions.json', () => {
  test('of the build is what the registry gives', async () => {
    expect((await bundle()).metadata).toBe(functionsJson(registry));
  });
  test('lets errors and data types reach the functions', () => {
    expect(functionsMetadata(registry)).toMatchObject({ allowErrorForDataTypeAny: true, allowCustomDataForDataTypeAny: true });
  });
  test('declares a function that reads the workbook with both addresses and its repeating argument', () => {
    expect(functionsMetadata([carryLike]).functions).toEqual([
      {
        id: 'TEST_CARRY',
        name: 'TEST_CARRY',
        description: 'Carries.',
        parameters: [
          { name: 'results', description: 'Result cells', type: 'any', dimensionality: 'matrix' },
          { name: 'input, evidence, …', description: 'An input, then its evidence', type: 'any', dimensionality: 'matrix', repeating: true },
        ],
        result: { type: 'any', dimensionality: 'matrix' },
        options: { requiresAddress: true, requiresParameterAddresses: true },
      },
    ]);
  });
  test('calls an argument optional only where none that is required follows', () => {
    const parameters = { results: reference({ help: 'r' }), k: oneNumber({ help: 'k', optional: true }), given: repeatingReference({ help: 'g' }) };
    const declaration = { ...carryLike, parameters };
    expect(functionsMetadata([declaration]).functions[0].parameters.map((p) => p.optional)).toEqual([undefined, undefined, undefined]);
    expect(signature(declaration)).toBe('ROOTSUM.TEST_CARRY(results, k, given)');
  });
  test('has help for every function and argument', () => {
    for (const { description, parameters } of functionsMetadata(registry).functions)
      for (const help of [description, ...parameters.map((p) => p.description)]) expect(help.trim()).not.toBe('');
  });
});

describe('what is written for people', () => {
  test('signature puts optional arguments into brackets', () => {
    expect(signature(carryLike)).toBe('ROOTSUM.TEST_CARRY(results, input, evidence, …)');
    const round = registry.find(({ name }) => name === 'UNC_ROUND');
    expect(round && signature(round)).toBe('ROOTSUM.UNC_ROUND(value, stdu, [digits], [rule])');
  });
  test('parameterHelp adds the bounds', () => {
    const round = registry.find(({ name }) => name === 'UNC_ROUND');
    expect(round && parameterHelp(round.parameters.digits)).toBe('Significant digits of u, default 2 (a whole number from 1 to 15)');
  });
  test('functionsTable lists every function once', () => {
    const table = functionsTable(registry);
    for (const { name } of registry) expect(table.split(`\`${name}(`)).toHaveLength(2);
  });
  test('the table in README.md is what the registry gives', () => {
    const readme = new URL('../../README.md', import.meta.url);
    const parts = /<!-- functions -->\n([\s\S]*?)<!-- \/functions -->/.exec(readFileSync(readme, 'utf8'));
    expect(parts?.[1].trim()).toBe(functionsTable(registry).trim());
  });
});

describe('the build', () => {
  test('gives the same single bundle again, without time, with its version and hash', async () => {
    const dir = mkdtempSync(join(tmpdir(), 'rootsum-build-'));
    try {
      await build(dir);
      expect(readdirSync(dir).filter((name) => /\.js(on)?$/.test(name)).sort()).toEqual(['functions.js', 'functions.json']);
      const source = readFileSync(join(dir, 'functions.js'), 'utf8');
      expect((await bundle()).source).toBe(source);
      expect(source).toMatch(/\d+\.\d+\.\d+\+[0-9a-f]{8}/);
      expect(source).not.toContain('@@@');
    } finally {
      rmSync(dir, { recursive: true });
    }
  });
});
