import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Err, type Num, type Scalar, TRUE, err, num } from '../scalar';
import { type Value, at } from '../value';
import { follow, portion, sizeOf } from './follow';
import {
  type Found, type Line, cellAt, exactPlace, fallingAtOrAbove, fallingAtOrBelow, firstAtOrAbove, firstColumn, firstRow,
  lastAtOrBelow, lineOf, nearestPlace, order, wildcardPlace,
} from './line';

const alone = { shareable: false };

/**
 * VLOOKUP, HLOOKUP, LOOKUP, MATCH, XMATCH, XLOOKUP. What is found has slope 1; the key and the key cell found are linked with
 * slope 0, in an approximate match also the next key cell. A key that is not found links its #N/A to the key.
 */
export const lookups: Native[] = [
  rangeFunction('VLOOKUP', ['scalar', 'range', 'number', 'boolean'], (run, args) => table(run, args, true), { args: [3, 4], ...alone }),
  rangeFunction('HLOOKUP', ['scalar', 'range', 'number', 'boolean'], (run, args) => table(run, args, false), { args: [3, 4], ...alone }),
  rangeFunction('LOOKUP', ['scalar', 'range', 'range'], lookup, { args: [2, 3], ...alone }),
  rangeFunction('MATCH', ['scalar', 'range', 'number'], match, { args: [2, 3], ...alone }),
  rangeFunction('XMATCH', ['scalar', 'range', 'number', 'number'], (run, [given, range, mode, direction]) => {
    const key = run.scalar(given);
    if (key.k === 'error') return key;
    const found = search(run, key, range, mode, direction);
    if ('v' in found) return found;
    const by = deciders(key, found);
    return found.place < 0 ? run.steps.error('#N/A', ...by) : run.steps.count(found.place + 1, ...by);
  }, { args: [2, 4], ...alone }),
  rangeFunction('XLOOKUP', ['scalar', 'range', 'range', 'range', 'number', 'number'], xlookup, { args: [3, 6], ...alone }),
];

/** VLOOKUP (down the first column) and HLOOKUP (along the first row). */
function table(run: Run, [given, range, which, near]: readonly Value[], down: boolean): Value {
  const key = keyOf(run, given);
  if (key.k === 'error') return key;
  if (range.k === 'error') return range;
  const column = number(run, which, 0);
  if (column.k === 'error') return column;
  const nearly = near === undefined ? TRUE : run.scalar(near); // left empty it is FALSE
  if (nearly.k === 'error') return nearly;
  const m = run.matrix(range);
  const offset = Math.trunc(column.v) - 1;
  if (offset < 0) return run.steps.error('#VALUE!', column);
  if (offset >= (down ? m.cols : m.rows)) return run.steps.error('#REF!', column);
  const line = down ? firstColumn(m) : firstRow(m);
  const found = nearly.v === true ? lastAtOrBelow(line, key) : { place: wildcardPlace(line, key), neighbour: -1 };
  const by = [column, nearly, ...deciders(key, { line, ...found })];
  if (found.place < 0) return run.steps.error('#N/A', ...by);
  return run.steps.chosen(down ? at(m, found.place, offset) : at(m, offset, found.place), ...by);
}

/** LOOKUP: over a line with an optional line of results, or over the longer side of a table with results in the opposite side. */
function lookup(run: Run, [given, range, results]: readonly Value[]): Value {
  const key = keyOf(run, given);
  if (key.k === 'error') return key;
  if (range.k === 'error') return range;
  const m = run.matrix(range);
  const line = m.cols > m.rows ? firstRow(m) : firstColumn(m);
  const found = lastAtOrBelow(line, key);
  const by = deciders(key, { line, ...found });
  if (found.place < 0) return run.steps.error('#N/A', ...by);
  if (results === undefined || results.k === 'missing') {
    return run.steps.chosen(line.down ? at(m, found.place, m.cols - 1) : at(m, m.rows - 1, found.place), ...by);
  }
  if (results.k === 'error') return results;
  const r = run.matrix(results);
  const other = m.rows > 1 && m.cols > 1 ? undefined : lineOf(r);
  if (!other || found.place >= other.length) return err('#N/A');
  return run.steps.chosen(cellAt(other, found.place), ...by);
}

