import { families } from './declaration';
import type { Declaration } from './declaration';

/** The namespace, fixed for good: workbooks store it. */
export const namespace = 'ROOTSUM';

/**
 * What is wrong with the names and the order of parameters of a list of declarations, in words; empty if nothing is.
 * The underscore stands for a rule that cannot be checked against every language's list of built-in functions: none of them has one.
 *
 * @source   Microsoft's documentation of custom functions ("naming and localization"); that no built-in name has an underscore is from
 *           memory.
 */
export function namingProblems(declarations: readonly Declaration[]): readonly string[] {
  const stored = new Map<string, string>();
  return declarations.flatMap(({ name, family, parameters }) => {
    const twin = stored.get(storedName(name));
    stored.set(storedName(name), name);
    const entries = Object.entries(parameters);
    return [
      twin !== undefined && `${name} is stored under the same name as ${twin}`,
      !/^[A-Z][A-Z0-9._]{2,}$/.test(name) && `${name} must be 3 capitals, digits, dots or underscores or more, a letter first`,
      name.length + namespace.length + 1 > 128 && `${name} is too long`,
      /^[A-Z]{1,3}\d+$/.test(name) && `${name} reads as a cell`,
      /^R\d*(C\d*)?$|^C\d*$/.test(name) && `${name} reads as a cell in R1C1 form`,
      !name.includes('_') && `${name} has no underscore, so it may be a built-in function in some language`,
      !families.includes(family) && `${name} belongs to no family`,
      ...entries.flatMap(([key, parameter], i) => [
        parameter.repeating && i < entries.length - 1 && `${name}: ${key} repeats but is not last`,
        !parameter.optional && !parameter.repeating && i > 0 && entries[i - 1][1].optional && `${name}: ${key} is required after an optional argument`,
        !parameter.label && !/^[a-z][a-z0-9_]*$/.test(key) && `${name}: ${key} is no argument name`,
        parameter.kind === 'numbers' && parameter.per === 'cell' && `${name}: ${key} is a block and cannot be one a cell`,
      ]),
    ].filter((problem) => typeof problem === 'string');
  });
}

/** How a file stores the function, without the prefix that every custom function has: dots turned to underscores. */
export const storedName = (name: string): string => `${namespace}_${name}`.replaceAll('.', '_').toUpperCase();
