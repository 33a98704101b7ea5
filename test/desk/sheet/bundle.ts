import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { distFolder } from '../../tools/buildIfStale.js';
import type { FunctionBundle } from '../../../addin/desk/sheet/Desk';

/** What `npm run build` left: the very files that Excel loads. The tests' global setup builds them where they are stale. */
export const builtFunctions = (): FunctionBundle => ({
  source: readFileSync(join(distFolder, 'functions.js'), 'utf8'),
  metadata: readFileSync(join(distFolder, 'functions.json'), 'utf8'),
});
