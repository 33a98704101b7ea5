import { compareText } from '../compare';
import type { Scalar } from '../scalar';
import { type Matrix, at } from '../value';
import { hasWildcards, wildcards } from './wildcards';

/** The first column or the first row of a matrix, in which a key is looked up; `stored` of its `length` cells are kept. */
export interface Line {
  readonly matrix: Matrix;
  readonly down: boolean;
  readonly length: number;
  readonly stored: number;
}

/** A place in a line, and the next place of the same kind on the other side of the key (-1 if none). */
export interface Found {
  readonly place: number;
  readonly neighbour: number;
}

export const firstColumn = (m: Matrix): Line => ({ matrix: m, down: true, length: m.rows, stored: m.width > 0 ? m.height : 0 });
export const firstRow = (m: Matrix): Line => ({ matrix: m, down: false, length: m.cols, stored: m.height > 0 ? m.width : 0 });

/** The line of a matrix of one column or one row; undefined for any other. */
export function lineOf(m: Matrix): Line | undefined {
  if (m.cols === 1) return firstColumn(m);
  return m.rows === 1 ? firstRow(m) : undefined;
}

export const cellAt = (line: Line, i: number): Scalar => (line.down ? at(line.matrix, i, 0) : at(line.matrix, 0, i));

/**
 * The first (or last) place whose cell is of the key's kind and equal to it, text case-blind; -1 if none. Numbers must be equal
 * to the last bit. A second search of the same matrix builds an index, so that many searches cost no more than one each.
 *
 * @source common practice: a lookup does not round to 15 digits as the operator `=` does
 */
export function exactPlace(line: Line, key: Scalar, fromEnd = false): number {
  if (key.k === 'blank') return blankPlace(line, fromEnd);
  const wanted = normal(key);
  if (wanted === undefined) return -1;
  const memory = memoryOf(line);
  const which = fromEnd ? 'last' : 'first';
  const index = memory[which];
  if (index) return index.get(wanted) ?? -1;
  if (memory.searched) return (memory[which] = indexOf(line, fromEnd)).get(wanted) ?? -1;
  memory.searched = true;
  return scan(line, fromEnd, (s) => normal(s) === wanted);
}

/** The first (or last) text that follows the key's wildcards; as `exactPlace` where the key is no text or has none. */
export function wildcardPlace(line: Line, key: Scalar, fromEnd = false): number {
  if (key.k !== 'text' || !hasWildcards(key.v)) return exactPlace(line, key, fromEnd);
  const pattern = wildcards(key.v);
  return scan(line, fromEnd, (s) => s.k === 'text' && pattern.matches(s.v));
}

/**
 * The last cell at or below the key in a line sorted upwards, by bisection among the cells of the key's kind (all others, errors
 * included, are passed over). In a line that is not sorted some place comes out, as it does in the sheet.
 */
export function lastAtOrBelow(line: Line, key: Scalar): Found {
  const places = placesOfKind(line, key);
  const end = bisect(places.length, (i) => order(cellAt(line, places[i]), key) <= 0);
  return { place: places[end - 1] ?? -1, neighbour: places[end] ?? -1 };
}

/** The first cell at or above the key in a line sorted upwards. */
export function firstAtOrAbove(line: Line, key: Scalar): Found {
  const places = placesOfKind(line, key);
  const start = bisect(places.length, (i) => order(cellAt(line, places[i]), key) < 0);
  return { place: places[start] ?? -1, neighbour: places[start - 1] ?? -1 };
}

/** The smallest cell at or above the key in a line sorted downwards: the first that is equal, else the last above. */
export function fallingAtOrAbove(line: Line, key: Scalar): Found {
  const places = placesOfKind(line, key);
  const end = bisect(places.length, (i) => order(cellAt(line, places[i]), key) > 0);
  if (end < places.length && order(cellAt(line, places[end]), key) === 0) return { place: places[end], neighbour: places[end - 1] ?? -1 };
  return { place: places[end - 1] ?? -1, neighbour: places[end] ?? -1 };
}

