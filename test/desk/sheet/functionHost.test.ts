import { describe, expect, test } from 'vitest';
import { createFunctionHost } from '../../../addin/desk/sheet/functionHost';
import type { FunctionHostOptions, HostArgument } from '../../../addin/desk/sheet/functionHost';
import { bundle } from '../../functions/bundle';

type Flags = { matrix?: boolean; repeating?: boolean };

/** Metadata of one function F with parameters that are matrices unless said otherwise. */
const metadataOf = (parameters: Flags[], more: object = {}, options: object = { requiresAddress: true, requiresParameterAddresses: true }) =>
  JSON.stringify({
    allowErrorForDataTypeAny: true,
    allowCustomDataForDataTypeAny: true,
    functions: [
      {
        id: 'F', name: 'F', description: '', result: { type: 'any', dimensionality: 'matrix' }, options,
        parameters: parameters.map(({ matrix = true, repeating }, i) => ({
          name: `p${i}`, description: '', type: 'any', dimensionality: matrix ? 'matrix' : 'scalar', ...(repeating && { repeating }),
        })),
      },
    ],
    ...more,
  });

/** A function that writes down what it was handed. */
const witness = "CustomFunctions.associate('F', (...args) => { RootsumHost.seen.push(args); return [['done']]; });";
const giving = (result: string) => `CustomFunctions.associate('F', () => ${result});`;

async function handed(parameters: Flags[], args: HostArgument[], options: Partial<FunctionHostOptions> = {}): Promise<unknown[]> {
  const seen: unknown[][] = [];
  const settings = { seen } as FunctionHostOptions['settings'];
  const host = createFunctionHost({ source: witness, metadata: metadataOf(parameters), settings, ...options });
  await host.call('F', args, 'S!F5');
  return seen[0];
}

const given = async (result: string) => createFunctionHost({ source: giving(result), metadata: metadataOf([]) }).call('F', []);
const cell = (value: number | string | null) => ({ cells: [[value]] });

describe('what a function is handed', () => {
  test('is a matrix for a matrix, even for one cell, and null for what is omitted', async () => {
    expect(await handed([{}, {}, {}], [cell(5), { cells: [[1, 'a'], [true, 2]] }])).toEqual([[[5]], [[1, 'a'], [true, 2]], null, expect.anything()]);
  });
  test('is a bare value for a scalar; a range there is a mistake', async () => {
    expect(await handed([{ matrix: false }], [cell(5)])).toEqual([5, expect.anything()]);
    await expect(handed([{ matrix: false }], [{ cells: [[1, 2]] }])).rejects.toThrow('single value');
  });
  test('has blanks as null or as 0', async () => {
    expect((await handed([{}], [cell(null)]))[0]).toEqual([[null]]);
    expect((await handed([{}], [cell(null)], { blanks: 'zero' }))[0]).toEqual([[0]]);
  });
  test('has errors as objects with a code', async () => {
    const [[[error]]] = (await handed([{}], [{ cells: [[{ error: '#N/A' }]] }])) as [[[unknown]]];
    expect(error).toMatchObject({ code: '#N/A' });
  });
  test('has a repeating argument as an array of matrices, addresses flat over it', async () => {
    const args = [{ cells: [[1]], address: 'S!A1' }, { cells: [[2]], address: 'S!B1' }, cell(3)];
    expect(await handed([{}, { repeating: true }], args)).toEqual([
      [[1]], [[[2]], [[3]]], { functionName: 'F', address: 'S!F5', parameterAddresses: ['S!A1', 'S!B1', undefined] },
    ]);
    expect((await handed([{}, { repeating: true }], [cell(1)]))[1]).toEqual([]);
  });
  test('has addresses only where the metadata asks for them and the host knows them', async () => {
    const last = async (options: Partial<FunctionHostOptions>) => (await handed([{}], [{ cells: [[1]], address: 'S!A1' }], options)).at(-1);
    expect(await last({ parameterAddresses: false })).toMatchObject({ address: 'S!F5', parameterAddresses: undefined });
    expect(await last({ metadata: metadataOf([{}], {}, {}) })).toMatchObject({ address: undefined, parameterAddresses: undefined });
  });
});

describe('what comes back', () => {
  test('NaN, infinity and nothing are 0, as in Excel', async () => {
    expect(await given('[[NaN, Infinity, null, undefined, 1]]')).toEqual({ ok: true, cells: [[0, 0, 0, 0, 1]] });
  });
  test('a promise is waited for', async () => {
    expect(await given("Promise.resolve([['x', true]])")).toEqual({ ok: true, cells: [['x', true]] });
  });
  test('error objects in a matrix are errors of their cells; only two codes show a message', async () => {
    expect(await given("[[new CustomFunctions.Error('#N/A', 'm'), new CustomFunctions.Error(CustomFunctions.ErrorCode.invalidNumber, 'm')]]")).toEqual({
      ok: true,
      cells: [[{ error: '#N/A', message: 'm' }, { error: '#NUM!' }]],
    });
  });
  test('a thrown error object is the error of the call, any other exception #VALUE! without words', async () => {
    expect(await given("{ throw new CustomFunctions.Error('#VALUE!', 'm'); }")).toEqual({ ok: false, error: { error: '#VALUE!', message: 'm' } });
    expect(await given("Promise.reject(new TypeError('x'))")).toEqual({ ok: false, error: { error: '#VALUE!' } });
  });
  test('a scalar, an empty matrix, rows of different lengths and objects are mistakes', async () => {
    for (const result of ['5', '[]', '[[]]', '[1]', '[[1], [1, 2]]', '[[{}]]']) await expect(given(result), result).rejects.toThrow(/^F /);
  });
});

describe('the host', () => {
  test('does not call a function with errors that the metadata does not let through', async () => {
    const metadata = metadataOf([{}], { allowErrorForDataTypeAny: undefined });
    const host = createFunctionHost({ source: giving('[[1]]'), metadata });
    expect(await host.call('F', [{ cells: [[1], [{ error: '#REF!' }]] }])).toEqual({ ok: false, error: { error: '#REF!' } });
  });
  test('refuses a bundle and metadata that do not belong together', () => {
    const metadata = metadataOf([]);
    expect(() => createFunctionHost({ source: '', metadata })).toThrow('the bundle has no function F');
    expect(() => createFunctionHost({ source: `${giving('[[1]]')} CustomFunctions.associate('G', () => [[1]]);`, metadata })).toThrow(
      'functions.json has no function G',
    );
  });
  test('refuses an unknown function and too many arguments', async () => {
    const host = createFunctionHost({ source: giving('[[1]]'), metadata: metadataOf([{}]) });
    await expect(host.call('G', [])).rejects.toThrow('no function G');
    await expect(host.call('F', [cell(1), cell(2)])).rejects.toThrow('F takes 1 arguments, got 2');
  });
  test('puts nothing on the global object', async () => {
    const before = Object.keys(globalThis);
    const host = createFunctionHost(await bundle());
    expect(host.functions.length).toBeGreaterThan(10);
    expect(Object.keys(globalThis)).toEqual(before);
    expect(globalThis).not.toHaveProperty('CustomFunctions');
  });
  test('asks the port at the time of the call', async () => {
    let asked = 0;
    const port = () => void asked++;
    const host = createFunctionHost({ ...(await bundle()), port });
    await host.call('STDU_FROM_TOL', [cell(1)]);
    expect(asked).toBe(1);
  });
});
