/**
 * Writes the manifests and their icons into dist, or into the folder that is given: `npm run manifest`.
 * The address at which the add-in is served comes from the environment: `ROOTSUM_HOST=https://lab.example/rootsum npm run manifest`.
 */
import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { EngineError } from '../functions/engine/EngineError';
import { manifestFiles } from './manifestFiles';

const folder = process.argv[2] ?? fileURLToPath(new URL('../dist', import.meta.url));

try {
  for (const [name, content] of manifestFiles(process.env.ROOTSUM_HOST)) {
    const path = join(folder, name);
    mkdirSync(dirname(path), { recursive: true });
    writeFileSync(path, content);
  }
} catch (error) {
  if (!(error instanceof EngineError)) throw error;
  console.error(error.message);
  process.exitCode = 1;
}