/** The largest cell at or below the key in a line sorted downwards. */
export function fallingAtOrBelow(line: Line, key: Scalar): Found {
  const places = placesOfKind(line, key);
  const start = bisect(places.length, (i) => order(cellAt(line, places[i]), key) > 0);
  return { place: places[start] ?? -1, neighbour: places[start - 1] ?? -1 };
}

/** The nearest cell at or below (or at or above) the key in a line in any order; of equal ones the first from the side asked. */
export function nearestPlace(line: Line, key: Scalar, below: boolean, fromEnd: boolean): Found {
  let place = -1;
  let neighbour = -1;
  const places = placesOfKind(line, key);
  const side = below ? 1 : -1;
  for (let step = 0; step < places.length; step++) {
    const here = places[fromEnd ? places.length - 1 - step : step];
    const cell = cellAt(line, here);
    if (side * order(cell, key) <= 0) {
      if (place < 0 || side * order(cell, cellAt(line, place)) > 0) place = here;
    } else if (neighbour < 0 || side * order(cell, cellAt(line, neighbour)) < 0) neighbour = here;
  }
  return { place, neighbour };
}

/** The order of two scalars of one kind as lookups have it; numbers to the last bit. */
export function order(a: Scalar, b: Scalar): number {
  if (a.k === 'text' && b.k === 'text') return compareText(a.v, b.v);
  return Number(a.v) - Number(b.v);
}

/** What is kept about a matrix between searches. The graph gives the same matrix for the same absolute range. */
interface Memory {
  searched: boolean;
  first?: Map<string | number | boolean, number>;
  last?: Map<string | number | boolean, number>;
  number?: number[];
  text?: number[];
  boolean?: number[];
}

const memories = { down: new WeakMap<Matrix, Memory>(), across: new WeakMap<Matrix, Memory>() };

function memoryOf(line: Line): Memory {
  const map = line.down ? memories.down : memories.across;
  let memory = map.get(line.matrix);
  if (!memory) map.set(line.matrix, (memory = { searched: false }));
  return memory;
}

function indexOf(line: Line, fromEnd: boolean): Map<string | number | boolean, number> {
  const index = new Map<string | number | boolean, number>();
  for (let i = 0; i < reach(line); i++) {
    const key = normal(cellAt(line, i));
    if (key !== undefined && (fromEnd || !index.has(key))) index.set(key, i);
  }
  return index;
}

/** The places of the cells of the key's kind; none for a blank or an error. */
function placesOfKind(line: Line, key: Scalar): readonly number[] {
  if (key.k === 'blank' || key.k === 'error') return [];
  const memory = memoryOf(line);
  const known = memory[key.k];
  if (known) return known;
  const places: number[] = [];
  for (let i = 0; i < reach(line); i++) if (cellAt(line, i).k === key.k) places.push(i);
  return (memory[key.k] = places);
}

function blankPlace(line: Line, fromEnd: boolean): number {
  if (fromEnd && reach(line) < line.length) return line.length - 1;
  const place = scan(line, fromEnd, (s) => s.k === 'blank');
  return place < 0 && reach(line) < line.length ? reach(line) : place;
}

/** How far a line must be looked at: to the end of what is stored, where only blank cells follow. */
const reach = (line: Line): number => (line.matrix.fill.k === 'blank' ? line.stored : line.length);

function scan(line: Line, fromEnd: boolean, fits: (s: Scalar) => boolean): number {
  const n = reach(line);
  for (let step = 0; step < n; step++) {
    const i = fromEnd ? n - 1 - step : step;
    if (fits(cellAt(line, i))) return i;
  }
  return -1;
}

/** What equal cells have in common; undefined for blanks and errors, which equal nothing. */
function normal(s: Scalar): string | number | boolean | undefined {
  switch (s.k) {
    case 'number':
    case 'boolean':
      return s.v;
    case 'text':
      return s.v.toLowerCase();
    default:
      return undefined;
  }
}

/** How many of the first n places hold `true`, if those that do come first. */
function bisect(n: number, holds: (i: number) => boolean): number {
  let low = 0;
  let high = n;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (holds(middle)) low = middle + 1;
    else high = middle;
  }
  return low;
}
