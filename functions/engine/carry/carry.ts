import { EngineError } from '../EngineError';
import type { CellGraph, CellPlace } from '../graph/cellGraph';
import { Sweep } from '../graph/sweep';
import { Trial } from '../graph/trial';
import { combinedUncertainty, degreesOfFreedom } from '../quantity/quantity';
import { type Evidence, type Share, SourceTable } from '../quantity/sourceTable';
import { typedOver } from './typedOver';

/** An input cell with what its doubt is derived from. */
export interface Input {
  readonly place: CellPlace;
  /** Which pair of arguments it stands in, counted from 0. */
  readonly argument: number;
  readonly evidence: Evidence | Exact | Unusable;
}

/** The user says that there is no doubt. */
export interface Exact {
  readonly exact: true;
  readonly row: string;
}

/** Evidence that cannot be used; `problem` completes a sentence that begins with the input cell. */
export interface Unusable {
  readonly problem: string;
  readonly row: string;
}

/** What one source does to one result. */
export interface Effect {
  readonly source: number;
  /** Signed linear effect of one standard deviation of the source, in the unit of the result. */
  readonly component: number;
  /** The sum of the sizes of the effects along all inputs: larger than |component| where effects cancel. */
  readonly gross: number;
  readonly parts: readonly EffectPart[];
}

export interface EffectPart {
  readonly input: number;
  readonly node: number;
  /** Sensitivity coefficient of the result with respect to the input cell. */
  readonly sensitivity: number;
  /** How far the input moves with one standard deviation of the source. */
  readonly u: number;
}

/** A result that was carried through. */
export interface Carried {
  readonly k: 'carried';
  readonly place: CellPlace;
  readonly node: number;
  readonly estimate: number;
  readonly u: number;
  /** Effective degrees of freedom, not truncated. */
  readonly dof: number;
  readonly effects: readonly Effect[];
  /** Nodes above the result, itself first, latest first. */
  readonly ancestors: readonly number[];
  /** Cells with constants that enter the result and have no evidence. */
  readonly exact: readonly number[];
  /** True where the sheet had no stored result to compare with. */
  readonly unchecked: boolean;
}

/** A result that cannot be trusted; `message` says which cell and why. */
export interface Refused {
  readonly k: 'refused';
  readonly place: CellPlace;
  readonly message: string;
}

/** A result cell that is blank or "". */
export interface Empty {
  readonly k: 'empty';
  readonly place: CellPlace;
}

export type Outcome = Carried | Refused | Empty;

/** Effects smaller than this part of their gross size are rounding, not doubt. */
const ROUNDING = 1e-12;

/**
 * Carries the doubt of inputs through the cells of a graph to results. The graph must hold all results evaluated.
 *
 * @source JCGM 100:2008, 5.1.2 and 5.2.2, with sources in place of correlation coefficients.
 */
export class Carry {
  readonly table = new SourceTable();
  /** For each input its shares of sources; empty for exact and unusable ones. */
  readonly shares: (readonly Share[])[] = [];
  private readonly sweep: Sweep;
  private readonly trial: Trial;
  private readonly inputsAt = new Map<number, number[]>();
  private readonly problems: (string | undefined)[] = [];
  private readonly typedOver = new Map<number, string | undefined>();
  private readonly reached: boolean[] = [];

  /** @throws EngineError "refused" for inputs given twice with one evidence row; "domain" for tags used with differing evidence. */
  constructor(
    private readonly graph: CellGraph,
    readonly inputs: readonly Input[],
  ) {
    this.sweep = new Sweep(graph.nodes);
    this.trial = new Trial(graph);
    const seen = new Set<string>();
    inputs.forEach((input, i) => {
      const { place, evidence } = input;
      const key = `${place.sheet}!${place.row},${place.col} ${evidence.row}`;
      if (seen.has(key)) {
        throw new EngineError('refused', `input cell ${graph.placeName(place)} is given twice with the same evidence; give it once, or other evidence`);
      }
      seen.add(key);
      this.shares.push('u' in evidence ? this.table.add(evidence) : []);
      this.problems.push('problem' in evidence ? evidence.problem : undefined);
      const node = graph.node(place);
      if (node === undefined) return;
      const here = this.inputsAt.get(node);
      if (here) here.push(i);
      else this.inputsAt.set(node, [i]);
    });
  }

