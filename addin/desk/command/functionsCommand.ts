import type { FunctionsMetadata } from '../../../functions/metadata';
import { namespace } from '../../../functions/names';
import { bundleFiles } from './bundleFiles';
import { readArguments } from './readArguments';
import type { Command } from './Command';
import { FUNCTIONS_HELP, UsageError } from './Usage';

/** `rootsum functions [--json]` */
export const functionsCommand: Command = async (args, { terminal, folder }) => {
  const { values, positionals } = readArguments(args, { json: { type: 'boolean' } });
  if (values.help) return terminal.out(FUNCTIONS_HELP), 0;
  if (positionals.length > 0) throw new UsageError(`functions takes no further arguments, got ${positionals.join(' ')}`);
  const { metadata } = bundleFiles(folder);
  if (values.json) return terminal.out(metadata.trimEnd()), 0;
  for (const { name, description, parameters } of (JSON.parse(metadata) as FunctionsMetadata).functions) {
    const list = parameters.map((p) => (p.repeating ? `${p.name}, ...` : p.optional ? `[${p.name}]` : p.name));
    terminal.out(`${namespace}.${name}(${list.join(', ')})`);
    terminal.out(`    ${description}`);
  }
  return 0;
};
