import Ajv from 'ajv';
import type { ErrorObject } from 'ajv';
import { headersOf } from '../sheet/Plan';
import type { Plan } from '../sheet/Plan';
import schema from './plan.schema.json';

/** A plan that cannot be used; each problem is one line that names the entry, the property and what is needed. */
export class PlanProblem extends Error {
  override name = 'PlanProblem';

  constructor(readonly problems: readonly string[]) {
    super(problems.join('\n'));
  }
}

/** What each property needs, in words. */
const NEEDS: Readonly<Record<string, string>> = {
  columns: 'needs a list of at least one column',
  sheet: 'needs the name of a sheet, 1 to 31 characters',
  anchor: 'needs a cell such as K5, or the text of a heading',
  header: 'needs a heading, or a list of headings',
  formula: 'needs a formula of at most 8192 characters that begins with =',
  mode: 'needs "spill" or "perRow"',
  rows: 'needs rows such as "6:69", or "while D has numbers"',
  numberFormat: 'needs a number format such as "0.000", or a list of them',
  title: 'needs text',
  $schema: 'needs text',
};

/**
 * Reads the text of a plan.
 *
 * @throws PlanProblem with every problem that was found.
 */
export function readPlan(text: string): Plan {
  const given = parsed(text.replace(/^\uFEFF/, ''));
  const validate = new Ajv({ allErrors: true, verbose: true }).compile<Plan>(schema);
  if (!validate(given)) throw new PlanProblem([...new Set(validate.errors!.flatMap((error) => words(error, given) ?? []))]);
  const uneven = given.columns.flatMap((column, i) => {
    const { numberFormat } = column;
    const count = headersOf(column).length;
    const titlesTable = typeof column.header === 'string' && column.mode === 'spill'; // one heading over a spilled table
    if (!Array.isArray(numberFormat) || numberFormat.length === count || titlesTable) return [];
    return [`${entryName(given, i)}: numberFormat needs as many formats as there are headings, ${count}, got ${numberFormat.length}`];
  });
  if (uneven.length > 0) throw new PlanProblem(uneven);
  return given;
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (problem) {
    throw new PlanProblem([`the plan is not JSON: ${(problem as Error).message.replace(/\s+/g, ' ')}`]);
  }
}

/** One error of the checker as a line; undefined for one that another line says better. */
function words({ instancePath, keyword, params, data }: ErrorObject, plan: unknown): string | undefined {
  const [, list, index, property] = instancePath.split('/');
  const entry = list === 'columns' && index !== undefined ? entryName(plan, Number(index)) : 'the plan';
  const place = index === undefined ? list : property;
  switch (keyword) {
    case 'required': {
      const { missingProperty } = params as { missingProperty: string };
      return `${entry}: ${missingProperty} is missing: ${NEEDS[missingProperty]}`;
    }
    case 'additionalProperties': {
      const { additionalProperty } = params as { additionalProperty: string };
      return `${entry}: ${additionalProperty} is not a property of ${index === undefined ? 'a plan' : 'a column'}; it may have ${known(index !== undefined)}`;
    }
    default:
      if (place === undefined || place === '') return `${entry}: needs an object, got ${shown(data)}`;
      return `${entry}: ${place} ${NEEDS[place]}, got ${shown(valueAt(plan, instancePath.split('/').slice(1, index === undefined ? 2 : 4)))}`;
  }
}

const known = (inColumn: boolean): string => Object.keys(inColumn ? schema.definitions.column.properties : schema.properties).join(', ');

/** `entry 3 (sheet Hardness, anchor M5)` */
function entryName(plan: unknown, index: number): string {
  const entry = valueAt(plan, ['columns', String(index)]) as { sheet?: unknown; anchor?: unknown } | null;
  const told = (['sheet', 'anchor'] as const).flatMap((key) => (typeof entry?.[key] === 'string' ? [`${key} ${entry[key] as string}`] : []));
  return `entry ${index + 1}${told.length > 0 ? ` (${told.join(', ')})` : ''}`;
}

const valueAt = (from: unknown, path: readonly string[]): unknown =>
  path.reduce<unknown>((value, key) => (value as Record<string, unknown> | null | undefined)?.[key], from);

function shown(value: unknown): string {
  const text = JSON.stringify(value) ?? 'nothing';
  return text.length > 60 ? `${text.slice(0, 60)}…` : text;
}
