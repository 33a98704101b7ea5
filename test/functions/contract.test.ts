import { beforeAll, describe, expect, test } from 'vitest';
import { callFunction } from '../../functions/call';
import type { Declaration } from '../../functions/declaration';
import { each, whole } from '../../functions/declaration';
import { number } from '../../functions/parameters';
import { registry } from '../../functions/registry';
import { excel } from './excel';
import type { Given, Shown } from './excel';
import { memoryPort } from './carry/memoryPort';

/** The workbook behind the port. */
const sheet = { B2: 10, C2: 2, D2: '=B2*C2', E2: 0.1, B3: 20, C3: 3, D3: '=B3*C3', E3: 0.2 };
const results: Given = { cells: [[20], [60]], address: 'S!D2:D3' };
const result: Given = { cells: [[20]], address: 'S!D2' };
const input: Given = { cells: [[10], [20]], address: 'S!B2:B3' };
const evidence: Given = { cells: [[0.1], [0.2]], address: 'S!E2:E3' };

/** A call that works, for every function: all of its arguments, the required ones first. */
const working: Record<string, Given[]> = {
  STDU_FROM_TOL: [[0.5, 2], 'triangular', true],
  STDU_FROM_RANGE: [[1, 2], [3, 4], 'arcsine', true],
  STDU_FROM_CERT: [[0.5, 2], 0.95, 9, 't', true],
  STDU_FROM_RES: [[0.5, 2], 0.2, true],
  STDU_FROM_REPEATS: [[[1, 2, 4], [2, 3, 5]], 2, 0.5, 9, true],
  STDU_FROM_DUPLICATES: [[1, 2, 3], [1.1, 2.2, 2.9], true, true],
  STDU_FROM_BIAS: [[0.1, -0.2], [0.05, 0.06], true],
  STDU_FROM_TEMP: [[10, 20], 4, 3e-4, 'triangular', true],
  SPEC_TOL: [[1, 2], 0.001, 10, 0.0001, 0.01, 2],
  SD_POOL: [[0.1, 0.2], [4, 9]],
  GLASS_TOL: ['burette', [50, 100], 'B', 'ISO', [0.1, 0.2], true],
  UNC_COMBINE: [[0.3, 0.4], [1, 2], [[1, 0.5], [0.5, 1]], true],
  UNC_ROUND: [[1, 2], [0.1, 0.2], 1, 'up'],
  UNC_TEXT: [[1, 2], [0.1, 0.2], 'plusminus', 1, 'mg', 2],
  UNC_READ: [['12.10 ± 0.12, k = 2', '12.10(5)']],
  UNC_EXPAND: [[1, 2], 0.95, 9],
  UNC_FACTOR: [[0.9, 0.95], 9, 't'],
  UNC_CONFORM: [[1, 2], [0.1, 0.2], -1, 'none', 9],
  UNC_GUARD: [[1, 2], [0.1, 0.2], 'lower', 0.1, 'rejection', true, 9],
  UNC_DECIDE: [[1, 2], [0.1, 0.2], -1, 10, 'acceptance', 0.1],
  SCORE_Z: [[1, 2], 1.5, 0.2, true],
  SCORE_ZETA: [[1, 2], 0.1, 1.5, 0.2, true],
  SCORE_EN: [[1, 2], 0.1, 1.5, 0.2, true],
  SIG_COUNT: [['12.10', 3]],
  SIG_ROUND: [[1.25, 2], 2],
  SIG_SUM: [['12.11', 18], [4, 'exact'], true],
  SIG_PRODUCT: [['12.11', 18], ['2.0', 3], [4, 3], [2, 1], true],
  SIG_LOG: [['12.10', 3], true],
  SIG_ANTILOG: [['1.10', 0.3], true],
  UNC_CARRY: [results, input, evidence],
  UNC_REPORT: [results, 2, input, evidence],
  UNC_BUDGET: [result, 2, { cells: [[10]], address: 'S!B2' }, { cells: [[0.1]], address: 'S!E2' }],
  UNC_CORREL: [results, input, evidence],
  LIBRARY_VERSION: [],
};

/** Functions that need at least one of their optional arguments, and say so. */
const wantsOneOf = new Set(['UNC_CONFORM', 'UNC_DECIDE']);

/** What a wrong hand or a wrong cell may put into any argument. */
const wrong: Given[] = [
  'abc', '1', '12.5', '12,5', '', ' ', true, false, 0, -1, 1.5, 1e300, -1e300, 1e-300, null,
  { error: '#N/A' }, { error: '#DIV/0!' }, { error: '#REF!' },
  [1, 2, 3, 4, 5, 6, 7], [[1, 2, 3]], [['x', null], [0, { error: '#N/A' }]], [null, null, null],
];

const hosts = [
  { blanks: 'null', parameterAddresses: true },
  { blanks: 'zero', parameterAddresses: true },
  { blanks: 'zero', parameterAddresses: false },
] as const;

