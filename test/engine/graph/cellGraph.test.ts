import { describe, expect, it } from 'vitest';
import { CellGraph } from '../../../functions/engine/graph/cellGraph';
import { Sweep } from '../../../functions/engine/graph/sweep';
import { type Entry, Sheets, graphOf } from './sheetsOf';

/** What a cell shows and its slopes by the input cells named. */
function follow(sheets: Sheets, result: string, ...inputs: string[]): { value: unknown; slopes: number[]; refusal?: string } {
  const graph = graphOf(sheets, result, ...inputs);
  const node = graph.node(sheets.place(result))!;
  const sweep = new Sweep(graph.nodes);
  sweep.run(node);
  return {
    value: graph.nodes.value[node].v,
    slopes: inputs.map((i) => sweep.sensitivity(graph.node(sheets.place(i))!)),
    refusal: graph.nodes.refusal[node]?.message,
  };
}

describe('references', () => {
  it('to other sheets, quoted names and several sheets at once', () => {
    const sheets = new Sheets({ Out: { A1: "='My ''data'''!A1*2+SUM(One:Three!A1)" }, "My 'data'": { A1: 5 }, One: { A1: 1 }, Two: { A1: 2 }, Three: { A1: 3 } });
    expect(follow(sheets, 'A1', "My 'data'!A1", 'Two!A1')).toEqual({ value: 16, slopes: [2, 1], refusal: undefined });
  });

  it('through defined names, of cells, constants and expressions', () => {
    const sheets = new Sheets({ S: { A1: 5, B1: '=Factor*Offset_+Twice' } }, { Factor: 'S!$A$1', Offset_: '3', Twice: 'S!$A$1*2' });
    expect(follow(sheets, 'B1', 'A1')).toEqual({ value: 25, slopes: [5], refusal: undefined });
  });

  it('a name that does not exist is #NAME?', () => expect(follow(new Sheets({ S: { A1: '=Nothing+1' } }), 'A1').value).toBe('#NAME?'));

  it('to tables: this row, a column, headers and totals', () => {
    const area = { k: 'area' as const, sheet: 0, r1: 1, c1: 1, r2: 4, c2: 3 };
    const tables = { T: { area, columns: ['Id', 'Mass', 'Double'], headerRows: 1, totalsRows: 0 } };
    const cells: Record<string, Entry> = {
      A1: 'Id', B1: 'Mass', C1: 'Double', A2: 1, B2: 10, C2: '=T[[#This Row],[Mass]]*2', A3: 2, B3: 20, C3: '=T[@Mass]*2', A4: 3, B4: 30, C4: '=2*[@Mass]',
      E1: '=SUM(T[Mass])', E2: '=T[[#Headers],[Mass]]', E3: '=SUM(T[[Mass]:[Double]])', E4: '=T[Nothing]',
    };
    const sheets = new Sheets({ S: cells }, {}, tables);
    expect(follow(sheets, 'C2', 'B2')).toMatchObject({ value: 20, slopes: [2] });
    expect(follow(sheets, 'C3', 'B3')).toMatchObject({ value: 40, slopes: [2] });
    expect(follow(sheets, 'C4', 'B4')).toMatchObject({ value: 60, slopes: [2] });
    expect(follow(sheets, 'E1', 'B2', 'B4')).toMatchObject({ value: 60, slopes: [1, 1] });
    expect(follow(sheets, 'E2').value).toBe('Mass');
    expect(follow(sheets, 'E3', 'B2')).toMatchObject({ value: 180, slopes: [3] });
  });

  it('to a spill by its anchor, and to single cells of it', () => {
    const spill = { value: undefined, array: { rows: 3, cols: 1 } };
    const part = (shows: number) => ({ formula: '', shows, rest: { formula: undefined, partOf: { row: 1, col: 2 } } });
    const cells: Record<string, Entry> = {
      A1: 1, A2: 2, A3: 3, B1: { formula: '=A1:A3*10', rest: spill }, B2: part(20), B3: part(30), C1: '=SUM(B1#)', C2: '=B2+B3',
    };
    const sheets = new Sheets({ S: cells });
    expect(follow(sheets, 'C1', 'A1', 'A3')).toMatchObject({ value: 60, slopes: [10, 10] });
    expect(follow(new Sheets({ S: cells }), 'C2', 'A1', 'A2')).toMatchObject({ value: 50, slopes: [0, 10] });
  });

  it('a spilled cell that shows something else is refused', () => {
    const cells: Record<string, Entry> = {
      A1: 1, A2: 2, B1: { formula: '=A1:A2*10', rest: { value: undefined, array: { rows: 2, cols: 1 } } },
      B2: { formula: '', shows: 21, rest: { formula: undefined, partOf: { row: 1, col: 2 } } }, C2: '=B2+1',
    };
    expect(follow(new Sheets({ S: cells }), 'C2').refusal).toMatch(/^cell B2 shows 21, but its formula gives 20/);
  });

  it('one cell of a range, where the sheet intersects', () => {
    const cells: Record<string, Entry> = { A1: 1, A2: 2, A3: 3, B2: { formula: '=A1:A3*10', rest: { implicit: true } } };
    expect(follow(new Sheets({ S: cells }), 'B2', 'A2', 'A1')).toMatchObject({ value: 20, slopes: [10, 0] });
  });

  it('ranges made of references: A1:INDEX(…), unions, intersections', () => {
    const cells: Record<string, Entry> = { A1: 1, A2: 2, A3: 3, B1: '=SUM(A1:INDEX(A1:A3,2))', B2: '=SUM((A1,A3))', B3: '=SUM(A1:A2 A2:A3)' };
    expect(follow(new Sheets({ S: cells }), 'B1', 'A2', 'A3')).toMatchObject({ value: 3, slopes: [1, 0] });
    expect(follow(new Sheets({ S: cells }), 'B2').value).toBe(4);
    expect(follow(new Sheets({ S: cells }), 'B3').value).toBe(2);
  });
});

