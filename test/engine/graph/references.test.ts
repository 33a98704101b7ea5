import { describe, expect, it } from 'vitest';
import { CellGraph } from '../../../functions/engine/graph/cellGraph';
import { Sweep } from '../../../functions/engine/graph/sweep';
import { Trial } from '../../../functions/engine/graph/trial';
import { type Entry, Sheets, graphOf } from './sheetsOf';

/** What a cell shows, its slopes by the input cells named, which of them it depends on, and why it is refused. */
function follow(contents: Record<string, Record<string, Entry>>, result: string, ...inputs: string[]) {
  const sheets = new Sheets(contents);
  const graph = graphOf(sheets, result, ...inputs);
  const node = graph.node(sheets.place(result))!;
  const sweep = new Sweep(graph.nodes);
  sweep.run(node);
  const parents = new Set<number>([node]);
  for (let n = node; n >= 0; n--) {
    if (parents.has(n)) for (let e = graph.nodes.edge.data[n]; e < graph.nodes.edge.data[n + 1]; e++) parents.add(graph.nodes.parent.data[e]);
  }
  const nodes = inputs.map((i) => graph.node(sheets.place(i))!);
  return {
    value: graph.nodes.value[node].v,
    slopes: nodes.map((n) => sweep.sensitivity(n)),
    linked: nodes.map((n) => parents.has(n)),
    refusal: graph.nodes.refusal[node]?.message,
  };
}

const S: Record<string, Entry> = { A1: 1, A2: 20, A3: '=A2+10', A4: '=A3*2', B1: 2 };

describe('OFFSET and INDIRECT in a workbook', () => {
  it('OFFSET evaluates the cells it lands on, formulas in their turn, and depends on what decided', () => {
    expect(follow({ S: { ...S, C1: '=SUM(OFFSET(A1,B1,0,2))' } }, 'C1', 'A2', 'B1', 'A1')).toEqual({
      value: 90, slopes: [3, 0, 0], linked: [true, true, false], refusal: undefined,
    });
  });

  it('the offset may itself be computed', () => {
    expect(follow({ S: { ...S, D1: '=B1*1.5', C1: '=OFFSET(A1,D1,0)' } }, 'C1', 'A2', 'B1')).toMatchObject({ value: 60, slopes: [2, 0], linked: [true, true] });
  });

  it('INDIRECT finds other sheets by name, quoted or not, whatever the case', () => {
    const book = { Out: { B1: "='My data'!A1", C1: '=INDIRECT("\'my DATA\'!A"&B1)*2', C2: '=INDIRECT("raw!R3C1",FALSE)+1', C3: '=INDIRECT("Gone!A1")' }, 'My data': { A1: 2, A2: 7 }, Raw: { A3: '=Out!B1*5' } };
    expect(follow(book, 'C1', "My data!A2", "My data!A1")).toEqual({ value: 14, slopes: [2, 0], linked: [true, true], refusal: undefined });
    expect(follow(book, 'C2', "My data!A1")).toMatchObject({ value: 11, slopes: [5] });
    expect(follow(book, 'C3')).toMatchObject({ value: '#REF!', refusal: undefined });
  });

  it('INDIRECT(ADDRESS(…)) reads the cell in that row and column', () => {
    expect(follow({ S: { ...S, C1: '=INDIRECT(ADDRESS(B1+1,1,4,TRUE,"S"))' } }, 'C1', 'A2', 'B1')).toMatchObject({ value: 30, slopes: [1, 0], linked: [true, true] });
  });

  it('R1C1 text is relative to the cell that holds the formula', () => {
    expect(follow({ S: { ...S, B3: '=INDIRECT("R[-1]C[-1]",FALSE)' } }, 'B3', 'A2')).toMatchObject({ value: 20, slopes: [1] });
  });

  it('cells around the one that is read may depend on the result: only where a reference lies is looked at', () => {
    expect(follow({ S: { A1: '=C1+1', A2: 5, C1: '=OFFSET(A1,1,0)*2' } }, 'C1', 'A2')).toMatchObject({ value: 10, slopes: [2], refusal: undefined });
    expect(follow({ S: { A1: '=C1+1', C1: '=ROW(INDIRECT("A1"))+ROWS(OFFSET(A1,0,0,4))' } }, 'C1')).toMatchObject({ value: 5, refusal: undefined });
  });

  it('a circle through them is named', () => {
    expect(follow({ S: { A1: '=C1+1', B1: 0, C1: '=OFFSET(A1,B1,0)*2' } }, 'C1').refusal).toMatch(/^cells (A1 → C1 → A1|C1 → A1 → C1) form a circle$/);
  });

  it('a name in the text is refused by the address of the cell that asks', () => {
    expect(follow({ S: { A1: 1, C1: '=INDIRECT("Factor")' } }, 'C1').refusal).toBe('cell C1 hands INDIRECT the text "Factor", which cannot be followed');
  });

  it('cells that have not been read are asked for in rounds', () => {
    const sheets = new Sheets({ S: { ...S, C1: '=OFFSET(A1,B1,0)' } });
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
    expect(rounds).toBe(4); // C1, B1, then A3, then A2
    expect(graph.nodes.value[graph.node(sheets.place('C1'))!].v).toBe(30);
  });

  it('a finite step of the offset lands elsewhere', () => {
    const sheets = new Sheets({ S: { ...S, C1: '=OFFSET(A1,B1,0)' } });
    const graph = graphOf(sheets, 'C1', 'B1');
    const node = graph.node(sheets.place('C1'))!;
    const above = Array.from({ length: node + 1 }, (_, i) => node - i);
    expect(new Trial(graph).value(node, above, new Map([[graph.node(sheets.place('B1'))!, 1]]))).toBe(60);
  });
});

describe('arrays in a workbook', () => {
  it('a sorted spill hands its cells on with their slopes', () => {
    const spill = { value: undefined, array: { rows: 3, cols: 1 } };
    const part = (shows: number) => ({ formula: '', shows, rest: { formula: undefined, partOf: { row: 1, col: 2 } } });
    const cells: Record<string, Entry> = {
      A1: 3, A2: 1, A3: 2, B1: { formula: '=SORT(A1:A3)', rest: spill }, B2: part(2), B3: part(3), C1: '=B2*10', C2: '=SUM(B1#)',
    };
    expect(follow({ S: cells }, 'C1', 'A1', 'A2', 'A3')).toEqual({ value: 20, slopes: [0, 0, 10], linked: [true, true, true], refusal: undefined });
    expect(follow({ S: cells }, 'C2', 'A1', 'A2', 'A3')).toMatchObject({ value: 6, slopes: [1, 1, 1] });
  });

  it('an inverse that many cells share has the slopes of its own elements', () => {
    const cells: Record<string, Entry> = {
      A1: 4, B1: -1, C1: 0, A2: 2, B2: 1, C2: 0, A3: 0, B3: 0, C3: 1,
      E1: '=INDEX(MINVERSE($A$1:$C$3),1,1)', E2: '=INDEX(MINVERSE($A$1:$C$3),3,3)*2',
    };
    const found = follow({ S: cells }, 'E1', 'A1', 'C3');
    expect(found.value).toBeCloseTo(1 / 6, 15);
    expect(found.slopes[0]).toBeCloseTo(-1 / 36, 15); // -(b22/det)²
    expect(follow({ S: cells }, 'E2', 'C3')).toMatchObject({ value: 2, slopes: [-2] });
  });
});
