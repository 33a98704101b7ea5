/** Prints how long carrying takes: `npm run speed`. Nothing is asserted. */
import { Carry, type Input } from '../../functions/engine/carry/carry';
import { CellGraph } from '../../functions/engine/graph/cellGraph';
import { type Entry, Sheets } from '../engine/graph/sheetsOf';

const normal = { dof: Infinity, shape: { kind: 'normal' as const }, group: '' };

function run(title: string, cells: Record<string, Entry>, results: string, inputs: [string, number, string][]): void {
  const sheets = new Sheets({ S: cells });
  const began = performance.now();
  const graph = new CellGraph(sheets);
  const places = sheets.places(results);
  const list: Input[] = inputs.flatMap(([range, u, tag], argument) =>
    sheets.places(range).map((place) => ({
      place, argument,
      evidence: { u, ...normal, tags: tag === 'each' ? ({ k: 'each' } as const) : ({ k: 'none' } as const), row: `${argument}` },
    })),
  );
  graph.evaluate([...places, ...list.map((i) => i.place)]);
  const evaluated = performance.now();
  const carry = new Carry(graph, list);
  let refused = 0;
  for (const place of places) if (carry.result(place).k !== 'carried') refused++;
  const done = performance.now();
  console.log(
    `${title.padEnd(56)} evaluate ${(evaluated - began).toFixed(0).padStart(6)} ms   carry ${(done - evaluated).toFixed(0).padStart(6)} ms   ` +
      `${graph.nodes.count} nodes, ${graph.nodes.parent.length} edges, ${refused} refused, heap ${(process.memoryUsage().heapUsed / 2 ** 20).toFixed(0)} MB`,
  );
}

const rows = (n: number, make: (r: number) => Record<string, Entry>): Record<string, Entry> =>
  Object.assign({}, ...Array.from({ length: n }, (_, i) => make(i + 1))) as Record<string, Entry>;

for (const n of [5000, 20000]) {
  const flat: Record<string, Entry> = { Z1: 0.02 };
  for (let r = 1; r <= n; r++) Object.assign(flat, { [`A${r}`]: r, [`B${r}`]: 2 * r + 1, [`C${r}`]: `=(B${r}-A${r})*$Z$1`, [`D${r}`]: `=C${r}*1000/10` });
  run(`${n} rows of two formulas, three inputs`, flat, `D1:D${n}`, [[`A1:B${n}`, 0.01, 'each'], ['Z1', 0.0001, '']]);
}
for (const n of [2500, 10000]) {
  const chain: Record<string, Entry> = { A1: 1 };
  for (let r = 2; r <= n; r++) chain[`A${r}`] = `=A${r - 1}*1.0001`;
  run(`a chain of ${n} cells, one result`, chain, `A${n}`, [['A1', 0.01, '']]);
}
for (const n of [500, 2000]) {
  run(`${n} running totals by SUM(A$1:A1)`, rows(n, (r) => ({ [`A${r}`]: r, [`B${r}`]: `=SUM(A$1:A${r})` })), `B1:B${n}`, [[`A1:A${n}`, 0.01, 'each']]);
  run(`${n} running totals by B1+A2`, rows(n, (r) => ({ [`A${r}`]: r, [`B${r}`]: r === 1 ? '=A1' : `=B${r - 1}+A${r}` })), `B1:B${n}`, [[`A1:A${n}`, 0.01, 'each']]);
}
run('1000 sources in one result', rows(1000, (r) => ({ [`A${r}`]: r, B1: '=SUMSQ(A1:A1000)' })), 'B1', [['A1:A1000', 0.01, 'each']]);
