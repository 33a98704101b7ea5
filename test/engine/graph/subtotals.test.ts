import { describe, expect, it } from 'vitest';
import type { HiddenRows } from '../../../functions/engine/formula/rowState';
import { Sweep } from '../../../functions/engine/graph/sweep';
import { callOn } from '../../functions/carry/callOn';
import { memoryPort } from '../../functions/carry/memoryPort';
import { type Entry, graphOf, Sheets } from './sheetsOf';

const column: Record<string, Entry> = { A1: 1, A2: 20, A3: 300, A4: '=SUBTOTAL(9,A1:A3)', A5: 4000, A6: 'none', A7: '=1+AGGREGATE(9,0,A5)' };
const twoRows: HiddenRows = new Map([[2, 'hidden'], [3, 'filtered']]);

function shown(formula: string, hidden: HiddenRows = new Map(), cells = column, inputs: string[] = []) {
  const sheets = new Sheets({ S: { ...cells, C1: formula } });
  sheets.hidden = hidden;
  const graph = graphOf(sheets, 'C1', ...inputs);
  const node = graph.node(sheets.place('C1'))!;
  if (graph.nodes.refusal[node]) return graph.nodes.refusal[node]!.message;
  if (inputs.length === 0) return graph.nodes.value[node].v;
  const sweep = new Sweep(graph.nodes);
  sweep.run(node);
  return inputs.map((i) => sweep.sensitivity(graph.node(sheets.place(i))!));
}

describe('SUBTOTAL', () => {
  it('passes over cells that are subtotals themselves, alone or inside a formula', () => {
    expect(shown('=SUBTOTAL(9,A1:A7)')).toBe(4321);
    expect(shown('=SUBTOTAL(2,A1:A7)')).toBe(4);
    expect(shown('=SUBTOTAL(3,A1:A7)')).toBe(5);
  });

  it('takes its function by number', () => {
    const of = (n: number): unknown => shown(`=SUBTOTAL(${n},A1:A3)`);
    expect([1, 2, 3, 4, 5, 6, 9].map(of)).toEqual([107, 3, 3, 300, 1, 6000, 321]);
    // deviations from 107: -106, -87, 193; squares sum to 56054
    expect([7, 8, 10, 11].map(of)).toEqual([Math.sqrt(28027), Math.sqrt(56054 / 3), 28027, 56054 / 3].map((v) => expect.closeTo(v, 9)));
  });

  it('the numbers from 101 leave out rows hidden by hand too; all leave out what a filter does', () => {
    expect(shown('=SUBTOTAL(9,A1:A5)', twoRows)).toBe(4021);
    expect(shown('=SUBTOTAL(109,A1:A5)', twoRows)).toBe(4001);
    expect(shown('=SUBTOTAL(102,A1:A5)', twoRows)).toBe(2);
  });

  it('an unknown number and an array are #VALUE!', () => {
    for (const call of ['12,A1', '0,A1', '112,A1', '100,A1', '-1,A1', '9,A1*2']) expect(shown(`=SUBTOTAL(${call})`)).toBe('#VALUE!');
  });

  it('has the slopes of its function for the cells it keeps, none for others', () => {
    expect(shown('=SUBTOTAL(101,A1:A5)', twoRows, column, ['A1', 'A2', 'A3', 'A5'])).toEqual([0.5, 0, 0, 0.5]);
  });
});

describe('AGGREGATE', () => {
  const withError: Record<string, Entry> = { ...column, A2: '=1/0', A4: 0 };
  it('passes over errors where its option says so', () => {
    expect(shown('=AGGREGATE(9,6,A1:A3)', new Map(), withError)).toBe(301);
    expect(shown('=AGGREGATE(9,4,A1:A3)', new Map(), withError)).toBe('#DIV/0!');
    expect(shown('=AGGREGATE(9,2,A1:A7)', new Map(), withError)).toBe(4301);
  });

  it('passes over nested subtotals up to option 3, hidden rows at odd options', () => {
    expect(shown('=AGGREGATE(9,0,A1:A5)')).toBe(4321);
    expect(shown('=AGGREGATE(9,,A1:A5)')).toBe(4321);
    expect(shown('=AGGREGATE(9,4,A1:A5)')).toBe(4642);
    expect(shown('=AGGREGATE(9,5,A1:A3)', twoRows)).toBe(1);
    expect(shown('=AGGREGATE(4,7,A1:A5)', twoRows)).toBe(4000);
  });

  it('refuses filtered rows under an option that does not speak of them', () =>
    expect(shown('=AGGREGATE(9,4,A1:A3)', twoRows)).toBe(
      'cell C1 uses AGGREGATE in a way that cannot be followed: row 3 is left out by a filter, and its option does not say what becomes of such rows',
    ));

  it('ranks, also over an array', () => {
    expect(shown('=AGGREGATE(14,6,A1:A3,1)', new Map(), withError)).toBe(300);
    expect(shown('=AGGREGATE(15,6,A1:A3/(A1:A3>5),1)')).toBe(20);
    expect(shown('=AGGREGATE(16,4,A1:A3,0.25)')).toBe(10.5);
    expect(shown('=AGGREGATE(12,4,A1:A3)')).toBe(20);
  });

  it('wrong numbers are #VALUE!', () => {
    for (const call of ['20,4,A1,1', '9,8,A1', '14,4,A1:A3', '9,4,A1:A3*1']) expect(shown(`=AGGREGATE(${call})`)).toBe('#VALUE!');
  });
});

describe('carry', () => {
  it('asks which rows show, once it needs to', async () => {
    const port = memoryPort({ S: { A1: 1, A2: 20, A3: 300, B1: '=SUBTOTAL(109,A1:A3)', C1: 3, C2: 4, C3: 5 } }, {}, new Map([[2, 'hidden']]));
    expect(await callOn(port, 'UNC_CARRY', ['S!B1'], ['S!A1:A3', 'S!C1:C3'])).toEqual([[expect.closeTo(Math.sqrt(34), 12)]]);
  });
});