describe('evaluation', () => {
  it('a branch that is not taken does no harm, be it a circle or an unknown function', () => {
    expect(follow(new Sheets({ S: { A1: 5, B1: '=IF(A1>3,A1,BESSELJ(B1,1))' } }), 'B1', 'A1')).toMatchObject({ value: 5, slopes: [1], refusal: undefined });
  });

  it('a circle is named whole, and what reads it is refused with the same words', () => {
    const sheets = new Sheets({ S: { A1: '=C1', B1: '=A1+1', C1: '=B1*2', D1: '=C1' } });
    expect(follow(sheets, 'D1').refusal).toMatch(/^cells [ABC]1 → [ABC]1 → [ABC]1 → [ABC]1 form a circle$/);
  });

  it('a sum over many cells that many rows share is computed once', () => {
    const cells: Record<string, Entry> = {};
    for (let r = 1; r <= 300; r++) Object.assign(cells, { [`A${r}`]: r, [`B${r}`]: `=A${r}/SUM($A$1:$A$300)` });
    const sheets = new Sheets({ S: cells });
    const graph = graphOf(sheets, 'B1:B300');
    expect(graph.nodes.count).toBe(601);
    expect(graph.nodes.parent.length).toBe(300 + 2 * 300);
    const [sweep, s] = [new Sweep(graph.nodes), (300 * 301) / 2];
    sweep.run(graph.node(sheets.place('B2'))!);
    expect(sweep.sensitivity(graph.node(sheets.place('A2'))!)).toBeCloseTo(1 / s - 2 / s ** 2, 15);
    expect(sweep.sensitivity(graph.node(sheets.place('A7'))!)).toBeCloseTo(-2 / s ** 2, 15);
  });

  it('a lookup whose key is the cell of the same row is not shared between rows', () => {
    const cells: Record<string, Entry> = { A1: 1, A2: 2, A3: 3, A4: 4, A5: 5, D1: 1, E1: 10, D2: 2, E2: 20, D3: 3, E3: 30 };
    for (const r of [1, 2, 3]) cells[`B${r}`] = { formula: '=VLOOKUP($A$1:$A$5,$D$1:$E$3,2,FALSE)', rest: { implicit: true, value: undefined } };
    const sheets = new Sheets({ S: cells });
    expect(['B1', 'B2', 'B3'].map((b) => follow(sheets, b).value)).toEqual([10, 20, 30]);
  });

  it('asks for cells that have not been read, in rounds', () => {
    const sheets = new Sheets({ S: { A1: 1, A2: 2, B1: '=SUM(A1:A2)', C1: '=B1*2' } });
    const read = new Set<string>();
    const wanted: string[] = [];
    const graph = new CellGraph({
      sheets: sheets.sheets,
      cell: (s, r, c) => (read.has(`${r},${c}`) ? sheets.cell(s, r, c) : undefined),
      want: (a) => { for (let r = a.r1; r <= a.r2; r++) for (let c = a.c1; c <= a.c2; c++) wanted.push(`${r},${c}`); },
      name: () => undefined,
      table: () => undefined,
      formula: (s, r, c) => sheets.formula(s, r, c),
      hiddenRows: () => new Map(),
    });
    let rounds = 0;
    while (!graph.evaluate([sheets.place('C1')])) {
      rounds++;
      for (const key of wanted.splice(0)) read.add(key);
    }
    expect(rounds).toBe(3);
    expect(graph.nodes.value[graph.node(sheets.place('C1'))!].v).toBe(6);
  });

  it('a stored result within 1e-9, or within 1e-12 of what was added up, agrees', () => {
    const one = (shows: number) => follow(new Sheets({ S: { A1: 1e6, B1: 1e6 - 1e-7, C1: { formula: '=(A1-B1)*1', shows } } }), 'C1').refusal;
    expect(one(1e-7)).toBeUndefined();
    expect(one(1e-7 + 1.9e-6)).toBeUndefined();
    expect(one(1e-7 + 2.1e-6)).toMatch(/^cell C1 shows/);
  });
});
