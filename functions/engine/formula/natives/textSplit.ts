import { type Native, rangeFunction } from '../native';
import type { Run } from '../run';
import { type Scalar, type Text, err } from '../scalar';
import type { Value } from '../value';
import { built } from './arrays';
import { isError, optionsOf, present, whole } from './options';
import { refuseUse } from './refuseUse';
import { made } from './texts';

const NOT_THERE = err('#N/A');

/**
 * TEXTSPLIT(text, column delimiter, [row delimiter], [ignore empty], [match mode], [pad with]): rows that are shorter are filled up,
 * with #N/A unless told otherwise. Several delimiters at once, and an empty one, are refused.
 *
 * @source Excel's documentation of TEXTSPLIT
 */
export const textSplit: Native[] = [
  rangeFunction('TEXTSPLIT', ['range', 'range', 'range', 'range', 'range', 'range'], (run, given) => {
    const options = optionsOf(run, 'TEXTSPLIT', given.slice(0, 5), ['text', 'text', 'text', 'boolean', 'number']);
    if (isError(options)) return options;
    const [text, column, row, ignore, mode] = options;
    const by = present(options);
    const match = whole(mode, 0);
    if (match !== 0 && match !== 1) return run.steps.error('#VALUE!', ...by);
    const parts = (s: string, delimiter: Scalar | undefined): string[] => split(s, delimiter, match === 1, ignore?.v === true);
    if (column === undefined && row === undefined) return run.steps.error('#VALUE!', ...by);
    const rows = parts(((text as Text | undefined) ?? { v: '' }).v, row).map((line) => parts(line, column));
    if (rows.length === 0 || rows.every((line) => line.length === 0)) return run.steps.error('#CALC!', ...by);
    return built(rows.length, Math.max(...rows.map((line) => line.length)), (r, c) => {
      const part = rows[r][c];
      return part === undefined ? padding(run, given[5], by) : made(run, part, by);
    });
  }, { args: [2, 6], shareable: false }),
];

function padding(run: Run, given: Value | undefined, by: readonly Scalar[]): Scalar {
  return run.steps.chosenByAll(given === undefined || given.k === 'missing' ? NOT_THERE : run.scalar(given), by);
}

function split(s: string, delimiter: Scalar | undefined, blind: boolean, ignore: boolean): string[] {
  if (delimiter === undefined) return [s];
  const wanted = (delimiter as Text).v;
  if (wanted === '') refuseUse('TEXTSPLIT', 'its delimiter is empty');
  const [within, of] = blind ? [s.toLowerCase(), wanted.toLowerCase()] : [s, wanted];
  if (within.length !== s.length || of.length !== wanted.length) refuseUse('TEXTSPLIT', 'letters change their number with their case');
  const found: string[] = [];
  let from = 0;
  for (let at = within.indexOf(of); at >= 0; at = within.indexOf(of, from)) {
    found.push(s.slice(from, at));
    from = at + of.length;
  }
  found.push(s.slice(from));
  return ignore ? found.filter((part) => part !== '') : found;
}
