import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { excel } from '../excel';

test('LIBRARY_VERSION gives the version of the package and the build', async () => {
  const { version } = JSON.parse(readFileSync(new URL('../../../package.json', import.meta.url), 'utf8')) as { version: string };
  const call = await excel();
  const [row] = await call('LIBRARY_VERSION');
  expect(row[0]).toBe(version);
  expect(row[1]).toMatch(new RegExp(`^${version.replaceAll('.', '\\.')}\\+[0-9a-f]{8}$`));
});
