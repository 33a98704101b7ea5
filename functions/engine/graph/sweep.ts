import { timesSlope } from '../formula/steps';
import type { Nodes } from './nodes';

const PLAIN = 1;
const THROUGH_TEXT = 2;

/**
 * Sensitivities of results with respect to all cells above them: one reverse sweep a result, over its ancestors only.
 * The object keeps its working arrays between results; read one result's outcome before the next sweep.
 */
export class Sweep {
  /** Ancestors of the result, itself first, in falling order. */
  readonly ancestors: number[] = [];
  private slope = new Float64Array(0);
  private reached = new Uint8Array(0);
  private brokenAt = new Int32Array(0);

  constructor(private readonly nodes: Nodes) {}

  /**
   * Sweeps back from a result.
   *
   * @param result  Node; its sensitivity to itself is 1.
   */
  run(result: number): void {
    this.clear();
    const { edge, parent, partial, tainted } = this.nodes;
    this.collect(result);
    this.slope[result] = 1;
    for (const node of this.ancestors) {
      const weight = this.slope[node];
      const throughText = this.reached[node] === THROUGH_TEXT;
      for (let e = edge.data[node]; e < edge.data[node + 1]; e++) {
        const p = parent.data[e];
        this.slope[p] += timesSlope(weight, partial.data[e]);
        if (throughText || tainted.data[e]) {
          if (this.reached[p] !== THROUGH_TEXT) this.brokenAt[p] = throughText ? this.brokenAt[node] : node;
          this.reached[p] = THROUGH_TEXT;
        }
      }
    }
  }

  /** Whether a node is an ancestor of the result, be it only by a decision. */
  reaches(node: number): boolean {
    return node < this.reached.length && this.reached[node] !== 0;
  }

  /** Sensitivity coefficient of the result with respect to a node; 0 where it is no ancestor, not finite where there is no slope. */
  sensitivity(node: number): number {
    return node < this.slope.length ? this.slope[node] : 0;
  }

  /** The node where a number came back out of text on the way from this node to the result, if it did. */
  textTrip(node: number): number | undefined {
    return node < this.reached.length && this.reached[node] === THROUGH_TEXT ? this.brokenAt[node] : undefined;
  }

  private collect(result: number): void {
    const { edge, parent } = this.nodes;
    const found = this.ancestors;
    found.push(result);
    this.reached[result] = PLAIN;
    let sorted = true;
    for (let i = 0; i < found.length; i++) {
      const node = found[i];
      for (let e = edge.data[node]; e < edge.data[node + 1]; e++) {
        const p = parent.data[e];
        if (this.reached[p]) continue;
        this.reached[p] = PLAIN;
        if (p > found[found.length - 1]) sorted = false;
        found.push(p);
      }
    }
    if (!sorted) found.sort((a, b) => b - a);
  }

  private clear(): void {
    const size = this.nodes.count;
    if (this.slope.length < size) {
      this.slope = new Float64Array(2 * size);
      this.reached = new Uint8Array(2 * size);
      this.brokenAt = new Int32Array(2 * size);
    } else {
      for (const node of this.ancestors) {
        this.slope[node] = 0;
        this.reached[node] = 0;
      }
    }
    this.ancestors.length = 0;
  }
}
