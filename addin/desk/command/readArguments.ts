import { parseArgs } from 'node:util';
import type { ParseArgsConfig } from 'node:util';
import { UsageError } from './Usage';

type Options = NonNullable<ParseArgsConfig['options']>;

/**
 * The options and the other arguments of a command; every command knows `--help`.
 *
 * @throws UsageError for an option that the command does not have.
 */
export function readArguments(args: readonly string[], options: Options): { values: Record<string, unknown>; positionals: string[] } {
  try {
    const { values, positionals } = parseArgs({ args: [...args], options: { ...options, help: { type: 'boolean', short: 'h' } }, allowPositionals: true });
    return { values, positionals };
  } catch (problem) {
    const { code, message } = problem as NodeJS.ErrnoException;
    if (code?.startsWith('ERR_PARSE_ARGS')) throw new UsageError(message.split('. To specify')[0]);
    throw problem;
  }
}
