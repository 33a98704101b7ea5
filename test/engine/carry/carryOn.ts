import { Carry, type Carried, type Input, type Outcome } from '../../../functions/engine/carry/carry';
import { parseShape } from '../../../functions/engine/evidence/shape';
import { readTags } from '../../../functions/engine/quantity/tags';
import { type Entry, Sheets, graphOf } from '../graph/sheetsOf';

/** Evidence of a range of inputs in the columns of the sheet; `row` is what makes two of them one evidence row. */
export interface Given {
  u: number | 'exact';
  dof?: number;
  shape?: string;
  tag?: string;
  group?: string;
  row?: string;
}

/** Carries `inputs` (range to evidence, in order) to result cells of a workbook in memory. */
export function carryOn(
  contents: Record<string, Record<string, Entry>>,
  results: string,
  inputs: [range: string, given: Given][],
  names: Record<string, string> = {},
): Outcome[] {
  const sheets = new Sheets(contents, names);
  const graph = graphOf(sheets, results, ...inputs.map(([range]) => range));
  const list: Input[] = inputs.flatMap(([range, given], argument) =>
    sheets.places(range).map((place) => {
      const row = given.row ?? `argument ${argument}`;
      if (given.u === 'exact') return { place, argument, evidence: { exact: true as const, row } };
      const dof = given.dof ?? Infinity;
      const shape = parseShape(given.shape ?? '') ?? { kind: dof === Infinity ? ('normal' as const) : ('t' as const) };
      return { place, argument, evidence: { u: given.u, dof, shape, tags: readTags(given.tag ?? ''), group: given.group ?? '', row } };
    }),
  );
  const carry = new Carry(graph, list);
  return sheets.places(results).map((place) => carry.result(place));
}

/** The one result, which must have been carried. */
export function carried(outcomes: Outcome[]): Carried {
  const [one] = outcomes;
  if (one.k !== 'carried') throw new Error(one.k === 'refused' ? one.message : 'the result is empty');
  return one;
}

/** The message with which the one result was refused. */
export function refusal(outcomes: Outcome[]): string {
  const [one] = outcomes;
  return one.k === 'refused' ? one.message : `not refused: ${one.k}`;
}