function match(run: Run, [given, range, type]: readonly Value[]): Value {
  const key = keyOf(run, given);
  if (key.k === 'error') return key;
  if (range.k === 'error') return range;
  const kind = number(run, type, type === undefined ? 1 : 0);
  if (kind.k === 'error') return kind;
  const line = lineOf(run.matrix(range));
  if (!line) return err('#N/A');
  let found: Found;
  if (kind.v > 0) found = lastAtOrBelow(line, key);
  else if (kind.v < 0) found = fallingAtOrAbove(line, key);
  else found = { place: wildcardPlace(line, key), neighbour: -1 };
  const by = [kind, ...deciders(key, { line, ...found })];
  return found.place < 0 ? run.steps.error('#N/A', ...by) : run.steps.count(found.place + 1, ...by);
}

function xlookup(run: Run, [given, range, results, otherwise, mode, direction]: readonly Value[]): Value {
  const key = run.scalar(given);
  if (key.k === 'error') return key;
  if (results.k === 'error') return results;
  const found = search(run, key, range, mode, direction);
  if ('v' in found) return found;
  const size = sizeOf(run, results);
  const { line, place } = found;
  const single = line.length === 1 && size?.rows !== 1;
  const down = single ? size?.cols !== 1 && line.down : line.down;
  if (!size || (down ? size.rows : size.cols) !== line.length) return err('#VALUE!');
  const by = deciders(key, found);
  if (place < 0) {
    return otherwise === undefined || otherwise.k === 'missing' ? run.steps.error('#N/A', ...by) : follow(run, otherwise, ...by);
  }
  return follow(run, down ? portion(run, results, place, 0, 1, size.cols) : portion(run, results, 0, place, size.rows, 1), ...by);
}

interface Search extends Found {
  readonly line: Line;
}

/**
 * The search of XLOOKUP and XMATCH. Match mode 0 exact, -1 exact or next smaller, 1 exact or next larger, 2 wildcards; search
 * mode 1 from the start, -1 from the end, 2 by bisection upwards, -2 downwards. A blank key finds a blank cell.
 */
function search(run: Run, key: Scalar, range: Value, mode: Value | undefined, direction: Value | undefined): Search | Scalar {
  if (range.k === 'error') return range;
  const how = number(run, mode, 0);
  if (how.k === 'error') return how;
  const way = number(run, direction, direction === undefined || direction.k === 'missing' ? 1 : 0);
  if (way.k === 'error') return way;
  const line = lineOf(run.matrix(range));
  const m = Math.trunc(how.v);
  const s = Math.trunc(way.v);
  if (!line || ![0, -1, 1, 2].includes(m) || ![1, -1, 2, -2].includes(s)) return run.steps.error('#VALUE!', how, way);
  if (s === 2 || s === -2) {
    if (m === 2) return run.steps.error('#VALUE!', how, way);
    return { line, ...bisected(line, key, m, s === 2) };
  }
  if (m === 2) return { line, place: wildcardPlace(line, key, s < 0), neighbour: -1 };
  const exact = exactPlace(line, key, s < 0);
  if (exact >= 0 || m === 0) return { line, place: exact, neighbour: -1 };
  return { line, ...nearestPlace(line, key, m < 0, s < 0) };
}

function bisected(line: Line, key: Scalar, mode: number, upwards: boolean): Found {
  const below = upwards ? lastAtOrBelow : fallingAtOrBelow;
  const above = upwards ? firstAtOrAbove : fallingAtOrAbove;
  if (mode < 0) return below(line, key);
  const found = above(line, key);
  if (mode > 0 || found.place < 0) return found;
  return order(cellAt(line, found.place), key) === 0 ? found : { place: -1, neighbour: -1 };
}

/** The key, the key cell found, and its neighbour where the match was approximate. */
function deciders(key: Scalar, { line, place, neighbour }: Search): Scalar[] {
  const by = [key];
  if (place >= 0) by.push(cellAt(line, place));
  if (neighbour >= 0) by.push(cellAt(line, neighbour));
  return by;
}

/** The key of the older lookups, which take a blank cell as 0. */
function keyOf(run: Run, given: Value): Scalar {
  const key = run.scalar(given);
  return key.k === 'blank' ? num(0, key.d) : key;
}

/** A number argument, coerced before; left empty it is 0 unless said otherwise. */
function number(run: Run, given: Value | undefined, otherwise: number): Num | Err {
  if (given === undefined || given.k === 'missing') return num(otherwise);
  return run.scalar(given) as Num | Err;
}