  /** Carries the doubt to one result cell. */
  result(place: CellPlace): Outcome {
    const { graph } = this;
    const node = graph.node(place);
    if (node === undefined) return { k: 'empty', place };
    const refused = (message: string): Refused => ({ k: 'refused', place, message });
    const refusal = graph.nodes.refusal[node];
    if (refusal) return refused(refusal.message);
    const value = graph.nodes.value[node];
    const name = graph.placeName(place);
    if (value.k === 'text' && value.v === '') return { k: 'empty', place };
    if (value.k === 'error') return refused(`result cell ${name} holds the error ${value.v}`);
    if (value.k !== 'number') return refused(`result cell ${name} holds ${value.k === 'text' ? `the text "${value.v}"` : 'TRUE or FALSE'}, not a number`);
    this.sweep.run(node);
    const problem = this.problemAbove(node);
    return problem === undefined ? this.carried(place, node, value.v, refused) : refused(problem);
  }

  /** Pairs of arguments none of whose cells reached any result so far, counted from 0. */
  unreachedArguments(): number[] {
    const all = new Set(this.inputs.map((i) => i.argument));
    return [...all].filter((argument) => !this.reached[argument]);
  }

  /** What the result becomes when a source moves by `steps` standard deviations; undefined where it cannot be told. */
  stepped(result: Carried, effect: Effect, steps: number): number | undefined {
    return this.trial.value(result.node, result.ancestors, shiftsOf(effect.parts, steps));
  }

  private carried(place: CellPlace, node: number, estimate: number, refused: (message: string) => Refused): Outcome {
    const effects = this.effects();
    const name = this.graph.placeName(place);
    if (!this.sweep.ancestors.some((n) => this.inputsAt.has(n))) {
      const formula = this.graph.view.cell(place.sheet, place.row, place.col)?.formula;
      return refused(formula === undefined ? `result cell ${name} holds a typed number, not a formula: no input reaches it` : `no input reaches result cell ${name}`);
    }
    const ambiguous = this.ambiguity(effects);
    if (ambiguous) return refused(`result cell ${name} ${ambiguous}`);
    const ancestors = [...this.sweep.ancestors];
    const exact = this.exactCells();
    const clamp = this.clamp(node, ancestors, effects, estimate);
    if (clamp) return refused(clamp);
    const components = new Map(effects.map((e) => [e.source, e.component]));
    const u = combinedUncertainty(components);
    if (!Number.isFinite(u)) return refused(`result cell ${name} has an uncertainty that is not a finite number`);
    return {
      k: 'carried', place, node, estimate, u, dof: degreesOfFreedom(components, this.table), effects, ancestors, exact,
      unchecked: this.graph.unchecked.has(node),
    };
  }

  /** The first thing above a result that forbids to trust it. */
  private problemAbove(result: number): string | undefined {
    const { nodes, view } = this.graph;
    for (const node of this.sweep.ancestors) {
      const inputs = this.inputsAt.get(node);
      if (inputs) {
        for (const i of inputs) this.reached[this.inputs[i].argument] = true;
        const words = this.inputProblem(node, inputs, result);
        if (words) return words;
      } else if (nodes.row.data[node] > 0 && nodes.value[node].k === 'number') {
        if (!this.typedOver.has(node)) this.typedOver.set(node, this.typedOverAt(node, view));
        const words = this.typedOver.get(node);
        if (words) return `cell ${this.graph.nameOf(node)} ${words}`;
      }
    }
    return undefined;
  }

  private typedOverAt(node: number, view: CellGraph['view']): string | undefined {
    const { nodes } = this.graph;
    const place = { sheet: nodes.sheet.data[node], row: nodes.row.data[node], col: nodes.col.data[node] };
    const content = view.cell(place.sheet, place.row, place.col);
    return content && content.formula === undefined && !content.partOf ? typedOver(view, place) : undefined;
  }

  private inputProblem(node: number, inputs: readonly number[], result: number): string | undefined {
    const { nodes } = this.graph;
    const name = this.graph.nameOf(node);
    const value = nodes.value[node];
    if (value.k === 'text' && value.v === '') return undefined; // a template's "" is passed over like a blank
    if (value.k === 'text') return `input cell ${name} holds text ("${value.v}"), not a number`;
    if (value.k !== 'number') return `input cell ${name} holds ${value.k === 'error' ? `the error ${value.v}` : 'TRUE or FALSE'}, not a number`;
    for (const i of inputs) if (this.problems[i] !== undefined) return `input cell ${name} ${this.problems[i]}`;
    if (!inputs.some((i) => this.shares[i].length > 0)) return undefined;
    const trip = this.sweep.textTrip(node);
    if (trip !== undefined) {
      return `cell ${this.graph.nameOf(trip)} makes a number out of text that comes from input cell ${name}: its uncertainty would be lost`;
    }
    if (!Number.isFinite(this.sweep.sensitivity(node))) {
      return `result cell ${this.graph.nameOf(result)} has no finite slope at the estimates with respect to input cell ${name}`;
    }
    return undefined;
  }

