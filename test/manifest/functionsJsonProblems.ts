import type { FunctionsMetadata } from '../../functions/metadata';

/**
 * What a host would refuse in functions.json, in words; empty if nothing.
 *
 * @source   Microsoft's documentation: "Custom functions naming and localization"; "Manually create JSON metadata for custom functions".
 *           Lengths and characters are those of `extensionFunction` in the published schema of the unified manifest, version 1.27, the
 *           only place that gives them as numbers.
 */
export function functionsJsonProblems({ functions }: FunctionsMetadata): string[] {
  const ids = new Set<string>();
  const names = new Set<string>();
  return functions.flatMap(({ id, name, description, parameters, result, options, ...others }) => {
    const twin = ids.has(id.toUpperCase()) || names.has(name.toUpperCase());
    ids.add(id.toUpperCase());
    names.add(name.toUpperCase());
    const repeating = parameters.filter((parameter) => parameter.repeating);
    const firstOptional = parameters.findIndex((parameter) => parameter.optional);
    const labels = parameters.map((parameter) => parameter.name.toLowerCase());
    const found: (string | false | undefined)[] = [
      twin && 'has the id or name of another',
      !/^[A-Za-z][A-Za-z0-9._]{2,63}$/.test(id) && 'has an id of wrong length or characters',
      !/^\p{L}[\p{L}0-9._]{2,63}$/u.test(name) && 'has a name of wrong length or characters',
      isCell(name) && 'has a name that reads as a cell',
      !within(description, 1024) && 'has a description of wrong length',
      parameters.length > 128 && 'has too many arguments',
      new Set(labels).size < labels.length && 'has two arguments of one name',
      repeating.length > 1 && 'has two repeating arguments',
      repeating.length === 1 && repeating[0] !== parameters.at(-1) && 'has a repeating argument that is not last',
      firstOptional >= 0
        && parameters.slice(firstOptional).some((p) => !p.optional && !p.repeating)
        && 'has a required argument after an optional one',
      options?.requiresParameterAddresses
        && result.dimensionality !== 'matrix'
        && 'wants addresses of arguments but gives no matrix',
      Object.keys(others).length > 0 && `has unknown members ${Object.keys(others).join(', ')}`,
      unknownOptions(options) !== '' && `has options that it may not combine with addresses: ${unknownOptions(options)}`,
      ...parameters.flatMap((p) => [
        !within(p.name, 64) && `has an argument name of wrong length: ${p.name}`,
        !within(p.description, 512) && `has a description of wrong length for ${p.name}`,
      ]),
    ];
    return found.filter((problem) => typeof problem === 'string').map((problem) => `${name} ${problem}`);
  });
}

const within = (text: string, most: number): boolean => text.trim().length > 0 && text.length <= most;

/** `stream`, `cancelable` and `volatile` are used by no function; a function that streams may not ask for addresses. */
const unknownOptions = (options: object = {}): string =>
  Object.keys(options).filter((key) => key !== 'requiresAddress' && key !== 'requiresParameterAddresses').join(', ');

/** A cell of a sheet of 16,384 columns and 1,048,576 rows, in either style. */
function isCell(name: string): boolean {
  const a1 = /^([A-Z]{1,3})0*([1-9]\d*)$/i.exec(name);
  if (a1) {
    const column = [...a1[1].toUpperCase()].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0);
    return column <= 16384 && Number(a1[2]) <= 1048576;
  }
  return /^(R\d*)?(C\d*)?$/i.test(name);
}
