import { MAX_ROWS } from '../book/area';

/**
 * Intervals of rows, each with something to hand out once: asking for a row hands out all that cover it and were not handed out before.
 * A segment tree over the rows of a sheet: adding costs O(log n), and all questions together cost no more than what was added.
 */
export class RowIntervals<T> {
  private readonly nodes = new Map<number, T[]>();

  /** First and last row, 1-based, both included. */
  add(first: number, last: number, item: T): void {
    let low = first - 1 + SIZE;
    let high = last + SIZE;
    for (; low < high; low >>= 1, high >>= 1) {
      if (low & 1) this.put(low++, item);
      if (high & 1) this.put(--high, item);
    }
  }

  /** An item may be handed out several times, once for each node that held it. */
  *take(row: number): Generator<T> {
    if (this.nodes.size === 0) return;
    for (let node = row - 1 + SIZE; node >= 1; node >>= 1) {
      const items = this.nodes.get(node);
      if (!items) continue;
      this.nodes.delete(node);
      yield* items;
    }
  }

  private put(node: number, item: T): void {
    const items = this.nodes.get(node);
    if (items) items.push(item);
    else this.nodes.set(node, [item]);
  }
}

const SIZE = MAX_ROWS;