  private effects(): Effect[] {
    const bySource = new Map<number, EffectPart[]>();
    for (const node of this.sweep.ancestors) {
      if (this.graph.nodes.value[node].k !== 'number') continue;
      for (const input of this.inputsAt.get(node) ?? []) {
        const sensitivity = this.sweep.sensitivity(node);
        for (const { source, u } of this.shares[input]) {
          const parts = bySource.get(source);
          const part = { input, node, sensitivity, u };
          if (parts) parts.push(part);
          else bySource.set(source, [part]);
        }
      }
    }
    return [...bySource].map(([source, parts]) => {
      parts.sort((a, b) => a.input - b.input); // as the user gave them
      const gross = parts.reduce((s, p) => s + Math.abs(p.sensitivity * p.u), 0);
      const component = parts.reduce((s, p) => s + p.sensitivity * p.u, 0);
      return { source, component: Math.abs(component) <= ROUNDING * gross && parts.length > 1 ? 0 : component, gross, parts };
    });
  }

  /** Several inputs of one result served by one evidence row that does not say whether they share their doubt. */
  private ambiguity(effects: readonly Effect[]): string | undefined {
    const first = new Map<string, number>();
    for (const { parts, gross } of effects) {
      if (gross === 0) continue;
      for (const { input, node } of parts) {
        const { evidence } = this.inputs[input];
        if (!('tags' in evidence) || evidence.tags.k !== 'none') continue;
        const before = first.get(evidence.row);
        if (before === undefined) first.set(evidence.row, node);
        else if (before !== node) {
          const cells = `${this.graph.nameOf(before)} and ${this.graph.nameOf(node)}`;
          return `depends on ${cells}, which one evidence row serves: write each (independent) or a tag (shared) in its tag column`;
        }
      }
    }
    return undefined;
  }

  /** A source without linear effect that has one over a finite step. */
  private clamp(result: number, ancestors: readonly number[], effects: readonly Effect[], estimate: number): string | undefined {
    for (const { component, parts } of effects) {
      if (component !== 0) continue;
      const scale = Math.max(Math.abs(estimate), this.graph.nodes.turnover(result));
      for (const steps of [1, -1]) {
        const moved = this.trial.value(result, ancestors, shiftsOf(parts, steps));
        if (moved !== undefined && Math.abs(moved - estimate) <= ROUNDING * scale) continue;
        return this.clampMessage(result, ancestors, parts, steps, moved);
      }
    }
    return undefined;
  }

  private clampMessage(result: number, ancestors: readonly number[], parts: readonly EffectPart[], steps: number, moved: number | undefined): string {
    const { graph } = this;
    const inputs = [...new Set(parts.map((p) => graph.nameOf(p.node)))].join(', ');
    const cell = this.firstFlat(ancestors, parts) ?? result;
    const where = cell === result ? '' : ` (the flat step is in cell ${graph.nameOf(cell)})`;
    const how = steps > 0 ? '+u' : '-u';
    const change = moved === undefined ? `has no followable value at ${how}` : `changes at ${how}`;
    return `result cell ${graph.nameOf(result)} has no linear effect of input ${inputs} but ${change}: it is clamped, decided or flat there${where}`;
  }

  /** The earliest cell below the inputs at which their effect vanishes. */
  private firstFlat(ancestors: readonly number[], parts: readonly EffectPart[]): number | undefined {
    const { edge, parent, partial, row } = this.graph.nodes;
    const live = new Set(parts.map((p) => p.node));
    for (let i = ancestors.length - 1; i >= 0; i--) {
      const node = ancestors[i];
      let touched = false;
      let slope = false;
      for (let e = edge.data[node]; e < edge.data[node + 1]; e++) {
        if (!live.has(parent.data[e])) continue;
        touched = true;
        if (partial.data[e] !== 0) slope = true;
      }
      if (slope) live.add(node);
      else if (touched && row.data[node] > 0) return node;
    }
    return undefined;
  }

  /** Constants that enter the result and are no inputs: numbers, and what stands for one (text, TRUE). */
  private exactCells(): number[] {
    const { nodes, view } = this.graph;
    return this.sweep.ancestors.filter((node) => {
      if (nodes.edge.data[node] !== nodes.edge.data[node + 1] || nodes.row.data[node] === 0 || this.inputsAt.has(node)) return false;
      if (this.sweep.sensitivity(node) === 0) return false;
      return view.cell(nodes.sheet.data[node], nodes.row.data[node], nodes.col.data[node])?.formula === undefined;
    });
  }
}

function shiftsOf(parts: readonly EffectPart[], steps: number): Map<number, number> {
  const shifts = new Map<number, number>();
  for (const { node, u } of parts) shifts.set(node, (shifts.get(node) ?? 0) + steps * u);
  return shifts;
}
