/** Writes the reference of the functions into dist: `npm run reference`. */
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { registry } from '../functions/registry';
import { entries } from './entries';
import { referenceFiles } from './page';

const folder = process.argv[2] ?? fileURLToPath(new URL('../dist', import.meta.url));
const { version } = JSON.parse(readFileSync(new URL('../package.json', import.meta.url), 'utf8')) as { version: string };
mkdirSync(folder, { recursive: true });
for (const [name, text] of referenceFiles(registry, entries, version)) writeFileSync(join(folder, name), text);
