import { type Bool, type Num, type Err, NONE, type Scalar, type Text, bool, err, num, text, withOrigin } from './scalar';

/** The slope of an edge along which a number came back out of text: what lies below can no longer be followed. */
const TAINT = 1;

const REACHED = 1;
const THROUGH_TEXT = 2;

/** A cell's slopes with respect to the cells it read. */
export interface Slopes {
  /** Graph nodes read, each once. */
  readonly nodes: number[];
  /** Partial derivative of the cell with respect to each; 0 where the cell only decided by it; not finite where there is none. */
  readonly partials: number[];
  /** True where the number came back out of text on the way. */
  readonly tainted: boolean[];
}

/**
 * The steps of the cell at hand, each with its slopes against earlier steps and against graph nodes; one reverse sweep over
 * them gives the cell's slopes. A step is numbered downwards from -2, so that it cannot be taken for a graph node.
 *
 * With `recording` false nothing is kept and every origin is NONE: the same code then only computes values.
 */
export class Steps {
  recording = true;
  private start: number[] = [0];
  private parents: number[] = [];
  private partials: number[] = [];
  private marks: number[] = [];
  private weight: number[] = [];
  private reached: number[] = [];

  /** Forgets all steps; called before each cell. */
  reset(): void {
    this.start.length = 1;
    this.parents.length = this.partials.length = this.marks.length = 0;
    this.weight.length = this.reached.length = 0;
  }

  /** A number with one slope per argument. The slopes are used only where the argument depends on a cell. */
  unary(value: number, a: Scalar, slope: number): Num | Err {
    if (a.d === NONE || !this.recording) return num(value);
    this.edge(a.d, slope, 0);
    return num(value, this.close());
  }

  binary(value: number, a: Scalar, slopeA: number, b: Scalar, slopeB: number): Num | Err {
    if ((a.d === NONE && b.d === NONE) || !this.recording) return num(value);
    if (a.d !== NONE) this.edge(a.d, slopeA, 0);
    if (b.d !== NONE) this.edge(b.d, slopeB, 0);
    return num(value, this.close());
  }

  /** A number from many: `slopes[i]` belongs to `args[i]`, or one slope for all. */
  many(value: number, args: readonly Scalar[], slopes: ArrayLike<number> | number): Num | Err {
    return num(value, this.link(args, slopes));
  }

  /** A boolean decided by other scalars. */
  decision(value: boolean, ...by: readonly Scalar[]): Bool {
    return bool(value, this.link(by, 0));
  }

  /** A number that is decided by others in steps: a count, a position, a sign. Its slope is zero. */
  count(value: number, ...by: readonly Scalar[]): Num | Err {
    return num(value, this.link(by, 0));
  }

  /** Text made from other scalars; tainted if one of them is a number that depends on a cell, or is tainted itself. */
  text(value: string, ...from: readonly Scalar[]): Text {
    const tainted = from.some((s) => (s.k === 'number' && s.d !== NONE) || (s.k === 'text' && s.tainted));
    return text(value, this.link(from, 0), tainted);
  }

  /** An error raised by these scalars. */
  error(code: Err['v'], ...by: readonly Scalar[]): Err {
    return err(code, this.link(by, 0));
  }

  /**
   * A number read out of text. Where a number was written into the text before, it is followed only as far as no uncertain cell
   * lies below; else the text stands for the number, with slope 1, so that it can be told that it was taken as exact.
   */
  fromText(value: number, source: Text): Num | Err {
    if (source.d === NONE || !this.recording) return num(value);
    this.edge(source.d, source.tainted ? 0 : 1, source.tainted ? TAINT : 0);
    return num(value, this.close());
  }

  /** `chosen`, which also depends on what decided for it (a condition, a key that was looked up). */
  chosen<S extends Scalar>(chosen: S, ...by: readonly Scalar[]): S {
    return this.chosenByAll(chosen, by);
  }

  /** `chosen` as above, decided by many. */
  chosenByAll<S extends Scalar>(chosen: S, by: readonly Scalar[]): S {
    if (!this.recording || by.every((s) => s.d === NONE)) return chosen;
    if (chosen.d !== NONE) this.edge(chosen.d, 1, 0);
    for (const s of by) if (s.d !== NONE) this.edge(s.d, 0, 0);
    return withOrigin(chosen, this.close());
  }

  /** The slopes of the cell whose value has the origin `d`, by one reverse sweep over the steps that lead to it. */
  slopes(d: number): Slopes {
    const nodes: number[] = [];
    const partials: number[] = [];
    const tainted: boolean[] = [];
    if (d === NONE) return { nodes, partials, tainted };
    if (d >= 0) return { nodes: [d], partials: [1], tainted: [false] };
    const place = new Map<number, number>();
    const order = this.leadingTo(-d - 2);
    this.weight[order[0]] = 1;
    for (const step of order) {
      const weight = this.weight[step];
      const throughText = this.reached[step] === THROUGH_TEXT;
      this.weight[step] = 0;
      this.reached[step] = 0;
      for (let e = this.start[step]; e < this.start[step + 1]; e++) {
        const parent = this.parents[e];
        const slope = timesSlope(weight, this.partials[e]);
        const viaText = throughText || this.marks[e] === TAINT;
        if (parent <= -2) {
          this.weight[-parent - 2] += slope;
          if (viaText) this.reached[-parent - 2] = THROUGH_TEXT;
          continue;
        }
        const i = place.get(parent);
        if (i === undefined) {
          place.set(parent, nodes.length);
          nodes.push(parent);
          partials.push(slope);
          tainted.push(viaText);
        } else {
          partials[i] += slope;
          tainted[i] ||= viaText;
        }
      }
    }
    return { nodes, partials, tainted };
  }

  /** The steps that lead to a step, itself first, in falling order; marks them as reached. */
  private leadingTo(last: number): number[] {
    const found = [last];
    this.reached[last] = REACHED;
    for (let i = 0; i < found.length; i++) {
      for (let e = this.start[found[i]]; e < this.start[found[i] + 1]; e++) {
        const step = -this.parents[e] - 2;
        if (step < 0 || this.reached[step]) continue;
        this.reached[step] = REACHED;
        found.push(step);
      }
    }
    return found.sort((a, b) => b - a);
  }

  private link(args: readonly Scalar[], slopes: ArrayLike<number> | number): number {
    if (!this.recording) return NONE;
    const before = this.parents.length;
    for (let i = 0; i < args.length; i++) {
      if (args[i].d !== NONE) this.edge(args[i].d, typeof slopes === 'number' ? slopes : slopes[i], 0);
    }
    return this.parents.length > before ? this.close() : NONE;
  }

  private edge(parent: number, partial: number, mark: number): void {
    this.parents.push(parent);
    this.partials.push(partial);
    this.marks.push(mark);
  }

  private close(): number {
    this.start.push(this.parents.length);
    this.weight.push(0);
    this.reached.push(0);
    return -this.start.length;
  }
}

/**
 * A weight times a slope, where zero times an infinite slope is zero: what does not enter a result does not spoil it.
 * The only place that decides this.
 */
export function timesSlope(weight: number, slope: number): number {
  return weight === 0 || slope === 0 ? 0 : weight * slope;
}
