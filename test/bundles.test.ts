import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { manifestFiles } from '../manifest/manifestFiles';
import { distFolder } from './tools/buildIfStale.js';

const size = (name: string): number => gzipSync(readFileSync(join(distFolder, name))).length;

describe('what is loaded, packed', () => {
  it('functions at start-up: at most 150 kB', () => expect(size('functions.js')).toBeLessThanOrEqual(150_000));
  it('the add-in\'s own start: at most 30 kB, the pane comes when it is opened', () => {
    expect(size('excel.js')).toBeLessThanOrEqual(30_000);
    expect(readFileSync(join(distFolder, 'excel.js'), 'utf8')).not.toContain('Press again to write over');
  });
  it('the desk\'s page: at most 200 kB before the pane', () => expect(size('desk.js')).toBeLessThanOrEqual(200_000));
});

describe('the addresses in the manifests', () => {
  it.each(['manifest.xml', 'manifest.json'])('%s: every file that it names is built', (name) => {
    const text = String(manifestFiles('https://lab.example/x').get(name));
    const named = [...new Set([...text.matchAll(/https:\/\/lab\.example\/x\/([\w./-]+)/g)].map(([, file]) => file))];
    expect(named).toContain('taskpane.html');
    expect(named).toContain('functions.json');
    expect(named.filter((file) => !existsSync(join(distFolder, file)))).toEqual([]);
  });
});
