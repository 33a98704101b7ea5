import { describe, expect, test } from 'vitest';
import { readGrids } from '../../functions/blanks';
import type { RawArgument } from '../../functions/blanks';
import { DataTypeCell, ZERO_OR_BLANK } from '../../functions/cells';
import { CellError } from '../../functions/errors';
import type { PortArea } from '../../functions/workbook';
import { portOf } from './excel';

const given = (raw: unknown, address?: string, tellBlanks = true): RawArgument => ({ name: 'readings', raw, address, tellBlanks });
const cellsOf = async (argument: RawArgument, port = undefined as ReturnType<typeof portOf> | undefined, tells = true) =>
  (await readGrids([argument], port, tells))[0].cells;

describe('cells as they arrive', () => {
  test('blank ones are null, texts and booleans stay, an error is one whichever form it has', async () => {
    const hostError = Object.assign(new Error(), { code: '#DIV/0!' });
    const row = [1, 'a', '', true, null, undefined, hostError, { type: 'Error', basicType: 'Error', basicValue: '#N/A', errorType: 'NotAvailable' }];
    expect(await cellsOf(given([row]))).toEqual([[1, 'a', null, true, null, null, new CellError('#DIV/0!'), new CellError('#N/A')]]);
    expect((await cellsOf(given([row])))[0][6]).toHaveProperty('code', '#DIV/0!');
    expect((await cellsOf(given([row])))[0][7]).toHaveProperty('code', '#N/A');
  });
  test('a number with properties is its number, in both spellings of its type; an entity is none', async () => {
    const row = [
      { type: 'Double', basicType: 'Double', basicValue: 9.81, properties: {} },
      { type: 'FormattedNumber', basicType: 'Double', basicValue: 2, numberFormat: '0.00' },
      { type: 'String', basicType: 'String', basicValue: 'x' },
      { type: 'Boolean', basicType: 'Boolean', basicValue: false },
      { type: 'Entity', basicType: 'Error', basicValue: '#VALUE!', text: 'e' },
    ];
    expect(await cellsOf(given([row]))).toEqual([[9.81, 2, 'x', false, new DataTypeCell('Entity')]]);
  });
  test('an omitted argument, a scalar and an empty matrix are one cell', async () => {
    for (const [raw, cell] of [[null, null], [undefined, null], [5, 5], [[], null], [[[]], null]] as const)
      expect(await cellsOf(given(raw))).toEqual([[cell]]);
  });
});

describe('a 0 that may be a blank cell', () => {
  test('is looked up, all arguments in one reading, and only the rows that hold a 0', async () => {
    const asked: PortArea[] = [];
    const port = portOf({ S: [[1, 1], [null, 0], [0, null], [4, 4]] }, asked);
    let readings = 0;
    const counted = { ...port, read: (areas: readonly PortArea[]) => (readings++, port.read(areas)) };
    const grids = await readGrids(
      [given([[1], [0], [0], [4]], 'S!A1:A4'), given([[1], [0], [0], [4]], 'S!B1:B4'), given([[7]], 'S!A9')], counted, true,
    );
    expect(grids.map(({ cells }) => cells.flat())).toEqual([[1, null, 0, 4], [1, 0, null, 4], [7]]);
    expect(readings).toBe(1);
    expect(asked).toEqual([{ sheet: 'S', row: 2, col: 1, rows: 2, cols: 1 }, { sheet: 'S', row: 2, col: 2, rows: 2, cols: 1 }]);
  });
  test('is 0 where the host tells addresses and has none here: a literal', async () => {
    expect(await cellsOf(given([[0], [1]]))).toEqual([[0], [1]]);
  });
  test('stays open without addresses, without a port, in another workbook, or with an address that does not fit', async () => {
    const port = portOf({ S: [[0]] });
    expect(await cellsOf(given([[0]]), port, false)).toEqual([[ZERO_OR_BLANK]]);
    expect(await cellsOf(given([[0]], 'S!A1'))).toEqual([[ZERO_OR_BLANK]]);
    expect(await cellsOf(given([[0]], '[Book2]S!A1'), port)).toEqual([[ZERO_OR_BLANK]]);
    expect(await cellsOf(given([[0]], 'S!A1:A2'), port)).toEqual([[ZERO_OR_BLANK]]);
  });
  test('is left alone where the two mean the same', async () => {
    expect(await cellsOf(given([[0]], undefined, false), undefined, false)).toEqual([[0]]);
  });
  test('costs no promise where there is none', () => {
    expect(readGrids([given([[1], [2]], 'S!A1:A2')], portOf({}), true)).not.toHaveProperty('then');
  });
});

describe('a whole column', () => {
  const column = (blank: 0 | null, ...top: unknown[]) => Array.from({ length: 1048576 }, (_, i) => [i < top.length ? top[i] : blank]);
  test('is cut after its last cell, all of them to the same height', async () => {
    const grids = await readGrids([given(column(null, 'head', 1, 2)), given(column(null, 'head', 1))], undefined, true);
    expect(grids.map(({ cells }) => cells.flat())).toEqual([['head', 1, 2], ['head', 1, null]]);
  });
  test('is cut to the used part of its sheet where blanks arrive as 0', async () => {
    const port = portOf({ S: [['head'], [1], [null], [0], [null]] });
    expect(await cellsOf(given(column(0, 'head', 1), 'S!A:A'), port)).toEqual([['head'], [1], [null], [0], [null]]);
  });
  test('is refused where zeros and blanks at its end cannot be told apart', () => {
    return expect(Promise.resolve(readGrids([given(column(0, 'head', 1))], undefined, false))).rejects.toThrow(
      'readings is a whole column; give the part that holds data',
    );
  });
  test('a whole row is refused', () => {
    expect(() => readGrids([given([Array.from({ length: 16384 }, () => null)])], undefined, true)).toThrow('readings is a whole row; give the part that holds data');
  });
});
