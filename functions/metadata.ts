import { needOf } from './arguments';
import { families } from './declaration';
import type { Declaration, Parameter } from './declaration';
import { namespace } from './names';

/** The custom-functions metadata that the host reads. */
export interface FunctionsMetadata {
  readonly allowCustomDataForDataTypeAny: true;
  readonly allowErrorForDataTypeAny: true;
  readonly functions: readonly FunctionMetadata[];
}

export interface FunctionMetadata {
  readonly id: string;
  readonly name: string;
  readonly description: string;
  readonly parameters: readonly ParameterMetadata[];
  readonly result: { readonly type: 'any'; readonly dimensionality: 'matrix' };
  readonly options?: { readonly requiresAddress?: true; readonly requiresParameterAddresses?: true };
}

export interface ParameterMetadata {
  readonly name: string;
  readonly description: string;
  readonly type: 'any';
  readonly dimensionality: 'matrix';
  readonly optional?: true;
  readonly repeating?: true;
}

/**
 * The metadata of declarations. Everything is a matrix of `any`: a scalar parameter would make the host refuse a range before the function
 * can say why, and a scalar result cannot spill.
 */
export function functionsMetadata(declarations: readonly Declaration[]): FunctionsMetadata {
  return { allowCustomDataForDataTypeAny: true, allowErrorForDataTypeAny: true, functions: declarations.map(functionMetadata) };
}

/** Text of functions.json. */
export const functionsJson = (declarations: readonly Declaration[]): string => `${JSON.stringify(functionsMetadata(declarations), null, 2)}\n`;

function functionMetadata(declaration: Declaration): FunctionMetadata {
  const parameters = Object.entries(declaration.parameters);
  // Addresses of arguments tell a blank cell from a 0, so whatever takes more than flags wants them.
  const wantsAddresses = declaration.readsWorkbook || parameters.some(([, { kind }]) => kind !== 'boolean');
  return {
    id: declaration.name,
    name: declaration.name,
    description: declaration.help,
    parameters: parameters.map(([key, parameter], i) => ({
      name: parameter.label ?? key,
      description: parameterHelp(parameter),
      type: 'any',
      dimensionality: 'matrix',
      ...(mayBeOmitted(parameters, i) && { optional: true }),
      ...(parameter.repeating && { repeating: true }),
    })),
    result: { type: 'any', dimensionality: 'matrix' },
    ...(wantsAddresses && {
      options: { ...(declaration.readsWorkbook && { requiresAddress: true as const }), requiresParameterAddresses: true as const },
    }),
  };
}

/** An argument that others must follow cannot be omitted: its place is left empty, or it refers to a blank cell. */
const mayBeOmitted = (parameters: readonly (readonly [string, Parameter])[], i: number): boolean =>
  parameters.slice(i).every(([, { optional }]) => optional);

/** The help of an argument, with what it must be where its bounds or words say more than its help. */
export function parameterHelp(parameter: Parameter): string {
  const bounded = Object.values(parameter.bounds ?? {}).some((bound) => bound !== undefined && bound !== false);
  return bounded ? `${parameter.help} (${needOf(parameter)})` : parameter.help;
}

/** `ROOTSUM.UNC_FACTOR(probability, [dof], [shape])`. */
export function signature(declaration: Declaration): string {
  const list = Object.entries(declaration.parameters).map(([key, parameter], i, all) => {
    const name = parameter.label ?? key;
    return mayBeOmitted(all, i) ? `[${name}]` : name;
  });
  return `${namespace}.${declaration.name}(${list.join(', ')})`;
}

/** The table of functions for the README: markdown, one table a family. */
export function functionsTable(declarations: readonly Declaration[]): string {
  const parts = families.flatMap((family) => {
    const own = declarations.filter((declaration) => declaration.family === family);
    if (own.length === 0) return [];
    const rows = own.map((d) => `| \`${signature(d).slice(namespace.length + 1)}\` | ${cell(d.help)} | ${cell(d.result)} |`);
    return [`### ${family}\n\n| function | what it gives | cells of a result |\n|---|---|---|\n${rows.join('\n')}\n`];
  });
  return parts.join('\n');
}

const cell = (text: string): string => text.replaceAll('|', '\\|');
