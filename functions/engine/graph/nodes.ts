import type { Scalar } from '../formula/scalar';
import type { Slopes } from '../formula/steps';
import { GrowingInts, GrowingNumbers } from './growing';

/** Why a cell cannot be followed: a whole sentence that names the cell, without a full stop. */
export interface Refusal {
  readonly message: string;
}

/**
 * The evaluated cells. A node is numbered when its value is known, so every node comes after all that it read: the numbers
 * are an order of evaluation. Edges hold the slopes of a node with respect to the nodes it read.
 */
export class Nodes {
  readonly value: Scalar[] = [];
  readonly refusal: (Refusal | undefined)[] = [];
  /** Where the cell stands; row 0 for a value shared by several cells. */
  readonly sheet = new GrowingInts();
  readonly row = new GrowingInts();
  readonly col = new GrowingInts();
  /** Edges of node i are those from `edge.data[i]` up to `edge.data[i + 1]`. */
  readonly edge = new GrowingInts();
  readonly parent = new GrowingInts();
  readonly partial = new GrowingNumbers();
  /** 1 where the number came back out of text on this edge. */
  readonly tainted = new GrowingInts();

  constructor() {
    this.edge.push(0);
  }

  get count(): number {
    return this.value.length;
  }

  add(value: Scalar, slopes: Slopes | undefined, sheet: number, row: number, col: number, refusal?: Refusal): number {
    const id = this.value.length;
    this.value.push(value.d === id ? value : { ...value, d: id });
    this.refusal.push(refusal);
    this.sheet.push(sheet);
    this.row.push(row);
    this.col.push(col);
    if (slopes) {
      for (let i = 0; i < slopes.nodes.length; i++) {
        this.parent.push(slopes.nodes[i]);
        this.partial.push(slopes.partials[i]);
        this.tainted.push(slopes.tainted[i] ? 1 : 0);
      }
    }
    this.edge.push(this.parent.length);
    return id;
  }

  /** The sum of |slope × value| over what a node read: how large the terms are that made its value. */
  turnover(id: number): number {
    let sum = 0;
    for (let e = this.edge.data[id]; e < this.edge.data[id + 1]; e++) {
      const v = this.value[this.parent.data[e]];
      if (v.k === 'number' && this.partial.data[e] !== 0) sum += Math.abs(this.partial.data[e] * v.v);
    }
    return sum;
  }
}
