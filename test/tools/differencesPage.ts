/** Writes DIFFERENCES.md from the lists of the tests: part of `npm run table`. */
import { writeFileSync } from 'node:fs';
import { differencesPage } from './differencesText';

writeFileSync(new URL('../../DIFFERENCES.md', import.meta.url), differencesPage());
