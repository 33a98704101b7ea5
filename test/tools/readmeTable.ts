/** Writes the table of functions, derived from the registry, between its marks in README.md: `npm run table`. */
import { readFileSync, writeFileSync } from 'node:fs';
import { functionsTable } from '../../functions/metadata';
import { registry } from '../../functions/registry';

const readme = new URL('../../README.md', import.meta.url);
const [before, rest] = readFileSync(readme, 'utf8').split('<!-- functions -->');
const after = rest.split('<!-- /functions -->')[1];
writeFileSync(readme, `${before}<!-- functions -->\n${functionsTable(registry).trim()}\n<!-- /functions -->${after}`);
