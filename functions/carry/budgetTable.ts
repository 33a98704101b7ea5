import type { CellResult } from '../cells';
import type { Carried, Effect } from '../engine/carry/carry';
import { cellName } from '../engine/graph/address';
import { formatShape } from '../engine/evidence/shape';
import { numberText } from '../engine/formula/numberText';
import { takenAsExact } from './exactCells';
import { labelOf } from './labelOf';
import { notesOn, shortList } from './notes';
import type { CarryCall } from './readCarryCall';
import { dofCell } from '../dofCell';
import { statement } from './statement';

const HEADINGS = [
  'Source', 'Cells', 'Standard uncertainty u', 'Sensitivity coefficient c', 'Component |c| u', 'Degrees of freedom',
  'Estimate', 'Type', 'Shape', 'Share of variance', 'Finite step', 'Evidence',
] as const;

/** Finite-step effects may differ from the linear one by this part of the combined uncertainty before it is said. */
const NONLINEAR = 0.05;

/**
 * The uncertainty budget of one result: a heading row, one row a source with the largest component first (columns of JCGM 100,
 * Table H.1, then what a reader asks next), the totals, what was taken as exact, and notes.
 */
export async function budgetTable(call: CarryCall, result: Carried, coverage: number | undefined, decimalSeparator: '.' | ','): Promise<CellResult[][]> {
  const effects = [...result.effects].sort((a, b) => Math.abs(b.component) - Math.abs(a.component));
  const rows: CellResult[][] = [[...HEADINGS]];
  let nonlinear = false;
  for (const effect of effects) {
    const step = finiteStep(call, result, effect);
    nonlinear ||= step !== 'agrees';
    rows.push(await sourceRow(call, result, effect, step));
  }
  rows.push(...totals(call, result, coverage, decimalSeparator, await labelOf(call.followed.snapshot, result.place)));
  for (const entry of takenAsExact(call, result)) rows.push(await exactRow(call, result, entry));
  for (const note of notesOn(call, result)) rows.push(wide(['Note', note]));
  if (nonlinear) rows.push(wide(['Note', 'the effects of finite steps differ from the linear ones: check the result by Monte Carlo']));
  return rows;
}

async function sourceRow(call: CarryCall, result: Carried, effect: Effect, step: string): Promise<CellResult[]> {
  const { graph, snapshot } = call.followed;
  const { tag, dof, shape } = call.carry.table.sources[effect.source];
  const { parts } = effect;
  const [first] = parts;
  const places = parts.map(({ input }) => call.carry.inputs[input].place);
  const labels = await Promise.all(distinct(places).slice(0, 3).map((p) => labelOf(snapshot, p)));
  const label = shortList(labels);
  const sameU = parts.every((p) => Math.abs(p.u) === Math.abs(first.u));
  const value = graph.nodes.value[first.node];
  return [
    tag === '' ? label : `${tag}: ${label}`,
    shortList(parts.map((p) => graph.nameOf(p.node, result.place.sheet))),
    sameU ? Math.abs(first.u) : 'several',
    sameU ? parts.reduce((s, p) => s + p.sensitivity * Math.sign(p.u), 0) : 'several',
    Math.abs(effect.component),
    dofCell(dof),
    parts.length === 1 && value.k === 'number' ? value.v : '',
    dof < Infinity && shape.kind === 't' ? 'A' : 'B',
    formatShape(shape),
    result.u > 0 ? (effect.component / result.u) ** 2 : 0,
    step,
    shortList(parts.map((p) => call.evidenceCells.get(call.carry.inputs[p.input].evidence.row) ?? 'in the formula')),
  ];
}

/** Whether moving a source by one standard deviation each way does what the slope says. */
function finiteStep(call: CarryCall, result: Carried, effect: Effect): string {
  const up = call.carry.stepped(result, effect, 1);
  const down = call.carry.stepped(result, effect, -1);
  if (up === undefined || down === undefined) return 'no value at ±u';
  const allowed = Math.max(NONLINEAR * result.u, 1e-11 * Math.abs(result.estimate));
  const differs = (moved: number, linear: number) => Math.abs(moved - result.estimate - linear) > allowed;
  if (!differs(up, effect.component) && !differs(down, -effect.component)) return 'agrees';
  const shown = (x: number) => numberText(Number((x - result.estimate).toPrecision(3)));
  return `differs: ${shown(up)} at +u, ${shown(down)} at -u`;
}

function totals(call: CarryCall, result: Carried, coverage: number | undefined, decimalSeparator: '.' | ',', label: string): CellResult[][] {
  const { k, p, nuUsed, expanded, text } = statement(result, coverage, decimalSeparator);
  const percent = Number((100 * p).toFixed(2));
  const distribution = nuUsed === Infinity ? 'normal distribution' : `t distribution with ${numberText(Number(nuUsed.toPrecision(4)))} degrees of freedom`;
  const factor = numberText(Number(k.toPrecision(4)));
  return [
    wide([label, call.followed.graph.nameOf(result.node), '', '', '', '', result.estimate]),
    wide(['Combined standard uncertainty', '', '', '', result.u, dofCell(result.dof), '', '', '', result.u > 0 ? 1 : 0]),
    wide(['Coverage factor k', '', '', '', k]),
    wide(['Expanded uncertainty U = k u', '', '', '', expanded]),
    wide([
      'Statement',
      `${text}; U is the standard uncertainty multiplied by k = ${factor}, for a coverage probability of ${percent} % (${distribution})`,
    ]),
  ];
}

async function exactRow(call: CarryCall, result: Carried, entry: ReturnType<typeof takenAsExact>[number]): Promise<CellResult[]> {
  const { graph, snapshot } = call.followed;
  const home = result.place.sheet;
  if (entry.literal !== undefined) {
    return wide([`Taken as exact: the number ${entry.literal}`, `in ${shortList(entry.cells.map((c) => graph.placeName(c, home)))}`, '', '', '', '', Number(entry.literal)]);
  }
  const [first] = entry.cells;
  const last = entry.cells.at(-1)!;
  const name = graph.placeName(first, home) + (entry.cells.length > 1 ? `:${cellName(last.row, last.col)}` : '');
  const value = graph.nodes.value[graph.node(first)!];
  return wide([`Taken as exact: ${await labelOf(snapshot, first)}`, name, '', '', '', '', entry.cells.length === 1 && value.k === 'number' ? value.v : '']);
}

function distinct(places: readonly { sheet: number; row: number; col: number }[]): { sheet: number; row: number; col: number }[] {
  return [...new Map(places.map((p) => [`${p.sheet}!${p.row},${p.col}`, p])).values()];
}

const wide = (cells: CellResult[]): CellResult[] => [...cells, ...Array.from({ length: HEADINGS.length - cells.length }, () => '')];
