import { toCol } from '@borgar/fx';
import { MAX_COLS, MAX_ROWS } from '../evaluate';
import { type Native, rangeFunction, scalarFunction } from '../native';
import type { Run } from '../run';
import { type Bool, type Scalar, type Text, err } from '../scalar';
import type { Value } from '../value';
import { follow } from './follow';
import { areaInText } from './areaInText';
import { refuseUse } from './refuseUse';
import { arrayFunction, isError, optionsOf, present, whole } from './options';

/**
 * ADDRESS, AREAS, CELL, and the references that are found at run time: OFFSET and INDIRECT. What is read from them is linked with
 * slope 0 to the numbers or the text that decided where they lie.
 */
export const addresses: Native[] = [
  scalarFunction('ADDRESS', ['number', 'number', 'number', 'boolean', 'text'], address, { args: [2, 5] }),
  rangeFunction('AREAS', ['range'], (run, [given]) => {
    if (given.k === 'error') return given;
    const areas = run.areas(given);
    return areas ? run.steps.count(areas.length, ...areas.flatMap((a) => a.by ?? [])) : err('#VALUE!');
  }, { shareable: false }),
  rangeFunction('CELL', ['text', 'range'], cellInfo, { args: [1, 2], shareable: false }),
  arrayFunction('OFFSET', ['number', 'number', 'number', 'number'], 3, offset),
  rangeFunction('INDIRECT', ['range', 'range'], (run, given) => {
    const options = optionsOf(run, 'INDIRECT', given, ['text', 'boolean']);
    if (isError(options)) return options;
    const [text, a1] = options as readonly [Text | undefined, Bool | undefined];
    const by = present(options);
    const area = areaInText(run, text?.v ?? '', a1?.v ?? given.length < 2);
    return area ? follow(run, area, ...by) : run.steps.error('#REF!', ...by);
  }, { args: [1, 2], shareable: false }),
];

/** CELL(what, reference): what does not depend on formats, files or the machine. Without a reference it means the cell changed last. */
function cellInfo(run: Run, [what, given]: readonly Value[]): Value {
  const asked = run.scalar(what);
  if (asked.k === 'error') return asked;
  const kind = String(asked.v).toLowerCase();
  if (given === undefined || given.k === 'missing') refuseUse('CELL', 'without a reference it means the cell that was changed last');
  if (given.k === 'error') return given;
  const areas = run.areas(given);
  if (areas?.length !== 1) return run.steps.error('#VALUE!', asked);
  const { sheet, r1, c1 } = areas[0];
  if (kind === 'row') return run.steps.count(r1, asked);
  if (kind === 'col') return run.steps.count(c1, asked);
  if (kind === 'address' && sheet === run.sheet) return run.steps.text(`$${toCol(c1 - 1)}$${r1}`, asked);
  if (kind !== 'contents' && kind !== 'type') refuseUse('CELL', `"${String(asked.v)}" tells of more than the cell's contents`);
  const cell = { ...areas[0], r2: r1, c2: c1 };
  if (kind === 'contents') return follow(run, run.scalar(cell), asked);
  const s = run.scalar(cell);
  return run.steps.text(s.k === 'blank' ? 'b' : s.k === 'text' ? 'l' : 'v', asked, s);
}

/** ADDRESS(row, column, [kind], [A1 form], [sheet]): kind 1 absolute, 2 row absolute, 3 column absolute, 4 relative. */
function address(run: Run, options: readonly (Scalar | undefined)[]): Scalar {
  const [row, col, kind] = [whole(options[0], 0), whole(options[1], 0), whole(options[2], 1)];
  const by = present(options);
  if (row < 1 || row > MAX_ROWS || col < 1 || col > MAX_COLS || kind < 1 || kind > 4) return run.steps.error('#VALUE!', ...by);
  const fixedRow = kind <= 2;
  const fixedCol = kind % 2 === 1;
  const cell = options[3]?.v === false
    ? `R${fixedRow ? row : `[${row}]`}C${fixedCol ? col : `[${col}]`}`
    : `${fixedCol ? '$' : ''}${toCol(col - 1)}${fixedRow ? '$' : ''}${row}`;
  const sheet = options[4];
  return run.steps.text(sheet === undefined ? cell : `${quoted(sheet.v as string)}!${cell}`, ...by);
}

/** OFFSET(reference, rows, columns, [height], [width]): a negative height or width reaches up or to the left. */
function offset(run: Run, given: Value, options: readonly (Scalar | undefined)[]): Value {
  if (given.k === 'error') return given;
  const areas = run.areas(given);
  const by = present(options);
  if (areas?.length !== 1) return err('#VALUE!');
  const [from] = areas;
  const height = whole(options[2], from.r2 - from.r1 + 1);
  const width = whole(options[3], from.c2 - from.c1 + 1);
  const row = from.r1 + whole(options[0], 0);
  const col = from.c1 + whole(options[1], 0);
  const [r1, r2] = stretch(row, height);
  const [c1, c2] = stretch(col, width);
  if (height === 0 || width === 0 || r1 < 1 || c1 < 1 || r2 > MAX_ROWS || c2 > MAX_COLS) return run.steps.error('#REF!', ...by);
  return follow(run, { ...from, r1, c1, r2, c2 }, ...by);
}

const stretch = (from: number, length: number): [number, number] =>
  length > 0 ? [from, from + length - 1] : [from + length + 1, from];

/** A sheet name, in quotes where it is more than letters, digits, _ and ., begins with a digit, or could be read as a cell. */
function quoted(sheet: string): string {
  const plain = sheet === '' || (/^[\p{L}_][\p{L}\p{N}_.]*$/u.test(sheet) && !/^([A-Z]{1,3}\d+|R\d*(C\d*)?|C\d*)$/i.test(sheet));
  return plain ? sheet : `'${sheet.replace(/'/g, "''")}'`;
}
