import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { FunctionBundle } from '../sheet/Desk';

/**
 * The built functions, from the folder of the command.
 *
 * @throws Error with words for a user where they are not there.
 */
export function bundleFiles(folder: string): FunctionBundle {
  const read = (name: string): string => {
    try {
      return readFileSync(join(folder, name), 'utf8');
    } catch {
      throw new Error(`${join(folder, name)} is missing: build it first (npm run build)`);
    }
  };
  return { source: read('functions.js'), metadata: read('functions.json') };
}