describe.each(hosts)('with blanks as $blanks and addresses of arguments $parameterAddresses', (options) => {
  let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
  beforeAll(async () => {
    call = await excel({ ...options, port: memoryPort({ S: sheet }) });
  });

  test.each(registry.map((d) => [d.name, d] as const))('%s works with all and with its required arguments alone', async (name, declaration) => {
    expect(working, `a working call of ${name} is listed here`).toHaveProperty(name);
    const parameters = Object.values(declaration.parameters);
    const omitted = working[name].map((arg, i) => (parameters[i]?.optional ? undefined : arg));
    const trailing = [...omitted].reverse().findIndex((arg) => arg !== undefined);
    for (const args of [working[name], omitted, trailing < 0 ? [] : omitted.slice(0, omitted.length - trailing)]) {
      const cells = (await call(name, ...args)).flat();
      const wantsOne = args !== working[name] && wantsOneOf.has(name);
      const good = wantsOne || (declaration.readsWorkbook && !options.parameterAddresses) ? (cell: Shown) => isWorded(name, cell) : isGood;
      // A table has empty cells, but not its first one.
      for (const [i, cell] of cells.entries())
        expect(cell, `${name} of ${JSON.stringify(args)}`).toSatisfy((c: Shown) => good(c) || (i > 0 && c === '' && cells.length > 4));
    }
  });

  test.each(registry.map((d) => [d.name, d] as const))('%s answers wrong arguments in words that name it and the argument', async (name, declaration) => {
    for (const [i, [key, parameter]] of Object.entries(declaration.parameters).entries()) {
      for (const value of wrong) {
        const args = [...working[name]];
        args[i] = value;
        const cells = (await call(name, ...args)).flat();
        for (const cell of cells) {
          expect(cell, `${name} with ${key} = ${JSON.stringify(value)}`).toSatisfy((c: Shown) => c === '' || isGood(c) || isWorded(name, c));
          const numeric = parameter.kind === 'number' || parameter.kind === 'numbers';
          if (numeric && (value === 'abc' || value === '1' || value === true))
            expect(cell).toSatisfy((c: Shown) => isWorded(name, c) && String(c).includes(`${name}: ${key} must be `));
        }
      }
    }
  });
});

/** A finite number, text or a boolean, and no error. */
const isGood = (cell: Shown): boolean =>
  typeof cell === 'boolean' || (typeof cell === 'number' ? Number.isFinite(cell) : typeof cell === 'string' && cell !== '' && !cell.startsWith('#'));

/** An error that shows a message, which begins with the function and comes from no fault of the library. */
const isWorded = (name: string, cell: Shown): boolean =>
  typeof cell === 'string' && /^(#VALUE!|#N\/A) /.test(cell) && cell.includes(` ${name}: `) && !cell.includes('fault in the library');

describe('255 arguments', () => {
  const many = (n: number, one: readonly Given[]): Given[] => Array.from({ length: n }, (_, i) => one[i % one.length]);
  let call: (id: string, ...args: Given[]) => Promise<Shown[][]>;
  beforeAll(async () => {
    call = await excel({ blanks: 'zero', parameterAddresses: true, port: memoryPort({ S: sheet }) });
  });

  test.each(registry.filter((d) => Object.values(d.parameters).some((p) => p.repeating)).map((d) => [d.name, d] as const))('%s takes them, or says in words what is wrong', async (name, declaration) => {
    const fixed = Object.values(declaration.parameters).findIndex((p) => p.repeating);
    const head = working[name].slice(0, fixed);
    for (const count of [254, 255]) {
      const cells = (await call(name, ...head, ...many(count - fixed, working[name].slice(fixed)))).flat();
      expect(cells.every((c) => c === '' || isGood(c) || isWorded(name, c)), JSON.stringify(cells.slice(0, 2))).toBe(true);
    }
  });
});

describe('what a body does wrong', () => {
  const odd = (body: () => number): Declaration =>
    each({ name: 'ODD_ONE', family: 'Proof', help: '', parameters: { x: number({ help: '' }) }, result: '', body });
  beforeAll(() => {
    Object.assign(globalThis, {
      CustomFunctions: {
        Error: class {
          constructor(readonly code: string, readonly message: string) {}
        },
      },
    });
  });

  test('a number that is not finite becomes an error, never 0', () => {
    for (const bad of [NaN, Infinity, -Infinity])
      expect(callFunction(odd(() => bad), [[[1]]], {})).toEqual([[{ code: '#VALUE!', message: 'ODD_ONE: the result is not a finite number' }]]);
    expect(callFunction(odd(() => NaN), [[[1], [2]]], {})).toEqual(
      [1, 2].map((row) => [{ code: '#VALUE!', message: `ODD_ONE: the result is not a finite number in row ${row}` }]),
    );
    const table = whole({ name: 'ODD_TABLE', family: 'Proof', help: '', parameters: {}, result: '', body: () => [[1, NaN], [2]] });
    expect(callFunction(table, [], {})).toEqual([[1, { code: '#VALUE!', message: 'ODD_TABLE: the result is not a finite number' }], [2, '']]);
  });
  test('an exception that is no refusal surfaces as a fault of the library', () => {
    const fault = odd(() => {
      throw new TypeError('x is not a function');
    });
    expect(callFunction(fault, [[[1], [2]]], {})).toEqual(
      [1, 2].map((row) => [{ code: '#VALUE!', message: `ODD_ONE: fault in the library (TypeError: x is not a function) in row ${row}` }]),
    );
  });
  test('minus zero becomes zero', () => {
    expect(Object.is((callFunction(odd(() => -0), [[[1]]], {}) as number[][])[0][0], 0)).toBe(true);
  });
});
